import type { Frame } from '@/lib/model/frame';
import type { Settings } from '@/lib/model/settings';
import type { ResultState, StateMethod } from '@/lib/results/result';
import type { SolvedState } from './certificate';
import type { BucklingSpace } from './critical/buckling-trial';
import { nextCriticalLoadFactor, type CriticalMemory } from './critical/neighbour-critical';
import type { SolvedCases } from './first-order-cases';
import type { StateTrouble } from './failures';
import { axialForcesOf } from './imperfections/axial-forces-of';
import type { ImperfectionForces } from './imperfections/imperfection-forces';
import { toLocal } from './load-vectors';
import { memberDataFor } from './member-data';
import { strengthScale, type PlannedState } from './plan-states';
import { ropeAmong } from './second-order/ropes';
import { noLengthening, type LengtheningEstimate } from './second-order/lengthening';
import type { SecondOrderSpace } from './second-order/second-order-space';
import { firstOrderCombination, solveSecondOrder, type SecondOrderFailure } from './second-order/solve-second-order';
import { firstReduction, reduce, shareOf, squashLoads } from './stiffness-reduction/reduced-stiffness';
import { factorsOf, superpose } from './superpose';
import { movementWithout } from './tension-only/movement-without';
import type { Topology } from './topology';

/** What all states of one frame are analysed with. */
export interface SetJob {
  readonly frame: Frame;
  readonly t: Topology;
  readonly settings: Settings;
  readonly solved: SolvedCases;
  readonly ties: readonly number[];
  readonly space: SecondOrderSpace;
  readonly buckling: BucklingSpace;
  readonly critical: CriticalMemory;
  readonly forces: ImperfectionForces | null;
  /** First-order states of the combination at hand, by its slack members. */
  readonly firsts: Map<string, FirstOrder>;
  readonly start: StartForces;
  reductions: { readonly squash: Float64Array; readonly general: Float64Array } | null;
}

/** A combination to first order without imperfections, stiffness as it is: where N and α_cr come from. */
interface FirstOrder extends SolvedState {
  alpha: number | null | undefined;
}

/** A state, and what the lengthening of its turned members would change, which is left out: nothing to first order. */
export interface SetState extends SolvedState {
  readonly lengthening: LengtheningEstimate;
}

export type SetResult = (SetState & { readonly ok: true }) | { readonly ok: false; readonly trouble: StateTrouble };

/** Changes of a stiffness below this share are none; and how often it may change. */
const settled = 1e-9;
const mostPasses = 50;

/** One state with one set of slack members. README §6. */
export function analyseSet(job: SetJob, planned: PlannedState, slack: readonly number[]): SetResult {
  const first = firstOrder(job, planned.combination, slack);
  if (!first) return { ok: false, trouble: withoutThem(job, slack) };
  const notional = planned.imperfection && job.forces ? leaning(job.forces, first.state, planned) : null;
  const plain = planned.order === 1 && !notional && !planned.reduced && !planned.imperfection;
  const found = plain
    ? { ok: true as const, ...first, alpha: undefined, lengthening: noLengthening }
    : solved(job, planned, slack, first, notional);
  if (!found.ok) return found;
  const state = { ...found.state, name: planned.name };
  return { ok: true, state, outOfBalance: found.outOfBalance, handled: found.handled, lengthening: found.lengthening };
}

/** The forces of the imperfections, the way that the state leans. */
function leaning(forces: ImperfectionForces, first: ResultState, planned: PlannedState): Float64Array {
  const towardsRight = forces(first.endForces, first.factors, planned.loadScale);
  if (planned.imperfection === 'left') for (let i = 0; i < towardsRight.length; i++) towardsRight[i] = 0 - towardsRight[i]!;
  return towardsRight;
}

/** Equilibrium with the stiffness that goes with its own forces. */
function solved(
  job: SetJob,
  planned: PlannedState,
  slack: readonly number[],
  first: FirstOrder,
  notional: Float64Array | null,
): SetResult {
  const { frame, t, space, settings } = job;
  const factors = first.state.factors;
  const guess = startForces(job, first.state.endForces);
  const leans = planned.order === 2 && notional !== null && slack.length === 0;
  if (leans) addLeaning(job, planned, notional);
  const analyse = planned.order === 2 ? solveSecondOrder : firstOrderCombination;
  let stiffness = planned.reduced ? reductions(job).general : null;
  let iterations = 0;
  for (let pass = 0; pass < mostPasses; pass++) {
    const method = { shearDeformation: settings.shearDeformation, stiffness };
    const data = memberDataFor(frame, method);
    const { loadScale } = planned;
    const rope = planned.order === 2 && ropeAmong(frame, data, first.state.endForces, loadScale, slack, { sum: 0 });
    if (rope) return { ok: false, trouble: { kind: 'rope', ...rope } };
    const input = {
      frame,
      t,
      angles: job.solved.angles,
      data,
      slack: flags(frame, slack),
      factors,
      loadScale,
      notional,
      guess,
      space,
    };
    const result = analyse(input);
    if (!result.ok) return { ok: false, trouble: troubleOf(job, first, slack, result) };
    iterations += result.iterations;
    const next = stiffness && softened(job, stiffness, result.endForces);
    if (next && 'member' in next) return { ok: false, trouble: { kind: 'squashed', ...next } };
    if (next) {
      stiffness = next;
      for (let i = 0; i < guess.length; i++) guess[i] = result.endForces[6 * i]!;
      continue;
    }
    const { change, displacements, reactions, endForces, outOfBalance, handled, lengthening } = result;
    if (leans && planned.imperfection === 'right') remember(job, planned.combination, endForces);
    const whole: StateMethod = {
      ...method, imperfection: planned.imperfection, notional, loadScale, slack, iterations, change,
    }; // prettier-ignore
    const state: ResultState = { ...first.state, order: planned.order, method: whole, displacements, reactions, endForces };
    return { ok: true, state, outOfBalance, handled, lengthening };
  }
  return { ok: false, trouble: { kind: 'not settled', reached: 1 } };
}

/**
 * Adds what the imperfections do to the axial forces, to first order; leaning to the left together with what second order made
 * of them when the same combination leaned to the right, for it will make much the same again.
 */
function addLeaning(
  { t, solved, start }: SetJob,
  { combination, imperfection, loadScale }: PlannedState,
  notional: Float64Array,
): void {
  const { N, begun, beyond, leaned } = start;
  axialForcesOf(solved, t, notional, leaned);
  const again = imperfection !== 'right' && start.combination === combination;
  for (let i = 0; i < N.length; i++) N[i] = begun[i] = N[i]! + leaned[i]! / loadScale + (again ? beyond[i]! : 0);
}

/** What second order made of the forces that the right-leaning state was begun with. */
function remember({ start }: SetJob, combination: number, endForces: Float64Array): void {
  const { begun, beyond } = start;
  start.combination = combination;
  for (let i = 0; i < beyond.length; i++) beyond[i] = endForces[6 * i]! - begun[i]!;
}

/** N at each member's start. */
function startForces({ start: { N } }: SetJob, endForces: Float64Array): Float64Array {
  for (let i = 0; i < N.length; i++) N[i] = endForces[6 * i]!;
  return N;
}

/** Axial forces that a state begins from, by member. */
interface StartForces {
  readonly N: Float64Array;
  /** As the last state that leans was begun; what its imperfections do to first order. */
  readonly begun: Float64Array;
  readonly leaned: Float64Array;
  /** What the state of `combination` that leans to the right came to, less what it was begun with. */
  readonly beyond: Float64Array;
  combination: number;
}

export function startOf(members: number): StartForces {
  const row = (): Float64Array => new Float64Array(members);
  return { N: row(), begun: row(), leaned: row(), beyond: row(), combination: -1 };
}

/**
 * Stiffness factors that go with these forces; null where they are the ones used, or the member (index) that is pressed to
 * its squash load.
 */
function softened(
  job: SetJob,
  before: Float64Array,
  endForces: Float64Array,
): Float64Array | { readonly member: number; readonly share: number } | null {
  const { squash } = reductions(job);
  const alpha = strengthScale(job.settings);
  // arrays are not changed once members have been made with them
  const next = before.slice();
  if (!(reduce(endForces, squash, alpha, next) > settled)) return null;
  for (let i = 0; i < squash.length; i++)
    if (!(next[2 * i + 1]! > 0)) return { member: i, share: shareOf(endForces, i, alpha, squash[i]!) };
  return next;
}

function reductions(job: SetJob): NonNullable<SetJob['reductions']> {
  return (job.reductions ??= { squash: squashLoads(job.frame), general: firstReduction(job.frame) });
}

function flags(frame: Frame, slack: readonly number[]): Uint8Array | null {
  if (slack.length === 0) return null;
  const out = new Uint8Array(frame.members.length);
  for (const member of slack) out[member] = 1;
  return out;
}

/** A combination to first order: the sum of its cases, or with its slack members left out; null where it can move freely. */
function firstOrder(job: SetJob, combination: number, slack: readonly number[]): FirstOrder | null {
  const key = slack.join();
  const before = job.firsts.get(key);
  if (before) return before;
  const { frame, solved } = job;
  const found = slack.length === 0 ? sum(frame, solved, combination) : without(job, combination, slack);
  if (found) job.firsts.set(key, found);
  return found;
}

function sum(frame: Frame, solved: SolvedCases, combination: number): FirstOrder {
  const state = superpose(frame, solved.cases, combination);
  return { state, outOfBalance: null, handled: 0, alpha: undefined };
}

function without(job: SetJob, combination: number, slack: readonly number[]): FirstOrder | null {
  const { frame, t, solved, space, settings } = job;
  const { name, purpose } = frame.combinations[combination]!;
  const factors = factorsOf(frame, combination);
  const input = { frame, t, angles: solved.angles, data: solved.data, slack: flags(frame, slack), factors, loadScale: 1, notional: null, guess: null, space }; // prettier-ignore
  const result = firstOrderCombination(input);
  if (!result.ok) return null;
  const { displacements, reactions, endForces, outOfBalance, handled } = result;
  const method: StateMethod = {
    shearDeformation: settings.shearDeformation, imperfection: null, notional: null, loadScale: 1, stiffness: null, slack,
    iterations: 1, change: 0,
  }; // prettier-ignore
  const rest = { kind: 'combination' as const, order: 1 as const, criticalLoadFactor: null };
  const state: ResultState = { name, purpose, factors, method, ...rest, displacements, reactions, endForces };
  return { state, outOfBalance, handled, alpha: undefined };
}

/** α_cr of a combination that stands with these members slack. */
export function criticalOf(job: SetJob, combination: number, slack: readonly number[]): number | null {
  const first = firstOrder(job, combination, slack);
  return first && alphaOf(job, first);
}

/** α_cr of the combination with its slack members left out; the same for both directions of its imperfections. */
function alphaOf({ frame, t, solved, buckling, critical }: SetJob, first: FirstOrder): number | null {
  if (first.alpha === undefined)
    first.alpha = nextCriticalLoadFactor(frame, t, solved.angles, solved.diagonal, first.state, buckling, critical);
  return first.alpha;
}

function troubleOf(
  job: SetJob,
  first: FirstOrder,
  slack: readonly number[],
  { why, reached, member = 0, movement }: SecondOrderFailure,
): StateTrouble {
  if (why === 'mechanism') return withoutThem(job, slack);
  if (why === 'not settled') return { kind: why, reached };
  const criticalLoadFactor = alphaOf(job, first);
  const pulls = movement && stretchesOf(job, movement);
  const rest = { reached, criticalLoadFactor, pulls };
  return why === 'too far' ? { kind: why, member, ...rest } : { kind: why, ...rest };
}

const u = new Float64Array(6);

/** How far each tie is stretched by a movement along node axes. */
function stretchesOf({ solved: { data, angles }, ties }: SetJob, movement: Float64Array): number[] {
  return ties.map((tie) => {
    const m = data[tie]!;
    toLocal(m, angles, movement, 3 * m.start, 3 * m.end, u);
    return u[3]! - u[0]!;
  });
}

function withoutThem({ frame, t, solved }: SetJob, slack: readonly number[]): StateTrouble {
  const movement = movementWithout(frame, t, solved, slack);
  const { words = 'the frame can move freely.', caught = false, stretches = [] } = movement ?? {};
  return { kind: 'free', movement: words, caught, stretches };
}
