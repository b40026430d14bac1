import type { DrawingData, DrawingResult } from './drawing-data';
import { around, placeLabels, textWidth, type LabelWish, type PlacedLabel } from './labels';
import { arrow, turn } from './load-arrows';
import { blockPath, blocksOf, corner } from './load-blocks';
import { blockWishes, reactionWishes } from './load-labels';
import { heads, pointed, turning } from './load-points';
import { besides } from './load-words';
import { plus } from './paper';
import { nodeWishes, setScene, slackWishes, type Scene } from './scene';

export interface LoadsPlan {
  readonly scene: Scene;
  readonly arrows: readonly { readonly key: string; readonly d: string; readonly className: string }[];
  readonly labels: readonly PlacedLabel[];
  /** Said in the caption rather than drawn. */
  readonly besides: readonly string[];
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
  pointed(data, result, axes, paper.at).forEach(({ at, force, text, standsFor }, i) => {
    const inward = { x: -force.x, y: -force.y };
    const tail = plus(at, inward, tall * 1.25);
    taken.line(tail, at);
    arrows.push({ key: `p${i}`, d: arrow(tail, plus(at, inward, 3), 5), className: 'd-load d-load-point' });
    // a small view has no room for the many of them: their sizes are said beside it
    if (standsFor && !large) return;
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
  wishes.push(...slackWishes(scene, result.slack));
  return { scene, arrows, labels: placeLabels(wishes, taken), besides: said };
}
