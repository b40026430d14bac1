/**
 * A table's view in the address, so that a link reproduces it and a person can read it:
 *
 *     /members?role=rafter&ratio=0.8..&p:depot=D05&p:depot=D09&frame=~D0&sort=-ratio&columns=frame,member,ratio
 *
 * A repeated key is a list of values, `a..b` (either end open) a range in SI, `~text` text contained; a plain
 * value that would read as one of these is written after `=`. A leading `-` sorts downwards; no sort = sheet order.
 */
import type { Severity } from '@/lib/problems/problem';
import type { Verdict } from '@/lib/results/result';
import { tableNames, tables, type Filter, type TableName, type View } from '@/lib/tables/view';

/** Keys that are not columns. */
const reserved = new Set(['sort', 'columns', 'after', 'before', 'size', 'format', 'list', 'show', 'of', 'in']);

const number = String.raw`[-+]?(?:\d+\.?\d*|\.\d+)(?:e[-+]?\d+)?`;
const range = new RegExp(`^(${number})?\\.\\.(${number})?$`, 'i');

export function viewToParams(view: View): URLSearchParams {
  const params = new URLSearchParams();
  for (const filter of view.filters) {
    if (filter.op === 'in') for (const value of filter.values) params.append(filter.column, plain(value));
    else if (filter.op === 'range') params.append(filter.column, `${filter.min ?? ''}..${filter.max ?? ''}`);
    else params.append(filter.column, `~${filter.text}`);
  }
  if (view.sort) params.set('sort', (view.sort.descending ? '-' : '') + view.sort.column);
  if (view.columns) params.set('columns', view.columns.map(listItem).join(','));
  return params;
}

/** The list that a frame's page walks through: that of frames where the address names no other. */
export function listFromParams(params: URLSearchParams): View {
  const named = tableNames.find((table) => table === params.get('list') && table !== 'problems');
  return { ...viewFromParams(named ?? 'frames', params), columns: null };
}

/** The same list, in the address of a frame's page. */
export function listToSearch(list: View): string {
  const search = viewToSearch({ ...list, columns: null });
  if (list.table === 'frames') return search;
  return `?list=${list.table}${search === '' ? '' : `&${search.slice(1)}`}`;
}

/** Reads an address as far as it makes sense: what names no column of the table, or no value of its column, is left out. */
export function viewFromParams(table: TableName, params: URLSearchParams): View {
  const filters: Filter[] = [];
  for (const column of new Set(params.keys())) {
    if (reserved.has(column) || !filterable(table, column)) continue;
    filters.push(...readFilters(column, params.getAll(column)).filter((filter) => misread(table, filter) === null));
  }
  return { table, filters: filters.slice(0, 20), sort: readSort(table, params.get('sort')), columns: readColumns(table, params) };
}

/** The address of a view: `''` or `?…`, with its commas and colons left readable. */
export function viewToSearch(view: View): string {
  const text = viewToParams(view).toString().replaceAll('%2C', ',').replaceAll('%3A', ':').replaceAll('%7E', '~');
  return text === '' ? '' : `?${text}`;
}

const wordsOf: Readonly<Partial<Record<string, readonly string[]>>> = {
  verdict: ['over', 'not checked', 'near', 'within'] satisfies readonly Verdict[],
  severity: ['error', 'warning', 'note'] satisfies readonly Severity[],
  kind: ['case', 'combination'],
};

/** Why no row could be asked for by a filter, in words; null where one could. */
function misread(table: TableName, filter: Filter): string | null {
  const column = tables[table].find((one) => one.key === filter.column);
  if (!column) return null; // a parameter may be a number or a word
  const words = wordsOf[column.key];
  if (words) {
    const known = filter.op === 'in' && filter.values.every((value) => words.includes(value));
    return known ? null : `${column.key} is one of ${words.join(', ')}; a second one is given as a second ${column.key}=.`;
  }
  if (column.kind === 'number' || column.kind === 'ratio') {
    const number = (text: string): boolean => text.trim() !== '' && Number.isFinite(Number(text));
    const known = filter.op === 'range' || (filter.op === 'in' && filter.values.every(number));
    return known ? null : `${column.key} is filtered by a number or by a range, like 0.8..1.2 with either end left open.`;
  }
  return filter.op === 'range'
    ? `${column.key} is text, which has no range. Write = before it if it is meant as it stands.`
    : null;
}

/** Filters of an address that ask for nothing their column could hold: the column, and why. */
export function misreadFilters(table: TableName, params: URLSearchParams): { readonly column: string; readonly why: string }[] {
  return [...new Set(params.keys())]
    .filter((column) => !reserved.has(column) && filterable(table, column))
    .flatMap((column) => readFilters(column, params.getAll(column)))
    .flatMap((filter) => {
      const why = misread(table, filter);
      return why === null ? [] : [{ column: filter.column, why }];
    });
}

function plain(value: string): string {
  return /^[=~]/.test(value) || range.test(value) ? `=${value}` : value;
}

function readFilters(column: string, texts: readonly string[]): Filter[] {
  const values: string[] = [];
  const others: Filter[] = [];
  for (const text of texts) {
    const ends = range.exec(text);
    if (text.startsWith('=')) values.push(text.slice(1, 201));
    else if (text.startsWith('~')) {
      if (text.length > 1) others.push({ column, op: 'contains', text: text.slice(1, 201) });
    } else if (ends) others.push({ column, op: 'range', min: bound(ends[1]), max: bound(ends[2]) });
    else values.push(text.slice(0, 200));
  }
  return values.length > 0 ? [{ column, op: 'in', values: values.slice(0, 200) }, ...others] : others;
}

/** An end left open, or too large for a number, is no end. */
function bound(text: string | undefined): number | null {
  const value = text === undefined || text === '' ? NaN : Number(text);
  return Number.isFinite(value) ? value : null;
}

function readSort(table: TableName, text: string | null): View['sort'] {
  if (text === null) return null;
  const descending = text.startsWith('-');
  const column = descending ? text.slice(1) : text;
  const known = tables[table].some((one) => one.key === column && one.sort === true) || isParameter(column);
  return known ? { column, descending } : null;
}

function readColumns(table: TableName, params: URLSearchParams): View['columns'] {
  const text = params.get('columns');
  if (text === null || text === '') return null;
  const names = text.split(',').map(listName);
  const known = names.filter((name) => isParameter(name) || tables[table].some((one) => one.key === name));
  return known.length > 0 ? [...new Set(known)].slice(0, 60) : null;
}

function filterable(table: TableName, column: string): boolean {
  return isParameter(column) || tables[table].some((one) => one.key === column && one.filter === true);
}

/** A parameter of a family, shown and filtered as `p:NAME`. */
const isParameter = (column: string): boolean => column.startsWith('p:') && column.length > 2 && column.length <= 60;

/** A list is divided by commas, so those within a name are written `%2C`. */
const listItem = (name: string): string => name.replaceAll('%', '%25').replaceAll(',', '%2C');
const listName = (name: string): string => name.replaceAll('%2C', ',').replaceAll('%25', '%');
