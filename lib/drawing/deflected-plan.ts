import { formatQuantity } from '@/lib/units/format';
import { unitLabel } from '@/lib/units/batch-unit';
import type { DrawingData, DrawingResult } from './drawing-data';
import { around, placeLabels, type LabelWish, type PlacedLabel } from './labels';
import { type MemberAxis } from './member-axis';
import { path, plus, type Point } from './paper';
import { nodeWishes, setScene, slackWishes, type Scene } from './scene';

export interface DeflectedPlan {
  readonly scene: Scene;
  /** The moved line of each member at a share (0–1) of the drawn movement. */
  readonly lines: (share: number) => readonly string[];
  readonly labels: readonly PlacedLabel[];
  /** Movements are drawn this many times their size; null where nothing moves. */
  readonly times: number | null;
}

/** The deflected line of every member, movements enlarged by a round factor, the largest ones named. */
export function planDeflected(
  data: DrawingData,
  result: DrawingResult,
  width: number,
  height: number,
  large: boolean,
): DeflectedPlan {
  const most = Math.max(0, ...result.lines.flatMap((one) => one.x.map((_, i) => Math.hypot(one.u[i] ?? 0, one.v[i] ?? 0))));
  const still = most < 1e-9;
  const wanted = Math.min(height * 0.13, large ? 54 : 26);
  const timesFor = (scale: number) => (still ? 0 : roundDown(wanted / (most * scale)));
  const moved = (axis: MemberAxis, scale: number, times: number, share: number): Point[] => {
    const one = result.lines[axis.index];
    if (!one) return [axis.a, axis.b];
    const k = times * share * scale;
    return one.x.map((x, i) =>
      plus(plus(plus(axis.a, axis.t, x * scale), axis.t, (one.u[i] ?? 0) * k), axis.n, (one.v[i] ?? 0) * k),
    );
  };
  const scene = setScene(data, width, height, large, (axes, paper) =>
    axes.flatMap((axis) => moved(axis, paper.scale, timesFor(paper.scale), 1)),
  );
  const { scale } = scene.paper;
  const times = timesFor(scale);
  const lines = (share: number) => scene.axes.map((axis) => path(moved(axis, scale, times, share)));
  for (const axis of scene.axes) scene.taken.lines(moved(axis, scale, times, 1));
  const wishes = still ? [] : [...bendingWish(scene, result, moved, times), ...movementWishes(scene, result, times)];
  return {
    scene,
    lines,
    labels: placeLabels([...wishes, ...(large ? nodeWishes(scene) : []), ...slackWishes(scene, result.slack)], scene.taken),
    times: still ? null : times,
  };
}

/** 1, 2, 5, 10 … not above the value. */
function roundDown(value: number): number {
  const power = 10 ** Math.floor(Math.log10(value));
  const step = [5, 2, 1].find((one) => one * power <= value * (1 + 1e-9)) ?? 1;
  return step * power;
}

/**
 * The member that bends most off the line between its moved ends, named where that is the largest movement on the sheet:
 * the nodes of a stiff bent hardly move while its beam sags.
 */
function bendingWish(
  { axes, data, paper, font }: Scene,
  result: DrawingResult,
  moved: (axis: MemberAxis, scale: number, times: number, share: number) => Point[],
  times: number,
): LabelWish[] {
  const bent = axes
    .flatMap((axis) => {
      const deflection = result.lines[axis.index]?.extremes.deflection;
      return deflection ? [{ axis, ...deflection }] : [];
    })
    .sort((p, q) => Math.abs(q.value) - Math.abs(p.value))[0];
  const node = Math.max(0, ...result.displacements.flatMap((one) => [Math.abs(one.ux), Math.abs(one.uy)]));
  if (!bent || Math.abs(bent.value) <= node) return [];
  const { axis, value, at } = bent;
  const xs = result.lines[axis.index]?.x ?? [];
  const nearest = xs.reduce((best, x, i) => (Math.abs(x - at) < Math.abs((xs[best] ?? 0) - at) ? i : best), 0);
  const point = moved(axis, paper.scale, times, 1)[nearest];
  if (!point) return [];
  const text = `${data.members[axis.index]?.id ?? ''} deflects ${formatQuantity(Math.abs(value), 'displacement', data.units)} ${unitLabel('displacement', data.units)}`;
  const out = Math.sign(value) || 1;
  const places = around(point, { x: axis.n.x * out, y: axis.n.y * out }, text, font, 7);
  return [{ key: 'bend', text, className: 'd-extreme', size: font, places, must: true, from: point }];
}

/** The largest movement along x and along y of any node, and on a large view the next ones too. */
function movementWishes(scene: Scene, result: DrawingResult, times: number): LabelWish[] {
  const { data, paper, font, large } = scene;
  const unit = unitLabel('displacement', data.units);
  const all = data.nodes.flatMap((node, i) => {
    const moved = result.displacements[i];
    if (!moved) return [];
    const at = paper.at(node.x + moved.ux * times, node.y + moved.uy * times);
    return [
      { node, at, value: moved.ux, word: 'x', away: { x: Math.sign(moved.ux) || 1, y: 0.2 } },
      { node, at, value: moved.uy, word: 'y', away: { x: 0.2, y: -Math.sign(moved.uy) || 1 } },
    ];
  });
  const largest = Math.max(...all.map((one) => Math.abs(one.value)), 0);
  const worth = all
    .filter((one) => Math.abs(one.value) > Math.max(largest * 0.05, 5e-5))
    .sort((p, q) => Math.abs(q.value) - Math.abs(p.value));
  const first = worth[0];
  const across = worth.find((one) => one.word !== first?.word);
  const chosen = large ? worth.slice(0, 12) : [first, across];
  return chosen.flatMap((one, i) => {
    if (!one) return [];
    const text = `${large ? '' : `${one.node.id} `}${formatQuantity(one.value, 'displacement', data.units)} ${unit} in ${one.word}`;
    return [
      {
        key: `move-${i}`,
        text,
        className: 'd-extreme',
        size: font,
        places: around(one.at, one.away, text, font, 7),
        must: i < 2,
        from: one.at,
      },
    ];
  });
}
