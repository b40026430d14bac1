/** Rows of a table as a sheet's XML (ECMA-376 part 1, 18.3.1.73 and 18.3.1.4). */
import { columnLetters } from '@/lib/intake/files/cell-address';
import type { ReportRow } from '@/lib/reports/workbook/report-sheet';
import { cellText, fitting } from '@/lib/reports/xml-text';

/** Place of a value's format among the workbook's (18.8.10); 0 = as it comes. */
export type FormatOf = (value: string | number, column: number) => number;

/**
 * Writes rows as XML. An absent value makes no cell; a number keeps every digit, and what is none (∞) is text; text stays
 * text, whatever it starts with, as far as a cell takes it.
 * @returns the XML of a row, given its number from 1 and its cells
 */
export function rowWriter(formatOf: FormatOf): (row: number, cells: ReportRow) => string {
  const opened: string[] = [];
  return (row, cells) => {
    let xml = `<row r="${row}">`;
    for (let column = 0; column < cells.length; column += 1) {
      const value = cells[column];
      if (value === null || value === undefined) continue;
      const format = formatOf(value, column);
      xml += opened[column] ??= `<c r="${columnLetters(column)}`;
      xml += format === 0 ? `${row}"` : `${row}" s="${format}"`;
      xml += Number.isFinite(value) ? `><v>${value}</v></c>` : ` t="str"><v>${cellText(fitting(String(value)))}</v></c>`;
    }
    return `${xml}</row>`;
  };
}
