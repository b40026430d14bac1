import type { FrameRead } from '@/lib/intake/intake';
import type { FrameEvaluation } from '@/lib/results/result';

/** One frame of the batch in order of first definition; `evaluation` null where errors stopped it or it has not run. */
export interface FrameOutcome {
  /** Place in sheet order, from 0. */
  readonly index: number;
  readonly read: FrameRead;
  readonly evaluation: FrameEvaluation | null;
}
