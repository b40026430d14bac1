/** Signatures for those who code against them; bodies follow in this folder. */
import type { Db } from '@/db/open';
import type { VerdictCounts } from '@/db/queries/verdict-counts';
import type { FrameStatus } from '@/db/schema';
import type { Verdict } from '@/lib/results/result';

export interface SummaryCell {
  /** Place in sheet order, from 0. */
  readonly index: number;
  readonly id: string;
  readonly status: FrameStatus;
  /** Null: not run yet, or stopped. */
  readonly verdict: Verdict | null;
  readonly ratio: number | null;
  readonly check: string | null;
  readonly subject: string | null;
  readonly section: string | null;
  readonly combination: string | null;
  readonly group: string | null;
}

export interface BatchSummary {
  readonly counts: VerdictCounts;
  readonly cells: readonly SummaryCell[];
  /** Frames by ratio, in steps of `step` from 0; the last holds all above. Frames without a ratio are left out. */
  readonly spread: { readonly step: number; readonly frames: readonly number[] };
  /** Which check governs how many frames, and how many of these are over; the most frequent first. */
  readonly governing: readonly { readonly check: string; readonly frames: number; readonly over: number }[];
  /** Sections by how hard their members work; the hardest first. */
  readonly sections: readonly {
    readonly section: string;
    readonly members: number;
    readonly median: number | null;
    readonly worst: number | null;
    readonly over: number;
  }[];
  /** Worst first, at most ten: over before not checked before near, then by ratio. */
  readonly worst: readonly SummaryCell[];
  /** Parameters of the batch's families. */
  readonly parameters: readonly { readonly name: string; readonly quantity: string; readonly numeric: boolean }[];
  /** kg of all frames with their number off; null where a mass is not known. */
  readonly mass: number | null;
}

/** A revision at a glance. @returns undefined where it is not the office's */
export declare function findSummary(db: Db, office: number, revision: number): Promise<BatchSummary | undefined>;

/** Values of one numeric parameter beside each frame's ratio, in sheet order: a picture over a parameter. */
export declare function listParameterRatios(
  db: Db,
  office: number,
  revision: number,
  parameter: string,
): Promise<{ index: number; value: number; ratio: number | null; verdict: Verdict | null; group: string | null }[]>;
