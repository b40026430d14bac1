import { atRevision } from '@/app/_server/at-revision';
import { checkingDetail, refuse } from '@/app/_server/checking-detail';
import { door } from '@/app/_server/door';
import { readJson } from '@/app/_server/input';
import { requireRevision } from '@/app/_server/things';
import { db } from '@/db/client';
import { sendToCheck } from '@/db/queries/checking-acts';
import { sendInput } from '@/lib/api/checking-inputs';

/** Where checking stands: who sent it, the frames to see with why and what was marked, what stands against passing it. */
export const GET = door(
  atRevision('read a batch', async ({ person, revision }) => Response.json({ checking: await checkingDetail(person, revision) })),
);

/** Sends the revision to check, with a note; it is frozen from then on. */
export const POST = door(
  atRevision('send to check', async ({ request, person, revision, params }) => {
    const { note } = await readJson(request, sendInput);
    refuse(await sendToCheck(db(), revision, person, note));
    const sent = await requireRevision(person, params.batch, params.revision);
    return Response.json({ checking: await checkingDetail(person, sent) }, { status: 201 });
  }),
);
