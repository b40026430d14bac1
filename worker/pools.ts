/** The threads: two that solve, one that reads, two that write result files and two that write tables, all at lowered priority. */
import { join } from 'node:path';
import { pathToFileURL } from 'node:url';
import type { MessagePort } from 'node:worker_threads';
import { Piscina } from 'piscina';

/** Added to the threads' nice value, so that pages answer during a run as they do at rest. */
const niceIncrement = 10;
/** Bounds on a thread's heap, MB: a hostile file or a runaway frame ends its thread, never the server. */
const solveHeap_MB = 512;
const readHeap_MB = 400;
const writeHeap_MB = 512;
const tableHeap_MB = 256;

/** What of a pool is used: a function of a bundle, run in a thread. */
export interface ThreadPool {
  run(
    task: unknown,
    call: {
      readonly filename: string;
      readonly name: string;
      readonly signal?: AbortSignal;
      readonly transferList?: (MessagePort | ArrayBuffer)[];
    },
  ): Promise<unknown>;
}

export interface Pools {
  readonly solve: ThreadPool;
  readonly read: ThreadPool;
  readonly write: ThreadPool;
  readonly tables: ThreadPool;
  /** Address of a bundle of dist-worker. */
  readonly bundle: (name: 'read' | 'solve' | 'write') => string;
  close(): Promise<void>;
}

/** @param folder where the bundles are; dist-worker of the folder the server was started in if not given */
export function createPools(folder = join(/* turbopackIgnore: true */ process.cwd(), 'dist-worker')): Pools {
  // A living thread keeps the code it has loaded: in development none is kept longer than its task.
  const idleTimeout = process.env.NODE_ENV === 'development' ? 0 : 30_000;
  const solve = new Piscina({
    minThreads: 0,
    maxThreads: 2,
    niceIncrement,
    idleTimeout,
    resourceLimits: { maxOldGenerationSizeMb: solveHeap_MB },
  });
  const read = new Piscina({
    minThreads: 0,
    maxThreads: 1,
    niceIncrement,
    idleTimeout: 0,
    resourceLimits: { maxOldGenerationSizeMb: readHeap_MB },
  });
  const write = new Piscina({
    minThreads: 0,
    maxThreads: 2,
    niceIncrement,
    idleTimeout,
    resourceLimits: { maxOldGenerationSizeMb: writeHeap_MB },
  });
  const tables = new Piscina({
    minThreads: 0,
    maxThreads: 2,
    niceIncrement,
    idleTimeout,
    resourceLimits: { maxOldGenerationSizeMb: tableHeap_MB },
  });
  return {
    solve,
    read,
    write,
    tables,
    bundle: (name) => pathToFileURL(join(/* turbopackIgnore: true */ folder, `${name}.mjs`)).href,
    close: async () => {
      await Promise.all([solve, read, write, tables].map((pool) => pool.destroy()));
    },
  };
}

export const readHeap = `${readHeap_MB} MB`;
