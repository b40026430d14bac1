import type { DrawingData, DrawingLoad, DrawingResult } from './drawing-data';
import { arrow } from './load-arrows';
import { along, type MemberAxis } from './member-axis';
import { path, plus, type Point } from './paper';

export type Distributed = Extract<DrawingLoad, { kind: 'distributed' }>;

export interface Block {
  readonly axis: MemberAxis;
  readonly load: Distributed;
  /** Unit direction of the force on paper, and the side on which the load stands. */
  readonly force: Point;
  readonly side: Point;
  /** Off the member where it begins, and its height at either end, px. */
  readonly base: number;
  readonly h1: number;
  readonly h2: number;
}

/** Unit direction on paper of the force of a positive load. */
export function direction(axes: 'global' | 'local' | 'projected', way: 'x' | 'y', axis: MemberAxis): Point {
  if (axes === 'local') return way === 'x' ? axis.t : axis.n;
  return way === 'x' ? { x: 1, y: 0 } : { x: 0, y: -1 };
}

export function blocksOf(axes: readonly MemberAxis[], data: DrawingData, result: DrawingResult, tall: number): Block[] {
  const loads = result.loads.filter(
    (one): one is Distributed => one.kind === 'distributed' && one.selfWeight !== true && (one.q1 !== 0 || one.q2 !== 0),
  );
  const most = Math.max(...loads.map((one) => Math.max(Math.abs(one.q1), Math.abs(one.q2))), 1e-9);
  const middle = centre(data, axes);
  const stacks = new Map<string, number>();
  return loads.flatMap((load) => {
    const axis = axes[load.member];
    if (!axis) return [];
    const sign = load.q1 + load.q2 < 0 ? -1 : 1;
    const unit = direction(load.axes, load.direction, axis);
    const force = { x: unit.x * sign, y: unit.y * sign };
    const side = sideOf(force, along(axis, axis.length / 2), middle);
    const height = (q: number) => (q === 0 ? 0 : 6 + (tall - 6) * Math.sqrt((q * sign) / most));
    const [h1, h2] = [height(Math.max(load.q1 * sign, 0) * sign), height(Math.max(load.q2 * sign, 0) * sign)];
    const stack = `${load.member}:${side.x * axis.n.x + side.y * axis.n.y >= 0}`;
    const base = stacks.get(stack) ?? 4;
    stacks.set(stack, base + Math.max(h1, h2));
    return [{ axis, load, force, side, base, h1, h2 }];
  });
}

/** Gravity stands on top of its member; uplift too, leaving it; a sideways load stands on the outer side of the frame. */
function sideOf(force: Point, at: Point, middle: Point): Point {
  const back = { x: -force.x, y: -force.y };
  if (force.y > 0.5) return back;
  if (force.y < -0.5) return force;
  const outward = at.x - middle.x;
  return Math.abs(outward) < 1 || outward * back.x >= 0 ? back : force;
}

function centre(data: DrawingData, axes: readonly MemberAxis[]): Point {
  const points = axes.flatMap((axis) => [axis.a, axis.b]);
  const mean = (pick: (p: Point) => number) => points.reduce((sum, p) => sum + pick(p), 0) / Math.max(points.length, 1);
  return { x: mean((p) => p.x), y: mean((p) => p.y) };
}

export function corner({ axis, load, side, base, h1, h2 }: Block, large: boolean): Point[] {
  const text = large ? 12 + Math.abs(side.x) * 74 : 8;
  return [plus(along(axis, load.from), side, base + h1 + text), plus(along(axis, load.to), side, base + h2 + text)];
}

export function blockPath(block: Block): { d: string; outline: Point[]; shafts: [Point, Point][] } {
  const { axis, load, force, side, base, h1, h2 } = block;
  const foot = (share: number) => plus(along(axis, load.from + (load.to - load.from) * share), side, base);
  const head = (share: number) => plus(foot(share), side, h1 + (h2 - h1) * share);
  const drawn = ((load.to - load.from) / axis.length) * axis.drawn;
  const count = Math.max(1, Math.round(drawn / 24));
  const leaving = side.x * force.x + side.y * force.y > 0;
  const shafts: [Point, Point][] = [];
  let d = path([foot(0), head(0), head(1), foot(1)]);
  for (let i = 0; i <= count; i++) {
    const share = i / count;
    if (h1 + (h2 - h1) * share < 4) continue;
    shafts.push(leaving ? [foot(share), head(share)] : [head(share), foot(share)]);
  }
  for (const [from, to] of shafts) d += arrow(from, to, 4);
  return { d, outline: [foot(0), head(0), head(1), foot(1)], shafts };
}
