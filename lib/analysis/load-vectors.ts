import type { Frame } from '@/lib/model/frame';
import { emptyMemberStiffness, memberStiffness, type MemberStiffness } from './assemble';
import { fixedEndForces } from './fixed-end-forces';
import { emptyJointStiffness, jointStiffness } from './joint-stiffness';
import { memberData, type MemberData } from './member-data';
import { packedLoads, type PackedLoads } from './packed-loads';
import type { Topology } from './topology';

/** Right-hand sides and what stands behind them. */
export interface LoadVectors {
  /** f by case: 3 × size each, in node axes; 0 where held. */
  readonly f: Float64Array;
  /** Movements prescribed by settlements, by case: 3 a node, in node axes. */
  readonly prescribed: Float64Array;
  /** Fixed-end forces q_F by case and member, 6 each, local axes. */
  readonly fixedEnd: Float64Array;
}

const joints = emptyJointStiffness();
const ends = new Float64Array(6);

/** f = node loads − Σ Tᵀ q_F − K_fs d_s, a column a case, and q_F. README (2.7). */
export function loadVectors(
  frame: Frame,
  t: Topology,
  angles: Float64Array,
  data: readonly MemberData[] = memberData(frame),
): LoadVectors {
  const cases = frame.cases.length;
  const f = new Float64Array(3 * t.size * cases);
  addLoads(frame, t, angles, data, f);
  const { heldRows } = t.places;
  for (let i = 0; i < heldRows.length; i++) for (let o = heldRows[i]!; o < f.length; o += 3 * t.size) f[o] = 0;
  return { f, prescribed: packedLoads(frame, angles).prescribed, fixedEnd: fixedEnds(frame, angles, data) };
}

/** The columns of f alone, with whatever acts where a node is held. @param f 3 × size × cases, overwritten */
export function addLoads(frame: Frame, t: Topology, angles: Float64Array, data: readonly MemberData[], f: Float64Array): void {
  const packed = packedLoads(frame, angles);
  f.fill(0);
  addEven(packed.stream, packed.members, t, f);
  if (packed.rest) addRest(packed, frame, t, angles, data, f);
}

/** Even loads over whole members: q_F = −(q_x L/2, q_y L/2, q_y L²/12, q_x L/2, q_y L/2, −q_y L²/12). */
function addEven(stream: Float64Array, members: number, t: Topology, f: Float64Array): void {
  const { rows } = t.places;
  const n = 3 * t.size;
  let k = 0;
  for (let i = 0; i < members; i++) {
    const count = stream[k]! | 0;
    const half = -0.5 * stream[k + 1]!;
    const sixth = stream[k + 1]! / 6;
    const cos = stream[k + 2]!;
    const sin = stream[k + 3]!;
    const a = rows[2 * i]!;
    const b = rows[2 * i + 1]!;
    k += 4;
    for (const last = k + 3 * count; k < last; k += 3) {
      const column = Math.imul(n, stream[k]! | 0);
      const X = half * stream[k + 1]!;
      const Y = half * stream[k + 2]!;
      const m = Y * sixth;
      const x = X * cos - Y * sin;
      const y = X * sin + Y * cos;
      if (a >= 0) {
        const o = column + a;
        f[o] = f[o]! - x;
        f[o + 1] = f[o + 1]! - y;
        f[o + 2] = f[o + 2]! - m;
      }
      if (b >= 0) {
        const o = column + b;
        f[o] = f[o]! - x;
        f[o + 1] = f[o + 1]! - y;
        f[o + 2] = f[o + 2]! + m;
      }
    }
  }
}

/** Loads on nodes, all others on members, settlements. */
function addRest(
  { stream, nodesFrom, others, settled, prescribed }: PackedLoads,
  frame: Frame,
  t: Topology,
  angles: Float64Array,
  data: readonly MemberData[],
  f: Float64Array,
): void {
  const n = 3 * t.size;
  for (let k = nodesFrom; k < stream.length; k += 5) {
    const p = t.positionOf[stream[k]!]!;
    if (p < 0) continue;
    const o = Math.imul(n, stream[k + 1]! | 0) + 3 * p;
    f[o] = f[o]! + stream[k + 2]!;
    f[o + 1] = f[o + 1]! + stream[k + 3]!;
    f[o + 2] = f[o + 2]! + stream[k + 4]!;
  }
  for (let i = 0; i < others.length; i++) {
    const { member, loadCase, acting } = others[i]!;
    const m = data[member]!;
    fixedEndForces(m, acting, jointStiffness(m, joints), ends, 0);
    takeEnds(f, loadCase * n, t, m, ends, 0, angles);
  }
  if (settled) addSettlements(frame, t, data, angles, prescribed, f);
}

/** q_F of every case and member. */
export function fixedEnds(frame: Frame, angles: Float64Array, data: readonly MemberData[]): Float64Array {
  const { stream, others, members } = packedLoads(frame, angles);
  const fixedEnd = new Float64Array(frame.cases.length * members * 6);
  for (let i = 0, k = 0; i < members; i++) {
    const last = k + 4 + 3 * stream[k]!;
    const L = stream[k + 1]!;
    for (k += 4; k < last; k += 3) {
      const at = 6 * (stream[k]! * members + i);
      const X = -0.5 * L * stream[k + 1]!;
      const Y = -0.5 * L * stream[k + 2]!;
      const m = Y * (L / 6);
      fixedEnd[at] = fixedEnd[at + 3] = X;
      fixedEnd[at + 1] = fixedEnd[at + 4] = Y;
      fixedEnd[at + 2] = m;
      fixedEnd[at + 5] = -m;
    }
  }
  for (const { member, loadCase, acting } of others) {
    const m = data[member]!;
    fixedEndForces(m, acting, jointStiffness(m, joints), fixedEnd, 6 * (loadCase * members + member));
  }
  return fixedEnd;
}

function addSettlements(
  frame: Frame,
  t: Topology,
  data: readonly MemberData[],
  angles: Float64Array,
  prescribed: Float64Array,
  f: Float64Array,
): void {
  const cases = new Set(frame.settlements.map((s) => s.case));
  const k = emptyMemberStiffness();
  const u = new Float64Array(6);
  const q = new Float64Array(6);
  for (const m of data) {
    memberStiffness(m, k);
    for (const c of cases) {
      const o = c * frame.nodes.length * 3;
      toLocal(m, angles, prescribed, o + 3 * m.start, o + 3 * m.end, u);
      endForces(k, u, q);
      takeEnds(f, c * 3 * t.size, t, m, q, 0, angles);
    }
  }
}

/** Displacements of both ends in local axes from node-axis displacements. */
export function toLocal(m: MemberData, angles: Float64Array, d: Float64Array, a: number, b: number, u: Float64Array): void {
  for (let end = 0; end < 2; end++) {
    const from = end === 0 ? a : b;
    const angle = angles[end === 0 ? m.start : m.end]!;
    let x = d[from]!;
    let y = d[from + 1]!;
    if (angle !== 0) {
      const ca = Math.cos(angle);
      const sa = Math.sin(angle);
      [x, y] = [x * ca - y * sa, x * sa + y * ca];
    }
    u[3 * end] = x * m.cos + y * m.sin;
    u[3 * end + 1] = -x * m.sin + y * m.cos;
    u[3 * end + 2] = d[from + 2]!;
  }
}

/** q = k u in local axes. README (2.2). */
export function endForces(k: MemberStiffness, u: Float64Array, q: Float64Array): void {
  const axial = k.ka * (u[0]! - u[3]!);
  const v = u[1]! - u[4]!;
  const shear = k.kvv * v + k.kv1 * u[2]! + k.kv2 * u[5]!;
  q[0] = axial;
  q[1] = shear;
  q[2] = k.kv1 * v + k.S11 * u[2]! + k.S12 * u[5]!;
  q[3] = -axial;
  q[4] = -shear;
  q[5] = k.kv2 * v + k.S12 * u[2]! + k.S22 * u[5]!;
}

/** f −= Tᵀ q for one member and case. */
function takeEnds(
  f: Float64Array,
  column: number,
  t: Topology,
  m: MemberData,
  q: Float64Array,
  at: number,
  angles: Float64Array,
): void {
  for (let end = 0; end < 2; end++) {
    const node = end === 0 ? m.start : m.end;
    const p = t.positionOf[node]!;
    if (p < 0) continue;
    const [x, y] = endInNodeAxes(m, angles[node]!, q[at + 3 * end]!, q[at + 3 * end + 1]!);
    const o = column + 3 * p;
    f[o] = f[o]! - x;
    f[o + 1] = f[o + 1]! - y;
    f[o + 2] = f[o + 2]! - q[at + 3 * end + 2]!;
  }
}

/** A force in a member's local axes, in axes turned by `angle` from global. */
export function endInNodeAxes(m: MemberData, angle: number, X: number, Y: number): readonly [number, number] {
  const x = X * m.cos - Y * m.sin;
  const y = X * m.sin + Y * m.cos;
  if (angle === 0) return [x, y];
  const ca = Math.cos(angle);
  const sa = Math.sin(angle);
  return [x * ca + y * sa, y * ca - x * sa];
}
