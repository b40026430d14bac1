/** Reading of a revision's files in a thread with a time and a memory limit; what goes wrong ends as a problem, not a fault. */
import { finishJob, leaseJob, type JobRecord } from '@/db/queries/jobs';
import { insertIntake } from '@/db/queries/intake';
import { updateRevisionState } from '@/db/queries/revisions';
import { listUploads } from '@/db/queries/uploads';
import { readHeap } from './pools';
import type { QueueOptions } from './queue';
import type { ReadTask } from './threads/read';
import { unreadIntake } from './unread-intake';

/** After this time reading is given up. */
const readingDeadline_s = 120;

/**
 * Reads one revision. Its state afterwards is "read", with whatever problems were found, or "failed" where the program
 * itself is at fault.
 */
export async function readOneRevision(
  { database, pools, file, log }: QueueOptions,
  job: JobRecord,
  deadline_s = readingDeadline_s,
): Promise<void> {
  const { db, raw } = database;
  const { office, revision } = job;
  const until = new Date(Date.now() + 2000 * deadline_s).toISOString();
  if (revision === null || !(await leaseJob(db, { owner: `${process.pid}`, until, job: job.id }))) return;
  const task: ReadTask = { file, office, revision };
  try {
    const signal = AbortSignal.timeout(deadline_s * 1000);
    await pools.read.run(task, { filename: pools.bundle('read'), name: 'readRevision', signal });
  } catch (error) {
    const why = gaveUp(error, deadline_s);
    if (!why) {
      log('reading failed', { error, revision, job: job.id });
      const reason = 'The files could not be read through a fault of the program, which was logged. They are kept.';
      await updateRevisionState(db, office, revision, ['reading'], 'failed', { reason });
      await finishJob(db, job.id, 'failed', reason);
      return;
    }
    insertIntake(raw, office, revision, unreadIntake(await listUploads(db, office, revision), why));
  }
  await finishJob(db, job.id, 'done');
}

function gaveUp(error: unknown, deadline_s: number): { code: 'unreadable' | 'too-large'; message: string } | null {
  if (!(error instanceof Error)) return null;
  if ('code' in error && error.code === 'ERR_WORKER_OUT_OF_MEMORY') {
    const message = `Reading needs more than ${readHeap} of memory. Split the batch into smaller files, and leave out sheets that are not needed.`;
    return { code: 'too-large', message };
  }
  if (error.name === 'AbortError' || error.name === 'TimeoutError') {
    const message = `Reading was given up after ${deadline_s} s. Save the file again without formats and unneeded sheets, or split the batch.`;
    return { code: 'unreadable', message };
  }
  return null;
}
