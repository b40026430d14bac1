import type { Extreme, MemberExtremes, MemberLine } from '@/lib/results/result';
import {
  degreeDeflection, degreeM, degreeN, degreeV, flattened, headNumbers, ofDeflection, ofM, ofN, ofV, segmentNumbers,
} from './flat-line'; // prettier-ignore
import { asked, cubic, rootsWithin, valueOf } from './polynomial';

/** Values this close, relative to the largest, are equal: the one nearest the start is named. */
const equal = 1e-9;

/** Numbers of one member in `writeExtremes`: max, maxAt, min, minAt of N, V and M, then deflection and where. */
export const extremeNumbers = 14;

/** Extremes of N, V, M over a member, and its largest departure from the line between its moved ends (README §3). */
export function memberExtremes(line: MemberLine): MemberExtremes {
  return readExtremes(writeExtremes(flattened(line), 0, new Float64Array(extremeNumbers), 0), 0);
}

/** The same numbers in a row, as they are stored. @param line where the member's line begins in `lines` @param at where in `out` they begin */
export function writeExtremes(lines: Float64Array, line: number, out: Float64Array, at: number): Float64Array {
  writeExtremeOf(lines, line, degreeN, ofN, out, at);
  writeExtremeOf(lines, line, degreeV, ofV, out, at + 4);
  writeExtremeOf(lines, line, degreeM, ofM, out, at + 8);
  writeDeparture(lines, line, out, at + 12);
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

const p = new Float64Array(16);
const slope = new Float64Array(16);
const roots = new Float64Array(16);

function writeExtremeOf(lines: Float64Array, line: number, degree: number, of: number, out: Float64Array, at: number): void {
  candidates = 0;
  const first = line + headNumbers;
  if (lines[line] === 1 && (lines[first + degree]! <= 2 || (lines[first + degree] === 3 && lines[first + of + 3] === 0))) {
    const o = first + of;
    const highest = lines[first + degree]!;
    writeShort(lines[o]!, highest > 0 ? lines[o + 1]! : 0, highest > 1 ? lines[o + 2]! : 0, lines[line + 1]!, out, at);
    return;
  }
  for (let i = lines[line]!, s = first; i > 0; i--, s += segmentNumbers) {
    const highest = lines[s + degree]!;
    for (let k = 0; k <= highest; k++) p[k] = lines[s + of + k]!;
    addCandidates(highest, lines[s]!, lines[s + 1]!);
  }
  writeExtreme(out, at);
}

/** Extremes of a + b s + c s² over the whole of a member of length h: both ends, and where it turns between them. */
function writeShort(a: number, b: number, c: number, h: number, out: Float64Array, at: number): void {
  const end = a + h * (b + h * c);
  let turn = 0;
  let there = a;
  if (c !== 0) {
    const root = -b / (2 * c);
    const largest = Math.max(Math.abs(a), Math.abs(b) * h, Math.abs(c) * h * h);
    if (root > 0 && root < h && Math.abs(2 * c) * h * h > 1e-13 * largest) {
      turn = root;
      there = a + root * (b + root * c);
    }
  }
  const max = Math.max(a, there, end);
  const min = Math.min(a, there, end);
  const near = equal * Math.max(Math.abs(max), Math.abs(min));
  out[at] = max;
  out[at + 1] = a >= max - near ? 0 : there >= max - near ? turn : h;
  out[at + 2] = min;
  out[at + 3] = a <= min + near ? 0 : there <= min + near ? turn : h;
}

/** Both ends of a segment (so both sides of jumps) and the roots of the derivative of `p` within it. */
function addCandidates(highest: number, from: number, to: number): void {
  if (candidates + 16 > xs.length) {
    [xs, values] = [longer(xs), longer(values)];
  }
  const s = to - from;
  xs[candidates] = from;
  values[candidates++] = p[0]!;
  if (s === 0) return;
  let degree = highest;
  while (degree > 1 && p[degree] === 0) degree--;
  if (degree === 2) {
    // the one turning point, where it is no rounding
    const root = -p[1]! / (2 * p[2]!);
    if (root > 0 && root < s && Math.abs(2 * p[2]!) * s * s > 1e-13 * largestTerm(degree, s)) {
      xs[candidates] = from + root;
      values[candidates++] = p[0]! + root * (p[1]! + root * p[2]!);
    }
  } else if (degree > 2) {
    const nothing = (1e-13 * largestTerm(degree, s)) / s;
    let count: number;
    if (degree === 4 && Math.abs(4 * p[4]!) * s * s * s > nothing) {
      for (let i = 0; i < 4; i++) asked[i] = (i + 1) * p[i + 1]!;
      asked[4] = s;
      asked[5] = nothing;
      count = cubic(roots);
    } else {
      for (let i = 1; i <= degree; i++) slope[i - 1] = i * p[i]!;
      count = rootsWithin(slope, degree - 1, s, nothing, roots);
    }
    for (let i = 0; i < count; i++) {
      const root = roots[i]!;
      xs[candidates] = from + root;
      values[candidates++] = valueOf(p, degree, root);
    }
  }
  xs[candidates] = to;
  values[candidates++] = valueOf(p, degree, s);
}

function largestTerm(degree: number, s: number): number {
  let largest = 0;
  let power = 1;
  for (let i = 0; i <= degree; i++, power *= s) {
    const size = Math.abs(p[i]!) * power;
    if (size > largest) largest = size;
  }
  return largest;
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
function writeDeparture(lines: Float64Array, line: number, out: Float64Array, at: number): void {
  if (lines[line] === 1 && writeEvenDeparture(lines, line, out, at)) return;
  const first = line + headNumbers;
  const past = first + lines[line]! * segmentNumbers;
  const length = lines[line + 1]!;
  const last = past - segmentNumbers;
  const h = lines[last + 1]! - lines[last]!;
  let v2 = 0;
  for (let k = lines[last + degreeDeflection]!; k >= 0; k--) v2 = v2 * h + lines[last + ofDeflection + k]!;
  const v1 = lines[first + ofDeflection]!;
  const turn = (v2 - v1) / length;
  candidates = 0;
  let size = 0;
  for (let s = first; s < past; s += segmentNumbers) {
    const degree = lines[s + degreeDeflection]!;
    for (let k = 0; k <= degree; k++) p[k] = lines[s + ofDeflection + k]!;
    const v = Math.abs(p[0]!);
    if (v > size) size = v;
    p[0] = p[0]! - v1 - turn * lines[s]!;
    if (degree > 0) p[1] = p[1]! - turn;
    addCandidates(degree, lines[s]!, lines[s + 1]!);
  }
  let largest = 0;
  for (let i = 0; i < candidates; i++) {
    const here = Math.abs(values[i]!);
    if (here > largest) largest = here;
  }
  out[at] = 0;
  out[at + 1] = 0;
  if (largest <= 1e-12 * size) return;
  let i = 0;
  while (Math.abs(values[i]!) < largest * (1 - equal)) i++;
  if (xs[i] === 0 || xs[i] === length) return;
  out[at] = values[i]!;
  out[at + 1] = xs[i]!;
}

/**
 * The same for a member of one segment under even loads, the commonest: of degree 4, and nought at the start.
 * @returns false where it is another one
 */
function writeEvenDeparture(lines: Float64Array, line: number, out: Float64Array, at: number): boolean {
  const first = line + headNumbers;
  const o = first + ofDeflection;
  const degree = lines[first + degreeDeflection]!;
  if (lines[first] !== 0 || (degree === 5 ? lines[o + 5] !== 0 : degree !== 4)) return false;
  const h = lines[first + 1]!;
  const v1 = lines[o]!;
  const p2 = lines[o + 2]!;
  const p3 = lines[o + 3]!;
  const p4 = lines[o + 4]!;
  const v2 = v1 + h * (lines[o + 1]! + h * (p2 + h * (p3 + h * p4)));
  const p1 = lines[o + 1]! - (v2 - v1) / h;
  const h2 = h * h;
  const h3 = h2 * h;
  const term = Math.max(Math.abs(p1) * h, Math.abs(p2) * h2, Math.abs(p3) * h3, Math.abs(p4) * (h3 * h));
  const nothing = (1e-13 * term) / h;
  if (!(Math.abs(4 * p4) * h * h * h > nothing)) return false;
  asked[0] = p1;
  asked[1] = 2 * p2;
  asked[2] = 3 * p3;
  asked[3] = 4 * p4;
  asked[4] = h;
  asked[5] = nothing;
  const count = cubic(roots);
  const end = Math.abs(h * (p1 + h * (p2 + h * (p3 + h * p4))));
  let largest = end;
  for (let i = 0; i < count; i++) {
    const x = roots[i]!;
    const here = x * (p1 + x * (p2 + x * (p3 + x * p4)));
    slope[i] = here;
    if (Math.abs(here) > largest) largest = Math.abs(here);
  }
  out[at] = 0;
  out[at + 1] = 0;
  if (largest <= 1e-12 * Math.abs(v1)) return true;
  const near = largest * (1 - equal);
  for (let i = 0; i < count; i++) {
    if (Math.abs(slope[i]!) < near) continue;
    out[at] = slope[i]!;
    out[at + 1] = roots[i]!;
    return true;
  }
  return true;
}
