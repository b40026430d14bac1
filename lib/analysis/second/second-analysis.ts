import type { Frame } from '@/lib/model/frame';
import type { Settings } from '@/lib/model/settings';
import type { ResultState } from '@/lib/results/result';
import { askedStates, type AskedState } from './asked-states';
import { firstOrderStates } from './first-order';
import { notionalOf } from './second-imperfections';
import { actingUnder } from './second-loads';
import { solveState } from './second-order';
import { setUp, type Given, type Setup } from './second-setup';
import type { SecondState } from './second-state';
import { reducedUnder } from './second-reduction';
import { tiesStand } from './second-ties';

/** Passes in which reduced stiffness and the forces that reduce it must agree, and to what. */
const mostReductions = 60;
const sameStiffness = 1e-10;

/**
 * The second, independent analysis (engine, Certificate 3): every state that sheets and settings ask for, by member
 * transfer matrices and dense equations, sharing nothing with the first but the model (README §5).
 *
 * Of the first analysis it takes a start and no more: axial forces and τ_b, which it goes on iterating by itself, and the
 * set of slack members, which it takes only if each is rightly slack, and each other rightly taut, in its own result.
 *
 * @param first the states of the first analysis, in order
 * @returns a state for each of the first, as results are handed on (÷ loadScale); null where the second finds none, or
 *   where the first has another list of states than is asked for
 */
export function secondAnalysis(frame: Frame, settings: Settings, first: readonly ResultState[]): SecondState[] | null {
  const asked = askedStates(frame, settings);
  if (asked.length !== first.length || asked.some(({ name, order }, i) => first[i]!.name !== name || first[i]!.order !== order))
    return null;
  const setup = setUp(frame, settings.shearDeformation);
  const unit = frame.cases.map((_, c) => frame.cases.map((__, i) => (i === c ? 1 : 0)));
  const ties = frame.members.some((m) => m.tensionOnly);
  // with ties each combination is a structure of its own
  const cases = ties ? null : firstOrderStates(setup, unit);
  if (!ties && !cases) return null;
  const states: SecondState[] = [];
  for (let i = 0; i < asked.length; i++) {
    const sum = cases && superposed(cases, asked[i]!.factors);
    const plain = asked[i]!.order === 1 && asked[i]!.lean === 0 && !asked[i]!.reduced;
    const state = plain && sum ? sum : oneByOne(setup, settings, asked[i]!, first[i]!, sum);
    if (!state) return null;
    states.push(state);
  }
  return states;
}

/** Σ factor × case, first order. */
function superposed(cases: readonly SecondState[], factors: readonly number[]): SecondState {
  const sum = (pick: (state: SecondState) => Float64Array): Float64Array => {
    const total = new Float64Array(cases[0] ? pick(cases[0]).length : 0);
    cases.forEach((state, c) => {
      if (factors[c] !== 0) pick(state).forEach((value, i) => (total[i]! += factors[c]! * value));
    });
    return total;
  };
  return { displacements: sum((s) => s.displacements), reactions: sum((s) => s.reactions), endForces: sum((s) => s.endForces) };
}

/** A state that is no sum of cases. @param sum its first-order state of all members, where there is one */
function oneByOne(
  setup: Setup,
  settings: Settings,
  asked: AskedState,
  first: ResultState,
  sum: SecondState | null,
): SecondState | null {
  const { scale } = asked;
  const factors = asked.factors.map((k) => k * scale);
  const slack = new Set(first.method?.slack ?? []);
  const acting = setup.along.map((along) => actingUnder(along, factors));
  const notional = asked.lean === 0 ? null : notionalOf(setup, settings, asked, sum, slack);
  if (asked.lean !== 0 && !notional) return null;
  const scaled = first.endForces.map((force) => force * scale);
  let axial = asked.order === 2 ? Float64Array.from(setup.members, (_, i) => scaled[6 * i]!) : null;
  let stiffness = asked.reduced ? reducedUnder(setup, scaled, asked.alpha) : null;
  for (let pass = 0; pass < mostReductions; pass++) {
    const given: Given = { factors, notional, stiffness, slack, axial };
    const state = solveState(setup, given, acting);
    if (!state) return null;
    const next = stiffness && reducedUnder(setup, state.endForces, asked.alpha);
    if (!next || next.every((k, i) => Math.abs(k - stiffness![i]!) <= sameStiffness))
      return tiesStand(setup, given, acting, state) ? divided(state, scale) : null;
    stiffness = next;
    if (axial) axial = Float64Array.from(setup.members, (_, i) => state.endForces[6 * i]!);
  }
  return null;
}

function divided(state: SecondState, scale: number): SecondState {
  if (scale === 1) return state;
  const by = (values: Float64Array): Float64Array => values.map((value) => value / scale);
  return { displacements: by(state.displacements), reactions: by(state.reactions), endForces: by(state.endForces) };
}
