import type { ResultState } from '@/lib/results/result';
import type { SetJob } from './analyse-set';
import { assemble } from './assemble';
import type { SolvedState } from './certificate';
import { conditionEstimate, scaledNorm } from './condition';
import { factor } from './factor';
import { memberDataFor } from './member-data';
import { secondOrderCondition } from './second-order/second-order-condition';

/**
 * The worst condition of the systems that gave results: K with all members, K without each set of slack ones, and K(N) of the
 * states whose axial forces take most of the stiffness: the one that is nearest to its critical load, and the one with most
 * compression in it (service states have no α_cr).
 */
export function worstCondition(job: SetJob, states: readonly SolvedState[]): number {
  const { frame, t, solved } = job;
  let worst = solved.condition;
  const done = new Set(['']);
  let nearest: ResultState | null = null;
  let pressed: ResultState | null = null;
  let least = Infinity;
  let most = 0;
  for (const { state } of states) {
    const slack = state.method?.slack ?? [];
    const key = slack.join();
    if (!done.has(key)) worst = Math.max(worst, conditionWithout(slack));
    done.add(key);
    if (state.order === 1) continue;
    const scale = state.method?.loadScale ?? 1;
    const alpha = (state.criticalLoadFactor ?? Infinity) / scale;
    if (alpha < least) [least, nearest] = [alpha, state];
    const compression = scale * compressionOf(state);
    if (compression > most) [most, pressed] = [compression, state];
  }
  for (const state of new Set([nearest, pressed])) if (state) worst = Math.max(worst, secondOrderCondition(inputOf(state)));
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

  function inputOf({ method, factors, endForces }: ResultState) {
    const slack = method?.slack ?? [];
    return {
      frame,
      t,
      angles: solved.angles,
      data: memberDataFor(frame, method),
      slack: slack.length > 0 ? Uint8Array.from(frame.members, (_, i) => (slack.includes(i) ? 1 : 0)) : null,
      factors,
      loadScale: method?.loadScale ?? 1,
      notional: null,
      guess: Float64Array.from(frame.members, (_, i) => endForces[6 * i]!),
      space: job.space,
    };
  }
}

function compressionOf({ endForces }: ResultState): number {
  let sum = 0;
  for (let i = 0; i < endForces.length; i += 6) sum += Math.max(0, -(endForces[i]! + endForces[i + 3]!));
  return sum;
}
