import { afterEach, beforeEach, describe, expect, it } from 'vitest';
import { insertUpload } from '@/db/queries/uploads';
import { listLetters } from '@/db/queries/outbox';
import { countWaiting } from '@/db/queries/results';
import { findLatestJob } from '@/db/queries/jobs';
import { listProblems } from '@/db/queries/problems';
import { cantileverFrame } from '@/lib/results/cantilever-frame';
import { findRevisionById } from '@/db/queries/revisions';
import { askForReading, askForRun, askToStop } from './ask';
import type { Pools } from './pools';
import { WorkQueue } from './queue';
import { chunkSize } from './run-work';
import {
  cantilevers,
  pretendPools,
  readingRevision,
  readRevision,
  testDatabase,
  testOffice,
  type TestDatabase,
} from './test-office';
import { tellFailures } from './threads/failures';
import { listRun } from './threads/list-run';
import { solveChunk, type SolveTask } from './threads/solve';
import { insertIntake } from '@/db/queries/intake';
import { recordUnread, type ReadTask } from './threads/read';

let database: TestDatabase;
let logged: string[] = [];
beforeEach(async () => {
  database = await testDatabase();
  logged = [];
});
afterEach(() => database.remove());

const solving = { listRun, solveChunk, tellFailures };
function queueOf(pools: Pools, onChunk?: (chunk: { office: number; revision: number; frames: number }) => void): WorkQueue {
  const log = (message: string): number => logged.push(message);
  return new WorkQueue({ database, file: database.file, pools, log, ...(onChunk ? { onChunk } : {}) });
}
const stateOf = async (of: { office: number; revision: number }) =>
  (await findRevisionById(database.db, of.office, of.revision))!.state;

describe('runs', () => {
  it('solve every frame once and end as run', async () => {
    const of = await readRevision(database, await testOffice(database, 'North'), 2 * chunkSize + 7);
    const chunks: number[] = [];
    const queue = queueOf(pretendPools(solving), ({ frames }) => chunks.push(frames));
    expect(await askForRun(queue, database, of)).toBe(true);
    await queue.idle();
    expect(chunks).toEqual([chunkSize, chunkSize, 7]);
    expect(await stateOf(of)).toBe('run');
    expect(countWaiting(database.raw, of.revision)).toEqual({ total: 107, waiting: 0 });
    expect(await findLatestJob(database.db, of.office, of.revision, 'run')).toMatchObject({
      state: 'done',
      done: 107,
      total: 107,
    });
    const [letter, ...more] = await listLetters(database.db, of.office);
    expect(letter).toMatchObject({ kind: 'run finished', state: 'waiting' });
    expect(more).toEqual([]);
    expect(logged).toEqual([]);
  });

  it('of two offices alternate chunk by chunk, whoever asked first and for more', async () => {
    const north = await readRevision(database, await testOffice(database, 'North'), 4 * chunkSize);
    const south = await readRevision(database, await testOffice(database, 'South'), 2 * chunkSize);
    const order: number[] = [];
    const queue = queueOf(pretendPools(solving), ({ office }) => order.push(office));
    await Promise.all([askForRun(queue, database, north), askForRun(queue, database, south)]);
    await queue.idle();
    const [n, s] = [north.office, south.office];
    expect(order).toEqual([n, s, n, s, n, n]);
  });

  it('can be stopped, keep what is solved, and do only what is left when run again', async () => {
    const of = await readRevision(database, await testOffice(database, 'North'), 6 * chunkSize);
    let handedOut = 0;
    const queue: WorkQueue = queueOf(pretendPools(solving), ({ frames }) => {
      handedOut += frames;
      if (handedOut === 3 * chunkSize) void askToStop(queue, database, of);
    });
    await askForRun(queue, database, of);
    await queue.idle();
    expect(await stateOf(of)).toBe('stopped');
    const { waiting } = countWaiting(database.raw, of.revision);
    expect(waiting).toBe(6 * chunkSize - handedOut);
    expect(waiting).toBeGreaterThan(0);

    handedOut = 0;
    const again = queueOf(pretendPools(solving), ({ frames }) => (handedOut += frames));
    expect(await askForRun(again, database, of)).toBe(true);
    await again.idle();
    expect(handedOut).toBe(waiting);
    expect(await stateOf(of)).toBe('run');
  });

  it('are not queued twice, nor where there is nothing to run', async () => {
    const office = await testOffice(database, 'North');
    const of = await readRevision(database, office, 3);
    const empty = await readRevision(database, office, 0);
    const queue = queueOf(pretendPools(solving));
    expect(await askForRun(queue, database, of)).toBe(true);
    expect(await askForRun(queue, database, of)).toBe(false);
    expect(await askForRun(queue, database, empty)).toBe(false);
    await queue.idle();
  });

  it('whose chunk fails are failed, say so, and keep what is solved', async () => {
    const of = await readRevision(database, await testOffice(database, 'North'), 4 * chunkSize);
    let asked = 0;
    const broken = (task: SolveTask): unknown => {
      if (++asked === 3) throw new Error('out of order');
      return solveChunk(task);
    };
    const queue = queueOf(pretendPools({ ...solving, solveChunk: broken }));
    await askForRun(queue, database, of);
    await queue.idle();
    const revision = (await findRevisionById(database.db, of.office, of.revision))!;
    expect(revision.state).toBe('failed');
    const { total, waiting } = countWaiting(database.raw, of.revision);
    expect(total - waiting).toBeGreaterThanOrEqual(2 * chunkSize);
    expect(revision.reason).toContain(`${total - waiting} of ${total} frames are kept`);
    expect(logged).toHaveLength(1);

    const mended = queueOf(pretendPools(solving));
    expect(await askForRun(mended, database, of)).toBe(true);
    await mended.idle();
    expect(await stateOf(of)).toBe('run');
  });

  it('left unfinished by an earlier process are taken up when the next one starts', async () => {
    const of = await readRevision(database, await testOffice(database, 'North'), 3 * chunkSize);
    let handedOut = 0;
    const first: WorkQueue = queueOf(pretendPools(solving), () => {
      if (++handedOut === 1) void first.close();
    });
    await askForRun(first, database, of);
    await first.close();
    const left = countWaiting(database.raw, of.revision).waiting;
    expect(left).toBeGreaterThan(0);
    expect(await stateOf(of)).toBe('running');

    let frames = 0;
    const second = queueOf(pretendPools(solving), (chunk) => (frames += chunk.frames));
    await second.start();
    await second.idle();
    expect(frames).toBe(left);
    expect(await stateOf(of)).toBe('run');
  });

  it('of two revisions of a batch solve the frames that both have once', async () => {
    const office = await testOffice(database, 'North');
    const a = await readRevision(database, office, 2 * chunkSize);
    const b = await readRevision(database, office, 2 * chunkSize, chunkSize + 1, a.batch);
    const solved: number[] = [];
    const counting = (task: SolveTask): unknown => {
      const done = solveChunk(task);
      solved.push(...done.map((each) => each.version));
      return done;
    };
    const queue = queueOf(pretendPools({ ...solving, solveChunk: counting }));
    await Promise.all([askForRun(queue, database, a), askForRun(queue, database, b)]);
    await queue.idle();
    expect([await stateOf(a), await stateOf(b)]).toEqual(['run', 'run']);
    expect(solved).toHaveLength(3 * chunkSize);
    expect(new Set(solved).size).toBe(3 * chunkSize);
  });

  it('tell a frame that moves freely as an error, once, and solve the others', async () => {
    const office = await testOffice(database, 'North');
    const of = await readingRevision(database, office);
    const intake = cantilevers(3);
    const supports = [{ node: 0, ux: 'fixed' as const, uy: 'fixed' as const, rz: 'free' as const, angle_rad: 0 }];
    const frames = [...intake.frames, { id: 'L', frame: cantileverFrame('L', { supports }) }];
    insertIntake(database.raw, of.office, of.revision, { ...intake, frames });
    const queue = queueOf(pretendPools(solving));
    await askForRun(queue, database, of);
    await queue.idle();
    await tellFailures({ file: database.file, office: of.office, revision: of.revision });
    expect(await findRevisionById(database.db, of.office, of.revision)).toMatchObject({ state: 'run', errors: 1 });
    expect(await listProblems(database.db, of.office, of.revision)).toMatchObject([{ code: 'mechanism', frames: ['L'] }]);
  });

  it('tell how far they are while they go on', async () => {
    const of = await readRevision(database, await testOffice(database, 'North'), 3 * chunkSize);
    const queue = queueOf(pretendPools(solving));
    const seen: number[] = [];
    queue.events.on('progress', (revision) => seen.push(queue.progress(revision).done));
    await askForRun(queue, database, of);
    await queue.idle();
    expect(seen.slice(0, 3)).toEqual([chunkSize, 2 * chunkSize, 3 * chunkSize]);
    expect(queue.progress(of.revision)).toMatchObject({ state: null, total: 3 * chunkSize, done: 3 * chunkSize });
  });
});

describe('readings', () => {
  const bring = async (office: string) => {
    const of = await readingRevision(database, await testOffice(database, office));
    const bytes = Buffer.from('frame,node');
    const { revision, person } = of;
    await insertUpload(database.db, of.office, {
      revision,
      name: 'a.csv',
      size: bytes.length,
      sha256: 'a'.repeat(64),
      bytes,
      person,
    });
    return of;
  };

  it('store what was read', async () => {
    const of = await bring('North');
    const readRevision = ({ office, revision }: ReadTask): unknown =>
      insertIntake(database.raw, office, revision, cantilevers(4));
    const queue = queueOf(pretendPools({ readRevision }));
    await askForReading(queue, database, of);
    await queue.idle();
    expect(await findRevisionById(database.db, of.office, of.revision)).toMatchObject({ state: 'read', frames: 4 });
  });

  it.each([
    ['memory', Object.assign(new Error('heap'), { code: 'ERR_WORKER_OUT_OF_MEMORY' }), 'too-large', /more than 400 MB of memory/],
    ['time', Object.assign(new Error('late'), { name: 'AbortError' }), 'unreadable', /given up after 150 s/],
  ])('that run out of %s end as read, with a problem that says so', async (_what, error, code, message) => {
    const of = await bring('North');
    const queue = queueOf(pretendPools({ readRevision: () => Promise.reject(error), recordUnread }));
    await askForReading(queue, database, of);
    await queue.idle();
    expect(await stateOf(of)).toBe('read');
    const problems = await listProblems(database.db, of.office, of.revision);
    expect(problems).toMatchObject([{ severity: 'error', code, file: 'a.csv', stopsAll: true }]);
    expect(problems[0]!.message).toMatch(message);
  });

  it('that meet a fault of the program end as failed, and the next one is read all the same', async () => {
    const [first, second] = [await bring('North'), await bring('South')];
    const readRevision = ({ office, revision }: ReadTask): unknown => {
      if (revision === first.revision) throw new TypeError('a fault');
      return insertIntake(database.raw, office, revision, cantilevers(2));
    };
    const queue = queueOf(pretendPools({ readRevision }));
    await askForReading(queue, database, first);
    await askForReading(queue, database, second);
    await queue.idle();
    expect([await stateOf(first), await stateOf(second)]).toEqual(['failed', 'read']);
    expect(logged).toEqual(['reading failed']);
  });

  it('that no job will take up, their upload cut short, are failed at the start', async () => {
    const of = await bring('North');
    const queue = queueOf(pretendPools({}));
    await queue.start();
    expect(await stateOf(of)).toBe('failed');
  });
});
