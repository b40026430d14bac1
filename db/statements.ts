import type { Statement } from 'better-sqlite3';
import type { RawDatabase } from '@/db/open';

type Value = string | number | null;
const prepared = new WeakMap<RawDatabase, Map<string, Statement<Value[], unknown>>>();
const most = 400;

/** A statement, prepared at its first use and kept: for reads that a page waits for. */
export function statement<Result>(raw: RawDatabase, sql: string): Statement<Value[], Result> {
  let known = prepared.get(raw);
  if (!known) prepared.set(raw, (known = new Map()));
  let found = known.get(sql);
  if (!found) {
    if (known.size >= most) known.clear();
    known.set(sql, (found = raw.prepare<Value[], unknown>(sql)));
  }
  return found as Statement<Value[], Result>;
}
