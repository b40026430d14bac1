import type { Frame } from '@/lib/model/frame';
import type { MemberLine, ResultState } from '@/lib/results/result';
import { writeEvenLine } from './even-lines';
import { evenStretches } from './even-stretches';
import { headNumbers, lineFrom, ofDeflection, ofM, ofN, ofU, ofV, segmentNumbers, writeDegrees } from './flat-line';
import { memberDataFor, type MemberData } from './member-data';
import { stretchesOf } from './member-stretches';
import { secondOrderLine } from './second-order/second-order-line';

// what acts on each stretch in the state at hand, and which of the member's places divide it
let room = 16;
let [qx0, qx1, qy0, qy1, Px, Py, M0] = numbers();
let divides = new Uint8Array(room);
let jumps = new Uint8Array(room);

function numbers() {
  const row = (): Float64Array => new Float64Array(room);
  return [row(), row(), row(), row(), row(), row(), row()] as const;
}

function makeRoom(places: number): void {
  if (places > room) {
    room = 2 * places;
    [qx0, qx1, qy0, qy1, Px, Py, M0] = numbers();
    divides = new Uint8Array(room);
    jumps = new Uint8Array(room);
  }
  for (let i = 0; i < places; i++) {
    qx0[i] = qx1[i] = qy0[i] = qy1[i] = Px[i] = Py[i] = M0[i] = 0;
    divides[i] = jumps[i] = 0;
  }
}

/** Where a line is written to: `room` for so many segments, then into `numbers` from there on. */
export interface LineRoom {
  readonly numbers: Float64Array;
  room(segments: number): number;
}

// one line's room, for `memberLine`
const scratch = {
  numbers: new Float64Array(headNumbers + 8 * segmentNumbers),
  room(segments: number): number {
    const size = headNumbers + segments * segmentNumbers;
    if (size > this.numbers.length) this.numbers = new Float64Array(2 * size);
    return 0;
  },
};

/**
 * Internal forces and deflected line of a member, exactly: polynomials between load points, from the forces at its
 * start and the loads along it (README §3).
 *
 * dN/dx = −q_x, dV/dx = q_y, dM/dx = V; u′ = N/EA + ε₀, v″ = M/EI + κ₀ − (V/GAv)′, with v at both ends and u at the start
 * given by the nodes. A point load stands between two segments; one exactly at an end stands beside a segment of no length
 * there, so that both sides of its jump count.
 */
export function memberLine(frame: Frame, state: ResultState, member: number): MemberLine {
  writeMemberLine(frame, state, member, scratch);
  return lineFrom(scratch.numbers, 0);
}

/** The same as a row of numbers (flat-line.ts). */
export function writeMemberLine(frame: Frame, state: ResultState, member: number, into: LineRoom): void {
  const m = memberDataFor(frame, state.method)[member]!;
  if (state.method?.slack.includes(member)) slackLine(m, state, into);
  else if (state.order === 2) secondOrderLine(frame, state, member, m, into);
  else firstOrderLine(frame, state, member, m, into);
}

/** Forces and movements where the next stretch begins: N, V, M, u, v, v′. In an array, for numbers kept by a module cost memory. */
const now = new Float64Array(6);
/** Sums over the cases: free strain and curvature. */
const free = new Float64Array(2);

function firstOrderLine(frame: Frame, state: ResultState, member: number, m: MemberData, into: LineRoom): void {
  const { even, acting } = evenStretches(frame);
  if (even[member]) {
    const at = into.room(1);
    return writeEvenLine(state, member, m, acting, into.numbers, at);
  }
  const d = state.displacements;
  const a = 3 * m.start;
  const b = 3 * m.end;
  const v1 = -d[a]! * m.sin + d[a + 1]! * m.cos;
  const v2 = -d[b]! * m.sin + d[b + 1]! * m.cos;
  const e = 6 * member;
  now[0] = state.endForces[e]!;
  now[1] = state.endForces[e + 1]!;
  now[2] = state.endForces[e + 2]!;
  now[3] = d[a]! * m.cos + d[a + 1]! * m.sin;
  now[4] = 0;
  now[5] = 0;
  const last = sumUneven(frame, member, state.factors);
  const at = into.room(last + 2);
  const count = uneven(m, stretchesOf(frame, member).places, last, into.numbers, at + headNumbers);
  const { numbers } = into;
  numbers[at] = count;
  numbers[at + 1] = m.length;
  // turned as a whole, so that it meets the end's displacement
  const turn = (v2 - v1 - now[4]!) / m.length;
  for (let i = 0, s = at + headNumbers; i < count; i++, s += segmentNumbers) {
    const o = s + ofDeflection;
    numbers[o] = numbers[o]! + v1 + turn * numbers[s]!;
    if (numbers[s + 1]! > numbers[s]!) numbers[o + 1] = numbers[o + 1]! + turn;
  }
}

/** What acts at each of a member's places and on the stretches after them. @returns the last place */
function sumUneven(frame: Frame, member: number, factors: Float64Array): number {
  const { places, cases } = stretchesOf(frame, member);
  const last = places.length - 1;
  makeRoom(places.length);
  let strain = 0;
  let curvature = 0;
  for (let c = 0; c < cases.length; c++) {
    const k = factors[c]!;
    const acting = k === 0 ? undefined : cases[c];
    if (!acting) continue;
    for (let i = 0; i <= last; i++) {
      if (acting.divides[i]) divides[i] = 1;
      const o = 4 * i;
      qx0[i] = qx0[i]! + k * acting.lines[o]!;
      qx1[i] = qx1[i]! + k * acting.lines[o + 1]!;
      qy0[i] = qy0[i]! + k * acting.lines[o + 2]!;
      qy1[i] = qy1[i]! + k * acting.lines[o + 3]!;
    }
    if (acting.jumps)
      for (let i = 0; i <= last; i++) {
        if (!acting.jumps[i]) continue;
        jumps[i] = 1;
        Px[i] = Px[i]! + k * acting.Px[i]!;
        Py[i] = Py[i]! + k * acting.Py[i]!;
        M0[i] = M0[i]! + k * acting.M[i]!;
      }
    strain += k * acting.strain;
    curvature += k * acting.curvature;
  }
  free[0] = strain;
  free[1] = curvature;
  return last;
}

/** Segment after segment. @returns how many */
function uneven(m: MemberData, places: Float64Array, last: number, out: Float64Array, from: number): number {
  let s = from;
  if (jumps[0]) {
    flat(0, out, s);
    s += segmentNumbers;
  }
  let i = 0;
  while (i < last) {
    if (jumps[i]) {
      jump(i);
      if (m.GAv !== Infinity) now[5] = now[5]! - Py[i]! / m.GAv;
    }
    // a place that nothing of this state begins, ends or stands at divides nothing
    let to = i + 1;
    while (to < last && !divides[to]) to++;
    stretch(m, places[i]!, places[to]!, qx0[i]!, qx1[i]!, qy0[i]!, qy1[i]!, out, s);
    s += segmentNumbers;
    i = to;
  }
  if (jumps[last]) {
    jump(last);
    flat(m.length, out, s);
    s += segmentNumbers;
  }
  return (s - from) / segmentNumbers;
}

function jump(place: number): void {
  now[0] = now[0]! - Px[place]!;
  now[1] = now[1]! + Py[place]!;
  now[2] = now[2]! - M0[place]!;
}

/** A segment of no length. */
function flat(x: number, out: Float64Array, s: number): void {
  out[s] = out[s + 1] = x;
  writeDegrees(out, s, 0, 0, 0, 0, 0);
  out[s + ofN] = now[0]!;
  out[s + ofV] = now[1]!;
  out[s + ofM] = now[2]!;
  out[s + ofU] = now[3]!;
  out[s + ofDeflection] = now[4]!;
}

/** A stretch of even or evenly changing loads; what stands at its start becomes what stands at its end. */
function stretch(
  m: MemberData,
  from: number,
  to: number,
  x0: number,
  x1: number,
  w0: number,
  y1: number,
  out: Float64Array,
  o: number,
): void {
  const s = to - from;
  const N = now[0]!;
  const V = now[1]!;
  const M = now[2]!;
  const u = now[3]!;
  const v = now[4]!;
  const slope = now[5]!;
  const n1 = -x0;
  const n2 = -x1 / 2;
  const w1 = y1 / 2;
  const m2 = w0 / 2;
  const m3 = w1 / 3;
  const e0 = N / m.EA + free[0]!;
  let k0 = M / m.EI + free[1]!;
  let k1 = V / m.EI;
  if (m.GAv !== Infinity) {
    k0 -= w0 / m.GAv;
    k1 -= y1 / m.GAv;
  }
  const k2 = m2 / m.EI;
  const k3 = m3 / m.EI;
  const u2 = n1 / m.EA / 2;
  const u3 = n2 / m.EA / 3;
  out[o] = from;
  out[o + 1] = to;
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
  out[o + ofU] = u;
  out[o + ofU + 1] = e0;
  out[o + ofU + 2] = u2;
  out[o + ofU + 3] = u3;
  out[o + ofDeflection] = v;
  out[o + ofDeflection + 1] = slope;
  out[o + ofDeflection + 2] = k0 / 2;
  out[o + ofDeflection + 3] = k1 / 6;
  out[o + ofDeflection + 4] = k2 / 12;
  out[o + ofDeflection + 5] = k3 / 20;
  now[0] = N + s * (n1 + s * n2);
  now[1] = V + s * (w0 + s * w1);
  now[2] = M + s * (V + s * (m2 + s * m3));
  now[3] = u + s * (e0 + s * (u2 + s * u3));
  now[4] = v + s * (slope + s * (k0 / 2 + s * (k1 / 6 + s * (k2 / 12 + (s * k3) / 20))));
  now[5] = slope + s * (k0 + s * (k1 / 2 + s * (k2 / 3 + (s * k3) / 4)));
}

/** A slack member: no forces, straight between its nodes. */
function slackLine(m: MemberData, state: ResultState, into: LineRoom): void {
  const d = state.displacements;
  const a = 3 * m.start;
  const b = 3 * m.end;
  const u1 = d[a]! * m.cos + d[a + 1]! * m.sin;
  const v1 = -d[a]! * m.sin + d[a + 1]! * m.cos;
  const u2 = d[b]! * m.cos + d[b + 1]! * m.sin;
  const v2 = -d[b]! * m.sin + d[b + 1]! * m.cos;
  const L = m.length;
  const at = into.room(1);
  const out = into.numbers;
  const s = at + headNumbers;
  out[at] = 1;
  out[at + 1] = L;
  out[s] = 0;
  out[s + 1] = L;
  writeDegrees(out, s, 0, 0, 0, 1, 1);
  out[s + ofN] = out[s + ofV] = out[s + ofM] = 0;
  out[s + ofU] = u1;
  out[s + ofU + 1] = (u2 - u1) / L;
  out[s + ofDeflection] = v1;
  out[s + ofDeflection + 1] = (v2 - v1) / L;
}
