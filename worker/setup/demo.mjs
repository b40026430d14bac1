/** `npm run demo`: install, build, migrate, seed an invented office, serve, and say where and how to sign in. */
import { createHash } from 'node:crypto';
import { existsSync, mkdirSync, readFileSync, readdirSync, statSync, writeFileSync } from 'node:fs';
import { join } from 'node:path';
import { prepareMachine, run } from './machine.mjs';

const root = new URL('../..', import.meta.url).pathname;
const sources = ['app', 'components', 'lib', 'worker', 'db', 'samples', 'package-lock.json', 'next.config.mjs', 'tailwind.config.ts', 'proxy.ts', 'instrumentation.ts']; // prettier-ignore
const stamp = join(root, '.next', 'tallyframe-built');

/** Digest of every source file's path, size and time: changes whenever a build is stale. */
function fingerprint() {
  const hash = createHash('sha256');
  const visit = (path) => {
    if (!existsSync(path)) return;
    const info = statSync(path);
    if (info.isDirectory()) for (const name of readdirSync(path).sort()) visit(join(path, name));
    else hash.update(`${path} ${info.size} ${info.mtimeMs}\n`);
  };
  for (const each of sources) visit(join(root, each));
  return hash.digest('hex');
}

prepareMachine({ browser: false });
process.env.NEXT_TELEMETRY_DISABLED = '1';
const now = fingerprint();
if (!existsSync(stamp) || readFileSync(stamp, 'utf8') !== now) {
  run('npm', ['run', '--silent', 'build']);
  mkdirSync(join(root, '.next'), { recursive: true });
  writeFileSync(stamp, now);
}
run(process.execPath, ['worker/seed.mjs']);
run(process.execPath, ['worker/start.mjs']);
