import { describe, expect, it } from 'vitest';
import { defaultSettings } from '@/lib/model/settings';
import { compareInputs, compareSettings, groupDifferences, type InputOf } from './compare-inputs';

type Cells = readonly (string | null)[];

/** An input of sheets whose first row is the heading; a heading is its own column where it is lower case. */
function input(
  sheets: Readonly<Record<string, readonly Cells[]>>,
  known: (name: string) => string | null = (name) => name,
): InputOf {
  const entries = Object.entries(sheets);
  return {
    sheets: entries.map(([name, [head = []]]) => ({
      name,
      known: known(name),
      headingRow: 1,
      headings: head.flatMap((text, i) =>
        text === null ? [] : [{ text, cell: `${String.fromCharCode(65 + i)}1`, known: text.replace(/ \[.*/, '') }],
      ),
    })),
    rows: entries.flatMap(([sheet, rows], part) =>
      rows.map((cells, i) => ({ part, sheet, row: i + 1, cells: JSON.stringify(cells) })),
    ),
  };
}

const head = ['frame', 'member', 'start', 'end', 'section'];
const row = (frame: string, member: string, section: string | null): Cells => [frame, member, 'A', 'B', section];

describe('inputs of two revisions', () => {
  it('are the same where rows only stand elsewhere', () => {
    const before = input({ Members: [head, row('D1', 'AB', 'IPE 300'), row('D1', 'BC', 'IPE 270')] });
    const after = input({ Members: [head, row('D1', 'BC', 'IPE 270'), row('D1', 'AB', 'IPE 300')] });
    expect(compareInputs(before, after)).toEqual([]);
  });

  it('differ by a cell, named by sheet, frame, member and heading, with its rows', () => {
    const before = input({ Members: [head, row('D1', 'AB', 'IPE 300'), row('D1', 'BC', 'IPE 270')] });
    const after = input({ Members: [head, row('D1', 'BC', 'IPE 330'), row('D1', 'AB', 'IPE 300')] });
    expect(compareInputs(before, after)).toEqual([
      { sheet: 'Members', where: 'D1, BC', what: 'section', before: 'IPE 270', after: 'IPE 330', rowBefore: 3, rowAfter: 2 },
    ]);
  });

  it('differ where a cell was blank, and by rows that only one has', () => {
    const before = input({ Members: [head, row('D1', 'AB', null), row('D1', 'X', 'IPE 100')] });
    const after = input({ Members: [head, row('D1', 'AB', 'IPE 300'), row('D1', 'Y', 'IPE 120')] });
    const found = compareInputs(before, after);
    expect(found.map(({ where, what, before: was, after: is }) => [where, what, was, is])).toEqual([
      ['D1, AB', 'section', null, 'IPE 300'],
      ['D1, Y', null, null, 'frame D1, member Y, start A, end B, section IPE 120'],
      ['D1, X', null, 'frame D1, member X, start A, end B, section IPE 100', null],
    ]);
  });

  it('tell one of two equal rows that was taken away', () => {
    const load = ['frame', 'case', 'node', 'Fy'];
    const before = input({ 'Node loads': [load, ['D1', 'snow', 'B', '-5'], ['D1', 'snow', 'B', '-5']] });
    const after = input({ 'Node loads': [load, ['D1', 'snow', 'B', '-5']] });
    expect(compareInputs(before, after).map(({ what, before: was, after: is }) => [what, was !== null, is])).toEqual([
      [null, true, null],
    ]);
  });

  it('are the same where columns only stand in another order, and say a heading whose unit changed', () => {
    const before = input({
      Nodes: [
        ['frame', 'node', 'x', 'y [m]'],
        ['D1', 'A', '0', '5'],
      ],
    });
    const after = input({
      Nodes: [
        ['node', 'frame', 'x', 'y [mm]'],
        ['A', 'D1', '0', '5'],
      ],
    });
    expect(compareInputs(before, after).map(({ where, before: was, after: is }) => [where, was, is])).toEqual([
      ['headings', 'y [m]', null],
      ['headings', null, 'y [mm]'],
    ]);
  });

  it('leave out sheets that took no part, and Setup, whose settings are compared as such', () => {
    const of = (value: string) => input({ Notes: [['note'], [value]], Setup: [['setting', 'value'], ['near limit', value]] }, (name) => (name === 'Notes' ? null : name)); // prettier-ignore
    expect(compareInputs(of('0.9'), of('0.8'))).toEqual([]);
    expect(compareSettings(defaultSettings, { ...defaultSettings, nearLimit: 0.8, title: 'Sheds' })).toEqual([
      { setting: 'title', before: 'none given', after: 'Sheds' },
      { setting: 'near limit', before: '0.90', after: '0.80' },
    ]);
  });

  it('are grouped: the same change of many rows is one line', () => {
    const rows = (section: string, n: number): Cells[] => Array.from({ length: n }, (_, i) => row(`D${i}`, 'AB', section));
    const found = compareInputs(
      input({ Members: [head, ...rows('IPE 300', 20), row('D30', 'X', 'IPE 80'), row('D31', 'X', 'IPE 80')] }),
      input({ Members: [head, ...rows('IPE 330', 20)] }),
    );
    expect(found).toHaveLength(22);
    expect(groupDifferences(found)).toEqual([
      { sheet: 'Members', what: 'section', before: 'IPE 300', after: 'IPE 330', cells: 20, where: ['D0, AB', 'D1, AB', 'D2, AB', 'D3, AB'] }, // prettier-ignore
      { sheet: 'Members', what: null, before: 'rows', after: null, cells: 2, where: ['D30, X', 'D31, X'] },
    ]);
  });
});
