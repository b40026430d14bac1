import type { Frame } from '@/lib/model/frame';
import { defaultSettings, type Settings } from '@/lib/model/settings';
import type { Certificate, ResultState } from '@/lib/results/result';
import { nodeAngles } from './assemble';
import { equilibriumTolerance, leastDigits, residualTolerance, secondTolerance, secondUnknowns } from './certificate-tolerances';
import { globalEquilibrium, stateEquilibrium } from './equilibrium';
import type { FlatLines } from './flat-lines';
import type { LoadVectors } from './load-vectors';
import type { Recovered } from './recover';
import { caseResidual, stateResidual } from './residual';
import { largestDifference } from './second/compare-states';
import { secondAnalysis } from './second/second-analysis';
import type { Topology } from './topology';
import { worse } from './worse';

export { leastDigits };

/** Share of the forces met on the way below which a result is taken for their rounding. */
const rounding = 1e-4;

/** Everything about a plain frame (first order, Euler–Bernoulli, combinations by superposition) that its certificate is made from. */
export interface Solved {
  readonly frame: Frame;
  readonly t: Topology;
  readonly diagonal: Float64Array;
  readonly norm: number;
  readonly condition: number;
  readonly loads: LoadVectors;
  readonly d: Float64Array;
  readonly recovered: readonly Recovered[];
  readonly cases: readonly ResultState[];
  /** Its combinations, so that the second analysis may compare them as well. */
  readonly combinations?: readonly ResultState[];
}

/** The same of a frame with states that are no sums of cases. */
export interface SolvedStates {
  readonly frame: Frame;
  readonly settings: Settings;
  readonly t: Topology;
  /** Of K with all members, unreduced: what residuals are scaled by. */
  readonly diagonal: Float64Array;
  readonly norm: number;
  /** The worst of all factored systems that gave results. */
  readonly condition: number;
  /** Every state handed on, in order. */
  readonly solved: readonly SolvedState[];
  /** Lines of members, where they are kept for who comes after. */
  readonly lines?: FlatLines;
}
export interface SolvedState {
  readonly state: ResultState;
  /** By node and direction, node axes, ÷ loadScale as the state; null for a sum of cases. */
  readonly outOfBalance: Float64Array | null;
  /** Largest force met on the way before stiffness × movement cancels, N; 0 for a sum of cases. */
  readonly handled: number;
}

/** Certificate of a plain frame (engine, Certificate; README §5). @param second whether to make the second analysis */
export function certify(solved: Solved, second: boolean): Certificate {
  const { frame, recovered, cases, combinations } = solved;
  const floors = recovered.map((r) => rounding * r.handled);
  const compared = combinations ? frame : { ...frame, combinations: [] };
  return {
    residual: caseResidual(solved),
    equilibrium: recovered.reduce((most, r, c) => worse(most, globalEquilibrium(frame, c, r.reactions, floors[c]!)), 0),
    condition: solved.condition,
    digits: digitsOf(solved.condition),
    ...compareWithSecond(compared, defaultSettings, solved.t, [...cases, ...(combinations ?? [])], floors, second),
  };
}

/** Certificate of any other frame: the same items for every state as it stands (README §5). */
export function certifyStates(input: SolvedStates, second: boolean): Certificate {
  const { frame, settings, t, solved, condition } = input;
  const cases = solved.filter(({ state }) => state.kind === 'case').map(({ handled }) => rounding * handled);
  const floors = solved.map(({ state, handled }) => Math.max(rounding * handled, floorOf(state, cases)));
  return {
    residual: stateResidual(input, nodeAngles(frame)),
    equilibrium: solved.reduce((most, { state }, i) => worse(most, stateEquilibrium(frame, state, floors[i]!, input.lines)), 0),
    condition,
    digits: digitsOf(condition),
    ...compareWithSecond(
      frame,
      settings,
      t,
      solved.map(({ state }) => state),
      cases,
      second,
      floors,
    ),
  };
}

/** Decimal digits that a condition leaves. */
export function digitsOf(condition: number): number {
  return -Math.log10(Number.EPSILON * condition);
}

/** A sum of cases has the rounding of each. @param cases floors of the cases, N; none where there are no cases */
function floorOf(state: ResultState, cases: readonly number[]): number {
  let sum = 0;
  for (let c = 0; c < cases.length; c++) sum += Math.abs(state.factors[c]!) * cases[c]!;
  return sum;
}

/** Certificate item 3. @param cases floors of the cases, N   @param floors of every state; undefined = as sums of cases */
function compareWithSecond(
  frame: Frame,
  settings: Settings,
  t: Topology,
  states: readonly ResultState[],
  cases: readonly number[],
  wanted: boolean,
  floors?: readonly number[],
): Pick<Certificate, 'second' | 'secondReason'> {
  if (states.length === 0) return { second: null, secondReason: 'no results' };
  if (!wanted) return { second: null, secondReason: 'sampled' };
  if (t.free.reduce((sum, free) => sum + free, 0) > secondUnknowns) return { second: null, secondReason: 'too large' };
  const others = secondAnalysis(frame, settings, states);
  if (!others) return { second: Infinity, secondReason: null };
  const difference = (most: number, state: ResultState, i: number): number =>
    worse(most, largestDifference(frame, state, others[i]!, floors?.[i] ?? floorOf(state, cases)));
  return { second: states.reduce(difference, 0), secondReason: null };
}

/** What in a certificate is outside its tolerance, in words; null = nothing. */
export function outsideTolerance(c: Certificate): string | null {
  if (!Number.isFinite(c.residual + c.equilibrium))
    return 'Its loads or stiffnesses are too large or too small for numbers to hold.';
  if (!(c.residual <= residualTolerance))
    return `The equations are not met closely enough: residual ${c.residual.toExponential(1)}, at most 1e-10 is asked for.`;
  if (!(c.equilibrium <= equilibriumTolerance))
    return `Loads and reactions are not in balance: ${c.equilibrium.toExponential(1)} of their size, at most 1e-8 is asked for.`;
  if (c.second === Infinity) return 'A second, independent analysis finds no such state: another set of slack members, or none.';
  if (c.secondReason === null && !((c.second ?? NaN) <= secondTolerance))
    return `Two independent analyses differ by ${(c.second ?? NaN).toExponential(1)} of the largest value, at most 1e-6 is allowed.`;
  return null;
}
