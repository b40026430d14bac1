import type { Check } from '@/lib/results/result';
import { worse } from '@/lib/results/verdict';
import { SAME } from './peak';

/** What a check of a frame has gathered so far. */
export interface Findings {
  /** One row for each subject × check. */
  readonly checks: Check[];
  /** Every subject × check × combination, where asked for. */
  readonly all: Check[] | null;
  readonly assumptions: Set<string>;
  readonly notChecked: Set<string>;
  /** Why there is no movement where there is no service combination. */
  readonly noService: 'no combinations' | 'no service combinations';
}

/** Takes a subject's rows of one check, a combination each: keeps the governing one. */
export function keepGoverning(findings: Findings, rows: readonly Check[]): void {
  const governing = rows.length === 1 ? rows[0] : governingRow(rows);
  if (!governing) return;
  findings.checks.push(governing);
  findings.all?.push(...rows);
  // also where another combination is over: what was not checked there must not go unsaid
  const refused = rows.find((row) => row.verdict === 'not checked');
  if (refused) findings.notChecked.add(`${refused.check}: ${refused.reason ?? 'not a number'}`);
}

/**
 * The row that governs: by verdict (over, not checked, near, within), then by largest ratio; the first on a tie, ratios
 * within 1e-9 of each other being equal, so that rounding never chooses between combinations.
 */
function governingRow(rows: readonly Check[]): Check | null {
  let best: Check | null = null;
  for (const row of rows) if (best === null || outranks(row, best)) best = row;
  return best;
}

function outranks(row: Check, best: Check): boolean {
  if (row.verdict !== best.verdict) return worse(best.verdict, row.verdict) === row.verdict;
  return (row.ratio ?? 0) > (best.ratio ?? 0) * (1 + SAME);
}

/** What stays the same in every row of a subject's check. */
export type Subject = Pick<Check, 'subjectKind' | 'subject' | 'check' | 'quantity' | 'reference' | 'member'>;

/** A row that says why nothing was checked. */
export function notCheckedRow(subject: Subject, combination: string | null, reason: string, inputs: Check['inputs'] = {}): Check {
  return {
    subjectKind: subject.subjectKind,
    subject: subject.subject,
    check: subject.check,
    quantity: subject.quantity,
    reference: subject.reference,
    member: subject.member,
    combination,
    at: null,
    face: null,
    value: null,
    limit: null,
    ratio: null,
    verdict: 'not checked',
    reason,
    inputs,
  };
}
