/**
 * `npm test`: installs what is missing, then formatting, lint, types, unused code, build, and all tests.
 * Ends with a line "N passed, N failed" that counts each of these steps and each test.
 */
import { spawnSync } from 'node:child_process';
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

function count(ok) {
  if (ok) passed += 1;
  else failed += 1;
}

/** Runs some vitest projects; each test counts by itself, a run that ended before reporting counts as one failure. */
function vitest(title, projects) {
  const report = join(scratch, `${projects[0]}.json`);
  const args = [
    'run',
    ...projects.flatMap((name) => ['--project', name]),
    '--reporter=default',
    '--reporter=json',
    `--outputFile.json=${report}`,
  ];
  const ok = step(title, bin('vitest'), args);
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
count(step('formatting', bin('prettier'), ['--check', '--log-level=warn', '.']));
count(step('lint', bin('eslint'), ['.', '--max-warnings=0']));
count(step('route types', bin('next'), ['typegen']) && step('types', bin('tsc'), ['--noEmit']));
count(step('unused code', bin('knip'), []));
count(step('build', 'npm', ['run', '--silent', 'build']));
vitest('unit and published-value tests', ['node', 'dom']);
vitest('integration tests', ['integration']);
vitest('browser tests', ['browser']);
rmSync(scratch, { recursive: true, force: true });
console.log(`\n${passed} passed, ${failed} failed`);
process.exit(failed === 0 ? 0 : 1);
