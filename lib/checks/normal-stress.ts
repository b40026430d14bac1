import { degreeM, degreeN, headNumbers, ofM, ofN, segmentNumbers } from '@/lib/analysis/flat-line';
import { forcesAt, isShort, keep, largerFace, noPeak, peakOfShort, turningPoints, type Peak } from './peak';
import { valueAt } from './polynomial';

const sigma = new Float64Array(16);
const points = new Float64Array(32);
const peaks = [noPeak('top'), noPeak('bottom')] as const;

/**
 * Largest normal stress in size along a member, Pa: σ_top = N/A − M/W_top, σ_bottom = N/A + M/W_bottom, tension positive.
 *
 * Exact: looks at the ends, both sides of every load point, and the roots of the derivatives of both polynomials.
 * @param line where the line begins in `lines` (lib/analysis/flat-line.ts)
 * @param perA 1/A, 1/m²   @param perTop 1/W_top, 1/m³   @param perBottom 1/W_bottom, 1/m³ (0 where M is nil)
 * @returns a record that the next call uses again
 */
export function peakNormalStress(lines: Float64Array, line: number, perA: number, perTop: number, perBottom: number): Peak {
  if (isShort(lines, line)) {
    peakOfFace(lines, line + headNumbers, perA, -perTop, peaks[0]);
    peakOfFace(lines, line + headNumbers, perA, perBottom, peaks[1]);
    return largerFace(peaks[0], peaks[1]);
  }
  for (let f = 0; f < 2; f++) {
    const perW = f === 0 ? -perTop : perBottom;
    const peak = peaks[f]!;
    peak.value = -1;
    for (let i = lines[line]!, o = line + headNumbers; i > 0; i--, o += segmentNumbers) {
      const from = lines[o]!;
      const degree = faceStress(lines, o, perA, perW, sigma);
      const count = turningPoints(sigma, degree, lines[o + 1]! - from, points);
      for (let j = 0; j < count; j++) {
        const s = points[j]!;
        if (keep(peak, Math.abs(valueAt(sigma, degree, s)), from + s)) forcesAt(peak, lines, o, s);
      }
    }
  }
  return largerFace(peaks[0], peaks[1]);
}

/** The same on one face of a short line (peak.ts) whose segment begins at `o`. */
function peakOfFace(lines: Float64Array, o: number, perA: number, perW: number, peak: Peak): void {
  const h = lines[o + 1]!;
  const c0 = lines[o + ofN]! * perA + lines[o + ofM]! * perW;
  const c1 = lines[o + ofN + 1]! * perA + lines[o + ofM + 1]! * perW;
  const c2 = lines[o + ofN + 2]! * perA + lines[o + ofM + 2]! * perW;
  const s = peakOfShort(c0, c1, c2, h);
  peak.value = Math.abs((c2 * s + c1) * s + c0);
  peak.at = s;
  forcesAt(peak, lines, o, s);
}

/** Coefficients of N/A + M·perW along the segment that begins at `o` into `out`; returns the degree. */
export function faceStress(lines: Float64Array, o: number, perA: number, perW: number, out: Float64Array): number {
  const axial = lines[o + degreeN]!;
  const bent = lines[o + degreeM]!;
  let degree = Math.max(axial, bent);
  for (let k = 0; k <= degree; k++)
    out[k] = (k <= axial ? lines[o + ofN + k]! : 0) * perA + (k <= bent ? lines[o + ofM + k]! : 0) * perW;
  while (degree > 0 && out[degree] === 0) degree--;
  return degree;
}
