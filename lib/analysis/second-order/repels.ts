import { respond, type Work } from './equilibrium-pass';

/** Disturbances of the axial forces, against the largest. */
const disturbance = 1e-6;
const looks = 30;

/**
 * Whether axial forces that are disturbed run away from an equilibrium: some real eigenvalue of ∂(answer)/∂N is above 1, so that
 * the tangent stiffness K(N) + Σ (∂K/∂N d) (∂N/∂d)ᵀ has passed a singular point (a snap), though K(N) itself is positive
 * definite. By the power method, turned first so that what swings from side to side does not hide it.
 *
 * @param work at an equilibrium of `share` of its loads, N in its space; left as it was
 */
export function repels(work: Work, share: number): boolean {
  const { N, answer } = work.input.space;
  const at = N.slice();
  let largest = 0;
  for (let i = 0; i < N.length; i++) largest = Math.max(largest, Math.abs(at[i]!));
  if (!(largest > 0)) return false;
  const passes = work.passes;
  const step = disturbance * largest;
  respond(work);
  const still = answer.map((value) => share * value);
  // unlike numbers, so that no shape is left out
  const w = at.map((_, i) => 0.5 + ((0.618034 * i) % 1));
  const g = new Float64Array(N.length);
  /** g = G w + turn × w, scaled back into w. @returns growth along w, NaN where a disturbed frame does not stand */
  const look = (turn: number): number => {
    for (let i = 0; i < N.length; i++) N[i] = at[i]! + step * w[i]!;
    if (!respond(work)) return NaN;
    let along = 0;
    let size = 0;
    let most = 0;
    for (let i = 0; i < N.length; i++) {
      g[i] = (share * answer[i]! - still[i]!) / step + turn * w[i]!;
      along += g[i]! * w[i]!;
      size += w[i]! * w[i]!;
      most = Math.max(most, Math.abs(g[i]!));
    }
    if (!(most > 1e-9)) return 0;
    for (let i = 0; i < N.length; i++) w[i] = g[i]! / most;
    return along / size;
  };
  const growth = (turn: number): number => {
    let found = 0;
    for (let n = 0; n < looks; n++) {
      const before = found;
      found = look(turn);
      if (Number.isNaN(found) || found === 0 || (n > 3 && Math.abs(found - before) < 1e-4 * Math.abs(found))) break;
    }
    return found - turn;
  };
  let most = growth(0);
  if (most < -0.5) most = growth(-most);
  N.set(at);
  work.passes = passes;
  respond(work);
  work.passes = passes;
  // a frame that a millionth more of its axial forces brings down stands at its critical load
  return !(most < 1);
}
