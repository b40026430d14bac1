import type { Frame, Restraint } from '@/lib/model/frame';
import { emptyMemberStiffness, memberStiffness } from './assemble';
import { endInNodeAxes, toLocal, type LoadVectors } from './load-vectors';
import { memberData, type MemberData } from './member-data';
import { copyOf, numbers } from './numbers';
import type { Topology } from './topology';

/** A case as recovered: what a ResultState holds of it, and how far its nodes are out of balance. */
export interface Recovered {
  readonly displacements: Float64Array;
  readonly reactions: Float64Array;
  readonly endForces: Float64Array;
  /** K d − f by node and direction, node axes, at unknowns; N and N·m. */
  readonly outOfBalance: Float64Array;
  /** Largest force met on the way before stiffness × movement cancels, N: results far below it are its rounding. */
  readonly handled: number;
}

const k = emptyMemberStiffness();

/** Numbers of a member's k: ka, kvv, kv1, kv2, S11, S12, S22 (README 2.2). */
const ofMember = 7;
// asked for case after case of one frame
let latest: readonly MemberData[] | null = null;
let ofLatest = new Float64Array(0);

/** k of every member, `ofMember` numbers each. */
function stiffnessOf(data: readonly MemberData[]): Float64Array {
  if (data === latest) return ofLatest;
  if (ofLatest.length < ofMember * data.length) ofLatest = new Float64Array(2 * ofMember * data.length);
  for (let i = 0, o = 0; i < data.length; i++, o += ofMember) {
    memberStiffness(data[i]!, k);
    ofLatest[o] = k.ka;
    ofLatest[o + 1] = k.kvv;
    ofLatest[o + 2] = k.kv1;
    ofLatest[o + 3] = k.kv2;
    ofLatest[o + 4] = k.S11;
    ofLatest[o + 5] = k.S12;
    ofLatest[o + 6] = k.S22;
  }
  latest = data;
  return ofLatest;
}

const u = new Float64Array(6);
const q = new Float64Array(6);

/** q = k T d + q_F and R = what the members ask of the supports − loads put straight on them. README (2.8). */
export function recover(
  frame: Frame,
  t: Topology,
  angles: Float64Array,
  loads: LoadVectors,
  d: Float64Array,
  loadCase: number,
  data: readonly MemberData[] = memberData(frame),
): Recovered {
  const nodes = frame.nodes.length;
  const all = copyOf(loads.prescribed, loadCase * nodes * 3, (loadCase + 1) * nodes * 3);
  for (let p = 0; p < t.size; p++) {
    const node = t.nodeAt[p]!;
    for (let r = 0; r < 3; r++) if (t.free[3 * node + r]) all[3 * node + r] = d[(loadCase * t.size + p) * 3 + r]!;
  }
  const forces = numbers(6 * data.length);
  // what the nodes must do to the members, node axes
  const asked = numbers(3 * nodes);
  let handled = 0;
  const stiffness = stiffnessOf(data);
  for (let i = 0, o = 0; i < data.length; i++, o += ofMember) {
    const m = data[i]!;
    toLocal(m, angles, all, 3 * m.start, 3 * m.end, u);
    const ka = stiffness[o]!;
    const kvv = stiffness[o + 1]!;
    const kv1 = stiffness[o + 2]!;
    const kv2 = stiffness[o + 3]!;
    const S12 = stiffness[o + 5]!;
    const u1 = u[0]!;
    const v1 = u[1]!;
    const t1 = u[2]!;
    const u2 = u[3]!;
    const v2 = u[4]!;
    const t2 = u[5]!;
    handled = Math.max(
      handled,
      ka * Math.max(Math.abs(u1), Math.abs(u2)),
      kvv * Math.max(Math.abs(v1), Math.abs(v2)),
      (kv1 + kv2) * Math.max(Math.abs(t1), Math.abs(t2)),
    );
    const axial = ka * (u1 - u2);
    const v = v1 - v2;
    const shear = kvv * v + kv1 * t1 + kv2 * t2;
    const fixed = (loadCase * data.length + i) * 6;
    q[0] = axial + loads.fixedEnd[fixed]!;
    q[1] = shear + loads.fixedEnd[fixed + 1]!;
    q[2] = kv1 * v + stiffness[o + 4]! * t1 + S12 * t2 + loads.fixedEnd[fixed + 2]!;
    q[3] = -axial + loads.fixedEnd[fixed + 3]!;
    q[4] = -shear + loads.fixedEnd[fixed + 4]!;
    q[5] = kv2 * v + S12 * t1 + stiffness[o + 6]! * t2 + loads.fixedEnd[fixed + 5]!;
    addEnd(m, angles, m.start, 0, asked);
    addEnd(m, angles, m.end, 3, asked);
    // internal forces: N = −X₁, V = Y₁, M = −m₁ at the start; N = X₂, V = −Y₂, M = m₂ at the end (+ 0 makes −0 a 0)
    forces[6 * i] = -q[0]! + 0;
    forces[6 * i + 1] = q[1]! + 0;
    forces[6 * i + 2] = -q[2]! + 0;
    forces[6 * i + 3] = q[3]! + 0;
    forces[6 * i + 4] = -q[4]! + 0;
    forces[6 * i + 5] = q[5]! + 0;
  }
  for (const load of frame.nodeLoads) {
    if (load.case !== loadCase) continue;
    const ca = Math.cos(angles[load.node]!);
    const sa = Math.sin(angles[load.node]!);
    const o = 3 * load.node;
    asked[o] = asked[o]! - (load.Fx_N * ca + load.Fy_N * sa);
    asked[o + 1] = asked[o + 1]! - (load.Fy_N * ca - load.Fx_N * sa);
    asked[o + 2] = asked[o + 2]! - load.Mz_Nm;
  }
  const reactions = takeReactions(frame, t, angles, all, asked);
  return { displacements: all, reactions, endForces: forces, outOfBalance: asked, handled };
}

/** Adds one end of `q` to what its node must do to its members. */
function addEnd(m: MemberData, angles: Float64Array, node: number, end: number, asked: Float64Array): void {
  const angle = angles[node]!;
  let x = q[end]! * m.cos - q[end + 1]! * m.sin;
  let y = q[end]! * m.sin + q[end + 1]! * m.cos;
  if (angle !== 0) [x, y] = endInNodeAxes(m, angle, q[end]!, q[end + 1]!);
  const o = 3 * node;
  asked[o] = asked[o]! + x;
  asked[o + 1] = asked[o + 1]! + y;
  asked[o + 2] = asked[o + 2]! + q[end + 2]!;
}

/**
 * Reactions in global axes, Fx, Fy, Mz by support: what nodes ask beyond the loads on them. Takes them out of `asked`
 * (3 a node, node axes), so that what is left is out of balance, and turns the displacements `all` to global axes.
 */
export function takeReactions(
  frame: Frame,
  t: Topology,
  angles: Float64Array,
  all: Float64Array,
  asked: Float64Array,
): Float64Array {
  const reactions = numbers(3 * frame.supports.length);
  frame.supports.forEach((support, i) => {
    const o = 3 * support.node;
    const x = takeReaction(support.ux, all, asked, o);
    const y = takeReaction(support.uy, all, asked, o + 1);
    const angle = support.angle_rad;
    const ca = angle === 0 ? 1 : Math.cos(angle);
    const sa = angle === 0 ? 0 : Math.sin(angle);
    reactions[3 * i] = x * ca - y * sa + 0;
    reactions[3 * i + 1] = x * sa + y * ca + 0;
    reactions[3 * i + 2] = takeReaction(support.rz, all, asked, o + 2) + 0;
  });
  for (let i = 0; i < frame.nodes.length; i++) {
    for (let r = 0; r < 3; r++) if (!t.free[3 * i + r]) asked[3 * i + r] = 0;
    const angle = angles[i]!;
    if (angle !== 0) {
      const ca = Math.cos(angle);
      const sa = Math.sin(angle);
      const x = all[3 * i]!;
      const y = all[3 * i + 1]!;
      all[3 * i] = x * ca - y * sa;
      all[3 * i + 1] = x * sa + y * ca;
    }
    if (t.noRotation[i]) all[3 * i + 2] = NaN;
  }
  return reactions;
}

/** What one direction of a support does to its node, out of what is asked of it there. */
function takeReaction(restraint: Restraint, all: Float64Array, asked: Float64Array, at: number): number {
  if (restraint === 'free') return 0;
  const R = restraint === 'fixed' ? asked[at]! : -restraint * all[at]!;
  asked[at] = asked[at]! - R;
  return R;
}
