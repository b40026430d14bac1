import { atRevision } from '@/app/_server/at-revision';
import { refuse, requireChecker } from '@/app/_server/checking-detail';
import { door } from '@/app/_server/door';
import { readJson } from '@/app/_server/input';
import { publicRevision } from '@/app/_server/public-revision';
import { requireRevision } from '@/app/_server/things';
import { db } from '@/db/client';
import { returnRevision } from '@/db/queries/checking-acts';
import { returnInput } from '@/lib/api/checking-inputs';

/** Returns the revision to who prepared it, with a note; also one that was passed and not yet issued. */
export const POST = door(
  atRevision('check', async ({ request, person, revision, params }) => {
    await requireChecker(person, revision);
    const { note } = await readJson(request, returnInput);
    refuse(await returnRevision(db(), revision, person, note));
    return Response.json({ revision: publicRevision(await requireRevision(person, params.batch, params.revision)) });
  }),
);
