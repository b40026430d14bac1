import type { DrawingResult } from './drawing-data';
import { awayFrom } from './ground-direction';
import { around, textHeight, textWidth, type LabelWish } from './labels';
import type { Block } from './load-blocks';
import { blockText, words } from './load-words';
import { along } from './member-axis';
import { plus } from './paper';
import type { Scene } from './scene';

/**
 * One text for each stack of loads, outermost first ("snow 5.22 kN/m on plan, dead 2.48 kN/m"), beyond the outermost; stacks
 * that say the same say it once, on the longest member.
 */
export function blockWishes(scene: Scene, blocks: readonly Block[]): LabelWish[] {
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

/** "75.1 kN ↑" and "62.8 kN →" beside or under each support, together; on a small view of many, the upright ones. */
export function reactionWishes(scene: Scene, result: DrawingResult): LabelWish[] {
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
