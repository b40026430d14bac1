import type { MemberStiffness } from '../assemble';
import type { MemberData } from '../member-data';
import type { AxialPiece } from './axial-pieces';
import { shearLoss, shearStabilityFunctions, stabilityFunctions, type StabilityFunctions } from './stability-functions';

/**
 * How the unknowns inside members stand at a load factor: pivots below zero and clamped pieces already buckled (together
 * the members' share of the Wittrick–Williams count), and the product of the pivots' sizes: e^logSize × size.
 */
export interface InnerCount {
  negative: number;
  logSize: number;
  size: number;
}

/** Counts a pivot; a logarithm is taken only where the product would leave the numbers. */
export function pass(pivot: number, count: InnerCount): void {
  if (pivot < 0) count.negative++;
  const size = count.size * Math.abs(pivot);
  if (size > 1e-140 && size < 1e140) count.size = size;
  else {
    count.logSize += Math.log(count.size) + Math.log(Math.abs(pivot));
    count.size = 1;
  }
}

const functions: StabilityFunctions = { s: 0, sc: 0 };
const piece: MemberStiffness = { ka: 0, kvv: 0, kv1: 0, kv2: 0, S11: 0, S12: 0, S22: 0 };

/**
 * Exact stiffness of a member at load factor λ, its pieces and joints condensed. README §4.
 *
 * @param pieces axial force at λ = 1   @param out overwritten   @param count added to
 */
export function bucklingMember(
  m: MemberData,
  pieces: readonly AxialPiece[],
  lambda: number,
  out: MemberStiffness,
  count: InnerCount,
): void {
  let passed = pieceStiffness(m, pieces[0]!, lambda, piece);
  copyStiffness(piece, out);
  count.negative += passed;
  for (let i = 1; i < pieces.length; i++) {
    if (pieces[i] !== pieces[i - 1]) passed = pieceStiffness(m, pieces[i]!, lambda, piece);
    count.negative += passed;
    joinPiece(out, piece, count);
  }
  if (m.startSpring !== Infinity) releaseStart(out, m.startSpring, count);
  if (m.endSpring !== Infinity) releaseEnd(out, m.endSpring, count);
  out.ka = m.EA / m.length;
}

function copyStiffness(from: MemberStiffness, to: MemberStiffness): void {
  to.kvv = from.kvv;
  to.kv1 = from.kv1;
  to.kv2 = from.kv2;
  to.S11 = from.S11;
  to.S12 = from.S12;
  to.S22 = from.S22;
}

/**
 * Stability functions for the mean force; its linear part by the consistent geometric stiffness of cubic shapes.
 * @returns critical loads of the clamped piece passed
 */
function pieceStiffness({ EI, GAv }: MemberData, p: AxialPiece, lambda: number, out: MemberStiffness): number {
  const l = p.length;
  const P = -lambda * p.N;
  const x = (P * l * l) / EI;
  const shear = GAv === Infinity ? 0 : (12 * EI) / (GAv * l * l);
  if (shear === 0) stabilityFunctions(x, functions);
  else shearStabilityFunctions(x, shear, functions);
  const { s, sc } = functions;
  const a = (s * EI) / l;
  const b = (sc * EI) / l;
  const tilt = lambda * p.slope * l;
  out.kvv = (2 * (a + b)) / (l * l) - P / l;
  out.kv1 = (a + b) / l + tilt / 20;
  out.kv2 = (a + b) / l - tilt / 20;
  out.S11 = a - (tilt * l) / 30;
  out.S12 = b;
  out.S22 = a + (tilt * l) / 30;
  // clamped buckling loads passed = pinned ones passed − negative eigenvalues s ± sc of the end rotations
  const y = shear === 0 ? x : x / shearLoss(x, shear);
  return y > 9 ? Math.floor(Math.sqrt(y) / Math.PI) - (s + sc < 0 ? 1 : 0) - (s - sc < 0 ? 1 : 0) : 0;
}

/** Joins piece B to the end of A, eliminating v and θ between them; the result stands in A. */
function joinPiece(A: MemberStiffness, B: MemberStiffness, count: InnerCount): void {
  const p = A.kvv + B.kvv || Number.MIN_VALUE;
  const r = B.kv1 - A.kv2;
  const q = A.S22 + B.S11 - (r * r) / p || Number.MIN_VALUE;
  pass(p, count);
  pass(q, count);
  // columns of v₀, θ₀, θ₂ on (v₁, θ₁), and what is left of θ₁ after v₁
  const v0 = -A.kvv;
  const t0 = -A.kv1;
  const t2 = B.kv2;
  const wv = A.kv2 - (r * v0) / p;
  const w0 = A.S12 - (r * t0) / p;
  const w2 = B.S12 - (r * t2) / p;
  const { kvv, kv1, S11 } = A;
  A.kvv = kvv - (v0 * v0) / p - (wv * wv) / q;
  A.kv1 = kv1 - (v0 * t0) / p - (wv * w0) / q;
  A.kv2 = -(v0 * t2) / p - (wv * w2) / q;
  A.S11 = S11 - (t0 * t0) / p - (w0 * w0) / q;
  A.S12 = -(t0 * t2) / p - (w0 * w2) / q;
  A.S22 = B.S22 - (t2 * t2) / p - (w2 * w2) / q;
}

/** Puts a joint of stiffness k between the start and its node. */
function releaseStart(A: MemberStiffness, k: number, count: InnerCount): void {
  const p = A.S11 + k || Number.MIN_VALUE;
  pass(p, count);
  A.kvv -= (A.kv1 * A.kv1) / p;
  A.kv2 -= (A.kv1 * A.S12) / p;
  A.S22 -= (A.S12 * A.S12) / p;
  A.kv1 *= k / p;
  A.S12 *= k / p;
  A.S11 *= k / p;
}

function releaseEnd(A: MemberStiffness, k: number, count: InnerCount): void {
  const p = A.S22 + k || Number.MIN_VALUE;
  pass(p, count);
  A.kvv -= (A.kv2 * A.kv2) / p;
  A.kv1 -= (A.kv2 * A.S12) / p;
  A.S11 -= (A.S12 * A.S12) / p;
  A.kv2 *= k / p;
  A.S12 *= k / p;
  A.S22 *= k / p;
}
