/** Where the writers of result files take a batch from: the database's stored rows, or a run of the command line. */
import type { FrameRead, Intake } from '@/lib/intake/intake';
import type { Problem } from '@/lib/problems/problem';
import type { FrameEvaluation } from '@/lib/results/result';

/** One frame of the batch in order of first definition; `evaluation` null where errors stopped it or it has not run. */
export interface FrameOutcome {
  readonly index: number;
  readonly read: FrameRead;
  readonly evaluation: FrameEvaluation | null;
}

/** What the cover of a workbook says besides the input; null on the command line, which knows of no project. */
export interface ResultCover {
  readonly project: string;
  readonly batch: string;
  readonly revision: string;
  readonly state: string;
  readonly prepared: string | null;
  readonly checked: string | null;
  readonly issued: string | null;
}

export interface ResultSource extends Pick<Intake, 'input' | 'settings' | 'origins' | 'sheets' | 'rows'> {
  readonly engine: string;
  readonly cover: ResultCover | null;
  /** The intake's problems and those the analysis found, in sheet order. */
  readonly problems: readonly Problem[];
  readonly frameCount: number;
  /** Every frame in order, one at a time; may be called again for another pass. */
  frames(): AsyncIterable<FrameOutcome>;
}
