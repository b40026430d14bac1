import type { Frame } from '@/lib/model/frame';
import type { MemberLine, Polynomial, ResultState, Segment } from '@/lib/results/result';
import { memberData, type MemberData } from './member-data';
import { memberLoads, type LineLoad, type PlaceLoad } from './member-loads';
import { evaluate, integral } from './polynomial';

interface Acting {
  readonly lines: readonly LineLoad[];
  readonly places: readonly PlaceLoad[];
  readonly strain: number;
  readonly curvature: number;
}

/**
 * Internal forces and deflected line of a member, exactly: polynomials between load points, from the forces at its
 * start and the loads along it (README §3).
 *
 * dN/dx = −q_x, dV/dx = q_y, dM/dx = V; u′ = N/EA + ε₀, v″ = M/EI + κ₀, with v at both ends and u at the start given
 * by the nodes. A point load stands between two segments; one exactly at an end stands beside a segment of no length
 * there, so that both sides of its jump count.
 */
export function memberLine(frame: Frame, state: ResultState, member: number): MemberLine {
  const m = memberData(frame)[member]!;
  const acting = actingLoads(frame, state, member);
  const L = m.length;
  const places = [0, L];
  for (const line of acting.lines) places.push(line.a, line.b);
  for (const place of acting.places) places.push(place.x);
  const cuts = distinct(places, L);
  const segments: Segment[] = [];
  const e = 6 * member;
  let N = state.endForces[e]!;
  let V = state.endForces[e + 1]!;
  let M = state.endForces[e + 2]!;
  const flat = (x: number): Segment => ({ from: x, to: x, N: [N], V: [V], M: [M], u: [], v: [] });
  const jump = (x: number): boolean => {
    let jumped = false;
    for (const place of acting.places) {
      if (nearest(cuts, place.x) !== x) continue;
      N -= place.Px;
      V += place.Py;
      M -= place.M;
      jumped = true;
    }
    return jumped;
  };
  const before = flat(0);
  if (jump(0)) segments.push(before);
  for (let i = 1; i < cuts.length; i++) {
    const from = cuts[i - 1]!;
    const to = cuts[i]!;
    if (i > 1) jump(from);
    const [qx, qy] = loadBetween(acting.lines, from, to);
    const n = integral(
      qx.map((c) => -c),
      N,
    );
    const v = integral(qy, V);
    const moment = integral(v, M);
    segments.push({ from, to, N: n, V: v, M: moment, u: [], v: [] });
    N = evaluate(n, to - from);
    V = evaluate(v, to - from);
    M = evaluate(moment, to - from);
  }
  if (jump(L)) segments.push(flat(L));
  return { length: L, segments: deflected(frame, state, m, acting, segments) };
}

function actingLoads(frame: Frame, state: ResultState, member: number): Acting {
  const all = memberLoads(frame);
  const cases = frame.cases.length;
  const lines: LineLoad[] = [];
  const places: PlaceLoad[] = [];
  let strain = 0;
  let curvature = 0;
  for (let c = 0; c < cases; c++) {
    const k = state.factors[c]!;
    const loads = k === 0 ? undefined : all[member * cases + c];
    if (!loads) continue;
    for (const q of loads.lines) {
      const line = { a: q.a, b: q.b, qx1: k * q.qx1, qx2: k * q.qx2, qy1: k * q.qy1, qy2: k * q.qy2 };
      const same = lines.findIndex((other) => other.a === q.a && other.b === q.b);
      if (same < 0) lines.push(line);
      else lines[same] = together(lines[same]!, line);
    }
    for (const p of loads.places) places.push({ x: p.x, Px: k * p.Px, Py: k * p.Py, M: k * p.M });
    strain += k * loads.strain;
    curvature += k * loads.curvature;
  }
  return { lines, places, strain, curvature };
}

/** Two line loads over the same length as one. */
function together(p: LineLoad, q: LineLoad): LineLoad {
  return { a: p.a, b: p.b, qx1: p.qx1 + q.qx1, qx2: p.qx2 + q.qx2, qy1: p.qy1 + q.qy1, qy2: p.qy2 + q.qy2 };
}

/** Places along the member, ascending, those within rounding of one another (or of an end) taken as one. */
function distinct(places: number[], L: number): number[] {
  const near = 1e-12 * L;
  places.sort((a, b) => a - b);
  const cuts: number[] = [];
  for (const x of places) {
    const place = x <= near ? 0 : x >= L - near ? L : x;
    if (cuts.length === 0 || place - cuts[cuts.length - 1]! > near) cuts.push(place);
  }
  return cuts;
}

function nearest(cuts: readonly number[], x: number): number {
  let best = cuts[0]!;
  for (const cut of cuts) if (Math.abs(cut - x) < Math.abs(best - x)) best = cut;
  return best;
}

/** q_x and q_y over a stretch, linear in s from its start. */
function loadBetween(lines: readonly LineLoad[], from: number, to: number): readonly [[number, number], [number, number]] {
  const qx: [number, number] = [0, 0];
  const qy: [number, number] = [0, 0];
  const middle = (from + to) / 2;
  for (const line of lines) {
    if (!(line.a < middle && middle < line.b)) continue;
    const span = line.b - line.a;
    const gx = (line.qx2 - line.qx1) / span;
    const gy = (line.qy2 - line.qy1) / span;
    qx[0] += line.qx1 + gx * (from - line.a);
    qx[1] += gx;
    qy[0] += line.qy1 + gy * (from - line.a);
    qy[1] += gy;
  }
  return [qx, qy];
}

/** Adds u and v: integrated along the segments, then v turned as a whole so that it meets the end's displacement. */
function deflected(frame: Frame, state: ResultState, m: MemberData, acting: Acting, segments: readonly Segment[]): Segment[] {
  const d = state.displacements;
  const at = (node: number): readonly [number, number] => {
    const x = d[3 * node]!;
    const y = d[3 * node + 1]!;
    return [x * m.cos + y * m.sin, -x * m.sin + y * m.cos];
  };
  const [u1, v1] = at(m.start);
  const [, v2] = at(m.end);
  let u = u1;
  let v = 0;
  let slope = 0;
  const bent = segments.map((segment) => {
    const s = segment.to - segment.from;
    const axial = integral(addConstant(segment.N, 1 / m.EA, acting.strain), u);
    const rotation = integral(addConstant(segment.M, 1 / m.EI, acting.curvature), slope);
    const line = integral(rotation, v);
    if (s === 0) return { segment, axial: [u], line: [v] };
    u = evaluate(axial, s);
    slope = evaluate(rotation, s);
    v = evaluate(line, s);
    return { segment, axial, line };
  });
  const turn = (v2 - v1 - v) / m.length;
  return bent.map(({ segment, axial, line }) => {
    line[0] = line[0]! + v1 + turn * segment.from;
    if (line.length > 1) line[1] = line[1]! + turn;
    return { ...segment, u: axial, v: line };
  });
}

function addConstant(p: Polynomial, factor: number, constant: number): number[] {
  const out = p.map((c) => c * factor);
  out[0] = out[0]! + constant;
  return out;
}
