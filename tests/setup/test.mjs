/**
 * `npm test`: installs what is missing, then formatting, lint, types, unused code, build, and all tests.
 * Ends with a line "N passed, N failed" that counts each of these steps and each test.
 */
import { spawn, spawnSync } from 'node:child_process';
import { mkdtempSync, readFileSync, rmSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { prepareMachine } from '../../worker/setup/machine.mjs';

const root = new URL('../..', import.meta.url).pathname;
const bin = (name) => join(root, 'node_modules', '.bin', name);
const env = { ...process.env, NEXT_TELEMETRY_DISABLED: '1' };
const scratch = mkdtempSync(join(tmpdir(), 'tallyframe-test-'));
let passed = 0;
let failed = 0;

function step(title, program, args) {
  const began = Date.now();
  console.log(`\n== ${title}`);
  const done = spawnSync(program, args, { cwd: root, stdio: 'inherit', env });
  const ok = done.status === 0;
  console.log(`== ${title}: ${ok ? 'passed' : 'FAILED'} in ${Math.round((Date.now() - began) / 1000)} s`);
  return ok;
}

/** Like step, beside others: what it prints is shown when it has ended. */
function stepBeside(title, program, args) {
  const began = Date.now();
  return new Promise((resolve) => {
    const child = spawn(program, args, { cwd: root, stdio: ['ignore', 'pipe', 'pipe'], env });
    const printed = [];
    for (const stream of [child.stdout, child.stderr]) stream.on('data', (piece) => printed.push(piece));
    const end = (ok, words) => {
      console.log(`\n== ${title}\n${Buffer.concat(printed).toString('utf8')}${words}`);
      console.log(`== ${title}: ${ok ? 'passed' : 'FAILED'} in ${Math.round((Date.now() - began) / 1000)} s`);
      resolve(ok);
    };
    child.once('error', (error) => end(false, `${error.message}\n`));
    child.once('close', (status) => end(status === 0, ''));
  });
}

function count(ok) {
  if (ok) passed += 1;
  else failed += 1;
}

/** Runs some vitest projects; each test counts by itself, a run that ended before reporting counts as one failure. */
async function vitest(title, projects, how = step) {
  const report = join(scratch, `${projects[0]}.json`);
  const args = [
    'run',
    ...projects.flatMap((name) => ['--project', name]),
    '--reporter=default',
    '--reporter=json',
    `--outputFile.json=${report}`,
  ];
  const ok = await how(title, bin('vitest'), args);
  try {
    const counts = JSON.parse(readFileSync(report, 'utf8'));
    passed += counts.numPassedTests;
    failed += counts.numFailedTests;
    if (!ok && counts.numFailedTests === 0) failed += 1;
    if (counts.numTotalTests === 0) failed += 1;
  } catch {
    failed += 1;
  }
}

prepareMachine({ browser: true });
rmSync(join(root, '.next'), { recursive: true, force: true });
// Two lanes, one for each of a small machine's cores.
const lint = async () => count(await stepBeside('lint', bin('eslint'), ['.', '--max-warnings=0']));
const written = async () => {
  count(await stepBeside('formatting', bin('prettier'), ['--check', '--log-level=warn', '.']));
  count(await stepBeside('unused code', bin('knip'), []));
  const typed = await stepBeside('route types', bin('next'), ['typegen']);
  count(typed && (await stepBeside('types', bin('tsc'), ['--noEmit'])));
};
await Promise.all([lint(), written()]);
count(step('build', 'npm', ['run', '--silent', 'build']));
await vitest('unit, published-value and integration tests', ['node', 'dom', 'integration']);
// Each with a server of its own.
await Promise.all([vitest('tests over HTTP', ['web'], stepBeside), vitest('browser tests', ['browser'], stepBeside)]);
rmSync(scratch, { recursive: true, force: true });
console.log(`\n${passed} passed, ${failed} failed`);
process.exit(failed === 0 ? 0 : 1);
