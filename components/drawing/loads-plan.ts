import { formatQuantity } from '@/lib/units/format';
import { unitLabel } from '@/lib/units/batch-unit';
import type { Quantity } from '@/lib/units/quantity';
import type { DrawingData, DrawingLoad, DrawingResult } from './drawing-data';
import { around, placeLabels, textHeight, textWidth, type LabelWish, type PlacedLabel } from './labels';
import { awayFrom } from './ground-direction';
import { along, type MemberAxis } from './member-axis';
import { line, path, plus, type Point } from './paper';
import { nodeWishes, setScene, type Scene } from './scene';

export interface LoadsPlan {
  readonly scene: Scene;
  readonly arrows: readonly { readonly key: string; readonly d: string; readonly className: string }[];
  readonly labels: readonly PlacedLabel[];
  /** Said in the caption rather than drawn. */
  readonly besides: readonly string[];
}

type Distributed = Extract<DrawingLoad, { kind: 'distributed' }>;

interface Block {
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

/** Loads as open-headed lines in the direction they act, dead nearest the member; reactions beside their supports. */
export function planLoads(data: DrawingData, result: DrawingResult, width: number, height: number, large: boolean): LoadsPlan {
  const tall = large ? 30 : 17;
  const scene = setScene(data, width, height, large, (axes) => {
    const corners = blocksOf(axes, data, result, tall).flatMap((block) => corner(block, large));
    const under = axes.flatMap((axis) => [axis.a, axis.b]);
    const lowest = Math.max(...under.map((p) => p.y), 0);
    return [...corners, ...heads(axes, data, result, tall * 1.25), { x: under[0]?.x ?? 0, y: lowest + (large ? 40 : 34) }];
  });
  const { axes, paper, taken, font } = scene;
  const arrows: { key: string; d: string; className: string }[] = [];
  const blocks = blocksOf(axes, data, result, tall);
  blocks.forEach((block, i) => {
    const drawn = blockPath(block);
    taken.lines(drawn.outline);
    for (const [from, to] of drawn.shafts) taken.line(from, to);
    arrows.push({ key: `d${i}`, d: drawn.d, className: 'd-load' });
  });
  const wishes: LabelWish[] = [...blockWishes(scene, blocks)];
  pointed(data, result, axes, paper.at).forEach(({ at, force, text }, i) => {
    const inward = { x: -force.x, y: -force.y };
    const tail = plus(at, inward, tall * 1.25);
    taken.line(tail, at);
    arrows.push({ key: `p${i}`, d: arrow(tail, plus(at, inward, 3), 5), className: 'd-load d-load-point' });
    wishes.push({
      key: `p${i}`,
      text,
      className: 'd-load-text',
      size: font,
      places: around(tail, inward, text, font, 3),
      must: i < 6,
      from: tail,
    });
  });
  turning(data, result, axes, paper.at).forEach(({ at, value, text }, i) => {
    arrows.push({ key: `m${i}`, d: turn(at, large ? 11 : 8, value > 0), className: 'd-load d-load-point' });
    wishes.push({
      key: `m${i}`,
      text,
      className: 'd-load-text',
      size: font,
      places: around(at, { x: 0.7, y: -0.7 }, text, font, 13),
      must: i < 4,
    });
  });
  data.supports.forEach((support, i) => {
    const [node, Mz] = [data.nodes[support.node], result.reactions[i]?.Mz ?? 0];
    if (large && node && Math.abs(Mz) > 1)
      arrows.push({
        key: `r${i}`,
        d: turn(paper.at(node.x, node.y), large ? 10 : 7, Mz > 0),
        className: 'd-load d-reaction-arc',
      });
  });
  const said = besides(data, result);
  const saidWidth = textWidth(said.join('; '), 12);
  if (said.length > 0) taken.text({ x: 8 + saidWidth / 2, y: height - 10 }, saidWidth, 14, 0);
  const told = new Set<string>();
  const once = wishes.filter(({ text }) => !told.has(text) && told.add(text));
  wishes.splice(0, wishes.length, ...once, ...reactionWishes(scene, result));
  if (large) wishes.push(...nodeWishes(scene));
  return { scene, arrows, labels: placeLabels(wishes, taken), besides: said };
}

/** Unit direction on paper of the force of a positive load. */
function direction(axes: 'global' | 'local' | 'projected', way: 'x' | 'y', axis: MemberAxis): Point {
  if (axes === 'local') return way === 'x' ? axis.t : axis.n;
  return way === 'x' ? { x: 1, y: 0 } : { x: 0, y: -1 };
}

function blocksOf(axes: readonly MemberAxis[], data: DrawingData, result: DrawingResult, tall: number): Block[] {
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

function corner({ axis, load, side, base, h1, h2 }: Block, large: boolean): Point[] {
  const text = large ? 12 + Math.abs(side.x) * 74 : 8;
  return [plus(along(axis, load.from), side, base + h1 + text), plus(along(axis, load.to), side, base + h2 + text)];
}

function blockPath(block: Block): { d: string; outline: Point[]; shafts: [Point, Point][] } {
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

/** A line with an open head at its end. */
function arrow(from: Point, to: Point, size: number): string {
  const length = Math.hypot(to.x - from.x, to.y - from.y) || 1;
  const t = { x: (to.x - from.x) / length, y: (to.y - from.y) / length };
  const n = { x: -t.y, y: t.x };
  const back = plus(to, t, -size * 1.5);
  return line(from, to) + path([plus(back, n, size * 0.6), to, plus(back, n, -size * 0.6)]);
}

/** Three quarters of a circle with an open head: anticlockwise where positive. */
function turn(at: Point, r: number, anticlockwise: boolean): string {
  const start = anticlockwise ? { x: at.x + r, y: at.y } : { x: at.x - r, y: at.y };
  const end = { x: at.x, y: at.y + r };
  const arc = `M${start.x} ${start.y}A${r} ${r} 0 1 ${anticlockwise ? 0 : 1} ${end.x} ${end.y}`;
  const way = anticlockwise ? 1 : -1;
  return arc + path([{ x: end.x - way * 5, y: end.y - 4 }, end, { x: end.x - way * 5, y: end.y + 3.5 }]);
}

interface Pointed {
  readonly at: Point;
  readonly force: Point;
  readonly text: string;
}

function pointed(
  data: DrawingData,
  result: DrawingResult,
  axes: readonly MemberAxis[],
  at: (x: number, y: number) => Point,
): Pointed[] {
  return result.loads.flatMap((load): Pointed[] => {
    if (load.kind === 'point') {
      const axis = axes[load.member];
      if (!axis || load.P === 0) return [];
      const unit = direction(load.axes, load.direction, axis);
      const sign = Math.sign(load.P);
      return [
        {
          at: along(axis, load.at),
          force: { x: unit.x * sign, y: unit.y * sign },
          text: `${load.case} ${words(Math.abs(load.P), 'force', data)}`,
        },
      ];
    }
    if (load.kind !== 'node') return [];
    const node = data.nodes[load.node];
    if (!node) return [];
    const p = at(node.x, node.y);
    const one = (value: number, unit: Point): Pointed[] =>
      value === 0
        ? []
        : [
            {
              at: p,
              force: { x: unit.x * Math.sign(value), y: unit.y * Math.sign(value) },
              text: `${load.case} ${words(Math.abs(value), 'force', data)}`,
            },
          ];
    return [...one(load.Fx, { x: 1, y: 0 }), ...one(load.Fy, { x: 0, y: -1 })];
  });
}

function heads(axes: readonly MemberAxis[], data: DrawingData, result: DrawingResult, length: number): Point[] {
  const at = (x: number, y: number) => {
    const index = data.nodes.findIndex((node) => node.x === x && node.y === y);
    const axis = axes.find((one) => data.members[one.index]?.start === index || data.members[one.index]?.end === index);
    return axis ? (data.members[axis.index]?.start === index ? axis.a : axis.b) : { x: 0, y: 0 };
  };
  return pointed(data, result, axes, at).map((one) => plus(one.at, one.force, -length - 8));
}

function turning(data: DrawingData, result: DrawingResult, axes: readonly MemberAxis[], at: (x: number, y: number) => Point) {
  return result.loads.flatMap((load) => {
    if (load.kind === 'moment' && load.M !== 0) {
      const axis = axes[load.member];
      return axis
        ? [{ at: along(axis, load.at), value: load.M, text: `${load.case} ${words(Math.abs(load.M), 'moment', data)}` }]
        : [];
    }
    if (load.kind !== 'node' || load.Mz === 0) return [];
    const node = data.nodes[load.node];
    return node
      ? [{ at: at(node.x, node.y), value: load.Mz, text: `${load.case} ${words(Math.abs(load.Mz), 'moment', data)}` }]
      : [];
  });
}

const words = (si: number, quantity: Quantity, data: DrawingData): string => {
  const unit = unitLabel(quantity, data.units);
  return `${formatQuantity(si, quantity, data.units)}${unit ? ` ${unit}` : ''}`;
};

/**
 * One text for each stack of loads, outermost first ("snow 5.22 kN/m on plan, dead 2.48 kN/m"), beyond the outermost; stacks
 * that say the same say it once, on the longest member.
 */
function blockWishes(scene: Scene, blocks: readonly Block[]): LabelWish[] {
  const { data, font } = scene;
  const stacks = new Map<string, Block[]>();
  for (const block of blocks) {
    const key = `${block.axis.index}:${block.side.x * block.axis.n.x + block.side.y * block.axis.n.y >= 0}`;
    stacks.set(key, [...(stacks.get(key) ?? []), block]);
  }
  const texts = new Map<string, Block[]>();
  for (const stack of stacks.values()) {
    const outermost = stack.reduce((a, b) => (b.base > a.base ? b : a));
    const text = [...stack]
      .sort((a, b) => b.base - a.base)
      .map((block) => blockText(block.load, data))
      .join(', ');
    texts.set(text, [...(texts.get(text) ?? []), outermost]);
  }
  return [...texts].map(([text, same], i) => {
    const high = ({ axis }: Block) => axis.a.y + axis.b.y;
    const sorted = [...same].sort((p, q) => Math.round(q.axis.drawn - p.axis.drawn) || high(p) - high(q));
    const places = sorted.slice(0, 4).flatMap((block) =>
      [0.5, 0.3, 0.7, 0.1, 0.9].flatMap((share) => {
        const on = along(block.axis, block.load.from + (block.load.to - block.load.from) * share);
        const top = plus(on, block.side, block.base + block.h1 + (block.h2 - block.h1) * share);
        const inside = plus(on, block.side, -(Math.abs(block.side.x) * textWidth(text, font) * 0.5 + font));
        const outside = around(top, block.side, text, font, 4).slice(0, 3);
        return Math.abs(block.side.x) > 0.7 ? [...outside, { at: inside }] : outside;
      }),
    );
    return { key: `q-${i}`, text, className: 'd-load-text', size: font, places, must: i < (scene.large ? 4 : 1) };
  });
}

function blockText(load: Distributed, data: DrawingData): string {
  const [q1, q2] = [Math.abs(load.q1), Math.abs(load.q2)];
  const even = Math.abs(q1 - q2) < 1e-6 * Math.max(q1, q2);
  const value = even
    ? words(q1, 'lineLoad', data)
    : `${formatQuantity(q1, 'lineLoad', data.units)} to ${words(q2, 'lineLoad', data)}`;
  return `${load.case} ${value}${load.axes === 'projected' ? (load.direction === 'y' ? ' on plan' : ' on height') : ''}`;
}

/** "75.1 kN ↑" and "62.8 kN →" beside or under each support, together; on a small view of many, the upright ones. */
function reactionWishes(scene: Scene, result: DrawingResult): LabelWish[] {
  const { data, paper, font, large, support: size } = scene;
  const largest = Math.max(...result.reactions.flatMap((one) => [Math.abs(one.Fx), Math.abs(one.Fy)]), 1e-6);
  const few = large || data.supports.length <= 3;
  return data.supports.flatMap((support, i) => {
    const [node, reaction] = [data.nodes[support.node], result.reactions[i]];
    if (!node || !reaction) return [];
    const p = paper.at(node.x, node.y);
    const show = (value: number) => Math.abs(value) > largest * 1e-4;
    const rows = [
      show(reaction.Fy) ? `${words(Math.abs(reaction.Fy), 'force', data)} ${reaction.Fy > 0 ? '↑' : '↓'}` : null,
      few && show(reaction.Fx) ? `${words(Math.abs(reaction.Fx), 'force', data)} ${reaction.Fx > 0 ? '→' : '←'}` : null,
      few && show(reaction.Mz) ? words(Math.abs(reaction.Mz), 'moment', data) : null,
    ].filter((row): row is string => row !== null);
    if (rows.length === 0) return [];
    const text = rows.join('\n');
    const ground = awayFrom(data, support);
    const [w, h] = [textWidth(text, font) / 2, textHeight(text, font) / 2];
    const sides = Math.abs(ground.x) > 0.7 ? [Math.sign(ground.x), -Math.sign(ground.x)] : [1, -1];
    const clear = size * (Math.abs(ground.x) > 0.7 ? 1.9 : 1.2) + 4;
    const beside = (lift: number) => sides.map((side) => ({ at: { x: p.x + side * (w + clear), y: p.y + lift } }));
    const below = { at: { x: p.x, y: p.y + Math.max(ground.y, 0) * size * 1.9 + h + 3 } };
    const corners = sides.map((side) => ({ at: { x: p.x + side * (w + 4), y: p.y - size - h } }));
    const places = few ? [...beside(-h - 1), ...beside(h), below, ...corners] : [below, ...beside(-h - 1), ...beside(h)];
    return [{ key: `r-${i}`, text, className: 'd-reaction', size: font, places, must: data.supports.length <= 4 }];
  });
}

function besides(data: DrawingData, result: DrawingResult): string[] {
  const out: string[] = [];
  if (result.loads.some((one) => one.kind === 'distributed' && one.selfWeight)) out.push('self-weight acts too');
  const warm = result.loads.filter((one) => one.kind === 'temperature');
  const sizes = new Set(
    warm.map((one) =>
      one.kind === 'temperature'
        ? `${words(one.dT, 'temperature', data)}${one.dTAcross !== 0 ? `, ${words(one.dTAcross, 'temperature', data)} across` : ''}`
        : '',
    ),
  );
  if (warm.length > 0)
    out.push(`temperature ${[...sizes].slice(0, 3).join('; ')} on ${warm.length} ${warm.length === 1 ? 'member' : 'members'}`);
  for (const load of result.loads) {
    if (load.kind !== 'settlement') continue;
    const parts = [
      load.dx !== null ? `${words(load.dx, 'displacement', data)} in x` : null,
      load.dy !== null ? `${words(load.dy, 'displacement', data)} in y` : null,
      load.rz !== null ? `${words(load.rz, 'rotation', data)}` : null,
    ].filter(Boolean);
    out.push(`settlement at ${data.nodes[load.node]?.id ?? '?'}: ${parts.join(', ')}`);
  }
  return out;
}
