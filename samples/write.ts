/** Writes sheets given as arrays, as an office would keep them: a bold heading row, widths, frozen head. */
import { mkdirSync, writeFileSync } from 'node:fs';
import { join } from 'node:path';
import ExcelJS from 'exceljs';

export type SampleCell = string | number | boolean | Date | null | ExcelJS.CellFormulaValue | ExcelJS.CellErrorValue;
export interface SampleSheet {
  readonly name: string;
  /** Heading row first (title rows may stand above it: `headingRow` says which it is, from 1). */
  readonly rows: readonly (readonly SampleCell[])[];
  readonly headingRow?: number;
  readonly merges?: readonly string[];
  readonly hidden?: boolean;
}

const fixedDate = new Date(Date.UTC(2026, 10, 2));

export async function writeWorkbook(folder: string, name: string, sheets: readonly SampleSheet[]): Promise<void> {
  const book = new ExcelJS.Workbook();
  book.creator = 'Tallyframe samples';
  book.created = fixedDate;
  book.modified = fixedDate;
  for (const sheet of sheets) {
    const heading = sheet.headingRow ?? 1;
    const page = book.addWorksheet(sheet.name, {
      views: [{ state: 'frozen', ySplit: heading }],
      state: sheet.hidden ? 'hidden' : 'visible',
    });
    for (const row of sheet.rows) page.addRow([...row]);
    page.getRow(heading).font = { bold: true };
    for (const merge of sheet.merges ?? []) page.mergeCells(merge);
    page.columns.forEach((column, index) => {
      const longest = Math.max(...sheet.rows.map((row) => String(row[index] ?? '').length), 6);
      column.width = Math.min(40, longest + 2);
    });
  }
  mkdirSync(folder, { recursive: true });
  await book.xlsx.writeFile(join(folder, name));
}

/** CSV as a continental office saves it: semicolons, decimal commas, CRLF, UTF-8 with BOM. */
export function writeSemicolonCsv(folder: string, sheets: readonly SampleSheet[]): void {
  mkdirSync(folder, { recursive: true });
  const text = (cell: SampleCell): string => (typeof cell === 'number' ? String(cell).replace('.', ',') : String(cell ?? ''));
  for (const sheet of sheets) {
    const lines = sheet.rows.map((row) => row.map(text).join(';'));
    writeFileSync(join(folder, `${sheet.name}.csv`), `\ufeff${lines.join('\r\n')}\r\n`);
  }
}
