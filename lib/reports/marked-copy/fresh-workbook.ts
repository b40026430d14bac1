import { PassThrough } from 'node:stream';
import { buffer } from 'node:stream/consumers';
import ExcelJS from 'exceljs';
import type { RawCell, RawPart, RawRow } from '@/lib/intake/files/raw-sheet';
import type { Problem } from '@/lib/problems/problem';
import { bySheet, fillColour, type Mark, marksOf, problemHeadings, problemRow } from '@/lib/reports/marked-copy/marks';
import { problemsSheetName } from '@/lib/reports/marked-copy/problems-sheet';
import { readNumber } from '@/lib/units/read-number';

export interface FreshOptions {
  /** True: only the rows that have problems, after the sheet's first rows, each with its row number in the user's file. */
  readonly badRowsOnly: boolean;
  /** 1-based heading row by sheet name; 1 where it is not known. */
  readonly headingRows: ReadonlyMap<string, number>;
}

const fills = Object.fromEntries(
  Object.entries(fillColour).map(([severity, argb]) => [
    severity,
    { type: 'pattern', pattern: 'solid', fgColor: { argb } } satisfies ExcelJS.Fill,
  ]),
) as Record<Mark['severity'], ExcelJS.Fill>;

/** A new workbook of what was read, marked: for CSV files, and for workbooks too large to be patched. */
export async function freshWorkbook(
  file: string,
  parts: readonly RawPart[],
  problems: readonly Problem[],
  options: FreshOptions,
): Promise<Uint8Array> {
  const stream = new PassThrough();
  const bytes = buffer(stream);
  const workbook = new ExcelJS.stream.xlsx.WorkbookWriter({ stream, useStyles: true, useSharedStrings: false });
  // the writer stamps its own time otherwise
  workbook.created = new Date(0);
  workbook.modified = new Date(0);
  const problemsOf = bySheet(problems, file);
  for (const part of parts) {
    const marks = marksOf(problemsOf.get(part.name) ?? []);
    if (options.badRowsOnly && marks.length === 0) continue;
    const sheet = workbook.addWorksheet(sheetName(part.name));
    const rows = options.badRowsOnly ? badRows(part, marks, options.headingRows.get(part.name) ?? 1) : everyRow(part, marks);
    rows.forEach((row, i) => {
      const at = options.badRowsOnly ? i + 1 : row.row;
      writeRow(sheet.getRow(at), row, marks, part.decimalMark, options.badRowsOnly);
    });
    await sheet.commit();
  }
  const list = workbook.addWorksheet(problemsSheetName, { views: [{ state: 'frozen', ySplit: 1 }] });
  list.columns = [10, 22, 18, 7, 18, 8, 22, 24, 90].map((width) => ({ width }));
  list.addRow([...problemHeadings]).commit();
  for (const problem of problems) list.addRow([...problemRow(problem)]).commit();
  await list.commit();
  await workbook.commit();
  return new Uint8Array(await bytes);
}

function writeRow(
  target: ExcelJS.Row,
  row: RawRow,
  marks: readonly Mark[],
  decimalMark: RawPart['decimalMark'],
  numbered: boolean,
): void {
  const shift = numbered ? 2 : 1;
  if (numbered) target.getCell(1).value = `row ${row.row}`;
  row.cells.forEach((cell, column) => {
    if (cell) target.getCell(column + shift).value = valueOf(cell, decimalMark);
  });
  for (const mark of marks) {
    if (mark.row !== row.row) continue;
    const cell = target.getCell(mark.column + shift);
    cell.value ??= ''; // the writer leaves out rows that hold nothing
    cell.fill = fills[mark.severity];
    cell.note = mark.note;
  }
  target.commit();
}

/** Numbers that a CSV file writes plainly become numbers; what could be an id of its own (`01`, `1.50`) stays text. */
function valueOf(cell: RawCell, decimalMark: RawPart['decimalMark']): ExcelJS.CellValue {
  if (cell.kind === 'number' || cell.kind === 'boolean') return cell.value;
  if (cell.kind !== 'text') return cell.text;
  const read = readNumber(cell.text, { decimalMark });
  const plain = decimalMark === ',' ? cell.text.trim().replace(',', '.') : cell.text.trim();
  return read.kind === 'number' && read.unit === null && String(read.value) === plain ? read.value : cell.text;
}

/** All rows of a part, and those that are blank but marked. */
function everyRow(part: RawPart, marks: readonly Mark[]): readonly RawRow[] {
  const there = new Set(part.rows.map((row) => row.row));
  const blank = [...new Set(marks.map((mark) => mark.row))].filter((row) => !there.has(row));
  return blank.length === 0
    ? part.rows
    : [...part.rows, ...blank.map((row) => ({ row, cells: [] }))].sort((a, b) => a.row - b.row);
}

function badRows(part: RawPart, marks: readonly Mark[], headingRow: number): readonly RawRow[] {
  const bad = new Set(marks.map((mark) => mark.row));
  return part.rows.filter((row) => row.row <= headingRow || bad.has(row.row));
}

/** What a spreadsheet takes as a sheet's name: 31 characters, none of `: \ / ? * [ ]`. */
function sheetName(name: string): string {
  return name.replace(/[:\\/?*[\]]/g, ' ').slice(0, 31);
}
