import type { Frame } from '@/lib/model/frame';
import type { Settings } from '@/lib/model/settings';
import type { Failure } from '@/lib/results/result';
import { analyseSet, criticalOf, startOf, type SetJob, type SetState } from './analyse-set';
import type { SolvedState } from './certificate';
import { bucklingSpace } from './critical/buckling-trial';
import { criticalMemory } from './critical/neighbour-critical';
import { shapeTrouble } from './drawn-shape';
import { stateFailure, tieFailure, troubleWords, type StateTrouble } from './failures';
import type { SolvedCases } from './first-order-cases';
import { imperfectionForces } from './imperfections/imperfection-forces';
import { planStates, type PlannedState } from './plan-states';
import { memberDataFor } from './member-data';
import { ropeAmong, type RopeCount } from './second-order/ropes';
import { secondOrderSpace } from './second-order/second-order-space';
import { tieForces } from './tension-only/tie-forces';
import { settleTies } from './tension-only/settle-ties';
import type { Topology } from './topology';
import { worstCondition } from './worst-condition';

/** Every combination's states, and the worst condition among what they were solved from. */
export interface CombinationStates {
  readonly states: readonly SolvedState[];
  readonly condition: number;
}

/**
 * The states of a frame's combinations by whatever its settings ask for: second order, imperfections both ways, reduced
 * stiffness, slack ties (README §6); in the order of plan-states.ts. A combination without equilibrium is the frame's failure.
 */
export function combinationStates(
  frame: Frame,
  t: Topology,
  settings: Settings,
  solved: SolvedCases,
): CombinationStates | Failure {
  const ties = frame.members.flatMap((member, i) => (member.tensionOnly ? [i] : []));
  const job: SetJob = {
    frame,
    t,
    settings,
    solved,
    ties,
    space: secondOrderSpace(frame, t),
    buckling: bucklingSpace(t),
    critical: criticalMemory(frame, t),
    forces: imperfectionForces(frame, settings),
    firsts: new Map(),
    start: startOf(frame.members.length),
    reductions: null,
  };
  const states: SolvedState[] = [];
  const ropes: RopeCount = { sum: 0 };
  let combination = -1;
  for (const planned of planStates(frame, settings)) {
    if (planned.combination !== combination) job.firsts.clear();
    combination = planned.combination;
    const found = ties.length === 0 ? alone(job, planned) : withTies(job, planned);
    if ('code' in found) return found;
    const rope = planned.order === 2 && ropeIn(job, planned, found, ropes);
    if (rope) return rope;
    const shape = shapeTrouble(job, found);
    if (shape) return stateFailure(frame, planned.name, planned.loadScale, planned.reduced, shape);
    states.push(found);
  }
  return { states, condition: worstCondition(job, states) };
}

/** Ropes under the forces found, and so many of them that their lines would fill the memory. */
function ropeIn({ frame }: SetJob, planned: PlannedState, { state }: SolvedState, ropes: RopeCount): Failure | null {
  const data = memberDataFor(frame, state.method);
  const rope = ropeAmong(frame, data, state.endForces, planned.loadScale, state.method?.slack ?? [], ropes);
  return rope && stateFailure(frame, planned.name, planned.loadScale, planned.reduced, { kind: 'rope', ...rope });
}

function alone(job: SetJob, planned: PlannedState): SetState | Failure {
  const result = analyseSet(job, planned, []);
  if (!result.ok) return stateFailure(job.frame, planned.name, planned.loadScale, planned.reduced, result.trouble);
  return withCritical(job, planned, result, []);
}

function withTies(job: SetJob, planned: PlannedState): SetState | Failure {
  const first = settled(job, { ...planned, order: 1, reduced: false }, []);
  if ('code' in first) return first;
  if (planned.order === 1 && !planned.reduced) return withCritical(job, planned, first.found, first.slack);
  // to second order from the set found to first order: thin ties that are pressed at first would buckle before they are let go
  const found = settled(job, planned, first.slack, first.iterations);
  return 'code' in found ? found : withCritical(job, planned, found.found, found.slack);
}

/** α_cr of strength combinations, once their slack ties are known. */
function withCritical(job: SetJob, planned: PlannedState, found: SetState, slack: readonly number[]): SetState {
  if (planned.purpose !== 'strength') return found;
  return { ...found, state: { ...found.state, criticalLoadFactor: criticalOf(job, planned.combination, slack) } };
}

/** One state, its ties settled from a first set. @param iterations passes made before */
function settled(
  job: SetJob,
  planned: PlannedState,
  start: readonly number[],
  iterations = 0,
): { readonly found: SetState; readonly slack: readonly number[]; readonly iterations: number } | Failure {
  const { frame, ties } = job;
  let trouble: StateTrouble | null = null;
  const result = settleTies<SetState>(
    ties,
    (slack) => {
      const trial = analyseSet(job, planned, slack);
      if (!trial.ok) {
        trouble = trial.trouble;
        const why = troubleWords(frame, planned.loadScale, planned.reduced, trouble);
        if (trouble.kind === 'free') return { ...trouble, ok: false, why };
        return { ok: false, why, caught: false, pulls: 'pulls' in trouble ? trouble.pulls : undefined };
      }
      // passes of sets that are left again count too
      iterations += trial.state.method?.iterations ?? 1;
      return { ok: true, solution: trial, ...tieForces(frame, trial.state, ties) };
    },
    start,
  );
  if (result.ok) {
    const { state, outOfBalance, handled, lengthening } = result.solution;
    const method = state.method && { ...state.method, iterations };
    return { found: { state: { ...state, method }, outOfBalance, handled, lengthening }, slack: result.slack, iterations };
  }
  if (typeof result.why === 'string') return tieFailure(frame, planned.name, { ...result, why: result.why });
  const kept: StateTrouble | null = trouble;
  if (kept !== null && (kept as StateTrouble).kind !== 'free')
    return stateFailure(frame, planned.name, planned.loadScale, planned.reduced, kept);
  return tieFailure(frame, planned.name, { ...result, why: result.why.trial });
}
