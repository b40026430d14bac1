import { bracket } from '@/lib/intake/families/bracket';
import { type Family, readFamilies, type Rule } from '@/lib/intake/families/family';
import { portal } from '@/lib/intake/families/portal';
import type { RawCell, RawSheet } from '@/lib/intake/files/raw-sheet';
import { numberAsId } from '@/lib/intake/ids';
import { ProblemList } from '@/lib/intake/problem-list';
import { readTable } from '@/lib/intake/read-table';
import { Reader } from '@/lib/intake/reader';
import { sheetDefinitions, type SheetName } from '@/lib/intake/sheet-definitions';
import type { Table } from '@/lib/intake/table';
import type { System } from '@/lib/units/quantity';

export type DescriptionCell = string | number | null;

/** A family as the very sheets that a person would write for it; numbers in metric units. */
export interface Description {
  readonly name: string;
  readonly rules: readonly Rule[];
  readonly sheets: Readonly<Partial<Record<SheetName, readonly (readonly DescriptionCell[])[]>>>;
}

export const builtInDescriptions: readonly Description[] = [portal, bracket];

/**
 * The built-in families, read from their sheets by the reader that reads everybody's.
 * @param system the batch's: where a variant's heading says no unit, it is in the batch's
 */
export function builtInFamilies(system: System): Family[] {
  return builtInDescriptions.map((description) => {
    const problems = new ProblemList();
    const reader = new Reader(problems);
    const tables = new Map<SheetName, Table>();
    for (const [sheet, rows] of Object.entries(description.sheets) as [SheetName, readonly (readonly DescriptionCell[])[]][]) {
      const definition = sheetDefinitions.get(sheet);
      if (definition) tables.set(sheet, readTable(rawSheet(sheet, description.name, rows), definition, 'metric', problems));
    }
    const family = [...readFamilies(tables.get('Families'), system, reader, problems).values()][0];
    const told = problems.list().filter((problem) => problem.severity === 'error');
    if (!family || told.length > 0) throw new RangeError(`the built-in family ${description.name} is wrong: ${told[0]?.message}`);
    return { ...family, builtIn: tables, rules: description.rules };
  });
}

function rawSheet(name: SheetName, file: string, rows: readonly (readonly DescriptionCell[])[]): RawSheet {
  const raw = rows.map((cells, i) => ({ row: i + 1, cells: cells.map(rawCell) }));
  return { name, parts: [{ name, file, order: -1, decimalMark: '.', rows: raw }] };
}

function rawCell(cell: DescriptionCell): RawCell | null {
  if (cell === null) return null;
  return typeof cell === 'number' ? { kind: 'number', value: cell, text: numberAsId(cell) } : { kind: 'text', text: cell };
}
