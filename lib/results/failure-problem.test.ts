import { describe, expect, it } from 'vitest';
import type { InputRow, SheetRead } from '@/lib/intake/intake';
import type { Problem } from '@/lib/problems/problem';
import { problemsWithFailures } from '@/lib/results/failure-problem';
import type { Failure } from '@/lib/results/result';

const sheet = (name: string, headings: string[]): SheetRead => ({
  name, file: 'sheds.xlsx', known: name, headingRow: 2, rows: 0,
  headings: headings.map((text, i) => ({ text, cell: `${'ABCDEF'[i]}2`, known: text.toLowerCase() })),
}); // prettier-ignore
const row = (name: string, at: number, ...cells: (string | null)[]): InputRow => ({ sheet: name, row: at, cells });
const note = (sheetName: string, at: number): Problem => ({
  severity: 'note', code: 'text-number', sheet: sheetName, file: 'sheds.xlsx', row: at, column: 'x', cell: `C${at}`, frames: [],
  found: '1', message: 'read as a number', stopsAll: false,
}); // prettier-ignore

const intake = {
  sheets: [
    sheet('Nodes', ['Frame', 'Node', 'x']),
    sheet('Supports', ['Node', 'Frame']),
    sheet('Members', ['Frame', 'Start', 'End']),
  ],
  rows: [
    row('Nodes', 1, 'f1'),
    row('Nodes', 3, 'F1', 'A', '0'),
    row('Supports', 3, 'A', 'F2'),
    row('Supports', 4, 'A', ' f1 '),
    row('Supports', 5, 'B', '7.0'),
    row('Members', 3, 'F1', 'A', 'B'),
    row('Members', 4, 'F1', 'C', 'D'),
  ],
  problems: [note('Nodes', 3), note('Supports', 3), note('Supports', 5)],
};
const mechanism: Failure = { code: 'mechanism', message: 'node D can slide sideways', node: 'D' };

describe('what the analysis finds wrong', () => {
  it('stands at the frame’s first support, between the problems of the rows around it', () => {
    const problems = problemsWithFailures(intake, [{ frame: 'F1', failure: mechanism }]);
    expect(problems.map((p) => `${p.code} ${p.cell}`)).toEqual([
      'text-number C3',
      'text-number C3',
      'mechanism B4',
      'text-number C5',
    ]);
    expect(problems[2]).toMatchObject({
      severity: 'error',
      sheet: 'Supports',
      row: 4,
      column: 'Frame',
      frames: ['F1'],
      found: ' f1 ',
    });
  });

  it('finds a frame whose id is a number however it is written', () => {
    const problems = problemsWithFailures(intake, [{ frame: '7', failure: mechanism }]);
    expect(problems.find((p) => p.code === 'mechanism')?.cell).toBe('B5');
  });

  it('stands at the member that hangs loose', () => {
    const loose: Failure = { code: 'not-connected', message: 'node D is not held', node: 'D' };
    expect(problemsWithFailures(intake, [{ frame: 'F1', failure: loose }]).at(-1)).toMatchObject({
      sheet: 'Members',
      cell: 'A4',
    });
  });

  it('is told without a cell where the frame has none of its own', () => {
    const problems = problemsWithFailures(intake, [{ frame: 'F9', failure: mechanism }]);
    expect(problems[0]).toMatchObject({ code: 'mechanism', sheet: null, cell: null, frames: ['F9'] });
  });

  it('stands at a row for all frames where the frame has none of its own, and at Frames where no other row names it', () => {
    const forAll = { ...intake, rows: [...intake.rows, row('Supports', 6, 'B', '*')] };
    const problems = problemsWithFailures(forAll, [
      { frame: 'F9', failure: mechanism },
      { frame: 'F8', failure: mechanism },
      { frame: 'F1', failure: mechanism },
    ]);
    const found = problems.filter((p) => p.code === 'mechanism');
    expect(found.map((p) => [p.cell, p.frames])).toEqual([['B4', ['F1']], ['B6', ['F9', 'F8']]]);
    const listed = { ...intake, sheets: [...intake.sheets, sheet('Frames', ['Frame'])], rows: [row('Frames', 3, 'F9')] };
    expect(problemsWithFailures(listed, [{ frame: 'F9', failure: mechanism }]).at(-1)).toMatchObject({ sheet: 'Frames', cell: 'A3' });
  }); // prettier-ignore

  it('names a cell once, with every frame it stops', () => {
    const failures = [{ frame: 'F1', failure: mechanism }, { frame: 'f1', failure: mechanism }]; // prettier-ignore
    expect(problemsWithFailures(intake, failures).filter((p) => p.code === 'mechanism')).toMatchObject([
      { frames: ['F1', 'f1'] },
    ]);
  });

  it('is told once, however often it is asked for', () => {
    const failures = [{ frame: 'F1', failure: mechanism }];
    const problems = problemsWithFailures(intake, failures);
    expect(problemsWithFailures({ ...intake, problems }, failures)).toEqual(problems);
  });

  it('leaves a failed certificate to the frame’s reasons', () => {
    const failed: Failure = { code: 'not-solved', message: 'residual 1e-3', node: null };
    expect(problemsWithFailures(intake, [{ frame: 'F1', failure: failed }])).toEqual(intake.problems);
  });
});
