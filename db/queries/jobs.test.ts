import { expect, it } from 'vitest';
import {
  findLatestJob,
  finishJob,
  getJob,
  insertJob,
  leaseJob,
  listUnfinishedJobs,
  requeueJobs,
  updateJobLease,
  updateJobProgress,
} from '@/db/queries/jobs';
import { insertRevision } from '@/db/queries/revisions';
import { newDatabase } from '@/db/testing/database';
import { office } from '@/db/testing/sample';

const until = '2099-01-01T00:00:00.000Z';

async function twoRuns() {
  const { db } = await newDatabase();
  const own = await office(db, 'Northlight');
  const revisions = [(await insertRevision(db, own.office, own))!.id, (await insertRevision(db, own.office, own))!.id];
  const job = (revision: number) =>
    insertJob(db, own.office, { kind: 'run', revision, person: own.person, payload: { all: true } });
  return { db, own, revisions, first: (await job(revisions[0]!))!, second: (await job(revisions[1]!))!, job };
}

it('takes up the job longest queued, or the one that is named, each once', async () => {
  const { db, first, second } = await twoRuns();
  expect(await leaseJob(db, { owner: 'a', until, job: second })).toMatchObject({
    id: second,
    state: 'running',
    payload: { all: true },
  });
  expect(await leaseJob(db, { owner: 'b', until, job: second })).toBeUndefined();
  expect((await leaseJob(db, { owner: 'b', until }))?.id).toBe(first);
  expect(await leaseJob(db, { owner: 'b', until })).toBeUndefined();
});

it('has at most one run of a revision queued or running', async () => {
  const { db, revisions, first, job } = await twoRuns();
  expect(await job(revisions[0]!)).toBeUndefined();
  await leaseJob(db, { owner: 'a', until, job: first });
  expect(await job(revisions[0]!)).toBeUndefined();
  expect(await finishJob(db, first, 'stopped')).toBe(true);
  expect(await job(revisions[0]!)).toBeGreaterThan(first);
});

it('lets only its owner prolong a lease, and ends a job once', async () => {
  const { db, first } = await twoRuns();
  await leaseJob(db, { owner: 'a', until, job: first });
  expect(await updateJobLease(db, first, 'a', until)).toBe(true);
  expect(await updateJobLease(db, first, 'b', until)).toBe(false);
  await updateJobProgress(db, first, { done: 40, total: 100 });
  expect(await finishJob(db, first, 'failed', 'The disk is full')).toBe(true);
  expect(await finishJob(db, first, 'done')).toBe(false);
  expect(await getJob(db, first)).toMatchObject({ state: 'failed', error: 'The disk is full', done: 40, total: 100 });
  expect(await updateJobLease(db, first, 'a', until)).toBe(false);
});

it('puts what was running back in the queue at a start, with what was done', async () => {
  const { db, own, revisions, first, second } = await twoRuns();
  await leaseJob(db, { owner: 'a', until, job: first });
  await updateJobProgress(db, first, { done: 40, total: 100 });
  expect(await requeueJobs(db, '2030-01-01T00:00:00.000Z')).toBe(0);
  expect(await requeueJobs(db, 'any')).toBe(1);
  expect((await listUnfinishedJobs(db)).map((one) => [one.id, one.state, one.done])).toEqual([
    [first, 'queued', 40],
    [second, 'queued', 0],
  ]);
  expect((await findLatestJob(db, own.office, revisions[0]!, 'run'))?.id).toBe(first);
});
