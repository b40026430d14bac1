/** Order of verdicts, and what a frame's verdict and governing check are. */
import type { Check, Governing, Verdict } from '@/lib/results/result';

const rank: Readonly<Record<Verdict, number>> = { over: 3, 'not checked': 2, near: 1, within: 0 };

/** Ratios this close are equal, so that rounding never chooses between checks. */
const same = 1e-9;

/** The worse of two verdicts: over, then not checked, then near, then within. */
export function worse(a: Verdict, b: Verdict): Verdict {
  return rank[b] > rank[a] ? b : a;
}

/**
 * Position of the check that governs: by verdict (over, not checked, near, within), then by largest ratio, the first
 * on a tie; −1 where there is none.
 */
export function governingIndex(checks: readonly Pick<Check, 'verdict' | 'ratio'>[]): number {
  let best = -1;
  for (let i = 0; i < checks.length; i++) if (best < 0 || outranks(checks[i]!, checks[best]!)) best = i;
  return best;
}

function outranks(a: Pick<Check, 'verdict' | 'ratio'>, b: Pick<Check, 'verdict' | 'ratio'>): boolean {
  if (rank[a.verdict] !== rank[b.verdict]) return rank[a.verdict] > rank[b.verdict];
  return (a.ratio ?? -1) > (b.ratio === null ? -1 : b.ratio * (1 + same));
}

export function governingOf(checks: readonly Check[]): Governing | null {
  const check = checks[governingIndex(checks)];
  return check ? { subject: check.subject, check: check.check, combination: check.combination, ratio: check.ratio } : null;
}

/**
 * A frame's verdict: the worst of its checks and of what is known not to have been checked. A frame with nothing
 * checked is "not checked", never a pass.
 */
export function frameVerdict(checks: readonly Check[], notChecked: readonly string[]): Verdict {
  if (checks.length === 0) return 'not checked';
  const start: Verdict = notChecked.length > 0 ? 'not checked' : 'within';
  return checks.reduce<Verdict>((worst, check) => worse(worst, check.verdict), start);
}
