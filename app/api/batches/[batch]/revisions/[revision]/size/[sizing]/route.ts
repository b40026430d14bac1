import { atRevision } from '@/app/_server/at-revision';
import { door } from '@/app/_server/door';
import { requireSizing, sizingTold } from '@/app/_server/sizings';
import { db } from '@/db/client';
import { insertActivity } from '@/db/queries/activity';
import { ApiError } from '@/lib/api/error';
import { askForSizing, askToStopSizing } from '@/worker/ask';
import { queue, serverDatabase } from '@/worker/boot';

/** How far a sizing is, and what it found. To be asked again and again. */
export const GET = door(
  atRevision<'sizing'>('read a batch', async ({ revision, params }) => {
    return Response.json({ sizing: sizingTold(await requireSizing(revision, params.sizing)) });
  }),
);

/** Goes on with a sizing that was stopped or failed: what frames answered is not asked again. */
export const POST = door(
  atRevision<'sizing'>('size sections', async ({ revision, person, params }) => {
    const { id, state } = await requireSizing(revision, params.sizing);
    const of = { office: revision.office, revision: revision.id, person: person.id, again: id };
    if ((await askForSizing(queue(), serverDatabase(), of)) === undefined) {
      const done = state === 'done' ? 'It has found what it looked for.' : 'Sections of this revision are being sized already.';
      throw new ApiError('conflict', done);
    }
    return Response.json({ sizing: sizingTold(await requireSizing(revision, params.sizing)) }, { status: 202 });
  }),
);

/** Stops a sizing after the frames in hand; what they answered is kept. */
export const DELETE = door(
  atRevision<'sizing'>('size sections', async ({ revision, person, params }) => {
    const { id } = await requireSizing(revision, params.sizing);
    const { office, project, batch } = revision;
    if (!(await askToStopSizing(queue(), serverDatabase(), { office, revision: revision.id, sizing: id }))) {
      throw new ApiError('conflict', 'This sizing is not going on.');
    }
    const what = 'stopped sizing sections';
    await insertActivity(db(), office, { what, project, batch, revision: revision.id, person: person.id });
    return Response.json({ sizing: sizingTold(await requireSizing(revision, params.sizing)) }, { status: 202 });
  }),
);
