import type { Frame } from '@/lib/model/frame';
import type { ResultState, StateMethod } from '@/lib/results/result';
import { nodeAngles } from '../assemble';
import { memberDataFor } from '../member-data';
import { buildTopology } from '../topology';
import { firstOrderCombination, solveSecondOrder, type SecondOrderFailure } from './solve-second-order';
import { secondOrderSpace } from './second-order-space';

const plain: StateMethod = {
  shearDeformation: false, imperfection: null, notional: null, loadScale: 1, stiffness: null, slack: [], iterations: 1, change: 0,
}; // prettier-ignore

/** One combination of a frame on its own, without a pipeline around it, for tests. @param order 1: axial forces don't bend */
export function analyseCombination(
  frame: Frame,
  index = 0,
  how: Partial<StateMethod> = {},
  order: 1 | 2 = 2,
): ResultState | SecondOrderFailure {
  const method = { ...plain, ...how };
  const t = buildTopology(frame);
  const combination = frame.combinations[index]!;
  const factors = new Float64Array(frame.cases.length);
  for (const term of combination.terms) factors[term.case] = factors[term.case]! + term.factor;
  const slack = Uint8Array.from(frame.members, (_, i) => (method.slack.includes(i) ? 1 : 0));
  const result = (order === 2 ? solveSecondOrder : firstOrderCombination)({
    frame,
    t,
    angles: nodeAngles(frame),
    data: memberDataFor(frame, method),
    slack: method.slack.length > 0 ? slack : null,
    factors,
    loadScale: method.loadScale,
    notional: method.notional,
    guess: null,
    space: secondOrderSpace(frame, t),
  });
  if (!result.ok) return result;
  const { displacements, reactions, endForces, iterations, change } = result;
  return {
    name: combination.name,
    kind: 'combination',
    purpose: combination.purpose,
    factors,
    order,
    criticalLoadFactor: null,
    method: { ...method, iterations, change },
    displacements,
    reactions,
    endForces,
  };
}

/** The same where it must have a solution. */
export function stateOf(frame: Frame, index = 0, how: Partial<StateMethod> = {}, order: 1 | 2 = 2): ResultState {
  const state = analyseCombination(frame, index, how, order);
  if ('why' in state) throw new Error(`${state.why} at ${state.reached} of the load`);
  return state;
}
