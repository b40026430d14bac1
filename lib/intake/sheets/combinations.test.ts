import { describe, expect, it, test } from 'vitest';
import { lines, readSheets, sound, type TestCell, type TestSheets } from '@/lib/intake/sheets-of';
import type { Combination } from '@/lib/model/frame';

const listed = (...rows: TestCell[][]): TestSheets => ({ ...sound(), Combinations: rows });
const wide = (...rows: TestCell[][]): TestSheets => listed(['combination', 'purpose', 'dead', 'wind'], ...rows);
const long = (...rows: TestCell[][]): TestSheets => listed(['combination', 'purpose', 'case', 'factor'], ...rows);
const of = (sheets: TestSheets, frame = 0): readonly Combination[] | undefined =>
  readSheets(sheets).frames[frame]?.frame?.combinations;

describe('combinations', () => {
  it('read the same in both forms', () => {
    const expected = [
      { name: 'C1', purpose: 'strength', terms: [{ case: 0, factor: 1.2 }, { case: 1, factor: -1 }] },
      { name: 'S1', purpose: 'service', terms: [{ case: 0, factor: 1 }] },
    ]; // prettier-ignore
    expect(of(wide(['C1', 'strength', 1.2, -1], ['S1', 'service', 1, null]))).toEqual(expected);
    expect(of(long(['C1', 'strength', 'dead', 1.2], ['C1', 'strength', 'wind', -1], ['S1', 'service', 'dead', 1]))).toEqual(
      expected,
    );
  });

  it('a purpose given once holds for the rows of its combination', () => {
    expect(of(long(['C1', 'strength', 'dead', 1], ['C1', null, 'wind', 1]))?.[0]?.terms).toHaveLength(2);
  });

  it('a heading matches its case as headings do, a unit behind it or not', () => {
    expect(of(listed(['combination', 'purpose', 'DEAD', 'Wind [-]'], ['C1', 'strength', 1, 1]))?.[0]?.terms).toHaveLength(2);
  });

  it('± makes all sign patterns', () => {
    expect(of(wide(['C1', 'strength', 1, '±1.5']))).toEqual([
      { name: 'C1 (+)', purpose: 'strength', terms: [{ case: 0, factor: 1 }, { case: 1, factor: 1.5 }] },
      { name: 'C1 (−)', purpose: 'strength', terms: [{ case: 0, factor: 1 }, { case: 1, factor: -1.5 }] },
    ]); // prettier-ignore
    expect(of(long(['C1', 'strength', 'dead', '±1'], ['C1', 'strength', 'wind', '±1']))?.map((c) => c.name)).toEqual([
      'C1 (+ +)',
      'C1 (+ −)',
      'C1 (− +)',
      'C1 (− −)',
    ]);
    expect(lines(readSheets(wide(['C1', 'strength', 1, '±1'])))).toEqual([]);
  });

  it('a service combination may not have the name of a direction, where there are directions', () => {
    const rows: TestCell[][] = [['C1', 'strength', 1, 1], ['c1 →', 'service', 1, null], ['C1 ← ←', 'service', 1, null]]; // prettier-ignore
    expect(lines(readSheets(wide(...rows)))).toEqual([]);
    const leaning = wide(...rows);
    leaning['Setup'] = [...(leaning['Setup'] ?? []), ['analysis', 'second order'], ['imperfections', 'AISC 360']];
    expect(lines(readSheets(leaning))).toEqual(['error conflicting-row Combinations!A3 F1,F2']);
  });

  it('none at all: every frame is at best not checked', () => {
    const { Combinations: _, ...sheets } = sound();
    const intake = readSheets(sheets);
    expect(intake.frames.map((f) => f.frame?.notChecked)).toEqual([['no combinations'], ['no combinations']]);
  });

  it('one with a case that nobody knows is left out everywhere and lowers the verdict', () => {
    const intake = readSheets(long(['C1', 'strength', 'dead', 1], ['C1', 'strength', 'snow', 1], ['C2', 'strength', 'dead', 1]));
    expect(lines(intake)).toEqual(['error combination-without-case Combinations!C3 F1,F2']);
    expect(intake.frames.map((f) => f.frame?.combinations.map((c) => c.name))).toEqual([['C2'], ['C2']]);
    expect(intake.frames[0]?.frame?.notChecked).toEqual(['combination C1 is left out: snow is no load case']);
  });

  it('a lost column leaves out only the combinations that use it', () => {
    const intake = readSheets(
      listed(
        ['combination', 'purpose', 'dead', 'wnd'],
        ['C1', 'strength', 1, 1],
        ['C2', 'strength', 1, 0],
        ['C3', 'strength', 1, null],
      ),
    );
    expect(intake.frames[0]?.frame?.combinations.map((c) => c.name)).toEqual(['C2', 'C3']);
    expect(intake.frames[0]?.frame?.notChecked).toEqual(['combination C1 is left out: wnd is no load case']);
  });

  it('rows that name a frame replace those for all', () => {
    const sheets = listed(
      ['combination', 'purpose', 'dead', 'frame'],
      ['C1', 'strength', 1, null],
      ['C1', 'strength', 1.1, 'F2'],
      ['C2', 'strength', 1.2, 'F2'],
    );
    expect(of(sheets, 0)?.map((c) => [c.name, c.terms[0]?.factor])).toEqual([['C1', 1]]);
    expect(of(sheets, 1)?.map((c) => [c.name, c.terms[0]?.factor])).toEqual([
      ['C1', 1.1],
      ['C2', 1.2],
    ]);
  });

  it('come in the order of the sheet, whichever frames they are for', () => {
    const sheets = listed(
      ['combination', 'purpose', 'dead', 'frame'],
      ['C2', 'strength', 1, 'F2'],
      ['C1', 'strength', 1, null],
      ['C3', 'strength', 1.2, 'F2'],
      ['C1', 'strength', 1.1, 'F2'],
    );
    expect(of(sheets, 1)?.map((c) => c.name)).toEqual(['C2', 'C1', 'C3']);
  });

  it('frames with the same cases share their combinations', () => {
    const [a, b] = readSheets(sound()).frames;
    expect(a?.frame?.combinations).toBe(b?.frame?.combinations);
    expect(a?.frame?.cases).toBe(b?.frame?.cases);
  });

  test.each<[string, TestSheets, string]>([
    [
      'purposes that differ',
      long(['C1', 'strength', 'dead', 1], ['C1', 'service', 'wind', 1]),
      'error conflicting-row Combinations!B3 F1,F2',
    ],
    ['a purpose that is none', wide(['C1', 'fire', 1, 1]), 'error unknown-word Combinations!B2 F1,F2'],
    ['no purpose', wide(['C1', null, 1, 1]), 'error unknown-word Combinations!B2 F1,F2'],
    [
      'a case twice in one',
      long(['C1', 'strength', 'dead', 1], ['C1', 'strength', 'dead', 1]),
      'error conflicting-row Combinations!C3 F1,F2',
    ],
    [
      'a combination twice in the wide form',
      wide(['C1', 'strength', 1, 1], ['C1', 'strength', 1, 1]),
      'error conflicting-row Combinations!A3 F1,F2',
    ],
    [
      'two columns for one case',
      listed(['combination', 'purpose', 'dead', 'Dead'], ['C1', 'strength', 1, 1]),
      'error conflicting-row Combinations!D1 –',
    ],
    [
      'both forms in one sheet',
      listed(['combination', 'purpose', 'case', 'factor', 'wind'], ['C1', 'strength', 'dead', 1, 1]),
      'error conflicting-row Combinations!E1 –',
    ],
    [
      'case without factor',
      listed(['combination', 'purpose', 'case'], ['C1', 'strength', 'dead']),
      'error missing-column Combinations!factor –',
    ],
    ['a factor that is none', wide(['C1', 'strength', 'one', 1]), 'error not-a-number Combinations!C2 F1,F2'],
    ['a blank factor in the long form', long(['C1', 'strength', 'dead', null]), 'error not-a-number Combinations!D2 F1,F2'],
    ['no name', wide([null, 'strength', 1, 1]), 'error missing-id Combinations!A2 F1,F2'],
  ])('%s', (_, sheets, problem) => {
    expect(lines(readSheets(sheets))).toEqual([problem]);
  });
});
