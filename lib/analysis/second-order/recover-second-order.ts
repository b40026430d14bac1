import { endForces, toLocal } from '../load-vectors';
import { copyOf, numbers } from '../numbers';
import { takeReactions } from '../recover';
import { solve } from '../solve';
import { bendingForce, type Work } from './equilibrium-pass';
import { clampedTurns, type Turns } from './joint-turns';
import { lengtheningEstimate, noLengthening } from './lengthening';
import { memberChain } from './member-chain';
import type { SecondOrderState } from './solve-second-order';

const u = new Float64Array(6);
const q = new Float64Array(6);
const turns: Turns = { start: 0, end: 0 };

/**
 * End forces, reactions and displacements of a state whose axial forces, in `N`, the last pass answered with, divided by the
 * load scale. The pass moved the frame under the axial forces before them, so its movements are put right first: a step of
 * K(N before) d ← what nodes are out of balance under N. README §8.
 *
 * Members ask their nodes for X, Y along and square to their original axes; V = dM/dx is square to the deflected one:
 * V = (Q + N ψ)/(1 + N/GAv).
 */
export function recoverSecondOrder(work: Work, change: number): SecondOrderState {
  const { input, order } = work;
  const { frame, t, angles, data, slack, loadScale, space } = input;
  const all = copyOf(space.all);
  const asked = numbers(3 * frame.nodes.length);
  const forces = numbers(6 * data.length);
  for (let i = 0; i < data.length; i++)
    if (!slack?.[i]) memberChain(data[i]!, space.loadings[i]!, bendingForce(work, i), false, space.pieces[i]!, { yes: false });
  let handled = takeForces(work, all, forces, asked);
  if (order === 2) {
    putRight(work, all, asked);
    handled = takeForces(work, all, forces, asked);
    change = changeOf(space.N, forces, slack);
  }
  const lengthening = order === 2 ? lengtheningEstimate(work, all, forces, handled) : noLengthening;
  divideForces(work, forces);
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
    lengthening,
  };
}

/**
 * What members do at their ends under movements `all`: X₁ Y₁ ψ₁ … in local axes into `forces` as N, Q, M with the ends' own
 * rotations kept in `space.turns` and their chords' in `space.chords`, and what nodes are asked for beyond their loads into `asked`.
 * @returns the largest force met before stiffness × movement cancels
 */
function takeForces({ input }: Work, all: Float64Array, forces: Float64Array, asked: Float64Array): number {
  const { angles, data, slack, space } = input;
  const { loadings, held, pieces, nodeForces } = space;
  let handled = 0;
  for (let i = 0; i < asked.length; i++) asked[i] = 0 - nodeForces[i]!;
  for (let i = 0; i < data.length; i++) {
    if (slack?.[i]) continue;
    const m = data[i]!;
    const piece = pieces[i]!;
    toLocal(m, angles, all, 3 * m.start, 3 * m.end, u);
    clampedTurns(m, piece, u, turns);
    u[2] = turns.start;
    u[5] = turns.end;
    space.turns[2 * i] = turns.start;
    space.turns[2 * i + 1] = turns.end;
    space.chords[i] = (u[4]! - u[1]!) / m.length;
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
    q[3] = q[3]! + held[i]! + loadings[i]!.endN;
    q[4] = q[4]! + piece.Y2;
    q[5] = m.endSpring === 0 ? 0 : q[5]! + piece.m2;
    for (let end = 0; end < 2; end++) {
      const node = end === 0 ? m.start : m.end;
      const o = 3 * end;
      let x = q[o]! * m.cos - q[o + 1]! * m.sin;
      let y = q[o]! * m.sin + q[o + 1]! * m.cos;
      const angle = angles[node]!;
      if (angle !== 0) {
        const ca = Math.cos(angle);
        const sa = Math.sin(angle);
        const along = x * ca + y * sa;
        y = y * ca - x * sa;
        x = along;
      }
      asked[3 * node] = asked[3 * node]! + x;
      asked[3 * node + 1] = asked[3 * node + 1]! + y;
      asked[3 * node + 2] = asked[3 * node + 2]! + q[o + 2]!;
    }
    for (let r = 0; r < 6; r++) forces[6 * i + r] = q[r]!;
  }
  return handled;
}

/** d ← d − K⁻¹(what nodes are out of balance), K as last factored. */
function putRight({ input }: Work, all: Float64Array, asked: Float64Array): void {
  const { frame, t, space } = input;
  const { K, d, inner } = space;
  for (let p = 0; p < t.size; p++) {
    const o = 3 * t.nodeAt[p]!;
    for (let r = 0; r < 3; r++) d[3 * p + r] = t.free[o + r] ? asked[o + r]! : 0;
  }
  for (const { node, ux, uy, rz } of frame.supports) {
    const p = t.positionOf[node]!;
    if (p < 0) continue;
    if (typeof ux === 'number') d[3 * p] = d[3 * p]! + ux * all[3 * node]!;
    if (typeof uy === 'number') d[3 * p + 1] = d[3 * p + 1]! + uy * all[3 * node + 1]!;
    if (typeof rz === 'number') d[3 * p + 2] = d[3 * p + 2]! + rz * all[3 * node + 2]!;
  }
  solve(K, t, inner, d, 1);
  for (let p = 0; p < t.size; p++) {
    const o = 3 * t.nodeAt[p]!;
    for (let r = 0; r < 3; r++) if (t.free[o + r]) all[o + r] = all[o + r]! - d[3 * p + r]!;
  }
}

/** Largest change from the axial forces that bend to those that are found, against the largest of them. */
function changeOf(N: Float64Array, forces: Float64Array, slack: Uint8Array | null): number {
  let size = 0;
  let moved = 0;
  for (let i = 0; i < N.length; i++) {
    if (slack?.[i]) continue;
    size = Math.max(size, Math.abs(forces[6 * i]!), Math.abs(forces[6 * i + 3]!));
    moved = Math.max(moved, Math.abs(forces[6 * i]! + N[i]!));
  }
  return size > 0 ? moved / size : 0;
}

/** X, Y, m of members’ ends as N, V, M, ÷ the load scale. */
function divideForces(work: Work, forces: Float64Array): void {
  const { data, slack, loadScale, space } = work.input;
  for (let i = 0; i < data.length; i++) {
    if (slack?.[i]) continue;
    const m = data[i]!;
    const force = bendingForce(work, i);
    const bend = force ?? 0;
    const endN = force === null ? 0 : bend + space.loadings[i]!.endN;
    const slip = m.GAv === Infinity ? 0 : 1 / m.GAv;
    const o = 6 * i;
    forces[o] = -forces[o]! / loadScale + 0;
    forces[o + 1] = (forces[o + 1]! + bend * space.turns[2 * i]!) / (1 + bend * slip) / loadScale + 0;
    forces[o + 2] = -forces[o + 2]! / loadScale + 0;
    forces[o + 3] = forces[o + 3]! / loadScale + 0;
    forces[o + 4] = (-forces[o + 4]! + endN * space.turns[2 * i + 1]!) / (1 + endN * slip) / loadScale + 0;
    forces[o + 5] = forces[o + 5]! / loadScale + 0;
  }
}
