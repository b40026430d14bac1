/** The same input gives the same bytes: on one thread or several, in whatever order, with topologies remembered or not. */
import { spawn } from 'node:child_process';
import { mkdtempSync, readFileSync, rmSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { pathToFileURL } from 'node:url';
import { Piscina } from 'piscina';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { createAnalyser } from '@/lib/analysis/analyser';
import { readIntake } from '@/lib/intake/read-intake';
import type { Frame } from '@/lib/model/frame';
import type { Settings } from '@/lib/model/settings';
import { evaluateFrame } from '@/lib/results/evaluate';
import { frameResultJson } from '@/lib/results/json';
import type { FrameEvaluation } from '@/lib/results/result';
import type { ChunkTask } from '@/worker/threads/chunk';

const root = new URL('../..', import.meta.url).pathname;
const out = mkdtempSync(join(tmpdir(), 'tallyframe-same-'));
afterAll(() => rmSync(out, { recursive: true, force: true }));

const ended = (words: readonly string[]): Promise<number | null> =>
  new Promise((resolve) =>
    spawn(process.execPath, words, { cwd: root, stdio: ['ignore', 'ignore', 'inherit'] }).on('exit', resolve),
  );

beforeAll(async () => expect(await ended(['worker/build.mjs'])).toBe(0));

/** First order; second order with imperfections; ASD with stiffness reduction and shear; slack ties. */
const samples = ['pipe-rack-12.xlsx', 'slender-sheds-24.xlsx', 'direct-analysis-us-9.xlsx', 'braced-bents-12.xlsx'] as const;

interface Input {
  readonly frames: readonly Frame[];
  readonly settings: Settings;
}
async function input(name: string): Promise<Input> {
  const intake = await readIntake([{ name, bytes: readFileSync(join(root, 'samples', name)) }]);
  return { settings: intake.settings, frames: intake.frames.flatMap(({ frame }) => (frame ? [frame] : [])) };
}

/** A frame as threads and pages get it: a copy that shares nothing with any other. */
const copied = (frame: Frame): Frame => structuredClone(frame);
const text = (frame: Frame, evaluation: FrameEvaluation): string =>
  JSON.stringify(frameResultJson(frame, evaluation, { all: true }));

/** Where two texts begin to differ, in a few words: whole results make no message. */
function same(found: string | undefined, expected: string, what: string): void {
  if (found === expected) return;
  const at = [...expected].findIndex((letter, i) => letter !== found?.[i]);
  expect(found?.slice(at - 80, at + 40), what).toBe(expected.slice(at - 80, at + 40));
  expect(found?.length, what).toBe(expected.length);
}

/** One after the other in this thread, one analyser for all. */
function here({ frames, settings }: Input): string[] {
  const analyser = createAnalyser();
  return frames.map((frame) => text(frame, evaluateFrame(analyser, copied(frame), settings, { second: true, all: true })));
}

async function overThreads({ frames, settings }: Input, threads: number, chunk: number): Promise<string[]> {
  const filename = pathToFileURL(join(root, 'dist-worker/solve.mjs')).href;
  const pool = new Piscina({ filename, name: 'evaluateChunk', minThreads: threads, maxThreads: threads });
  try {
    // from the last to the first, so that each thread meets the shapes in another order
    const order = frames.map((_, i) => frames.length - 1 - i);
    const chunks = Array.from({ length: Math.ceil(order.length / chunk) }, (_, i) => order.slice(i * chunk, (i + 1) * chunk));
    const texts: string[] = [];
    await Promise.all(
      chunks.map(async (numbers) => {
        const task: ChunkTask = { settings, all: true, frames: numbers.map((i) => ({ frame: frames[i]!, second: true })) };
        const found = (await pool.run(task)) as FrameEvaluation[];
        numbers.forEach((i, k) => (texts[i] = text(frames[i]!, found[k]!)));
      }),
    );
    return texts;
  } finally {
    await pool.destroy();
  }
}

describe.each(samples)('%s gives the same bytes', (name) => {
  it('with an analyser for each frame, from the last to the first, and beside frames of other shapes', async () => {
    const all = await input(name);
    const expected = here(all);
    expect(expected.length).toBeGreaterThan(5);
    expect(expected.some((json) => json.includes('"status":"solved"'))).toBe(true);
    all.frames.forEach((frame, i) => {
      const alone = evaluateFrame(createAnalyser(), copied(frame), all.settings, { second: true, all: true });
      same(text(frame, alone), expected[i]!, frame.id);
    });
    const others = await Promise.all(samples.map(input));
    const analyser = createAnalyser();
    for (let i = all.frames.length - 1; i >= 0; i--) {
      for (const { frames, settings } of others)
        evaluateFrame(analyser, copied(frames[i % frames.length]!), settings, { second: i % 2 === 0, all: false });
      const mixed = evaluateFrame(analyser, copied(all.frames[i]!), all.settings, { second: true, all: true });
      same(text(all.frames[i]!, mixed), expected[i]!, all.frames[i]!.id);
    }
  });

  it('on one thread, on two and on three, whatever the chunks', async () => {
    const all = await input(name);
    const expected = here(all);
    for (const [threads, chunk] of [
      [1, 50],
      [2, 4],
      [3, 1],
    ] as const) {
      const found = await overThreads(all, threads, chunk);
      expected.forEach((json, i) => same(found[i], json, `${all.frames[i]!.id} on ${threads} threads`));
    }
  });

  it('from the command line', async () => {
    const all = await input(name);
    const file = join(out, 'typed.json');
    await ended(['worker/batch.mjs', `samples/${name}`, '--json', file, '--all']);
    const { frames } = JSON.parse(readFileSync(file, 'utf8')) as { frames: unknown[] };
    const expected = here(all);
    expect(frames).toHaveLength(expected.length);
    expected.forEach((json, i) => same(JSON.stringify(frames[i]), json, all.frames[i]!.id));
  });
});
