import { describe, expect, it } from 'vitest';
import type { Verdict } from '@/lib/results/result';
import { framesToSee, reasonWords, ruleWords, type FrameToList } from './sample-rule';

const hash = 'ab'.repeat(32);

function frame(index: number, ratio: number | null, more: Partial<FrameToList> = {}): FrameToList {
  const verdict: Verdict = ratio === null ? 'not checked' : ratio > 1 ? 'over' : ratio >= 0.9 ? 'near' : 'within';
  return { index, id: `F${index + 1}`, verdict, ratio, check: 'normal stress', family: null, parameters: {}, ...more };
}

/** All within, rising ratios. */
const plain = (n: number, more: (i: number) => Partial<FrameToList> = () => ({})): FrameToList[] =>
  Array.from({ length: n }, (_, i) => frame(i, 0.2 + (0.5 * i) / n, more(i)));
const kinds = (list: ReturnType<typeof framesToSee>, index: number) =>
  list.find((one) => one.index === index)?.reasons.map(reasonWords);

describe('the frames that a checker has to see', () => {
  it('are every over, not checked and near, worst first, in parts', () => {
    const frames = [frame(0, 0.95), frame(1, 1.2), frame(2, null), frame(3, 1.4), frame(4, 0.9)];
    const list = framesToSee(frames, hash);
    expect(list.map(({ index, part }) => [index, part])).toEqual([
      [3, 'over'],
      [1, 'over'],
      [2, 'not checked'],
      [0, 'near'],
      [4, 'near'],
    ]);
    expect(kinds(list, 2)).toEqual(['not checked']);
  });

  it('hold the ends of each parameter that varies, of several the one with the largest ratio', () => {
    const frames = plain(40, (i) => ({
      family: 'shed',
      parameters: { span: [10, 20, 30, 30][i % 4]!, pitch: 0.1 },
    }));
    const list = framesToSee(frames, hash);
    expect(kinds(list, 36)).toContain('least span of shed');
    expect(kinds(list, 39)).toContain('greatest span of shed');
    expect(list.flatMap((one) => one.reasons.map(reasonWords)).filter((words) => /pitch/.test(words))).toEqual([]);
  });

  it('keep families apart, and leave frames without one out of it', () => {
    const families = plain(30, (i) => (i < 10 ? {} : { family: i < 20 ? 'shed' : 'bent', parameters: { height: i } }));
    const words = framesToSee(families, hash).flatMap((one) => one.reasons.map(reasonWords));
    expect(words.filter((one) => /height/.test(one)).sort()).toEqual([
      'greatest height of bent',
      'greatest height of shed',
      'least height of bent',
      'least height of shed',
    ]);
  });

  it('hold the worst frame of each check that governs, with every reason it is there for', () => {
    const frames = plain(20, (i) => ({ check: i % 2 === 0 ? 'sway' : 'normal stress' }));
    frames[19] = frame(19, 1.1);
    const list = framesToSee(frames, hash);
    expect(kinds(list, 19)).toEqual(['over', 'worst of normal stress']);
    expect(kinds(list, 18)).toEqual(['worst of sway']);
  });

  it.each([
    [240, 12],
    [1000, 50],
    [60, 5],
    [5, 5],
    [3, 3],
  ])('of %i frames within come to %i, those that are there for another reason counted', (n, least) => {
    const list = framesToSee(plain(n), hash);
    expect(list.length).toBe(least);
    expect(list.every(({ part }) => part === 'sample')).toBe(true);
  });

  it('still hold frames within where many are over', () => {
    const frames = Array.from({ length: 100 }, (_, i) => frame(i, i < 60 ? 1.2 : 0.5));
    expect(framesToSee(frames, hash).filter(({ part }) => part === 'sample')).toHaveLength(5);
  });

  it('are the same for the same input, and others are picked for another', () => {
    const frames = plain(400);
    const once = framesToSee(frames, hash);
    expect(framesToSee(frames, hash)).toEqual(once);
    const other = framesToSee(frames, 'cd'.repeat(32));
    expect(other.map(({ index }) => index)).not.toEqual(once.map(({ index }) => index));
  });

  it('of 20,000 frames are found at once', () => {
    const many = plain(20_000, (i) => ({ family: 'shed', parameters: { span: i % 77, height: i % 13, pitch: i % 7 } }));
    const started = performance.now();
    const list = framesToSee(many, hash);
    expect(list).toHaveLength(1000);
    expect(performance.now() - started).toBeLessThan(2000);
  });

  it('follow a rule that can be read', () => {
    expect(ruleWords).toMatch(
      /over, not checked or near.*least and the greatest.*worst frame of each check.*5 %.*at least five/s,
    );
  });

  it('are none where nothing is solved', () => {
    expect(framesToSee([], hash)).toEqual([]);
  });
});
