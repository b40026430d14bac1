import type { Verdict } from '@/lib/results/result';

/** Verdicts by how bad they are; a verdict's rank in the database is its place here. */
const byRank = ['within', 'near', 'not checked', 'over'] as const satisfies readonly Verdict[];

export const rankOf = (verdict: Verdict): number => byRank.indexOf(verdict);

/** Null for −1, a frame that has no verdict yet. @throws {RangeError} for what is no rank */
export function verdictOf(rank: number): Verdict | null {
  if (rank === -1) return null;
  const verdict = byRank[rank];
  if (verdict === undefined) throw new RangeError(`Expected a verdict's rank from −1 to 3, got ${rank}`);
  return verdict;
}
