import { LuDecomposition, Matrix } from 'ml-matrix';
import { inPieces, piecesFor } from './in-pieces';
import { numberingOf, type Numbering } from './numbering';
import type { Acting } from './second-loads';
import { restraintOf, type Given, type Setup } from './second-setup';
import { transferOf } from './transfer';
import { twoEnds, type TwoEnds } from './two-ends';

/** The equations of one stiffness, with the numbers of their unknowns. */
export interface Equations {
  readonly numbering: Numbering;
  readonly number: Int32Array;
  readonly count: number;
  /** Undefined for slack members. */
  readonly ends: readonly (TwoEnds | undefined)[];
  /** count × count, row by row. */
  readonly K: Float64Array;
}

/** … factored, scaled to a unit diagonal. */
export interface Factored {
  readonly scale: Float64Array;
  readonly lu: LuDecomposition;
  /** Sign of the determinant; 0 where it is too small to tell. */
  readonly sign: number;
}

/** A member between its nodes under one state's loads. */
export function endsOf({ members }: Setup, given: Given, i: number, acting: Acting): TwoEnds | null {
  const m = members[i]!;
  const a = given.stiffness ? given.stiffness[2 * i]! : 1;
  const EA = m.EA * a;
  const EI = given.stiffness ? m.EI * given.stiffness[2 * i + 1]! : m.EI;
  const stiffness = { EA, EI, slip: m.slip / a };
  const joints = { start: m.startGive / a, end: m.endGive / a };
  const axial = given.axial ? given.axial[i]! : null;
  const pieces = axial === null ? 1 : piecesFor(stiffness, acting, axial);
  if (pieces > 1) return inPieces(stiffness, acting, axial!, joints, pieces);
  const t = transferOf(stiffness, acting, axial);
  return t && twoEnds(t, m.L, EA, EI, joints);
}

/**
 * Sums up K (dense), unknowns along the supports' axes.
 * @param again K may stand where that of the call before stood   @returns null where a member buckles between its nodes
 */
export function equationsOf(setup: Setup, given: Given, acting: readonly Acting[], again = false): Equations | null {
  const key = [...given.slack].join();
  const known = setup.numberings.get(key) ?? numberingOf(setup, given.slack);
  setup.numberings.set(key, known);
  const { number, count: n } = known;
  const K = again && setup.room.K.length === n * n ? setup.room.K.fill(0) : new Float64Array(n * n);
  if (again) setup.room.K = K;
  const ends: (TwoEnds | undefined)[] = [];
  for (let i = 0; i < setup.members.length; i++) {
    const two = given.slack.has(i) ? undefined : endsOf(setup, given, i, acting[i]!);
    if (two === null) return null;
    ends.push(two);
    if (two) addTurned(setup, K, n, number, i, two.k);
  }
  for (const support of setup.frame.supports)
    for (let r = 0; r < 3; r++) {
      const spring = restraintOf(support, r);
      const u = number[3 * support.node + r]!;
      if (typeof spring === 'number' && u >= 0) K[u * n + u]! += spring;
    }
  return { numbering: known, number, count: n, ends, K };
}

/** LU with row exchanges. @returns null where K is singular */
export function factored({ K, count: n }: Equations): Factored | null {
  const scale = new Float64Array(n);
  for (let i = 0; i < n; i++) {
    scale[i] = 1 / Math.sqrt(Math.abs(K[i * n + i]!));
    if (!Number.isFinite(scale[i])) return null;
  }
  const scaled = Matrix.zeros(n, n);
  for (let i = 0; i < n; i++) for (let j = 0; j < n; j++) scaled.set(i, j, K[i * n + j]! * scale[i]! * scale[j]!);
  const lu = new LuDecomposition(n === 0 ? Matrix.eye(1) : scaled);
  if (lu.isSingular()) return null;
  return { scale, lu, sign: Math.sign(lu.determinant) };
}

/**
 * K⁻¹ to first order of a frame without its slack members, row by row; worked out once for each set of these.
 * @returns null where it cannot stand
 */
export function firstOrderInverse(setup: Setup, given: Given, acting: readonly Acting[]): Float64Array | null {
  const key = [...given.slack].join();
  const before = setup.inverses.get(key);
  if (before !== undefined) return before;
  const equations = equationsOf(setup, { ...given, axial: null, stiffness: null }, acting);
  const factors = equations && factored(equations);
  let inverse: Float64Array | null = null;
  if (factors) {
    const { lu, scale } = factors;
    const n = scale.length;
    inverse = new Float64Array(n * n);
    const columns = n === 0 ? Matrix.zeros(0, 0) : lu.solve(Matrix.eye(n));
    for (let i = 0; i < n; i++) for (let j = 0; j < n; j++) inverse[i * n + j] = columns.get(i, j) * scale[i]! * scale[j]!;
  }
  setup.inverses.set(key, inverse);
  return inverse;
}

/** d for some right-hand sides, each by number; with one step of refinement, for forces are differences of large products. */
export function solveFor({ K, count: n }: Equations, { scale, lu }: Factored, sides: readonly Float64Array[]): Float64Array[] {
  if (n === 0) return sides.map(() => new Float64Array(0));
  const solve = (right: readonly Float64Array[], into: readonly Float64Array[]): void => {
    const B = Matrix.zeros(n, right.length);
    right.forEach((side, c) => {
      for (let i = 0; i < n; i++) B.set(i, c, side[i]! * scale[i]!);
    });
    const X = lu.solve(B);
    into.forEach((d, c) => {
      for (let i = 0; i < n; i++) d[i]! += X.get(i, c) * scale[i]!;
    });
  };
  const d = sides.map(() => new Float64Array(n));
  solve(sides, d);
  const left = sides.map((side, c) => minus(side, K, n, d[c]!));
  solve(left, d);
  return d;
}

/** f − K d. */
function minus(f: Float64Array, K: Float64Array, n: number, d: Float64Array): Float64Array {
  const left = new Float64Array(n);
  for (let i = 0; i < n; i++) {
    let sum = f[i]!;
    for (let j = 0; j < n; j++) sum -= K[i * n + j]! * d[j]!;
    left[i] = sum;
  }
  return left;
}

/** cos and sin that turn the movements of each end of a member from its node's axes into the member's own. */
export function turningOf({ members, axes }: Setup, i: number): readonly [number, number, number, number] {
  const { start, end, ex, ey } = members[i]!;
  const [c1, s1, c2, s2] = [axes[2 * start]!, axes[2 * start + 1]!, axes[2 * end]!, axes[2 * end + 1]!];
  return [ex * c1 + ey * s1, ey * c1 - ex * s1, ex * c2 + ey * s2, ey * c2 - ex * s2];
}

const T = new Float64Array(36);
const kT = new Float64Array(36);
const at = new Int32Array(6);

/** K += Tᵀ k T. */
function addTurned(setup: Setup, K: Float64Array, n: number, number: Int32Array, i: number, k: Float64Array): void {
  const [c1, s1, c2, s2] = turningOf(setup, i);
  T.fill(0);
  T[0] = T[7] = c1;
  T[1] = s1;
  T[6] = -s1;
  T[21] = T[28] = c2;
  T[22] = s2;
  T[27] = -s2;
  T[14] = T[35] = 1;
  const { start, end } = setup.members[i]!;
  for (let r = 0; r < 6; r++) at[r] = number[3 * (r < 3 ? start : end) + (r % 3)]!;
  for (let r = 0; r < 6; r++)
    for (let c = 0; c < 6; c++) {
      let sum = 0;
      for (let m = 0; m < 6; m++) sum += k[6 * r + m]! * T[6 * m + c]!;
      kT[6 * r + c] = sum;
    }
  for (let r = 0; r < 6; r++) {
    if (at[r]! < 0) continue;
    for (let c = 0; c < 6; c++) {
      if (at[c]! < 0) continue;
      let sum = 0;
      for (let m = 0; m < 6; m++) sum += T[6 * m + r]! * kT[6 * m + c]!;
      K[at[r]! * n + at[c]!]! += sum;
    }
  }
}
