import { type Acting } from './second-loads';
import { restraintOf, type Given, type Setup } from './second-setup';
import { turningOf, type Equations } from './second-solve';
import type { TwoEnds } from './two-ends';

/** What the second analysis finds for one state, laid out as in a ResultState, as analysed (not divided by a loadScale). */
export interface SecondState {
  readonly displacements: Float64Array;
  readonly reactions: Float64Array;
  readonly endForces: Float64Array;
}

/** Loads put on the nodes and movements prescribed, along the nodes' axes. */
export interface OnNodes {
  readonly loads: Float64Array;
  readonly prescribed: Float64Array;
}

/** Node loads, notional forces, what slack members put on their nodes, and settlements, of one state. */
export function onNodes(setup: Setup, given: Given, acting: readonly Acting[]): OnNodes {
  const { frame, members, axes } = setup;
  const loads = new Float64Array(3 * frame.nodes.length);
  const prescribed = new Float64Array(3 * frame.nodes.length);
  const put = (node: number, Fx: number, Fy: number, Mz: number): void => {
    const [c, s] = [axes[2 * node]!, axes[2 * node + 1]!];
    loads[3 * node]! += c * Fx + s * Fy;
    loads[3 * node + 1]! += c * Fy - s * Fx;
    loads[3 * node + 2]! += Mz;
  };
  for (const load of frame.nodeLoads) {
    const k = given.factors[load.case]!;
    put(load.node, k * load.Fx_N, k * load.Fy_N, k * load.Mz_Nm);
  }
  if (given.notional) frame.nodes.forEach((_, i) => put(i, given.notional![2 * i]!, given.notional![2 * i + 1]!, 0));
  for (const i of given.slack) {
    const { start, end, ex, ey, L } = members[i]!;
    const { total, atEnd } = resultants(acting[i]!, L);
    for (const [node, X, Y] of [
      [start, total[0] - atEnd[0], total[1] - atEnd[1]],
      [end, atEnd[0], atEnd[1]],
    ] as const)
      put(node, ex * X - ey * Y, ey * X + ex * Y, 0);
  }
  for (const s of frame.settlements) {
    const k = given.factors[s.case]!;
    prescribed[3 * s.node]! += k * (s.dx_m ?? 0);
    prescribed[3 * s.node + 1]! += k * (s.dy_m ?? 0);
    prescribed[3 * s.node + 2]! += k * (s.rz_rad ?? 0);
  }
  return { loads, prescribed };
}

/** Sum of what acts along a member, and the share of it that a simple beam hands to its end; local x and y. */
export function resultants(acting: Acting, L: number): { total: [number, number]; atEnd: [number, number] } {
  const total: [number, number] = [0, 0];
  const atEnd: [number, number] = [0, 0];
  let x = 0;
  const take = (axis: 0 | 1, force: number, first: number): void => {
    total[axis] += force;
    atEnd[axis] += (force * x + first) / L;
  };
  const { lengths, lines, places } = acting;
  for (let i = 0; i <= lengths.length; i++) {
    if (places.length > 0) {
      take(0, places[3 * i]!, 0);
      take(1, places[3 * i + 1]!, 0);
    }
    if (i === lengths.length) break;
    const l = lengths[i]!;
    for (const axis of [0, 1] as const) {
      const q = lines[4 * i + axis]!;
      const grow = lines[4 * i + 2 + axis]!;
      take(axis, l * (q + (l * grow) / 2), l * l * (q / 2 + (l * grow) / 3));
    }
    x += l;
  }
  return { total, atEnd };
}

/** Movements of a member's ends along its own axes, from those along the nodes'. */
function endMovements(setup: Setup, i: number, d: ArrayLike<number>): Float64Array {
  const { start, end } = setup.members[i]!;
  const [c1, s1, c2, s2] = turningOf(setup, i);
  const u = new Float64Array(6);
  u[0] = c1 * d[3 * start]! + s1 * d[3 * start + 1]!;
  u[1] = c1 * d[3 * start + 1]! - s1 * d[3 * start]!;
  u[2] = d[3 * start + 2]!;
  u[3] = c2 * d[3 * end]! + s2 * d[3 * end + 1]!;
  u[4] = c2 * d[3 * end + 1]! - s2 * d[3 * end]!;
  u[5] = d[3 * end + 2]!;
  return u;
}

/** q = k u + q₀. */
function endActions({ k, q0 }: TwoEnds, u: Float64Array): Float64Array {
  const q = q0.slice();
  for (let r = 0; r < 6; r++) for (let c = 0; c < 6; c++) q[r]! += k[6 * r + c]! * u[c]!;
  return q;
}

/** Adds what a member's ends ask of its nodes, q, along the nodes' axes. */
function addAsked(setup: Setup, i: number, q: Float64Array, factor: number, into: Float64Array): void {
  const { start, end } = setup.members[i]!;
  const [c1, s1, c2, s2] = turningOf(setup, i);
  into[3 * start]! += factor * (c1 * q[0]! - s1 * q[1]!);
  into[3 * start + 1]! += factor * (s1 * q[0]! + c1 * q[1]!);
  into[3 * start + 2]! += factor * q[2]!;
  into[3 * end]! += factor * (c2 * q[3]! - s2 * q[4]!);
  into[3 * end + 1]! += factor * (s2 * q[3]! + c2 * q[4]!);
  into[3 * end + 2]! += factor * q[5]!;
}

/** f = loads on the nodes − Σ Tᵀ(q₀ + k T d of the settlements), by number. */
export function rightSide(
  setup: Setup,
  equations: Equations,
  ends: readonly (TwoEnds | undefined)[],
  { loads, prescribed }: OnNodes,
): Float64Array {
  const f = loads.slice();
  ends.forEach((two, i) => {
    if (two) addAsked(setup, i, endActions(two, endMovements(setup, i, prescribed)), -1, f);
  });
  const side = new Float64Array(equations.count);
  equations.number.forEach((n, u) => {
    if (n >= 0) side[n] = f[u]!;
  });
  return side;
}

/** Everything of one state from its solution. */
export function stateFrom(
  setup: Setup,
  given: Given,
  equations: Equations,
  ends: readonly (TwoEnds | undefined)[],
  { loads, prescribed }: OnNodes,
  solution: Float64Array,
): SecondState {
  const { frame, members, axes } = setup;
  const d = prescribed.slice();
  equations.number.forEach((n, u) => {
    if (n >= 0) d[u] = solution[n]!;
  });
  const asked = loads.map((load) => -load);
  const endForces = new Float64Array(6 * members.length);
  ends.forEach((two, i) => {
    if (!two) return;
    const u = endMovements(setup, i, d);
    const q = endActions(two, u);
    addAsked(setup, i, q, 1, asked);
    endForces.set(innerForces(setup, given, i, two, u, q), 6 * i);
  });
  const reactions = new Float64Array(3 * frame.supports.length);
  frame.supports.forEach((support, i) => {
    const o = 3 * support.node;
    const [X, Y, M] = [0, 1, 2].map((r) => {
      const restraint = restraintOf(support, r);
      return restraint === 'free' ? 0 : restraint === 'fixed' ? asked[o + r]! : -restraint * d[o + r]!;
    }) as [number, number, number];
    const [c, s] = [axes[2 * support.node]!, axes[2 * support.node + 1]!];
    reactions.set([c * X - s * Y, s * X + c * Y, M], 3 * i);
  });
  for (let node = 0; node < frame.nodes.length; node++) {
    const [c, s] = [axes[2 * node]!, axes[2 * node + 1]!];
    const [x, y] = [d[3 * node]!, d[3 * node + 1]!];
    d[3 * node] = c * x - s * y;
    d[3 * node + 1] = s * x + c * y;
  }
  return { displacements: d, reactions, endForces };
}

/** N, V, M at both ends from what the nodes do to them; V = M′ = T + N v′ stands square to the moved axis. */
function innerForces(setup: Setup, given: Given, i: number, two: TwoEnds, u: Float64Array, q: Float64Array): number[] {
  const slip = setup.members[i]!.slip / (given.stiffness ? given.stiffness[2 * i]! : 1);
  const square = (N: number, T: number, phi: Float64Array): number => {
    if (!given.axial) return T;
    const turn = phi[0]! * u[1]! + phi[1]! * u[2]! + phi[2]! * u[4]! + phi[3]! * u[5]! + phi[4]!;
    return T + (N * (turn - slip * T)) / (1 + slip * N);
  };
  const [N1, N2] = [-q[0]!, q[3]!];
  return [N1, square(N1, q[1]!, two.phiStart), -q[2]!, N2, square(N2, -q[4]!, two.phiEnd), q[5]!];
}
