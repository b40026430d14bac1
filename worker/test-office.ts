/** For tests: a database with two offices, batches of cantilevers in it, and threads that are none. */
import { mkdtempSync, rmSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { migrate } from '@/db/migrate';
import { openDatabase, type OpenDatabase } from '@/db/open';
import { insertBatch } from '@/db/queries/batches';
import { insertIntake } from '@/db/queries/intake';
import { insertOffice } from '@/db/queries/offices';
import { insertPerson } from '@/db/queries/people';
import { insertProject } from '@/db/queries/projects';
import { insertRevision } from '@/db/queries/revisions';
import type { Intake } from '@/lib/intake/intake';
import { cantileverFrame } from '@/lib/results/cantilever-frame';
import type { Pools, ThreadPool } from './pools';
import { unreadIntake } from './unread-intake';

export interface TestDatabase extends OpenDatabase {
  readonly file: string;
  remove(): Promise<void>;
}

export async function testDatabase(): Promise<TestDatabase> {
  const folder = mkdtempSync(join(tmpdir(), 'tallyframe-test-'));
  const file = join(folder, 'test.sqlite');
  const database = openDatabase(file);
  await migrate(database.db);
  const remove = async (): Promise<void> => {
    await database.close();
    rmSync(folder, { recursive: true, force: true });
  };
  return { ...database, file, remove };
}

export interface TestOffice {
  readonly office: number;
  readonly person: number;
  readonly project: number;
}

export async function testOffice({ db }: OpenDatabase, name: string): Promise<TestOffice> {
  const office = await insertOffice(db, name);
  const email = `${name.toLowerCase().replaceAll(' ', '.')}@office.example`;
  const person = (await insertPerson(db, office, { email, name: 'Ana Lyst', role: 'analyst', passwordHash: 'none' }))!;
  const project = (await insertProject(db, office, { name: 'Sheds', number: null, person }))!;
  return { office, person, project };
}

/** A batch's revision in state "reading". */
export async function readingRevision({ db }: OpenDatabase, of: TestOffice, batch?: number) {
  const { office, person, project } = of;
  const inBatch = batch ?? (await insertBatch(db, office, { project, name: 'Brackets', person }))!;
  const { id: revision } = (await insertRevision(db, office, { batch: inBatch, person }))!;
  return { office, person, revision, batch: inBatch };
}

/** A revision in state "read" with as many different cantilevers; `from` numbers the first one's load. */
export async function readRevision(database: OpenDatabase, of: TestOffice, frames: number, from = 1, batch?: number) {
  const made = await readingRevision(database, of, batch);
  insertIntake(database.raw, of.office, made.revision, cantilevers(frames, from));
  return made;
}

export function cantilevers(frames: number, from = 1): Intake {
  const empty = unreadIntake([{ name: 'brackets.xlsx', sha256: '0'.repeat(64), size: 1 }], { code: 'unreadable', message: '' });
  return {
    ...empty,
    problems: [],
    frames: Array.from({ length: frames }, (_, i) => {
      const id = `F${from + i}`;
      const nodeLoads = [{ case: 1, node: 1, Fx_N: 0, Fy_N: -1000 - (from + i), Mz_Nm: 0 }];
      return { id, frame: cantileverFrame(id, { nodeLoads }) };
    }),
  };
}

/** Pools whose tasks run where they are asked for, a turn of the event loop later. */
export function pretendPools(tasks: Readonly<Record<string, (task: never, signal?: AbortSignal) => unknown>>): Pools {
  const pool: ThreadPool = {
    run: async (task, { name, signal }) => {
      await new Promise((resolve) => setImmediate(resolve));
      const work = tasks[name];
      if (!work) throw new Error(`Expected the test to say what ${name} does`);
      return work(task as never, signal);
    },
  };
  return { solve: pool, read: pool, write: pool, tables: pool, bundle: (name) => name, close: () => Promise.resolve() };
}
