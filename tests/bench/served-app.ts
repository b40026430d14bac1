/** The built application as `npm start` serves it, with a database of its own, and what its process costs. */
import { spawn, type ChildProcess } from 'node:child_process';
import { existsSync, mkdtempSync, readFileSync, rmSync } from 'node:fs';
import { createServer } from 'node:net';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { fillOffices, type TestPeople } from '@/tests/setup/people';

export interface ServedApp {
  readonly url: string;
  readonly people: TestPeople;
  /** The process that serves; `npm start` is its parent. */
  readonly pid: number;
  readonly close: () => Promise<void>;
}

/** @throws {Error} where there is no build, or it does not answer */
export async function serveApp(): Promise<ServedApp> {
  if (!existsSync(join('.next', 'BUILD_ID'))) throw new Error('There is no build to measure. Run `npm run build` first.');
  const dataDir = mkdtempSync(join(tmpdir(), 'tallyframe-bench-'));
  const people = await fillOffices(dataDir);
  const port = await freePort();
  const url = `http://localhost:${port}`;
  const env = { ...process.env, PORT: String(port), DATA_DIR: dataDir, NEXTAUTH_URL: url, LOG_LEVEL: 'warn', TRUST_PROXY: '1' };
  const child = spawn(process.execPath, ['worker/start.mjs'], { stdio: ['ignore', 'ignore', 'inherit'], env });
  // A bench that is broken off takes its server along.
  for (const signal of ['SIGINT', 'SIGTERM'] as const)
    process.once(signal, () => {
      child.kill('SIGTERM');
      process.exit(1);
    });
  const close = async (): Promise<void> => {
    const ended = new Promise((resolve) => child.once('exit', resolve));
    if (child.exitCode === null && child.kill('SIGTERM')) await ended;
    rmSync(dataDir, { recursive: true, force: true });
  };
  try {
    await answers(url, child);
    return { url, people, pid: servingProcess(child.pid ?? 0), close };
  } catch (fault) {
    await close();
    throw fault;
  }
}

async function answers(url: string, child: ChildProcess): Promise<void> {
  for (let tries = 0; tries < 240; tries += 1) {
    if (child.exitCode !== null) throw new Error(`The server ended with ${child.exitCode} before it answered`);
    const answer = await fetch(`${url}/api/ping`).catch(() => null);
    if (answer?.ok) return;
    await new Promise((resolve) => setTimeout(resolve, 250));
  }
  throw new Error('The server did not answer within a minute');
}

function freePort(): Promise<number> {
  return new Promise((resolve, reject) => {
    const probe = createServer();
    probe.once('error', reject);
    probe.listen(0, () => {
      const address = probe.address();
      probe.close(() => (typeof address === 'object' && address ? resolve(address.port) : reject(new Error('No free port'))));
    });
  });
}

/** The process below the starter that serves; a bundler that the starter called may stand beside it. */
function servingProcess(starter: number): number {
  const children = readFileSync(`/proc/${starter}/task/${starter}/children`, 'utf8').trim().split(' ');
  const serving = children.find((child) => readFileSync(`/proc/${child}/cmdline`, 'utf8').includes('next'));
  if (serving === undefined) throw new Error('Expected npm start to have a process that serves');
  return Number(serving);
}

/** Memory of a process that is resident now, MB. Linux only. */
export function residentMB(pid: number): number {
  return Number(/^VmRSS:\s+(\d+)/m.exec(readFileSync(`/proc/${pid}/status`, 'utf8'))?.[1] ?? NaN) / 1024;
}

/** Samples the resident memory until it is asked for the largest. */
export class MemoryWatch {
  private largest = 0;
  private readonly timer;

  constructor(private readonly pid: number) {
    this.timer = setInterval(() => this.look(), 200);
  }

  /** The largest since the last time it was asked, MB. */
  most(): number {
    this.look();
    const most = this.largest;
    this.largest = 0;
    return most;
  }

  close(): void {
    clearInterval(this.timer);
  }

  private look(): void {
    this.largest = Math.max(this.largest, residentMB(this.pid));
  }
}
