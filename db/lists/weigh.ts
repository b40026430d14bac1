import { countOf, countRows } from '@/db/lists/count';
import { readFilters, type ReadFilters } from '@/db/lists/filters';
import type { Sizes } from '@/db/lists/plan';
import type { RawDatabase } from '@/db/open';
import type { View } from '@/lib/tables/view';

const none: ReadFilters = { byValues: [], ranges: [], contains: [], frames: null, picked: '' };

/** A view's filters as the database takes them, and how many rows fit. */
export function weigh(raw: RawDatabase, revision: number, stamp: number, view: View): { filters: ReadFilters; sizes: Sizes } {
  const filters = readFilters(raw, revision, stamp, view);
  const total = countRows(raw, revision, stamp, { ...view, filters: [] }, none);
  const matching = view.filters.length === 0 ? total : countRows(raw, revision, stamp, view, filters);
  return { filters, sizes: { total, matching, of: (one) => countOf(raw, { revision, stamp }, view, one, total) } };
}
