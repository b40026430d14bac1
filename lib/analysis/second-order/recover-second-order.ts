import { endForces, endInNodeAxes, toLocal } from '../load-vectors';
import { copyOf, numbers } from '../numbers';
import { takeReactions } from '../recover';
import { bendingForce, type Work } from './equilibrium-pass';
import { clampedTurns, type Turns } from './joint-turns';
import { memberChain } from './member-chain';
import { emptyPiece } from './piece';
import type { SecondOrderState } from './solve-second-order';

const u = new Float64Array(6);
const q = new Float64Array(6);
const piece = emptyPiece();
const turns: Turns = { start: 0, end: 0 };

/**
 * End forces, reactions and displacements of the pass at hand, divided by the load scale. Members ask their nodes for X, Y
 * along and square to their original axes; V = dM/dx is square to the deflected one: V = (Q + N ψ)/(1 + N/GAv). README §8.
 */
export function recoverSecondOrder(work: Work, change: number): SecondOrderState {
  const { input } = work;
  const { frame, t, angles, data, slack, loadScale, space } = input;
  const { loadings, held } = space;
  const nodes = frame.nodes.length;
  const all = copyOf(space.all);
  const asked = numbers(3 * nodes);
  const forces = numbers(6 * data.length);
  let handled = 0;
  for (let i = 0; i < data.length; i++) {
    if (slack?.[i]) continue;
    const m = data[i]!;
    const loading = loadings[i]!;
    const force = bendingForce(work, i);
    const bend = force ?? 0;
    memberChain(m, loading, force, false, piece, { yes: false });
    toLocal(m, angles, all, 3 * m.start, 3 * m.end, u);
    clampedTurns(m, piece, u, turns);
    u[2] = turns.start;
    u[5] = turns.end;
    endForces(piece, u, q);
    handled = Math.max(
      handled,
      piece.ka * Math.max(Math.abs(u[0]!), Math.abs(u[3]!)),
      Math.abs(piece.kvv) * Math.max(Math.abs(u[1]!), Math.abs(u[4]!)),
      Math.abs(piece.kv1 + piece.kv2) * Math.max(Math.abs(u[2]!), Math.abs(u[5]!)),
    );
    q[0] = q[0]! - held[i]!;
    q[1] = q[1]! + piece.Y1;
    q[2] = m.startSpring === 0 ? 0 : q[2]! + piece.m1;
    q[3] = q[3]! + held[i]! + loading.endN;
    q[4] = q[4]! + piece.Y2;
    q[5] = m.endSpring === 0 ? 0 : q[5]! + piece.m2;
    for (let end = 0; end < 2; end++) {
      const node = end === 0 ? m.start : m.end;
      const [x, y] = endInNodeAxes(m, angles[node]!, q[3 * end]!, q[3 * end + 1]!);
      asked[3 * node] = asked[3 * node]! + x;
      asked[3 * node + 1] = asked[3 * node + 1]! + y;
      asked[3 * node + 2] = asked[3 * node + 2]! + q[3 * end + 2]!;
    }
    const endN = force === null ? 0 : bend + loading.endN;
    const slip = m.GAv === Infinity ? 0 : 1 / m.GAv;
    forces[6 * i] = -q[0]! / loadScale + 0;
    forces[6 * i + 1] = (q[1]! + bend * u[2]!) / (1 + bend * slip) / loadScale + 0;
    forces[6 * i + 2] = -q[2]! / loadScale + 0;
    forces[6 * i + 3] = q[3]! / loadScale + 0;
    forces[6 * i + 4] = (-q[4]! + endN * u[5]!) / (1 + endN * slip) / loadScale + 0;
    forces[6 * i + 5] = q[5]! / loadScale + 0;
  }
  for (let i = 0; i < asked.length; i++) asked[i] = asked[i]! - space.nodeForces[i]!;
  const reactions = takeReactions(frame, t, angles, all, asked);
  for (const values of [all, asked, reactions]) for (let i = 0; i < values.length; i++) values[i] = values[i]! / loadScale + 0;
  return {
    ok: true,
    displacements: all,
    reactions,
    endForces: forces,
    outOfBalance: asked,
    handled: handled / loadScale,
    iterations: work.passes,
    change,
  };
}
