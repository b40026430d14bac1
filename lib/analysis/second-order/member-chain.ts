import type { MemberData } from '../member-data';
import { stride, type MemberLoading } from './member-loading';
import { closed, emptyPiece, emptyTransfer, follow, jump, type Piece } from './piece';
import { given, longest, transferGiven } from './transfer';

/** Where the axial force leaves a member no stiffness, so that the frame is past its critical load. */
export interface Buckled {
  yes: boolean;
}

/** Followed from start to end a length up to this √(|N| l²/EI) keeps its digits, and is stable clamped (2π). */
const longestGroup = 4;

const group = emptyPiece();
const whole = emptyTransfer();
const one = emptyTransfer();

/**
 * Exact stiffness and clamped end forces of a member under the axial force N + (n of its loading), pieces and joints
 * condensed. README §8. Pieces follow one another from start to end; where the force is large they are joined in groups by
 * elimination, so that short pieces cost no digits and long ties don't overflow.
 *
 * @param N at its start, before a force exactly there, N, tension positive; null = first order: no axial force bends it
 * @param released false: with its ends clamped to the nodes, whatever its joints
 * @param out overwritten   @param buckled set where it has no stiffness left between its nodes
 * @param share of the loading's axial forces that acts; its loads across act whole
 */
export function memberChain(
  m: MemberData,
  loading: MemberLoading,
  N: number | null,
  released: boolean,
  out: Piece,
  buckled: Buckled,
  share = 1,
): void {
  const { count, stretches } = loading;
  const slip = m.GAv === Infinity ? 0 : 1 / m.GAv;
  const bends = N === null ? 0 : share;
  const start = N ?? 0;
  let total = 0;
  if (bends) for (let i = 0; i < count; i++) total += slenderness(m, loading, i, start, slip, buckled, bends);
  const groups = Math.max(1, Math.ceil(total / longestGroup));
  const finest = groups > 1 ? 1 : longest;
  let done = 0;
  let before = 0;
  let fresh = true;
  for (let i = 0; i < count; i++) {
    const o = stride * i;
    const n1 = bends * stretches[o + 2]!;
    const n2 = bends * stretches[o + 3]!;
    const q1 = stretches[o + 5]!;
    const a = start + bends * stretches[o + 1]!;
    const slender = count === 1 || !bends ? total : slenderness(m, loading, i, start, slip, buckled, bends);
    const pieces = Math.max(1, Math.ceil(slender / finest));
    const h = stretches[o]! / pieces;
    for (let j = 0; j < pieces; j++) {
      const s = j * h;
      const T = fresh ? whole : one;
      given[0] = m.EI;
      given[1] = slip;
      given[2] = h;
      given[3] = a + s * (n1 + s * n2);
      given[4] = n1 + 2 * s * n2;
      given[5] = n2;
      given[6] = stretches[o + 4]! + s * q1;
      given[7] = q1;
      given[8] = loading.curvature;
      transferGiven(T);
      if (j === 0) jump(T, stretches[o + 6]!, stretches[o + 7]!);
      if (!fresh) follow(whole, one);
      done += slender / pieces;
      fresh = before < groups - 1 && done >= (total * (before + 1)) / groups;
      if (fresh) closeGroup(before++, out, buckled);
    }
  }
  whole.Q_p += loading.endPy;
  whole.M_p -= loading.endM;
  closeGroup(before, out, buckled);
  out.ka = m.EA / m.length;
  if (!released) return;
  if (m.startSpring !== Infinity) releaseStart(out, m.startSpring, buckled);
  if (m.endSpring !== Infinity) releaseEnd(out, m.endSpring, buckled);
}

/** Number of pieces that `memberChain` divides a member into. */
export function piecesAlong(m: MemberData, loading: MemberLoading, N: number): number {
  const slip = m.GAv === Infinity ? 0 : 1 / m.GAv;
  let total = 0;
  for (let i = 0; i < loading.count; i++) total += slenderness(m, loading, i, N, slip, { yes: false }, 1);
  let pieces = 0;
  for (let i = 0; i < loading.count; i++)
    pieces += Math.max(
      1,
      Math.ceil(slenderness(m, loading, i, N, slip, { yes: false }, 1) / (total > longestGroup ? 1 : longest)),
    );
  return pieces;
}

/** √(|N| l²/EI) of one stretch, N its largest. */
function slenderness(
  m: MemberData,
  { stretches }: MemberLoading,
  i: number,
  N: number,
  slip: number,
  buckled: Buckled,
  share: number,
): number {
  const o = stride * i;
  const l = stretches[o]!;
  const n2 = share * stretches[o + 3]!;
  const a = N + share * stretches[o + 1]!;
  const b = a + l * (share * stretches[o + 2]! + l * n2);
  const bulge = 0.25 * Math.abs(n2) * l * l;
  const size = Math.max(Math.abs(a), Math.abs(b)) + bulge;
  let per = 1;
  if (slip > 0) {
    per = Math.min(1, 1 + (Math.min(a, b) - bulge) * slip);
    // no stiffness is left at P = GAv
    if (!(per > 1e-3)) {
      buckled.yes = true;
      per = 1e-3;
    }
  }
  return Math.sqrt(size / (m.EI * per)) * l;
}

function closeGroup(before: number, out: Piece, buckled: Buckled): void {
  if (before === 0) return closed(whole, out);
  closed(whole, group);
  join(out, group, buckled);
}

/** Joins B to the end of A, eliminating v and ψ between them; the result stands in A. */
function join(A: Piece, B: Piece, buckled: Buckled): void {
  const p = A.kvv + B.kvv;
  const r = B.kv1 - A.kv2;
  const q = A.S22 + B.S11 - (r * r) / p;
  if (!(p > 0 && q > 0)) buckled.yes = true;
  const g = A.Y2 + B.Y1;
  const gt = A.m2 + B.m1 - (r * g) / p;
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
  const all = A.Y1 + A.Y2 + B.Y1 + B.Y2;
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
