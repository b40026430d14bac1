/** Fetches what a plan says, and merges what its leads give. */
import type { Cursor } from '@/db/lists/cursor';
import { listTables } from '@/db/lists/columns';
import type { Value } from '@/db/lists/filters';
import { mirrored, type Order, peakQueriesOf, type Plan, queriesOf } from '@/db/lists/plan';
import type { RawDatabase } from '@/db/open';
import { statement } from '@/db/statements';
import type { View } from '@/lib/tables/view';

/** A row as it is stored: cells by column, `key 0` …, `sort`, `frame index`. */
export type Read = Record<string, Value>;

export interface Fetched {
  readonly revision: number;
  readonly view: View;
  readonly plan: Plan;
}

export interface FetchPage {
  readonly cursor: Cursor | null;
  /** Rows before the cursor, the nearest first. */
  readonly backwards: boolean;
  readonly limit: number;
  /** What to select: keysOf at least. */
  readonly selected: string;
}

/** Rows beyond a cursor, from every lead, merged in order. */
export function fetchRows(raw: RawDatabase, { revision, view, plan }: Fetched, page: FetchPage): Read[] {
  const turned = page.backwards ? { ...plan, order: mirrored(plan.order) } : plan;
  const lists = plan.leads.map((lead) => {
    if (lead.way === 'peak') return fetchByPeak(raw, { revision, view, plan: turned }, page);
    const rows: Read[] = [];
    for (const { sql, values } of queriesOf(view, revision, turned, lead, page)) {
      if (rows.length < page.limit) rows.push(...statement<Read>(raw, sql).all(...values));
    }
    if (plan.keysFirst) rows.sort(comparison(view, turned.order));
    return rows;
  });
  if (lists.length === 1) return lists[0]!.slice(0, page.limit);
  return lists.flat().sort(comparison(view, turned.order)).slice(0, page.limit);
}

function fetchByPeak(raw: RawDatabase, { revision, view, plan }: Fetched, page: FetchPage): Read[] {
  const { bound, rows } = peakQueriesOf(view, revision, plan, page);
  const found = statement<{ bound: number }>(raw, bound.sql).get(...bound.values);
  const { sql, values } = rows(found?.bound ?? null);
  return statement<Read>(raw, sql).all(...values);
}

function comparison(view: View, order: Order): (a: Read, b: Read) => number {
  const keys = listTables[view.table].key.map((_, i) => `key ${i}`);
  return (a, b) => {
    const bySort = compare(a.sort!, b.sort!) * (order.sort === 'asc' ? 1 : -1);
    if (bySort !== 0) return bySort;
    for (const key of keys) {
      const byKey = compare(a[key]!, b[key]!) * (order.key === 'asc' ? 1 : -1);
      if (byKey !== 0) return byKey;
    }
    return 0;
  };
}

/** As the database compares: numbers before text, text by its bytes. */
function compare(a: string | number, b: string | number): number {
  if (typeof a === 'number') return typeof b === 'number' ? a - b : -1;
  return typeof b === 'number' ? 1 : Buffer.compare(Buffer.from(a), Buffer.from(b));
}

/** What every row needs beside its cells. */
export function keysOf(view: View, order: Order): string {
  const { key, frame } = listTables[view.table];
  const keys = key.map((one, i) => `t.${one} as "key ${i}"`);
  return [...keys, `${frame} as "frame index"`, `${order.sql ?? 0} as "sort"`].join(', ');
}

export function cellsOf(view: View, order: Order): string {
  const cells = Object.entries(listTables[view.table].columns).map(([name, one]) => `${one.sql} as "${name}"`);
  return `${cells.join(', ')}, ${keysOf(view, order)}`;
}

export function cursorOf(view: View, row: Read): Cursor {
  return { sort: row.sort!, key: listTables[view.table].key.map((_, i) => Number(row[`key ${i}`])) };
}
