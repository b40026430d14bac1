/** Which sections of the library are shown, and in which order: one description for the address, the page, the API and the export. */
import { designationKey } from '@/lib/sections/designation-keys';
import { findDesignation } from '@/lib/sections/find-designation';
import { librarySection, rangeNames, ranges, type RangeName } from '@/lib/sections/library';
import type { RangeRow } from '@/lib/sections/ranges/range';
import type { Section } from '@/lib/model/frame';
import type { System } from '@/lib/units/quantity';
import { boundedKeys, libraryColumn, libraryToSI } from './columns-of-library';

type BoundedKey = (typeof boundedKeys)[number];

interface Bound {
  readonly column: BoundedKey;
  /** SI; null = open. */
  readonly min: number | null;
  readonly max: number | null;
}

export interface LibraryView {
  readonly range: RangeName | null;
  /** A designation, or a part of one, as typed. */
  readonly search: string;
  readonly units: System;
  readonly bounds: readonly Bound[];
  /** Null = the order of the ranges and their tables. */
  readonly sort: { readonly column: string; readonly descending: boolean } | null;
}

export interface LibraryRow {
  readonly range: RangeName;
  readonly row: RangeRow;
  readonly section: Section;
}

export interface LibraryFound {
  readonly rows: readonly LibraryRow[];
  /** What was understood by a designation that leaves something open. */
  readonly note: string | null;
  /** The nearest designation where nothing is called as typed. */
  readonly suggestion: string | null;
}

const isRange = (name: string): name is RangeName => (rangeNames as readonly string[]).includes(name);

/**
 * The view that an address describes: `range`, `q`, `units` (metric, us), `sort` (a column, a minus before it: downwards), and
 * `min-A`, `max-A` for each column that is bounded, in the units of the view.
 *
 * @returns what of it is no view, in sentences, by key; a page shows what it could read, a script is told
 */
export function libraryViewFrom(params: URLSearchParams): {
  readonly view: LibraryView;
  readonly wrong: Readonly<Record<string, string>>;
} {
  const wrong: Record<string, string> = {};
  const asked = params.get('units') ?? 'metric';
  if (asked !== 'metric' && asked !== 'us') wrong['units'] = 'Units are metric or us.';
  const units: System = asked === 'us' ? 'us' : 'metric';
  const named = params.get('range') ?? '';
  if (named !== '' && !isRange(named)) wrong['range'] = `There is no range “${named}”. Ranges are ${rangeNames.join(', ')}.`;
  const bounds = boundedKeys.flatMap((column): Bound[] => {
    const side = (word: 'min' | 'max'): number | null => {
      const text = (params.get(`${word}-${column}`) ?? '').trim().replace(',', '.');
      if (text === '') return null;
      const value = Number(text);
      const { quantity, what } = libraryColumn(column)!;
      if (Number.isFinite(value) && value >= 0) return libraryToSI(value, quantity, units);
      wrong[`${word}-${column}`] = `The bound of ${what} must be a number, not “${text}”.`;
      return null;
    };
    const [min, max] = [side('min'), side('max')];
    return min === null && max === null ? [] : [{ column, min, max }];
  });
  const sortText = params.get('sort') ?? '';
  const column = sortText.replace(/^-/, '');
  const sort = libraryColumn(column) ? { column, descending: sortText.startsWith('-') } : null;
  if (sortText !== '' && sort === null) wrong['sort'] = `The library has no column “${column}” to sort by.`;
  const search = (params.get('q') ?? '').trim().slice(0, 80);
  return { view: { range: isRange(named) ? named : null, search, units, bounds, sort }, wrong };
}

/** Every row of the library with its section, in order. */
function everyRow(range: RangeName | null): LibraryRow[] {
  return (range === null ? rangeNames : [range]).flatMap((name) =>
    ranges[name].rows.map((row) => ({ range: name, row, section: librarySection(name, row) })),
  );
}

/** The sections of a view, in its order. */
export function libraryRows({ range, search, bounds, sort }: LibraryView): LibraryFound {
  const all = everyRow(range);
  const found = searched(all, search);
  const within = found.rows.filter(({ section }) =>
    bounds.every(({ column, min, max }) => {
      const value = libraryColumn(column)?.value(section) ?? null;
      // half a unit in the tenth place: a bound typed as shown holds what it was read from
      return value !== null && (min === null || value >= min * (1 - 1e-9)) && (max === null || value <= max * (1 + 1e-9));
    }),
  );
  if (sort === null) return { ...found, rows: within };
  const value = (row: LibraryRow): number | null => libraryColumn(sort.column)?.value(row.section) ?? null;
  const sorted = within.toSorted((a, b) => {
    const [x, y] = [value(a), value(b)];
    if (x === null || y === null) return Number(x === null) - Number(y === null);
    return sort.descending ? y - x : x - y;
  });
  return { ...found, rows: sorted };
}

function searched(all: readonly LibraryRow[], search: string): LibraryFound {
  if (search === '') return { rows: all, note: null, suggestion: null };
  const found = findDesignation(search);
  if ('section' in found) {
    const own = all.filter(({ section }) => section.designation === found.section.designation);
    return { rows: own, note: found.note, suggestion: own.length === 0 ? found.section.designation : null };
  }
  const key = designationKey(search);
  const keyed = all.map((row) => ({ row, own: designationKey(row.section.designation ?? '') }));
  const parts = keyed.filter(({ own }) => key !== '' && own.includes(key));
  // "IPE 5" is the start of some and a part of Pipe 5: those that start so are meant
  const starts = parts.filter(({ own }) => own.startsWith(key));
  const rows = (starts.length > 0 ? starts : parts).map(({ row }) => row);
  return { rows, note: null, suggestion: rows.length > 0 ? null : found.suggestion };
}

/** The row of a designation as the standard writes it. */
export function libraryRow(designation: string): LibraryRow | null {
  const found = findDesignation(designation);
  if (!('section' in found)) return null;
  return everyRow(null).find(({ section }) => section.designation === found.section.designation) ?? null;
}
