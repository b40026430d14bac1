/** Where a check stands: what has been looked at, and what is open. */
export interface CheckProgress {
  readonly listed: number;
  readonly seen: number;
  readonly openQueries: number;
  /** Checks (and frames as a whole) that are over or not checked, and how many of these were accepted with a reason. */
  readonly toAccept: number;
  readonly accepted: number;
}

/**
 * Everything that still stands against passing a revision, one sentence each; [] = it can be passed. An over or not checked
 * that nobody accepted is not to be built from, so it stands against passing.
 */
export function whyNotPass({ listed, seen, openQueries, toAccept, accepted }: CheckProgress): string[] {
  const against: string[] = [];
  if (seen < listed) against.push(`${counted(listed - seen, 'listed frame is', 'listed frames are')} not seen yet.`);
  if (openQueries > 0) against.push(`${counted(openQueries, 'query is', 'queries are')} open.`);
  if (accepted < toAccept)
    against.push(
      `${counted(toAccept - accepted, 'check is', 'checks are')} over or not checked and not accepted: accept with a reason, or return.`,
    );
  return against;
}

const counted = (n: number, one: string, many: string): string => `${n.toLocaleString('en-GB')} ${n === 1 ? one : many}`;
