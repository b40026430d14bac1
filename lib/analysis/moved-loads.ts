import type { Frame, MemberLoad } from '@/lib/model/frame';
import type { MemberLine, Polynomial, ResultState, Segment } from '@/lib/results/result';
import { gravity, memberData } from './member-data';
import { memberLine } from './member-line';
import { evaluate } from './polynomial';

/** Five Gauss points on −1 … 1 with their weights: exact to degree 9. */
const gauss = [
  [0, 128 / 225],
  [-0.5384693101056831, 0.47862867049936647],
  [0.5384693101056831, 0.47862867049936647],
  [-0.906179845938664, 0.23692688505618908],
  [0.906179845938664, 0.23692688505618908],
] as const;

/**
 * What moving does to the moment of all loads and reactions of a second-order state, N·m: Σ (u_x F_y − u_y F_x) where loads
 * as typed and reactions act, and Σ ∫ Q u′ dx along the members, for equilibrium is reckoned on members that keep their
 * length (M′ = Q + N v′, Q square to the unmoved member).
 *
 * With it, the moments of everything about any point sum to none; without a member's P-δ, or with the wrong sway, they don't.
 * Loads as in the state (÷ loadScale); movements as analysed (× loadScale).
 * @param lineOf where lines are kept for who comes after
 */
export function momentOfMovement(
  frame: Frame,
  state: ResultState,
  lineOf: (state: ResultState, member: number) => MemberLine = (one, member) => memberLine(frame, one, member),
): number {
  const scale = state.method?.loadScale ?? 1;
  const d = state.displacements;
  let sum = 0;
  const take = (node: number, Fx: number, Fy: number): void => {
    sum += d[3 * node]! * Fy - d[3 * node + 1]! * Fx;
  };
  for (const load of frame.nodeLoads) {
    const k = state.factors[load.case]!;
    if (k !== 0) take(load.node, k * load.Fx_N, k * load.Fy_N);
  }
  const notional = state.method?.notional;
  if (notional) frame.nodes.forEach((_, i) => take(i, notional[2 * i]! / scale, notional[2 * i + 1]! / scale));
  frame.supports.forEach(({ node }, i) => take(node, state.reactions[3 * i]!, state.reactions[3 * i + 1]!));
  const rows: MemberLoad[][] = frame.members.map(() => []);
  for (const load of frame.memberLoads) if (state.factors[load.case] !== 0) rows[load.member]!.push(load);
  let heavy = 0;
  frame.cases.forEach((loadCase, c) => (heavy += state.factors[c]! * loadCase.selfWeight));
  frame.members.forEach((_, i) => {
    if (heavy === 0 && rows[i]!.length === 0) {
      sum += unloaded(frame, state, i, scale);
      return;
    }
    const line = lineOf(state, i);
    sum += shortening(line, scale);
    sum += ofMember(frame, state, i, line, rows[i]!, heavy);
  });
  return scale * sum;
}

/** ∫ Q u′ dx of a member without loads along it: u′ is even, and ∫ Q dx = M₂ − M₁ − N (v₂ − v₁). */
function unloaded(frame: Frame, state: ResultState, member: number, scale: number): number {
  const { start, end, cos, sin, length } = memberData(frame)[member]!;
  const d = state.displacements;
  const [x, y] = [d[3 * end]! - d[3 * start]!, d[3 * end + 1]! - d[3 * start + 1]!];
  const [N, , M1, , , M2] = state.endForces.subarray(6 * member, 6 * member + 6);
  return ((x * cos + y * sin) / length) * (M2! - M1! - scale * N! * (y * cos - x * sin));
}

/** ∫ Q u′ dx, Q = V − N v′ (movements as analysed: × scale). */
function shortening({ segments }: MemberLine, scale: number): number {
  let sum = 0;
  for (const { from, to, N, V, u, v } of segments) {
    if (!(to > from)) continue;
    sum += integral(to - from, 0, to - from, (s) => {
      const Q = evaluate(V, s) - scale * evaluate(N, s) * slopeOf(v, s);
      return Q * slopeOf(u, s);
    });
  }
  return sum;
}

/** Σ ∫ (u_x q_y − u_y q_x) of one member's loads as typed, with movements as in the state. */
function ofMember(
  frame: Frame,
  state: ResultState,
  member: number,
  { segments, length }: MemberLine,
  rows: readonly MemberLoad[],
  heavy: number,
): number {
  const { start, end, section, material } = frame.members[member]!;
  const [a, b] = [frame.nodes[start]!, frame.nodes[end]!];
  const [ex, ey] = [(b.x_m - a.x_m) / length, (b.y_m - a.y_m) / length];
  // lever of a unit force (dx, dy), global, at s of a segment
  const lever = ({ u, v }: Segment, s: number, dx: number, dy: number): number => {
    const [along, across] = [evaluate(u, s), evaluate(v, s)];
    return (ex * along - ey * across) * dy - (ey * along + ex * across) * dx;
  };
  const line = (from: number, to: number, q: (x: number) => number, dx: number, dy: number): number => {
    let sum = 0;
    for (const segment of segments) {
      const [p, r] = [Math.max(from, segment.from), Math.min(to, segment.to)];
      if (r > p)
        sum += integral(r - p, p - segment.from, r - segment.from, (s) => q(segment.from + s) * lever(segment, s, dx, dy));
    }
    return sum;
  };
  let sum = 0;
  if (heavy !== 0) {
    const q = heavy * gravity * frame.sections[section]!.properties.A_m2 * (frame.materials[material]!.density_kg_m3 ?? NaN);
    sum += line(0, length, () => -q, 0, 1);
  }
  for (const load of rows) {
    if (load.kind === 'temperature' || load.kind === 'moment') continue;
    const k = state.factors[load.case]!;
    const local = load.axes === 'local';
    const dx = local ? (load.direction === 'x' ? ex : -ey) : load.direction === 'x' ? 1 : 0;
    const dy = local ? (load.direction === 'x' ? ey : ex) : load.direction === 'x' ? 0 : 1;
    if (load.kind === 'point') {
      const at = segments.find(({ to }) => load.at_m <= to) ?? segments[segments.length - 1]!;
      sum += k * load.P_N * lever(at, load.at_m - at.from, dx, dy);
      continue;
    }
    const { from_m, to_m, q1_N_m, q2_N_m } = load;
    if (!(to_m > from_m)) continue;
    const share = load.axes === 'projected' ? Math.abs(load.direction === 'y' ? ex : ey) : 1;
    sum += k * share * line(from_m, to_m, (x) => q1_N_m + ((q2_N_m - q1_N_m) * (x - from_m)) / (to_m - from_m), dx, dy);
  }
  return sum;
}

function slopeOf(p: Polynomial, s: number): number {
  let slope = 0;
  for (let k = p.length - 1; k > 0; k--) slope = slope * s + k * p[k]!;
  return slope;
}

function integral(length: number, from: number, to: number, f: (s: number) => number): number {
  let sum = 0;
  for (const [at, weight] of gauss) sum += weight * f((from + to + at * (to - from)) / 2);
  return (length * sum) / 2;
}
