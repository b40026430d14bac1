import type { Extreme, MemberExtremes, MemberLine, Polynomial } from '@/lib/results/result';
import { derivative, evaluate, rootsWithin } from './polynomial';

/** Values this close, relative to the largest, are equal: the one nearest the start is named. */
const equal = 1e-9;

/** Extremes of N, V, M over a member, and its largest departure from the line between its moved ends (README §3). */
export function memberExtremes(line: MemberLine): MemberExtremes {
  return { N: extremeOf(line, 'N'), V: extremeOf(line, 'V'), M: extremeOf(line, 'M'), deflection: departure(line) };
}

/** Places where a quantity can be extreme, ascending, and its values there. */
interface Candidates {
  readonly xs: number[];
  readonly values: number[];
}

/** Both ends of a segment (so both sides of jumps) and the roots of the derivative within it. */
function addCandidates(p: Polynomial, from: number, to: number, { xs, values }: Candidates): void {
  const s = to - from;
  xs.push(from);
  values.push(p[0]!);
  if (s === 0) return;
  if (p.length > 2) {
    let largest = 0;
    let power = 1;
    for (let i = 0; i < p.length; i++, power *= s) largest = Math.max(largest, Math.abs(p[i]!) * power);
    for (const root of rootsWithin(derivative(p), s, (1e-13 * largest) / s)) {
      xs.push(from + root);
      values.push(evaluate(p, root));
    }
  }
  xs.push(to);
  values.push(evaluate(p, s));
}

function extremeOf(line: MemberLine, quantity: 'N' | 'V' | 'M'): Extreme {
  const found: Candidates = { xs: [], values: [] };
  for (const segment of line.segments) addCandidates(segment[quantity], segment.from, segment.to, found);
  const { xs, values } = found;
  let max = -Infinity;
  let min = Infinity;
  for (const value of values) {
    if (value > max) max = value;
    if (value < min) min = value;
  }
  const near = equal * Math.max(Math.abs(max), Math.abs(min));
  let first = 0;
  while (values[first]! < max - near) first++;
  let last = 0;
  while (values[last]! > min + near) last++;
  return { max, maxAt: xs[first]!, min, minAt: xs[last]! };
}

/** Largest of |v − chord|: what stands at the ends is rounding, for they are on the chord by definition. */
function departure(line: MemberLine): { value: number; at: number } {
  const { segments, length } = line;
  const end = segments[segments.length - 1]!;
  const v1 = segments[0]!.v[0]!;
  const turn = (evaluate(end.v, end.to - end.from) - v1) / length;
  const found: Candidates = { xs: [], values: [] };
  let moved = 0;
  for (const { v, from, to } of segments) {
    const p = v.slice();
    moved = Math.max(moved, Math.abs(p[0]!));
    p[0] = p[0]! - v1 - turn * from;
    if (p.length > 1) p[1] = p[1]! - turn;
    addCandidates(p, from, to, found);
  }
  const { xs, values } = found;
  let largest = 0;
  for (const value of values) largest = Math.max(largest, Math.abs(value));
  if (largest <= 1e-12 * moved) return { value: 0, at: 0 };
  let i = 0;
  while (Math.abs(values[i]!) < largest * (1 - equal)) i++;
  if (xs[i] === 0 || xs[i] === length) return { value: 0, at: 0 };
  return { value: values[i]!, at: xs[i]! };
}
