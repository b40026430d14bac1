import type { Acting } from './second-loads';
import { transferOf, type Stiffness } from './transfer';
import { twoEnds, type Joints, type TwoEnds } from './two-ends';

/** √(N/EI) × length of a piece, at most: what is carried along a pulled member grows like its exponential and drowns the rest. */
const mostPull = 4;

/** How many pieces a member under tension is carried in. @param axial N at its start */
export function piecesFor({ EI }: Stiffness, { lengths, lines, places }: Acting, axial: number): number {
  let N = axial;
  let most = N;
  let length = 0;
  for (let i = 0; i < lengths.length; i++) {
    const l = lengths[i]!;
    const q = lines[4 * i]!;
    const grow = lines[4 * i + 2]!;
    if (places.length > 0) N -= places[3 * i]!;
    most = Math.max(most, N, N - (l / 2) * (q + (l * grow) / 4));
    N -= l * (q + (l * grow) / 2);
    most = Math.max(most, N);
    length += l;
  }
  return most > 0 ? Math.max(1, Math.ceil((length * Math.sqrt(most / EI)) / mostPull)) : 1;
}

/**
 * A member carried in pieces, each rigidly joined to the next, the places between them condensed.
 * @returns null as twoEnds does
 */
export function inPieces(k: Stiffness, acting: Acting, axial: number, joints: Joints, count: number): TwoEnds | null {
  const whole = transferOf(k, acting, null)!;
  const cuts = cut(acting, count);
  let N = axial;
  let so: TwoEnds | null = null;
  for (let i = 0; i < cuts.length; i++) {
    const piece = cuts[i]!;
    const t = transferOf(k, piece, N);
    const L = lengthOf(piece);
    const ends =
      t && twoEnds(t, L, k.EA, k.EI, { start: i === 0 ? joints.start : 0, end: i === cuts.length - 1 ? joints.end : 0 });
    if (!ends) return null;
    so = so === null ? ends : joined(so, ends);
    if (so === null) return null;
    N += t.gainN;
  }
  // along the member, as of the whole
  const stiff = k.EA / lengthOf(acting);
  so!.k[0] = so!.k[21] = stiff;
  so!.k[3] = so!.k[18] = -stiff;
  so!.q0[0] = stiff * whole.gainU;
  so!.q0[3] = whole.gainN - stiff * whole.gainU;
  return so;
}

const lengthOf = ({ lengths }: Acting): number => lengths.reduce((sum, l) => sum + l, 0);

/** Stretches cut so that each piece has about the same length; what stands at a cut belongs to the piece before it. */
function cut(acting: Acting, count: number): Acting[] {
  const most = lengthOf(acting) / count;
  const pieces: Acting[] = [];
  acting.lengths.forEach((l, i) => {
    const parts = Math.max(1, Math.ceil(l / most));
    const h = l / parts;
    for (let p = 0; p < parts; p++) {
      const { lines, strain, curvature } = acting;
      const [qx, qy, growX, growY] = [lines[4 * i]!, lines[4 * i + 1]!, lines[4 * i + 2]!, lines[4 * i + 3]!];
      const places = new Float64Array(acting.places.length > 0 ? 6 : 0);
      if (acting.places.length > 0 && p === 0 && i === 0) places.set(acting.places.subarray(0, 3), 0);
      if (acting.places.length > 0 && p === parts - 1) places.set(acting.places.subarray(3 * i + 3, 3 * i + 6), 3);
      const cut = Float64Array.of(qx + p * h * growX, qy + p * h * growY, growX, growY);
      pieces.push({ lengths: [h], lines: cut, places, strain, curvature });
    }
  });
  return pieces;
}

const outer = [1, 2, 4, 5];

/** Two pieces made one: v and φ between them follow from balance there. Bending only. */
function joined(a: TwoEnds, b: TwoEnds): TwoEnds | null {
  const A = (r: number, c: number): number => a.k[6 * r + c]!;
  const B = (r: number, c: number): number => b.k[6 * r + c]!;
  // balance between: m · [v φ] = −(what the outer ends and the loads do there)
  const m = [A(4, 4) + B(1, 1), A(4, 5) + B(1, 2), A(5, 4) + B(2, 1), A(5, 5) + B(2, 2)] as const;
  const determinant = m[0] * m[3] - m[1] * m[2];
  if (!(Math.abs(determinant) > 1e-13 * Math.abs(m[0] * m[3]))) return null;
  const right = (r: 0 | 1): number[] => [A(4 + r, 1), A(4 + r, 2), B(1 + r, 4), B(1 + r, 5), a.q0[4 + r]! + b.q0[1 + r]!];
  const [f, g] = [right(0), right(1)];
  const v = f.map((_, c) => -(m[3] * f[c]! - m[1] * g[c]!) / determinant);
  const phi = f.map((_, c) => -(m[0] * g[c]! - m[2] * f[c]!) / determinant);
  const k = new Float64Array(36);
  const q0 = new Float64Array(6);
  const phiStart = new Float64Array(5);
  const phiEnd = new Float64Array(5);
  for (let c = 0; c < 5; c++) {
    const own = [0, 1, 2, 3, 4].map((i) => (i === c ? 1 : 0));
    // what each piece’s ends see: v₁ φ₁ v₂ φ₂ and its own loads
    const [seenA, seenB] = [[own[0]!, own[1]!, v[c]!, phi[c]!, own[4]!], [v[c]!, phi[c]!, own[2]!, own[3]!, own[4]!]]; // prettier-ignore
    const row = (e: TwoEnds, r: number, seen: readonly number[]): number =>
      outer.reduce((sum, o, i) => sum + e.k[6 * r + o]! * seen[i]!, e.q0[r]! * seen[4]!);
    const forces = [row(a, 1, seenA), row(a, 2, seenA), row(b, 4, seenB), row(b, 5, seenB)];
    outer.forEach((r, i) => {
      if (c === 4) q0[r] = forces[i]!;
      else k[6 * r + outer[c]!] = forces[i]!;
    });
    phiStart[c] = seenA.reduce((sum, s, i) => sum + s * a.phiStart[i]!, 0);
    phiEnd[c] = seenB.reduce((sum, s, i) => sum + s * b.phiEnd[i]!, 0);
  }
  return { k, q0, phiStart, phiEnd };
}
