import { cellAddress } from '@/lib/intake/files/cell-address';
import type { RawCell, RawRow } from '@/lib/intake/files/raw-sheet';

/**
 * Rows of a sheet with one cell changed. Where the cell lies in merged cells, these come apart: the others keep the value
 * they had.
 *
 * @param column 0-based from A   @param by who changed it
 */
export function withCell(rows: readonly RawRow[], row: number, column: number, cell: RawCell, by: string): RawRow[] {
  const old = rows.find((each) => each.row === row)?.cells[column];
  const master = old?.mergedFrom ?? cellAddress(row, column);
  return rows.map((each) => {
    const loosened = each.cells.some((one) => one?.mergedFrom === master)
      ? { ...each, cells: each.cells.map((one) => (one?.mergedFrom === master ? loose(one) : one)) }
      : each;
    if (each.row !== row) return loosened;
    const cells = Array.from({ length: Math.max(loosened.cells.length, column + 1) }, (_, i) => loosened.cells[i] ?? null);
    cells[column] = cell;
    return { row, cells, changedBy: by };
  });
}

function loose({ mergedFrom: _, ...cell }: RawCell): RawCell {
  return cell as RawCell;
}
