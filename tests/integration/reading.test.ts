import { spawnSync } from 'node:child_process';
import { readFileSync } from 'node:fs';
import { join } from 'node:path';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { findLatestJob, insertJob } from '@/db/queries/jobs';
import { listProblems } from '@/db/queries/problems';
import { findRevisionById } from '@/db/queries/revisions';
import { insertUpload } from '@/db/queries/uploads';
import { createPools, type Pools } from '@/worker/pools';
import { readOneRevision, type ReadingLimits } from '@/worker/reading';
import { readingRevision, testDatabase, testOffice, type TestDatabase, type TestOffice } from '@/worker/test-office';
import { sha256 } from './sha256';

const root = new URL('../..', import.meta.url).pathname;
let database: TestDatabase;
let office: TestOffice;
let pools: Pools;
beforeAll(async () => {
  spawnSync(process.execPath, ['worker/build.mjs'], { cwd: root, stdio: 'inherit' });
  database = await testDatabase();
  office = await testOffice(database, 'North');
  pools = createPools(join(root, 'dist-worker'));
});
afterAll(async () => {
  await pools.close();
  await database.remove();
});

/** Brings a sample in and has it read in a thread. */
async function read(name: string, limits?: ReadingLimits) {
  const { revision, person } = await readingRevision(database, office);
  const bytes = readFileSync(join(root, 'samples', name));
  const upload = { revision, name, size: bytes.length, sha256: sha256(bytes), bytes, person };
  await insertUpload(database.db, office.office, upload);
  await insertJob(database.db, office.office, { kind: 'read', revision, person });
  const job = (await findLatestJob(database.db, office.office, revision, 'read'))!;
  const faults: unknown[] = [];
  const log = (_: string, facts: Readonly<Record<string, unknown>>): number => faults.push(facts['error']);
  await readOneRevision({ database, file: database.file, pools, log }, job, limits);
  return {
    faults,
    revision: await findRevisionById(database.db, office.office, revision),
    problems: await listProblems(database.db, office.office, revision),
    job: await findLatestJob(database.db, office.office, revision, 'read'),
  };
}

describe('reading in a thread', () => {
  it('stops itself at its deadline, with a problem that names it', async () => {
    const late = await read('portal-sheds-1000.xlsx', { deadline_s: 0.001, grace_s: 60 });
    expect(late.faults).toEqual([]);
    expect(late.revision).toMatchObject({ state: 'read', frames: 0 });
    expect(late.problems.filter(({ severity }) => severity === 'error')).toMatchObject([{ code: 'too-large', stopsAll: true }]);
    expect(late.problems[0]?.message).toContain('given up after 0.001 s');
    expect(late.job?.state).toBe('done');
  });

  it('is ended where it does not stop itself, with a problem that says so, and the next file is read', async () => {
    const late = await read('portal-sheds-1000.xlsx', { deadline_s: 0.1, grace_s: 0.05 });
    expect(late.faults).toEqual([]);
    expect(late.revision).toMatchObject({ state: 'read', frames: 0, errors: 1 });
    expect(late.problems).toMatchObject([{ severity: 'error', stopsAll: true }]);
    expect(late.job?.state).toBe('done');

    const next = await read('pipe-rack-12.xlsx');
    expect(next.revision).toMatchObject({ state: 'read', frames: 12, framesStopped: 0 });
  });

  it('of a file that is none ends as read, with its problem', async () => {
    const { revision, problems } = await read('problems/unreadable.xlsx');
    expect(revision).toMatchObject({ state: 'read', frames: 0 });
    expect(problems.map((problem) => problem.code)).toEqual(['unreadable']);
  });
});
