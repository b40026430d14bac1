/** What is asked of a comparison, and what comes back: figures of the whole, the strip, and a page of one list. */
import type { FramePair, MemberPair, MovementKind } from '@/lib/results/compare';
import type { InputDifference, InputGroup } from '@/lib/results/compare-inputs';
import type { ReactionPair } from '@/lib/results/compare-reactions';
import type { ComparedTotals } from '@/lib/results/compare-totals';
import type { Verdict } from '@/lib/results/result';

/** `inputs`: one line a change, however many rows it is of; `cells`: cell by cell. */
export const comparedLists = ['frames', 'members', 'reactions', 'inputs', 'cells'] as const;
export type ComparedList = (typeof comparedLists)[number];

export interface CompareAsked {
  readonly list: ComparedList;
  readonly show: MovementKind;
  /** What is a movement: of a ratio as such, of a reaction as a share of its frame's largest, of α_cr as a share of what it was. */
  readonly by: number;
  /** Rows before the page, and at most on it. */
  readonly offset: number;
  readonly limit: number;
  readonly strip: boolean;
}

/** One cell of the strip of changes. */
export interface ComparedCell {
  readonly id: string;
  /** Null: only the other revision has it. */
  readonly before: { readonly verdict: Verdict; readonly ratio: number | null } | null;
  readonly after: { readonly verdict: Verdict; readonly ratio: number | null } | null;
  /** True where both have the same content. */
  readonly carried: boolean;
}

export type ComparedRows =
  | { readonly list: 'frames'; readonly rows: readonly FramePair[] }
  | { readonly list: 'members'; readonly rows: readonly MemberPair[] }
  | { readonly list: 'reactions'; readonly rows: readonly ReactionPair[] }
  | { readonly list: 'inputs'; readonly rows: readonly InputGroup[] }
  | { readonly list: 'cells'; readonly rows: readonly InputDifference[] };

export interface ComparedPage {
  readonly totals: ComparedTotals;
  /** Inputs that differ: kinds of change, cells or rows in all, and the first few changes. */
  readonly inputs: { readonly changes: number; readonly cells: number; readonly first: readonly InputGroup[] };
  /** In the later revision's sheet order, then those that only the earlier one has; null where it was not asked for. */
  readonly strip: readonly ComparedCell[] | null;
  readonly page: ComparedRows;
  /** Which change of the inputs touches each row of frames or members, in words; null for other lists. */
  readonly causes: readonly (string | null)[] | null;
  /** Rows of the list that fit, on all pages. */
  readonly matching: number;
}
