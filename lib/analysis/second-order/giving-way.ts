import { solve } from '../solve';
import { respond, type Work } from './equilibrium-pass';

const rounds = 6;

/**
 * The movement that costs least at the last load share at which the frame stood, by inverse iteration, to the side that it leans
 * to under its loads there: how it gives way beyond. 3 a node, along node axes, the largest 1.
 *
 * @param work N in its space as the share has them
 */
export function givingWay(work: Work, share: number): Float64Array {
  const { t, space } = work.input;
  work.share = share;
  const movement = new Float64Array(space.all.length);
  if (!respond(work)) return movement;
  const leaning = space.all.slice();
  const n = 3 * t.size;
  // unlike numbers, so that no shape is left out
  const z = Float64Array.from({ length: n }, (_, i) => 0.5 + ((0.618034 * i) % 1));
  for (let round = 0; round < rounds; round++) {
    for (let p = 0; p < t.size; p++)
      for (let r = 0; r < 3; r++) z[3 * p + r] = t.free[3 * t.nodeAt[p]! + r] ? z[3 * p + r]! * space.diagonal[3 * p + r]! : 0;
    solve(space.K, t, space.inner, z, 1);
    let most = 0;
    for (let p = 0; p < t.size; p++) for (let r = 0; r < 2; r++) most = Math.max(most, Math.abs(z[3 * p + r]!));
    for (let i = 0; i < n; i++) z[i] = z[i]! / (most || 1);
  }
  let along = 0;
  for (let p = 0; p < t.size; p++) for (let r = 0; r < 2; r++) along += z[3 * p + r]! * leaning[3 * t.nodeAt[p]! + r]!;
  for (let p = 0; p < t.size; p++)
    for (let r = 0; r < 3; r++)
      if (t.free[3 * t.nodeAt[p]! + r]) movement[3 * t.nodeAt[p]! + r] = along < 0 ? -z[3 * p + r]! : z[3 * p + r]!;
  return movement;
}
