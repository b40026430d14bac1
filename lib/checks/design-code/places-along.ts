import type { MemberLine, Polynomial } from '@/lib/results/result';
import { turningPoints } from '../peak';
import { valueAt } from '../polynomial';
import type { Place } from './demand';

/** Forces and moments below these sizes are what rounding leaves of zero. */
export interface Nothing {
  readonly force: number;
  readonly moment: number;
}

const turns = new Float64Array(32);
const at = new Float64Array(160);

/**
 * The places of a line where a cross-section can govern: both ends of every segment (one place where nothing jumps), where N,
 * V or M turns, and the positions in `also` (ascending). In order of x.
 */
export function placesAlong(line: MemberLine, also: readonly number[], nothing: Nothing): Place[] {
  const places: Place[] = [];
  const slack = 1e-9 * line.length;
  let next = 0;
  for (let i = 0; i < line.segments.length; i++) {
    const { from, to, N, V, M } = line.segments[i]!;
    const h = to - from;
    at[0] = 0;
    let count = 1;
    count = addTurns(M, h, count);
    count = addTurns(V, h, count);
    count = addTurns(N, h, count);
    while (next < also.length && also[next]! <= from + slack) next++;
    for (; next < also.length && also[next]! < to - slack; next++) count = insert(also[next]! - from, count);
    if (h > 0) at[count++] = h;
    for (let j = 0; j < count; j++) {
      const s = at[j]!;
      if (j > 0 && j < count - 1 && (s - at[j - 1]! <= slack || h - s <= slack)) continue;
      const n = real(valueAt(N, N.length - 1, s), nothing.force);
      const v = real(valueAt(V, V.length - 1, s), nothing.force);
      const m = real(valueAt(M, M.length - 1, s), nothing.moment);
      if (j === 0 && i > 0) {
        const before = places[places.length - 1]!;
        const same = near(before.N, n, nothing.force) && near(before.V, v, nothing.force) && near(before.M, m, nothing.moment);
        if (same) continue;
      }
      places.push({ x: from + s, N: n, V: v, M: m });
    }
  }
  return places;
}

const real = (value: number, nothing: number): number => (Math.abs(value) <= nothing ? 0 : value);
const near = (a: number, b: number, nothing: number): boolean =>
  Math.abs(a - b) <= nothing + 1e-9 * Math.max(Math.abs(a), Math.abs(b));

function addTurns(c: Polynomial, h: number, count: number): number {
  if (c.length <= 2) return count;
  const found = turningPoints(c, c.length - 1, h, turns);
  // the first is the start, the last the end
  for (let k = 1; k < found - 1; k++) count = insert(turns[k]!, count);
  return count;
}

/** Keeps the positions in order; returns how many there are. */
function insert(s: number, count: number): number {
  if (count >= at.length - 1) return count;
  let j = count;
  while (j > 1 && at[j - 1]! > s) {
    at[j] = at[j - 1]!;
    j--;
  }
  at[j] = s;
  return count + 1;
}
