import { PassThrough } from 'node:stream';
import { buffer } from 'node:stream/consumers';
import ExcelJS from 'exceljs';
import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { readFiles } from '@/lib/intake/files/read-files';
import { rowWriter } from '@/lib/reports/workbook/row-xml';
import { ratioColumn, text, verdictColumn, type ReportRow } from './report-sheet';
import { writeXlsx } from './write-xlsx';

async function written(rows: readonly ReportRow[]): Promise<Uint8Array> {
  const sink = new PassThrough();
  const bytes = buffer(sink);
  const columns = [text('frame'), ratioColumn(0.9), verdictColumn(), text('note')];
  await writeXlsx([{ name: 'Rows', columns, rows: () => rows }], sink);
  return bytes;
}

/** The sheet's cells below its heading as our own reader finds them. */
async function read(bytes: Uint8Array, rows: number): Promise<ReportRow[]> {
  const { sheets, problems } = await readFiles([{ name: 'rows.xlsx', bytes }]);
  expect(problems).toEqual([]);
  const found = new Map(sheets[0]?.parts[0]?.rows.map(({ row, cells }) => [row, cells]));
  return Array.from({ length: rows }, (_, index) =>
    Array.from({ length: 4 }, (_, column) => {
      const cell = found.get(index + 2)?.[column];
      if (!cell) return null;
      return cell.kind === 'number' ? cell.value : cell.text;
    }),
  );
}

const words = fc
  .oneof(
    fc.string({ unit: 'grapheme', minLength: 1 }),
    fc.string({ unit: fc.constantFrom(...'=+-@<>&"\'_x0041_ \u0001\u0007\ufffeµ²½'), minLength: 1 }),
    fc.constantFrom('_x0041_', '=1+1', '</v></c>', ']]>', '&amp;', 'C1 (−)', 'M–N', '\u{1F529}'),
  )
  .filter((word) => word.trim() === word && word !== '');
const numbers = fc.double({ noNaN: true, noDefaultInfinity: true }).map((value) => value + 0);
const row = fc.tuple(words, fc.option(numbers), fc.option(fc.constantFrom('over', 'near', 'within')), fc.option(words));

describe('rows as XML', () => {
  it('come back as the same words and the same numbers to the last digit, whatever the words hold', async () => {
    await fc.assert(
      fc.asyncProperty(fc.array(row, { minLength: 1, maxLength: 40 }), async (rows) => {
        expect(await read(await written(rows), rows.length)).toEqual(rows);
      }),
      { numRuns: 60, seed: 20_261_201 },
    );
  });

  it('are cell for cell what the library that opens the workbook writes by itself', async () => {
    const rows: ReportRow[] = [
      ['=SUM(A1)', 1.00049999, 'over', 'a < b & "c"'],
      ['F 2', null, null, 'x'],
      ['F3', -0.1 - 0.2, 'within', null],
      ['F4', 5e-324, 'not checked', '²'],
    ];
    const own = new ExcelJS.Workbook();
    await own.xlsx.load((await written(rows)) as unknown as ArrayBuffer);
    const sink = new PassThrough();
    const bytes = buffer(sink);
    const book = new ExcelJS.stream.xlsx.WorkbookWriter({ stream: sink, useStyles: true });
    const page = book.addWorksheet('Rows');
    for (const cells of [['frame', 'ratio', 'verdict', 'note'], ...rows]) page.addRow([...cells]).commit();
    await book.commit();
    const theirs = new ExcelJS.Workbook();
    await theirs.xlsx.load((await bytes) as unknown as ArrayBuffer);
    const values = (from: ExcelJS.Workbook): unknown[][] =>
      [1, 2, 3, 4, 5].map((at) => [1, 2, 3, 4].map((column) => from.getWorksheet('Rows')?.getCell(at, column).value ?? null));
    expect(values(own)).toEqual(values(theirs));
  });

  it('write what is no number as text, never as a number that a spreadsheet cannot read', () => {
    const write = rowWriter(() => 0);
    expect(write(7, [Infinity, null, NaN, -1.5e-9])).toBe(
      '<row r="7"><c r="A7" t="str"><v>Infinity</v></c><c r="C7" t="str"><v>NaN</v></c><c r="D7"><v>-1.5e-9</v></c></row>',
    );
  });

  it('name columns beyond Z and give each value the format of its column', () => {
    const write = rowWriter((_, column) => (column === 26 ? 5 : 0));
    expect(write(1, [...Array<null>(26).fill(null), 2])).toBe('<row r="1"><c r="AA1" s="5"><v>2</v></c></row>');
  });

  it('never hold more in a cell than a spreadsheet takes, and say how much is left out', async () => {
    const book = new ExcelJS.Workbook();
    const exact = 'x'.repeat(32_767);
    const bolts = '\u{1F529}'.repeat(20_000);
    await book.xlsx.load(
      (await written([
        [exact, 1, null, `${exact}y`],
        [bolts, 1, null, null],
      ])) as unknown as ArrayBuffer,
    );
    const text = (at: string): string => String(book.getWorksheet('Rows')?.getCell(at).value);
    expect(text('A2')).toBe(exact);
    expect(text('D2')).toMatch(/^x{32687} … and 81 characters more than a cell takes$/);
    expect(text('A3').length).toBeLessThanOrEqual(32_767);
    expect(text('A3')).toMatch(/^(\u{1F529})+ … and/u);
  });

  it('keep rows that are longer together than what is gathered at once', async () => {
    const long = 'µ'.repeat(32_700);
    const wide = Array.from({ length: 12 }, (_, i): ReportRow => [`${i}`, i, 'near', long]);
    const rows: ReportRow[] = [['a', 1, 'near', 'b'], ...wide, ['c', 3, 'near', 'd']]; // prettier-ignore
    const book = new ExcelJS.Workbook();
    await book.xlsx.load((await written(rows)) as unknown as ArrayBuffer);
    const page = book.getWorksheet('Rows');
    expect(rows.map((_, at) => page?.getCell(at + 2, 4).value)).toEqual(rows.map(([, , , last]) => last));
  });
});
