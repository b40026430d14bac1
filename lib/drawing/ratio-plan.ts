import { formatRatio } from '@/lib/units/format';
import type { Verdict } from '@/lib/results/result';
import type { DrawingData } from './drawing-data';
import { placeLabels, textWidth, type LabelWish, type PlacedLabel } from './labels';
import { along, type MemberAxis } from './member-axis';
import { line, path, type Point } from './paper';
import { nodeWishes, setScene, type Scene } from './scene';

export interface RatioPlan {
  readonly scene: Scene;
  readonly fills: readonly { readonly key: string; readonly verdict: Verdict; readonly d: string }[];
  /** Level lines at the fill's edge, and the two thin lines of the limit. */
  readonly levels: readonly { readonly key: string; readonly verdict: Verdict; readonly d: string }[];
  readonly limits: string;
  readonly labels: readonly PlacedLabel[];
  /** The fill follows the ratio along each member; else each is filled to its governing ratio throughout. */
  readonly follows: boolean;
}

/**
 * Two thin lines along each member are the limit; ink fills between them to the ratio, hatched from the near limit,
 * red where it bursts through. Members stop short of their nodes, so that corners stay clear.
 */
export function planRatio(data: DrawingData, width: number, height: number, large: boolean): RatioPlan {
  const half = (axes: readonly MemberAxis[]) => {
    const lengths = axes.map((axis) => axis.drawn).sort((a, b) => a - b);
    return Math.max(3, Math.min(large ? 15 : 8, (lengths[Math.floor(lengths.length / 2)] ?? 100) * 0.09));
  };
  const scene = setScene(data, width, height, large, (axes) => {
    const off = half(axes) * 1.3;
    return axes.flatMap((axis) => [-off, off].flatMap((side) => [along(axis, 0, side), along(axis, axis.length, side)]));
  });
  const w = half(scene.axes);
  const lines = data.chosen?.lines ?? [];
  const follows = lines.length > 0 && lines.every((one) => one.ratio !== null);
  const fills: { key: string; verdict: Verdict; d: string }[] = [];
  const levels: { key: string; verdict: Verdict; d: string }[] = [];
  let limits = '';
  for (const axis of scene.axes) {
    const member = data.members[axis.index]!;
    const clear = Math.min(w * 1.25, axis.drawn * 0.2);
    const trim = (clear / axis.drawn) * axis.length;
    const [from, to] = [trim, axis.length - trim];
    for (const s of [-w, w]) {
      limits += line(along(axis, from, s), along(axis, to, s));
      scene.taken.line(along(axis, from, s), along(axis, to, s));
    }
    const ratios = follows ? lines[axis.index] : undefined;
    const stretches =
      ratios !== undefined && ratios.ratio !== null
        ? follow(ratios.x, ratios.ratio, from, to, data.nearLimit)
        : [{ verdict: member.verdict, points: [from, to].map((x) => ({ x, ratio: member.ratio ?? 1 })) }];
    stretches.forEach(({ verdict, points }, i) => {
      const edge = (s: number): Point[] => points.map((p) => along(axis, p.x, s * Math.min(p.ratio, 1.6) * w));
      fills.push({ key: `${axis.index}-${i}`, verdict, d: path([...edge(1), ...edge(-1).reverse()], true) });
      if (verdict !== 'not checked') levels.push({ key: `${axis.index}-${i}`, verdict, d: path(edge(1)) + path(edge(-1)) });
    });
  }
  const labels = placeLabels([...ratioWishes(scene, w), ...(large ? nodeWishes(scene) : [])], scene.taken);
  return { scene, fills, levels, limits, labels, follows };
}

interface Stretch {
  readonly verdict: Verdict;
  readonly points: readonly { readonly x: number; readonly ratio: number }[];
}

/** Cuts a ratio line where it crosses the near limit and 1, so that each stretch has one look. */
function follow(xs: readonly number[], ratios: readonly number[], from: number, to: number, near: number): Stretch[] {
  const verdictOf = (ratio: number): Verdict => (ratio > 1 ? 'over' : ratio >= near ? 'near' : 'within');
  const points: { x: number; ratio: number }[] = [];
  for (let i = 0; i < xs.length; i++) {
    const [x, ratio] = [xs[i]!, ratios[i] ?? 0];
    const before = points[points.length - 1];
    if (before && x > before.x) {
      for (const level of [near, 1]) {
        if ((before.ratio - level) * (ratio - level) < 0) {
          points.push({ x: before.x + ((x - before.x) * (level - before.ratio)) / (ratio - before.ratio), ratio: level });
        }
      }
    }
    points.push({ x, ratio });
  }
  const inside = points.filter((p) => p.x >= from && p.x <= to).sort((p, q) => p.x - q.x);
  const stretches: { verdict: Verdict; points: { x: number; ratio: number }[] }[] = [];
  for (let i = 1; i < inside.length; i++) {
    const [p, q] = [inside[i - 1]!, inside[i]!];
    const verdict = verdictOf((p.ratio + q.ratio) / 2);
    const last = stretches[stretches.length - 1];
    if (last && last.verdict === verdict) last.points.push(q);
    else stretches.push({ verdict, points: [p, q] });
  }
  return stretches;
}

/** The worst members by name and ratio, beside them. */
function ratioWishes(scene: Scene, w: number): LabelWish[] {
  const { data, axes, font, large } = scene;
  const order = { over: 3, 'not checked': 2, near: 1, within: 0 } as const;
  return axes
    .map((axis) => ({ axis, member: data.members[axis.index]! }))
    .sort((p, q) => order[q.member.verdict] - order[p.member.verdict] || (q.member.ratio ?? 0) - (p.member.ratio ?? 0))
    .slice(0, large ? 40 : 8)
    .map(({ axis, member }, i) => {
      const text = `${member.id} ${member.ratio === null ? 'not checked' : formatRatio(member.ratio, data.nearLimit)}`;
      const [hw, hh] = [textWidth(text, font) / 2, font / 2];
      const places = [0.5, 0.35, 0.65, 0.2, 0.8].flatMap((share) =>
        [1, -1].map((s) => {
          const off = w * 1.25 + 4 + Math.abs(axis.n.x) * hw + Math.abs(axis.n.y) * hh;
          return { at: along(axis, axis.length * share, s * off) };
        }),
      );
      return {
        key: `ratio-${axis.index}`,
        text,
        className: `d-ratio d-ratio-${member.verdict.replace(' ', '-')}`,
        size: font,
        places,
        must: i === 0,
      };
    });
}
