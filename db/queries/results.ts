/** Signatures for those who code against them; bodies follow in this folder. */
import type { RawDatabase } from '@/db/open';
import type { Frame } from '@/lib/model/frame';
import type { FrameEvaluation, MemberExtremes, Verdict } from '@/lib/results/result';

/** A frame version that waits to be run, under the name of the first frame that has it. */
export interface WaitingFrame {
  readonly version: number;
  readonly hash: string;
  readonly frame: Frame;
}

/** A member's line in the members table: its governing check, and the forces where that check stands. */
export interface MemberGoverning {
  readonly check: string | null;
  readonly combination: string | null;
  readonly at: number | null;
  readonly N: number | null;
  readonly V: number | null;
  readonly M: number | null;
  /** Largest of the service combinations, signed along local y. */
  readonly deflection: number | null;
  readonly ratio: number | null;
  readonly verdict: Verdict;
}

export interface FrameResults {
  readonly version: number;
  readonly frame: Frame;
  readonly evaluation: FrameEvaluation;
  /** By member; [] for a frame that was not solved. */
  readonly members: readonly MemberGoverning[];
  /** By state of the evaluation, then by member. */
  readonly extremes: readonly (readonly MemberExtremes[])[];
}

/** Versions of the revision that still wait, in the order of its frames. Skips those in `inHand`. */
export declare function listWaiting(
  raw: RawDatabase,
  revision: number,
  limit: number,
  inHand?: ReadonlySet<number>,
): WaitingFrame[];

/** Versions of the revision: all, and those that still wait. */
export declare function countWaiting(raw: RawDatabase, revision: number): { total: number; waiting: number };

/**
 * Stores a chunk's results in one transaction, for every revision that has these versions.
 * A version that was stored before is left alone.
 *
 * @returns the versions that were stored now
 */
export declare function insertChunkResults(
  raw: RawDatabase,
  results: readonly FrameResults[],
  run: { readonly person: number | null },
): number[];
