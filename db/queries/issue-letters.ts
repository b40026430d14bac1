/** Who is written to about an issue, each in the transaction of the act that causes it. */
import type { Db } from '@/db/open';
import type { IssueRecord } from '@/db/queries/issues';
import { findKeeper } from '@/db/queries/standing';
import { putInOutbox } from '@/db/queries/outbox';
import type { AboutIssue } from '@/lib/mail/message';

export function aboutIssue({ project, batch, revision, id, number }: IssueRecord): AboutIssue {
  const name = project.number === null || project.number === '' ? project.name : `${project.number} ${project.name}`;
  return { project: name, batchName: batch.name, letter: revision.letter, issue: id, number };
}

/** Tells the clients of an issue that they have it. @param only these of them: sent to later */
export async function tellClients(within: Db, issue: IssueRecord, only?: readonly number[]): Promise<void> {
  const people = await within.selectFrom('issue_client').select('person').where('issue', '=', issue.id).execute();
  const asked = people.map(({ person }) => person).filter((person) => only === undefined || only.includes(person));
  for (const email of await emailsOf(within, issue.office, asked)) {
    await putInOutbox(within, issue.office, email, {
      kind: 'issued',
      about: aboutIssue(issue),
      by: issue.issuedBy.name,
      note: issue.note ?? '',
      supersedes: issue.supersedes?.number ?? null,
    });
  }
}

/**
 * Tells everyone who was sent an issue or took a file of it that it is withdrawn, but for who withdrew it: also those whose
 * sign-in has ended since, who may build from it all the same.
 */
export async function tellWithdrawn(
  within: Db,
  issue: IssueRecord,
  { by, reason }: { readonly by: { readonly id: number; readonly name: string }; readonly reason: string },
): Promise<number> {
  const sent = await within.selectFrom('issue_client').select('person').where('issue', '=', issue.id).execute();
  const took = await within.selectFrom('download').select('person').distinct().where('issue', '=', issue.id).execute();
  const people = [...new Set([...sent, ...took].map(({ person }) => person))].filter((person) => person !== by.id);
  const emails = await emailsOf(within, issue.office, people, { ended: true });
  for (const email of emails)
    await putInOutbox(within, issue.office, email, { kind: 'withdrawn', about: aboutIssue(issue), by: by.name, reason });
  return emails.length;
}

/** Tells the office's leads and who prepared the revision of a question, or of more said to one. */
export async function tellOffice(
  within: Db,
  issue: IssueRecord,
  said: { readonly by: string; readonly frame: string | null; readonly text: string },
): Promise<void> {
  const leads = await within
    .selectFrom('membership')
    .select('person')
    .where('office', '=', issue.office)
    .where('role', '=', 'lead')
    .where('ended_at', 'is', null)
    .execute();
  const { created_by, run_by, batch } = await within
    .selectFrom('revision')
    .select(['created_by', 'run_by', 'batch'])
    .where('id', '=', issue.revision.id)
    .executeTakeFirstOrThrow();
  // Who prepared it may have handed its batch over since.
  const keeper = await findKeeper(within, issue.office, batch);
  const people = new Set([...leads.map(({ person }) => person), run_by ?? created_by, ...(keeper ? [keeper.id] : [])]);
  for (const email of await emailsOf(within, issue.office, [...people]))
    await putInOutbox(within, issue.office, email, { kind: 'question', about: aboutIssue(issue), ...said });
}

/** Addresses of those among these people who are the office's still. @param ended those who were once too */
export async function emailsOf(
  within: Db,
  office: number,
  people: readonly number[],
  { ended = false }: { readonly ended?: boolean } = {},
): Promise<string[]> {
  if (people.length === 0) return [];
  let query = within
    .selectFrom('membership')
    .innerJoin('person', 'person.id', 'membership.person')
    .select('person.email')
    .where('membership.office', '=', office)
    .where('membership.person', 'in', [...people])
    .orderBy('person.email');
  if (!ended) query = query.where('membership.ended_at', 'is', null);
  return (await query.execute()).map(({ email }) => email);
}
