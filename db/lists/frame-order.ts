import { fetchRows, keysOf } from '@/db/lists/fetch';
import { planOf } from '@/db/lists/plan';
import { weigh } from '@/db/lists/weigh';
import type { RawDatabase } from '@/db/open';
import { remembered } from '@/db/remembered';
import type { View } from '@/lib/tables/view';

/** The frames of a view in its order, each once, where its first row stands: what previous and next walk through. */
export function frameOrder(raw: RawDatabase, revision: number, stamp: number, view: View): Int32Array {
  const key = `${revision} ${stamp} ${view.table} ${JSON.stringify([view.filters, view.sort])}`;
  return remembered(raw, 'order', key, () => {
    const { filters, sizes } = weigh(raw, revision, stamp, view);
    if (sizes.matching === 0) return new Int32Array(0);
    const plan = planOf(view, filters, sizes, sizes.matching);
    const page = { cursor: null, backwards: false, limit: sizes.matching, selected: keysOf(view, plan.order) };
    const frames = new Set<number>();
    for (const row of fetchRows(raw, { revision, view, plan }, page)) {
      const index = row['frame index'];
      if (typeof index === 'number') frames.add(index);
    }
    return Int32Array.from(frames);
  });
}
