import type { Db } from '@/db/open';
import { readOfficeSetting } from '@/db/queries/office-settings';
import { findRevisionById, type RevisionRecord } from '@/db/queries/revisions';
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
  /** Everyone who uploaded, changed or ran a frame of it. */
  readonly preparers: ReadonlySet<number>;
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
  const [{ name }, checking, preparers, checkersIssue, handed, frames, number] = [
    await db.selectFrom('office').select('name').where('id', '=', office).executeTakeFirstOrThrow(),
    await checkingOf(db, found),
    await preparersOf(db, found),
    await readOfficeSetting(db, office, 'checkers issue'),
    await handedOver(db, found),
    await framesOf(db, revision),
    await nextNumber(db, found),
  ];
  const { before, laterInForce, making } = handed;
  return {
    revision: found,
    office: name,
    ...checking,
    preparers,
    checkersIssue,
    laterInForce,
    making,
    ...frames,
    before,
    number,
  };
}

async function checkingOf(_db: Db, revision: RevisionRecord): Promise<Pick<IssueBasis, 'prepared' | 'checked' | 'acceptances'>> {
  const { runBy, createdBy, runFinishedAt, createdAt } = revision;
  const prepared = { name: (runBy ?? createdBy).name, at: runFinishedAt ?? createdAt };
  return { prepared, checked: null, acceptances: [] };
}

async function preparersOf(db: Db, revision: RevisionRecord): Promise<ReadonlySet<number>> {
  const row = db.selectFrom('revision_frame').where('revision', '=', revision.id);
  const [uploaded, changed, ran] = [
    await row.select('uploaded_by as person').distinct().execute(),
    await row.select('changed_by as person').distinct().execute(),
    await row.select('run_by as person').distinct().execute(),
  ];
  const people = [...uploaded, ...changed, ...ran].flatMap(({ person }) => person ?? []);
  return new Set([...people, revision.createdBy.id, ...(revision.runBy ? [revision.runBy.id] : [])]);
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

/** Verdicts of the frames that have a solution, and the frames that have none: these are not issued. */
async function framesOf(db: Db, revision: number): Promise<Pick<IssueBasis, 'counts' | 'notIssued'>> {
  const rows = await db
    .selectFrom('revision_frame')
    .select((eb) => ['verdict', eb.fn.countAll<number>().as('n')])
    .where('revision', '=', revision)
    .where('status', '=', 'solved')
    .groupBy('verdict')
    .execute();
  const of = (verdict: number): number => rows.find((row) => row.verdict === verdict)?.n ?? 0;
  const without = await db
    .selectFrom('revision_frame')
    .select(['frame_id', 'status', 'reason'])
    .where('revision', '=', revision)
    .where('status', '!=', 'solved')
    .orderBy('frame')
    .execute();
  const notIssued = without.map(({ frame_id, status, reason }) => ({ frame: frame_id, reason: reason ?? whyNone[status] }));
  return {
    counts: { within: of(0), near: of(1), notChecked: of(2), over: of(3), notIssued: notIssued.length },
    notIssued,
  };
}

const whyNone = {
  stopped: 'stopped by errors in its sheets',
  waiting: 'not run',
  'not solved': 'no solution was found',
  solved: '',
} as const;

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
