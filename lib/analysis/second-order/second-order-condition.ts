import { conditionEstimate } from '../condition';
import { prepare, respond } from './equilibrium-pass';
import type { SecondOrderInput } from './solve-second-order';

/**
 * 1-norm condition estimate of K(N) scaled to its own unit diagonal, N the `guess` × `loadScale` of the input: of the system
 * that a state's movements were last solved from, where they are its axial forces. Infinity where it is not positive definite.
 */
export function secondOrderCondition(input: SecondOrderInput): number {
  const work = prepare(input, 2);
  const { N, K, inner, diagonal } = input.space;
  for (let i = 0; i < N.length; i++) N[i] = (input.guess?.[i] ?? 0) * input.loadScale;
  work.norm = 0;
  if (!respond(work)) return Infinity;
  return conditionEstimate(K, input.t, inner, diagonal, work.norm).condition;
}
