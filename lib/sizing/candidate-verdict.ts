import type { Verdict } from '@/lib/results/result';
import { verdictOf } from '@/lib/checks/verdict';
import type { CandidateFound } from '@/lib/sizing/sizing';

/** What a candidate comes to over all frames looked at: over, then not checked (or not solved, or not to be had), then near, within. */
export function candidateVerdict(candidate: CandidateFound, nearLimit: number): Verdict {
  const { over, notChecked, notSolved, ratio, unfit, lookedAt } = candidate;
  if (unfit !== null || lookedAt === 0) return 'not checked';
  if (over > 0) return 'over';
  if (notChecked > 0 || notSolved > 0) return 'not checked';
  return ratio === null ? 'within' : verdictOf(ratio, nearLimit);
}

/** "12 over, 3 not checked", "none", "at least 2 over": how many frames it fails. */
export function failsWords(candidate: CandidateFound): string {
  const { over, notChecked, notSolved, unfit, lookedAt, frames } = candidate;
  if (unfit !== null) return 'not tried';
  if (lookedAt === 0) return 'not looked at';
  const counts = [
    over > 0 ? `${over.toLocaleString('en-GB')} over` : null,
    notChecked > 0 ? `${notChecked.toLocaleString('en-GB')} not checked` : null,
    notSolved > 0 ? `${notSolved.toLocaleString('en-GB')} not solved` : null,
  ].filter((word) => word !== null);
  if (lookedAt < frames) return counts.length === 0 ? `none of the ${lookedAt} looked at` : `at least ${counts.join(', ')}`;
  return counts.length === 0 ? 'none' : counts.join(', ');
}
