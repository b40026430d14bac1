import type { Frame } from '@/lib/model/frame';
import type { Settings } from '@/lib/model/settings';
import type { Failure } from '@/lib/results/result';
import { analyseSet, type SetJob, type SetResult } from './analyse-set';
import type { SolvedState } from './certificate';
import { bucklingSpace } from './critical/critical-load-factor';
import { stateFailure, tieFailure, troubleWords } from './failures';
import type { SolvedCases } from './first-order-cases';
import { imperfectionForces } from './imperfections/imperfection-forces';
import { planStates, type PlannedState } from './plan-states';
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
    forces: imperfectionForces(frame, settings),
    firsts: new Map(),
    reductions: null,
  };
  const states: SolvedState[] = [];
  let combination = -1;
  for (const planned of planStates(frame, settings)) {
    if (planned.combination !== combination) job.firsts.clear();
    combination = planned.combination;
    const found = ties.length === 0 ? alone(job, planned) : withTies(job, planned);
    if ('code' in found) return found;
    states.push(found);
  }
  return { states, condition: worstCondition(job, states) };
}

function alone(job: SetJob, planned: PlannedState): SolvedState | Failure {
  const result = analyseSet(job, planned, []);
  return result.ok ? result : stateFailure(job.frame, planned.name, planned.loadScale, planned.reduced, result.trouble);
}

function withTies(job: SetJob, planned: PlannedState): SolvedState | Failure {
  const { frame, ties } = job;
  // passes of sets that were left again count too
  let iterations = 0;
  let failed: Extract<SetResult, { ok: false }> | null = null;
  const settled = settleTies(ties, (slack) => {
    const result = analyseSet(job, planned, slack);
    if (!result.ok) {
      failed = result;
      const { trouble } = result;
      const why = troubleWords(frame, planned.loadScale, planned.reduced, trouble);
      return { ok: false, why, caught: trouble.kind === 'free' && trouble.caught };
    }
    iterations += result.state.method?.iterations ?? 1;
    return { ok: true, solution: result, ...tieForces(frame, result.state, ties) };
  });
  if (settled.ok) {
    const { state, ...rest } = settled.solution;
    return { ...rest, state: { ...state, method: state.method && { ...state.method, iterations } } };
  }
  if (typeof settled.why === 'string') return tieFailure(frame, planned.name, settled.members, settled.why);
  if (settled.members.length === 0 && failed !== null) {
    const { trouble } = failed as Extract<SetResult, { ok: false }>;
    return stateFailure(frame, planned.name, planned.loadScale, planned.reduced, trouble);
  }
  return tieFailure(frame, planned.name, settled.members, settled.why.trial);
}
