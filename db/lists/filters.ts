import { noneHigh, noneLow } from '@/db/absent';
import { columnOf, listTables, parameterOf } from '@/db/lists/columns';
import { pickedFrames } from '@/db/lists/picked';
import type { RawDatabase } from '@/db/open';
import { remembered } from '@/db/remembered';
import { statement } from '@/db/statements';
import { type Filter, tables, type View } from '@/lib/tables/view';

export type Value = string | number | null;

/** A condition in SQL with its values. */
export interface Condition {
  readonly sql: string;
  readonly values: readonly Value[];
}

/** A filter by values of an indexed column, which can lead the way to its rows. */
export interface ByValues {
  readonly column: string;
  readonly values: readonly (string | number)[];
}

/** A view's filters in the database's terms. */
export interface ReadFilters {
  readonly byValues: readonly ByValues[];
  readonly ranges: readonly { readonly column: string; readonly condition: Condition }[];
  readonly contains: readonly { readonly column: string; readonly condition: Condition }[];
  /** Frames that the filters on frames and on their parameters leave, in sheet order; null = all. */
  readonly frames: readonly number[] | null;
  /** SQL that gives these frames; '' where all are left. */
  readonly picked: string;
}

/** @throws {RangeError} for a filter on a column that does not offer one */
export function readFilters(raw: RawDatabase, revision: number, stamp: number, view: View): ReadFilters {
  const byValues: ByValues[] = [];
  const ranges: { column: string; condition: Condition }[] = [];
  const contains: { column: string; condition: Condition }[] = [];
  let frames: readonly number[] | null = null;
  const names: string[] = [];
  for (const filter of view.filters) {
    const { column } = filter;
    if (parameterOf(column) !== null || (column === 'frame' && view.table !== 'problems')) {
      const found = framesOf(raw, revision, stamp, filter);
      const before: readonly number[] | null = frames;
      names.push(JSON.stringify(filter));
      const key = `${revision} ${stamp} ${names.join(' ')}`;
      frames = before === null ? found : remembered(raw, 'frames', key, () => intersection(before, found));
      continue;
    }
    if (!tables[view.table].some((one) => one.key === column && one.filter)) {
      throw new RangeError(`Expected a filter that ${view.table} offers, got one on ${column}`);
    }
    const { sql, stored } = columnOf(view.table, column);
    if (filter.op === 'in') {
      byValues.push({ column, values: [...new Set(filter.values)].flatMap((word) => stored(word) ?? []) });
    } else if (filter.op === 'range') ranges.push({ column, condition: range(sql, filter.min, filter.max) });
    else contains.push({ column, condition: { sql: `${sql} like ? escape '\\'`, values: [like(filter.text)] } });
  }
  return { byValues, ranges, contains, frames, picked: frames ? pickedFrames(raw, frames) : '' };
}

/** Every filter as a condition that no index is chosen for (a unary + before the column). */
export function conditionsOf(filters: ReadFilters, view: View, but: ByValues | null = null): Condition[] {
  const list: Condition[] = [];
  for (const one of filters.byValues) {
    if (one !== but) list.push(isIn(`+${columnOf(view.table, one.column).sql}`, one.values));
  }
  for (const { column, condition } of filters.ranges) {
    // A range of what sorts narrows the index that is followed.
    const held = view.sort?.column === column ? '' : '+';
    list.push({ sql: condition.sql.replaceAll(columnOf(view.table, column).sql, (sql) => held + sql), values: condition.values });
  }
  for (const one of filters.contains) list.push(one.condition);
  if (filters.frames) list.push({ sql: `+${listTables[view.table].frame} in (${filters.picked})`, values: [] });
  return list;
}

export function isIn(sql: string, values: readonly (string | number)[]): Condition {
  if (values.length === 1) return { sql: `${sql} = ?`, values };
  return { sql: `${sql} in (${values.map(() => '?').join(',')})`, values };
}

/** Rows without a number fit no range. */
function range(sql: string, min: number | null, max: number | null): Condition {
  const parts = [min === null ? `${sql} > ${noneLow}` : `${sql} >= ?`, max === null ? `${sql} < ${noneHigh}` : `${sql} <= ?`];
  return { sql: parts.join(' and '), values: [min, max].filter((end) => end !== null) };
}

const like = (part: string): string => `%${part.replace(/[\\%_]/g, '\\$&')}%`;

/** Frames that a filter on the frame's name or on a parameter of its family leaves. */
function framesOf(raw: RawDatabase, revision: number, stamp: number, filter: Filter): readonly number[] {
  return remembered(raw, 'frames', `${revision} ${stamp} ${JSON.stringify(filter)}`, () => {
    const parameter = parameterOf(filter.column);
    const found = parameter === null ? byName(filter) : byParameter(filter);
    const from = parameter === null ? '' : 'join frame_parameter p on p.version = f.version and p.name = ?';
    const sql = `select f.frame from revision_frame f ${from} where f.revision = ? and ${found.sql} order by f.frame`;
    const values = [...(parameter === null ? [] : [parameter]), revision, ...found.values];
    return statement<{ frame: number }>(raw, sql).all(...values).map((row) => row.frame); // prettier-ignore
  });
}

function byName(filter: Filter): Condition {
  if (filter.op === 'in') return isIn('f.frame_id', filter.values);
  if (filter.op === 'contains') return { sql: `f.frame_id like ? escape '\\'`, values: [like(filter.text)] };
  throw new RangeError('Expected frames by name, got a range');
}

function byParameter(filter: Filter): Condition {
  if (filter.op === 'contains') return { sql: `p.text like ? escape '\\'`, values: [like(filter.text)] };
  if (filter.op === 'range') return range('p.number', filter.min, filter.max);
  const numbers = filter.values.map(Number).filter(Number.isFinite);
  const asText = isIn('p.text', filter.values);
  if (numbers.length === 0) return asText;
  const asNumber = isIn('p.number', numbers);
  return { sql: `(${asText.sql} or ${asNumber.sql})`, values: [...asText.values, ...asNumber.values] };
}

function intersection(a: readonly number[], b: readonly number[]): number[] {
  const within = new Set(b);
  return a.filter((one) => within.has(one));
}
