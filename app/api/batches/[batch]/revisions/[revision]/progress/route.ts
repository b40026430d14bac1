import { atRevision } from '@/app/_server/at-revision';
import { door } from '@/app/_server/door';
import { progressOf } from '@/app/_server/progress';

/** How far a revision's reading or run is: frames done, rate, time left, the frames solved last. To be asked again and again. */
export const GET = door(
  atRevision('read a batch', async ({ revision }) => {
    return Response.json({ run: await progressOf(revision.office, revision.batch, revision.letter) });
  }),
);
