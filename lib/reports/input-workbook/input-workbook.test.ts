import { readFileSync } from 'node:fs';
import { basename } from 'node:path';
import { strToU8, unzipSync, zipSync } from 'fflate';
import { describe, expect, it } from 'vitest';
import { applyChanges } from '@/lib/changes/apply-changes';
import type { Change } from '@/lib/changes/change';
import type { InputFile, Intake } from '@/lib/intake/intake';
import { readIntake } from '@/lib/intake/read-intake';
import { inputRows, type StoredInput } from '@/lib/intake/rows/input-rows';
import { isOfFile, readRows } from '@/lib/intake/rows/read-rows';
import type { RawCell } from '@/lib/intake/files/raw-sheet';
import { readFiles } from '@/lib/intake/files/read-files';
import { inputWorkbook } from '@/lib/reports/input-workbook/input-workbook';

const sample = (path: string): InputFile => ({ name: basename(path), bytes: readFileSync(`samples/${path}`) });
const csv = (name: string, text: string): InputFile => ({ name, bytes: strToU8(text) });
const walkways = ['Combinations', 'Load cases', 'Member loads', 'Members', 'Nodes', 'Sections', 'Setup', 'Supports'];
const written = (input: StoredInput) => readIntake([inputWorkbook(input, 'sheds B')]);
const place = ({ severity, code, sheet, cell, frames, found }: Intake['problems'][number]) =>
  [severity, code, sheet, cell, frames, found].join(' ');
const changes: Change[] = [
  { kind: 'setting', setting: 'swayRatio', value: '150' },
  { kind: 'setting', setting: 'nearLimit', value: '0.85' },
];

describe('an input written out again', () => {
  it.each([
    'portal-sheds-240',
    'portal-sheds-240-saved-by-calc',
    'canopies-us-36',
    'messy',
    'brackets-150',
    'problems/not-supported',
  ])('gives the same frames and the same problems at the same cells: %s', async (name) => {
    const read = await readIntake([sample(`${name}.xlsx`)]);
    const again = await written(read);
    expect(again.frames).toEqual(read.frames);
    expect(again.problems.map(place)).toEqual(read.problems.map(place));
    expect(again.rows).toEqual(read.rows);
  });

  it('gives the same frames of text files, which become one workbook', async () => {
    const read = await readIntake(walkways.map((name) => sample(`walkways-csv/${name}.csv`)));
    const again = await written(read);
    expect(again.frames).toEqual(read.frames);
    expect(again.settings).toEqual(read.settings);
    expect(again.sheets.map(({ name }) => name)).toEqual(read.sheets.map(({ name }) => name));
  });

  it('gives the frames, settings and cells of a changed revision, families staying families', async () => {
    const read = await readIntake([sample('portal-sheds-240.xlsx')]);
    const after = applyChanges(read, changes, 'Ana Lyst');
    const revision = readRows({ ...after, identity: read.input, problems: read.problems.filter(isOfFile) });
    const again = await written(after);
    expect(again.frames).toEqual(revision.frames);
    expect(again.settings).toEqual(revision.settings);
    expect(again.settings.swayRatio).toBe(150);
    expect(again.origins.swayRatio.cell).toBe(revision.origins.swayRatio.cell);
    expect(again.sheets.map(({ known }) => known)).toEqual(expect.arrayContaining(['Variants']));
  });

  it('reads decimal commas, ids and texts of numbers as their own file did', async () => {
    const files = [
      csv('Setup.csv', 'setting,value\nmaterial,S275\nstress factor,0.55\n'),
      csv('Nodes.csv', 'frame;node;x [m];y [m]\n01;A;0;0\n01;1.0;1,234;0,5\n01;_x0041_;2,5;1 234,5\n'),
      csv('Members.csv', 'frame,member,start,end,section\n01,AB,A,1.0,IPE 300\n01,"B\nC",1.0,_x0041_,IPE 300\n'),
      csv('Supports.csv', 'frame,node,ux,uy,rz\n01,A,fixed,fixed,fixed\n'),
    ];
    const read = await readIntake(files);
    expect(read.frames[0]?.frame?.nodes.map(({ id, x_m, y_m }) => [id, x_m, y_m])).toEqual([
      ['A', 0, 0],
      ['1.0', 1.234, 0.5],
      ['_x0041_', 2.5, 1234.5],
    ]);
    expect((await written(read)).frames).toEqual(read.frames);
  });

  it('keeps sheets of one name apart, in a zip of workbooks, file by file', async () => {
    const nodes = (frame: string) => `frame,node,x [m],y [m]\n${frame},A,0,0\n${frame},B,6,0\n`;
    const shared = 'setting,value\nmaterial,S275\n';
    const bytes = zipSync({
      'b/nodes.csv': strToU8(nodes('F2')),
      'a/nodes.csv': strToU8(nodes('F1')),
      'members.csv': strToU8('frame,member,start,end,section\n*,AB,A,B,IPE 300\n'),
      'setup.csv': strToU8(shared),
      'supports.csv': strToU8('frame,node,ux,uy,rz\n*,A,fixed,fixed,fixed\n'),
    });
    const read = await readIntake([{ name: 'set.zip', bytes }]);
    const file = inputWorkbook(read, 'set B');
    expect(file.name).toBe('set B.zip');
    expect(Object.keys(unzipSync(file.bytes))).toHaveLength(5);
    const again = await readIntake([file]);
    expect(again.frames).toEqual(read.frames);
    expect(again.frames.map(({ id, frame }) => [id, frame !== null])).toEqual([['F1', true], ['F2', true]]); // prettier-ignore
  });

  it('writes every kind of cell so that it is read as what it was', async () => {
    const cells: (RawCell | null)[] = [
      { kind: 'number', value: 0.1 + 0.2, text: String(0.1 + 0.2) },
      { kind: 'text', text: ' =1+1 & <b> "q"\r\nsecond line' },
      { kind: 'text', text: '012' },
      null,
      { kind: 'boolean', value: false, text: 'FALSE' },
      { kind: 'date', text: '2026-02-01', iso: '2026-02-01' },
      { kind: 'error', text: '#DIV/0!' },
      { kind: 'formula', text: '=A1&"<"' },
      { kind: 'number', value: -1e-7, text: '-1e-7' },
    ];
    const below: (RawCell | null)[] = [
      { ...cells[0]!, mergedFrom: 'A3' },
      { kind: 'text', text: 'x' },
    ];
    const rows = [{ row: 3, cells }, { row: 7, cells: below }]; // prettier-ignore
    const sheets = [{ name: 'Notes: all', parts: [{ name: 'Notes: all', file: 'a.xlsx', order: 0, decimalMark: null, rows }] }];
    const kept = { sheets: [{ name: 'Notes: all', file: 'a.xlsx', decimalMark: null }], rows: inputRows(sheets) };
    const again = await readFiles([inputWorkbook(kept, 'a')]);
    expect(again.sheets[0]?.name).toBe('Notes  all');
    expect(again.sheets[0]?.parts[0]?.rows).toEqual(rows);
  });

  it('gives the same bytes for the same rows, under a name that any disk takes', async () => {
    const read = await readIntake([sample('pipe-rack-12.xlsx')]);
    const [one, two] = [inputWorkbook(read, 'a/b: c'), inputWorkbook(read, 'a/b: c')];
    expect(Buffer.compare(one.bytes, two.bytes)).toBe(0);
    expect(one.name).toBe('a b  c.xlsx');
    expect(() => inputWorkbook({ sheets: [], rows: [] }, 'x')).toThrow(RangeError);
  });
});
