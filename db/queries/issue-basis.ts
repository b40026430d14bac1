import type { Db } from '@/db/open';
import { findChecking } from '@/db/queries/checking';
import { listPreparers } from '@/db/queries/checking-people';
import { readOfficeSetting } from '@/db/queries/office-settings';
import { findRevisionById, type RevisionRecord } from '@/db/queries/revisions';
import type { Work } from '@/lib/checking/independence';
import { issueNumber, numberStem } from '@/lib/issuing/issue-number';
import type { IssuedCounts } from '@/lib/issuing/issue-sentence';
import type { Acceptance, IssueCover, Signature } from '@/lib/reports/issue-cover';

/** What stands in the database for issuing a revision: who prepared and checked it, what is and is not issued, what it replaces. */
export interface IssueBasis {
  readonly revision: RevisionRecord;
  readonly office: string;
  readonly prepared: Signature;
  /** Null until a checker has passed it. */
  readonly checked: Signature | null;
  readonly acceptances: readonly Acceptance[];
  /** Everyone with a part in it, frames carried over included. */
  readonly preparers: readonly Work[];
  readonly checkersIssue: boolean;
  /** Letter of a later revision of the batch whose issue is in force. */
  readonly laterInForce: string | null;
  /** An issue of the batch is being made. */
  readonly making: boolean;
  readonly counts: IssuedCounts;
  readonly notIssued: IssueCover['notIssued'];
  /** The last issue of the batch that clients got, with the people who hold it. */
  readonly before: {
    readonly id: number;
    readonly number: string;
    readonly state: string;
    readonly clients: readonly number[];
  } | null;
  /** The number it would get. */
  readonly number: { readonly text: string; readonly stem: string; readonly running: number };
}

/** @returns undefined where the revision is not the office's */
export async function findIssueBasis(db: Db, office: number, revision: number): Promise<IssueBasis | undefined> {
  const found = await findRevisionById(db, office, revision);
  if (!found) return undefined;
  const { name } = await db.selectFrom('office').select('name').where('id', '=', office).executeTakeFirstOrThrow();
  const checking = await checkingOf(db, found);
  return {
    revision: found,
    office: name,
    ...checking,
    ...(await handedOver(db, found)),
    preparers: await listPreparers(db, office, revision),
    checkersIssue: await readOfficeSetting(db, office, 'checkers issue'),
    counts: await countsOf(db, revision, checking.notIssued.length),
    number: await nextNumber(db, found),
  };
}

async function checkingOf(
  db: Db,
  { office, id, runBy, createdBy, runFinishedAt, createdAt }: RevisionRecord,
): Promise<Pick<IssueBasis, 'prepared' | 'checked' | 'acceptances' | 'notIssued'>> {
  const checking = await findChecking(db, office, id);
  const signed = ({ name, at }: Signature): Signature => ({ name, at });
  return {
    prepared: checking?.sent ? signed(checking.sent) : { name: (runBy ?? createdBy).name, at: runFinishedAt ?? createdAt },
    checked: checking?.passed ? signed(checking.passed) : null,
    acceptances: checking?.acceptances ?? [],
    notIssued: checking?.notIssued ?? [],
  };
}

async function handedOver(db: Db, { office, batch, id }: RevisionRecord) {
  const rows = await db
    .selectFrom('issue')
    .innerJoin('revision', 'revision.id', 'issue.revision')
    .select(['issue.id', 'issue.number', 'issue.state', 'revision.letter', 'revision.ordinal', 'revision.id as revision'])
    .where('issue.office', '=', office)
    .where('issue.batch', '=', batch)
    .orderBy('issue.id', 'desc')
    .execute();
  const own = await db.selectFrom('revision').select('ordinal').where('id', '=', id).executeTakeFirstOrThrow();
  const last = rows.find(({ state }) => state === 'issued' || state === 'superseded' || state === 'withdrawn');
  const clients = last && (await db.selectFrom('issue_client').select('person').where('issue', '=', last.id).execute());
  const later = rows.find(({ state, ordinal }) => state === 'issued' && ordinal > own.ordinal);
  return {
    before: last
      ? { id: last.id, number: last.number, state: last.state, clients: (clients ?? []).map((one) => one.person) }
      : null,
    laterInForce: later?.letter ?? null,
    making: rows.some(({ state }) => state === 'making'),
  };
}

/** Verdicts of the frames that have a solution. */
async function countsOf(db: Db, revision: number, notIssued: number): Promise<IssuedCounts> {
  const rows = await db
    .selectFrom('revision_frame')
    .select((eb) => ['verdict', eb.fn.countAll<number>().as('n')])
    .where('revision', '=', revision)
    .where('status', '=', 'solved')
    .groupBy('verdict')
    .execute();
  const of = (verdict: number): number => rows.find((row) => row.verdict === verdict)?.n ?? 0;
  return { within: of(0), near: of(1), notChecked: of(2), over: of(3), notIssued };
}

/** Counted over the office: two projects may share a number. A number given up by an issue that failed is given again. */
async function nextNumber(db: Db, { office, id, project, projectNumber }: RevisionRecord): Promise<IssueBasis['number']> {
  const stem = numberStem({ id: project, number: projectNumber });
  const row = await db
    .selectFrom('issue')
    .select((eb) => eb.fn.max('running').as('last'))
    .where('office', '=', office)
    .where('stem', '=', stem)
    .where((eb) => eb.not(eb.and([eb('revision', '=', id), eb('state', '=', 'failed')])))
    .executeTakeFirst();
  const running = (row?.last ?? 0) + 1;
  return { text: issueNumber(stem, running), stem, running };
}
