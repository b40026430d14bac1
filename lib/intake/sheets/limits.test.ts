import { describe, expect, it, test } from 'vitest';
import { lines, readSheets, sound, type TestCell, type TestSheets, withCells } from '@/lib/intake/sheets-of';
import type { Limit } from '@/lib/model/frame';

const head = ['applies to', 'measure', 'direction', 'to node', 'ratio', 'absolute [mm]', 'combination', 'frame'];
type Row = Partial<
  Record<'applies to' | 'measure' | 'direction' | 'to node' | 'ratio' | 'absolute [mm]' | 'combination' | 'frame', TestCell>
>;
const withLimits = (...rows: Row[]): TestSheets => ({
  ...withCells({ 'Setup!B3': 'none' }),
  Limits: [head, ...rows.map((row) => head.map((h) => row[h as keyof Row] ?? null))],
});
const of = (sheets: TestSheets, frame = 1): readonly Limit[] | undefined => readSheets(sheets).frames[frame]?.frame?.limits;

describe('limits', () => {
  it('Setup’s ratios are rows for all', () => {
    expect(of(sound())).toEqual([
      { target: 'all', name: '*', measure: 'deflection', direction: null, toNode: null, ratio: 250, absolute_m: null, combination: null, namedFrame: false, source: 'Setup B3' },
    ]); // prettier-ignore
  });

  test.each<[string, Row, Partial<Limit>]>([
    ['a member', { 'applies to': 'bc', measure: 'deflection', ratio: 300 }, { target: 'member', name: 'BC', ratio: 300 }],
    ['a role', { 'applies to': 'Column', measure: 'sway', ratio: 150 }, { target: 'role', name: 'column' }],
    [
      'a node',
      { 'applies to': 'C', measure: 'displacement', 'absolute [mm]': 20, direction: 'x' },
      { target: 'node', name: 'C', absolute_m: 0.02, direction: 'x' },
    ],
    ['a place', { 'applies to': 'EAVES', measure: 'displacement', 'absolute [mm]': 20 }, { target: 'place', name: 'eaves' }],
    [
      'everything',
      { 'applies to': '*', measure: 'deflection', ratio: 200, 'absolute [mm]': 30 },
      { target: 'all', ratio: 200, absolute_m: 0.03 },
    ],
    [
      'two nodes',
      { 'applies to': 'B', 'to node': 'c', measure: 'spread', 'absolute [mm]': 10 },
      { target: 'node', name: 'B', toNode: 'C' },
    ],
    [
      'one combination',
      { 'applies to': '*', measure: 'deflection', ratio: 200, combination: 's1' },
      { combination: 'S1', namedFrame: false },
    ],
    [
      'one frame',
      { 'applies to': '*', measure: 'deflection', ratio: 200, frame: 'f2' },
      { namedFrame: true, source: 'Limits row 2' },
    ],
  ])('apply to %s', (_, row, expected) => {
    const sheets = withLimits(row);
    expect(lines(readSheets(sheets))).toEqual([]);
    expect(of(sheets)).toMatchObject([expected]);
  });

  it('a ratio may be typed as L/n', () => {
    expect(of(withLimits({ 'applies to': '*', measure: 'deflection', ratio: 'L/300' }))).toMatchObject([{ ratio: 300 }]);
    expect(lines(readSheets(withLimits({ 'applies to': '*', measure: 'deflection', ratio: 'L/0' })))).toEqual([
      'error not-positive Limits!E2 F1,F2',
    ]);
  });

  it('reach only frames that have what they apply to', () => {
    expect(of(withLimits({ 'applies to': 'BC', measure: 'deflection', ratio: 300 }), 0)).toEqual([]);
  });

  it('a combination with ± is limited in all its signs', () => {
    const sheets = withLimits({ 'applies to': '*', measure: 'deflection', ratio: 200, combination: 'S1' });
    sheets.Combinations = [
      ['combination', 'purpose', 'dead', 'wind'],
      ['S1', 'service', 1, '±1'],
    ];
    expect(of(sheets)?.map((l) => l.combination)).toEqual(['S1 (+)', 'S1 (−)']);
  });

  it('a sign may be typed as the keyboard has it', () => {
    const of1 = (combination: string): (string | null)[] | undefined => {
      const sheets = withLimits({ 'applies to': '*', measure: 'deflection', ratio: 200, combination });
      sheets.Combinations = [['combination', 'purpose', 'dead', 'wind'], ['S1', 'service', 1, '±1'], ['S2', 'service', '±1', '±1']];
      return of(sheets)?.map((l) => l.combination);
    };
    expect([of1('S1 (-)'), of1('s1(−)'), of1('S2 (+-)')]).toEqual([['S1 (−)'], ['s1 (−)'], ['S2 (+ −)']]);
  }); // prettier-ignore

  test.each<[string, Row[], string]>([
    [
      'a spread from a node to itself',
      [{ 'applies to': 'B', 'to node': 'b', measure: 'spread', 'absolute [mm]': 5 }],
      'error unknown-node Limits!D2 F1,F2',
    ],
    ['what no frame has', [{ 'applies to': 'purlins', measure: 'deflection', ratio: 200 }], 'error unknown-word Limits!A2 F1,F2'],
    ['a measure that is none', [{ 'applies to': '*', measure: 'droop', ratio: 200 }], 'error unknown-word Limits!B2 F1,F2'],
    ['neither ratio nor absolute', [{ 'applies to': '*', measure: 'deflection' }], 'error not-a-number Limits!E2 F1,F2'],
    [
      'a ratio of a displacement',
      [{ 'applies to': 'B', measure: 'displacement', ratio: 200 }],
      'error out-of-range Limits!E2 F1,F2',
    ],
    ['a ratio of zero', [{ 'applies to': '*', measure: 'deflection', ratio: 0 }], 'error not-positive Limits!E2 F1,F2'],
    [
      'a spread from one node',
      [{ 'applies to': 'B', measure: 'spread', 'absolute [mm]': 9 }],
      'error unknown-node Limits!D2 F1,F2',
    ],
    [
      'a combination that is none',
      [{ 'applies to': '*', measure: 'deflection', ratio: 200, combination: 'S9' }],
      'error unknown-word Limits!G2 F1,F2',
    ],
    [
      'a strength combination',
      [{ 'applies to': '*', measure: 'deflection', ratio: 200, combination: 'C1' }],
      'error unknown-word Limits!G2 F1,F2',
    ],
    [
      'equals that differ',
      [
        { 'applies to': 'beam', measure: 'deflection', ratio: 200 },
        { 'applies to': 'beam', measure: 'deflection', ratio: 300 },
      ],
      'error conflicting-row Limits!A3 F1,F2',
    ],
    [
      'a displacement without a direction beside its resultant',
      [
        { 'applies to': 'C', measure: 'displacement', 'absolute [mm]': 10 },
        { 'applies to': 'C', measure: 'displacement', 'absolute [mm]': 20, direction: 'resultant' },
      ],
      'error conflicting-row Limits!A3 F2',
    ],
    [
      'equals that agree',
      [
        { 'applies to': 'beam', measure: 'deflection', ratio: 200 },
        { 'applies to': 'beam', measure: 'deflection', ratio: 200 },
      ],
      'warning repeated-row Limits!A3 F1,F2',
    ],
  ])('%s', (_, rows, problem) => {
    expect(lines(readSheets(withLimits(...rows)))).toEqual([problem]);
  });

  it('a row for all beside Setup’s own ratio, with another figure, is an equal that differs', () => {
    const sheets = {
      ...sound(),
      Limits: [
        ['applies to', 'measure', 'ratio'],
        ['*', 'deflection', 360],
      ],
    };
    expect(lines(readSheets(sheets))).toEqual(['error conflicting-row Limits!A2 F1,F2']);
  });

  it('the sheet’s row for all stands in place of the office’s ratio', () => {
    const sheets = {
      ...sound(),
      Setup: [
        ['setting', 'value'],
        ['material', 'S275'],
      ],
      Limits: [
        ['applies to', 'measure', 'ratio'],
        ['*', 'deflection', 360],
      ],
    };
    const intake = readSheets(sheets, { office: { deflectionRatio: 200, swayRatio: 100 } });
    expect(lines(intake)).toEqual([]);
    expect(intake.frames[0]?.frame?.limits.map((l) => [l.measure, l.ratio, l.source])).toEqual([
      ['deflection', 360, 'Limits row 2'],
      ['sway', 100, 'office'],
    ]);
  });
});
