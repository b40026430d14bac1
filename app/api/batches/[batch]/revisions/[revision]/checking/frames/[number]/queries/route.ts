import { atRevision } from '@/app/_server/at-revision';
import { refuse, requireChecker, requireMarkedFrame } from '@/app/_server/checking-detail';
import { door } from '@/app/_server/door';
import { readJson } from '@/app/_server/input';
import { db } from '@/db/client';
import { insertQuery } from '@/db/queries/checking-queries';
import { queryInput } from '@/lib/api/checking-inputs';

/** Raises a query on a frame, a member or node of it (`subject`), or one of its checks (`check`). */
export const POST = door(
  atRevision<'number'>('check', async ({ request, person, revision, params }) => {
    await requireChecker(person, revision);
    const asked = await readJson(request, queryInput);
    const made = await insertQuery(db(), revision, await requireMarkedFrame(revision, params.number), person, asked);
    refuse(typeof made === 'string' ? made : null);
    return Response.json({ query: made }, { status: 201 });
  }),
);
