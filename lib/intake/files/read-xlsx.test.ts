import ExcelJS from 'exceljs';
import { type Zippable, zipSync } from 'fflate';
import { describe, expect, it } from 'vitest';
import writeExcelFile from 'write-excel-file/node';
import { asText, craftedParts, craftedWorkbook } from '@/lib/intake/files/crafted-workbook';
import type { RawRow } from '@/lib/intake/files/raw-sheet';
import { readFiles } from '@/lib/intake/files/read-files';
import type { InputFile } from '@/lib/intake/intake';

const rowsOf = async (file: InputFile, sheet = 0): Promise<readonly RawRow[]> => {
  const { sheets, problems } = await readFiles([file]);
  expect(problems).toEqual([]);
  return sheets[sheet]?.parts[0]?.rows ?? [];
};
const sheetOf = async (data: string, more: { sharedStrings?: string; styles?: string } = {}): Promise<readonly RawRow[]> =>
  rowsOf(craftedWorkbook({ sheets: { Nodes: data }, ...more }));

describe('a worksheet', () => {
  it('gives texts, numbers, yes and no, errors and blanks as they are', async () => {
    const rows = await sheetOf(
      '<sheetData><row r="2"><c r="A2" t="s"><v>1</v></c><c r="C2"><v>0.10000000000000001</v></c><c r="D2" t="b"><v>1</v></c><c r="E2" t="e"><v>#DIV/0!</v></c><c r="F2" s="1"/></row></sheetData>',
      { sharedStrings: '<si><t>one</t></si><si><t xml:space="preserve"> two </t></si>' },
    );
    expect(rows).toEqual([
      {
        row: 2,
        cells: [
          { kind: 'text', text: ' two ' },
          null,
          { kind: 'number', value: 0.1, text: '0.1' },
          { kind: 'boolean', value: true, text: 'TRUE' },
          { kind: 'error', text: '#DIV/0!' },
        ],
      },
    ]);
  });

  it('reads formulas by their stored value, errors under them by name, and tells one that was never computed', async () => {
    const rows = await sheetOf(
      '<sheetData><row r="1"><c r="A1"><f>1+1</f><v>2</v></c><c r="B1" t="str"><f>A1&amp;"x"</f><v>2x</v></c><c r="C1" t="e"><f>1/0</f><v>#REF!</v></c><c r="D1"><f>A1*2</f></c><c r="E1"><f>A1*3</f><v></v></c><c r="F1" t="str"><f>""</f><v></v></c><c r="G1" t="b"><f>TRUE()</f><v>0</v></c></row></sheetData>',
    );
    expect(rows[0]?.cells).toEqual([
      { kind: 'number', value: 2, text: '2' },
      { kind: 'text', text: '2x' },
      { kind: 'error', text: '#REF!' },
      { kind: 'formula', text: '=A1*2' },
      { kind: 'formula', text: '=A1*3' },
      null,
      { kind: 'boolean', value: false, text: 'FALSE' },
    ]);
  });

  it('says what a date shows, since `1-2` typed in a cell becomes one', async () => {
    const styles =
      '<numFmts><numFmt numFmtId="164" formatCode="[$-409]d\\-mmm;@"/><numFmt numFmtId="165" formatCode="0.00&quot; m/s&quot;"/><numFmt numFmtId="166" formatCode="[Red]0.0"/></numFmts><cellXfs><xf numFmtId="0"/><xf numFmtId="16"/><xf numFmtId="164"/><xf numFmtId="14"/><xf numFmtId="165"/><xf numFmtId="166"/><xf numFmtId="20"/></cellXfs>';
    const rows = await sheetOf(
      '<sheetData><row r="1"><c r="A1" s="1"><v>46054</v></c><c r="B1" s="2"><v>46054</v></c><c r="C1" s="3"><v>46054</v></c><c r="D1" s="4"><v>5</v></c><c r="E1" s="5"><v>5</v></c><c r="F1" s="6"><v>0.5</v></c><c r="G1" t="d"><v>2026-02-01</v></c></row></sheetData>',
      { styles },
    );
    expect(rows[0]?.cells.map((c) => [c?.kind, c?.text])).toEqual([
      ['date', '1-Feb'],
      ['date', '1-Feb'],
      ['date', '2026-02-01'],
      ['number', '5'],
      ['number', '5'],
      ['date', '12:00'],
      ['date', '2026-02-01'],
    ]);
    expect(rows[0]?.cells[0]).toMatchObject({ iso: '2026-02-01' });
  });

  it('joins rich text, leaves phonetic hints out, and undoes escaped characters', async () => {
    const rows = await sheetOf(
      '<sheetData><row r="1"><c r="A1" t="s"><v>0</v></c><c r="B1" t="inlineStr"><is><r><t>I [cm</t></r><r><rPr><vertAlign val="superscript"/></rPr><t>4</t></r><r><t>]</t></r></is></c></row></sheetData>',
      { sharedStrings: '<si><r><t>kN</t></r><r><t>·m_x000D_</t></r><rPh sb="0" eb="1"><t>never</t></rPh></si>' },
    );
    expect(rows[0]?.cells.map((c) => c?.text)).toEqual(['kN·m\r', 'I [cm4]']);
  });

  it('reads cells and rows that say no address, one after the other', async () => {
    const rows = await sheetOf(
      '<sheetData><row><c><v>1</v></c><c><v>2</v></c></row><row/><row><c/><c><v>3</v></c></row></sheetData>',
    );
    expect(asText(rows)).toEqual({ 1: ['1', '2'], 3: ['', '3'] });
  });

  it('gives a merged block’s value to all its cells, in rows with something of their own', async () => {
    const rows = await sheetOf(
      '<sheetData><row r="1"><c r="A1" t="inlineStr"><is><t>F1</t></is></c><c r="B1"><v>1</v></c></row><row r="2"><c r="A2"/><c r="B2"><v>2</v></c></row><row r="4"><c r="D4"><v>4</v></c></row></sheetData><mergeCells count="2"><mergeCell ref="A1:A5"/><mergeCell ref="G9:XFD9"/></mergeCells>',
    );
    expect(asText(rows)).toEqual({ 1: ['F1', '1'], 2: ['F1', '2'], 4: ['F1', '', '', '4'] });
    expect(rows[0]?.cells[0]).toEqual({ kind: 'text', text: 'F1' });
    expect(rows[1]?.cells[0]).toEqual({ kind: 'text', text: 'F1', mergedFrom: 'A1' });
  });

  it('does not lose a character that falls on the edge of a piece', async () => {
    const texts = Array.from({ length: 30_000 }, (_, i) => `${'x'.repeat(i % 7)}²·µ–${i}`);
    const rows = await sheetOf(
      `<sheetData>${texts.map((_, i) => `<row r="${i + 1}"><c r="A${i + 1}" t="s"><v>${i}</v></c></row>`).join('')}</sheetData>`,
      { sharedStrings: texts.map((t) => `<si><t>${t}</t></si>`).join('') },
    );
    expect(rows.map((r) => r.cells[0]?.text)).toEqual(texts);
  });

  it('settles the decimal mark by texts that can be read one way only', async () => {
    const mark = async (texts: readonly string[]): Promise<unknown> => {
      const cells = texts.map((t) => `<c t="inlineStr"><is><t>${t}</t></is></c>`).join('');
      const { sheets } = await readFiles([craftedWorkbook({ sheets: { Nodes: `<sheetData><row>${cells}</row></sheetData>` } })]);
      return sheets[0]?.parts[0]?.decimalMark;
    };
    expect(await mark(['1,234', 'x,5'])).toBeNull();
    expect(await mark(['1,234', '1,5'])).toBe(',');
    expect(await mark(['1,234', '2.5'])).toBe('.');
    expect(await mark(['1,5', '2.5'])).toBeNull();
  });
});

describe('a workbook', () => {
  it('is read with its sheets in the workbook’s order, hidden ones too, whatever order its parts are packed in', async () => {
    const parts = craftedParts({
      sheets: {
        Members: '<sheetData><row r="1"><c r="A1" t="s"><v>0</v></c></row></sheetData>',
        Nodes: '<sheetData><row r="1"><c r="A1" t="s"><v>1</v></c></row></sheetData>',
      },
      sharedStrings: '<si><t>m</t></si><si><t>n</t></si>',
    });
    const workbook = new TextDecoder().decode(parts['xl/workbook.xml']).replace('sheetId="2"', 'sheetId="2" state="veryHidden"');
    const turned = Object.fromEntries(
      Object.entries({ ...parts, 'xl/workbook.xml': new TextEncoder().encode(workbook) }).reverse(),
    );
    const { sheets, problems } = await readFiles([{ name: 'a.xlsx', bytes: zipSync(turned as Zippable) }]);
    expect(problems).toEqual([]);
    expect(sheets.map((s) => [s.name, asText(s.parts[0]?.rows ?? [])])).toEqual([
      ['Members', { 1: ['m'] }],
      ['Nodes', { 1: ['n'] }],
    ]);
  });

  it('is found by its relations, with prefixes on its tags and other names for its parts', async () => {
    const main = 'http://schemas.openxmlformats.org/spreadsheetml/2006/main';
    const rel = 'http://schemas.openxmlformats.org/officeDocument/2006/relationships';
    const file = craftedWorkbook({
      sheets: { Nodes: '' },
      parts: {
        '_rels/.rels': `<Relationships xmlns="http://schemas.openxmlformats.org/package/2006/relationships"><Relationship Id="R1" Type="${rel}/officeDocument" Target="/Book/Main.xml"/></Relationships>`,
        'Book/Main.xml': `<x:workbook xmlns:x="${main}" xmlns:q="${rel}"><x:sheets><x:sheet name="Nodes &amp; more" sheetId="4" q:id="A"/></x:sheets></x:workbook>`,
        'Book/_rels/Main.xml.rels': `<Relationships xmlns="http://schemas.openxmlformats.org/package/2006/relationships"><Relationship Id="A" Type="${rel}/worksheet" Target="../Data/One.xml"/></Relationships>`,
        'Data/One.xml': `<x:worksheet xmlns:x="${main}"><x:sheetData><x:row r="1"><x:c r="B1"><x:v>7</x:v></x:c></x:row></x:sheetData></x:worksheet>`,
        'xl/workbook.xml': null,
      },
    });
    const { sheets, problems } = await readFiles([file]);
    expect(problems).toEqual([]);
    expect(sheets.map((s) => [s.name, asText(s.parts[0]?.rows ?? [])])).toEqual([['Nodes & more', { 1: ['', '7'] }]]);
  });

  it('reads as written by two other writers', async () => {
    const table = [
      ['frame', 'node', 'x [m]', 'y [m]'],
      ['F1', 'A', 0, 0.1],
      ['F1', '01', -1.5, 1e-7],
      ['F<&>"2', ' B ', 123456789.123, 3],
    ];
    const expected = {
      1: table[0],
      2: ['F1', 'A', '0', '0.1'],
      3: ['F1', '01', '-1.5', '1e-7'],
      4: ['F<&>"2', ' B ', '123456789.123', '3'],
    };
    const other = await writeExcelFile([{ data: table, sheet: 'Nodes' }]).toBuffer();
    expect(asText(await rowsOf({ name: 'a.xlsx', bytes: other }))).toEqual(expected);
    const workbook = new ExcelJS.Workbook();
    workbook.addWorksheet('Nodes').addRows(table);
    const bytes = new Uint8Array(await workbook.xlsx.writeBuffer());
    expect(asText(await rowsOf({ name: 'a.xlsx', bytes }))).toEqual(expected);
  });
});
