import type { Frame } from '@/lib/model/frame';
import type { ResultState } from '@/lib/results/result';
import { evenNumbers, type EvenStretches } from './even-stretches';
import { headNumbers, ofDeflection, ofM, ofN, ofU, ofV, segmentNumbers, writeDegrees } from './flat-line';
import { memberDataFor, type MemberData } from './member-data';

/** Numbers of the line of a member along which nothing begins, ends or stands. */
export const evenLineNumbers = headNumbers + segmentNumbers;

/** Whether every even member's line in a state can be written by `writeEvenLines`. */
export const hasEvenLines = ({ order, method }: ResultState): boolean =>
  order === 1 && (method === null || method.slack.length === 0);

// q_x, its slope, q_y, its slope, free strain and curvature of the member at hand
const sums = new Float64Array(evenNumbers);

/**
 * Lines of all even members of a first-order state, one after another from `at` on: the figures of member-line.ts, for one
 * segment from the member's start. To be asked only where `hasEvenLines` says so.
 * @param begins by member, where its line begins; others stay as they are
 */
export function writeEvenLines(
  frame: Frame,
  state: ResultState,
  { even, acting }: EvenStretches,
  numbers: Float64Array,
  at: number,
  begins: number[],
): void {
  const data = memberDataFor(frame, state.method);
  let o = at;
  for (let i = 0; i < data.length; i++) {
    if (even[i] === 0) continue;
    writeEvenLine(state, i, data[i]!, acting, numbers, o);
    begins[i] = o;
    o += evenLineNumbers;
  }
}

/** The line of one of them. @param at where it begins in `numbers` */
export function writeEvenLine(
  { displacements, endForces, factors }: ResultState,
  member: number,
  m: MemberData,
  acting: Float64Array,
  numbers: Float64Array,
  at: number,
): void {
  sumEven(acting, evenNumbers * factors.length * member, factors);
  numbers[at] = 1;
  numbers[at + 1] = m.length;
  writeSegment(m, displacements, endForces, 6 * member, numbers, at + headNumbers);
}

/** What acts on an even member in a state, into `sums`. */
function sumEven(acting: Float64Array, from: number, factors: Float64Array): void {
  let x0 = 0;
  let x1 = 0;
  let y0 = 0;
  let y1 = 0;
  let e = 0;
  let c = 0;
  for (let i = 0, o = from; i < factors.length; i++, o += evenNumbers) {
    const k = factors[i]!;
    if (k === 0) continue;
    x0 += k * acting[o]!;
    x1 += k * acting[o + 1]!;
    y0 += k * acting[o + 2]!;
    y1 += k * acting[o + 3]!;
    e += k * acting[o + 4]!;
    c += k * acting[o + 5]!;
  }
  sums[0] = x0;
  sums[1] = x1;
  sums[2] = y0;
  sums[3] = y1;
  sums[4] = e;
  sums[5] = c;
}

/** The one segment of a line. @param e where the member's end forces begin @param o where the segment does */
function writeSegment(m: MemberData, d: Float64Array, endForces: Float64Array, e: number, out: Float64Array, o: number): void {
  const { EA, EI, GAv, cos, sin, length: L } = m;
  const a = 3 * m.start;
  const b = 3 * m.end;
  const v1 = -d[a]! * sin + d[a + 1]! * cos;
  const v2 = -d[b]! * sin + d[b + 1]! * cos;
  const N = endForces[e]!;
  const V = endForces[e + 1]!;
  const M = endForces[e + 2]!;
  const n1 = -sums[0]!;
  const n2 = -sums[1]! / 2;
  const w0 = sums[2]!;
  const w1 = sums[3]! / 2;
  const m2 = w0 / 2;
  const m3 = w1 / 3;
  let k0 = M / EI + sums[5]!;
  let k1 = V / EI;
  if (GAv !== Infinity) {
    k0 -= w0 / GAv;
    k1 -= sums[3]! / GAv;
  }
  k0 /= 2;
  k1 /= 6;
  const k2 = m2 / EI / 12;
  const k3 = m3 / EI;
  // turned as a whole, so that it meets the end's displacement
  const turn = (v2 - v1 - L * (L * (k0 + L * (k1 + L * (k2 + (L * k3) / 20))))) / L;
  out[o] = 0;
  out[o + 1] = L;
  writeDegrees(out, o, 2, 2, 3, 3, 5);
  out[o + ofN] = N;
  out[o + ofN + 1] = n1;
  out[o + ofN + 2] = n2;
  out[o + ofV] = V;
  out[o + ofV + 1] = w0;
  out[o + ofV + 2] = w1;
  out[o + ofM] = M;
  out[o + ofM + 1] = V;
  out[o + ofM + 2] = m2;
  out[o + ofM + 3] = m3;
  out[o + ofU] = d[a]! * cos + d[a + 1]! * sin;
  out[o + ofU + 1] = N / EA + sums[4]!;
  out[o + ofU + 2] = n1 / EA / 2;
  out[o + ofU + 3] = n2 / EA / 3;
  // + 0 makes −0 a 0
  out[o + ofDeflection] = v1 + 0;
  out[o + ofDeflection + 1] = turn + 0;
  out[o + ofDeflection + 2] = k0;
  out[o + ofDeflection + 3] = k1;
  out[o + ofDeflection + 4] = k2;
  out[o + ofDeflection + 5] = k3 / 20;
}
