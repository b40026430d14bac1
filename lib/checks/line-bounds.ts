import { degreeM, degreeN, degreeV, headNumbers, ofM, ofN, ofV, segmentNumbers } from '@/lib/analysis/flat-line';

/** What N, V and M of a member stay within in size; used again by the next call. */
export interface LineBounds {
  N: number;
  V: number;
  M: number;
}

const bounds: LineBounds = { N: 0, V: 0, M: 0 };

/** Largest of t − tᵏ within 0 … 1: how far the k-th term leaves the straight line between its ends. */
const bulge = Float64Array.from({ length: 16 }, (_, k) => (k < 2 ? 0 : k ** (-1 / (k - 1)) - k ** (-k / (k - 1))));

/**
 * Bounds that cost less than peaks: the ends, and how far each term can leave the straight line between them.
 * @param line where the line begins in `lines`
 */
export function lineBounds(lines: Float64Array, line: number): LineBounds {
  let N = 0;
  let V = 0;
  let M = 0;
  for (let i = lines[line]!, s = line + headNumbers; i > 0; i--, s += segmentNumbers) {
    const h = lines[s + 1]! - lines[s]!;
    N = Math.max(N, bound(lines, s + ofN, lines[s + degreeN]!, h));
    V = Math.max(V, bound(lines, s + ofV, lines[s + degreeV]!, h));
    M = Math.max(M, bound(lines, s + ofM, lines[s + degreeM]!, h));
  }
  bounds.N = N;
  bounds.V = V;
  bounds.M = M;
  return bounds;
}

/** Value at s of the polynomial whose coefficients stand from `at` on. */
export function valueIn(lines: Float64Array, at: number, degree: number, s: number): number {
  let value = 0;
  for (let k = degree; k >= 0; k--) value = value * s + lines[at + k]!;
  return value;
}

/** What the polynomial whose coefficients stand from `at` on stays within in size from 0 to h. */
export function bound(lines: Float64Array, at: number, degree: number, h: number): number {
  const start = lines[at]!;
  let end = start;
  let off = 0;
  for (let k = 1, power = h; k <= degree; k++, power *= h) {
    const term = lines[at + k]! * power;
    end += term;
    if (k > 1) off += Math.abs(term) * bulge[k]!;
  }
  return Math.max(Math.abs(start), Math.abs(end)) + off;
}
