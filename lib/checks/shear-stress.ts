import type { MemberLine } from '@/lib/results/result';
import { forcesAt, keep, noPeak, turningPoints, type Peak } from './peak';
import { valueAt } from './polynomial';

const points = new Float64Array(32);
const peak = noPeak();

/**
 * Largest shear stress in size along a member, Pa: τ = V/Av at its elastic peak over the depth. Exact, both sides of every
 * point force counted.
 * @param perAv 1/Av, 1/m²   @returns a record that the next call uses again
 */
export function peakShearStress(line: MemberLine, perAv: number): Peak {
  peak.value = -1;
  for (let i = 0; i < line.segments.length; i++) {
    const { V, from, to } = line.segments[i]!;
    let degree = Math.max(0, V.length - 1);
    while (degree > 0 && V[degree] === 0) degree--;
    const count = turningPoints(V, degree, to - from, points);
    for (let j = 0; j < count; j++) {
      const s = points[j]!;
      if (keep(peak, Math.abs(valueAt(V, degree, s)) * perAv, from + s)) forcesAt(peak, line, i, s);
    }
  }
  return peak;
}
