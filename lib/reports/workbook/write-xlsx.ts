/** Sheets → one XLSX, streamed: a row is gone from memory once it is written, and the sink's pace is kept. */
import type { Writable } from 'node:stream';
import ExcelJS from 'exceljs';
import { crossesAsShown, type ReportColumn, type ReportRow, type ReportSheet } from '@/lib/reports/workbook/report-sheet';
import { rowWriter, type FormatOf } from '@/lib/reports/workbook/row-xml';
import { fitting } from '@/lib/reports/xml-text';

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

/** What a cell without any style gets. */
const plainStyle: Partial<ExcelJS.Style> = {};

type StyledRow = ExcelJS.Row & { style: Partial<ExcelJS.Style> };

/** What exceljs has beside its declared types, pinned with its version and held by this module's tests. */
interface StyledBook {
  readonly styles: { addStyleModel(style: Partial<ExcelJS.Style>): number };
}
interface OpenSheet {
  readonly stream: {
    write(xml: Buffer): unknown;
    readonly pipes?: readonly { readonly _writableState?: { readonly length: number } }[];
  };
}
const streamOf = (page: ExcelJS.Worksheet): OpenSheet['stream'] => (page as unknown as OpenSheet).stream;

const wentAway = (): Error => new Error('The reader of the workbook went away before it was complete');

/** Resolves only if the sink closes before it has taken everything. */
function closedEarly(sink: Writable): Promise<boolean> {
  return new Promise((resolve) => sink.once('close', () => resolve(!sink.writableFinished)));
}

/** Waits until what the sheet has handed on is compressed and the sink has taken it. */
async function keepPace(page: ExcelJS.Worksheet, sink: Writable): Promise<void> {
  const stream = streamOf(page);
  // The zip library's streams are of a kind that does not offer writableLength yet.
  const waiting = (): number => (stream.pipes?.[0]?._writableState?.length ?? 0) + sink.writableLength;
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

/** Formats of a table's cells, each made known to the workbook once. */
function formatsOf(book: ExcelJS.stream.xlsx.WorkbookWriter, columns: readonly ReportColumn[]): FormatOf {
  const { styles } = book as unknown as StyledBook;
  const numbers = columns.map(({ format }) => (format === undefined ? 0 : styles.addStyleModel({ numFmt: format })));
  const verdicts = new Map(Object.entries(verdictStyles).map(([word, style]) => [word, styles.addStyleModel(style)]));
  const exact = styles.addStyleModel(everyDigit);
  return (value, index) => {
    const column = columns[index];
    if (typeof value === 'string') return column?.verdict === true ? (verdicts.get(value) ?? 0) : 0;
    const { nearLimit } = column ?? {};
    return nearLimit !== undefined && crossesAsShown(value, nearLimit) ? exact : (numbers[index] ?? 0);
  };
}

/** Takes a sheet's rows after its heading: a table's as our own XML, free text through exceljs. */
interface RowSink {
  add(cells: ReportRow): void;
  /** Hands on what has gathered. */
  flush(): void;
}

/**
 * exceljs makes some ten objects for a cell, which at millions of them is most of a workbook's time; so the rows of a table,
 * plain numbers and words, go as XML into the sheet that exceljs has opened and closes again.
 */
function tableRows(page: ExcelJS.Worksheet, formatOf: FormatOf): RowSink {
  const write = rowWriter(formatOf);
  let bytes = Buffer.allocUnsafe(1 << 19);
  let row = 1;
  let end = 0;
  const flush = (): void => {
    // a copy, since the next rows are written where these were
    if (end > 0) streamOf(page).write(Buffer.from(bytes.subarray(0, end)));
    end = 0;
  };
  return {
    add(cells) {
      row += 1;
      const xml = write(row, cells);
      const most = 3 * xml.length; // bytes of UTF-8 for a unit of UTF-16
      if (end + most > bytes.length) flush();
      if (most > bytes.length) bytes = Buffer.allocUnsafe(2 * most);
      end += bytes.write(xml, end);
    },
    flush,
  };
}

function freeRows(page: ExcelJS.Worksheet, boldFirst: boolean): RowSink {
  return {
    add(cells) {
      const row = page.addRow(cells.map((cell) => (typeof cell === 'string' ? fitting(cell) : (cell ?? undefined)))) as StyledRow;
      row.style = plainStyle;
      cells.forEach((cell, index) => {
        if (cell !== null) row.getCell(index + 1).style = index === 0 && boldFirst ? boldStyle : plainStyle;
      });
      row.commit();
    },
    flush() {},
  };
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
    const formatOf = formatsOf(book, sheet.columns);
    const sinkOf = (open: ExcelJS.Worksheet): RowSink =>
      sheet.columns.length > 0 ? tableRows(open, formatOf) : freeRows(open, sheet.boldFirst === true);
    let part = 1;
    let page = openPage(book, sheet, part);
    let taker = sinkOf(page);
    let rows = 1;
    let since = 0;
    /** Whether it is time to look at the sink. */
    const add = (cells: ReportRow): boolean => {
      if (rows >= rowLimit) {
        taker.flush();
        closePage(page, sheet, rows);
        part += 1;
        page = openPage(book, sheet, part);
        taker = sinkOf(page);
        rows = 1;
      }
      taker.add(cells);
      rows += 1;
      since = (since + 1) % breath;
      if (since === 0) taker.flush();
      return since === 0;
    };
    const given = sheet.rows();
    // Rows that are at hand are not waited for one by one.
    if (Symbol.asyncIterator in given) {
      for await (const cells of given) if (add(cells)) await keepPace(page, sink);
    } else {
      for (const cells of given) if (add(cells)) await keepPace(page, sink);
    }
    taker.flush();
    closePage(page, sheet, rows);
  }
  const early = await Promise.race([book.commit().then(() => false), closedEarly(sink)]);
  if (early || (sink.destroyed && !sink.writableFinished)) throw wentAway();
}
