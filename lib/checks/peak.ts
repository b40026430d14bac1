import { degreeM, degreeN, degreeV, ofM, ofN, ofV } from '@/lib/analysis/flat-line';
import { valueIn } from './line-bounds';
import { rootsWithin } from './polynomial';

/** Where something is largest in size along a member, and the internal forces there. */
export interface Peak {
  value: number;
  at: number;
  face: 'top' | 'bottom' | null;
  N: number;
  V: number;
  M: number;
}

export const noPeak = (): Peak => ({ value: -1, at: 0, face: null, N: 0, V: 0, M: 0 });

/** Two extremes within this part of each other are equal: the one at the smallest x counts (sheets §4). */
export const SAME = 1e-9;

const roots = new Float64Array(32);
const slope = new Float64Array(16);

/**
 * Writes the positions on a segment of length h where c₀ + c₁ s + … can be largest or smallest (start, roots of the
 * derivative, end; ascending) into `out` and returns how many.
 */
export function turningPoints(c: ArrayLike<number>, degree: number, h: number, out: Float64Array): number {
  out[0] = 0;
  let count = 1;
  if (degree === 2) {
    const s = -c[1]! / (2 * c[2]!);
    if (s > 0 && s < h) out[count++] = s;
  } else if (degree > 2) {
    for (let k = 1; k <= degree; k++) slope[k - 1] = k * c[k]!;
    const found = rootsWithin(slope, degree - 1, h, roots);
    for (let i = 0; i < found; i++) out[count++] = roots[i]!;
  }
  if (h > 0) out[count++] = h;
  return count;
}

/** Keeps the larger; of equal ones the one met first (positions ascend). */
export function keep(peak: Peak, value: number, at: number): boolean {
  if (!(value > peak.value * (1 + SAME) || peak.value < 0)) return false;
  peak.value = value;
  peak.at = at;
  return true;
}

/** The larger of the peaks of the two faces; of equal ones the smaller x, then the top. */
export function largerFace(top: Peak, bottom: Peak): Peak {
  if (bottom.value > top.value * (1 + SAME)) return bottom;
  if (top.value > bottom.value * (1 + SAME)) return top;
  return bottom.at < top.at - SAME * (1 + top.at) ? bottom : top;
}

/** N, V and M at the peak, from the segment that it stands on and that begins at `segment` of a row of numbers. */
export function forcesAt(peak: Peak, lines: Float64Array, segment: number, s: number): void {
  peak.N = valueIn(lines, segment + ofN, lines[segment + degreeN]!, s);
  peak.V = valueIn(lines, segment + ofV, lines[segment + degreeV]!, s);
  peak.M = valueIn(lines, segment + ofM, lines[segment + degreeM]!, s);
}
