import { DecimalMarks } from '@/lib/intake/files/decimal-marks';
import type { Meter } from '@/lib/intake/files/meter';
import type { RawRow } from '@/lib/intake/files/raw-sheet';
import { unreadable } from '@/lib/intake/files/refusal';
import { type Parts, readDateStyles, readSharedStrings, readWorkbook } from '@/lib/intake/files/xlsx-parts';
import { readWorksheet, type WorkbookValues } from '@/lib/intake/files/xlsx-sheet';

/** The sheets of one file, and what its numbers say about its decimal mark. */
export interface FileSheets {
  readonly decimalMark: '.' | ',' | null;
  readonly sheets: readonly { readonly name: string; readonly rows: readonly RawRow[] }[];
}

/**
 * Reads every worksheet of a workbook, one after the other, from its unpacked parts (ECMA-376 part 1, 18.3 and 18.4).
 *
 * A reader of its own on a streaming XML parser, because the values matter more than the convenience: the streaming reader of
 * the workbook library decodes each chunk by itself (a `²` on a chunk's edge is lost), keeps only the last run of rich text
 * in a cell, loses the name of an error under a formula, reads an ISO date cell as its year, and fails on cells without an address.
 * @throws Refusal
 */
export async function readXlsx(parts: Parts, meter: Meter): Promise<FileSheets> {
  if ([...parts.keys()].some((path) => path.endsWith('vbaproject.bin'))) {
    throw unreadable('The workbook holds macros, which are not read. Save it as a workbook without macros (.xlsx).');
  }
  const workbook = await readWorkbook(parts, meter);
  const part = (path: string | null) => (path === null ? undefined : parts.get(path));
  const values: WorkbookValues = {
    dateStyles: await readDateStyles(part(workbook.styles), meter),
    strings: await readSharedStrings(part(workbook.sharedStrings), meter),
    date1904: workbook.date1904,
    textCells: [],
    numberCells: new Map(),
    inlineCells: new Map(),
    marks: new DecimalMarks(),
  };
  const sheets: { name: string; rows: readonly RawRow[] }[] = [];
  for (const { name, path } of workbook.sheets) {
    const entry = parts.get(path);
    if (entry) sheets.push({ name, rows: await readWorksheet(name, entry.chunks(meter), values, meter) });
  }
  // both marks in texts: neither is the file's, and each number must speak for itself
  return { decimalMark: values.marks.agreed(), sheets };
}
