import { expect, it } from 'vitest';
import { shownCombinations } from '@/lib/combinations/shown-combinations';
import { readSheets, sound } from '@/lib/intake/sheets-of';

it('shows each combination once: listed or by its clause, and of how many frames it is', () => {
  const sheets = sound();
  sheets.Setup.push(['combination set', 'ASCE 7-22 LRFD']);
  sheets['Load cases'] = [['case', 'kind', 'frame'], ['dead', 'dead', null], ['wind', 'wind', 'F2']]; // prettier-ignore
  sheets['Combinations'] = [['combination', 'purpose', 'dead'], ['mine', 'strength', 1.1]]; // prettier-ignore
  const { frames, settings } = readSheets(sheets);
  const shown = shownCombinations(frames.flatMap(({ frame }) => frame ?? []), settings.combinationSet); // prettier-ignore
  expect(shown.slice(0, 3)).toEqual([
    { name: 'mine', purpose: 'strength', terms: [{ case: 'dead', factor: 1.1 }], clause: null, frames: 2 },
    { name: '1.4 dead', purpose: 'strength', terms: [{ case: 'dead', factor: 1.4 }], clause: 'ASCE 7-22 2.3.1 (1a)', frames: 2 },
    { name: '1.0 dead (service)', purpose: 'service', terms: [{ case: 'dead', factor: 1 }], clause: 'ASCE 7-22 appendix C, common practice', frames: 2 },
  ]); // prettier-ignore
  expect(shown.filter(({ frames: count }) => count === 1).map(({ name }) => name)).toEqual([
    '1.2 dead + 1.0 wind',
    '0.9 dead + 1.0 wind',
    '1.0 dead + 1.0 wind (service)',
  ]);
});

it('shows what is only listed as listed, and counts frames that share their lists', () => {
  const sheets = sound();
  sheets['Combinations'] = [['combination', 'purpose', 'dead', 'wind'], ['C1', 'strength', 1.35, '±1.5']]; // prettier-ignore
  const { frames } = readSheets(sheets);
  const read = frames.flatMap(({ frame }) => frame ?? []);
  const [first] = read;
  const again = first ? [...read, { ...first, cases: [...first.cases] }] : read;
  expect(shownCombinations(again, null).map(({ name, clause, frames: of }) => [name, clause, of])).toEqual([
    ['C1 (+)', null, 3],
    ['C1 (−)', null, 3],
  ]);
  expect(shownCombinations([], 'EN 1990 6.10')).toEqual([]);
});
