import { atRevision } from '@/app/_server/at-revision';
import { cellFragment } from '@/app/_server/cell-fragment';
import { door } from '@/app/_server/door';
import { parse, queryOf } from '@/app/_server/input';
import { notFound } from '@/lib/api/error';
import { cellInput } from '@/lib/api/inputs';

/** A piece of the sender's own sheet round a cell or a row. */
export const GET = door(
  atRevision('read a batch', async ({ request, revision }) => {
    const { sheet, cell, row } = parse(cellInput, queryOf(request));
    const at = row ?? Number(/\d+$/.exec(cell ?? '')?.[0]);
    const fragment = await cellFragment(revision, { sheet, row: at, cell: cell ?? null });
    if (fragment === null) throw notFound('row');
    return Response.json({ fragment });
  }),
);
