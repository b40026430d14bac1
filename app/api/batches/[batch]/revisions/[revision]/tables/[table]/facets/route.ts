import { atRevision } from '@/app/_server/at-revision';
import { door } from '@/app/_server/door';
import { isTable } from '@/app/_server/view';
import { db } from '@/db/client';
import { listFacets } from '@/db/queries/lists';
import { notFound } from '@/lib/api/error';
import { tables } from '@/lib/tables/view';

/** The values of each column that is filtered by values, with the rows of each; `?column=role` for one of them. */
export const GET = door(
  atRevision<'table'>('read a batch', async ({ request, person, revision, params }) => {
    const { table } = params;
    if (!isTable(table)) throw notFound('table');
    const asked = new URL(request.url).searchParams.get('column');
    const offered = tables[table]
      .filter((column) => column.filter === true && column.kind === 'text')
      .map((column) => column.key);
    const columns = asked === null ? offered : [asked];
    const values: Record<string, readonly { value: string; count: number }[]> = {};
    for (const column of columns) values[column] = await listFacets(db(), person.office, revision.id, table, column);
    return Response.json({ values });
  }),
);
