/** size.240.run: two groups of 240 portals sized with thirty candidates each on average, against one run of the batch, through the queue. */
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
import { findSizing } from '@/db/queries/sizing';
import { readIntake } from '@/lib/intake/read-intake';
import { askForRun, askForSizing } from '@/worker/ask';
import type { Pools, ThreadPool } from '@/worker/pools';
import { WorkQueue } from '@/worker/queue';
import * as solve from '@/worker/threads/solve';
import { median } from './rounds';
import { portalWorkbook } from './portals';

const frames = 240;

/** Tasks run here, one after the other: what is compared is work, not threads. */
function inProcess(): Pools {
  const tasks = solve as unknown as Readonly<Record<string, (task: unknown) => unknown>>;
  const pool: ThreadPool = { run: async (task, { name }) => tasks[name]?.(task) };
  return { solve: pool, read: pool, write: pool, tables: pool, bundle: (name) => name, close: () => Promise.resolve() };
}

export async function sizeAgainstRun(rounds: number): Promise<Record<string, number>> {
  const { settings, ...intake } = await readIntake([{ name: 'portals.xlsx', bytes: await portalWorkbook(frames) }]);
  const folder = mkdtempSync(join(tmpdir(), 'tallyframe-bench-'));
  const ratios: number[] = [];
  const told: string[] = [];
  try {
    for (let round = 0; round < rounds; round += 1) {
      const file = join(folder, `${round}.sqlite`);
      const database = openDatabase(file);
      const of = await stored(database, { settings, ...intake });
      const log = (message: string, facts: unknown): never => {
        throw new Error(message, { cause: facts });
      };
      const queue = new WorkQueue({ database, file, pools: inProcess(), log });
      const timed = async (work: () => Promise<unknown>): Promise<number> => {
        const began = performance.now();
        await work();
        await queue.idle();
        return performance.now() - began;
      };
      const run = await timed(() => askForRun(queue, database, of));
      let sizing: number | undefined;
      const groups = [
        { by: 'role', name: 'rafter', range: 'IPE', minDepth_m: 0.2, maxDepth_m: 0.55 },
        { by: 'role', name: 'column', range: 'HE B', minDepth_m: null, maxDepth_m: null },
      ] as const;
      const size = await timed(async () => (sizing = await askForSizing(queue, database, { ...of, request: { groups } })));
      const found = await findSizing(database.db, of.office, of.revision, sizing ?? 0);
      const candidates = found?.found?.groups.map((group) => group.candidates.length) ?? [];
      if (found?.state !== 'done') throw new Error(`Expected the sizing to be done, got ${found?.state}: ${found?.reason}`);
      told.push(
        `run ${run.toFixed(0)} ms, size ${size.toFixed(0)} ms: ${candidates.join(' + ')} candidates, ${found.done} frames × candidates, ${found.found?.words}`,
      );
      if (candidates.reduce((sum, n) => sum + n, 0) !== 60)
        throw new Error(`Expected 60 candidates, got ${candidates.join(' and ')}`);
      ratios.push(size / run);
      await queue.close();
      await database.close();
    }
  } finally {
    rmSync(folder, { recursive: true, force: true });
  }
  console.log(told.map((line) => `  ${line}`).join('\n'));
  return { 'size.240.run': median(ratios) };
}

async function stored({ db, raw }: OpenDatabase, intake: Awaited<ReturnType<typeof readIntake>>) {
  await migrate(db);
  const office = await insertOffice(db, 'Bench');
  const own = { email: 'a@bench.example', name: 'A', role: 'analyst', passwordHash: '-' } as const;
  const person = (await insertPerson(db, office, own)) ?? 0;
  const project = (await insertProject(db, office, { name: 'P', number: null, person })) ?? 0;
  const batch = (await insertBatch(db, office, { project, name: 'B', person })) ?? 0;
  const revision = (await insertRevision(db, office, { batch, person }))?.id ?? 0;
  insertIntake(raw, office, revision, intake);
  return { office, person, revision };
}
