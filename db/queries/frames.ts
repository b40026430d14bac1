/** Signatures for those who code against them; bodies follow in this folder. */
import type { Db } from '@/db/open';
import type { FrameStatus } from '@/db/schema';
import type { Frame } from '@/lib/model/frame';
import type { FrameEvaluation } from '@/lib/results/result';
import type { FrameOutcome } from '@/lib/results/source';
import type { View } from '@/lib/tables/view';

export interface FrameStored {
  /** Place in sheet order, from 0. */
  readonly index: number;
  readonly id: string;
  readonly title: string | null;
  readonly group: string | null;
  readonly count: number;
  readonly note: string | null;
  readonly status: FrameStatus;
  /** Null where errors of its sheets stop it. */
  readonly frame: Frame | null;
  /** Null until run. */
  readonly evaluation: FrameEvaluation | null;
  /** The engine that made the results, and the hash they hang on. */
  readonly engine: string | null;
  readonly hash: string | null;
  readonly uploadedBy: string | null;
  readonly changedBy: string | null;
  readonly runBy: string | null;
}

export interface Neighbours {
  readonly previous: number | null;
  readonly next: number | null;
  /** Its place in the list from 1, null where the filters leave it out; frames in the list. */
  readonly place: number | null;
  readonly of: number;
}

/** One frame of a revision by its index from 0, with everything stored of it. */
export declare function findFrame(db: Db, office: number, revision: number, index: number): Promise<FrameStored | undefined>;

export declare function findFrameIndex(db: Db, office: number, revision: number, frameId: string): Promise<number | undefined>;

/** The frames before and after one in a view's order (each frame once, at its first row). */
export declare function findNeighbours(db: Db, office: number, revision: number, index: number, view: View): Promise<Neighbours>;

/** Every frame of a revision in order, one at a time, for result files. */
export declare function iterateFrames(db: Db, office: number, revision: number): AsyncGenerator<FrameOutcome>;
