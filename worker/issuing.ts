/** One issue in the queue: its files made in a thread, then handed over. */
import { failIssue, handOverIssue } from '@/db/queries/issue-making';
import { findIssue } from '@/db/queries/issues';
import { finishJob, leaseJob, type JobRecord } from '@/db/queries/jobs';
import type { QueueOptions } from './queue';
import type { MakeIssueTask } from './threads/make-issue';
import type { RetestTask } from './threads/retest-issue';

const lease_ms = 30 * 60_000;

/**
 * Makes an issue's files and hands it over. Killed at whatever moment it is begun again by the next start: whole files stay, and
 * what was handed over is not handed over twice. A fault leaves the revision checked, to be issued anew.
 */
export async function makeOneIssue({ database, pools, file, log }: QueueOptions, job: JobRecord): Promise<void> {
  const { db } = database;
  const { office, payload } = job;
  const issue = Number(payload['issue']);
  const until = new Date(Date.now() + lease_ms).toISOString();
  if (!(await leaseJob(db, { owner: `${process.pid}`, until, job: job.id }))) return;
  try {
    // Handed over before the process that did it could note the end of its job: nothing is left to do.
    if ((await findIssue(db, office, issue))?.state === 'making') {
      const task: MakeIssueTask = { file, office, issue, job: job.id };
      await pools.write.run(task, { filename: pools.bundle('write'), name: 'makeIssue' });
      await handOverIssue(db, office, issue);
    }
  } catch (error) {
    log('an issue could not be made', { error, issue, job: job.id });
    const why = 'The files could not be made through a fault of the program, which was logged. Nobody was told; issue it again.';
    await failIssue(db, office, issue, why);
    await finishJob(db, job.id, 'failed', why);
    return;
  }
  await finishJob(db, job.id, 'done');
}

/** Tests whether the present engine gives what was issued; begun again after a kill, since nothing but its outcome is kept. */
export async function retestOneIssue({ database, pools, file, log }: QueueOptions, job: JobRecord): Promise<void> {
  const { db } = database;
  const { office, payload, person } = job;
  const until = new Date(Date.now() + lease_ms).toISOString();
  if (!(await leaseJob(db, { owner: `${process.pid}`, until, job: job.id }))) return;
  const issue = Number(payload['issue']);
  try {
    const task: RetestTask = { file, office, issue, person: person ?? 0, job: job.id };
    await pools.write.run(task, { filename: pools.bundle('write'), name: 'retestIssue' });
  } catch (error) {
    log('an issue could not be tested', { error, issue, job: job.id });
    await finishJob(db, job.id, 'failed', 'The test could not be made through a fault of the program, which was logged.');
    return;
  }
  await finishJob(db, job.id, 'done');
}
