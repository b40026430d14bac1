import { cellPosition } from '@/lib/intake/files/cell-address';
import { limits } from '@/lib/intake/files/limits';
import type { Meter } from '@/lib/intake/files/meter';
import type { RawCell, RawRow } from '@/lib/intake/files/raw-sheet';
import { tooLarge } from '@/lib/intake/files/refusal';

/** Cells of merged blocks looked at in one sheet: far above any sheet that people merge by hand. */
const mostCells = 20_000_000;

/**
 * Gives the master's value to every cell of each merged block, in rows that hold something of their own: a row that
 * lies in merged blocks altogether is the same row as the master's on the sheet, and reading it again would double a load.
 * @param rows ascending; changed in place   @param merges as `A2:A11`
 */
export function fillMerged(rows: RawRow[], merges: readonly string[], meter: Meter): RawRow[] {
  let looked = 0;
  for (const merge of merges) {
    const [from, to] = merge.split(':').map(cellPosition);
    if (!from || !to) continue;
    const at = firstFrom(rows, from.row);
    const master = rows[at]?.row === from.row ? (rows[at].cells[from.column] ?? null) : null;
    if (master === null) continue;
    const copy: RawCell = { ...master, mergedFrom: merge.slice(0, merge.indexOf(':')).replaceAll('$', '').toUpperCase() };
    for (let i = at; i < rows.length; i += 1) {
      const row = rows[i];
      if (!row || row.row > to.row) break;
      const cells = row.cells as (RawCell | null)[];
      const last = Math.min(to.column, limits.columns - 1);
      looked += 1 + Math.max(0, last - from.column);
      if (looked > mostCells)
        throw tooLarge('A sheet has more merged cells than can be read. Undo the merging, or copy its cells as values.');
      for (let column = from.column; column <= last; column += 1) {
        if (cells[column] !== null && cells[column] !== undefined) continue;
        meter.keep(8 * (column + 1 - Math.min(column, cells.length)));
        while (cells.length < column) cells.push(null);
        cells[column] = copy;
      }
    }
  }
  return rows;
}

/** Index of the first row numbered `row` or more. */
function firstFrom(rows: readonly RawRow[], row: number): number {
  let low = 0;
  let high = rows.length;
  while (low < high) {
    const middle = (low + high) >> 1;
    if ((rows[middle]?.row ?? 0) < row) low = middle + 1;
    else high = middle;
  }
  return low;
}
