import type { MemberLine } from '@/lib/results/result';
import { evaluate } from './polynomial';

/** Internal forces and local displacements at one place of a member. */
export interface LineValue {
  readonly x: number;
  readonly N: number;
  readonly V: number;
  readonly M: number;
  readonly u: number;
  readonly v: number;
}

/**
 * Values at x, m from the member's start; at a point load `side` says on which side of its jump.
 * @throws {RangeError} where x is not within the member
 */
export function valueAt(line: MemberLine, x: number, side: 'before' | 'after' = 'after'): LineValue {
  if (!(x >= 0 && x <= line.length)) throw new RangeError(`Expected x from 0 to ${line.length}, got ${x}`);
  const { segments } = line;
  const near = 1e-12 * line.length;
  let i = 0;
  if (side === 'before') while (segments[i]!.to < x - near && i < segments.length - 1) i++;
  else {
    i = segments.length - 1;
    while (segments[i]!.from > x + near && i > 0) i--;
  }
  const segment = segments[i]!;
  const s = Math.min(Math.max(x - segment.from, 0), segment.to - segment.from);
  return {
    x,
    N: evaluate(segment.N, s),
    V: evaluate(segment.V, s),
    M: evaluate(segment.M, s),
    u: evaluate(segment.u, s),
    v: evaluate(segment.v, s),
  };
}
