import type { Frame, MemberLoad } from '@/lib/model/frame';
import type { ResultState } from '@/lib/results/result';
import {
  degreeDeflection, degreeN, degreeU, degreeV, headNumbers, ofDeflection, ofN, ofU, ofV, segmentNumbers,
} from './flat-line'; // prettier-ignore
import { FlatLines } from './flat-lines';
import { gravity, memberData } from './member-data';

/**
 * What moving does to the moment of all loads and reactions of a second-order state, N·m: Σ (u_x F_y − u_y F_x) where loads
 * as typed and reactions act, and Σ ∫ Q u′ dx along the members, for equilibrium is reckoned on members that keep their
 * length (M′ = Q + N v′, Q square to the unmoved member).
 *
 * With it, the moments of everything about any point sum to none; without a member's P-δ, or with the wrong sway, they don't.
 * Loads as in the state (÷ loadScale); movements as analysed (× loadScale).
 * @param lines where they are kept for who comes after
 */
export function momentOfMovement(frame: Frame, state: ResultState, lines: FlatLines = new FlatLines(frame)): number {
  const scale = state.method?.loadScale ?? 1;
  const d = state.displacements;
  let sum = 0;
  for (const { node, case: c, Fx_N, Fy_N } of frame.nodeLoads) {
    const k = state.factors[c]!;
    if (k !== 0) sum += d[3 * node]! * (k * Fy_N) - d[3 * node + 1]! * (k * Fx_N);
  }
  const notional = state.method?.notional;
  if (notional)
    for (let i = 0; i < frame.nodes.length; i++)
      sum += d[3 * i]! * (notional[2 * i + 1]! / scale) - d[3 * i + 1]! * (notional[2 * i]! / scale);
  for (let i = 0; i < frame.supports.length; i++) {
    const { node } = frame.supports[i]!;
    sum += d[3 * node]! * state.reactions[3 * i + 1]! - d[3 * node + 1]! * state.reactions[3 * i]!;
  }
  const typed = typedAlong(frame);
  const own = lines.of(state);
  for (let i = 0; i < typed.length; i++) {
    const along = typed[i]!;
    if (!acts(along, state.factors)) {
      sum += unloaded(frame, state, i, scale);
      continue;
    }
    const line = own.at(i);
    sum += shortening(own.numbers, line, scale) + ofMember(along, own.numbers, line, state.factors);
  }
  return scale * sum;
}

/** Loads of one member as typed that share where they begin and end and which way they point, global. */
interface SpreadLoads {
  readonly from: number;
  readonly to: number;
  /** Work on u and v along the member of a force of 1 that way: (e_x d_y − e_y d_x) and −(e_y d_y + e_x d_x). */
  readonly onU: number;
  readonly onV: number;
  /** By load: case, q at `from`, q at `to`. */
  readonly rows: number[];
}
interface TypedAlong {
  readonly spread: readonly SpreadLoads[];
  /** By force: case, P, place, onU, onV. */
  readonly forces: readonly number[];
}

const known = new WeakMap<Frame, readonly TypedAlong[]>();

/** Loads straight from the sheets' rows, by member; once a frame. */
function typedAlong(frame: Frame): readonly TypedAlong[] {
  const before = known.get(frame);
  if (before) return before;
  const all = frame.members.map((member, i) => {
    const [a, b] = [frame.nodes[member.start]!, frame.nodes[member.end]!];
    const L = Math.hypot(b.x_m - a.x_m, b.y_m - a.y_m);
    const [ex, ey] = [(b.x_m - a.x_m) / L, (b.y_m - a.y_m) / L];
    const spread: SpreadLoads[] = [];
    const forces: number[] = [];
    const add = (from: number, to: number, dx: number, dy: number, row: readonly [number, number, number]): void => {
      const [onU, onV] = [ex * dy - ey * dx, -(ey * dy + ex * dx)];
      let same = spread.find((one) => one.from === from && one.to === to && one.onU === onU && one.onV === onV);
      if (!same) spread.push((same = { from, to, onU, onV, rows: [] }));
      same.rows.push(...row);
    };
    const density = frame.materials[member.material]!.density_kg_m3 ?? NaN;
    const weight = density * frame.sections[member.section]!.properties.A_m2 * gravity;
    frame.cases.forEach(({ selfWeight }, c) => {
      if (selfWeight !== 0) add(0, L, 0, 1, [c, -selfWeight * weight, -selfWeight * weight]);
    });
    const way = (load: { axes: string; direction: 'x' | 'y' }): readonly [number, number] => {
      if (load.axes !== 'local') return load.direction === 'x' ? [1, 0] : [0, 1];
      return load.direction === 'x' ? [ex, ey] : [-ey, ex];
    };
    const take = (load: MemberLoad): void => {
      if (load.kind === 'temperature' || load.kind === 'moment') return;
      const [dx, dy] = way(load);
      if (load.kind === 'point') {
        forces.push(load.case, load.P_N, load.at_m, ex * dy - ey * dx, -(ey * dy + ex * dx));
        return;
      }
      const share = load.axes === 'projected' ? Math.abs(load.direction === 'y' ? ex : ey) : 1;
      if (load.to_m > load.from_m) add(load.from_m, load.to_m, dx, dy, [load.case, share * load.q1_N_m, share * load.q2_N_m]);
    };
    for (const load of frame.memberLoads) if (load.member === i) take(load);
    return { spread, forces };
  });
  known.set(frame, all);
  return all;
}

function acts({ spread, forces }: TypedAlong, factors: Float64Array): boolean {
  for (const { rows } of spread) for (let i = 0; i < rows.length; i += 3) if (factors[rows[i]!] !== 0) return true;
  for (let i = 0; i < forces.length; i += 5) if (factors[forces[i]!] !== 0) return true;
  return false;
}

/** ∫ Q u′ dx of a member without loads along it: u′ is even, and ∫ Q dx = M₂ − M₁ − N (v₂ − v₁). */
function unloaded(frame: Frame, state: ResultState, member: number, scale: number): number {
  const { start, end, cos, sin, length } = memberData(frame)[member]!;
  const d = state.displacements;
  const [x, y] = [d[3 * end]! - d[3 * start]!, d[3 * end + 1]! - d[3 * start + 1]!];
  const e = 6 * member;
  const bend = state.endForces[e + 5]! - state.endForces[e + 2]!;
  return ((x * cos + y * sin) / length) * (bend - scale * state.endForces[e]! * (y * cos - x * sin));
}

const product = new Float64Array(2 * segmentNumbers);

/** ∫ Q u′ dx, Q = V − N v′ (movements as analysed: × scale), term by term. */
function shortening(lines: Float64Array, line: number, scale: number): number {
  let sum = 0;
  for (let i = lines[line]!, o = line + headNumbers; i > 0; i--, o += segmentNumbers) {
    const h = lines[o + 1]! - lines[o]!;
    if (!(h > 0)) continue;
    const ofQ = Math.max(lines[o + degreeV]!, lines[o + degreeN]! + lines[o + degreeDeflection]! - 1);
    for (let k = 0; k <= ofQ; k++) product[k] = k <= lines[o + degreeV]! ? lines[o + ofV + k]! : 0;
    for (let n = lines[o + degreeN]!; n >= 0; n--) {
      const N = scale * lines[o + ofN + n]!;
      if (N === 0) continue;
      for (let k = lines[o + degreeDeflection]!; k > 0; k--)
        product[n + k - 1] = product[n + k - 1]! - N * k * lines[o + ofDeflection + k]!;
    }
    let power = h;
    for (let r = 1; r <= lines[o + degreeU]!; r++) {
      const strain = r * lines[o + ofU + r]!;
      if (strain !== 0) {
        let part = 0;
        for (let k = ofQ; k >= 0; k--) part = part * h + product[k]! / (k + r);
        sum += strain * power * part;
      }
      power *= h;
    }
  }
  return sum;
}

/** Σ ∫ (u_x q_y − u_y q_x) and Σ (u_x P_y − u_y P_x) of one member's loads as typed, with movements as in the state. */
function ofMember({ spread, forces }: TypedAlong, lines: Float64Array, line: number, factors: Float64Array): number {
  let sum = 0;
  const first = line + headNumbers;
  const past = first + segmentNumbers * lines[line]!;
  for (const { from, to, onU, onV, rows } of spread) {
    let q1 = 0;
    let q2 = 0;
    for (let i = 0; i < rows.length; i += 3) {
      const k = factors[rows[i]!]!;
      q1 += k * rows[i + 1]!;
      q2 += k * rows[i + 2]!;
    }
    if (q1 === 0 && q2 === 0) continue;
    const c1 = (q2 - q1) / (to - from);
    for (let segment = first; segment < past; segment += segmentNumbers) {
      const begins = lines[segment]!;
      const ends = lines[segment + 1]!;
      const p = from > begins ? from - begins : 0;
      const r = (to < ends ? to : ends) - begins;
      if (!(r > p)) continue;
      // q = c₀ + c₁ s along the segment
      const c0 = q1 + c1 * (begins - from);
      sum += worked(lines, segment, onU, onV, c0, c1, r);
      if (p > 0) sum -= worked(lines, segment, onU, onV, c0, c1, p);
    }
  }
  for (let i = 0; i < forces.length; i += 5) {
    const k = factors[forces[i]!]!;
    if (k === 0) continue;
    const at = forces[i + 2]!;
    let segment = first;
    while (at > lines[segment + 1]! && segment + segmentNumbers < past) segment += segmentNumbers;
    const s = at - lines[segment]!;
    const u = valueAt(lines, segment + ofU, lines[segment + degreeU]!, s);
    const v = valueAt(lines, segment + ofDeflection, lines[segment + degreeDeflection]!, s);
    sum += k * forces[i + 1]! * (forces[i + 3]! * u + forces[i + 4]! * v);
  }
  return sum;
}

/** ∫₀ˢ (c₀ + c₁ x)(onU u + onV v) dx, term by term. */
function worked(lines: Float64Array, o: number, onU: number, onV: number, c0: number, c1: number, s: number): number {
  let sum = 0;
  let power = s;
  const ofu = lines[o + degreeU]!;
  const ofv = lines[o + degreeDeflection]!;
  for (let i = 0; i <= ofu || i <= ofv; i++) {
    const coefficient = onU * (i <= ofu ? lines[o + ofU + i]! : 0) + onV * (i <= ofv ? lines[o + ofDeflection + i]! : 0);
    sum += coefficient * power * (c0 / (i + 1) + (c1 * s) / (i + 2));
    power *= s;
  }
  return sum;
}

function valueAt(lines: Float64Array, at: number, degree: number, s: number): number {
  let value = 0;
  for (let k = degree; k >= 0; k--) value = value * s + lines[at + k]!;
  return value;
}
