import { idText } from '@/lib/intake/ids';
import { openEnded } from '@/lib/intake/sheet-definitions';
import type { LeveledRow } from '@/lib/intake/rows-by-frame';
import type { Row } from '@/lib/intake/table';

/** True where two rows of one sheet say the same in every column that is read. */
export function sameContent(a: Row, b: Row): boolean {
  if (a.part === b.part && openEnded.has(a.part.definition.name)) {
    return a.part.columns.every(({ index }) => textKey(a, index) === textKey(b, index));
  }
  const names = new Set([...a.part.byName.keys(), ...b.part.byName.keys()]);
  for (const name of names) if (cellKey(a, name) !== cellKey(b, name)) return false;
  return true;
}

/** Everything a row says, as one text: equal for rows that say the same in one part. */
export function contentKey(row: Row): string {
  let key = '';
  for (const column of row.part.byName.values()) key += `${column.known}:${row.raw.cells[column.index]?.text ?? ''}|`;
  return key;
}

function cellKey(row: Row, name: string): string {
  const column = row.part.byName.get(name);
  return column ? textKey(row, column.index) : '';
}

function textKey(row: Row, index: number): string {
  const text = row.raw.cells[index]?.text;
  return text === undefined ? '' : idText(text).toLowerCase();
}

export interface KeyedRow {
  readonly row: Row;
  readonly level: number;
  readonly key: string;
  readonly id: string;
}

/**
 * One row a key: a row that names its frame more closely takes the place of a wider one; a second row of one
 * level is handed to `twin` (identical or not) and left out.
 * @param keyOf the row's id and its comparison key, undefined where it has none (told)
 */
export function oneRowAKey(
  rows: readonly LeveledRow[],
  keyOf: (row: Row) => { readonly id: string; readonly key: string } | undefined,
  twin: (row: Row, first: Row, identical: boolean) => void,
): KeyedRow[] {
  const places = new Map<string, number>();
  const kept: KeyedRow[] = [];
  for (const { row, level } of rows) {
    const id = keyOf(row);
    if (!id) continue;
    const at = places.get(id.key);
    const before = at === undefined ? undefined : kept[at];
    if (at === undefined || !before) {
      places.set(id.key, kept.length);
      kept.push({ row, level, ...id });
    } else if (before.level < level) kept[at] = { row, level, key: id.key, id: before.id };
    else twin(row, before.row, sameContent(row, before.row));
  }
  return kept;
}
