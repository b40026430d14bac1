import { tables, type TableName, type View } from '@/lib/tables/view';
import { ApiError } from './error';
import { misreadFilters, viewFromParams } from './view-address';

/** What a table's route takes beside the view. */
const others = ['after', 'before', 'size', 'format'];

/**
 * The view that an API request asks for. A page reads what it can of an address; a script is told what it got
 * wrong, since a filter left out would hand it rows it did not mean.
 *
 * @throws {ApiError} bad-request naming the keys that are no column, filter or sort of the table, and filters by
 *   what their column cannot hold
 */
export function strictView(table: TableName, params: URLSearchParams): View {
  const view = viewFromParams(table, params);
  const fields: Record<string, string[]> = {};
  const misread = misreadFilters(table, params);
  for (const { column, why } of misread) fields[column] = [why];
  const filtered = new Set([...view.filters, ...misread].map(({ column }) => column));
  for (const key of new Set(params.keys())) {
    if (key === 'sort' || key === 'columns' || others.includes(key) || filtered.has(key)) continue;
    const offered = tables[table].filter((column) => column.filter === true).map((column) => column.key);
    fields[key] = [`${key} is no filter of ${table}. Filter by ${offered.join(', ')} or p:PARAMETER.`];
  }
  if (params.get('sort') && view.sort === null) {
    const offered = tables[table].filter((column) => column.sort === true).map((column) => column.key);
    fields.sort = [`${table} can be sorted by ${offered.join(', ')}, downwards with a minus before it.`];
  }
  const named = params.get('columns')?.split(',') ?? [];
  if (named.length > 0 && named.length !== (view.columns?.length ?? 0)) {
    fields.columns = [`Columns of ${table} are ${tables[table].map((column) => column.key).join(', ')}, each named once.`];
  }
  const first = Object.values(fields)[0]?.[0];
  if (first !== undefined) throw new ApiError('bad-request', first, { fields });
  return view;
}
