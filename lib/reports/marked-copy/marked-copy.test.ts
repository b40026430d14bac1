import ExcelJS from 'exceljs';
import { strFromU8, unzipSync, zipSync } from 'fflate';
import { describe, expect, it } from 'vitest';
import { asText, craftedWorkbook } from '@/lib/intake/files/crafted-workbook';
import { readIntake } from '@/lib/intake/read-intake';
import { readFiles } from '@/lib/intake/files/read-files';
import type { InputFile } from '@/lib/intake/intake';
import type { Problem } from '@/lib/problems/problem';
import { writeTemplate } from '@/lib/reports/template/write-template';
import { markedCopy } from '@/lib/reports/marked-copy/marked-copy';

const problem = (cell: string | null, more: Partial<Problem> = {}): Problem => ({
  severity: 'error',
  code: 'unknown-node',
  sheet: 'Members',
  file: 'batch.xlsx',
  row: null,
  column: null,
  cell,
  frames: ['F1'],
  found: null,
  message: 'Node N9 is not in Nodes.',
  stopsAll: false,
  ...more,
});

/** Notes and fills by cell, as a spreadsheet library sees them. */
async function marksIn(bytes: Uint8Array, sheet: string): Promise<Record<string, { note: string; fill: string | undefined }>> {
  const workbook = new ExcelJS.Workbook();
  await workbook.xlsx.load(Buffer.from(bytes) as unknown as ArrayBuffer);
  const marks: Record<string, { note: string; fill: string | undefined }> = {};
  workbook.getWorksheet(sheet)?.eachRow({ includeEmpty: true }, (row) =>
    row.eachCell({ includeEmpty: true }, (cell) => {
      const note = cell.note;
      const words = typeof note === 'string' ? note : (note?.texts?.map((t) => t.text).join('') ?? '');
      const fill = cell.fill?.type === 'pattern' ? cell.fill.fgColor?.argb : undefined;
      if (words !== '' || fill !== undefined) marks[cell.address] = { note: words, fill };
    }),
  );
  return marks;
}

const valuesOf = async (file: InputFile): Promise<Record<string, unknown>> => {
  const { sheets, problems } = await readFiles([file]);
  expect(problems.filter((p) => p.severity === 'error')).toEqual([]);
  return Object.fromEntries(sheets.map((s) => [s.name, asText(s.parts[0]?.rows ?? [])]));
};

const table =
  '<sheetData><row r="1" spans="1:3"><c r="A1" t="inlineStr"><is><t>frame</t></is></c><c r="B1" t="inlineStr"><is><t>member</t></is></c><c r="C1" t="inlineStr"><is><t>start</t></is></c></row><row r="2"><c r="A2" t="inlineStr"><is><t>F1</t></is></c><c r="C2" s="1"><v>0.25</v></c></row><row r="5"/></sheetData>';
const styles =
  '<fonts count="1"><font/></fonts><fills count="2"><fill><patternFill patternType="none"/></fill><fill><patternFill patternType="gray125"/></fill></fills><borders count="1"><border/></borders><cellStyleXfs count="1"><xf/></cellStyleXfs><cellXfs count="2"><xf numFmtId="0" fontId="0" fillId="0" borderId="0" xfId="0"/><xf numFmtId="10" fontId="0" fillId="1" borderId="0" xfId="0" applyNumberFormat="1"><alignment horizontal="center"/></xf></cellXfs>';

describe('the marked copy of a workbook', () => {
  const file = craftedWorkbook({
    sheets: { Members: table, Nodes: '<sheetData/>' },
    styles,
    parts: { 'docProps/custom.bin': 'kept as it is' },
  });
  const problems = [
    problem('C2'),
    problem('C2', { severity: 'warning', code: 'suspect-unit', message: 'And <this> & "that".' }),
    problem('B2', { severity: 'warning', message: 'Blank.' }),
    problem('A4', { message: 'A row that is not there.' }),
    problem('B5', { message: 'A row without cells.' }),
    problem('D9', { message: 'Below all rows.' }),
    problem('A1', { severity: 'note', message: 'Only listed.' }),
    problem('B2', { sheet: 'Nodes', message: 'In a sheet without rows.' }),
    problem(null, { sheet: null, code: 'missing-sheet', message: 'There is no sheet Supports.' }),
  ];

  it('fills each bad cell, keeps its number format, and says in a note what is wrong', async () => {
    const copy = await markedCopy([file], problems);
    expect(copy.name).toBe('batch marked.xlsx');
    const marks = await marksIn(copy.bytes, 'Members');
    expect(marks).toEqual({
      B2: { note: 'Warning: Blank.', fill: 'FFFFE6A8' },
      C2: { note: 'Error: Node N9 is not in Nodes.\n\nWarning: And <this> & "that".', fill: 'FFFFC7C2' },
      A4: { note: 'Error: A row that is not there.', fill: 'FFFFC7C2' },
      B5: { note: 'Error: A row without cells.', fill: 'FFFFC7C2' },
      D9: { note: 'Error: Below all rows.', fill: 'FFFFC7C2' },
    });
    expect(await marksIn(copy.bytes, 'Nodes')).toEqual({ B2: { note: 'Error: In a sheet without rows.', fill: 'FFFFC7C2' } });
    const parts = unzipSync(copy.bytes);
    const twin = /<xf [^>]*fillId="2"[^>]*>.*?<\/xf>/.exec(strFromU8(parts['xl/styles.xml'] ?? new Uint8Array()));
    expect(twin?.[0]).toBe(
      '<xf numFmtId="10" fontId="0" fillId="2" borderId="0" xfId="0" applyNumberFormat="1" applyFill="1"><alignment horizontal="center"/></xf>',
    );
    expect(strFromU8(parts['docProps/custom.bin'] ?? new Uint8Array())).toBe('kept as it is');
  });

  it('lists every problem, those without a cell too, on a sheet of its own', async () => {
    const { 'Problems found': list } = await valuesOf({ name: 'a.xlsx', bytes: (await markedCopy([file], problems)).bytes });
    expect(Object.values(list as Record<number, string[]>)).toHaveLength(1 + problems.length);
    expect(JSON.stringify(list)).toContain('There is no sheet Supports.');
  });

  it('reads the same again, and can be marked again', async () => {
    const before = await valuesOf(file);
    const once = await markedCopy([file], problems);
    const again = await valuesOf({ name: 'batch.xlsx', bytes: once.bytes });
    expect(again).toMatchObject(before);
    const twice = await markedCopy(
      [{ name: 'batch.xlsx', bytes: once.bytes }],
      [problem('C2', { message: 'Still.' }), problem('A2', { message: 'New.' })],
    );
    const marks = await marksIn(twice.bytes, 'Members');
    expect(marks['C2']?.note).toBe('Error: Node N9 is not in Nodes.\n\nWarning: And <this> & "that".\n\nError: Still.');
    expect(marks['A2']?.note).toBe('Error: New.');
    expect(Object.keys(await valuesOf({ name: 'a.xlsx', bytes: twice.bytes }))).toEqual([
      'Members',
      'Nodes',
      'Problems found',
      'Problems found 2',
    ]);
  });

  it('is the same, byte for byte, for the same file and problems', async () => {
    expect((await markedCopy([file], problems)).bytes).toEqual((await markedCopy([file], problems)).bytes);
  });

  it('marks what another library wrote, with its own notes, shapes and styles', async () => {
    const workbook = new ExcelJS.Workbook();
    const sheet = workbook.addWorksheet('Members');
    sheet.addRows([
      ['frame', 'member'],
      ['F1', 'AB'],
      [null, { formula: 'A2&"x"', result: 'F1x' }],
    ]);
    sheet.getCell('A1').note = 'My own note';
    sheet.getCell('B2').font = { bold: true };
    sheet.addTable({ name: 'T', ref: 'D1', columns: [{ name: 'q' }], rows: [[1]] });
    const bytes = new Uint8Array(await workbook.xlsx.writeBuffer());
    const copy = await markedCopy(
      [{ name: 'batch.xlsx', bytes }],
      [problem('B2'), problem('A1', { message: 'Heading.' }), problem('A3')],
    );
    expect(await marksIn(copy.bytes, 'Members')).toEqual({
      A1: { note: 'My own note\n\nError: Heading.', fill: 'FFFFC7C2' },
      B2: { note: 'Error: Node N9 is not in Nodes.', fill: 'FFFFC7C2' },
      A3: { note: 'Error: Node N9 is not in Nodes.', fill: 'FFFFC7C2' },
    });
    const loaded = new ExcelJS.Workbook();
    await loaded.xlsx.load(Buffer.from(copy.bytes) as unknown as ArrayBuffer);
    expect(loaded.getWorksheet('Members')?.getCell('B3').formula).toBe('A2&"x"');
    expect(loaded.getWorksheet('Members')?.getCell('B2').font.bold).toBe(true);
  });
});

describe('the marked copy, uploaded again', () => {
  it('gives the same frames and the same problems', async () => {
    const workbook = new ExcelJS.Workbook();
    await workbook.xlsx.load(Buffer.from(await writeTemplate('metric')) as unknown as ArrayBuffer);
    const members = workbook.getWorksheet('Members');
    if (members) members.getCell('D4').value = 'N9';
    const setup = workbook.getWorksheet('Setup');
    if (setup) setup.getCell('A20').value = 'strenght check';
    const file = { name: 'batch.xlsx', bytes: new Uint8Array(await workbook.xlsx.writeBuffer()) };
    const before = await readIntake([file]);
    const errors = before.problems.filter((p) => p.severity === 'error');
    expect(errors.map((p) => `${p.sheet} ${p.cell} ${p.code}`)).toContain('Members D4 unknown-node');
    const copy = await markedCopy([file], before.problems);
    expect(Object.keys(await marksIn(copy.bytes, 'Members'))).toContain('D4');
    const after = await readIntake([{ name: 'batch.xlsx', bytes: copy.bytes }]);
    expect(after.frames).toEqual(before.frames);
    expect(after.problems.filter((p) => p.sheet !== 'Problems found')).toEqual(before.problems);
  });
});

describe('the marked copy of other uploads', () => {
  const csv = (name: string, text: string): InputFile => ({ name, bytes: new TextEncoder().encode(text) });

  it('makes a workbook of a CSV file, its numbers numbers and its ids as they were', async () => {
    const file = csv('Members.csv', 'frame;member;start\n\nF1;01;1,5\nF1;2;=1+1\n');
    const copy = await markedCopy(
      [file],
      [problem('B3', { file: 'Members.csv' }), problem('A2', { file: 'Members.csv', message: 'Blank row.' })],
    );
    expect(copy.name).toBe('Members marked.xlsx');
    expect(await marksIn(copy.bytes, 'Members')).toEqual({
      B3: { note: 'Error: Node N9 is not in Nodes.', fill: 'FFFFC7C2' },
      A2: { note: 'Error: Blank row.', fill: 'FFFFC7C2' },
    });
    expect(await valuesOf({ name: 'a.xlsx', bytes: copy.bytes })).toMatchObject({
      Members: { 1: ['frame', 'member', 'start'], 3: ['F1', '01', '1.5'], 4: ['F1', '2', '=1+1'] },
    });
    const { sheets } = await readFiles([{ name: 'a.xlsx', bytes: copy.bytes }]);
    expect(sheets[0]?.parts[0]?.rows[1]?.cells.map((c) => c?.kind)).toEqual(['text', 'text', 'number']);
  });

  it('gives each file of a set its own copy, in one zip that reads as the set did', async () => {
    const zip: InputFile = {
      name: 'set.zip',
      bytes: zipSync({
        'in/Nodes.csv': csv('', 'frame,node\nF1,A\n').bytes,
        'in/Members.csv': csv('', 'frame,member\nF1,AB\n').bytes,
      }),
    };
    const copy = await markedCopy([zip], [problem('B2', { file: 'Members.csv' }), problem(null, { sheet: null, file: null })]);
    expect(copy.name).toBe('set marked.zip');
    const inner = unzipSync(copy.bytes);
    expect(Object.keys(inner)).toEqual(['Members marked.xlsx', 'Nodes marked.xlsx']);
    expect(Object.keys(await marksIn(inner['Members marked.xlsx'] ?? new Uint8Array(), 'Members'))).toEqual(['B2']);
    expect(await marksIn(inner['Nodes marked.xlsx'] ?? new Uint8Array(), 'Nodes')).toEqual({});
    expect(await valuesOf({ name: copy.name, bytes: copy.bytes })).toMatchObject({
      Members: { 2: ['F1', 'AB'] },
      Nodes: { 2: ['F1', 'A'] },
    });
  });

  it('is only the list of problems where nothing could be read', async () => {
    const copy = await markedCopy(
      [csv('a.xlsx', 'no workbook')],
      [problem(null, { sheet: null, file: 'a.xlsx', code: 'unreadable' })],
    );
    expect(Object.keys(await valuesOf({ name: 'b.xlsx', bytes: copy.bytes }))).toEqual(['Problems found']);
  });

  it('shows only the bad rows of a workbook too large to be patched', async () => {
    const rows = Array.from(
      { length: 200_000 },
      (_, i) => `<row r="${i + 2}">${'<c t="str"><v>some text in a cell</v></c>'.repeat(6)}</row>`,
    );
    const data = `<sheetData><row r="1"><c t="str"><v>frame</v></c></row>${rows.join('')}</sheetData>`;
    const copy = await markedCopy([craftedWorkbook({ sheets: { Members: data } })], [problem('B50000'), problem('C7')]);
    const { Members } = await valuesOf({ name: 'b.xlsx', bytes: copy.bytes });
    expect(Object.values(Members as Record<number, string[]>).map((r) => r[0])).toEqual(['row 1', 'row 7', 'row 50000']);
    expect(Object.keys(await marksIn(copy.bytes, 'Members'))).toEqual(['D2', 'C3']);
  });
});
