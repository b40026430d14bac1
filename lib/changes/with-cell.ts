import { cellAddress } from '@/lib/intake/files/cell-address';
import type { RawCell, RawRow } from '@/lib/intake/files/raw-sheet';

/** New cells by row number and column, 0-based from A. */
export type CellEdits = ReadonlyMap<number, ReadonlyMap<number, RawCell>>;

/**
 * Rows of a sheet with one cell changed. Where the cell lies in merged cells, these come apart: the others keep the value
 * they had.
 *
 * @param column 0-based from A   @param by who changed it
 */
export function withCell(rows: readonly RawRow[], row: number, column: number, cell: RawCell, by: string): RawRow[] {
  return withCells(rows, new Map([[row, new Map([[column, cell]])]]), by);
}

/** Rows of a sheet with cells changed, in one pass over them. */
export function withCells(rows: readonly RawRow[], edits: CellEdits, by: string): RawRow[] {
  const masters = new Set<string>();
  for (const { row, cells } of rows) {
    for (const column of edits.get(row)?.keys() ?? []) masters.add(cells[column]?.mergedFrom ?? cellAddress(row, column));
  }
  return rows.map((each) => {
    const merged = (one: RawCell | null): one is RawCell => one?.mergedFrom !== undefined && masters.has(one.mergedFrom);
    const loosened = each.cells.some(merged)
      ? { ...each, cells: each.cells.map((one) => (merged(one) ? loose(one) : one)) }
      : each;
    const own = edits.get(each.row);
    if (!own) return loosened;
    const width = Math.max(loosened.cells.length, ...[...own.keys()].map((column) => column + 1));
    const cells = Array.from({ length: width }, (_, i) => own.get(i) ?? loosened.cells[i] ?? null);
    return { row: each.row, cells, changedBy: by };
  });
}

function loose({ mergedFrom: _, ...cell }: RawCell): RawCell {
  return cell as RawCell;
}
