import { sql } from 'kysely';
import { instant } from '@/db/clock';
import type { Db } from '@/db/open';
import type { JobState } from '@/db/schema';

/** Work to be done for an office: "read" a revision's sheets, "run" its frames. States here are the truth, the queue only the pump. */
export interface JobRecord {
  readonly id: number;
  readonly kind: string;
  readonly office: number;
  readonly revision: number | null;
  readonly person: number | null;
  readonly payload: Readonly<Record<string, unknown>>;
  readonly state: JobState;
  readonly total: number;
  readonly done: number;
  readonly error: string | null;
  readonly createdAt: string;
  readonly startedAt: string | null;
  readonly finishedAt: string | null;
}

/** @returns undefined where such a job of the revision is already queued or running */
export async function insertJob(
  db: Db,
  office: number,
  job: {
    readonly kind: string;
    readonly revision: number | null;
    readonly person: number | null;
    readonly payload?: Readonly<Record<string, unknown>>;
  },
): Promise<number | undefined> {
  const row = await db
    .insertInto('job')
    .values({
      kind: job.kind,
      office,
      revision: job.revision,
      person: job.person,
      payload: JSON.stringify(job.payload ?? {}),
      state: 'queued',
      created_at: instant(),
    })
    .onConflict((conflict) => conflict.doNothing())
    .returning('id')
    .executeTakeFirst();
  return row?.id;
}

/**
 * Takes a queued job for its owner until an instant, and marks it running.
 *
 * @param job take this one; else the one longest queued
 */
export async function leaseJob(
  db: Db,
  lease: { readonly owner: string; readonly until: string; readonly job?: number },
): Promise<JobRecord | undefined> {
  const row = await db
    .updateTable('job')
    .set({
      state: 'running',
      lease_by: lease.owner,
      lease_until: lease.until,
      started_at: sql<string>`coalesce(started_at, ${instant()})`,
    })
    .where('id', '=', (eb) => {
      const queued = eb.selectFrom('job').select('id').where('state', '=', 'queued');
      return (lease.job === undefined ? queued : queued.where('id', '=', lease.job)).orderBy('id').limit(1);
    })
    .returningAll()
    .executeTakeFirst();
  return row && record(row);
}

/** @returns false where the job is no longer this owner's to work on */
export async function updateJobLease(db: Db, job: number, owner: string, until: string): Promise<boolean> {
  const result = await db
    .updateTable('job')
    .set({ lease_until: until })
    .where('id', '=', job)
    .where('lease_by', '=', owner)
    .where('state', '=', 'running')
    .executeTakeFirst();
  return result.numUpdatedRows === 1n;
}

export async function updateJobProgress(
  db: Db,
  job: number,
  progress: { readonly done: number; readonly total: number },
): Promise<void> {
  await db.updateTable('job').set(progress).where('id', '=', job).execute();
}

/** Ends a queued or running job. @returns false where it had ended before */
export async function finishJob(
  db: Db,
  job: number,
  state: 'done' | 'stopped' | 'failed',
  error: string | null = null,
): Promise<boolean> {
  const result = await db
    .updateTable('job')
    .set({ state, error, finished_at: instant(), lease_by: null, lease_until: null })
    .where('id', '=', job)
    .where('state', 'in', ['queued', 'running'])
    .executeTakeFirst();
  return result.numUpdatedRows === 1n;
}

/** Puts jobs whose lease ran out (all of them, at the start of the one process) back into the queue; what they had done stays done. */
export async function requeueJobs(db: Db, leasedUntilBefore: string | 'any'): Promise<number> {
  let query = db.updateTable('job').set({ state: 'queued', lease_by: null, lease_until: null }).where('state', '=', 'running');
  if (leasedUntilBefore !== 'any') query = query.where('lease_until', '<', leasedUntilBefore);
  return Number((await query.executeTakeFirst()).numUpdatedRows);
}

/** Everything queued or running, the oldest first: what a start has to take up. */
export async function listUnfinishedJobs(db: Db): Promise<JobRecord[]> {
  const rows = await db.selectFrom('job').selectAll().where('state', 'in', ['queued', 'running']).orderBy('id').execute();
  return rows.map(record);
}

/** For the queue, which holds ids only. */
export async function getJob(db: Db, job: number): Promise<JobRecord> {
  return record(await db.selectFrom('job').selectAll().where('id', '=', job).executeTakeFirstOrThrow());
}

/** A revision's newest job of a kind. */
export async function findLatestJob(db: Db, office: number, revision: number, kind: string): Promise<JobRecord | undefined> {
  const row = await db
    .selectFrom('job')
    .selectAll()
    .where('office', '=', office)
    .where('revision', '=', revision)
    .where('kind', '=', kind)
    .orderBy('id', 'desc')
    .executeTakeFirst();
  return row && record(row);
}

interface Read {
  id: number;
  kind: string;
  office: number;
  revision: number | null;
  person: number | null;
  payload: string;
  state: JobState;
  total: number;
  done: number;
  error: string | null;
  created_at: string;
  started_at: string | null;
  finished_at: string | null;
}

function record(row: Read): JobRecord {
  const { id, kind, office, revision, person, state, total, done, error } = row;
  const payload = JSON.parse(row.payload) as JobRecord['payload'];
  return {
    id, kind, office, revision, person, payload, state, total, done, error,
    createdAt: row.created_at, startedAt: row.started_at, finishedAt: row.finished_at,
  }; // prettier-ignore
}
