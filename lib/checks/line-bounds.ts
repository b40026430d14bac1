import type { MemberLine, Polynomial } from '@/lib/results/result';

/** What N, V and M of a member stay within in size; used again by the next call. */
export interface LineBounds {
  N: number;
  V: number;
  M: number;
}

const bounds: LineBounds = { N: 0, V: 0, M: 0 };

/** Largest of t − tᵏ within 0 … 1: how far the k-th term leaves the straight line between its ends. */
const bulge = Float64Array.from({ length: 16 }, (_, k) => (k < 2 ? 0 : k ** (-1 / (k - 1)) - k ** (-k / (k - 1))));

/** Bounds that cost less than peaks: the ends, and how far each term can leave the straight line between them. */
export function lineBounds({ segments }: MemberLine): LineBounds {
  bounds.N = bounds.V = bounds.M = 0;
  for (let i = 0; i < segments.length; i++) {
    const { N, V, M, from, to } = segments[i]!;
    const h = to - from;
    bounds.N = Math.max(bounds.N, bound(N, h));
    bounds.V = Math.max(bounds.V, bound(V, h));
    bounds.M = Math.max(bounds.M, bound(M, h));
  }
  return bounds;
}

function bound(p: Polynomial, h: number): number {
  const start = p[0] ?? 0;
  let end = start;
  let off = 0;
  for (let k = 1, power = h; k < p.length; k++, power *= h) {
    const term = p[k]! * power;
    end += term;
    off += Math.abs(term) * (bulge[k] ?? 1);
  }
  return Math.max(Math.abs(start), Math.abs(end)) + off;
}
