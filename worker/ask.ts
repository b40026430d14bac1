/** What pages, routes and the demo's seed ask of the queue: each records the wish in the database, then wakes the pump. */
import type { OpenDatabase } from '@/db/open';
import { insertChangedRevision } from '@/db/queries/changes';
import { findLatestJob, finishJob, insertJob } from '@/db/queries/jobs';
import { updateRevisionState } from '@/db/queries/revisions';
import { countWaiting } from '@/db/queries/results';
import { insertSizing, updateSizingState } from '@/db/queries/sizing';
import { engineVersion } from '@/lib/analysis/engine-version';
import type { SizingRequest } from '@/lib/sizing/sizing';
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

/**
 * Queues a sizing of a revision, or one that was stopped or failed to go on with.
 *
 * @returns the sizing; undefined where one of that revision is queued or going on
 */
export async function askForSizing(
  queue: WorkQueue,
  { db }: Pick<OpenDatabase, 'db'>,
  of: { readonly office: number; readonly revision: number; readonly person: number } & (
    { readonly request: SizingRequest } | { readonly again: number }
  ),
): Promise<number | undefined> {
  const asked = await db.transaction().execute(async (within) => {
    const { office, revision, person } = of;
    const again = 'again' in of ? of.again : null;
    const latest = await findLatestJob(within, office, revision, 'size');
    if (latest && (latest.state === 'queued' || latest.state === 'running')) return undefined;
    if (again !== null && !(await updateSizingState(within, office, again, ['stopped', 'failed'], 'queued'))) return undefined;
    const sizing =
      'request' in of
        ? await insertSizing(within, office, { revision, person, request: of.request, engine: engineVersion })
        : of.again;
    await insertJob(within, office, { kind: 'size', revision, person, payload: { sizing } });
    return sizing;
  });
  if (asked !== undefined) queue.wake();
  return asked;
}

/** Stops a sizing after the chunks in hand; what frames answered is kept. False where it is not going on. */
export async function askToStopSizing(
  queue: WorkQueue,
  { db }: Pick<OpenDatabase, 'db'>,
  of: { readonly office: number; readonly revision: number; readonly sizing: number },
): Promise<boolean> {
  const job = await findLatestJob(db, of.office, of.revision, 'size');
  if (!job || job.payload['sizing'] !== of.sizing || (job.state !== 'queued' && job.state !== 'running')) return false;
  if (!queue.stopSizing(of.sizing)) {
    await finishJob(db, job.id, 'stopped');
    await updateSizingState(db, of.office, of.sizing, ['queued', 'running'], 'stopped', { reason: 'Stopped.' });
  }
  return true;
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
