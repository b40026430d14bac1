import { atRevision } from '@/app/_server/at-revision';
import { door } from '@/app/_server/door';
import { parse, queryOf } from '@/app/_server/input';
import { requireView } from '@/app/_server/view';
import { db } from '@/db/client';
import { listRows } from '@/db/queries/lists';
import { notFound } from '@/lib/api/error';
import { pageInput } from '@/lib/api/inputs';

/** A page of a table's rows, filtered and sorted as the query says; figures in SI. */
export const GET = door(
  atRevision<'table'>('read a batch', async ({ request, person, revision, params }) => {
    const view = requireView(params.table, request);
    const { after, before, size } = parse(pageInput, queryOf(request));
    const page = await listRows(db(), person.office, revision.id, view, { limit: size, after, before });
    if (page === undefined) throw notFound('revision');
    return Response.json(page);
  }),
);
