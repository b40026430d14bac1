/** One sheet as CSV text: UTF-8 with BOM, commas, CRLF; text that a spreadsheet would run as a formula is neutralised. */
import Papa from 'papaparse';
import type { ReportCell, ReportSheet } from '@/lib/reports/workbook/report-sheet';

/** Lines of CSV are joined to pieces of about this many rows. */
const piece = 500;

/** A leading = + - @ (or tab, carriage return) in text gets an apostrophe, unless the text is just a number. */
export function neutralised(text: string): string {
  if (!/^[=+\-@\t\r]/.test(text)) return text;
  return /^[+-]?(\d+\.?\d*|\.\d+)(e[+-]?\d+)?$/i.test(text) ? text : `'${text}`;
}

const safe = (cell: ReportCell): ReportCell => (typeof cell === 'string' ? neutralised(cell) : cell);

export function csvLine(cells: readonly ReportCell[]): string {
  return `${Papa.unparse([cells.map(safe)], { newline: '\r\n' })}\r\n`;
}

/** Yields the sheet's CSV in pieces, heading first. */
export async function* csvOf(sheet: ReportSheet): AsyncIterable<string> {
  let lines = ['\ufeff'];
  if (sheet.columns.length > 0) lines.push(csvLine(sheet.columns.map(({ heading }) => heading)));
  for await (const cells of sheet.rows()) {
    lines.push(csvLine(cells));
    if (lines.length >= piece) {
      yield lines.join('');
      lines = [];
    }
  }
  yield lines.join('');
}
