import type { Extreme, MemberExtremes, MemberLine, Segment } from '@/lib/results/result';
import { evaluate, rootsWithin, valueOf } from './polynomial';

/** Values this close, relative to the largest, are equal: the one nearest the start is named. */
const equal = 1e-9;

/** Numbers of one member in `writeExtremes`: max, maxAt, min, minAt of N, V and M, then deflection and where. */
export const extremeNumbers = 14;

/** Extremes of N, V, M over a member, and its largest departure from the line between its moved ends (README §3). */
export function memberExtremes(line: MemberLine): MemberExtremes {
  return readExtremes(writeExtremes(line, new Float64Array(extremeNumbers), 0), 0);
}

/** The same numbers in a row, as they are stored. @param at where in `out` they begin */
export function writeExtremes(line: MemberLine, out: Float64Array, at: number): Float64Array {
  const { segments } = line;
  candidates = 0;
  for (let i = 0; i < segments.length; i++) addCandidates(segments[i]!.N, segments[i]!);
  writeExtreme(out, at);
  candidates = 0;
  for (let i = 0; i < segments.length; i++) addCandidates(segments[i]!.V, segments[i]!);
  writeExtreme(out, at + 4);
  candidates = 0;
  for (let i = 0; i < segments.length; i++) addCandidates(segments[i]!.M, segments[i]!);
  writeExtreme(out, at + 8);
  writeDeparture(line, out, at + 12);
  return out;
}

/** What `writeExtremes` wrote. */
export function readExtremes(numbers: Float64Array, at: number): MemberExtremes {
  const extreme = (i: number): Extreme => ({
    max: numbers[i]!,
    maxAt: numbers[i + 1]!,
    min: numbers[i + 2]!,
    minAt: numbers[i + 3]!,
  });
  return {
    N: extreme(at),
    V: extreme(at + 4),
    M: extreme(at + 8),
    deflection: { value: numbers[at + 12]!, at: numbers[at + 13]! },
  };
}

// places where a quantity can be extreme, ascending, and its values there
let xs: Float64Array = new Float64Array(64);
let values: Float64Array = new Float64Array(64);
let candidates = 0;

const slope = new Float64Array(8);
const roots = new Float64Array(8);
// the deflected line of a segment from its chord, by its number of terms (one where it has no length)
const departed = Array.from({ length: 10 }, (_, terms) => new Float64Array(terms));

/** Both ends of a segment (so both sides of jumps) and the roots of the derivative within it. */
function addCandidates(p: ArrayLike<number>, { from, to }: Segment): void {
  if (candidates + 16 > xs.length) {
    [xs, values] = [longer(xs), longer(values)];
  }
  const s = to - from;
  xs[candidates] = from;
  values[candidates++] = p[0]!;
  if (s === 0) return;
  let degree = p.length - 1;
  while (degree > 1 && p[degree] === 0) degree--;
  if (degree > 1) {
    let largest = 0;
    let power = 1;
    for (let i = 0; i <= degree; i++, power *= s) {
      const size = Math.abs(p[i]!) * power;
      if (size > largest) largest = size;
    }
    for (let i = 1; i <= degree; i++) slope[i - 1] = i * p[i]!;
    const count = rootsWithin(slope, degree - 1, s, (1e-13 * largest) / s, roots);
    for (let i = 0; i < count; i++) {
      const root = roots[i]!;
      xs[candidates] = from + root;
      values[candidates++] = valueOf(p, degree, root);
    }
  }
  xs[candidates] = to;
  values[candidates++] = valueOf(p, degree, s);
}

function longer(numbers: Float64Array): Float64Array {
  const more = new Float64Array(2 * numbers.length);
  more.set(numbers);
  return more;
}

function writeExtreme(out: Float64Array, at: number): void {
  let max = -Infinity;
  let min = Infinity;
  for (let i = 0; i < candidates; i++) {
    const value = values[i]!;
    if (value > max) max = value;
    if (value < min) min = value;
  }
  const near = equal * Math.max(Math.abs(max), Math.abs(min));
  let first = 0;
  while (values[first]! < max - near) first++;
  let last = 0;
  while (values[last]! > min + near) last++;
  out[at] = max;
  out[at + 1] = xs[first]!;
  out[at + 2] = min;
  out[at + 3] = xs[last]!;
}

/** Largest of |v − chord|: what stands at the ends is rounding, for they are on the chord by definition. */
function writeDeparture({ segments, length }: MemberLine, out: Float64Array, at: number): void {
  const end = segments[segments.length - 1]!;
  const v1 = segments[0]!.v[0]!;
  const turn = (evaluate(end.v, end.to - end.from) - v1) / length;
  candidates = 0;
  let size = 0;
  for (let k = 0; k < segments.length; k++) {
    const segment = segments[k]!;
    const { v } = segment;
    const p = departed[v.length]!;
    for (let i = 0; i < p.length; i++) p[i] = v[i]!;
    size = Math.max(size, Math.abs(p[0]!));
    p[0] = p[0]! - v1 - turn * segment.from;
    if (p.length > 1) p[1] = p[1]! - turn;
    addCandidates(p, segment);
  }
  let largest = 0;
  for (let i = 0; i < candidates; i++) largest = Math.max(largest, Math.abs(values[i]!));
  out[at] = 0;
  out[at + 1] = 0;
  if (largest <= 1e-12 * size) return;
  let i = 0;
  while (Math.abs(values[i]!) < largest * (1 - equal)) i++;
  if (xs[i] === 0 || xs[i] === length) return;
  out[at] = values[i]!;
  out[at + 1] = xs[i]!;
}
