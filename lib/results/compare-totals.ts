/** Two revisions in figures: how many frames moved and how, verdicts before against after, steel and α_cr. */
import { criticalMoved, type FramePair, massOf, ratioMoved, type ComparedFrame } from '@/lib/results/compare';
import type { Verdict } from '@/lib/results/result';

/** Worst first: rows and columns of the table of verdicts. */
export const comparedVerdicts = ['over', 'near', 'within', 'not checked'] as const satisfies readonly Verdict[];

export interface LowestFactor {
  readonly frame: string;
  readonly value: number;
}

export interface ComparedTotals {
  readonly frames: {
    readonly before: number;
    readonly after: number;
    /** With the same content in both: their results are the very same. */
    readonly carried: number;
    readonly onlyBefore: number;
    readonly onlyAfter: number;
  };
  /** Frames that came to a verdict from another. */
  readonly became: Readonly<Record<Verdict, number>>;
  readonly noLongerOver: number;
  /** Frames whose ratio moved by more than was asked for. */
  readonly moved: number;
  /** Frames of both revisions: verdict before (row) and after (column), in the order of `comparedVerdicts`. */
  readonly verdicts: readonly (readonly number[])[];
  /** kg of all frames with their number off, and how many frames are not in it because theirs is not known. */
  readonly mass: {
    readonly before: number;
    readonly after: number;
    readonly unknownBefore: number;
    readonly unknownAfter: number;
  };
  readonly critical: {
    readonly before: LowestFactor | null;
    readonly after: LowestFactor | null;
    /** Frames whose α_cr moved by more than the share that was asked for. */
    readonly moved: number;
  };
}

export function compareTotals(pairs: readonly FramePair[], by: number): ComparedTotals {
  const both = pairs.filter((pair) => pair.before !== null && pair.after !== null);
  const became = { over: 0, near: 0, within: 0, 'not checked': 0 };
  for (const pair of both) if (pair.became !== null) became[pair.became] += 1;
  const verdicts = comparedVerdicts.map((row) =>
    comparedVerdicts.map((column) => both.filter(({ before, after }) => before?.verdict === row && after?.verdict === column).length),
  ); // prettier-ignore
  const earlier = pairs.flatMap(({ before }) => before ?? []);
  const later = pairs.flatMap(({ after }) => after ?? []);
  return {
    frames: {
      before: earlier.length,
      after: later.length,
      carried: both.filter((pair) => pair.carried).length,
      onlyBefore: earlier.length - both.length,
      onlyAfter: later.length - both.length,
    },
    became,
    noLongerOver: both.filter(({ before, became: to }) => before?.verdict === 'over' && to !== null).length,
    moved: both.filter((pair) => ratioMoved(pair, by)).length,
    verdicts,
    mass: {
      before: total(earlier),
      after: total(later),
      unknownBefore: earlier.filter((frame) => frame.mass === null).length,
      unknownAfter: later.filter((frame) => frame.mass === null).length,
    },
    critical: {
      before: lowest(earlier),
      after: lowest(later),
      moved: both.filter((pair) => criticalMoved(pair, by)).length,
    },
  };
}

const total = (frames: readonly ComparedFrame[]): number => frames.reduce((sum, frame) => sum + (massOf(frame) ?? 0), 0);

function lowest(frames: readonly ComparedFrame[]): LowestFactor | null {
  let found: LowestFactor | null = null;
  for (const { id, criticalLoadFactor: value } of frames) {
    if (value !== null && (found === null || value < found.value)) found = { frame: id, value };
  }
  return found;
}
