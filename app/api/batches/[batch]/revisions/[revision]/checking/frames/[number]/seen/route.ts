import { atRevision } from '@/app/_server/at-revision';
import { refuse, requireChecker, requireMarkedFrame } from '@/app/_server/checking-detail';
import { door } from '@/app/_server/door';
import { db } from '@/db/client';
import { findCheckProgress } from '@/db/queries/checking-list';
import { updateSeen } from '@/db/queries/checking-marks';

const mark = (seen: boolean) =>
  door(
    atRevision<'number'>('check', async ({ person, revision, params }) => {
      await requireChecker(person, revision);
      refuse(await updateSeen(db(), revision, await requireMarkedFrame(revision, params.number), person, seen));
      return Response.json({ progress: await findCheckProgress(db(), person.office, revision.id) });
    }),
  );

/** Marks a frame seen, on the input and by the engine that it has. */
export const POST = mark(true);

/** Takes one's own mark back. */
export const DELETE = mark(false);
