/** Where checking stands: of a revision, of one frame, and over an office. */
import type { Db } from '@/db/open';
import { findCheckProgress } from '@/db/queries/checking-list';
import type { Acceptance } from '@/lib/reports/issue-cover';
import type { CheckProgress } from '@/lib/checking/why-not-pass';

export interface CheckingAct {
  readonly id: number;
  readonly name: string;
  readonly at: string;
  readonly note: string;
}

export interface Checking {
  /** Who sent it to check, the last time. */
  readonly sent: CheckingAct | null;
  /** Who passed it, where it was not returned afterwards. */
  readonly passed: CheckingAct | null;
  readonly acceptances: readonly Acceptance[];
  /** Frames without a solution: they are not issued. */
  readonly notIssued: readonly { readonly frame: string; readonly reason: string }[];
}

/** What an issue says of how a revision was checked. @returns undefined where it is not the office's */
export async function findChecking(db: Db, office: number, revision: number): Promise<Checking | undefined> {
  const own = await db
    .selectFrom('revision')
    .select('id')
    .where('id', '=', revision)
    .where('office', '=', office)
    .executeTakeFirst();
  if (!own) return undefined;
  const acts = await listCheckingActs(db, office, revision);
  const last = acts.at(-1);
  const without = await db
    .selectFrom('revision_frame')
    .select(['frame_id', 'status', 'reason'])
    .where('revision', '=', revision)
    .where('status', '!=', 'solved')
    .orderBy('frame')
    .execute();
  return {
    sent: acts.findLast(({ what }) => what === 'sent') ?? null,
    passed: last?.what === 'passed' ? last : null,
    acceptances: (await acceptances(db, office, revision).execute()).map(
      ({ frame_id, subject, check_name, verdict, reason, name, at }) => ({
        frame: frame_id,
        subject,
        check: check_name,
        verdict,
        reason,
        by: { name, at },
      }),
    ),
    notIssued: without.map(({ frame_id, status, reason }) => ({ frame: frame_id, reason: reason ?? whyNone[status] })),
  };
}

const whyNone = {
  stopped: 'stopped by errors in its sheets',
  waiting: 'not run',
  'not solved': 'no solution was found',
  solved: '',
};

/** Sent, returned, passed: in their order. */
export async function listCheckingActs(
  db: Db,
  office: number,
  revision: number,
): Promise<(CheckingAct & { readonly what: 'sent' | 'returned' | 'passed' })[]> {
  return db
    .selectFrom('checking_act')
    .innerJoin('person', 'person.id', 'checking_act.person')
    .select(['person.id', 'person.name', 'checking_act.what', 'checking_act.at', 'checking_act.note'])
    .where('checking_act.office', '=', office)
    .where('checking_act.revision', '=', revision)
    .orderBy('checking_act.id')
    .execute();
}

function acceptances(db: Db, office: number, revision: number) {
  return db
    .selectFrom('checking_acceptance')
    .innerJoin('person', 'person.id', 'checking_acceptance.person')
    .innerJoin('revision_frame', (join) =>
      join
        .onRef('revision_frame.revision', '=', 'checking_acceptance.revision')
        .onRef('revision_frame.frame', '=', 'checking_acceptance.frame'),
    )
    .selectAll('checking_acceptance')
    .select(['person.name', 'revision_frame.frame_id'])
    .where('checking_acceptance.office', '=', office)
    .where('checking_acceptance.revision', '=', revision)
    .where('checking_acceptance.ended_at', 'is', null)
    .orderBy('checking_acceptance.frame')
    .orderBy('checking_acceptance.item');
}

export interface AcceptedItem {
  readonly item: number;
  readonly reason: string;
  readonly by: string;
  readonly at: string;
}
export interface SeenMark {
  readonly person: number;
  readonly name: string;
  readonly at: string;
  readonly inputHash: string;
  readonly engine: string;
}
export interface OwnValueRecord {
  readonly id: number;
  readonly label: string;
  readonly quantity: string;
  readonly ours: number;
  readonly theirs: number;
  readonly typed: string;
  readonly note: string;
  readonly by: string;
  readonly at: string;
  readonly inputHash: string;
  readonly engine: string;
}

/** The marks on one frame, at its place from 0. */
export async function findFrameMarks(
  db: Db,
  office: number,
  revision: number,
  frame: number,
): Promise<{ seen: SeenMark[]; accepted: AcceptedItem[]; ownValues: OwnValueRecord[] }> {
  const seen = await db
    .selectFrom('checking_seen')
    .innerJoin('revision', 'revision.id', 'checking_seen.revision')
    .innerJoin('person', 'person.id', 'checking_seen.person')
    .select(['person.id as person', 'person.name', 'checking_seen.at', 'checking_seen.input_sha256 as inputHash'])
    .select('checking_seen.engine')
    .where('revision.office', '=', office)
    .where('checking_seen.revision', '=', revision)
    .where('checking_seen.frame', '=', frame)
    .orderBy('checking_seen.at')
    .execute();
  const accepted = await acceptances(db, office, revision).where('checking_acceptance.frame', '=', frame).execute();
  const own = await db
    .selectFrom('checking_own_value')
    .innerJoin('person', 'person.id', 'checking_own_value.person')
    .selectAll('checking_own_value')
    .select('person.name')
    .where('checking_own_value.office', '=', office)
    .where('checking_own_value.revision', '=', revision)
    .where('checking_own_value.frame', '=', frame)
    .orderBy('checking_own_value.id')
    .execute();
  return {
    seen,
    accepted: accepted.map(({ item, reason, name, at }) => ({ item, reason, by: name, at })),
    ownValues: own.map(({ id, label, quantity, ours, theirs, typed, note, name, at, input_sha256, engine }) => ({
      id, label, quantity, ours, theirs, typed, note, by: name, at, inputHash: input_sha256, engine,
    })), // prettier-ignore
  };
}

export type StripMark = 'seen' | 'queried' | 'accepted';

/** The mark of each frame that has one, by its place from 0: an open query before an acceptance before seen. */
export async function listStripMarks(db: Db, office: number, revision: number): Promise<ReadonlyMap<number, StripMark>> {
  const marks = new Map<number, StripMark>();
  const own = await db
    .selectFrom('revision')
    .select('sent_at')
    .where('id', '=', revision)
    .where('office', '=', office)
    .executeTakeFirst();
  if (!own || own.sent_at === null) return marks;
  const of = async (table: 'checking_seen' | 'checking_acceptance' | 'checking_query', mark: StripMark) => {
    let query = db.selectFrom(table).select('frame').distinct().where('revision', '=', revision);
    if (table === 'checking_acceptance') query = query.where('ended_at', 'is', null);
    if (table === 'checking_query') query = query.where('closed_at', 'is', null);
    for (const { frame } of await query.execute()) marks.set(frame, mark);
  };
  await of('checking_seen', 'seen');
  await of('checking_acceptance', 'accepted');
  await of('checking_query', 'queried');
  return marks;
}

export interface RevisionToCheck {
  readonly id: number;
  readonly project: string;
  readonly batch: number;
  readonly batchName: string;
  readonly letter: string;
  readonly frames: number;
  readonly sentBy: string;
  readonly sentAt: string;
  readonly note: string;
  readonly progress: CheckProgress;
}

/** The office's revisions that are with a checker, the longest waiting first. */
export async function listRevisionsToCheck(db: Db, office: number): Promise<RevisionToCheck[]> {
  const rows = await db
    .selectFrom('revision')
    .innerJoin('batch', 'batch.id', 'revision.batch')
    .innerJoin('project', 'project.id', 'batch.project')
    .innerJoin('person', 'person.id', 'revision.sent_by')
    .select((eb) => [
      'revision.id',
      'revision.letter',
      'revision.frames',
      'batch.id as batch',
      'batch.name as batchName',
      'project.name as projectName',
      'project.number as projectNumber',
      'person.name as sentBy',
      eb.ref('revision.sent_at').$notNull().as('sentAt'),
      eb
        .selectFrom('checking_act')
        .select('note')
        .whereRef('checking_act.revision', '=', 'revision.id')
        .where('checking_act.what', '=', 'sent')
        .orderBy('checking_act.id', 'desc')
        .limit(1)
        .as('note'),
    ])
    .where('revision.office', '=', office)
    .where('revision.state', '=', 'to check')
    .orderBy('revision.sent_at')
    .execute();
  const found: RevisionToCheck[] = [];
  for (const { projectName, projectNumber, note, ...row } of rows)
    found.push({
      ...row,
      project: projectNumber ? `${projectNumber} ${projectName}` : projectName,
      note: note ?? '',
      progress: await findCheckProgress(db, office, row.id),
    });
  return found;
}

/** How many of the office's revisions are with a checker. */
export async function countRevisionsToCheck(db: Db, office: number): Promise<number> {
  const { n } = await db
    .selectFrom('revision')
    .select((eb) => eb.fn.countAll<number>().as('n'))
    .where('office', '=', office)
    .where('state', '=', 'to check')
    .executeTakeFirstOrThrow();
  return n;
}
