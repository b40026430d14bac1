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
  readonly way: ListIndex['way'];
  readonly condition: Condition | null;
}

export interface Plan {
  readonly order: Order;
  readonly leads: readonly Lead[];
  readonly conditions: readonly Condition[];
  /** False: what leads there is sorted for every page. */
  readonly ordered: boolean;
  /**
   * Rows are passed by for their frame, which the index holds: keys are found in it alone, and rows fetched of those on
   * the page only, in no order that is warranted.
   */
  readonly keysFirst: boolean;
}

/** More rows than this are not asked for at once by a page. */
const mostSorted = 1000;
/** More values than this are not fetched one by one and merged. */
const mostLeads = 12;

/**
 * Each sort has a natural direction, in which equal rows stand in sheet order (worst first for ratios and verdicts,
 * largest first for forces); the other direction is its exact mirror, so that one index serves both.
 */
function orderOf(view: View): Order {
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
  const keysFirst = filters.frames !== null && best.leads.every((lead) => lead.way === 'own' && lead.index !== null);
  return {
    order,
    leads: best.leads,
    conditions,
    ordered: best.ordered && best.leads.every((lead) => lead.way !== 'peak'),
    keysFirst,
  };
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
  const found = sort === null ? undefined : sortIndex(view);
  // peaks are of all rows of a frame: with a filter they say nothing
  const walk = found?.way === 'peak' && view.filters.length > 0 ? undefined : found;
  const ways: Way[] = [
    {
      ordered: sort === null || walk !== undefined,
      rows: sizes.total,
      leads: [{ index: walk?.name ?? null, way: walk?.way ?? 'own', condition: null }],
      filter: null,
    },
  ];
  for (const filter of filters.byValues) {
    const rows = sizes.of(filter);
    const { sql } = columnOf(view.table, filter.column);
    // Held to one value of the column that sorts, rows stand in sheet order.
    const within = sort === filter.column ? null : sort;
    const fitting = indexes.find((one) => one.by === filter.column && one.sort === within);
    if (fitting && filter.values.length <= mostLeads) {
      const leads = filter.values.map((value) => ({ index: fitting.name, way: fitting.way, condition: isIn(sql, [value]) }));
      ways.push({ ordered: true, rows, leads, filter });
    }
    const any = indexes.find((one) => one.by === filter.column);
    if (any)
      ways.push({
        ordered: false,
        rows,
        leads: [{ index: any.name, way: any.way, condition: isIn(sql, filter.values) }],
        filter,
      });
  }
  for (const { column, condition } of filters.ranges) {
    const led = indexes.find((one) => one.by === null && one.sort === column);
    if (led && column !== sort && filters.byValues.length === 0 && !filters.frames) {
      ways.push({ ordered: false, rows: sizes.matching, leads: [{ index: led.name, way: led.way, condition }], filter: null });
    }
  }
  if (filters.frames && view.table !== 'problems') {
    const condition = { sql: `${frame} in (${filters.picked})`, values: [] };
    // Every frame has about as many rows as any other.
    const rows = tally === null ? filters.frames.length : sizes.matching * Math.max(1, filters.byValues.length * 4);
    ways.push({ ordered: false, rows, leads: [{ index: null, way: 'own', condition }], filter: null });
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
  // by way of frame_result, what leads is its own columns
  const led = (sql: string): string => (lead.way === 'result' ? sql.replace(/\bt\.(result_name|frame|result)\b/g, 's.$1') : sql);
  const keys = key.map((one) => led(`t.${one}`));
  const sort = order.sql === null ? null : led(order.sql);
  const orderBy = [...(sort === null ? [] : [`${sort} ${order.sort}`]), ...keys.map((one) => `${one} ${order.key}`)];
  const from =
    lead.way === 'result'
      ? `frame_result s cross join ${table} t on t.revision = s.revision and t.frame = s.frame and t.result = s.result`
      : `${table} t${lead.index === null ? '' : ` indexed by ${lead.index}`}`;
  const build = (beyond: Condition | null): Query => {
    const all = [
      ...(lead.condition ? [{ ...lead.condition, sql: led(lead.condition.sql) }] : []),
      ...(beyond ? [beyond] : []),
      ...plan.conditions,
    ];
    const where = [lead.way === 'result' ? 's.revision = ?' : 't.revision = ?', ...all.map((one) => one.sql)].join(' and ');
    const inOrder = `from ${from} where ${where} order by ${orderBy.join(', ')} limit ?`;
    const same = ['revision', ...key].map((one) => `t.${one} = k.${one}`).join(' and ');
    const kept = `select t.revision, ${keys.join(', ')} ${inOrder}`;
    return {
      sql: plan.keysFirst
        ? `select ${selected} from (${kept}) k cross join ${table} t on ${same}`
        : `select ${selected} ${inOrder}`,
      values: [revision, ...all.flatMap((one) => one.values), limit],
    };
  };
  if (cursor === null) return [build(null)];
  const further = (direction: 'asc' | 'desc') => (direction === 'asc' ? '>' : '<');
  const tail = `(${keys.join(', ')}) ${further(order.key)} (${keys.map(() => '?').join(', ')})`;
  const within = lead.way === 'result' ? ` and s.frame ${further(order.key)}= ?` : '';
  const end = within === '' ? cursor.key : [...cursor.key, cursor.key[0]!];
  if (sort === null) return [build({ sql: tail + within, values: end })];
  return [
    build({ sql: `${sort} = ? and ${tail}${within}`, values: [cursor.sort, ...end] }),
    build({ sql: `${sort} ${further(order.sort)} ?`, values: [cursor.sort] }),
  ];
}

/**
 * What gives a page of the rows that are largest (or smallest), by the largest of each frame: as many frames as the page
 * has rows have each a row beyond the cursor at least as large as the smallest of their peaks, so no smaller one is on the
 * page, and only frames whose peak is no smaller have any. Deep in the list that is most of them, and all rows are read.
 */
export function peakQueriesOf(
  view: View,
  revision: number,
  plan: Plan,
  { cursor, limit, selected }: { readonly cursor: Cursor | null; readonly limit: number; readonly selected: string },
): { readonly bound: Query; readonly rows: (bound: number | null) => Query } {
  const { table, key } = listTables[view.table];
  const { order } = plan;
  const column = view.sort!.column;
  const [near, far, beyond] = order.sort === 'desc' ? ['max', 'min', '<'] : ['min', 'max', '>'];
  const peak = `p.${column}_${near}`;
  const index = `frame_peak p indexed by frame_peak_${column}_${near}`;
  const past = cursor ? ` and ${peak} ${beyond} ?` : '';
  const keys = key.map((one) => `t.${one}`);
  return {
    bound: {
      sql: `select ${peak} as bound from ${index} where p.revision = ?${past} order by ${peak} ${order.sort} limit 1 offset ?`,
      values: [revision, ...(cursor ? [cursor.sort] : []), limit - 1],
    },
    rows: (bound) => {
      const conditions: Condition[] = [{ sql: 't.revision = ?', values: [revision] }];
      if (bound !== null) {
        const reach = cursor ? ` and p.${column}_${far} ${beyond}= ?` : '';
        const frames = `select p.frame from ${index} where p.revision = ? and ${peak} ${beyond === '<' ? '>' : '<'}= ?${reach}`;
        conditions.push({ sql: `t.frame in (${frames})`, values: [revision, bound, ...(cursor ? [cursor.sort] : [])] });
        conditions.push({ sql: `+${order.sql!} ${beyond === '<' ? '>' : '<'}= ?`, values: [bound] });
      }
      if (cursor) {
        const tail = `(${keys.join(', ')}) ${order.key === 'asc' ? '>' : '<'} (${keys.map(() => '?').join(', ')})`;
        const sql = `(+${order.sql!} ${beyond} ? or (+${order.sql!} = ? and ${tail}))`;
        conditions.push({ sql, values: [cursor.sort, cursor.sort, ...cursor.key] });
      }
      const orderBy = [`${order.sql!} ${order.sort}`, ...keys.map((one) => `${one} ${order.key}`)].join(', ');
      const where = conditions.map((one) => one.sql).join(' and ');
      return {
        sql: `select ${selected} from ${table} t where ${where} order by ${orderBy} limit ?`,
        values: [...conditions.flatMap((one) => one.values), limit],
      };
    },
  };
}

/** The same rows from the other end. */
export function mirrored(order: Order): Order {
  const turn = (direction: 'asc' | 'desc') => (direction === 'asc' ? 'desc' : 'asc');
  return { sql: order.sql, sort: turn(order.sort), key: turn(order.key) };
}
