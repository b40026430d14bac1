/** Sheets ↔ rows as typed: what is kept of an input, and the same sheets made of it again. */
import type { RawCell, RawPart, RawRow, RawSheet } from '@/lib/intake/files/raw-sheet';
import { sheetKey } from '@/lib/intake/files/names';
import type { InputRow, SheetRead } from '@/lib/intake/intake';
import { cellsOf, isTyped, marksOf, plainCell } from '@/lib/intake/rows/cell-marks';

/** What of a sheet is needed to read its rows. */
export type InputSheet = Pick<SheetRead, 'name' | 'file' | 'decimalMark'>;

/** An input as it is kept. A row's `part` is its sheet's place in `sheets`; rows stand in the order of sheets, then as in the file. */
export interface StoredInput {
  readonly sheets: readonly InputSheet[];
  readonly rows: readonly InputRow[];
}

/** Every row of the sheets as typed, in the order of the files. */
export function inputRows(sheets: readonly RawSheet[]): InputRow[] {
  return sheets
    .flatMap((sheet) => sheet.parts)
    .sort((a, b) => a.order - b.order)
    .flatMap((part, place) => rowsOfPart(part, place));
}

export function rowsOfPart(part: RawPart, place: number): InputRow[] {
  const typed = isTyped(part.file);
  return part.rows.map(({ row, cells, changedBy }) => ({
    sheet: part.name,
    row,
    cells: cells.map((cell) => cell?.text ?? null),
    part: place,
    marks: marksOf(cells, typed),
    changedBy: changedBy ?? null,
  }));
}

/** The sheet at a place as it stood in its file. */
export function partOf({ name, file, decimalMark }: InputSheet, place: number, rows: readonly InputRow[]): RawPart {
  const make = cellMaker(isTyped(file));
  return {
    name,
    file,
    order: place,
    decimalMark: decimalMark ?? null,
    rows: rows.map(({ row, cells, marks, changedBy }): RawRow => {
      const raw = { row, cells: cellsOf(cells, marks ?? null, make) };
      return changedBy === undefined || changedBy === null ? raw : { ...raw, changedBy };
    }),
  };
}

/** The sheets, those of one name joined, in the order in which the files gave them. */
export function sheetsFromRows({ sheets, rows }: StoredInput): RawSheet[] {
  const own: InputRow[][] = sheets.map(() => []);
  for (const row of rows) own[row.part ?? -1]?.push(row);
  const joined = new Map<string, { name: string; parts: RawPart[] }>();
  for (const [place, sheet] of sheets.entries()) {
    const key = sheetKey(sheet.name);
    const of = joined.get(key) ?? { name: sheet.name, parts: [] };
    of.parts.push(partOf(sheet, place, own[place] ?? []));
    joined.set(key, of);
  }
  return [...joined.values()];
}

/** True where every row says which sheet it stands on: an input kept by an earlier version may not. */
export const canBeReadAgain = (rows: readonly InputRow[]): boolean => rows.every(({ part }) => part !== undefined);

const mostKept = 50_000;

/** Makes cells, the same one for the same text: most cells of a batch repeat. */
function cellMaker(typed: boolean): (text: string) => RawCell {
  const known = new Map<string, RawCell>();
  return (text) => {
    const same = known.get(text);
    if (same) return same;
    const made = plainCell(text, typed);
    if (text.length < 64) {
      if (known.size >= mostKept) known.clear();
      known.set(text, made);
    }
    return made;
  };
}
