/** Workbooks by a general-purpose spreadsheet writer other than the one the product itself uses. */
import writeExcelFile from 'write-excel-file/node';

export type WrittenCell = string | number | boolean | Date | null;
export type WrittenSheets = Readonly<Record<string, readonly (readonly WrittenCell[])[]>>;

/** @returns the bytes of an XLSX with one sheet for each key, in their order */
export async function writtenElsewhere(sheets: WrittenSheets): Promise<Uint8Array> {
  const pages = Object.entries(sheets).map(([sheet, rows]) => ({
    sheet,
    data: rows.map((row) => row.map((value) => (value === null ? null : { value, type: typeOf(value), ...(value instanceof Date ? { format: 'yyyy-mm-dd' } : {}) }))), // prettier-ignore
  }));
  return new Uint8Array(await writeExcelFile(pages as Parameters<typeof writeExcelFile>[0]).toBuffer());
}

function typeOf(value: Exclude<WrittenCell, null>): typeof String | typeof Number | typeof Boolean | typeof Date {
  if (value instanceof Date) return Date;
  if (typeof value === 'number') return Number;
  return typeof value === 'boolean' ? Boolean : String;
}
