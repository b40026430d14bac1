import { PassThrough } from 'node:stream';
import { buffer } from 'node:stream/consumers';
import ExcelJS from 'exceljs';
import { describe, expect, it } from 'vitest';
import { ratioColumn, text, verdictColumn, type ReportRow, type ReportSheet } from './report-sheet';
import { writeXlsx } from './write-xlsx';

function sheetOf(rows: ReportRow[], name = 'Flags'): ReportSheet {
  return { name, columns: [text('frame'), ratioColumn(0.9), verdictColumn()], rows: () => rows };
}

async function readBack(sheets: ReportSheet[], rowLimit?: number): Promise<ExcelJS.Workbook> {
  const sink = new PassThrough();
  const bytes = buffer(sink);
  await writeXlsx(sheets, sink, rowLimit);
  const book = new ExcelJS.Workbook();
  await book.xlsx.load((await bytes) as unknown as ArrayBuffer);
  return book;
}

describe('result workbook writer', () => {
  it('writes numbers unrounded, with a format that shows three decimals of a ratio', async () => {
    const book = await readBack([sheetOf([['F1', 1.00345678901234, 'over']])]);
    const cell = book.getWorksheet('Flags')?.getCell('B2');
    expect(cell?.value).toBe(1.00345678901234);
    expect(cell?.numFmt).toBe('0.000');
  });

  it('never shows a ratio on another side of a boundary than its verdict', async () => {
    const rows = [1.0003, 0.89996, 0.9999, 0.5].map((ratio): ReportRow => ['F', ratio, 'x']);
    const page = (await readBack([sheetOf(rows)])).getWorksheet('Flags');
    expect([2, 3, 4, 5].map((row) => page?.getCell(row, 2).numFmt)).toEqual([
      '0.000############',
      '0.000############',
      '0.000',
      '0.000',
    ]);
  });

  it('marks over, near and not checked by fill and word, and leaves within plain', async () => {
    const book = await readBack([sheetOf([['a', 1.2, 'over'], ['b', 0.95, 'near'], ['c', null, 'not checked'], ['d', 0.5, 'within']])]); // prettier-ignore
    const page = book.getWorksheet('Flags');
    const fills = [2, 3, 4, 5].map((row) => page?.getCell(row, 3).fill);
    expect(new Set(fills.slice(0, 3).map((fill) => JSON.stringify(fill))).size).toBe(3);
    expect(fills[3]).toBeUndefined();
    expect([2, 3, 4, 5].map((row) => page?.getCell(row, 3).value)).toEqual(['over', 'near', 'not checked', 'within']);
  });

  it('keeps text that looks like a formula as text', async () => {
    const book = await readBack([sheetOf([['=1+1', 0.5, 'within'], ['@x', 0.5, 'within'], ['-a', 0.5, 'within']])]); // prettier-ignore
    const page = book.getWorksheet('Flags');
    expect([2, 3, 4].map((row) => [page?.getCell(row, 1).type, page?.getCell(row, 1).value])).toEqual([
      [ExcelJS.ValueType.String, '=1+1'],
      [ExcelJS.ValueType.String, '@x'],
      [ExcelJS.ValueType.String, '-a'],
    ]);
  });

  it('goes on in a second sheet where the format holds no more rows, heading repeated, nothing lost', async () => {
    const rows = Array.from({ length: 9 }, (_, index): ReportRow => [`F${index}`, index, 'within']);
    const book = await readBack([sheetOf(rows)], 5);
    expect(book.worksheets.map((page) => page.name)).toEqual(['Flags', 'Flags 2', 'Flags 3']);
    const read = book.worksheets.flatMap((page) => {
      expect(page.getCell('A1').value).toBe('frame');
      return page
        .getSheetValues()
        .slice(2)
        .map((row) => (Array.isArray(row) ? row[1] : null));
    });
    expect(read).toEqual(rows.map(([frame]) => frame));
  });

  it('freezes the heading and offers filters over all rows', async () => {
    const book = await readBack([sheetOf([['a', 1, 'near']])]);
    const page = book.getWorksheet('Flags');
    expect(page?.views[0]).toMatchObject({ state: 'frozen', ySplit: 1 });
    expect(page?.autoFilter).toBe('A1:C2');
  });

  it('takes no more rows while nobody reads, and goes on when somebody does', async () => {
    const most = 100_000;
    let taken = 0;
    let spread = 1;
    const digits = (): number => (spread = (spread * 48_271) % 2_147_483_647);
    function* rows(): Generator<ReportRow> {
      for (; taken < most; taken += 1) {
        // Figures at random, which hardly compress.
        yield [Array.from({ length: 20 }, digits).join(''), digits() / 1e9, 'within'];
      }
    }
    const sink = new PassThrough();
    const written = writeXlsx([{ ...sheetOf([]), rows }], sink);
    for (let before = -1; before !== taken;) {
      before = taken;
      await new Promise((resolve) => setTimeout(resolve, 400));
    }
    expect(taken).toBeGreaterThan(0);
    expect(taken).toBeLessThan(most / 2);
    sink.resume();
    await written;
    expect(taken).toBe(most);
  });

  it('ends with an error when the reader goes away', async () => {
    const sink = new PassThrough();
    const many = function* (): Iterable<ReportRow> {
      for (let index = 0; index < 400_000; index += 1)
        yield [`frame number ${index} with some length to it`, index / 7, 'within'];
    };
    sink.once('data', () => sink.destroy());
    sink.on('error', () => undefined);
    await expect(writeXlsx([{ ...sheetOf([]), rows: many }], sink)).rejects.toThrow(/went away/);
  });
});
