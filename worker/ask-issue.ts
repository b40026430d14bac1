/** What pages and the demo's seed ask of the queue about issues. */
import type { OpenDatabase } from '@/db/open';
import { findIssueBasis, type IssueBasis } from '@/db/queries/issue-basis';
import { insertIssue, type IssueAsked } from '@/db/queries/issue-making';
import { isIndependent } from '@/lib/checking/independence';
import { whyNotIssue } from '@/lib/issuing/why-not-issue';
import type { WorkQueue } from './queue';

/** Who asks, with the role they have in the office. */
export interface Issuer {
  readonly id: number;
  readonly name: string;
  readonly role: 'lead' | 'analyst' | 'checker' | 'client';
}

/** Every reason against a person's issuing of a revision now; [] = they may. */
export function whyNot(basis: IssueBasis, person: Issuer): string[] {
  const { counts, preparers, checkersIssue, laterInForce, making, revision } = basis;
  return whyNotIssue({
    role: person.role,
    checkersIssue,
    prepared: !isIndependent(person.id, preparers),
    revisionState: revision.state,
    laterInForce,
    making,
    solved: counts.over + counts.notChecked + counts.near + counts.within,
  });
}

/**
 * Queues the making of an issue. Whoever holds the issue that it takes the place of gets it too, so that nobody builds on
 * from what is superseded without having been told.
 *
 * @returns the issue's id, or why it is not to be issued
 */
export async function askForIssue(
  queue: WorkQueue,
  { db }: Pick<OpenDatabase, 'db'>,
  of: { readonly office: number; readonly revision: number },
  asked: Omit<IssueAsked, 'person'> & { readonly person: Issuer },
): Promise<{ readonly issue: number } | { readonly why: readonly string[] }> {
  const basis = await findIssueBasis(db, of.office, of.revision);
  if (!basis) throw new RangeError(`Expected revision ${of.revision} to be of office ${of.office}`);
  const why = whyNot(basis, asked.person);
  if (why.length > 0) return { why };
  const issue = await insertIssue(db, of.office, basis, asked);
  if (issue === undefined)
    return { why: ['An issue of this batch is being made already, or the revision was returned just now. Look at it again.'] };
  queue.wake();
  return { issue };
}
