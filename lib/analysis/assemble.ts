import type { Frame } from '@/lib/model/frame';
import { emptyJointStiffness, jointStiffness } from './joint-stiffness';
import type { MemberData } from './member-data';
import { packedMembers, packedSize } from './packed-members';
import { blockAt, type Topology } from './topology';

/**
 * Stiffness of a member between its nodes in the terms that matter: axial, and bending with the joints condensed.
 * N/m, N, N·m: Y₁ = kvv(v₁ − v₂) + kv1 φ₁ + kv2 φ₂, m₁ = kv1(v₁ − v₂) + S11 φ₁ + S12 φ₂, and so on.
 */
export interface MemberStiffness {
  ka: number;
  kvv: number;
  kv1: number;
  kv2: number;
  S11: number;
  S12: number;
  S22: number;
}

const joints = emptyJointStiffness();
const general = emptyMemberStiffness();

/** First-order stiffness of a member. README (2.2), (2.3). */
export function memberStiffness(m: MemberData, out: MemberStiffness): MemberStiffness {
  const L = m.length;
  const { S11, S12, S22 } = jointStiffness(m, joints);
  out.ka = m.EA / L;
  out.kvv = (S11 + 2 * S12 + S22) / (L * L);
  out.kv1 = (S11 + S12) / L;
  out.kv2 = (S12 + S22) / L;
  out.S11 = S11;
  out.S12 = S12;
  out.S22 = S22;
  return out;
}

export function emptyMemberStiffness(): MemberStiffness {
  return { ka: 0, kvv: 0, kv1: 0, kv2: 0, S11: 0, S12: 0, S22: 0 };
}

const knownAngles = new WeakMap<Frame, Float64Array>();

/** Angle of each node's axes from global X: its support's, else 0. Radians, by node; worked out once a frame, not to be changed. */
export function nodeAngles(frame: Frame): Float64Array {
  const before = knownAngles.get(frame);
  if (before) return before;
  const angles = new Float64Array(frame.nodes.length);
  for (const support of frame.supports) angles[support.node] = support.angle_rad;
  knownAngles.set(frame, angles);
  return angles;
}

/** Adds Tᵀ k T of one member to K (blocks of topology.ts); held rows and columns are left out. */
export function addMember(K: Float64Array, t: Topology, m: MemberData, k: MemberStiffness, angles: Float64Array): void {
  const pa = t.positionOf[m.start]!;
  const pb = t.positionOf[m.end]!;
  if (pa >= 0) addEnd(K, t, pa, m.start, m, angles[m.start]!, k.ka, k.kvv, k.kv1, k.S11);
  if (pb >= 0) addEnd(K, t, pb, m.end, m, angles[m.end]!, k.ka, k.kvv, -k.kv2, k.S22);
  if (pa >= 0 && pb >= 0) addCoupling(K, t, pa, pb, m, k, angles);
}

function addEnd(
  K: Float64Array,
  t: Topology,
  p: number,
  node: number,
  m: MemberData,
  angle: number,
  ka: number,
  kvv: number,
  kvt: number,
  S: number,
): void {
  let c = m.cos;
  let s = m.sin;
  if (angle !== 0) {
    const ca = Math.cos(angle);
    const sa = Math.sin(angle);
    c = m.cos * ca + m.sin * sa;
    s = m.sin * ca - m.cos * sa;
  }
  const fx = t.free[3 * node]!;
  const fy = t.free[3 * node + 1]!;
  const fz = t.free[3 * node + 2]!;
  const at = blockAt(t, p, p);
  const xy = fx * fy * c * s * (ka - kvv);
  const xt = fx * fz * -s * kvt;
  const yt = fy * fz * c * kvt;
  K[at] = K[at]! + fx * (c * c * ka + s * s * kvv);
  K[at + 1] = K[at + 1]! + xy;
  K[at + 2] = K[at + 2]! + xt;
  K[at + 3] = K[at + 3]! + xy;
  K[at + 4] = K[at + 4]! + fy * (s * s * ka + c * c * kvv);
  K[at + 5] = K[at + 5]! + yt;
  K[at + 6] = K[at + 6]! + xt;
  K[at + 7] = K[at + 7]! + yt;
  K[at + 8] = K[at + 8]! + fz * S;
}

const block = new Float64Array(9);

function addCoupling(
  K: Float64Array,
  t: Topology,
  pa: number,
  pb: number,
  m: MemberData,
  k: MemberStiffness,
  angles: Float64Array,
): void {
  let c1 = m.cos;
  let s1 = m.sin;
  let c2 = m.cos;
  let s2 = m.sin;
  const a = angles[m.start]!;
  const b = angles[m.end]!;
  if (a !== 0) {
    c1 = m.cos * Math.cos(a) + m.sin * Math.sin(a);
    s1 = m.sin * Math.cos(a) - m.cos * Math.sin(a);
  }
  if (b !== 0) {
    c2 = m.cos * Math.cos(b) + m.sin * Math.sin(b);
    s2 = m.sin * Math.cos(b) - m.cos * Math.sin(b);
  }
  const { ka, kvv, kv1, kv2, S12 } = k;
  const x0 = -ka * c2;
  const x1 = -ka * s2;
  const y0 = kvv * s2;
  const y1 = -kvv * c2;
  block[0] = c1 * x0 - s1 * y0;
  block[1] = c1 * x1 - s1 * y1;
  block[2] = -s1 * kv2;
  block[3] = s1 * x0 + c1 * y0;
  block[4] = s1 * x1 + c1 * y1;
  block[5] = c1 * kv2;
  block[6] = kv1 * s2;
  block[7] = -kv1 * c2;
  block[8] = S12;
  const i = Math.min(pa, pb);
  const j = Math.max(pa, pb);
  const at = blockAt(t, i, j);
  for (let r = 0; r < 3; r++) {
    const fr = t.free[3 * m.start + r]!;
    for (let q = 0; q < 3; q++) {
      const value = fr * t.free[3 * m.end + q]! * block[3 * r + q]!;
      const to = pa < pb ? at + 3 * r + q : at + 3 * q + r;
      K[to] = K[to]! + value;
    }
  }
}

/**
 * `addMember` of the frame's member `i`, by where its blocks are known to go; what is not an unknown is left to `addSupports`.
 * Members at nodes whose supports are turned go the long way.
 */
export function addMemberAt(
  K: Float64Array,
  t: Topology,
  i: number,
  m: MemberData,
  k: MemberStiffness,
  angles: Float64Array,
): void {
  if (angles[m.start] !== 0 || angles[m.end] !== 0) {
    addMember(K, t, m, k, angles);
    return;
  }
  const { blocks, turned } = t.places;
  const c = m.cos;
  const s = m.sin;
  const { ka, kvv, kv1, kv2 } = k;
  const xx = c * c * ka + s * s * kvv;
  const xy = c * s * (ka - kvv);
  const yy = s * s * ka + c * c * kvv;
  const start = blocks[3 * i]!;
  const end = blocks[3 * i + 1]!;
  if (start >= 0) {
    K[start] = K[start]! + xx;
    K[start + 1] = K[start + 1]! + xy;
    K[start + 2] = K[start + 2]! - s * kv1;
    K[start + 4] = K[start + 4]! + yy;
    K[start + 5] = K[start + 5]! + c * kv1;
    K[start + 8] = K[start + 8]! + k.S11;
  }
  if (end < 0) return;
  K[end] = K[end]! + xx;
  K[end + 1] = K[end + 1]! + xy;
  K[end + 2] = K[end + 2]! + s * kv2;
  K[end + 4] = K[end + 4]! + yy;
  K[end + 5] = K[end + 5]! - c * kv2;
  K[end + 8] = K[end + 8]! + k.S22;
  if (start < 0) return;
  const at = blocks[3 * i + 2]!;
  // moments of the row's node in the last column, of the column's node in the last row
  const right = turned[i] !== 0 ? -kv1 : kv2;
  const down = turned[i] !== 0 ? -kv2 : kv1;
  K[at] = K[at]! - xx;
  K[at + 1] = K[at + 1]! - xy;
  K[at + 2] = K[at + 2]! - s * right;
  K[at + 3] = K[at + 3]! - xy;
  K[at + 4] = K[at + 4]! - yy;
  K[at + 5] = K[at + 5]! + c * right;
  K[at + 6] = K[at + 6]! + s * down;
  K[at + 7] = K[at + 7]! - c * down;
  K[at + 8] = K[at + 8]! + k.S12;
}

/** Adds the supports' springs, and 1 on the diagonal of everything that is not an unknown. */
export function addSupports(K: Float64Array, t: Topology, frame: Frame): void {
  for (const support of frame.supports) {
    const p = t.positionOf[support.node]!;
    if (p < 0) continue;
    const at = blockAt(t, p, p);
    if (typeof support.ux === 'number') K[at] = K[at]! + support.ux;
    if (typeof support.uy === 'number') K[at + 4] = K[at + 4]! + support.uy;
    if (typeof support.rz === 'number') K[at + 8] = K[at + 8]! + support.rz;
  }
  addHeld(K, t);
}

/** What is not an unknown has its own equation: 1·d = 0. */
function addHeld(K: Float64Array, t: Topology): void {
  const { zeros, ones } = t.places;
  for (let i = 0; i < zeros.length; i++) K[zeros[i]!] = 0;
  for (let i = 0; i < ones.length; i++) K[ones[i]!] = 1;
}

/** K = Σ Tᵀ k T + springs, with one element a member. README (2.6). @param K 9 × blocks, overwritten */
export function assemble(K: Float64Array, t: Topology, frame: Frame, data: readonly MemberData[], angles: Float64Array): void {
  const { blocks, turned } = t.places;
  const { numbers, sprung } = packedMembers(frame, data, angles);
  K.fill(0);
  for (let i = 0, o = 0; i < data.length; i++, o += packedSize) {
    if (numbers[o + 5] === 0) {
      addMember(K, t, data[i]!, memberStiffness(data[i]!, general), angles);
      continue;
    }
    // the same for a member whose joints are rigid, that does not shear and whose nodes have global axes
    const L = numbers[o]!;
    const c = numbers[o + 1]!;
    const s = numbers[o + 2]!;
    const a = (4 * numbers[o + 4]!) / L;
    const b = 0.5 * a;
    const ka = numbers[o + 3]! / L;
    const kv = (a + 2 * b + a) / (L * L);
    const kt = (a + b) / L;
    const xx = c * c * ka + s * s * kv;
    const xy = c * s * (ka - kv);
    const yy = s * s * ka + c * c * kv;
    let xt = s * kt;
    let yt = c * kt;
    const start = blocks[3 * i]!;
    const end = blocks[3 * i + 1]!;
    if (start >= 0) {
      K[start] = K[start]! + xx;
      K[start + 1] = K[start + 1]! + xy;
      K[start + 2] = K[start + 2]! - xt;
      K[start + 4] = K[start + 4]! + yy;
      K[start + 5] = K[start + 5]! + yt;
      K[start + 8] = K[start + 8]! + a;
    }
    if (end < 0) continue;
    K[end] = K[end]! + xx;
    K[end + 1] = K[end + 1]! + xy;
    K[end + 2] = K[end + 2]! + xt;
    K[end + 4] = K[end + 4]! + yy;
    K[end + 5] = K[end + 5]! - yt;
    K[end + 8] = K[end + 8]! + a;
    if (start < 0) continue;
    const at = blocks[3 * i + 2]!;
    if (turned[i] !== 0) {
      xt = -xt;
      yt = -yt;
    }
    K[at] = K[at]! - xx;
    K[at + 1] = K[at + 1]! - xy;
    K[at + 2] = K[at + 2]! - xt;
    K[at + 3] = K[at + 3]! - xy;
    K[at + 4] = K[at + 4]! - yy;
    K[at + 5] = K[at + 5]! + yt;
    K[at + 6] = K[at + 6]! + xt;
    K[at + 7] = K[at + 7]! - yt;
    K[at + 8] = K[at + 8]! + b;
  }
  if (sprung) addSupports(K, t, frame);
  else addHeld(K, t);
}

/** The diagonal of K, 3 a position. */
export function diagonalOf(K: Float64Array, t: Topology, out: Float64Array): Float64Array {
  for (let p = 0; p < t.size; p++) {
    const at = blockAt(t, p, p);
    out[3 * p] = K[at]!;
    out[3 * p + 1] = K[at + 4]!;
    out[3 * p + 2] = K[at + 8]!;
  }
  return out;
}
