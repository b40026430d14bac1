/**
 * Where the time of the whole chain goes: CPU seconds by stage for 1,000 portals, warm. What a stage of the chain does in one go is
 * measured in parts beside it: reading and validating, and of what the threads do solving, recovery, checks; storing is the rest.
 */
import { mkdtempSync, rmSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { createAnalyser } from '@/lib/analysis/analyser';
import { buildTopology } from '@/lib/analysis/topology';
import { readFiles } from '@/lib/intake/files/read-files';
import { readInput } from '@/lib/intake/read-input';
import { evaluateFrame } from '@/lib/results/evaluate';
import { secondSample } from '@/lib/results/second-sample';
import { portalWorkbook } from './portals';
import { cpuSeconds } from './rounds';
import { engineSolver } from './solve';
import { storedChain, type StageSeconds } from './stored-chain';

/** CPU seconds of work done a second time, so that it is warm. */
async function warm<T>(work: () => Promise<T> | T): Promise<readonly [T, number]> {
  await work();
  const before = cpuSeconds();
  const done = await work();
  return [done, cpuSeconds() - before];
}

async function inParts(bytes: Uint8Array): Promise<StageSeconds> {
  const [raw, read] = await warm(() => readFiles([{ name: 'portals.xlsx', bytes }], {}));
  const [intake, validate] = await warm(() => readInput(raw));
  const frames = intake.frames.flatMap(({ frame }) => frame ?? []);
  const [first] = frames;
  if (!first) throw new Error('Expected portals');
  const analyser = createAnalyser();
  const engine = engineSolver(buildTopology(first), first.cases.length);
  const sample = secondSample(frames.map(({ id }) => id));
  const second = (id: string): boolean => sample.has(id);
  const [, solve] = await warm(() => frames.forEach((frame) => engine(frame)));
  const analyse = (seconds: boolean) => (): void =>
    frames.forEach((frame) => analyser.analyse(frame, { second: seconds && second(frame.id), settings: intake.settings }));
  const [, alone] = await warm(analyse(false));
  const [, certified] = await warm(analyse(true));
  const [, evaluated] = await warm(() =>
    frames.forEach((frame) => evaluateFrame(analyser, frame, intake.settings, { second: second(frame.id), all: false })),
  );
  return {
    read,
    validate,
    solve,
    'recover (with α_cr, certificate)': alone - solve,
    'second analysis (a sample)': certified - alone,
    'check (with lines)': evaluated - certified,
  };
}

export async function profileChain(): Promise<void> {
  const bytes = await portalWorkbook(1000);
  const folder = mkdtempSync(join(tmpdir(), 'tallyframe-profile-'));
  try {
    await storedChain(bytes, folder, false);
    const whole: StageSeconds = {};
    await storedChain(bytes, folder, false, whole);
    const parts = await inParts(bytes);
    const done = (parts['solve'] ?? 0) + (parts['recover (with α_cr, certificate)'] ?? 0) + (parts['second analysis (a sample)'] ?? 0) + (parts['check (with lines)'] ?? 0); // prettier-ignore
    const store = (whole['store the input'] ?? 0) + Math.max(0, (whole['solve, recover, check, store'] ?? 0) - done);
    const stages: StageSeconds = { ...parts, 'store (with extremes)': store, write: whole['write'] ?? 0 };
    const total = Object.values(stages).reduce((sum, each) => sum + each, 0);
    for (const [stage, seconds] of Object.entries(stages)) {
      console.log(`  ${stage.padEnd(34)} ${seconds.toFixed(2)} s  ${((100 * seconds) / total).toFixed(1).padStart(5)} %`);
    }
  } finally {
    rmSync(folder, { recursive: true, force: true });
  }
}
