/** What a checker accepted, printed beside the row that it is about. */
import type { Acceptance } from '@/lib/reports/issue-cover';
import type { Verdict } from '@/lib/results/result';

/** What is accepted where no check's own row says why something of a frame is not checked; its rows in result files name no check. */
export const wholeFrameCheck = 'the frame as a whole';

/** A row of a result file, as far as an acceptance may be about it. */
export interface AcceptedRow {
  readonly frame: string;
  readonly subject: string | null;
  /** '' = the frame as a whole. */
  readonly check: string;
  readonly verdict: Verdict;
}

/**
 * Finds the words for a row: "accepted by B. Checker, 2026-11-24: the crane is gone". Null where nobody accepted it: then it
 * is not to be built from. An acceptance of one check says nothing of another, nor one of "not checked" of an "over".
 */
export function acceptedWords(acceptances: readonly Acceptance[]): (row: AcceptedRow) => string | null {
  const byFrame = grouped(acceptances);
  return ({ frame, subject, check: named, verdict }) => {
    const check = named === '' ? wholeFrameCheck : named;
    const found = byFrame
      .get(frame)
      ?.find((one) => one.verdict === verdict && one.check === check && (one.subject === null || one.subject === subject));
    return found ? `accepted by ${found.by.name}, ${found.by.at.slice(0, 10)}: ${found.reason}` : null;
  };
}

function grouped(acceptances: readonly Acceptance[]): Map<string, Acceptance[]> {
  const groups = new Map<string, Acceptance[]>();
  for (const one of acceptances) groups.set(one.frame, [...(groups.get(one.frame) ?? []), one]);
  return groups;
}
