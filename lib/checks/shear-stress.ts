import { degreeV, headNumbers, ofV, segmentNumbers } from '@/lib/analysis/flat-line';
import { valueIn } from './line-bounds';
import { forcesAt, isShort, keep, noPeak, peakOfShort, turningPoints, type Peak } from './peak';
import { valueAt } from './polynomial';

const shear = new Float64Array(16);
const points = new Float64Array(32);
const peak = noPeak();

/**
 * Largest shear stress in size along a member, Pa: τ = V/Av at its elastic peak over the depth. Exact, both sides of every
 * point force counted.
 * @param line where the line begins in `lines` (lib/analysis/flat-line.ts)
 * @param perAv 1/Av, 1/m²   @returns a record that the next call uses again
 */
export function peakShearStress(lines: Float64Array, line: number, perAv: number): Peak {
  if (isShort(lines, line)) {
    const o = line + headNumbers;
    const s = peakOfShort(lines[o + ofV]!, lines[o + ofV + 1]!, lines[o + ofV + 2]!, lines[o + 1]!);
    peak.value = Math.abs(valueIn(lines, o + ofV, 2, s)) * perAv;
    peak.at = s;
    forcesAt(peak, lines, o, s);
    return peak;
  }
  peak.value = -1;
  for (let i = lines[line]!, o = line + headNumbers; i > 0; i--, o += segmentNumbers) {
    const from = lines[o]!;
    let degree = lines[o + degreeV]!;
    for (let k = 0; k <= degree; k++) shear[k] = lines[o + ofV + k]!;
    while (degree > 0 && shear[degree] === 0) degree--;
    const count = turningPoints(shear, degree, lines[o + 1]! - from, points);
    for (let j = 0; j < count; j++) {
      const s = points[j]!;
      if (keep(peak, Math.abs(valueAt(shear, degree, s)) * perAv, from + s)) forcesAt(peak, lines, o, s);
    }
  }
  return peak;
}
