import { degreeM, degreeN, degreeV, headNumbers, ofM, ofN, ofV } from '@/lib/analysis/flat-line';
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

export const noPeak = (face: Peak['face'] = null): Peak => ({ value: -1, at: 0, face, N: 0, V: 0, M: 0 });

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

/**
 * Whether the segment at `o` is all of a member's line, from its start, and N, V and M change no faster than s²: members under
 * even loads, the commonest, whose peaks need no loops over coefficients.
 */
export function isShort(lines: Float64Array, line: number): boolean {
  const o = line + headNumbers;
  if (lines[line] !== 1 || lines[o] !== 0 || lines[o + degreeN] !== 2 || lines[o + degreeV] !== 2) return false;
  return lines[o + degreeM] === 3 && lines[o + ofM + 3] === 0;
}

/** Where c₀ + c₁ s + c₂ s² is largest in size from 0 to h; of equal places the first, as `keep` does. */
export function peakOfShort(c0: number, c1: number, c2: number, h: number): number {
  let largest = Math.abs(c0);
  let at = 0;
  const turn = c2 === 0 ? 0 : -c1 / (2 * c2);
  if (turn > 0 && turn < h) {
    const there = Math.abs((c2 * turn + c1) * turn + c0);
    if (there > largest * (1 + SAME)) {
      largest = there;
      at = turn;
    }
  }
  return Math.abs((c2 * h + c1) * h + c0) > largest * (1 + SAME) ? h : at;
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
