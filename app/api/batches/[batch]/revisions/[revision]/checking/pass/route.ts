import { atRevision } from '@/app/_server/at-revision';
import { refuse, requireChecker } from '@/app/_server/checking-detail';
import { door } from '@/app/_server/door';
import { readJson } from '@/app/_server/input';
import { publicRevision } from '@/app/_server/public-revision';
import { requireRevision } from '@/app/_server/things';
import { db } from '@/db/client';
import { passRevision } from '@/db/queries/checking-acts';
import { passInput } from '@/lib/api/checking-inputs';

/** Passes the revision, where every listed frame is seen, no query is open, and every over and not checked is accepted. */
export const POST = door(
  atRevision('check', async ({ request, person, revision, params }) => {
    await requireChecker(person, revision);
    const { note } = await readJson(request, passInput);
    refuse(await passRevision(db(), revision, person, note));
    return Response.json({ revision: publicRevision(await requireRevision(person, params.batch, params.revision)) });
  }),
);
