/** What is done to an issue once it is handed over; each with its letters and its line of activity, in one transaction. */
import { instant } from '@/db/clock';
import type { Db } from '@/db/open';
import { insertActivity } from '@/db/queries/activity';
import { aboutIssue, emailsOf, tellClients, tellOffice, tellWithdrawn } from '@/db/queries/issue-letters';
import type { QuestionRecord } from '@/db/queries/issue-questions';
import type { IssueRecord } from '@/db/queries/issues';
import { putInOutbox } from '@/db/queries/outbox';
import { updateRevisionState } from '@/db/queries/revisions';
import { issueMoves } from '@/lib/issuing/issue-states';

interface By {
  readonly id: number;
  readonly name: string;
}

const place = ({ project, batch, revision }: IssueRecord) => ({ project: project.id, batch: batch.id, revision: revision.id });

/**
 * Withdraws an issue because of an error in it, and tells everyone who was sent it or took a file of it.
 *
 * @returns how many were told; undefined where it was never handed over, or was withdrawn before
 */
export async function withdrawIssue(
  db: Db,
  issue: IssueRecord,
  { by, reason }: { readonly by: By; readonly reason: string },
): Promise<number | undefined> {
  const { from, to, revision } = issueMoves.withdraw;
  return db.transaction().execute(async (within) => {
    const result = await within
      .updateTable('issue')
      .set({ state: to, withdrawn_by: by.id, withdrawn_at: instant(), withdrawn_reason: reason })
      .where('office', '=', issue.office)
      .where('id', '=', issue.id)
      .where('state', 'in', from)
      .executeTakeFirst();
    if (result.numUpdatedRows !== 1n) return undefined;
    await updateRevisionState(within, issue.office, issue.revision.id, revision!.from, revision!.to, { reason });
    const told = await tellWithdrawn(within, issue, { by, reason });
    const detail = { issue: issue.id, number: issue.number, told };
    await insertActivity(within, issue.office, { what: 'withdrew an issue', ...place(issue), person: by.id, detail });
    return told;
  });
}

/** Sends an issue that is in force to more clients of its project. @returns those who did not have it before; none where it is not in force any more */
export async function sendIssueTo(
  db: Db,
  issue: IssueRecord,
  { by, clients }: { readonly by: By; readonly clients: readonly By[] },
): Promise<number[]> {
  const sent_at = instant();
  return db.transaction().execute(async (within) => {
    // withdrawn after it was looked at, its new holders would never hear of it
    const inForce = within.selectFrom('issue').select('id').where('office', '=', issue.office).where('id', '=', issue.id);
    if (!(await inForce.where('state', '=', 'issued').executeTakeFirst())) return [];
    const rows = await within
      .insertInto('issue_client')
      .values(clients.map(({ id, name }) => ({ issue: issue.id, person: id, name, sent_at })))
      .onConflict((conflict) => conflict.doNothing())
      .returning('person')
      .execute();
    const people = rows.map(({ person }) => person);
    await tellClients(within, issue, people);
    const detail = { issue: issue.id, number: issue.number, clients: people.length };
    if (people.length > 0)
      await insertActivity(within, issue.office, { what: 'sent an issue to more', ...place(issue), person: by.id, detail });
    return people;
  });
}

/** A client's question on an issue, or on one of its frames: the leads and who prepared it hear of it. */
export async function insertQuestion(
  db: Db,
  issue: IssueRecord,
  asked: { readonly by: By; readonly frame: { readonly index: number; readonly id: string } | null; readonly text: string },
): Promise<number> {
  const { by, frame, text } = asked;
  return db.transaction().execute(async (within) => {
    const { id } = await within
      .insertInto('question')
      .values({
        office: issue.office,
        issue: issue.id,
        person: by.id,
        frame: frame?.index ?? null,
        frame_id: frame?.id ?? null,
        text,
        at: instant(),
      })
      .returning('id')
      .executeTakeFirstOrThrow();
    await tellOffice(within, issue, { by: by.name, frame: frame?.id ?? null, text });
    const detail = { issue: issue.id, question: id, frame: frame?.id ?? null };
    await insertActivity(within, issue.office, { what: 'asked a question', ...place(issue), person: by.id, detail });
    return id;
  });
}

/** More said to a question: by who asked it, then the office hears of it; by the office, then who asked does. */
export async function insertAnswer(
  db: Db,
  issue: IssueRecord,
  question: QuestionRecord,
  said: { readonly by: By; readonly text: string },
): Promise<void> {
  const { by, text } = said;
  await db.transaction().execute(async (within) => {
    await within
      .insertInto('answer')
      .values({ office: issue.office, question: question.id, person: by.id, text, at: instant() })
      .execute();
    if (by.id === question.person) await tellOffice(within, issue, { by: by.name, frame: question.frameId, text });
    else
      for (const email of await emailsOf(within, issue.office, [question.person])) {
        await putInOutbox(within, issue.office, email, {
          kind: 'answer',
          about: aboutIssue(issue),
          by: by.name,
          frame: question.frameId,
          question: question.text,
          text,
        });
      }
    const what = by.id === question.person ? 'asked further' : 'answered a question';
    const detail = { issue: issue.id, question: question.id };
    await insertActivity(within, issue.office, { what, ...place(issue), person: by.id, detail });
  });
}
