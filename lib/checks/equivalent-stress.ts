import { degreeV, headNumbers, ofM, ofN, ofV, segmentNumbers } from '@/lib/analysis/flat-line';
import { faceStress } from './normal-stress';
import { valueIn } from './line-bounds';
import { forcesAt, isShort, keep, largerFace, noPeak, SAME, turningPoints, type Peak } from './peak';
import { valueAt } from './polynomial';

const sigma = new Float64Array(16);
const squared = new Float64Array(16);
const points = new Float64Array(32);
const peaks = [noPeak('top'), noPeak('bottom')] as const;

/**
 * Largest equivalent stress along a member, Pa: σ_v = √(σ² + 3τ²), σ the larger of the two faces in size, τ the elastic peak of
 * the same cross-section (on the safe side: they stand at different heights of it).
 *
 * Exact: looks at the ends, both sides of every load point, and the roots of the derivatives of σ_top² + 3τ² and
 * σ_bottom² + 3τ². These are looked for only where they can matter: not if the member's largest σ with its largest τ,
 * wherever they are, stays below what an end or an earlier combination has.
 * @param line where the line begins in `lines` (lib/analysis/flat-line.ts)
 * @param perA 1/A   @param perTop 1/W_top   @param perBottom 1/W_bottom   @param perAv 1/Av
 * @param bound √(σ_max² + 3 τ_max²) of the member in this combination, Pa
 * @param floor what another combination has already, Pa; a result below it need not be the exact peak
 * @returns a record that the next call uses again
 */
export function peakEquivalentStress(
  lines: Float64Array,
  line: number,
  perA: number,
  perTop: number,
  perBottom: number,
  perAv: number,
  bound: number,
  floor: number,
): Peak {
  const atEnds = isShort(lines, line)
    ? endsOfShort(lines, line + headNumbers, perA, perTop, perBottom, perAv)
    : scan(lines, line, perA, perTop, perBottom, perAv, false);
  if (bound <= Math.max(atEnds.value, floor) * (1 + SAME)) return atEnds;
  return scan(lines, line, perA, perTop, perBottom, perAv, true);
}

/** What `scan` finds at the ends of a short line (peak.ts) whose segment begins at `o`. */
function endsOfShort(lines: Float64Array, o: number, perA: number, perTop: number, perBottom: number, perAv: number): Peak {
  const h = lines[o + 1]!;
  const shear0 = lines[o + ofV]! * perAv;
  const shear1 = valueIn(lines, o + ofV, 2, h) * perAv;
  for (let f = 0; f < 2; f++) {
    const perW = f === 0 ? -perTop : perBottom;
    const c0 = lines[o + ofN]! * perA + lines[o + ofM]! * perW;
    const c1 = lines[o + ofN + 1]! * perA + lines[o + ofM + 1]! * perW;
    const c2 = lines[o + ofN + 2]! * perA + lines[o + ofM + 2]! * perW;
    const c3 = (c2 * h + c1) * h + c0;
    const start = Math.sqrt(c0 * c0 + 3 * shear0 * shear0);
    const end = Math.sqrt(c3 * c3 + 3 * shear1 * shear1);
    const peak = peaks[f]!;
    const later = end > start * (1 + SAME);
    peak.value = later ? end : start;
    peak.at = later ? h : 0;
    forcesAt(peak, lines, o, peak.at);
  }
  return largerFace(peaks[0], peaks[1]);
}

function scan(
  lines: Float64Array,
  line: number,
  perA: number,
  perTop: number,
  perBottom: number,
  perAv: number,
  inside: boolean,
): Peak {
  for (let f = 0; f < 2; f++) {
    const perW = f === 0 ? -perTop : perBottom;
    const peak = peaks[f]!;
    peak.value = -1;
    for (let i = lines[line]!, o = line + headNumbers; i > 0; i--, o += segmentNumbers) {
      const from = lines[o]!;
      const h = lines[o + 1]! - from;
      const degree = faceStress(lines, o, perA, perW, sigma);
      let count: number;
      if (inside) count = turningPoints(squared, squareOf(degree, lines, o, perAv), h, points);
      else {
        points[0] = 0;
        points[1] = h;
        count = h > 0 ? 2 : 1;
      }
      for (let j = 0; j < count; j++) {
        const s = points[j]!;
        const stress = valueAt(sigma, degree, s);
        const shear = valueIn(lines, o + ofV, lines[o + degreeV]!, s) * perAv;
        if (keep(peak, Math.sqrt(stress * stress + 3 * shear * shear), from + s)) forcesAt(peak, lines, o, s);
      }
    }
  }
  return largerFace(peaks[0], peaks[1]);
}

/** Coefficients of σ² + 3τ² into `squared`; returns the degree. */
function squareOf(degree: number, lines: Float64Array, o: number, perAv: number): number {
  const shearDegree = lines[o + degreeV]!;
  const top = 2 * Math.max(degree, shearDegree);
  squared.fill(0, 0, top + 1);
  for (let a = 0; a <= degree; a++) for (let b = 0; b <= degree; b++) squared[a + b] = squared[a + b]! + sigma[a]! * sigma[b]!;
  const scale = 3 * perAv * perAv;
  for (let a = 0; a <= shearDegree; a++)
    for (let b = 0; b <= shearDegree; b++) squared[a + b] = squared[a + b]! + scale * lines[o + ofV + a]! * lines[o + ofV + b]!;
  return top;
}
