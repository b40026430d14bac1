import type { Extreme, MemberExtremes, MemberLine, Polynomial, Segment } from '@/lib/results/result';
import { derivative, evaluate, rootsWithin } from './polynomial';

/** Values this close, relative to the largest, are equal: the one nearest the start is named. */
const equal = 1e-9;

/** Extremes of N, V, M over a member, and its largest departure from the line between its moved ends (README §3). */
export function memberExtremes(line: MemberLine): MemberExtremes {
  return {
    N: extremeOf(line, (segment) => segment.N),
    V: extremeOf(line, (segment) => segment.V),
    M: extremeOf(line, (segment) => segment.M),
    deflection: departure(line),
  };
}

/** Candidates: both ends of every segment (both sides of jumps) and the roots of the derivative. Ascending in x. */
function candidates(line: MemberLine, pick: (segment: Segment) => Polynomial): { xs: number[]; values: number[] } {
  const xs: number[] = [];
  const values: number[] = [];
  for (const segment of line.segments) {
    const p = pick(segment);
    const s = segment.to - segment.from;
    xs.push(segment.from);
    values.push(evaluate(p, 0));
    if (s === 0) continue;
    const largest = p.reduce((most, c, i) => Math.max(most, Math.abs(c) * s ** i), 0);
    for (const root of rootsWithin(derivative(p), s, (1e-13 * largest) / s)) {
      xs.push(segment.from + root);
      values.push(evaluate(p, root));
    }
    xs.push(segment.to);
    values.push(evaluate(p, s));
  }
  return { xs, values };
}

function extremeOf(line: MemberLine, pick: (segment: Segment) => Polynomial): Extreme {
  const { xs, values } = candidates(line, pick);
  let max = -Infinity;
  let min = Infinity;
  for (const value of values) {
    if (value > max) max = value;
    if (value < min) min = value;
  }
  const near = equal * Math.max(Math.abs(max), Math.abs(min));
  const maxAt = xs[values.findIndex((value) => value >= max - near)]!;
  const minAt = xs[values.findIndex((value) => value <= min + near)]!;
  return { max, maxAt, min, minAt };
}

/** v less the chord between the moved ends, as a polynomial of each segment. */
export function departureLine(line: MemberLine): MemberLine {
  const first = line.segments[0]!;
  const last = line.segments[line.segments.length - 1]!;
  const v1 = evaluate(first.v, 0);
  const v2 = evaluate(last.v, last.to - last.from);
  const turn = (v2 - v1) / line.length;
  return {
    length: line.length,
    segments: line.segments.map((segment) => {
      const v = [...segment.v];
      v[0] = v[0]! - v1 - turn * segment.from;
      if (v.length > 1) v[1] = v[1]! - turn;
      return { ...segment, v };
    }),
  };
}

function departure(line: MemberLine): { value: number; at: number } {
  const { xs, values } = candidates(departureLine(line), (segment) => segment.v);
  const largest = values.reduce((most, value) => Math.max(most, Math.abs(value)), 0);
  const i = values.findIndex((value) => Math.abs(value) >= largest * (1 - equal));
  // the ends are on the chord by definition: what is there is rounding
  const x = xs[i]!;
  if (x === 0 || x === line.length) return { value: 0, at: 0 };
  return { value: values[i]!, at: x };
}
