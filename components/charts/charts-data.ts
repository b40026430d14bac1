import type { Verdict } from '@/lib/results/result';

/** One frame of the spread and the scatter. */
export interface RatioPoint {
  readonly frame: string;
  readonly ratio: number;
  readonly verdict: Verdict;
  /** Parameter's value, in the unit named on the axis; null = the frame has none. */
  readonly x?: number | null;
  readonly group?: string | null;
}

export interface GoverningCount {
  readonly check: string;
  /** Frames that this check governs, by verdict. */
  readonly over: number;
  readonly near: number;
  readonly within: number;
  readonly notChecked: number;
}

export interface SectionWork {
  readonly section: string;
  readonly members: number;
  readonly median: number | null;
  readonly worst: number | null;
  readonly verdict: Verdict;
}
