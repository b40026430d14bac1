import type { Frame } from '@/lib/model/frame';
import { emptyMemberStiffness, memberStiffness, type MemberStiffness } from './assemble';
import { fixedEndForces } from './fixed-end-forces';
import { emptyJointStiffness, jointStiffness } from './joint-stiffness';
import { memberData, type MemberData } from './member-data';
import { memberLoads } from './member-loads';
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

/** f = node loads − Σ Tᵀ q_F − K_fs d_s, a column a case. README (2.7). */
export function loadVectors(
  frame: Frame,
  t: Topology,
  angles: Float64Array,
  data: readonly MemberData[] = memberData(frame),
): LoadVectors {
  const loads = memberLoads(frame);
  const cases = frame.cases.length;
  const n = 3 * t.size;
  const nodes = frame.nodes.length;
  const f = new Float64Array(cases * n);
  const fixedEnd = new Float64Array(cases * data.length * 6);
  const prescribed = new Float64Array(cases * nodes * 3);
  const joints = emptyJointStiffness();
  data.forEach((m, i) => {
    let ready = false;
    for (let c = 0; c < cases; c++) {
      const acting = loads[i * cases + c];
      if (!acting) continue;
      if (!ready) jointStiffness(m, joints);
      ready = true;
      const at = (c * data.length + i) * 6;
      fixedEndForces(m, acting, joints, fixedEnd, at);
      takeEnds(f, c * n, t, m, fixedEnd, at, angles);
    }
  });
  for (const load of frame.nodeLoads) {
    const p = t.positionOf[load.node]!;
    if (p < 0) continue;
    const o = load.case * n + 3 * p;
    const angle = angles[load.node]!;
    const ca = angle === 0 ? 1 : Math.cos(angle);
    const sa = angle === 0 ? 0 : Math.sin(angle);
    f[o] = f[o]! + load.Fx_N * ca + load.Fy_N * sa;
    f[o + 1] = f[o + 1]! - load.Fx_N * sa + load.Fy_N * ca;
    f[o + 2] = f[o + 2]! + load.Mz_Nm;
  }
  for (const s of frame.settlements) {
    const o = (s.case * nodes + s.node) * 3;
    prescribed[o] = prescribed[o]! + (s.dx_m ?? 0);
    prescribed[o + 1] = prescribed[o + 1]! + (s.dy_m ?? 0);
    prescribed[o + 2] = prescribed[o + 2]! + (s.rz_rad ?? 0);
  }
  if (frame.settlements.length > 0) addSettlements(frame, t, data, angles, prescribed, f);
  for (let p = 0; p < t.size; p++)
    for (let r = 0; r < 3; r++) {
      if (t.free[3 * t.nodeAt[p]! + r]) continue;
      for (let c = 0; c < cases; c++) f[c * n + 3 * p + r] = 0;
    }
  return { f, prescribed, fixedEnd };
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
