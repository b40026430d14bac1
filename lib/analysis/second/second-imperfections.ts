import type { Frame } from '@/lib/model/frame';
import type { Settings } from '@/lib/model/settings';
import type { AskedState } from './asked-states';
import { firstOrderStates } from './first-order';
import { actingUnder } from './second-loads';
import type { Setup } from './second-setup';
import { resultants, type SecondState } from './second-state';

/** A standing line of members: each with its lower and upper node. */
interface Standing {
  readonly pieces: readonly { readonly member: number; readonly foot: number; readonly top: number }[];
  readonly foot: number;
}

const known = new WeakMap<Frame, Standing[]>();

/**
 * Columns found anew: members that share a span word are one; role column, or no role and within 20° of vertical from
 * the line's one free end to the other. Pieces that lie flat are left out.
 */
function standingLines(frame: Frame): Standing[] {
  const before = known.get(frame) ?? standing(frame);
  known.set(frame, before);
  return before;
}

function standing(frame: Frame): Standing[] {
  const lines = new Map<string, number[]>();
  frame.members.forEach((m, i) => {
    const key = m.span === null ? `member ${i}` : `span ${m.span.trim().toLowerCase()}`;
    lines.set(key, [...(lines.get(key) ?? []), i]);
  });
  const y = (node: number): number => frame.nodes[node]!.y_m;
  return [...lines.values()].flatMap((members): Standing[] => {
    const role = members.map((i) => frame.members[i]!.role).find((word) => word !== null);
    if (role ? role !== 'column' : !steep(frame, members)) return [];
    const pieces = members
      .map((member) => {
        const { start, end } = frame.members[member]!;
        return y(start) < y(end) ? { member, foot: start, top: end } : { member, foot: end, top: start };
      })
      .filter(({ foot, top }) => y(foot) !== y(top));
    if (pieces.length === 0) return [];
    return [{ pieces, foot: pieces.map((p) => p.foot).reduce((low, node) => (y(node) < y(low) ? node : low)) }];
  });
}

function steep(frame: Frame, members: readonly number[]): boolean {
  const met = new Map<number, number>();
  for (const i of members)
    for (const node of [frame.members[i]!.start, frame.members[i]!.end]) met.set(node, (met.get(node) ?? 0) + 1);
  const [a, b] = [...met].filter(([, times]) => times === 1).map(([node]) => frame.nodes[node]!);
  if (!a || !b) return false;
  return Math.abs(b.x_m - a.x_m) <= Math.tan(Math.PI / 9) * Math.abs(b.y_m - a.y_m) * (1 + 1e-9);
}

/**
 * EN 1993-1-1 5.3.2: φ = (1/200) α_h α_m, φ N at the top of each compressed piece of a column and the opposite at its
 * foot; h from the lowest foot to the highest top, m of the row that stands on supports (on no other column, if none does).
 *
 * @param endForces of the combination's first-order analysis   @returns Fx, Fy by node, towards +X, N
 */
function swayByLean(frame: Frame, endForces: ArrayLike<number>): Float64Array {
  const forces = new Float64Array(2 * frame.nodes.length);
  const columns = standingLines(frame);
  if (columns.length === 0) return forces;
  const pressed = (member: number): number => Math.max(-endForces[6 * member]!, -endForces[6 * member + 3]!, 0);
  const y = (node: number): number => frame.nodes[node]!.y_m;
  const pieces = columns.flatMap((column) => column.pieces);
  const h = Math.max(...pieces.map((p) => y(p.top))) - Math.min(...pieces.map((p) => y(p.foot)));
  const onGround = columns.filter((column) => frame.supports.some((s) => s.node === column.foot));
  const row = onGround.length > 0 ? onGround : columns.filter((c) => !pieces.some((p) => p.top === c.foot));
  const all = row.map((c) => pressed(c.pieces.find((p) => p.foot === c.foot)!.member));
  // what rounding leaves of a force is none
  const loads = all.filter((N) => N > 1e-6 * Math.max(...all));
  const half = loads.reduce((sum, N) => sum + N, 0) / (2 * loads.length);
  const m = Math.max(1, loads.filter((N) => N >= half * (1 - 1e-9)).length);
  const alphaH = Math.max(2 / 3, Math.min(2 / Math.sqrt(h), 1));
  const phi = (alphaH * Math.sqrt((m + 1) / (2 * m))) / 200;
  for (const p of pieces) {
    forces[2 * p.top]! += phi * pressed(p.member);
    forces[2 * p.foot]! -= phi * pressed(p.member);
  }
  return forces;
}

/**
 * AISC 360-22 C2.2b: 0.002 α Y at each node, Y the gravity load brought there (lever rule along members; not of wind,
 * seismic and temperature cases), none where it lifts or where the node is held both ways.
 *
 * @returns Fx, Fy by node, towards +X, N
 */
function swayByGravity(setup: Setup, factors: ArrayLike<number>, alpha: number): Float64Array {
  const { frame, members, along, supportAt } = setup;
  const forces = new Float64Array(2 * frame.nodes.length);
  if (standingLines(frame).length === 0) return forces;
  const gravity = frame.cases.map(({ kind }, c) => (['wind', 'seismic', 'temperature'].includes(kind) ? 0 : factors[c]!));
  const up = new Float64Array(frame.nodes.length);
  for (const load of frame.nodeLoads) up[load.node]! += gravity[load.case]! * load.Fy_N;
  members.forEach(({ start, end, ex, ey, L }, i) => {
    const { total, atEnd } = resultants(actingUnder(along[i]!, gravity), L);
    up[end]! += ey * atEnd[0] + ex * atEnd[1];
    up[start]! += ey * (total[0] - atEnd[0]) + ex * (total[1] - atEnd[1]);
  });
  up.forEach((Fy, node) => {
    const support = supportAt[node];
    if (Fy < 0 && !(support?.ux === 'fixed' && support.uy === 'fixed')) forces[2 * node] = -0.002 * alpha * Fy;
  });
  return forces;
}

/**
 * The forces that stand for a state's imperfections, as they act in the analysis (scale counted in), leaning its way.
 * @param sum its first-order state   @returns null where they cannot be had
 */
export function notionalOf(
  setup: Setup,
  settings: Settings,
  asked: AskedState,
  sum: SecondState | null,
  slack: ReadonlySet<number>,
): Float64Array | null {
  if (settings.imperfections === 'AISC 360') {
    // α Y: the analysis is of α-fold loads already where results are divided by it
    return swayByGravity(setup, asked.factors, asked.alpha * asked.scale).map((force) => asked.lean * force);
  }
  const state = sum ?? firstOrderStates(setup, [asked.factors], { slack, stiffness: null })?.[0];
  return state ? swayByLean(setup.frame, state.endForces).map((force) => asked.lean * asked.scale * force) : null;
}
