import type { Frame } from '@/lib/model/frame';
import type { MemberLine, ResultState, Segment } from '@/lib/results/result';
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

/**
 * Internal forces and deflected line of a member, exactly: polynomials between load points, from the forces at its
 * start and the loads along it (README §3).
 *
 * dN/dx = −q_x, dV/dx = q_y, dM/dx = V; u′ = N/EA + ε₀, v″ = M/EI + κ₀ − (V/GAv)′, with v at both ends and u at the start
 * given by the nodes. A point load stands between two segments; one exactly at an end stands beside a segment of no length
 * there, so that both sides of its jump count.
 */
export function memberLine(frame: Frame, state: ResultState, member: number): MemberLine {
  const m = memberDataFor(frame, state.method)[member]!;
  if (state.method?.slack.includes(member)) return slackLine(m, state);
  if (state.order === 2) return secondOrderLine(frame, state, member, m);
  return firstOrderLine(frame, state, member, m);
}

function firstOrderLine(frame: Frame, state: ResultState, member: number, m: MemberData): MemberLine {
  const { places, cases } = stretchesOf(frame, member);
  const last = places.length - 1;
  makeRoom(places.length);
  let strain = 0;
  let curvature = 0;
  for (let c = 0; c < cases.length; c++) {
    const k = state.factors[c]!;
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
  const d = state.displacements;
  const [a, b] = [3 * m.start, 3 * m.end];
  const v1 = -d[a]! * m.sin + d[a + 1]! * m.cos;
  const v2 = -d[b]! * m.sin + d[b + 1]! * m.cos;
  const e = 6 * member;
  let N = state.endForces[e]!;
  let V = state.endForces[e + 1]!;
  let M = state.endForces[e + 2]!;
  let u = d[a]! * m.cos + d[a + 1]! * m.sin;
  let v = 0;
  let slope = 0;
  const shears = m.GAv !== Infinity;
  const segments: { from: number; to: number; N: number[]; V: number[]; M: number[]; u: number[]; v: number[] }[] = [];
  const flat = (x: number) => ({ from: x, to: x, N: [N], V: [V], M: [M], u: [u], v: [v] });
  if (jumps[0]) segments.push(flat(0));
  let i = 0;
  while (i < last) {
    if (jumps[i]) {
      N -= Px[i]!;
      V += Py[i]!;
      M -= M0[i]!;
      if (shears) slope -= Py[i]! / m.GAv;
    }
    const from = places[i]!;
    // a place that nothing of this state begins, ends or stands at divides nothing
    let to = i + 1;
    while (to < last && !divides[to]) to++;
    const s = places[to]! - from;
    const n1 = -qx0[i]!;
    const n2 = -qx1[i]! / 2;
    const w0 = qy0[i]!;
    const w1 = qy1[i]! / 2;
    const m2 = w0 / 2;
    const m3 = w1 / 3;
    const e0 = N / m.EA + strain;
    let k0 = M / m.EI + curvature;
    let k1 = V / m.EI;
    if (shears) {
      k0 -= w0 / m.GAv;
      k1 -= qy1[i]! / m.GAv;
    }
    const k2 = m2 / m.EI;
    const k3 = m3 / m.EI;
    const segment = {
      from,
      to: places[to]!,
      N: [N, n1, n2],
      V: [V, w0, w1],
      M: [M, V, m2, m3],
      u: [u, e0, n1 / m.EA / 2, n2 / m.EA / 3],
      v: [v, slope, k0 / 2, k1 / 6, k2 / 12, k3 / 20],
    };
    segments.push(segment);
    u += s * (e0 + s * (segment.u[2]! + s * segment.u[3]!));
    v += s * (slope + s * (k0 / 2 + s * (k1 / 6 + s * (k2 / 12 + (s * k3) / 20))));
    slope += s * (k0 + s * (k1 / 2 + s * (k2 / 3 + (s * k3) / 4)));
    M += s * (V + s * (m2 + s * m3));
    V += s * (w0 + s * w1);
    N += s * (n1 + s * n2);
    i = to;
  }
  if (jumps[last]) {
    N -= Px[last]!;
    V += Py[last]!;
    M -= M0[last]!;
    segments.push(flat(m.length));
  }
  // turned as a whole, so that it meets the end's displacement
  const turn = (v2 - v1 - v) / m.length;
  for (const segment of segments) {
    const line = segment.v;
    line[0] = line[0]! + v1 + turn * segment.from;
    if (line.length > 1) line[1] = line[1]! + turn;
  }
  return { length: m.length, segments: segments as readonly Segment[] };
}

/** A slack member: no forces, straight between its nodes. */
function slackLine(m: MemberData, state: ResultState): MemberLine {
  const d = state.displacements;
  const [a, b] = [3 * m.start, 3 * m.end];
  const u1 = d[a]! * m.cos + d[a + 1]! * m.sin;
  const v1 = -d[a]! * m.sin + d[a + 1]! * m.cos;
  const u2 = d[b]! * m.cos + d[b + 1]! * m.sin;
  const v2 = -d[b]! * m.sin + d[b + 1]! * m.cos;
  const L = m.length;
  return { length: L, segments: [{ from: 0, to: L, N: [0], V: [0], M: [0], u: [u1, (u2 - u1) / L], v: [v1, (v2 - v1) / L] }] };
}
