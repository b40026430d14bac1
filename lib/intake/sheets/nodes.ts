import type { Draft } from '@/lib/intake/draft';
import { idKey } from '@/lib/intake/ids';
import { oneRowAKey } from '@/lib/intake/keyed-rows';
import { level, type RowsByFrame } from '@/lib/intake/rows-by-frame';
import type { Row } from '@/lib/intake/table';
import * as say from '@/lib/problems/wording';

/** Coordinates beyond this are suspected to be in another unit, m. */
const farthest_m = 500;

export function readNodes(draft: Draft, rows: RowsByFrame): void {
  const { reader } = draft.batch;
  const { reading } = draft;
  const keyOf = (row: Row): { id: string; key: string } | undefined => {
    if (!reader.keeps(row, reading)) return undefined;
    const id = reader.needId(row, 'node', reading);
    if (id === undefined) draft.shapeTrouble = true;
    return id === undefined ? undefined : { id, key: idKey(id) };
  };
  const mine = rows.for(draft.entry);
  for (const each of mine) if (each.level === level.all) rows.fits(each.row);
  const kept = oneRowAKey(mine, keyOf, (row, first, same) => {
    const message = same
      ? say.repeatedRow(first.raw.row)
      : say.duplicateId('node', reader.id(row, 'node', reading) ?? '', first.raw.row);
    reader.tell(row, 'node', { code: 'duplicate-id', message, severity: same ? 'warning' : 'error' }, reading);
  });
  for (const { row, id, key } of kept) {
    const coordinate = (name: 'x' | 'y'): number | undefined => {
      const value = reader.number(row, name, reading);
      if (value === null) reader.tell(row, name, { code: 'not-a-number', message: say.numberMissing(name) }, reading);
      else if (value !== undefined && Math.abs(value) > farthest_m) {
        reader.tell(row, name, { code: 'suspect-unit', message: say.suspectCoordinate() }, reading);
      }
      return value ?? undefined;
    };
    const x_m = coordinate('x');
    const y_m = coordinate('y');
    const place = reader.id(row, 'place', reading);
    if (x_m === undefined || y_m === undefined) {
      draft.nodeIndex.set(key, -1);
      draft.shapeTrouble = true;
      continue;
    }
    draft.nodeIndex.set(key, draft.nodes.length);
    draft.nodes.push({ id, x_m, y_m, place: place ?? null });
    draft.nodeRows.push(row);
  }
}
