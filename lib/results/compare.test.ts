import { describe, expect, it } from 'vitest';
import type { Verdict } from '@/lib/results/result';
import { byMovement, type ComparedFrame, type ComparedMember, criticalMoved, fits, hasMoved, massChange, pairFrames, pairMembers } from './compare'; // prettier-ignore
import { compareTotals } from './compare-totals';

let version = 100;
const frame = (id: string, verdict: Verdict, ratio: number | null, more: Partial<ComparedFrame> = {}): ComparedFrame => ({
  index: 0, id, version: (version += 1), status: 'solved', verdict, ratio, check: 'normal stress', subject: 'AB', section: 'IPE 300',
  combination: 'C1', criticalLoadFactor: 12, mass: 500, count: 2, ...more,
}); // prettier-ignore
const member = (id: string, verdict: Verdict, ratio: number | null): ComparedMember => ({
  id, role: 'rafter', section: 'IPE 300', check: 'normal stress', combination: 'C1', verdict, ratio,
}); // prettier-ignore

describe('frames of two revisions', () => {
  it('are matched by name without regard to case, in the later order, gone ones last', () => {
    const pairs = pairFrames(
      [frame('D1', 'within', 0.5), frame('D2', 'within', 0.5), frame('old', 'within', 0.5)],
      [frame('new', 'within', 0.5), frame('d2', 'within', 0.6), frame('D1', 'within', 0.5)],
    );
    expect(pairs.map(({ id, before, after }) => [id, before?.id, after?.id])).toEqual([
      ['new', undefined, 'new'],
      ['d2', 'D2', 'd2'],
      ['D1', 'D1', 'D1'],
      ['old', 'old', undefined],
    ]);
    expect(pairs.map((pair) => hasMoved(pair, 0.01))).toEqual([true, true, false, true]);
  });

  it('are carried over where their content is the same, and never where neither could be read', () => {
    const same = frame('D1', 'within', 0.5);
    const stopped = frame('D2', 'not checked', null, { version: null, status: 'stopped' });
    expect(pairFrames([same, stopped], [same, stopped]).map((pair) => pair.carried)).toEqual([true, false]);
  });

  it('became over, within, near or not checked, by verdict and not by ratio alone', () => {
    const [over, within, near, unchecked, moved, hair] = pairFrames(
      [frame('1', 'near', 0.998), frame('2', 'over', 1.2), frame('3', 'within', 0.8), frame('4', 'within', 0.8), frame('5', 'over', 1.1), frame('6', 'within', 0.5)],
      [frame('1', 'over', 1.001), frame('2', 'within', 0.8), frame('3', 'near', 0.95), frame('4', 'not checked', null), frame('5', 'over', 1.3), frame('6', 'within', 0.5 + 1e-12)],
    ); // prettier-ignore
    expect([over!.became, within!.became, near!.became, unchecked!.became, moved!.became]).toEqual([
      'over',
      'within',
      'near',
      'not checked',
      null,
    ]);
    expect([fits(over!, 'over', 1), fits(within!, 'within', 1), fits(near!, 'near', 1), fits(unchecked!, 'not-checked', 1)]).toEqual([true, true, true, true]); // prettier-ignore
    expect(unchecked!.change).toBeNull();
    expect(moved!.change).toBeCloseTo(0.2, 12);
    expect([fits(moved!, 'moved', 0.19), fits(moved!, 'moved', 0.21), fits(moved!, 'over', 0)]).toEqual([true, false, false]);
    expect(hair!.change).toBe(0);
  });

  it('moved, and did not stay, where the ratio has no end in one of both', () => {
    const [pair] = pairFrames([frame('1', 'over', 1.5)], [frame('1', 'over', Infinity)]);
    expect([pair!.change, fits(pair!, 'moved', 0.01)]).toEqual([Infinity, true]);
    expect(pairFrames([frame('1', 'over', Infinity)], [frame('1', 'over', Infinity)])[0]!.change).toBe(0);
  });

  it('stand with those that became over first, then by how much they moved', () => {
    const pairs = pairFrames(
      [frame('1', 'within', 0.5), frame('2', 'within', 0.9), frame('3', 'over', 1.2), frame('4', 'within', 0.1)],
      [frame('1', 'within', 0.6), frame('2', 'over', 1.01), frame('3', 'within', 0.6), frame('4', 'within', 0.7)],
    );
    expect(byMovement(pairs).map(({ id }) => id)).toEqual(['2', '3', '4', '1']);
  });

  it('have steel that changed by section or by number off, and none said where it is not known', () => {
    const [more, off, unknown] = pairFrames(
      [frame('1', 'within', 0.5), frame('2', 'within', 0.5), frame('3', 'within', 0.5, { mass: null })],
      [frame('1', 'within', 0.5, { mass: 450 }), frame('2', 'within', 0.5, { count: 3 }), frame('3', 'within', 0.5)],
    );
    expect([massChange(more!), massChange(off!), massChange(unknown!)]).toEqual([-100, 500, 0]);
  });

  it('have an α_cr that moved by a share of what it was, or came or went', () => {
    const [a, b, c] = pairFrames(
      [frame('1', 'within', 0.5), frame('2', 'within', 0.5), frame('3', 'within', 0.5)],
      [frame('1', 'within', 0.5, { criticalLoadFactor: 11 }), frame('2', 'within', 0.5, { criticalLoadFactor: null }), frame('3', 'within', 0.5)],
    ); // prettier-ignore
    expect([criticalMoved(a!, 0.05), criticalMoved(a!, 0.1), criticalMoved(b!, 0.1), criticalMoved(c!, 0)]).toEqual([true, false, true, false]); // prettier-ignore
  });

  it('are counted: verdicts before against after, steel, the lowest α_cr', () => {
    const kept = frame('0', 'over', 1.5);
    const totals = compareTotals(
      pairFrames(
        [kept, frame('1', 'within', 0.5), frame('2', 'over', 1.2, { criticalLoadFactor: 4 }), frame('3', 'near', 0.95), frame('gone', 'over', 2, { mass: null })],
        [kept, frame('1', 'over', 1.1), frame('2', 'near', 0.95), frame('3', 'near', 0.96, { count: 3, criticalLoadFactor: 3 })],
      ),
      0.05,
    ); // prettier-ignore
    expect(totals.frames).toEqual({ before: 5, after: 4, carried: 1, onlyBefore: 1, onlyAfter: 0 });
    expect(totals.became).toEqual({ over: 1, near: 1, within: 0, 'not checked': 0 });
    expect([totals.noLongerOver, totals.moved]).toEqual([1, 2]);
    expect(totals.verdicts).toEqual([
      [1, 1, 0, 0],
      [0, 1, 0, 0],
      [1, 0, 0, 0],
      [0, 0, 0, 0],
    ]);
    expect(totals.mass).toEqual({ before: 4000, after: 4500, unknownBefore: 1, unknownAfter: 0 });
    expect(totals.critical).toEqual({ before: { frame: '2', value: 4 }, after: { frame: '3', value: 3 }, moved: 2 });
  });
});

describe('members of a frame in two revisions', () => {
  const [pair] = pairFrames([frame('D1', 'within', 0.5)], [frame('D1', 'over', 1.1, { index: 7 })]);

  it('are matched by name', () => {
    const pairs = pairMembers(pair!, [member('AB', 'within', 0.5), member('BC', 'within', 0.4)], [member('ab', 'over', 1.1), member('BX', 'within', 0.3)]); // prettier-ignore
    expect(pairs.map(({ id, index, before, after, became }) => [id, index, before?.id, after?.id, became])).toEqual([
      ['ab', 7, 'AB', 'ab', 'over'],
      ['BX', 7, undefined, 'BX', null],
      ['BC', 7, 'BC', undefined, null],
    ]);
  });

  it('became not checked, and are not gone, where the frame has no results any more', () => {
    const pairs = pairMembers(pair!, [member('AB', 'within', 0.5)], []);
    expect(pairs.map(({ became, after }) => [became, after?.ratio])).toEqual([['not checked', null]]);
  });
});
