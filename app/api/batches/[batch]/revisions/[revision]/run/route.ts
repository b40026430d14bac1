import { atRevision } from '@/app/_server/at-revision';
import { door } from '@/app/_server/door';
import { progressOf } from '@/app/_server/progress';
import { db } from '@/db/client';
import { insertActivity } from '@/db/queries/activity';
import { ApiError } from '@/lib/api/error';
import { askForRun, askToStop } from '@/worker/ask';
import { queue, serverDatabase } from '@/worker/boot';

/** Starts the run of a revision that was read, or does what is left of one that was stopped. */
export const POST = door(
  atRevision('run', async ({ person, revision }) => {
    const { office, id, project, batch } = revision;
    const asked = await askForRun(queue(), serverDatabase(), { office, revision: id, person: person.id });
    if (!asked) throw new ApiError('conflict', whyNot(revision.state));
    await insertActivity(db(), office, { what: 'started a run', project, batch, revision: id, person: person.id });
    return Response.json({ run: await progressOf(office, revision.batch, revision.letter) }, { status: 202 });
  }),
);

/** Stops a run after the frames in hand; what is solved is kept. */
export const DELETE = door(
  atRevision('run', async ({ person, revision }) => {
    const { office, id, project, batch } = revision;
    if (!(await askToStop(queue(), serverDatabase(), { office, revision: id }))) {
      throw new ApiError('conflict', 'No run of this revision is going on.');
    }
    await insertActivity(db(), office, { what: 'stopped a run', project, batch, revision: id, person: person.id });
    return Response.json({ run: await progressOf(office, revision.batch, revision.letter) }, { status: 202 });
  }),
);

function whyNot(state: string): string {
  if (state === 'reading') return 'The sheets are still being read. Start the run when they are.';
  if (state === 'running') return 'This revision is running already.';
  if (state === 'run') return 'Every frame of this revision that can run has been run.';
  if (state === 'read' || state === 'stopped' || state === 'failed') {
    return 'No frame of this revision can run. Mend the errors at their cells and bring the sheets in again.';
  }
  return `A revision that is ${state} isn’t run again. Bring mended sheets in as the next revision.`;
}
