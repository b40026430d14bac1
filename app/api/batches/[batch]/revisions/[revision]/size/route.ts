import { atRevision } from '@/app/_server/at-revision';
import { door } from '@/app/_server/door';
import { readJson } from '@/app/_server/input';
import { requireRead } from '@/app/_server/make-change';
import { requireSizing, sizingTold } from '@/app/_server/sizings';
import { db } from '@/db/client';
import { insertActivity } from '@/db/queries/activity';
import { listSizings } from '@/db/queries/sizing';
import { ApiError } from '@/lib/api/error';
import { sizingInput } from '@/lib/api/sizing-inputs';
import { askForSizing } from '@/worker/ask';
import { queue, serverDatabase } from '@/worker/boot';

/** The newest sizings of the revision, with what they found. */
export const GET = door(
  atRevision('read a batch', async ({ revision }) => {
    const sizings = await listSizings(db(), revision.office, revision.id);
    return Response.json({ sizings: sizings.map(sizingTold) });
  }),
);

/** Looks for the lightest sections of groups of members, in the queue. Nothing of the revision is changed. */
export const POST = door(
  atRevision('size sections', async ({ request, person, revision }) => {
    requireRead(revision);
    const asked = await readJson(request, sizingInput);
    const { office, id, project, batch } = revision;
    const sizing = await askForSizing(queue(), serverDatabase(), { office, revision: id, person: person.id, request: asked });
    if (sizing === undefined)
      throw new ApiError('conflict', 'Sections of this revision are being sized already. Stop that first.');
    await insertActivity(db(), office, {
      what: 'sized sections',
      project,
      batch,
      revision: id,
      person: person.id,
      detail: { groups: asked.groups.map(({ by, name, range }) => `${by} ${name}: ${range}`).join('; ') },
    });
    return Response.json({ sizing: sizingTold(await requireSizing(revision, `${sizing}`)) }, { status: 202 });
  }),
);
