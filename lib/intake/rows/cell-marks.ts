/**
 * What a stored row's cells are. A row is kept as texts; nearly always a text says by itself what its cell is: in a workbook
 * the shortest text of a number is a number, everything else text, and in a text file all is text. What is otherwise
 * (a number stored as text, a date, an error, a merged cell) is marked beside the texts, so that reading a row again is
 * reading the cells that stood there.
 */
import type { RawCell } from '@/lib/intake/files/raw-sheet';

type Kind = RawCell['kind'];
/** A kind; of a date its day too; of a merged cell where its value comes from. */
type Mark = Kind | readonly [kind: Kind, iso: string | null, mergedFrom?: string];

/** Whether a file's cells have kinds of their own: a text file's have not. */
export const isTyped = (file: string): boolean => !/\.(csv|txt|tsv)$/i.test(file);

/** @returns null where every text says what its cell is */
export function marksOf(cells: readonly (RawCell | null)[], typed: boolean): string | null {
  let marks: Record<number, Mark> | null = null;
  for (let column = 0; column < cells.length; column += 1) {
    const cell = cells[column];
    if (!cell || (cell.mergedFrom === undefined && cell.kind === usualKind(cell, typed))) continue;
    const iso = cell.kind === 'date' ? cell.iso : null;
    (marks ??= {})[column] =
      cell.mergedFrom !== undefined ? [cell.kind, iso, cell.mergedFrom] : iso !== null ? [cell.kind, iso] : cell.kind;
  }
  return marks && JSON.stringify(marks);
}

/** The cells of texts and their marks; `make` gives unmarked ones and may keep them. */
export function cellsOf(
  texts: readonly (string | null)[],
  marks: string | null,
  make: (text: string) => RawCell,
): (RawCell | null)[] {
  const marked = marks === null ? null : (JSON.parse(marks) as Record<number, Mark | undefined>);
  return texts.map((text, column) => {
    if (text === null) return null;
    const mark = marked?.[column];
    return mark === undefined ? make(text) : markedCell(text, mark);
  });
}

/** A text as the cell that it is without a mark. */
export function plainCell(text: string, typed: boolean): RawCell {
  return typed && isNumber(text) ? { kind: 'number', value: Number(text), text } : { kind: 'text', text };
}

function markedCell(text: string, mark: Mark): RawCell {
  const [kind, iso, mergedFrom] = typeof mark === 'string' ? [mark, null] : mark;
  const merged = mergedFrom === undefined ? {} : { mergedFrom };
  switch (kind) {
    case 'number':
      return { kind, value: Number(text), text, ...merged };
    case 'boolean':
      return { kind, value: text === 'TRUE', text, ...merged };
    case 'date':
      return { kind, text, iso: iso ?? text, ...merged };
    default:
      return { kind, text, ...merged };
  }
}

/** The kind that a cell's text alone gives it. A number's text is a number's by its making. */
function usualKind({ kind, text }: RawCell, typed: boolean): Kind {
  if (!typed) return 'text';
  return kind === 'number' || isNumber(text) ? 'number' : 'text';
}

function isNumber(text: string): boolean {
  const start = text.charCodeAt(0);
  if (start !== 0x2d && !(start >= 0x30 && start <= 0x39)) return false;
  const value = Number(text);
  return Number.isFinite(value) && String(value) === text;
}
