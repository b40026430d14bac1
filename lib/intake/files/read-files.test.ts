import { createHash } from 'node:crypto';
import { zipSync } from 'fflate';
import { describe, expect, it } from 'vitest';
import { asText, craftedWorkbook } from '@/lib/intake/files/crafted-workbook';
import { readFiles } from '@/lib/intake/files/read-files';
import type { InputFile } from '@/lib/intake/intake';

const csv = (name: string, text: string | Uint8Array): InputFile => ({
  name,
  bytes: typeof text === 'string' ? new TextEncoder().encode(text) : text,
});
const only = async (file: InputFile): Promise<{ rows: Record<number, string[]>; mark: unknown }> => {
  const { sheets, problems } = await readFiles([file]);
  expect(problems).toEqual([]);
  return { rows: asText(sheets[0]?.parts[0]?.rows ?? []), mark: sheets[0]?.parts[0]?.decimalMark };
};

describe('a CSV file', () => {
  it('is named by its file and keeps its row numbers, blank rows left out', async () => {
    const { sheets } = await readFiles([csv('Member loads.csv', 'a,b\r\n\r\n,,\r\n1,"x, ""y""\nz"\r\nlast,row')]);
    expect(sheets[0]?.name).toBe('Member loads');
    expect(asText(sheets[0]?.parts[0]?.rows ?? [])).toEqual({ 1: ['a', 'b'], 4: ['1', 'x, "y"\nz'], 5: ['last', 'row'] });
  });

  it('is parted by comma, semicolon or tab', async () => {
    expect(await only(csv('a.csv', 'frame,node,x\nF1,A,1.5\n'))).toEqual({
      rows: { 1: ['frame', 'node', 'x'], 2: ['F1', 'A', '1.5'] },
      mark: '.',
    });
    expect(await only(csv('a.csv', 'A title, with a comma\nframe;node;x;y\nF1;A;1,5;0,25\n'))).toEqual({
      rows: { 1: ['A title, with a comma'], 2: ['frame', 'node', 'x', 'y'], 3: ['F1', 'A', '1,5', '0,25'] },
      mark: ',',
    });
    expect(await only(csv('a.csv', 'frame\tnode; or so\tx\nF1\tA\t1,234\n'))).toEqual({
      rows: { 1: ['frame', 'node; or so', 'x'], 2: ['F1', 'A', '1,234'] },
      mark: null,
    });
    expect((await only(csv('a.csv', 'sep=;\nframe;node\n'))).rows).toEqual({ 2: ['frame', 'node'] });
    expect((await only(csv('a.csv', '1,2,3\n4,5,6\n'))).rows).toEqual({ 1: ['1', '2', '3'], 2: ['4', '5', '6'] });
  });

  it('settles one decimal mark for the file by what most of its numbers show', async () => {
    expect((await only(csv('a.csv', 'x;y\n1,5;2,25\n3.5;0,1\n'))).mark).toBe(',');
    expect((await only(csv('a.csv', 'x;y\n1.5;2.25\n3,5;0.1\n'))).mark).toBe('.');
  });

  it('is read in UTF-8, UTF-16 and Windows-1252', async () => {
    const text = 'frame,I [cm⁴]\nF1,ü\n';
    const rows = { 1: ['frame', 'I [cm⁴]'], 2: ['F1', 'ü'] };
    expect((await only(csv('a.csv', text))).rows).toEqual(rows);
    expect((await only(csv('a.csv', `\ufeff${text}`))).rows).toEqual(rows);
    const little = Buffer.from(`\ufeff${text}`, 'utf16le');
    expect((await only(csv('a.csv', little))).rows).toEqual(rows);
    expect((await only(csv('a.csv', Buffer.from(little).swap16()))).rows).toEqual(rows);
    expect((await only(csv('a.csv', Buffer.from('frame,A [cm²]\nF1,–ü\n'.replace('–', '\x96'), 'latin1')))).rows).toEqual({
      1: ['frame', 'A [cm²]'],
      2: ['F1', '–ü'],
    });
  });

  it('reads the same in one piece and in many', async () => {
    const lines = Array.from({ length: 40_000 }, (_, i) => `F${i},"q ""${i}"" ²",${i / 8}`);
    const { rows } = await only(csv('a.csv', lines.join('\r\n')));
    expect(Object.keys(rows)).toHaveLength(40_000);
    expect(rows[39_999]).toEqual(['F39998', 'q "39998" ²', '4999.75']);
  });

  it('is refused where a quotation mark swallows its rows', async () => {
    const { sheets, problems } = await readFiles([csv('Nodes.csv', 'frame,node\nF1,A\nF1,"B\nF1,C\n')]);
    expect(sheets).toEqual([]);
    expect(problems[0]).toMatchObject({ code: 'unreadable', file: 'Nodes.csv', stopsAll: true });
    expect(problems[0]?.message).toContain('row 3');
  });
});

describe('several files', () => {
  it('join sheets of one name in file-name order, each part with its own rows', async () => {
    const { sheets, problems } = await readFiles([
      csv('up/loads/Member_Loads.csv', 'frame\nF2\n'),
      csv('b/Nodes.csv', 'frame\nF3\n'),
      csv('C:\\a\\member load.csv', 'frame\nF1\n'),
    ]);
    expect(problems).toEqual([]);
    expect(sheets.map((s) => [s.name, s.parts.map((p) => [p.file, p.order])])).toEqual([
      ['Member_Loads', [['Member_Loads.csv', 0], ['member load.csv', 2]]],
      ['Nodes', [['Nodes.csv', 1]]],
    ]); // prettier-ignore
  });

  it('have one identity, whatever order they were sent in', async () => {
    const a = csv('a.csv', 'x\n1\n');
    const b = csv('dir/b.csv', 'x\n2\n');
    const sha = (data: string | Uint8Array): string => createHash('sha256').update(data).digest('hex');
    const one = await readFiles([a]);
    expect(one.identity).toEqual({
      name: 'a.csv',
      sha256: sha(a.bytes),
      files: [{ name: 'a.csv', sha256: sha(a.bytes), size: 4 }],
    });
    const both = await readFiles([b, a]);
    expect(both.identity.name).toBe('a.csv');
    expect(both.identity.sha256).toBe(sha(`${sha(a.bytes)} a.csv\n${sha(b.bytes)} b.csv`));
    expect((await readFiles([a, b])).identity).toEqual(both.identity);
  });

  it('come in a zip with folders, system files ignored and others named', async () => {
    const workbook = craftedWorkbook({ sheets: { Setup: '<sheetData><row><c><v>1</v></c></row></sheetData>' } });
    const bytes = zipSync({
      'in/deep/Nodes.csv': new TextEncoder().encode('frame\nF1\n'),
      '../up/setup.xlsx': workbook.bytes,
      '__MACOSX/in/._Nodes.csv': new Uint8Array([1, 2]),
      'in/.DS_Store': new Uint8Array([0]),
      'in/notes.pdf': new TextEncoder().encode('%PDF'),
    });
    const { sheets, problems } = await readFiles([{ name: 'batch.zip', bytes }]);
    expect(sheets.map((s) => [s.name, s.parts[0]?.file])).toEqual([
      ['Nodes', 'Nodes.csv'],
      ['Setup', 'setup.xlsx'],
    ]);
    expect(problems.map((p) => [p.severity, p.code, p.file, p.stopsAll])).toEqual([
      ['warning', 'unreadable', 'notes.pdf', false],
    ]);
  });

  it('are read as far as they can be where one of them is bad, and the batch stops', async () => {
    const { sheets, problems } = await readFiles([csv('Nodes.csv', 'frame\n'), csv('Members.xlsx', 'no workbook')]);
    expect(sheets.map((s) => s.name)).toEqual(['Nodes']);
    expect(problems.map((p) => [p.code, p.file, p.stopsAll])).toEqual([['unreadable', 'Members.xlsx', true]]);
  });

  it('are at least one', async () => {
    await expect(readFiles([])).rejects.toThrow(RangeError);
  });
});
