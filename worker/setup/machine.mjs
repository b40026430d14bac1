/**
 * Makes a machine ready that has only Node, npm and apt: system packages, then node_modules.
 * Uses no dependency, since it runs before there is any.
 */
import { spawnSync } from 'node:child_process';
import { createHash } from 'node:crypto';
import { existsSync, mkdirSync, readFileSync, writeFileSync } from 'node:fs';
import { delimiter, join } from 'node:path';

const root = new URL('../..', import.meta.url).pathname;
const stamp = join(root, 'node_modules', '.tallyframe-lock');

/** What a command of ours needs from the system: the program looked for, and Debian's package that brings it. */
const compiler = [
  { program: 'python3', package: 'python3' },
  { program: 'make', package: 'make' },
  { program: 'g++', package: 'g++' },
];
const browser = [{ program: 'chromium', package: 'chromium' }];

function onPath(program) {
  return (process.env.PATH ?? '').split(delimiter).some((folder) => folder !== '' && existsSync(join(folder, program)));
}

/** Runs a program with its output shown; ends this process with a sentence where it fails. */
export function run(program, args, options = {}) {
  const done = spawnSync(program, args, { cwd: root, stdio: 'inherit', ...options });
  if (done.error) stop(`${program} could not be started: ${done.error.message}.`);
  if (done.status !== 0)
    stop(`\`${program} ${args.join(' ')}\` ended with status ${done.status ?? done.signal}. The lines above say why.`);
}

export function stop(sentence) {
  console.error(`\n${sentence}`);
  process.exit(1);
}

function ensurePackages(needed) {
  const missing = needed.filter(({ program }) => !onPath(program)).map((each) => each.package);
  if (missing.length === 0) return;
  const isRoot = process.getuid?.() === 0;
  if (!isRoot || !onPath('apt-get')) {
    stop(`This machine lacks ${missing.join(', ')}. Install them first, for example: sudo apt-get install ${missing.join(' ')}`);
  }
  console.log(`Installing ${missing.join(', ')} with apt …`);
  const env = { ...process.env, DEBIAN_FRONTEND: 'noninteractive' };
  run('apt-get', ['update', '-qq'], { env });
  run('apt-get', ['install', '-y', '-qq', '--no-install-recommends', ...missing], {
    env,
    stdio: ['ignore', 'ignore', 'inherit'],
  });
}

function ensureModules() {
  const lock = createHash('sha256').update(readFileSync(join(root, 'package-lock.json'))).digest('hex'); // prettier-ignore
  if (existsSync(stamp) && readFileSync(stamp, 'utf8') === lock) return;
  console.log('Installing the packages of package-lock.json (better-sqlite3 is compiled: a minute or two) …');
  run('npm', ['ci', '--no-fund', '--no-audit', '--loglevel=error']);
  mkdirSync(join(root, 'node_modules'), { recursive: true });
  writeFileSync(stamp, lock);
}

/** @param {{ browser: boolean }} wanted whether Chromium is needed too (browser tests) */
export function prepareMachine(wanted) {
  const [major = 0] = process.versions.node.split('.').map(Number);
  if (major < 20 || major > 22) stop(`Tallyframe runs on Node 20 to 22; this is ${process.versions.node}.`);
  ensurePackages(wanted.browser ? [...compiler, ...browser] : compiler);
  ensureModules();
}
