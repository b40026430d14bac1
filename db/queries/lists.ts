import { frameTotals } from '@/db/lists/count';
import { columnOf, listTables, parameterOf } from '@/db/lists/columns';
import { type Cursor, readCursor, writeCursor } from '@/db/lists/cursor';
import { cellsOf, cursorOf, fetchRows, keysOf, type Read } from '@/db/lists/fetch';
import type { ReadFilters } from '@/db/lists/filters';
import { planOf, type Sizes } from '@/db/lists/plan';
import { tallyColumns } from '@/db/lists/tally';
import { weigh } from '@/db/lists/weigh';
import { type Db, driverOf, type RawDatabase } from '@/db/open';
import { remembered } from '@/db/remembered';
import { statement } from '@/db/statements';
import type { Cell, Row, RowPage, TableName, View } from '@/lib/tables/view';
import { tables } from '@/lib/tables/view';

export interface PageAsked {
  readonly limit: number;
  /** A cursor that a page gave as `next`. */
  readonly after?: string;
  /** A cursor that a page gave as `previous`. */
  readonly before?: string;
}

export interface Facet {
  readonly value: string;
  readonly count: number;
}

/**
 * A page of a table in a view's order. Numbers are SI; a cell without a value is null.
 *
 * @returns undefined where the revision is not the office's
 * @throws {RangeError} for a column, filter or sort that the table does not offer
 */
export async function listRows(
  db: Db,
  office: number,
  revision: number,
  view: View,
  asked: PageAsked,
): Promise<RowPage | undefined> {
  const raw = driverOf(db);
  const stamp = stampOf(raw, office, revision);
  if (stamp === undefined) return undefined;
  const { filters, sizes } = weigh(raw, revision, stamp, view);
  const { total, matching } = sizes;
  const plan = planOf(view, filters, sizes, asked.limit);
  const cursor = readCursor(asked.before ?? asked.after ?? '', listTables[view.table].key.length);
  const backwards = cursor !== null && asked.before !== undefined;
  const selected = cellsOf(view, plan.order);
  const found =
    matching === 0 ? [] : fetchRows(raw, { revision, view, plan }, { cursor, backwards, limit: asked.limit + 1, selected });
  const more = found.length > asked.limit;
  const rows = found.slice(0, asked.limit);
  if (backwards) rows.reverse();
  const came = cursor !== null;
  const first = (backwards ? more : came) ? rows[0] : undefined;
  const last = (backwards ? came : more) ? rows.at(-1) : undefined;
  return {
    rows: readRows(raw, revision, view, rows),
    matching,
    total,
    next: last ? writeCursor(cursorOf(view, last)) : null,
    previous: first ? writeCursor(cursorOf(view, first)) : null,
    totals: matching === 0 ? {} : totalsOf(raw, { revision, stamp, view }, filters, sizes),
  };
}

/** Every row of a view in its order, for an export; holds a page at a time and lets others work between two. */
export async function* iterateRows(db: Db, office: number, revision: number, view: View): AsyncGenerator<Row> {
  const raw = driverOf(db);
  const stamp = stampOf(raw, office, revision);
  if (stamp === undefined) return;
  const { filters, sizes } = weigh(raw, revision, stamp, view);
  const { matching } = sizes;
  const plan = planOf(view, filters, sizes, matching);
  const selected = cellsOf(view, plan.order);
  // where rows are sorted for every page, few large pages
  const limit = plan.ordered ? exportPage : 40 * exportPage;
  let cursor: Cursor | null = null;
  for (let left = matching; left > 0; left -= limit) {
    const rows: Read[] = fetchRows(raw, { revision, view, plan }, { cursor, backwards: false, limit, selected });
    yield* readRows(raw, revision, view, rows);
    const last = rows.at(-1);
    if (!last) return;
    cursor = cursorOf(view, last);
    await new Promise((resolve) => setImmediate(resolve));
  }
}

const exportPage = 500;

/**
 * Distinct values of a column that is filtered by values (a parameter too), with rows each: verdicts worst first, others
 * by name. Empty for a column of other sorts, and for what is not the office's.
 */
export async function listFacets(db: Db, office: number, revision: number, table: TableName, column: string): Promise<Facet[]> {
  const raw = driverOf(db);
  if (stampOf(raw, office, revision) === undefined) return [];
  const parameter = parameterOf(column);
  if (parameter !== null) {
    const sql = `select coalesce(p.text, p.number) as value, count(*) as count from revision_frame f
      join frame_parameter p on p.version = f.version and p.name = ? where f.revision = ? group by 1 order by 1`;
    const found = statement<{ value: string | number; count: number }>(raw, sql).all(parameter, revision);
    return found.map(({ value, count }) => ({ value: String(value), count }));
  }
  const described = tables[table].find((one) => one.key === column && one.filter);
  if (!described || column === 'frame' || described.kind === 'number' || described.kind === 'ratio') return [];
  const { tally, table: from } = listTables[table];
  const { sql, read } = columnOf(table, column);
  const letter = tally && ['a', 'b', 'c', 'd', 'e'][tallyColumns[tally].indexOf(column)];
  const direction = column === 'verdict' ? 'desc' : 'asc';
  const found = letter
    ? statement<{ value: string; count: number }>(
        raw,
        `select ${letter} as value, sum(rows) as count from tally where revision = ? and list = '${tally}' group by 1 order by 1 ${direction}`,
      ).all(revision)
    : statement<{ value: string | number; count: number }>(
        raw,
        `select ${sql} as value, count(*) as count from ${from} t where t.revision = ? group by 1 order by 1 ${direction}`,
      ).all(revision);
  return found.flatMap(({ value, count }) => {
    // Frames that have no verdict yet are no choice.
    if (column === 'verdict' && Number(value) < 0) return [];
    return { value: String(read(value) ?? ''), count };
  });
}

/** The revision's stamp, undefined where it is not the office's. */
export function stampOf(raw: RawDatabase, office: number, revision: number): number | undefined {
  const sql = 'select stamp from revision where id = ? and office = ?';
  return statement<{ stamp: number }>(raw, sql).get(revision, office)?.stamp;
}

function readRows(raw: RawDatabase, revision: number, view: View, rows: readonly Read[]): Row[] {
  const { columns, key } = listTables[view.table];
  const entries = Object.entries(columns);
  const parameters = parametersOf(raw, revision, view, rows);
  return rows.map((row) => {
    const cells: Record<string, Cell> = {};
    for (const [name, { read }] of entries) cells[name] = read(row[name] ?? null);
    const index = row['frame index'] ?? null;
    for (const [name, values] of parameters) cells[`p:${name}`] = values.get(Number(index)) ?? null;
    return { id: key.map((_, i) => row[`key ${i}`]).join('-'), frameIndex: index === null ? null : Number(index), cells };
  });
}

/** Values of the parameters that the view shows, by parameter and by frame. */
function parametersOf(raw: RawDatabase, revision: number, view: View, rows: readonly Read[]) {
  const names = (view.columns ?? []).flatMap((column) => parameterOf(column) ?? []);
  if (names.length === 0) return [];
  const frames = JSON.stringify([...new Set(rows.map((row) => row['frame index']))].filter((one) => one !== null));
  const sql = `select f.frame, coalesce(p.number, p.text) as value from revision_frame f
    join frame_parameter p on p.version = f.version and p.name = ?
    where f.revision = ? and f.frame in (select value from json_each(?))`;
  return names.map((name) => {
    const found = statement<{ frame: number; value: Cell }>(raw, sql).all(name, revision, frames);
    return [name, new Map(found.map(({ frame, value }) => [frame, value]))] as const;
  });
}

function totalsOf(
  raw: RawDatabase,
  { revision, stamp, view }: { revision: number; stamp: number; view: View },
  filters: ReadFilters,
  sizes: Sizes,
): Record<string, Cell> {
  if (view.table === 'frames') return frameTotals(raw, revision, stamp, view, filters);
  const { table } = view;
  if (table !== 'members' && table !== 'checks') return {};
  const key = `${revision} ${stamp} ${table} totals ${JSON.stringify(view.filters)}`;
  return remembered(raw, 'count', key, () => {
    const worst: View = { ...view, sort: { column: 'ratio', descending: true } };
    const plan = planOf(worst, filters, sizes, 1);
    const selected = `t.ratio, ${keysOf(worst, plan.order)}`;
    const page = { cursor: null, backwards: false, limit: 1, selected };
    const ratio = fetchRows(raw, { revision, view: worst, plan }, page)[0]?.ratio ?? null;
    return { ratio: columnOf(table, 'ratio').read(ratio) };
  });
}
