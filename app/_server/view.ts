import 'server-only';
import { db } from '@/db/client';
import type { RevisionRecord } from '@/db/queries/revisions';
import { listParameters } from '@/db/queries/summary';
import { notFound } from '@/lib/api/error';
import { strictView } from '@/lib/api/strict-view';
import type { ParameterColumn } from '@/lib/tables/shown-columns';
import { tableNames, viewSchema, type TableName, type View } from '@/lib/tables/view';
import { parse } from './input';

export function isTable(name: string): name is TableName {
  return (tableNames as readonly string[]).includes(name);
}

/** @throws {ApiError} not-found for a table there is none of, bad-request for what the table doesn't offer */
export function requireView(table: string, request: Request): View {
  if (!isTable(table)) throw notFound('table');
  return parse(viewSchema, strictView(table, new URL(request.url).searchParams));
}

/** The parameters of the batch's families, which tables offer as columns and filters. */
export async function parametersOf(revision: RevisionRecord): Promise<readonly ParameterColumn[]> {
  return listParameters(db(), revision.office, revision.id);
}

/** The same, where the view shows any. */
export async function viewParameters(revision: RevisionRecord, view: View): Promise<readonly ParameterColumn[]> {
  return view.columns?.some((column) => column.startsWith('p:')) === true ? parametersOf(revision) : [];
}
