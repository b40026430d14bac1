/** In a thread: a chunk of a run's frame versions, from their models in the database to their results in it. */
import { insertChunkResults, type FrameResults } from '@/db/queries/results';
import { addJobProgress, listWaitingFrames } from '@/db/queries/waiting';
import { createAnalyser } from '@/lib/analysis/analyser';
import type { Settings } from '@/lib/model/settings';
import { evaluateFrame } from '@/lib/results/evaluate';
import { lineMemo } from '@/lib/results/line-memo';
import { memberResults } from '@/lib/results/member-results';
import type { Verdict } from '@/lib/results/result';
import { openOnce } from './open-once';

export { evaluateChunk } from './chunk';
export { tellFailures } from './failures';
export { listRun } from './list-run';
export { listSizing, sizeChunk } from './size';

export interface SolveTask {
  /** The database's file. */
  readonly file: string;
  readonly job: number;
  readonly revision: number;
  readonly versions: readonly number[];
  readonly settings: Settings;
  /** Versions that get the second, independent analysis. */
  readonly second: ReadonlySet<number>;
  readonly person: number | null;
}

export interface SolvedFrame {
  readonly version: number;
  readonly frame: string;
  readonly verdict: Verdict;
  readonly ratio: number | null;
}

const analyser = createAnalyser();
/** Evaluates and stores the versions; those that were stored meanwhile are left alone. */
export function solveChunk(task: SolveTask): SolvedFrame[] {
  const { raw } = openOnce(task.file);
  const results = listWaitingFrames(raw, task.revision, task.versions).map(({ version, frame }): FrameResults => {
    const lineOf = lineMemo(frame);
    const options = { second: task.second.has(version), all: false, lineOf };
    const evaluation = evaluateFrame(analyser, frame, task.settings, options);
    const results = { version, frame, evaluation, ...memberResults(frame, evaluation, lineOf) };
    lineOf.flat.forget();
    return results;
  });
  const stored = new Set(insertChunkResults(raw, results, { person: task.person }));
  addJobProgress(raw, task.job, stored.size);
  return results
    .filter(({ version }) => stored.has(version))
    .map(({ version, frame, evaluation }) => ({
      version,
      frame: frame.id,
      verdict: evaluation.verdict,
      ratio: evaluation.governing?.ratio ?? null,
    }));
}
