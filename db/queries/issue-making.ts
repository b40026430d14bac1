/** From the wish to issue to the hand-over: each step is one transaction. */
import { instant } from '@/db/clock';
import type { Db } from '@/db/open';
import { insertActivity } from '@/db/queries/activity';
import type { IssueBasis } from '@/db/queries/issue-basis';
import { tellClients } from '@/db/queries/issue-letters';
import { findIssue, type IssueRecord } from '@/db/queries/issues';
import { insertJob } from '@/db/queries/jobs';
import { updateRevisionState } from '@/db/queries/revisions';
import type { ReportFrames } from '@/lib/issuing/issue-file';
import { issueMoves } from '@/lib/issuing/issue-states';
import type { IssueCover } from '@/lib/reports/issue-cover';

export interface IssueAsked {
  readonly note: string | null;
  readonly clients: readonly { readonly id: number; readonly name: string }[];
  readonly reportFrames: ReportFrames;
  readonly person: { readonly id: number; readonly name: string };
}

/**
 * Records an issue with all that its covers will say, and queues the making of its files. What a failed attempt left of the
 * same revision is taken away: nobody was told of it, and its number is given again.
 *
 * @param basis on which the caller has made sure that this person may issue it
 * @returns the issue's id; undefined where another one was asked for meanwhile, or the revision is no longer as it was passed
 */
export async function insertIssue(db: Db, office: number, basis: IssueBasis, asked: IssueAsked): Promise<number | undefined> {
  const { revision, number } = basis;
  const at = instant();
  return db.transaction().execute(async (within) => {
    // the basis was read before: a checker may have returned the revision since
    const passed = await within
      .selectFrom('revision')
      .select('id')
      .where('id', '=', revision.id)
      .where('office', '=', office)
      .where('state', '=', 'checked')
      .where('checked_at', 'is', revision.checked?.at ?? null)
      .executeTakeFirst();
    if (!passed) return undefined;
    await deleteFailed(within, office, revision.id);
    const row = await within
      .insertInto('issue')
      .values({
        office,
        project: revision.project,
        batch: revision.batch,
        revision: revision.id,
        number: number.text,
        stem: number.stem,
        running: number.running,
        state: 'making',
        note: asked.note,
        cover: JSON.stringify(coverOf(basis, asked, at)),
        report_frames: JSON.stringify(asked.reportFrames),
        supersedes: basis.before?.id ?? null,
        engine: revision.engine ?? '',
        issued_by: asked.person.id,
        issued_at: at,
      })
      .onConflict((conflict) => conflict.doNothing())
      .returning('id')
      .executeTakeFirst();
    if (!row) return undefined;
    const clients = asked.clients.map(({ id, name }) => ({ issue: row.id, person: id, name, sent_at: at }));
    if (clients.length > 0) await within.insertInto('issue_client').values(clients).execute();
    await insertJob(within, office, {
      kind: 'issue',
      revision: revision.id,
      person: asked.person.id,
      payload: { issue: row.id },
    });
    await insertActivity(within, office, {
      what: 'asked for an issue',
      project: revision.project,
      batch: revision.batch,
      revision: revision.id,
      person: asked.person.id,
      detail: { issue: row.id, number: number.text },
    });
    return row.id;
  });
}

function coverOf(basis: IssueBasis, { note, clients, person }: IssueAsked, at: string): IssueCover {
  const { revision, prepared, checked, acceptances, notIssued, before, number, office } = basis;
  return {
    number: number.text,
    office,
    project: revision.projectName,
    projectNumber: revision.projectNumber,
    batch: revision.batchName,
    revision: revision.letter,
    prepared,
    checked,
    approved: { name: person.name, at },
    issued: { at, to: clients.map(({ name }) => name) },
    supersedes: before?.number ?? null,
    note,
    acceptances,
    notIssued,
  };
}

async function deleteFailed(within: Db, office: number, revision: number): Promise<void> {
  const failed = await within
    .selectFrom('issue')
    .select('id')
    .where('office', '=', office)
    .where('revision', '=', revision)
    .where('state', '=', 'failed')
    .execute();
  for (const { id } of failed) {
    for (const table of ['issue_piece', 'issue_file', 'issue_client'] as const)
      await within.deleteFrom(table).where('issue', '=', id).execute();
    await within.deleteFrom('issue').where('id', '=', id).execute();
  }
}

/**
 * Hands an issue over once its files are all there: it and its revision become issued, the one that was in force for the
 * batch superseded, and its clients' letters go to the outbox, in one transaction. Done again, it does nothing.
 *
 * @returns false where it is not in the making (any more)
 * @throws {Error} where its revision is no longer as it was checked: nothing is handed over then
 */
export async function handOverIssue(db: Db, office: number, issue: number): Promise<boolean> {
  return db.transaction().execute(async (within) => {
    const found = await findIssue(within, office, issue);
    if (found?.state !== 'making') return false;
    await supersedeBefore(within, found);
    const { from, to, revision } = issueMoves['hand over'];
    await within
      .updateTable('issue')
      .set({ state: to, handed_at: instant() })
      .where('id', '=', issue)
      .where('state', 'in', from)
      .execute();
    if (!(await updateRevisionState(within, office, found.revision.id, revision!.from, revision!.to)))
      throw new Error(`Revision ${found.revision.letter} is not checked any more, so issue ${found.number} is not handed over.`);
    await tellClients(within, found);
    await insertActivity(within, office, {
      what: 'issued a revision',
      project: found.project.id,
      batch: found.batch.id,
      revision: found.revision.id,
      person: found.issuedBy.id,
      detail: { issue, number: found.number, supersedes: found.supersedes?.number ?? null },
    });
    return true;
  });
}

async function supersedeBefore(within: Db, { office, batch }: IssueRecord): Promise<void> {
  const { from, to, revision } = issueMoves.supersede;
  const inForce = await within
    .selectFrom('issue')
    .select(['id', 'revision'])
    .where('office', '=', office)
    .where('batch', '=', batch.id)
    .where('state', 'in', from)
    .execute();
  for (const one of inForce) {
    await within.updateTable('issue').set({ state: to }).where('id', '=', one.id).execute();
    await updateRevisionState(within, office, one.revision, revision!.from, revision!.to);
  }
}

/** Gives up making an issue's files; its revision stays checked and may be issued anew. */
export async function failIssue(db: Db, office: number, issue: number, why: string): Promise<void> {
  const { from, to } = issueMoves['give up making'];
  await db
    .updateTable('issue')
    .set({ state: to, failure: why })
    .where('office', '=', office)
    .where('id', '=', issue)
    .where('state', 'in', from)
    .execute();
}
