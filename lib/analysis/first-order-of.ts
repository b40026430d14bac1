import type { Frame } from '@/lib/model/frame';
import type { ResultState } from '@/lib/results/result';
import { nodeAngles } from './assemble';
import { memberDataFor } from './member-data';
import { secondOrderSpace } from './second-order/second-order-space';
import { firstOrderCombination } from './second-order/solve-second-order';
import { buildTopology } from './topology';

/**
 * The first-order state of a state's own loads, without imperfections and with unreduced stiffness, its slack members left out:
 * where its critical load factor and its buckled shape come from. Null where the frame moves freely without them.
 */
export function firstOrderOf(frame: Frame, state: ResultState): ResultState | null {
  const shearDeformation = state.method?.shearDeformation ?? false;
  const slack = state.method?.slack ?? [];
  const t = buildTopology(frame);
  const flags = slack.length > 0 ? new Uint8Array(frame.members.length) : null;
  for (const member of slack) flags![member] = 1;
  const result = firstOrderCombination({
    frame,
    t,
    angles: nodeAngles(frame),
    data: memberDataFor(frame, { shearDeformation, stiffness: null }),
    slack: flags,
    factors: state.factors,
    loadScale: 1,
    notional: null,
    guess: null,
    space: secondOrderSpace(frame, t),
  });
  if (!result.ok) return null;
  const { displacements, reactions, endForces } = result;
  const plain = !shearDeformation && slack.length === 0;
  const method = plain
    ? null
    : { shearDeformation, imperfection: null, notional: null, loadScale: 1, stiffness: null, slack, iterations: 1, change: 0 };
  return { ...state, order: 1, method, displacements, reactions, endForces };
}
