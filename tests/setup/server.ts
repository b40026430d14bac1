/**
 * The built application, served once for a test project: a fresh database in a folder of its own, two offices with
 * a person of every role, and the address provided to the tests. Builds first where the build is stale.
 */
import { spawn, spawnSync, type ChildProcess } from 'node:child_process';
import { existsSync, mkdtempSync, readdirSync, rmSync, statSync } from 'node:fs';
import { createServer } from 'node:net';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { fileURLToPath } from 'node:url';
import type { TestProject } from 'vitest/node';
import { fillOffices, type TestPeople } from './people';

declare module 'vitest' {
  export interface ProvidedContext {
    readonly server: TestServer;
  }
}

export interface TestServer {
  readonly url: string;
  readonly dataDir: string;
  readonly people: TestPeople;
}

const root = fileURLToPath(new URL('../..', import.meta.url));

export default async function setup(project: TestProject): Promise<() => Promise<void>> {
  if (process.env.TEST_SERVER_AS_BUILT !== '1' && buildIsStale()) build();
  const dataDir = mkdtempSync(join(tmpdir(), 'tallyframe-server-'));
  const people = await fillOffices(dataDir);
  const port = await freePort();
  const url = `http://localhost:${port}`;
  const child = serve(port, url, dataDir);
  await answers(url, child);
  project.provide('server', { url, dataDir, people });
  return async () => {
    child.kill('SIGTERM');
    await new Promise((resolve) => child.once('exit', resolve));
    rmSync(dataDir, { recursive: true, force: true });
  };
}

function serve(port: number, url: string, dataDir: string): ChildProcess {
  return spawn(process.execPath, ['node_modules/next/dist/bin/next', 'start', '-p', String(port)], {
    cwd: root,
    stdio: ['ignore', process.env.TEST_SERVER_LOG === '1' ? 'inherit' : 'ignore', 'inherit'],
    env: {
      ...process.env,
      NODE_ENV: 'production',
      DATA_DIR: dataDir,
      NEXTAUTH_URL: url,
      NEXTAUTH_SECRET: 'only for tests, and of no use elsewhere',
      NEXT_TELEMETRY_DISABLED: '1',
      // Each signed-in test person comes from an address of its own.
      TRUST_PROXY: '1',
      TZ: 'UTC',
    },
  });
}

async function answers(url: string, child: ChildProcess): Promise<void> {
  for (let tries = 0; tries < 240; tries++) {
    if (child.exitCode !== null) throw new Error(`The server ended with ${child.exitCode} before it answered`);
    const answer = await fetch(`${url}/api/ping`).catch(() => null);
    if (answer?.ok) return;
    await new Promise((resolve) => setTimeout(resolve, 250));
  }
  child.kill();
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

function build(): void {
  const done = spawnSync('npm', ['run', '--silent', 'build'], { cwd: root, stdio: 'inherit' });
  if (done.status !== 0) throw new Error('The application could not be built');
}

/** True where the build is missing or older than anything it is made of. */
function buildIsStale(): boolean {
  const mark = join(root, '.next', 'BUILD_ID');
  if (!existsSync(mark)) return true;
  const built = statSync(mark).mtimeMs;
  const sources = [
    'app',
    'components',
    'lib',
    'worker',
    'db',
    'proxy.ts',
    'instrumentation.ts',
    'next.config.mjs',
    'package.json',
  ];
  return sources.some((name) => newest(join(root, name)) > built);
}

function newest(path: string): number {
  const info = statSync(path);
  if (!info.isDirectory()) return /\.test\.tsx?$/.test(path) ? 0 : info.mtimeMs;
  return Math.max(0, ...readdirSync(path).map((name) => newest(join(path, name))));
}
