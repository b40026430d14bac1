import { expect, it } from 'vitest';
import { byReaction, pairReactions, reactionMoved } from './compare-reactions';

const at = (node: string, fx: number, fy: number, mz = 0) => ({ node, fx, fy, mz });
const of = { id: 'D1', index: 3 };

it('gives each support’s largest and smallest over all results, before and after, and the larger movement of both', () => {
  const pairs = pairReactions(
    of,
    [at('A', 10e3, 50e3), at('E', -10e3, 50e3), at('A', 4e3, -5e3)],
    [at('a', 12e3, 40e3), at('E', -10e3, 50e3), at('a', -8e3, -5e3)],
  );
  const [fx, fy, mz] = pairs;
  expect(fx).toMatchObject({ node: 'a', direction: 'Fx', before: { min: 4e3, max: 10e3 }, after: { min: -8e3, max: 12e3 }, change: -12e3 }); // prettier-ignore
  // of 50 kN, the frame's largest force
  expect(fx!.share).toBeCloseTo(12 / 50, 12);
  expect(fy).toMatchObject({ before: { min: -5e3, max: 50e3 }, after: { min: -5e3, max: 40e3 }, change: -10e3 });
  expect(mz).toMatchObject({ direction: 'Mz', change: 0, share: 0 });
  expect(pairs.filter((pair) => reactionMoved(pair, 0.01)).map(({ node, direction }) => node + direction)).toEqual([
    'aFx',
    'aFy',
  ]);
  expect(pairs.filter((pair) => reactionMoved(pair, 0.21)).map(({ node, direction }) => node + direction)).toEqual(['aFx']);
});

it('measures moments by the frame’s largest moment and not by its forces', () => {
  const [, , mz] = pairReactions(of, [at('A', 0, 1e6, 100)], [at('A', 0, 1e6, 150)]);
  expect(mz!.share).toBeCloseTo(50 / 150, 12);
});

it('says of a support that only one revision has that it moved, and puts it first', () => {
  const pairs = byReaction(pairReactions(of, [at('A', 1, 1)], [at('A', 2, 1), at('E', 1, 1)]));
  expect(pairs.slice(0, 3).map(({ node, before, share }) => [node, before, share])).toEqual(Array(3).fill(['E', null, null]));
  expect(pairs.slice(0, 3).every((pair) => reactionMoved(pair, 10))).toBe(true);
});
