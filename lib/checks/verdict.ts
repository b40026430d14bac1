import type { Verdict } from '@/lib/results/result';
import { worse } from '@/lib/results/verdict';

/** Over above 1, near from the near limit up to 1 inclusive, else within; compared unrounded. Not a number: not checked. */
export function verdictOf(ratio: number, nearLimit: number): Verdict {
  if (Number.isNaN(ratio)) return 'not checked';
  if (ratio > 1) return 'over';
  return ratio >= nearLimit ? 'near' : 'within';
}

/** The worst of several, in the order over > not checked > near > within; of none: not checked, never a pass. */
export function worstOf(verdicts: readonly Verdict[]): Verdict {
  return verdicts.length === 0 ? 'not checked' : verdicts.reduce(worse);
}
