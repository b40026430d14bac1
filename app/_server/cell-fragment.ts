import 'server-only';
import type { CellFragment, FragmentRow } from '@/components/intake/intake-data';
import { db } from '@/db/client';
import { listInputRowsAround, listSheets } from '@/db/queries/problems';
import type { RevisionRecord } from '@/db/queries/revisions';

/** Rows shown on each side of the one in question, and columns shown at most. */
const around = 3;
const mostColumns = 8;

interface Place {
  readonly sheet: string;
  readonly row: number;
  readonly cell: string | null;
}

/** A piece of the sender's own sheet round a cell, with its heading row; null where no row of it was kept. */
export async function cellFragment(revision: RevisionRecord, { sheet, row, cell }: Place): Promise<CellFragment | null> {
  const sheets = await listSheets(db(), revision.office, revision.id);
  const headingRow = sheets.find((one) => one.name === sheet)?.headingRow ?? null;
  const near = await listInputRowsAround(db(), revision.office, revision.id, { sheet, row, around });
  if (near.length === 0) return null;
  const first = headingRow === null || near.some((one) => one.row === headingRow) ? null : headingRow;
  const [heading] =
    first === null ? [] : await listInputRowsAround(db(), revision.office, revision.id, { sheet, row: first, around: 0 });
  const all = heading === undefined ? near : [heading, ...near];
  const width = Math.max(1, ...all.map((one) => lastFilled(one.cells) + 1));
  const at = cell === null ? 0 : columnNumber(cell);
  const from = Math.max(0, Math.min(at - Math.floor(mostColumns / 2), Math.max(width, at + 1) - mostColumns));
  const to = Math.min(Math.max(width, at + 1), from + mostColumns);
  const cut = (one: { row: number; cells: readonly (string | null)[] }): FragmentRow => ({
    row: one.row,
    cells: Array.from({ length: to - from }, (_, index) => one.cells[from + index] ?? null),
  });
  return {
    sheet,
    columns: Array.from({ length: to - from }, (_, index) => columnLetters(from + index)),
    heading: heading === undefined ? null : cut(heading),
    rows: near.map(cut),
    cell,
    row,
  };
}

const lastFilled = (cells: readonly (string | null)[]): number => cells.findLastIndex((text) => text !== null && text !== '');

/** 0 is A. */
function columnNumber(cell: string): number {
  let number = 0;
  for (const letter of cell.replace(/\d+$/, '')) number = number * 26 + letter.charCodeAt(0) - 64;
  return number - 1;
}

function columnLetters(index: number): string {
  const last = String.fromCharCode(65 + (index % 26));
  return index < 26 ? last : columnLetters(Math.floor(index / 26) - 1) + last;
}
