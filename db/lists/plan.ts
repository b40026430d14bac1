/** How a page of a list is fetched: which index leads, and the statements that follow it from a cursor on. */
import type { Cursor } from '@/db/lists/cursor';
import { columnOf, type ListIndex, listTables, parameterOf } from '@/db/lists/columns';
import { type ByValues, type Condition, conditionsOf, isIn, type ReadFilters, type Value } from '@/db/lists/filters';
import type { View } from '@/lib/tables/view';

/** The order of rows: by `sql` (null: sheet order alone), then by the key. */
export interface Order {
  readonly sql: string | null;
  readonly sort: 'asc' | 'desc';
  readonly key: 'asc' | 'desc';
}

/** Rows that one of several statements gives in order; the page is their merging. */
export interface Lead {
  /** Index to follow; null = the primary key. */
  readonly index: string | null;
  readonly condition: Condition | null;
}

export interface Plan {
  readonly order: Order;
  readonly leads: readonly Lead[];
  readonly conditions: readonly Condition[];
}

/** More rows than this are not asked for at once by a page. */
const mostSorted = 1000;
/** More values than this are not fetched one by one and merged. */
const mostLeads = 12;

/**
 * Each sort has a natural direction, in which equal rows stand in sheet order (worst first for ratios and verdicts,
 * largest first for forces); the other direction is its exact mirror, so that one index serves both.
 */
export function orderOf(view: View): Order {
  const { sort } = view;
  if (sort === null || sort.column === 'frame') {
    const direction = sort?.descending ? 'desc' : 'asc';
    return { sql: null, sort: direction, key: direction };
  }
  const direction = sort.descending ? 'desc' : 'asc';
  const natural = sortIndex(view)?.direction ?? 'asc';
  return { sql: sortSql(view, sort.column), sort: direction, key: direction === natural ? 'asc' : 'desc' };
}

function sortIndex(view: View): ListIndex | undefined {
  return listTables[view.table].indexes.find((one) => one.by === null && one.sort === view.sort?.column);
}

function sortSql(view: View, column: string): string {
  const parameter = parameterOf(column);
  if (parameter === null) {
    if (!sortIndex(view)) throw new RangeError(`Expected a sort that ${view.table} offers, got ${column}`);
    return columnOf(view.table, column).sql;
  }
  const name = parameter.replaceAll("'", "''");
  return `coalesce((select coalesce(p.number, p.text) from revision_frame f join frame_parameter p
    on p.version = f.version and p.name = '${name}' where f.revision = t.revision and f.frame = ${listTables[view.table].frame}), '')`;
}

/** What is known of sizes, to weigh one way against another. */
export interface Sizes {
  readonly total: number;
  readonly matching: number;
  /** Rows that one filter by values alone would leave. */
  readonly of: (filter: ByValues) => number;
}

/**
 * Chooses between following an index in the page's order, past rows that don't fit (cheap where many fit), and fetching
 * all that an index leads to and sorting them (cheap where few fit).
 */
export function planOf(view: View, filters: ReadFilters, sizes: Sizes, limit: number): Plan {
  const order = orderOf(view);
  const all = waysOf(view, filters, sizes);
  const ordered = all.filter((way) => way.ordered);
  // What is fetched page by page to its end is not sorted anew for every page.
  const ways = limit > mostSorted && ordered.length > 0 ? ordered : all;
  // Rows read, and half as much again where they are sorted.
  const cost = (way: Way) =>
    way.ordered ? Math.min(way.rows, (way.rows / Math.max(sizes.matching, 1)) * limit) + way.leads.length : 1.5 * way.rows + 10;
  const best = ways.reduce((a, b) => (cost(b) < cost(a) ? b : a));
  const conditions = conditionsOf(filters, view, best.filter);
  return { order, leads: best.leads, conditions };
}

interface Way {
  readonly ordered: boolean;
  readonly rows: number;
  readonly leads: readonly Lead[];
  readonly filter: ByValues | null;
}

function waysOf(view: View, filters: ReadFilters, sizes: Sizes): Way[] {
  const { indexes, tally, frame } = listTables[view.table];
  const sort = view.sort?.column === 'frame' ? null : (view.sort?.column ?? null);
  const walk = sort === null ? null : (sortIndex(view)?.name ?? null);
  const ways: Way[] = [
    { ordered: sort === null || walk !== null, rows: sizes.total, leads: [{ index: walk, condition: null }], filter: null },
  ];
  for (const filter of filters.byValues) {
    const rows = sizes.of(filter);
    const { sql } = columnOf(view.table, filter.column);
    // Held to one value of the column that sorts, rows stand in sheet order.
    const within = sort === filter.column ? null : sort;
    const fitting = indexes.find((one) => one.by === filter.column && one.sort === within);
    if (fitting && filter.values.length <= mostLeads) {
      const leads = filter.values.map((value) => ({ index: fitting.name, condition: isIn(sql, [value]) }));
      ways.push({ ordered: true, rows, leads, filter });
    }
    const any = indexes.find((one) => one.by === filter.column);
    if (any) ways.push({ ordered: false, rows, leads: [{ index: any.name, condition: isIn(sql, filter.values) }], filter });
  }
  for (const { column, condition } of filters.ranges) {
    const found = indexes.find((one) => one.by === null && one.sort === column);
    if (found && column !== sort && filters.byValues.length === 0 && !filters.frames) {
      ways.push({ ordered: false, rows: sizes.matching, leads: [{ index: found.name, condition }], filter: null });
    }
  }
  if (filters.frames && view.table !== 'problems') {
    const condition = { sql: `${frame} in (select value from json_each(?))`, values: [JSON.stringify(filters.frames)] };
    // Every frame has about as many rows as any other.
    const rows = tally === null ? filters.frames.length : sizes.matching * Math.max(1, filters.byValues.length * 4);
    ways.push({ ordered: false, rows, leads: [{ index: null, condition }], filter: null });
  }
  return ways;
}

export interface Query {
  readonly sql: string;
  readonly values: readonly Value[];
}

/**
 * The statements that give a lead's rows beyond a cursor, at most `limit` each, the second only where the first gave
 * fewer: rows equal in the sort and further in sheet order, then rows further in the sort.
 */
export function queriesOf(
  view: View,
  revision: number,
  plan: Plan,
  lead: Lead,
  { cursor, limit, selected }: { readonly cursor: Cursor | null; readonly limit: number; readonly selected: string },
): Query[] {
  const { table, key } = listTables[view.table];
  const { order } = plan;
  const keys = key.map((one) => `t.${one}`);
  const orderBy = [...(order.sql === null ? [] : [`${order.sql} ${order.sort}`]), ...keys.map((one) => `${one} ${order.key}`)];
  const build = (beyond: Condition | null): Query => {
    const all = [...(lead.condition ? [lead.condition] : []), ...(beyond ? [beyond] : []), ...plan.conditions];
    const where = ['t.revision = ?', ...all.map((one) => one.sql)].join(' and ');
    const from = `${table} t${lead.index === null ? '' : ` indexed by ${lead.index}`}`;
    return {
      sql: `select ${selected} from ${from} where ${where} order by ${orderBy.join(', ')} limit ?`,
      values: [revision, ...all.flatMap((one) => one.values), limit],
    };
  };
  if (cursor === null) return [build(null)];
  const further = (direction: 'asc' | 'desc') => (direction === 'asc' ? '>' : '<');
  const tail = `(${keys.join(', ')}) ${further(order.key)} (${keys.map(() => '?').join(', ')})`;
  if (order.sql === null) return [build({ sql: tail, values: cursor.key })];
  return [
    build({ sql: `${order.sql} = ? and ${tail}`, values: [cursor.sort, ...cursor.key] }),
    build({ sql: `${order.sql} ${further(order.sort)} ?`, values: [cursor.sort] }),
  ];
}

/** The same rows from the other end. */
export function mirrored(order: Order): Order {
  const turn = (direction: 'asc' | 'desc') => (direction === 'asc' ? 'desc' : 'asc');
  return { sql: order.sql, sort: turn(order.sort), key: turn(order.key) };
}
