import type { ResultState } from '@/lib/results/result';
import type { SetJob } from './analyse-set';
import { assemble } from './assemble';
import type { SolvedState } from './certificate';
import { conditionEstimate, scaledNorm } from './condition';
import { factor } from './factor';

/**
 * The worst condition of the systems that gave results: K with all members, K without each set of slack ones, and under axial
 * forces α/(α − 1) times as much, α the critical load factor of the state (its weakest direction loses 1/α of its stiffness).
 */
export function worstCondition({ frame, t, solved }: SetJob, states: readonly SolvedState[]): number {
  const conditions = new Map<string, number>([['', solved.condition]]);
  let worst = solved.condition;
  for (const { state } of states) {
    const slack = state.method?.slack ?? [];
    const key = slack.join();
    let condition = conditions.get(key);
    if (condition === undefined) conditions.set(key, (condition = conditionWithout(slack)));
    worst = Math.max(worst, condition * loss(state));
  }
  return worst;

  function conditionWithout(slack: readonly number[]): number {
    const K = new Float64Array(9 * t.blocks);
    const data = solved.data.map((m, i) => (slack.includes(i) ? { ...m, EA: 0 } : m));
    assemble(K, t, frame, data, solved.angles);
    const norm = scaledNorm(K, t, solved.diagonal);
    const inner = new Float64Array(6 * t.size);
    factor(K, t, solved.diagonal, inner, new Float64Array(3 * t.size), 0);
    return conditionEstimate(K, t, inner, solved.diagonal, norm).condition;
  }
}

function loss({ order, criticalLoadFactor, method }: ResultState): number {
  if (order === 1 || criticalLoadFactor === null) return 1;
  const alpha = criticalLoadFactor / (method?.loadScale ?? 1);
  // reduced stiffness may stand a little below the factor of the unreduced
  return alpha > 1 ? alpha / (alpha - 1) : 1;
}
