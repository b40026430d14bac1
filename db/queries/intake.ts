/** Signatures for those who code against them; bodies follow in this folder. */
import type { RawDatabase } from '@/db/open';
import type { Intake } from '@/lib/intake/intake';
import type { Problem } from '@/lib/problems/problem';

export interface IntakeStored {
  readonly frames: number;
  /** Frames kept from running by errors. */
  readonly stopped: number;
  /** Frames whose results are carried over from an earlier revision of the batch. */
  readonly carried: number;
}

/**
 * Stores what was read of a revision in state "reading", in transactions under 50 ms, and moves it to "read".
 * May be called again after it was cut short: it begins afresh.
 *
 * @throws {RangeError} where the revision is not the office's or not in state "reading"
 */
export declare function insertIntake(raw: RawDatabase, office: number, revision: number, intake: Intake): IntakeStored;

/** Adds problems that the analysis found (a mechanism) after those of the sheets. */
export declare function insertProblems(raw: RawDatabase, revision: number, problems: readonly Problem[]): void;
