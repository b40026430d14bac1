import type { Setup } from './second-setup';

/**
 * Factors on EA and EI by member under the forces found (AISC 360-22 C2.3): 0.8, and 0.8 τ_b with
 * τ_b = 4 (αP/P_ns)(1 − αP/P_ns) above half of the squash load A fy. Ties have no τ_b.
 *
 * @param alpha what makes the forces as analysed αP
 */
export function reducedUnder({ members }: Setup, endForces: ArrayLike<number>, alpha: number): Float64Array {
  return Float64Array.from({ length: 2 * members.length }, (_, k) => {
    const i = Math.floor(k / 2);
    const { squash, tensionOnly } = members[i]!;
    const share = (-alpha * Math.min(endForces[6 * i]!, endForces[6 * i + 3]!)) / squash;
    if (k % 2 === 0 || tensionOnly || share <= 0.5) return 0.8;
    return 3.2 * share * (1 - share);
  });
}
