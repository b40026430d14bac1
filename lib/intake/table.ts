import type { RawCell, RawPart, RawRow } from '@/lib/intake/files/raw-sheet';
import type { Entry, Place } from '@/lib/intake/problem-list';
import type { ColumnQuantity, SheetDefinition } from '@/lib/intake/sheet-definitions';
import type { Unit } from '@/lib/units/parse-unit';

/** A column of one part as its heading says. */
export interface Column {
  /** 0-based, from A. */
  readonly index: number;
  /** Heading as typed. */
  readonly text: string;
  /** Heading without its unit. */
  readonly name: string;
  readonly known: string | null;
  readonly quantity: ColumnQuantity;
  /** Unit of the heading or the unit row; null = none said, so the batch's. */
  unit: Unit | null;
  /** SI per number of this column; NaN for texts and for `load`. */
  factor: number;
  /** What is wrong with the heading: whoever fills a cell below it is touched. */
  problem: Entry | null;
}

/** One sheet of one file, read as far as its headings. */
export interface Part {
  readonly raw: RawPart;
  readonly definition: SheetDefinition;
  /** 1-based; null = none found. */
  readonly headingRow: number | null;
  readonly columns: readonly Column[];
  readonly byName: ReadonlyMap<string, Column>;
  /** Columns that the sheet needs and has not: whoever has a row here is touched. */
  readonly missing: ReadonlyMap<string, Entry>;
  /** Columns that mean nothing known, but stop whoever fills them. */
  readonly faulty: readonly Column[];
  /** True where numbers stored as text are worth a note: not in CSV, where all is text. */
  readonly typed: boolean;
  readonly dataRows: readonly RawRow[];
}

/** A data row. */
export interface Row {
  readonly part: Part;
  readonly raw: RawRow;
}

/** Every data row of the sheets of one name, in file order. */
export interface Table {
  readonly definition: SheetDefinition;
  readonly parts: readonly Part[];
  readonly rows: readonly Row[];
}

export function columnOf(row: Row, name: string): Column | undefined {
  return row.part.byName.get(name);
}

export function rawCell(row: Row, name: string): RawCell | null {
  const column = row.part.byName.get(name);
  return column ? (row.raw.cells[column.index] ?? null) : null;
}

/** A cell of a data row as a place for problems; a column that is not there keeps its name. */
export function placeOf(row: Row, name: string): Place {
  const column = row.part.byName.get(name);
  return column ? placeAt(row, column) : { ...partPlace(row.part.raw), row: row.raw.row, heading: name };
}

export function placeAt(row: Row, column: Column): Place {
  return {
    ...partPlace(row.part.raw),
    row: row.raw.row,
    column: column.index,
    heading: column.text,
    found: row.raw.cells[column.index]?.text ?? null,
  };
}

export function headingPlace(part: Part, column: Pick<Column, 'index' | 'text'>): Place {
  return { ...partPlace(part.raw), row: part.headingRow, column: column.index, heading: column.text, found: column.text };
}

export function partPlace(raw: RawPart): Place {
  return { order: raw.order, sheet: raw.name, file: raw.file, row: null, column: null, heading: null, found: null };
}

/** A sheet that is not in any file. */
export function absentPlace(sheet: string): Place {
  return { order: Infinity, sheet, file: null, row: null, column: null, heading: null, found: null };
}
