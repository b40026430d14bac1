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
  for (let i = 0; i <= acting.lengths.length; i++) {
    take(0, acting.Px[i]!, 0);
    take(1, acting.Py[i]!, 0);
    if (i === acting.lengths.length) break;
    const l = acting.lengths[i]!;
    for (const [axis, q, grow] of [
      [0, acting.qx[i]!, acting.growX[i]!],
      [1, acting.qy[i]!, acting.growY[i]!],
    ] as const)
      take(axis, l * (q + (l * grow) / 2), l * l * (q / 2 + (l * grow) / 3));
    x += l;
  }
  return { total, atEnd };
}

/** Movements of a member's ends along its own axes, from those along the nodes'. */
function endMovements(setup: Setup, i: number, d: ArrayLike<number>): number[] {
  const { start, end } = setup.members[i]!;
  const turns = turningOf(setup, i);
  return [start, end].flatMap((node, half) => {
    const [c, s] = turns[half]!;
    const [x, y] = [d[3 * node]!, d[3 * node + 1]!];
    return [c * x + s * y, c * y - s * x, d[3 * node + 2]!];
  });
}

function times(k: Float64Array, u: readonly number[], q0: Float64Array | null): number[] {
  return u.map((_, r) => u.reduce((sum, value, c) => sum + k[6 * r + c]! * value, q0 ? q0[r]! : 0));
}

/** Adds what a member's ends ask of its nodes, q, along the nodes' axes. */
function addAsked(setup: Setup, i: number, q: readonly number[], factor: number, into: Float64Array): void {
  const { start, end } = setup.members[i]!;
  const turns = turningOf(setup, i);
  [start, end].forEach((node, half) => {
    const [c, s] = turns[half]!;
    const [X, Y, m] = q.slice(3 * half, 3 * half + 3) as [number, number, number];
    into[3 * node]! += factor * (c * X - s * Y);
    into[3 * node + 1]! += factor * (s * X + c * Y);
    into[3 * node + 2]! += factor * m;
  });
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
    if (two) addAsked(setup, i, times(two.k, endMovements(setup, i, prescribed), two.q0), -1, f);
  });
  const side = new Float64Array(equations.K.length);
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
    const q = times(two.k, u, two.q0);
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
function innerForces(setup: Setup, given: Given, i: number, two: TwoEnds, u: readonly number[], q: readonly number[]): number[] {
  const slip = setup.members[i]!.slip / (given.stiffness ? given.stiffness[2 * i]! : 1);
  const square = (N: number, T: number, phi: Float64Array): number => {
    if (!given.axial) return T;
    const turn = phi[0]! * u[1]! + phi[1]! * u[2]! + phi[2]! * u[4]! + phi[3]! * u[5]! + phi[4]!;
    return T + (N * (turn - slip * T)) / (1 + slip * N);
  };
  const [X1, Y1, m1, X2, Y2, m2] = q as [number, number, number, number, number, number];
  return [-X1, square(-X1, Y1, two.phiStart), -m1, X2, square(X2, -Y2, two.phiEnd), m2];
}
