/** Starts the server's work: called once from instrumentation.ts, and safe to be called again. */
import 'server-only';
import { databaseFile, db, raw } from '@/db/client';
import { migrate } from '@/db/migrate';
import type { OpenDatabase } from '@/db/open';
import { log } from './log';
import { createPools, type Pools } from './pools';
import type { RunProgress } from './progress';
import { WorkQueue } from './queue';

interface Work {
  readonly queue: WorkQueue;
  readonly pools: Pools;
  booted?: Promise<void>;
}

/** Pages and instrumentation are separate bundles, so the one queue stands on globalThis. */
const holder = globalThis as typeof globalThis & { tallyframeWork?: Work };

/** The server's own connection, in the form that `worker/ask.ts` and the queue take. */
export const serverDatabase = (): OpenDatabase => ({ db: db(), raw: raw(), close: () => db().destroy() });

function work(): Work {
  if (holder.tallyframeWork) return holder.tallyframeWork;
  const pools = createPools();
  const queue = new WorkQueue({ database: serverDatabase(), file: databaseFile(), pools, log });
  return (holder.tallyframeWork = { queue, pools });
}

/** The server's queue; `worker/ask.ts` says what can be asked of it. */
export const queue = (): WorkQueue => work().queue;
/** The server's threads. */
export const pools = (): Pools => work().pools;

/** How far a revision's run is; `queue().events` says 'progress' when it has moved. */
export const runProgress = (revision: number): RunProgress => queue().progress(revision);

/** Brings the database up to date, then queues again what an earlier process left unfinished; the work itself keeps no request waiting. */
export function boot(): Promise<void> {
  const here = work();
  return (here.booted ??= (async () => {
    // Threads that store results write the log back into the file; here that would keep pages waiting, so only where it grew far.
    raw().pragma('wal_autocheckpoint = 64000');
    const ran = await migrate(db());
    for (const migration of ran) log('migration', { migration });
    await here.queue.start();
  })());
}
