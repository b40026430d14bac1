import { columnOf, listTables } from '@/db/lists/columns';
import { type ByValues, type Condition, conditionsOf, isIn, type ReadFilters } from '@/db/lists/filters';
import { tallyColumns } from '@/db/lists/tally';
import type { RawDatabase } from '@/db/open';
import { remembered } from '@/db/remembered';
import { statement } from '@/db/statements';
import type { View } from '@/lib/tables/view';

const letters = ['a', 'b', 'c', 'd', 'e'] as const;

/** A revision's results as they stand. */
export interface AtStamp {
  readonly revision: number;
  readonly stamp: number;
}

/** Rows of a view that fit its filters: from the tally where it counts by all that is filtered, else counted once a stamp. */
export function countRows(raw: RawDatabase, revision: number, stamp: number, view: View, filters: ReadFilters): number {
  const key = `${revision} ${stamp} ${view.table} ${JSON.stringify(view.filters)}`;
  return remembered(raw, 'count', key, () => {
    if (filters.byValues.some((one) => one.values.length === 0) || filters.frames?.length === 0) return 0;
    if (filters.ranges.length === 0 && filters.frames === null) {
      const known = countByTally(raw, revision, view, filters);
      if (known !== null) return known;
    }
    return countOneByOne(raw, revision, view, filters);
  });
}

/** Rows that fit one filter by values alone; all of the table where that isn't known without counting them. */
export function countOf(raw: RawDatabase, at: AtStamp, view: View, filter: ByValues, otherwise: number): number {
  const key = `${at.revision} ${at.stamp} ${view.table} of ${filter.column} ${JSON.stringify(filter.values)}`;
  const alone: ReadFilters = { byValues: [filter], ranges: [], contains: [], frames: null, picked: '' };
  return remembered(raw, 'count', key, () => countByTally(raw, at.revision, view, alone) ?? otherwise);
}

function countByTally(raw: RawDatabase, revision: number, view: View, filters: ReadFilters): number | null {
  const { tally } = listTables[view.table];
  if (tally === null) return null;
  const letter = (column: string) => letters[tallyColumns[tally].indexOf(column)];
  const conditions: Condition[] = [];
  for (const { column, values } of filters.byValues) {
    const at = letter(column);
    if (at === undefined) return null;
    conditions.push(isIn(at, values.map(String)));
  }
  for (const { column, condition } of filters.contains) {
    const at = letter(column);
    if (at === undefined) return null;
    conditions.push({ sql: `${at} like ? escape '\\'`, values: condition.values });
  }
  const where = ['revision = ? and list = ?', ...conditions.map((one) => one.sql)].join(' and ');
  const values = [revision, tally, ...conditions.flatMap((one) => one.values)];
  const sql = `select coalesce(sum(rows), 0) as n from tally where ${where}`;
  return statement<{ n: number }>(raw, sql).get(...values)!.n;
}

function countOneByOne(raw: RawDatabase, revision: number, view: View, filters: ReadFilters): number {
  const { table } = listTables[view.table];
  // Here the choice of an index is left to the database: without the +, every filter may lead.
  const conditions = conditionsOf(filters, view).map((one) => ({ ...one, sql: one.sql.replace(/^\+/, '') }));
  const where = ['t.revision = ?', ...conditions.map((one) => one.sql)].join(' and ');
  const values = [revision, ...conditions.flatMap((one) => one.values)];
  return statement<{ n: number }>(raw, `select count(*) as n from ${table} t where ${where}`).get(...values)!.n;
}

/** Sum of masses and numbers off, and the largest ratio, of the frames that fit. */
export function frameTotals(raw: RawDatabase, revision: number, stamp: number, view: View, filters: ReadFilters) {
  const key = `${revision} ${stamp} totals ${JSON.stringify(view.filters)}`;
  return remembered(raw, 'count', key, () => {
    const conditions = conditionsOf(filters, view);
    const where = ['t.revision = ?', ...conditions.map((one) => one.sql)].join(' and ');
    const values = [revision, ...conditions.flatMap((one) => one.values)];
    const sql = `select sum(t.count) as count, max(t.ratio) as ratio,
      sum(case when t.mass > 0 then t.mass * t.count end) as mass from revision_frame t where ${where}`;
    const found = statement<{ count: number | null; ratio: number | null; mass: number | null }>(raw, sql).get(...values)!;
    return { ...found, ratio: columnOf('frames', 'ratio').read(found.ratio) };
  });
}
