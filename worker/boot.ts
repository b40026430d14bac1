/** Starts the server's work: called once from instrumentation.ts, and safe to be called again. */
import 'server-only';
import path from 'node:path';
import { databaseFile, db, raw } from '@/db/client';
import { migrate } from '@/db/migrate';
import type { OpenDatabase } from '@/db/open';
import { log } from './log';
import { isMailHosted, serviceOf } from './mail/service-of';
import { MailPump } from './mail/pump';
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
    await startMail();
  })());
}

async function startMail(): Promise<void> {
  const { env } = process;
  const service = await serviceOf(env, path.dirname(databaseFile()));
  if (!isMailHosted(env)) log('letters are kept on this machine and reach nobody: MAIL_KEY is not set', {});
  // Links lead to where people sign in; both are checked or set before the server starts.
  const site = (env['NEXTAUTH_URL'] ?? 'http://localhost:3000').replace(/\/+$/, '');
  new MailPump({ db: db(), service, site, secret: env['NEXTAUTH_SECRET'] ?? '', log }).start();
}
