import { expect, it } from 'vitest';
import { listTables } from '@/db/lists/columns';
import { cellsOf } from '@/db/lists/fetch';
import { peakQueriesOf, planOf, queriesOf, type Sizes } from '@/db/lists/plan';
import { readFilters } from '@/db/lists/filters';
import { newDatabase } from '@/db/testing/database';
import { type Column, type Filter, type TableName, tables, type View } from '@/lib/tables/view';

/** How the database says it would fetch a page in the middle of a view, of a million rows of which a tenth fit. */
async function explained(view: View, matching = 100_000): Promise<string> {
  const { raw } = await newDatabase();
  const filters = readFilters(raw, 1, 0, view);
  const sizes: Sizes = { total: 1_000_000, matching: view.filters.length === 0 ? 1_000_000 : matching, of: () => matching };
  const plan = planOf(view, filters, sizes, 100);
  const { key } = listTables[view.table];
  const cursor = { sort: 1, key: key.map(() => 1) };
  const page = { cursor, limit: 101, selected: cellsOf(view, plan.order) };
  const queries = plan.leads.flatMap((lead) => {
    if (lead.way !== 'peak') return queriesOf(view, 1, plan, lead, page);
    const { bound, rows } = peakQueriesOf(view, 1, plan, page);
    return [bound, rows(1)];
  });
  return queries
    .flatMap(({ sql, values }) => raw.prepare<unknown[], { detail: string }>(`explain query plan ${sql}`).all(...values))
    .map((row) => row.detail)
    .join('\n');
}

const view = (table: TableName, filters: Filter[] = [], sort: View['sort'] = null): View => ({
  table,
  filters,
  sort,
  columns: null,
});

const filterBy = ({ key, kind }: Column): Filter => {
  if (kind === 'number' || kind === 'ratio') return { column: key, op: 'range', min: 0.5, max: null };
  const word = key === 'verdict' ? 'over' : key === 'severity' ? 'error' : key === 'kind' ? 'case' : 'x';
  return { column: key, op: 'in', values: [word] };
};

const every = (which: 'filter' | 'sort') =>
  (Object.keys(tables) as TableName[]).flatMap((table) =>
    tables[table].filter((column) => column[which]).map((column) => [table, column.key, column] as const),
  );

const byPeak = ['fx', 'fy', 'mz', 'ux', 'uy', 'rz'];
const bySize = every('sort').filter(([, key]) => byPeak.includes(key));
const byIndex = every('sort').filter(([, key]) => !byPeak.includes(key));

it.each(bySize)('%s sorted by %s are rows of the frames with the largest, found through an index', async (table, key) => {
  for (const descending of [false, true]) {
    const plan = await explained(view(table, [], { column: key, descending }));
    const index = `frame_peak_${key}_${descending ? 'max' : 'min'}`;
    expect(plan).toMatch(new RegExp(`SEARCH p USING .*INDEX ${index} \\(revision=\\? AND`));
    expect(plan).toMatch(/SEARCH t USING PRIMARY KEY \(revision=\? AND frame=\?\)/);
    expect(plan).not.toMatch(/SCAN [tp]/);
  }
});

it.each(byIndex)('%s sorted by %s follow an index, and nothing is sorted', async (table, key) => {
  for (const descending of [false, true]) {
    const plan = await explained(view(table, [], { column: key, descending }));
    expect(plan).toMatch(/SEARCH t USING/);
    expect(plan).not.toMatch(/SCAN t|TEMP B-TREE/);
  }
});

it.each(every('filter'))(
  '%s filtered by %s, in sheet order and worst first, are found through an index',
  async (table, _, column) => {
    const sorts = [null, ...(tables[table].some((one) => one.key === 'ratio') ? [{ column: 'ratio', descending: true }] : [])];
    for (const sort of sorts) {
      const plan = await explained(view(table, [filterBy(column)], sort));
      expect(plan).toMatch(/SEARCH t USING/);
      expect(plan).not.toMatch(/SCAN t|TEMP B-TREE/);
    }
  },
);

/** The filters that a page of many rows must not wait for, with the index that holds their rows in the page's order. */
it.each(['verdict', 'role', 'section', 'group', 'check'])('members of one %s stand together in their index', async (key) => {
  const filter = filterBy(tables.members.find((one) => one.key === key)!);
  expect(await explained(view('members', [filter]), 100)).toMatch(`INDEX member_row_${key} (`);
  const byRatio = view('members', [filter], { column: 'ratio', descending: true });
  expect(await explained(byRatio, 100)).toMatch(`INDEX member_row_${key}_ratio (`);
});

it.each(['verdict', 'role', 'section', 'check', 'combination'])('checks of one %s stand together in their index', async (key) => {
  const filter = filterBy(tables.checks.find((one) => one.key === key)!);
  const plan = await explained(view('checks', [filter], { column: 'ratio', descending: true }), 100);
  expect(plan).toMatch(new RegExp(`INDEX check_row_${key}(_ratio)? \\(`));
  expect(plan).not.toMatch(/TEMP B-TREE/);
});

it('fetches what few rows fit and sorts them, rather than pass by a million', async () => {
  const rare = view('members', [filterBy(tables.members.find((one) => one.key === 'verdict')!)], {
    column: 'section',
    descending: false,
  });
  expect(await explained(rare, 50)).toMatch(/INDEX member_row_verdict/);
  expect(await explained(rare, 500_000)).toMatch(/INDEX member_row_section/);
});
