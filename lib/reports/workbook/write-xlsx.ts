/** Sheets → one XLSX, streamed: a row is gone from memory once it is written, and the sink's pace is kept. */
import type { Writable } from 'node:stream';
import ExcelJS from 'exceljs';
import {
  crossesAsShown,
  type ReportCell,
  type ReportColumn,
  type ReportRow,
  type ReportSheet,
} from '@/lib/reports/workbook/report-sheet';

/** Rows of one sheet that the format allows. */
const mostRows = 1_048_576;
/** Rows between two looks at whether the sink keeps up. */
const breath = 256;
const mostWaiting = 1 << 20;

const ink = { argb: 'FF12212D' };
const solid = (argb: string): ExcelJS.Fill => ({ type: 'pattern', pattern: 'solid', fgColor: { argb } });
const verdictStyles: Readonly<Record<string, Partial<ExcelJS.Style>>> = {
  over: { fill: solid('FFFBE6E1'), font: { color: { argb: 'FFB3241A' }, bold: true } },
  near: { fill: solid('FFFBF0D3'), font: { color: { argb: 'FF7F4D00' } } },
  'not checked': { fill: solid('FFE3E6E4'), font: { color: { argb: 'FF3F515A' }, italic: true } },
};
const headStyle: Partial<ExcelJS.Style> = {
  font: { bold: true, color: ink },
  border: { bottom: { style: 'thin', color: ink } },
  alignment: { wrapText: true, vertical: 'bottom' },
};
/** A ratio that three decimals would round across a boundary: every digit it has. */
const everyDigit: Partial<ExcelJS.Style> = { numFmt: '0.000############' };
const boldStyle: Partial<ExcelJS.Style> = { font: { bold: true, color: ink } };

/** What a cell without any style gets: exceljs looks up a style object it knows, and works out anew each one it does not. */
const plainStyle: Partial<ExcelJS.Style> = {};

function columnStyles(columns: readonly ReportColumn[]): Partial<ExcelJS.Style>[] {
  const shared = new Map<string, Partial<ExcelJS.Style>>();
  return columns.map(({ format }) => {
    if (format === undefined) return plainStyle;
    const known = shared.get(format) ?? { numFmt: format };
    shared.set(format, known);
    return known;
  });
}

type StyledRow = ExcelJS.Row & { style: Partial<ExcelJS.Style> };

interface Piped {
  readonly pipes?: readonly { readonly _writableState?: { readonly length: number } }[];
}

const wentAway = (): Error => new Error('The reader of the workbook went away before it was complete');

/** Resolves only if the sink closes before it has taken everything. */
function closedEarly(sink: Writable): Promise<boolean> {
  return new Promise((resolve) => sink.once('close', () => resolve(!sink.writableFinished)));
}

/** Waits until what the sheet has handed on is compressed and the sink has taken it. */
async function keepPace(page: ExcelJS.Worksheet, sink: Writable): Promise<void> {
  const { stream } = page as unknown as { stream?: Piped };
  // The zip library's streams are of a kind that does not offer writableLength yet.
  const waiting = (): number => (stream?.pipes?.[0]?._writableState?.length ?? 0) + sink.writableLength;
  await new Promise((resolve) => setImmediate(resolve));
  while (!sink.destroyed && waiting() > mostWaiting) await new Promise((resolve) => setTimeout(resolve, 2));
  if (sink.destroyed) throw wentAway();
}

function openPage(book: ExcelJS.stream.xlsx.WorkbookWriter, sheet: ReportSheet, part: number): ExcelJS.Worksheet {
  const name = part === 1 ? sheet.name : `${sheet.name} ${part}`;
  const table = sheet.columns.length > 0;
  const page = book.addWorksheet(name, table ? { views: [{ state: 'frozen', ySplit: 1 }] } : {});
  if (!table) {
    page.columns = [{ width: 18 }, { width: 90 }, { width: 22 }];
    return page;
  }
  page.columns = sheet.columns.map(({ width }) => ({ width: width ?? 12 }));
  const head = page.addRow(sheet.columns.map(({ heading }) => heading)) as StyledRow;
  head.style = plainStyle;
  for (let index = 1; index <= sheet.columns.length; index += 1) head.getCell(index).style = headStyle;
  head.commit();
  return page;
}

function closePage(page: ExcelJS.Worksheet, sheet: ReportSheet, rows: number): void {
  if (sheet.columns.length > 0) {
    page.autoFilter = { from: { row: 1, column: 1 }, to: { row: Math.max(rows, 1), column: sheet.columns.length } };
  }
  page.commit();
}

function styleOf(
  value: string | number,
  column: ReportColumn | undefined,
  style: Partial<ExcelJS.Style>,
): Partial<ExcelJS.Style> {
  if (typeof value === 'string') return (column?.verdict ? verdictStyles[value] : undefined) ?? plainStyle;
  const { nearLimit } = column ?? {};
  return nearLimit !== undefined && crossesAsShown(value, nearLimit) ? everyDigit : style;
}

function addRow(
  page: ExcelJS.Worksheet,
  sheet: ReportSheet,
  styles: readonly Partial<ExcelJS.Style>[],
  cells: readonly ReportCell[],
): void {
  // An absent value makes no cell at all; a null would make an empty one, with a style to be worked out.
  const row = page.addRow(cells.includes(null) ? cells.map((cell) => cell ?? undefined) : cells) as StyledRow;
  row.style = plainStyle;
  const free = sheet.columns.length === 0;
  for (let index = 0; index < cells.length; index += 1) {
    const value = cells[index];
    if (value === null || value === undefined) continue;
    const style = free
      ? index === 0 && sheet.boldFirst
        ? boldStyle
        : plainStyle
      : styleOf(value, sheet.columns[index], styles[index] ?? plainStyle);
    row.getCell(index + 1).style = style;
  }
  row.commit();
}

/** Light compression: at the usual level a workbook takes about a sixth longer to write, and is about a fifth smaller (300 portals). */
function options(sink: Writable): Partial<ExcelJS.stream.xlsx.WorkbookStreamWriterOptions> {
  const zip = { zlib: { level: 1 } };
  return {
    stream: sink,
    useStyles: true,
    useSharedStrings: false,
    zip,
  } as Partial<ExcelJS.stream.xlsx.WorkbookStreamWriterOptions>;
}

/**
 * Writes the sheets one after another.
 * @param rowLimit rows a sheet may hold before it goes on as "… 2" (smaller in tests)
 * @throws Error where the sink is destroyed before the end
 */
export async function writeXlsx(sheets: Iterable<ReportSheet>, sink: Writable, rowLimit = mostRows): Promise<void> {
  const book = new ExcelJS.stream.xlsx.WorkbookWriter(options(sink));
  for (const sheet of sheets) {
    const styles = columnStyles(sheet.columns);
    let part = 1;
    let page = openPage(book, sheet, part);
    let rows = 1;
    let since = 0;
    /** Whether it is time to look at the sink. */
    const add = (cells: ReportRow): boolean => {
      if (rows >= rowLimit) {
        closePage(page, sheet, rows);
        part += 1;
        page = openPage(book, sheet, part);
        rows = 1;
      }
      addRow(page, sheet, styles, cells);
      rows += 1;
      since = (since + 1) % breath;
      return since === 0;
    };
    const given = sheet.rows();
    // Rows that are at hand are not waited for one by one.
    if (Symbol.asyncIterator in given) {
      for await (const cells of given) if (add(cells)) await keepPace(page, sink);
    } else {
      for (const cells of given) if (add(cells)) await keepPace(page, sink);
    }
    closePage(page, sheet, rows);
  }
  const early = await Promise.race([book.commit().then(() => false), closedEarly(sink)]);
  if (early || (sink.destroyed && !sink.writableFinished)) throw wentAway();
}
