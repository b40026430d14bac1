/** Reading of a revision's files in a thread with a time and a memory limit; what goes wrong ends as a problem, not a fault. */
import { finishJob, leaseJob, type JobRecord } from '@/db/queries/jobs';
import { updateRevisionState } from '@/db/queries/revisions';
import { readHeap } from './pools';
import type { QueueOptions } from './queue';
import type { ReadTask, UnreadTask } from './threads/read';

export interface ReadingLimits {
  /** After this time reading is given up: the thread looks at the clock. */
  readonly deadline_s: number;
  /** A thread that does not look at the clock for so much longer, being busy elsewhere, is ended. */
  readonly grace_s: number;
}

const readingLimits: ReadingLimits = { deadline_s: 120, grace_s: 30 };

/**
 * Reads one revision. Its state afterwards is "read", with whatever problems were found, or "failed" where the program
 * itself is at fault.
 */
export async function readOneRevision(
  { database, pools, file, log }: QueueOptions,
  job: JobRecord,
  { deadline_s, grace_s }: ReadingLimits = readingLimits,
): Promise<void> {
  const { db } = database;
  const { office, revision } = job;
  const until = new Date(Date.now() + 2000 * (deadline_s + grace_s)).toISOString();
  if (revision === null || !(await leaseJob(db, { owner: `${process.pid}`, until, job: job.id }))) return;
  const task: ReadTask = { file, office, revision, deadline_s };
  try {
    const signal = AbortSignal.timeout(Math.ceil((deadline_s + grace_s) * 1000));
    await pools.read.run(task, { filename: pools.bundle('read'), name: 'readRevision', signal });
  } catch (error) {
    const why = gaveUp(error, deadline_s + grace_s);
    const unread: UnreadTask | null = why && { file, office, revision, why };
    const recorded = unread && pools.read.run(unread, { filename: pools.bundle('read'), name: 'recordUnread' });
    const fault: unknown =
      recorded === null
        ? error
        : await recorded.then(
            () => null,
            (second: unknown) => second,
          );
    if (fault !== null) {
      log('reading failed', { error: fault, revision, job: job.id });
      const reason = 'The files could not be read through a fault of the program, which was logged. They are kept.';
      await updateRevisionState(db, office, revision, ['reading'], 'failed', { reason });
      await finishJob(db, job.id, 'failed', reason);
      return;
    }
  }
  await finishJob(db, job.id, 'done');
}

function gaveUp(error: unknown, after_s: number): { code: 'unreadable' | 'too-large'; message: string } | null {
  if (!(error instanceof Error)) return null;
  if ('code' in error && error.code === 'ERR_WORKER_OUT_OF_MEMORY') {
    const message = `Reading needs more than ${readHeap} of memory. Split the batch into smaller files, and leave out sheets that are not needed.`;
    return { code: 'too-large', message };
  }
  if (error.name === 'AbortError' || error.name === 'TimeoutError') {
    const message = `Reading was given up after ${after_s} s. Save the file again without formats and unneeded sheets, or split the batch.`;
    return { code: 'unreadable', message };
  }
  return null;
}
