/** Evaluates every frame of an intake, over threads where that pays, and offers the results to the writers. */
import { Piscina } from 'piscina';
import { setImmediate as breathe } from 'node:timers/promises';
import { deserialize, serialize } from 'node:v8';
import type { Intake } from '@/lib/intake/intake';
import { engineVersion } from '@/lib/analysis/engine-version';
import { problemsWithFailures, type FrameFailure } from '@/lib/results/failure-problem';
import type { ReportFrame, ReportSource } from '@/lib/reports/workbook/report-source';
import type { FrameEvaluation } from '@/lib/results/result';
import { frameHash } from '@/lib/results/frame-hash';
import { secondSample } from '@/lib/results/second-sample';
import { evaluateChunk, type ChunkTask } from '@/worker/threads/chunk';
import { Spool } from './spool';

/** Frames of one chunk, and the number from which a second thread pays for its start. */
const chunkSize = 50;
const worthThreads = 200;
/** Bytes, about, of results kept at hand; beyond it they go through a temporary file. */
const mostInMemory = 96e6;

export interface EvaluatedBatch extends ReportSource {
  readonly frameCount: number;
  readonly solved: number;
  /** Removes what the batch keeps on disk. */
  close(): void;
}

export async function evaluateBatch(
  intake: Intake,
  options: { readonly all: boolean; readonly onDone?: (frames: number) => void },
): Promise<EvaluatedBatch> {
  const runnable = intake.frames.flatMap(({ frame }, index) =>
    frame ? [{ index, frame, hash: frameHash(frame, intake.settings) }] : [],
  );
  const second = secondSample(runnable.map((each) => each.hash));
  const spool = new Spool();
  const failures = new Map<number, FrameFailure>();
  const held = new Map<number, FrameEvaluation>();
  let kept = 0;
  let done = 0;
  let solved = 0;

  const chunks = Array.from({ length: Math.ceil(runnable.length / chunkSize) }, (_, i) =>
    runnable.slice(i * chunkSize, (i + 1) * chunkSize),
  );
  const keep = (chunk: (typeof chunks)[number], results: readonly FrameEvaluation[]): void => {
    chunk.forEach(({ index, frame }, i) => {
      const evaluation = results[i]!;
      if (evaluation.failure) failures.set(index, { frame: frame.id, failure: evaluation.failure });
      if (evaluation.status === 'solved') solved++;
      kept += sizeOf(evaluation);
      if (kept <= mostInMemory) held.set(index, evaluation);
      else spool.put(index, serialize(evaluation));
    });
    done += chunk.length;
    options.onDone?.(done);
  };
  const task = (chunk: (typeof chunks)[number]): ChunkTask => ({
    settings: intake.settings,
    all: options.all,
    frames: chunk.map(({ frame, hash }) => ({ frame, second: second.has(hash) })),
  });

  if (runnable.length < worthThreads) {
    for (const chunk of chunks) {
      keep(chunk, evaluateChunk(task(chunk)));
      await breathe();
    }
  } else {
    const filename = new URL('./solve.mjs', import.meta.url).href;
    const pool = new Piscina({ filename, name: 'evaluateChunk', minThreads: 2, maxThreads: 2 });
    const waiting = chunks.values();
    const lane = async (): Promise<void> => {
      for (const chunk of waiting) keep(chunk, (await pool.run(task(chunk))) as FrameEvaluation[]);
    };
    try {
      await Promise.all([lane(), lane(), lane()]);
    } finally {
      await pool.destroy();
    }
  }

  const inOrder = [...failures].sort(([a], [b]) => a - b).map(([, failure]) => failure);
  const nobody = { project: null, batch: null, revision: null, state: null, prepared: null, checked: null, issued: null };
  return {
    title: nobody,
    engine: engineVersion,
    input: intake.input,
    settings: intake.settings,
    origins: intake.origins,
    problems: problemsWithFailures(intake, inOrder),
    ...(intake.parts && { parts: intake.parts }),
    inputRows: () => intake.rows,
    frameCount: intake.frames.length,
    solved,
    *frames(): Generator<ReportFrame> {
      for (const [index, { id, frame }] of intake.frames.entries()) {
        const bytes = held.has(index) ? null : spool.get(index);
        const evaluation = bytes ? (deserialize(bytes) as FrameEvaluation) : (held.get(index) ?? null);
        const { title, group, count, note } = frame ?? { title: null, group: null, count: 1, note: null };
        yield { number: index + 1, id, title, group, count, note, frame, evaluation };
      }
    },
    close: () => spool.close(),
  };
}

/** Bytes that an evaluation takes, about: its figures, and some hundreds for each row of a check. */
function sizeOf({ states, checks, allChecks }: FrameEvaluation): number {
  const figures = states.reduce((sum, s) => sum + s.displacements.length + s.reactions.length + s.endForces.length, 0);
  return 8 * figures + 200 * states.length + 600 * (checks.length + (allChecks?.length ?? 0));
}
