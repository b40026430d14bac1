/** What pages, routes and the demo's seed ask of the queue: each records the wish in the database, then wakes the pump. */
import type { OpenDatabase } from '@/db/open';
import { insertChangedRevision } from '@/db/queries/changes';
import { findLatestJob, finishJob, insertJob } from '@/db/queries/jobs';
import { updateRevisionState } from '@/db/queries/revisions';
import { countWaiting } from '@/db/queries/results';
import type { WorkQueue } from './queue';

/** Queues the reading of a revision whose files are stored; false where that is queued already. */
export async function askForReading(
  queue: WorkQueue,
  { db }: Pick<OpenDatabase, 'db'>,
  of: { readonly office: number; readonly revision: number; readonly person: number },
): Promise<boolean> {
  const job = await insertJob(db, of.office, { kind: 'read', revision: of.revision, person: of.person });
  queue.wake();
  return job !== undefined;
}

/**
 * Makes a batch's next revision from an earlier one by changes: it is read, and run where that is asked, in the queue.
 *
 * @returns undefined where the earlier one is not the office's, or nothing of it was read
 */
export async function askForChange(
  queue: WorkQueue,
  { db }: Pick<OpenDatabase, 'db'>,
  office: number,
  made: Parameters<typeof insertChangedRevision>[2],
): Promise<{ id: number; letter: string } | undefined> {
  const revision = await insertChangedRevision(db, office, made);
  if (revision) queue.wake();
  return revision;
}

/**
 * Queues a run of a revision that is read, stopped or failed, or run with frames left.
 * False where its state does not allow it or there is no frame that can run.
 */
export async function askForRun(
  queue: WorkQueue,
  { db, raw }: OpenDatabase,
  of: { readonly office: number; readonly revision: number; readonly person: number },
): Promise<boolean> {
  if (countWaiting(raw, of.revision).total === 0) return false;
  const asked = await db.transaction().execute(async (within) => {
    const { office, revision, person } = of;
    const moved = await updateRevisionState(within, office, revision, ['read', 'stopped', 'failed'], 'running', {
      runBy: person,
    });
    if (moved) await insertJob(within, office, { kind: 'run', revision, person });
    return moved;
  });
  if (asked) queue.wake();
  return asked;
}

/** Stops a run after the chunks in hand; what is solved is kept. False where none is going on. */
export async function askToStop(
  queue: WorkQueue,
  { db }: Pick<OpenDatabase, 'db'>,
  of: { readonly office: number; readonly revision: number },
): Promise<boolean> {
  const job = await findLatestJob(db, of.office, of.revision, 'run');
  if (!job || (job.state !== 'queued' && job.state !== 'running')) return false;
  if (!queue.stop(of.revision)) {
    // A job that no pump has taken up: nothing is in hand.
    await finishJob(db, job.id, 'stopped');
    await updateRevisionState(db, of.office, of.revision, ['running'], 'stopped');
  }
  return true;
}
