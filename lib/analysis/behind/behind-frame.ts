import type { Frame, Restraint } from '@/lib/model/frame';
import type { ResultState } from '@/lib/results/result';
import { nodeAngles } from '../assemble';
import { endForces, endInNodeAxes, toLocal } from '../load-vectors';
import type { MemberData } from '../member-data';
import { combineLoading, emptyLoading } from '../second-order/member-loading';
import { slackReactions } from '../second-order/slack-reactions';
import { buildTopology } from '../topology';
import { memberInState } from './member-in-state';
import { nodeDisplacements } from './node-displacements';

/** One direction of one node, in the axes of the node. */
export interface Direction {
  readonly node: number;
  readonly direction: 'x' | 'y' | 'rotation';
  /** Row of K, from 1, as the engine orders them; null where the direction is no unknown. */
  readonly row: number | null;
  /** Unknown, sprung (unknown, with a support's spring on it), held by a support, or a rotation that nothing turns. */
  readonly kind: 'unknown' | 'sprung' | 'held' | 'none';
  /** f, N or N·m; null where it is no unknown. */
  readonly load: number | null;
  /** d, m or rad: solved, or prescribed by a settlement, or 0. */
  readonly displacement: number;
  /** (K d − f), N or N·m: what the solution leaves over; null where it is no unknown. */
  readonly left: number | null;
}

export interface BehindFrame {
  /** Three a node, nodes in the order of the frame. */
  readonly directions: readonly Direction[];
  /** Angle of each node's axes from global X, rad. */
  readonly angles: Float64Array;
  /** Number of unknowns. */
  readonly unknowns: number;
}

/**
 * How the engine numbers the unknowns of a frame, with the load vector and the displacements of one state and what K d − f
 * leaves over. README §1, (2.6), (2.7).
 */
export function behindFrame(frame: Frame, state: ResultState): BehindFrame {
  const t = buildTopology(frame);
  const angles = nodeAngles(frame);
  const d = nodeDisplacements(frame, state);
  const f = loadVector(frame, state, t.free, d);
  const Kd = stiffnessTimes(frame, state, d.map((value, i) => (t.free[i] ? value : 0))); // prettier-ignore
  const supports = new Map(frame.supports.map((support) => [support.node, support]));
  let unknowns = 0;
  const directions = frame.nodes.flatMap((_, node) =>
    (['x', 'y', 'rotation'] as const).map((direction, r): Direction => {
      const support = supports.get(node);
      const restraint: Restraint = support ? [support.ux, support.uy, support.rz][r]! : 'free';
      const i = 3 * node + r;
      const free = t.free[i] === 1;
      if (free) unknowns += 1;
      const sprung = free && typeof restraint === 'number' && restraint !== 0;
      const none = r === 2 && t.noRotation[node] === 1;
      return {
        node,
        direction,
        row: free ? 3 * t.positionOf[node]! + r + 1 : null,
        kind: sprung ? 'sprung' : free ? 'unknown' : none ? 'none' : 'held',
        load: free ? f[i]! + 0 : null,
        displacement: d[i]! + 0,
        left: free ? Kd[i]! - f[i]! + 0 : null,
      };
    }),
  );
  return { directions, angles, unknowns };
}

/** f of a state: loads on nodes (imperfections and slack members' among them) − Σ Tᵀ q_F − K_fs d_s, 3 a node. */
function loadVector(frame: Frame, state: ResultState, free: Uint8Array, d: Float64Array): Float64Array {
  const angles = nodeAngles(frame);
  const prescribed = d.map((value, i) => (free[i] ? 0 : value));
  const f = stiffnessTimes(frame, state, prescribed).map((value) => -value);
  const push = (node: number, Fx: number, Fy: number, Mz: number) => {
    const [ca, sa] = [Math.cos(angles[node]!), Math.sin(angles[node]!)];
    add(f, 3 * node, Fx * ca + Fy * sa, Fy * ca - Fx * sa, Mz);
  };
  for (const { node, case: c, Fx_N, Fy_N, Mz_Nm } of frame.nodeLoads) {
    const factor = state.factors[c]!;
    push(node, factor * Fx_N, factor * Fy_N, factor * Mz_Nm);
  }
  const { notional, loadScale } = state.method ?? { notional: null, loadScale: 1 };
  if (notional) frame.nodes.forEach((_, i) => push(i, notional[2 * i]! / loadScale, notional[2 * i + 1]! / loadScale, 0));
  frame.members.forEach((_, i) => {
    const { data: m, fixedEnd, slack } = memberInState(frame, state, i);
    takeEnds(f, m, angles, slack ? onNodes(frame, state, i, m) : fixedEnd, -1);
  });
  return f;
}

/** What a slack member asks of its nodes, as a simple beam would. */
function onNodes(frame: Frame, state: ResultState, member: number, m: MemberData): Float64Array {
  const loading = emptyLoading();
  combineLoading(frame, member, state.factors, 1, loading);
  return slackReactions(m, loading, new Float64Array(6));
}

/** Σ Tᵀ k T d + springs × d, 3 a node. */
function stiffnessTimes(frame: Frame, state: ResultState, d: Float64Array): Float64Array {
  const angles = nodeAngles(frame);
  const product = new Float64Array(3 * frame.nodes.length);
  const u = new Float64Array(6);
  const q = new Float64Array(6);
  frame.members.forEach((_, i) => {
    const { data: m, k } = memberInState(frame, state, i);
    toLocal(m, angles, d, 3 * m.start, 3 * m.end, u);
    endForces(k, u, q);
    takeEnds(product, m, angles, q, 1);
  });
  const stiffness = (restraint: Restraint) => (typeof restraint === 'number' ? restraint : 0);
  for (const { node, ux, uy, rz } of frame.supports) {
    const o = 3 * node;
    add(product, o, stiffness(ux) * d[o]!, stiffness(uy) * d[o + 1]!, stiffness(rz) * d[o + 2]!);
  }
  return product;
}

/** to += sign × Tᵀ q. */
function takeEnds(to: Float64Array, m: MemberData, angles: Float64Array, q: Float64Array, sign: 1 | -1): void {
  for (let end = 0; end < 2; end++) {
    const node = end === 0 ? m.start : m.end;
    const [x, y] = endInNodeAxes(m, angles[node]!, q[3 * end]!, q[3 * end + 1]!);
    add(to, 3 * node, sign * x, sign * y, sign * q[3 * end + 2]!);
  }
}

function add(to: Float64Array, at: number, x: number, y: number, m: number): void {
  to[at] = to[at]! + x;
  to[at + 1] = to[at + 1]! + y;
  to[at + 2] = to[at + 2]! + m;
}
