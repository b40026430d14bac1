import { formatQuantity } from '@/lib/units/format';
import { fromSI, toSI, unitLabel } from '@/lib/units/batch-unit';
import type { DrawingData, DrawingResult } from './drawing-data';
import { around, placeLabels, type LabelWish, type PlacedLabel } from './labels';
import { along, valueAt, type MemberAxis } from './member-axis';
import { line, path, type Point } from './paper';
import { memberWishes, nodeWishes, setScene, slackWishes, type Scene } from './scene';

export type Force = 'N' | 'V' | 'M';
const forceQuantity = { N: 'force', V: 'force', M: 'moment' } as const;

export interface DiagramPlan {
  readonly scene: Scene;
  readonly shapes: readonly {
    readonly member: number;
    readonly fill: string;
    readonly outline: string;
    readonly ordinates: string;
  }[];
  readonly dots: readonly Point[];
  readonly labels: readonly PlacedLabel[];
  /** A length of paper and the value it stands for; null where everything is zero. */
  readonly bar: { readonly length: number; readonly text: string } | null;
}

/**
 * N, V or M of every member, square to it: N and V towards local +y where positive, M towards the local −y face where
 * positive, which is the tension side. Straight between samples, the extremes among them.
 */
export function planDiagram(
  data: DrawingData,
  result: DrawingResult,
  force: Force,
  width: number,
  height: number,
  large: boolean,
): DiagramPlan {
  const sign = force === 'M' ? -1 : 1;
  const most = Math.max(
    0,
    ...result.lines.map((one) => Math.max(Math.abs(one.extremes[force].max), Math.abs(one.extremes[force].min))),
  );
  const flat = most < 1e-9;
  const tall = (axes: readonly MemberAxis[]) => tallest(axes, height, large);
  const scene = setScene(data, width, height, large, (axes) => {
    const k = flat ? 0 : tall(axes) / most;
    return axes.flatMap((axis) => {
      // figures are wider than they are high
      const room = large ? 16 + 22 * Math.abs(axis.n.x) : 4;
      const one = result.lines[axis.index];
      if (!one) return [];
      return one.x.flatMap((x, i) => {
        const off = sign * (one[force][i] ?? 0) * k;
        const p = along(axis, x, off + Math.sign(off) * (Math.abs(off) > 8 ? room : 0));
        return [p];
      });
    });
  });
  const k = flat ? 0 : tall(scene.axes) / most;
  // a slack member carries nothing: a line of zeros would hide its dashes
  const carrying = scene.axes.filter((axis) => !result.slack.includes(axis.index));
  const shapes = flat ? [] : carrying.map((axis) => shape(axis, result, force, sign * k, scene));
  const { wishes, dots } = flat ? { wishes: [], dots: [] } : extremeWishes(scene, result, force, sign * k, most);
  const must = wishes.slice(0, 1);
  const labels = placeLabels(
    [
      ...must,
      ...slackWishes(scene, result.slack),
      ...(large ? nodeWishes(scene) : []),
      ...wishes.slice(1),
      ...(large ? memberWishes(scene, result.slack) : []),
    ],
    scene.taken,
  );
  return { scene, shapes, dots, labels, bar: flat ? null : scaleBar(k, force, data.units) };
}

/** The largest ordinate, px: a third of a usual member so that floors stay apart, within bounds of the paper. */
function tallest(axes: readonly MemberAxis[], height: number, large: boolean): number {
  const lengths = axes.map((axis) => axis.drawn).sort((a, b) => a - b);
  const usual = lengths[Math.floor(lengths.length / 2)] ?? 100;
  return Math.max(large ? 18 : 10, Math.min(usual * 0.42, height * 0.19));
}

function shape(axis: MemberAxis, result: DrawingResult, force: Force, k: number, scene: Scene): DiagramPlan['shapes'][number] {
  const one = result.lines[axis.index]!;
  const outline = one.x.map((x, i) => along(axis, x, (one[force][i] ?? 0) * k));
  const closed = [axis.a, ...outline, axis.b];
  scene.taken.lines(closed);
  const count = Math.floor(axis.drawn / 11);
  let ordinates = '';
  for (let i = 1; i <= count; i++) {
    const x = (axis.length * i) / (count + 1);
    const off = valueAt(one, force, x) * k;
    if (Math.abs(off) > 1.5) ordinates += line(along(axis, x), along(axis, x, off));
  }
  return { member: axis.index, fill: path(closed, true), outline: path(closed), ordinates };
}

function extremeWishes(
  scene: Scene,
  result: DrawingResult,
  force: Force,
  k: number,
  most: number,
): { wishes: LabelWish[]; dots: Point[] } {
  const { data, axes, font, large } = scene;
  const found = axes.flatMap((axis) => {
    const extreme = result.lines[axis.index]?.extremes[force];
    if (!extreme) return [];
    const both = [
      { value: extreme.max, x: extreme.maxAt },
      { value: extreme.min, x: extreme.minAt },
    ];
    const same = Math.abs(extreme.max - extreme.min) < 1e-6 * most;
    return (same ? [{ value: extreme.max, x: axis.length / 2 }] : both).map((one) => ({ ...one, axis }));
  });
  const worth = found
    .filter((one) => Math.abs(one.value) > most * (large ? 0.06 : 0.25))
    .sort((p, q) => Math.abs(q.value) - Math.abs(p.value));
  const kept = worth.slice(0, large ? 40 : 4);
  const dots: Point[] = [];
  const tips: { tip: Point; text: string }[] = [];
  const wishes = kept.flatMap(({ value, x, axis }, i): LabelWish[] => {
    const tip = along(axis, x, value * k);
    const out = Math.sign(value * k) || 1;
    dots.push(tip);
    const text = formatQuantity(value, forceQuantity[force], data.units);
    // two members that run on straight share their tip: one figure is enough
    if (tips.some((one) => one.text === text && Math.hypot(one.tip.x - tip.x, one.tip.y - tip.y) < 12)) return [];
    tips.push({ tip, text });
    const wish: LabelWish = {
      key: `extreme-${axis.index}-${i}`,
      text,
      className: Math.abs(value) > most * (1 - 1e-6) ? 'd-extreme d-governing' : 'd-extreme',
      size: font,
      places: around(tip, { x: axis.n.x * out, y: axis.n.y * out }, text, font, 5),
      must: i === 0,
      from: tip,
    };
    return [wish];
  });
  return { wishes, dots };
}

/** 1, 2 or 5 × 10ⁿ of the page's unit, about 40 px long. */
function scaleBar(k: number, force: Force, units: DrawingData['units']): DiagramPlan['bar'] {
  const quantity = forceQuantity[force];
  const wanted = fromSI(40 / k, quantity, units);
  const power = 10 ** Math.floor(Math.log10(wanted));
  const value = [5, 2, 1].map((one) => one * power).find((one) => one <= wanted * 1.3) ?? power;
  const text = `${Number(value.toPrecision(3))} ${unitLabel(quantity, units)}`;
  return { length: toSI(value, quantity, units) * k, text };
}
