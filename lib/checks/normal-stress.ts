import type { MemberLine } from '@/lib/results/result';
import { forcesAt, keep, largerFace, noPeak, turningPoints, type Peak } from './peak';
import { valueAt } from './polynomial';

const sigma = new Float64Array(16);
const points = new Float64Array(32);
const peaks = [noPeak(), noPeak()] as const;

/**
 * Largest normal stress in size along a member, Pa: σ_top = N/A − M/W_top, σ_bottom = N/A + M/W_bottom, tension positive.
 *
 * Exact: looks at the ends, both sides of every load point, and the roots of the derivatives of both polynomials.
 * @param perA 1/A, 1/m²   @param perTop 1/W_top, 1/m³   @param perBottom 1/W_bottom, 1/m³ (0 where M is nil)
 * @returns a record that the next call uses again
 */
export function peakNormalStress(line: MemberLine, perA: number, perTop: number, perBottom: number): Peak {
  for (let f = 0; f < 2; f++) {
    const perW = f === 0 ? -perTop : perBottom;
    const peak = peaks[f]!;
    peak.value = -1;
    peak.face = f === 0 ? 'top' : 'bottom';
    for (let i = 0; i < line.segments.length; i++) {
      const { N, M, from, to } = line.segments[i]!;
      const degree = faceStress(N, M, perA, perW, sigma);
      const count = turningPoints(sigma, degree, to - from, points);
      for (let j = 0; j < count; j++) {
        const s = points[j]!;
        if (keep(peak, Math.abs(valueAt(sigma, degree, s)), from + s)) forcesAt(peak, line, i, s);
      }
    }
  }
  return largerFace(peaks[0], peaks[1]);
}

/** Coefficients of N/A + M·perW into `out`; returns the degree. */
export function faceStress(N: readonly number[], M: readonly number[], perA: number, perW: number, out: Float64Array): number {
  const terms = Math.max(N.length, M.length, 1);
  for (let k = 0; k < terms; k++) out[k] = (N[k] ?? 0) * perA + (M[k] ?? 0) * perW;
  let degree = terms - 1;
  while (degree > 0 && out[degree] === 0) degree--;
  return degree;
}
