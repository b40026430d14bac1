import { readFileSync } from 'node:fs';
import { basename } from 'node:path';
import { strToU8, zipSync } from 'fflate';
import { describe, expect, it } from 'vitest';
import { readFiles } from '@/lib/intake/files/read-files';
import type { InputFile, Intake } from '@/lib/intake/intake';
import { readIntake } from '@/lib/intake/read-intake';
import { marksOf } from '@/lib/intake/rows/cell-marks';
import { canBeReadAgain, inputRows, sheetsFromRows } from '@/lib/intake/rows/input-rows';
import { isOfFile, readRows } from '@/lib/intake/rows/read-rows';

const csv = (name: string, text: string): InputFile => ({ name, bytes: strToU8(text) });
const sample = (path: string): InputFile => ({ name: basename(path), bytes: readFileSync(`samples/${path}`) });
const walkways = ['Combinations', 'Load cases', 'Member loads', 'Members', 'Nodes', 'Sections', 'Setup', 'Supports'];

/** Kept as the database keeps it: rows and sheets through JSON. */
function again(intake: Intake): Intake {
  const { sheets, rows, problems, input } = JSON.parse(JSON.stringify(intake)) as Intake;
  return readRows({ sheets, rows, identity: input, problems: problems.filter(isOfFile) });
}

const nodes = 'frame,node,"x [m]","y [m]"\nF1,A,0,0\nF1,B,6.0,0\n';
const members = 'frame,member,start,end,section\nF1,AB,A,B,IPE 300\n';
const setup = 'setting,value\nmaterial,S275\n';

const inputs: Readonly<Record<string, readonly InputFile[]>> = {
  'a workbook of families': [sample('portal-sheds-240.xlsx')],
  'a workbook saved by another program': [sample('portal-sheds-240-saved-by-calc.xlsx')],
  'a workbook in US units': [sample('canopies-us-36.xlsx')],
  'a workbook full of slips': [sample('messy.xlsx')],
  'a workbook without a sheet that is needed': [sample('problems/missing-sheet.xlsx')],
  'a set of CSV files': walkways.map((name) => sample(`walkways-csv/${name}.csv`)),
  'a file that cannot be read': [sample('problems/unreadable.xlsx')],
  'CSV files with decimal commas, dates and texts of numbers': [
    csv('Setup.csv', 'setting;value\nmaterial;S275\nstress factor;0,55\n'),
    csv('Nodes.csv', 'frame;node;x [m];y [m]\n01;A;0;0\n01;B;1,234;0\n01;C;1 234,5;1-Feb\n'),
    csv('Members.csv', 'frame;member;start;end;section\n01;AB;A;B;IPE 300\n01;1.0;B;C;IPE 300\n'),
    csv('Supports.csv', 'frame;node;ux;uy;rz\n01;A;fixed;fixed;fixed\n'),
  ],
  'a zip with two sheets of one name and a file that is none': [
    {
      name: 'set.zip',
      bytes: zipSync({
        'a/nodes.csv': strToU8(nodes),
        'b/nodes.csv': strToU8(nodes.replaceAll('F1', 'F2')),
        'members.csv': strToU8(members),
        'setup.csv': strToU8(setup),
        'Supports.csv': strToU8('frame,node,ux,uy,rz\nF1,A,fixed,fixed,fixed\nF2,A,fixed,fixed,fixed\n'),
        'readme.pdf': strToU8('no sheet'),
      }),
    },
  ],
};

describe('rows as they are kept, read again,', () => {
  it.each(Object.entries(inputs))('give what the files gave: %s', async (_, files) => {
    const read = await readIntake(files);
    expect(again(read)).toEqual(read);
  });

  it('give every kind of cell again, merged ones with it', () => {
    const cells = [
      { kind: 'number', value: 0.1, text: '0.1' },
      { kind: 'text', text: '0.1' },
      { kind: 'text', text: '-' },
      null,
      { kind: 'text', text: '01', mergedFrom: 'A2' },
      { kind: 'boolean', value: false, text: 'FALSE' },
      { kind: 'date', text: '1-Feb', iso: '2026-02-01' },
      { kind: 'error', text: '#REF!' },
      { kind: 'formula', text: '=A1' },
      { kind: 'number', value: 1e21, text: '1e+21', mergedFrom: 'B2' },
      { kind: 'text', text: '-Infinity' },
    ] as const;
    const part = { name: 'Nodes', file: 'a.xlsx', order: 0, decimalMark: null, rows: [{ row: 4, cells }] };
    const sheets = [{ name: 'Nodes', parts: [part] }];
    const kept = { sheets: [{ name: 'Nodes', file: 'a.xlsx', decimalMark: null }], rows: inputRows(sheets) };
    expect(sheetsFromRows(kept)).toEqual(sheets);
  });

  it('need no marks where texts say what they are', () => {
    const row = [{ kind: 'number', value: 2, text: '2' } as const, { kind: 'text', text: 'A' } as const, null];
    expect(marksOf(row, true)).toBeNull();
    expect(marksOf([{ kind: 'text', text: '2' }], false)).toBeNull();
    expect(marksOf([{ kind: 'text', text: '2' }], true)).toBe('{"0":"text"}');
  });

  it('say of a setting who chose it on screen', async () => {
    const files = await readFiles([csv('Setup.csv', setup), csv('Nodes.csv', nodes), csv('Members.csv', members)]);
    const rows = inputRows(files.sheets).map((row) =>
      row.sheet === 'Setup' && row.row === 2 ? { ...row, changedBy: 'Ana Lyst' } : row,
    );
    const sheets = files.sheets.flatMap((sheet) => sheet.parts);
    const { origins } = readRows({ sheets, rows, identity: files.identity, problems: [] });
    expect(origins.material).toEqual({ source: 'sheet', cell: 'Setup B2', changedBy: 'Ana Lyst' });
  });

  it('cannot be read where an earlier version kept them without their sheets', () => {
    expect(canBeReadAgain([{ sheet: 'Nodes', row: 1, cells: ['frame'] }])).toBe(false);
    expect(canBeReadAgain(inputRows([]))).toBe(true);
  });
});
