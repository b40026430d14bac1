import type { Frame, MemberLoad } from '@/lib/model/frame';
import type { ResultState } from '@/lib/results/result';

/** Standard gravity, m/s² (ISO 80000-3; sheets §2). */
const g = 9.80665;

/** A member as one measures it on paper: its ends, its length, and its direction. */
export interface Measured {
  readonly x1: number;
  readonly y1: number;
  readonly L: number;
  /** Direction of its axis from start to end. */
  readonly cx: number;
  readonly cy: number;
}

export function measured(frame: Frame, member: number): Measured {
  const { start, end } = frame.members[member]!;
  const a = frame.nodes[start]!;
  const b = frame.nodes[end]!;
  const L = Math.hypot(b.x_m - a.x_m, b.y_m - a.y_m);
  return { x1: a.x_m, y1: a.y_m, L, cx: (b.x_m - a.x_m) / L, cy: (b.y_m - a.y_m) / L };
}

/** Weight of a member per metre of its length, N/m; NaN where the density is not known. */
export function weightPerMetre(frame: Frame, member: number): number {
  const { section, material } = frame.members[member]!;
  return g * (frame.materials[material]!.density_kg_m3 ?? NaN) * frame.sections[section]!.properties.A_m2;
}

/** Global parts of a unit of a member load, projection included. */
export function directionOf(
  load: Exclude<MemberLoad, { kind: 'temperature' | 'moment' }>,
  m: Measured,
): { x: number; y: number } {
  const alongX = load.direction === 'x';
  if (load.axes === 'local') return alongX ? { x: m.cx, y: m.cy } : { x: -m.cy, y: m.cx };
  const share = load.axes !== 'projected' ? 1 : Math.abs(alongX ? m.cy : m.cx);
  return alongX ? { x: share, y: 0 } : { x: 0, y: share };
}

/** A force or moment at a place, global axes; SI. `member` where it stands on one, `s` its distance from the member's start. */
export interface Resultant {
  readonly fx: number;
  readonly fy: number;
  readonly m: number;
  readonly x: number;
  readonly y: number;
  readonly node: number | null;
  readonly member: number | null;
  readonly s: number;
}

/**
 * The loads of a result straight from the sheet's rows × the factors of its cases, with the forces that stand for imperfections,
 * as single resultants: a distributed load as three, at Gauss's points, which is exact for what is asked of it (degree 5).
 */
export function typedLoads(frame: Frame, state: ResultState): Resultant[] {
  const found: Resultant[] = [];
  const factorOf = (loadCase: number): number => state.factors[loadCase] ?? 0;
  const atNode = (node: number, fx: number, fy: number, m: number): void => {
    const { x_m: x, y_m: y } = frame.nodes[node]!;
    found.push({ fx, fy, m, x, y, node, member: null, s: 0 });
  };
  for (const load of frame.nodeLoads) {
    const k = factorOf(load.case);
    if (k !== 0) atNode(load.node, k * load.Fx_N, k * load.Fy_N, k * load.Mz_Nm);
  }
  const notional = state.method?.notional;
  if (notional)
    for (let node = 0; node < frame.nodes.length; node++)
      atNode(node, notional[2 * node]! / state.method!.loadScale, notional[2 * node + 1]! / state.method!.loadScale, 0);
  const onMember = (member: number, s: number, fx: number, fy: number, m: number): void => {
    const { x1, y1, cx, cy } = measured(frame, member);
    found.push({ fx, fy, m, x: x1 + s * cx, y: y1 + s * cy, node: null, member, s });
  };
  const spread = (member: number, from: number, to: number, q: (s: number) => number, d: { x: number; y: number }): void => {
    const [middle, half] = [(from + to) / 2, (to - from) / 2];
    for (const [at, weight] of gauss) {
      const s = middle + half * at;
      const force = half * weight * q(s);
      onMember(member, s, force * d.x, force * d.y, 0);
    }
  };
  for (const load of frame.memberLoads) {
    const k = factorOf(load.case);
    if (k === 0 || load.kind === 'temperature') continue;
    if (load.kind === 'moment') {
      onMember(load.member, load.at_m, 0, 0, k * load.M_Nm);
      continue;
    }
    const d = directionOf(load, measured(frame, load.member));
    if (load.kind === 'point') onMember(load.member, load.at_m, k * load.P_N * d.x, k * load.P_N * d.y, 0);
    else if (load.to_m > load.from_m) {
      const slope = (load.q2_N_m - load.q1_N_m) / (load.to_m - load.from_m);
      spread(load.member, load.from_m, load.to_m, (s) => k * (load.q1_N_m + slope * (s - load.from_m)), d);
    }
  }
  const weight = frame.cases.reduce((sum, { selfWeight }, c) => sum + factorOf(c) * selfWeight, 0);
  if (weight !== 0)
    frame.members.forEach((_, member) =>
      spread(member, 0, measured(frame, member).L, () => weight * weightPerMetre(frame, member), { x: 0, y: -1 }),
    );
  return found;
}

const gauss = [
  [-Math.sqrt(0.6), 5 / 9],
  [0, 8 / 9],
  [Math.sqrt(0.6), 5 / 9],
] as const;

/** The results that hand checks look at: load cases; where there are none (tension-only members), combinations of first order. */
export function statesByHand(states: readonly ResultState[]): readonly ResultState[] {
  const first = states.filter((state) => state.order === 1);
  const cases = first.filter((state) => state.kind === 'case');
  return cases.length > 0 ? cases : first;
}
