import type { Frame, Restraint } from '@/lib/model/frame';
import type { ResultState } from '@/lib/results/result';
import { nodeAngles } from '../assemble';
import { endForces, endInNodeAxes, loadVectors, toLocal } from '../load-vectors';
import { memberDataFor } from '../member-data';
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
  const f = loadVector(frame, state);
  const left = outOfBalance(frame, state, d);
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
        left: free ? left[i]! + 0 : null,
      };
    }),
  );
  return { directions, angles, unknowns };
}

/** f of a state by node and direction: the cases' load vectors times their factors. */
function loadVector(frame: Frame, state: ResultState): Float64Array {
  const t = buildTopology(frame);
  const { f } = loadVectors(frame, t, nodeAngles(frame), memberDataFor(frame, state.method));
  const sum = new Float64Array(3 * frame.nodes.length);
  for (let c = 0; c < frame.cases.length; c++) {
    const factor = state.factors[c]!;
    if (factor === 0) continue;
    for (let p = 0; p < t.size; p++)
      for (let r = 0; r < 3; r++) {
        const at = 3 * t.nodeAt[p]! + r;
        sum[at] = sum[at]! + factor * f[(c * t.size + p) * 3 + r]!;
      }
  }
  return sum;
}

/** Σ Tᵀ q + springs × d − loads on the nodes: zero at every unknown of a solution. */
function outOfBalance(frame: Frame, state: ResultState, d: Float64Array): Float64Array {
  const angles = nodeAngles(frame);
  const left = new Float64Array(3 * frame.nodes.length);
  const u = new Float64Array(6);
  const q = new Float64Array(6);
  frame.members.forEach((_, i) => {
    const { data: m, k, fixedEnd } = memberInState(frame, state, i);
    toLocal(m, angles, d, 3 * m.start, 3 * m.end, u);
    endForces(k, u, q);
    for (let r = 0; r < 6; r++) q[r] = q[r]! + fixedEnd[r]!;
    for (let end = 0; end < 2; end++) {
      const node = end === 0 ? m.start : m.end;
      const [x, y] = endInNodeAxes(m, angles[node]!, q[3 * end]!, q[3 * end + 1]!);
      add(left, 3 * node, x, y, q[3 * end + 2]!);
    }
  });
  for (const load of frame.nodeLoads) {
    const factor = -state.factors[load.case]!;
    const [ca, sa] = [Math.cos(angles[load.node]!), Math.sin(angles[load.node]!)];
    add(left, 3 * load.node, factor * (load.Fx_N * ca + load.Fy_N * sa), factor * (load.Fy_N * ca - load.Fx_N * sa), factor * load.Mz_Nm); // prettier-ignore
  }
  for (const { node, ux, uy, rz } of frame.supports) {
    const stiffness = (restraint: Restraint) => (typeof restraint === 'number' ? restraint : 0);
    const o = 3 * node;
    add(left, o, stiffness(ux) * d[o]!, stiffness(uy) * d[o + 1]!, stiffness(rz) * d[o + 2]!);
  }
  return left;
}

function add(to: Float64Array, at: number, x: number, y: number, m: number): void {
  to[at] = to[at]! + x;
  to[at + 1] = to[at + 1]! + y;
  to[at + 2] = to[at + 2]! + m;
}
