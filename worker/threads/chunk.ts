/** A chunk of frames evaluated away from the database: what the command line hands to its threads. */
import { createAnalyser } from '@/lib/analysis/analyser';
import type { Frame } from '@/lib/model/frame';
import type { Settings } from '@/lib/model/settings';
import { evaluateFrame } from '@/lib/results/evaluate';
import type { FrameEvaluation } from '@/lib/results/result';

export interface ChunkTask {
  readonly settings: Settings;
  readonly all: boolean;
  readonly frames: readonly { readonly frame: Frame; readonly second: boolean }[];
}

/** One per thread: it keeps orderings from frame to frame. */
const analyser = createAnalyser();

/** Evaluations in the order of the task's frames. */
export function evaluateChunk(task: ChunkTask): FrameEvaluation[] {
  return task.frames.map(({ frame, second }) => evaluateFrame(analyser, frame, task.settings, { second, all: task.all }));
}
