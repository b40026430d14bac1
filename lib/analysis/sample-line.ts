import type { MemberLine } from '@/lib/results/result';
import { memberExtremes } from './member-extremes';
import { valueAt, type LineValue } from './value-at';

/**
 * Points of a member for drawing: n equal steps, with the extremes and both sides of every jump among them, in order of x.
 * A drawing joins them by straight lines; nothing is decided from them.
 */
export function sampleLine(line: MemberLine, n: number): LineValue[] {
  if (!(Number.isInteger(n) && n > 0)) throw new RangeError(`Expected n to be a whole number above zero, got ${n}`);
  const xs = new Set<number>();
  for (let i = 0; i < n; i++) xs.add((line.length * i) / n);
  // not (L n) / n, which may stand an ulp beyond the end
  xs.add(line.length);
  const { N, V, M, deflection } = memberExtremes(line);
  for (const { maxAt, minAt } of [N, V, M]) xs.add(maxAt).add(minAt);
  xs.add(deflection.at);
  const cuts = new Set(line.segments.flatMap((segment) => [segment.from, segment.to]));
  for (const x of cuts) xs.add(x);
  return [...xs]
    .sort((a, b) => a - b)
    .flatMap((x) => (cuts.has(x) ? [valueAt(line, x, 'before'), valueAt(line, x, 'after')] : [valueAt(line, x)]));
}
