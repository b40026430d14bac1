/** Who may issue a checked revision, and when: every reason against it, in words. */

/** What decides it, as it stands in the database. */
export interface IssuingCase {
  readonly role: 'lead' | 'analyst' | 'checker' | 'client';
  /** The office lets its checkers issue; else the lead does. */
  readonly checkersIssue: boolean;
  /** They uploaded, changed or ran a frame of it, one carried over included. */
  readonly prepared: boolean;
  readonly revisionState: string;
  /** Letter of a later revision of the batch whose issue is in force; null = none. */
  readonly laterInForce: string | null;
  /** Its files are being made. */
  readonly making: boolean;
  /** Frames that have a solution. */
  readonly solved: number;
}

/** Whether a role may issue at all in this office. */
const mayRoleIssue = (role: IssuingCase['role'], checkersIssue: boolean): boolean =>
  role === 'lead' || (role === 'checker' && checkersIssue);

/**
 * Why a person may not issue it now; [] = they may. Nobody issues what they prepared: the lead, who approves, is bound by
 * it as the checker is.
 */
export function whyNotIssue(one: IssuingCase): string[] {
  const why: string[] = [];
  if (one.role === 'checker' && !one.checkersIssue)
    why.push('In this office the lead issues what a checker passed. The lead can let checkers issue, on the page of issues.');
  else if (!mayRoleIssue(one.role, one.checkersIssue)) why.push('The lead issues, or a checker where the office says so.');
  if (one.prepared) why.push('You had a part in making it, so somebody else issues it.');
  if (one.making) why.push('Its files are being made already.');
  else if (one.revisionState !== 'checked') why.push(notChecked(one.revisionState));
  if (one.laterInForce !== null)
    why.push(`Revision ${one.laterInForce}, which is later, is issued. An earlier revision can’t take its place.`);
  if (one.solved === 0) why.push('None of its frames has a solution, so there is nothing to issue.');
  return why;
}

function notChecked(state: string): string {
  if (state === 'issued' || state === 'superseded' || state === 'withdrawn')
    return `It is ${state} already. What changes is a next revision.`;
  if (state === 'to check') return 'A checker has it. It is issued once they have passed it.';
  return `It is ${state}. It is issued once a checker has passed it.`;
}

/** Who may withdraw an issue: the lead, or who issued it. */
export const mayWithdraw = (person: { readonly id: number; readonly role: string }, issuedBy: number): boolean =>
  person.role === 'lead' || person.id === issuedBy;
