import type { MemberData } from '../member-data';
import { stride, type MemberLoading } from './member-loading';
import { emptyPiece, fillPiece, longest, type Piece } from './piece';

/** Where the axial force leaves a member no stiffness, so that the frame is past its critical load. */
export interface Buckled {
  yes: boolean;
}

const next = emptyPiece();

/** Number of pieces of a stretch: none longer than √(|N| l²/EI) = `longest`, N at most `most` in size. */
export function piecesOf(m: MemberData, length: number, most: number, least: number): number {
  const per = m.GAv === Infinity || least >= 0 ? 1 : Math.max(1e-3, 1 + least / m.GAv);
  return Math.max(1, Math.ceil((Math.sqrt(most / (m.EI * per)) * length) / longest));
}

/**
 * Exact stiffness and clamped end forces of a member under the axial force N + (n of its loading), pieces and joints
 * condensed. README §5.
 *
 * @param N at its start, before a force exactly there, N, tension positive
 * @param released false: with its ends clamped to the nodes, whatever its joints
 * @param out overwritten   @param buckled set where it has no stiffness left between its nodes
 */
export function memberChain(
  m: MemberData,
  loading: MemberLoading,
  N: number,
  released: boolean,
  out: Piece,
  buckled: Buckled,
): void {
  const { count, stretches } = loading;
  const slip = m.GAv === Infinity ? 0 : 1 / m.GAv;
  let first = true;
  for (let i = 0; i < count; i++) {
    const o = stride * i;
    const l = stretches[o]!;
    const a = N + stretches[o + 1]!;
    const n1 = stretches[o + 2]!;
    const n2 = stretches[o + 3]!;
    const b = a + l * (n1 + l * n2);
    const bulge = 0.25 * Math.abs(n2) * l * l;
    const least = Math.min(a, b) - bulge;
    if (!(1 + least * slip > 1e-3)) buckled.yes = true;
    const pieces = piecesOf(m, l, Math.max(Math.abs(a), Math.abs(b)) + bulge, least);
    const h = l / pieces;
    for (let j = 0; j < pieces; j++) {
      const s = j * h;
      const to = first ? out : next;
      fillPiece(
        m.EI,
        slip,
        h,
        a + s * (n1 + s * n2),
        n1 + 2 * s * n2,
        n2,
        stretches[o + 4]! + s * stretches[o + 5]!,
        stretches[o + 5]!,
        loading.curvature,
        to,
      );
      const Py = j === 0 ? stretches[o + 6]! : 0;
      const M0 = j === 0 ? stretches[o + 7]! : 0;
      if (first) {
        out.Y1 -= Py;
        out.m1 -= M0;
      } else join(out, next, Py, M0, buckled);
      first = false;
    }
  }
  out.Y2 -= loading.endPy;
  out.m2 -= loading.endM;
  out.ka = m.EA / m.length;
  if (!released) return;
  if (m.startSpring !== Infinity) releaseStart(out, m.startSpring, buckled);
  if (m.endSpring !== Infinity) releaseEnd(out, m.endSpring, buckled);
}

/** Joins B to the end of A, eliminating v and ψ between them, where P and M₀ act; the result stands in A. */
function join(A: Piece, B: Piece, Py: number, M0: number, buckled: Buckled): void {
  const p = A.kvv + B.kvv;
  const r = B.kv1 - A.kv2;
  const q = A.S22 + B.S11 - (r * r) / p;
  if (!(p > 0 && q > 0)) buckled.yes = true;
  const g = A.Y2 + B.Y1 - Py;
  const gt = A.m2 + B.m1 - M0 - (r * g) / p;
  // columns of v₁, θ₁, θ₂ in the rows of v between and, after it, of ψ between
  const v1 = -A.kvv;
  const t1 = -A.kv1;
  const t2 = B.kv2;
  const wv = A.kv2 - (r * v1) / p;
  const w1 = A.S12 - (r * t1) / p;
  const w2 = B.S12 - (r * t2) / p;
  const { kvv, kv1, S11 } = A;
  A.kvv = kvv - (v1 * v1) / p - (wv * wv) / q;
  A.kv1 = kv1 - (v1 * t1) / p - (wv * w1) / q;
  A.kv2 = -(v1 * t2) / p - (wv * w2) / q;
  A.S11 = S11 - (t1 * t1) / p - (w1 * w1) / q;
  A.S12 = -(t1 * t2) / p - (w1 * w2) / q;
  A.S22 = B.S22 - (t2 * t2) / p - (w2 * w2) / q;
  const all = A.Y1 + A.Y2 + B.Y1 + B.Y2 - Py;
  A.Y1 -= (v1 * g) / p + (wv * gt) / q;
  A.m1 -= (t1 * g) / p + (w1 * gt) / q;
  A.m2 = B.m2 - (t2 * g) / p - (w2 * gt) / q;
  A.Y2 = all - A.Y1;
}

/** Puts a joint of stiffness k between the start and its node. */
function releaseStart(A: Piece, k: number, buckled: Buckled): void {
  const p = A.S11 + k;
  if (!(p > 0)) buckled.yes = true;
  const y = (A.kv1 * A.m1) / p;
  A.Y1 -= y;
  A.Y2 += y;
  A.m2 -= (A.S12 * A.m1) / p;
  A.m1 *= k / p;
  A.kvv -= (A.kv1 * A.kv1) / p;
  A.kv2 -= (A.kv1 * A.S12) / p;
  A.S22 -= (A.S12 * A.S12) / p;
  A.kv1 *= k / p;
  A.S12 *= k / p;
  A.S11 *= k / p;
}

function releaseEnd(A: Piece, k: number, buckled: Buckled): void {
  const p = A.S22 + k;
  if (!(p > 0)) buckled.yes = true;
  const y = (A.kv2 * A.m2) / p;
  A.Y1 -= y;
  A.Y2 += y;
  A.m1 -= (A.S12 * A.m2) / p;
  A.m2 *= k / p;
  A.kvv -= (A.kv2 * A.kv2) / p;
  A.kv1 -= (A.kv2 * A.S12) / p;
  A.S11 -= (A.S12 * A.S12) / p;
  A.kv2 *= k / p;
  A.S12 *= k / p;
  A.S22 *= k / p;
}
