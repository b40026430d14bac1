/** Sending a revision to check, returning it and passing it: state, record, letters and activity in one transaction. */
import { instant } from '@/db/clock';
import type { Db } from '@/db/open';
import { insertCheckingActivity } from '@/db/queries/checking-activity';
import { findCheckProgress, findFramesToSee, insertCheckingList } from '@/db/queries/checking-list';
import { listWhoMayCheck } from '@/db/queries/checking-people';
import { emailsOf } from '@/db/queries/issue-letters';
import { issueInMaking } from '@/db/queries/issues';
import { putInOutbox } from '@/db/queries/outbox';
import { updateRevisionState, type RevisionRecord } from '@/db/queries/revisions';
import { moveOf, whyNotMove, type CheckingAct } from '@/lib/checking/checking-states';
import { whyNotPass } from '@/lib/checking/why-not-pass';
import type { AboutRevision } from '@/lib/mail/message';

interface By {
  readonly id: number;
  readonly name: string;
}

/** Null: done. Else why not, in a sentence. */
export type Refusal = string | null;

/** Sends a revision to check: it is frozen from here on, and the frames that have to be seen are listed. */
export async function sendToCheck(db: Db, revision: RevisionRecord, by: By, note: string): Promise<Refusal> {
  const against = whyNotMove(revision.state, 'send');
  if (against !== null) return against;
  if (revision.input === null || revision.engine === null) return 'Nothing of this revision has been read.';
  // read before the transaction, which is to be short; that nothing has changed meanwhile is seen to in it
  const list = await findFramesToSee(db, revision.id, revision.input.sha256);
  if (list.length === 0) return 'No frame of this revision has a solution, so there is nothing to check.';
  const checkers = await listWhoMayCheck(db, revision.office, revision.id, by.id);
  if (checkers.length === 0)
    return 'Nobody of the office may check this revision: everyone who could has had a hand in it. The lead adds a checker.';
  return db.transaction().execute(async (within) => {
    // a run may have begun, and even ended, while the list was made
    const now = await within.selectFrom('revision').select('stamp').where('id', '=', revision.id).executeTakeFirstOrThrow();
    if (now.stamp !== revision.stamp) return 'Its results have changed just now. Look at them, and send it again.';
    if (!(await move(within, revision, 'send', null))) return whyNotMove(await stateOf(within, revision), 'send') ?? 'Try again.';
    await insertCheckingList(within, revision.id, list);
    const at = await record(within, revision, 'sent', by, note);
    const sent = { sent_by: by.id, sent_at: at, checked_by: null, checked_at: null };
    await within.updateTable('revision').set(sent).where('id', '=', revision.id).execute();
    for (const { email } of checkers)
      await putInOutbox(within, revision.office, email, { kind: 'sent to check', about: aboutOf(revision), by: by.name, note });
    await insertCheckingActivity(within, revision, by, 'sent a revision to check', { note, listed: list.length });
    return null;
  });
}

/** Returns a revision to who prepared it, with a note; also one that was passed and not yet issued. */
export async function returnRevision(db: Db, revision: RevisionRecord, by: By, note: string): Promise<Refusal> {
  return db.transaction().execute(async (within) => {
    if (await issueInMaking(within, revision.office, revision.id))
      return 'The issue of this revision is being made. Wait for it, then withdraw it.';
    if (!(await move(within, revision, 'return', note)))
      return whyNotMove(await stateOf(within, revision), 'return') ?? 'Try again.';
    const unchecked = { checked_by: null, checked_at: null };
    await within.updateTable('revision').set(unchecked).where('id', '=', revision.id).execute();
    await record(within, revision, 'returned', by, note);
    for (const email of await preparersEmails(within, revision, by))
      await putInOutbox(within, revision.office, email, { kind: 'returned', about: aboutOf(revision), by: by.name, note });
    await insertCheckingActivity(within, revision, by, 'returned a revision', { note });
    return null;
  });
}

/** Passes a revision, where nothing stands against it. */
export async function passRevision(db: Db, revision: RevisionRecord, by: By, note: string): Promise<Refusal> {
  return db.transaction().execute(async (within) => {
    const state = whyNotMove(await stateOf(within, revision), 'pass');
    if (state !== null) return state;
    const against = whyNotPass(await findCheckProgress(within, revision.office, revision.id));
    if (against.length > 0) return against.join(' ');
    if (!(await move(within, revision, 'pass', null))) return 'Try again.';
    const at = await record(within, revision, 'passed', by, note);
    const checked = { checked_by: by.id, checked_at: at };
    await within.updateTable('revision').set(checked).where('id', '=', revision.id).execute();
    for (const email of await preparersEmails(within, revision, by))
      await putInOutbox(within, revision.office, email, { kind: 'passed', about: aboutOf(revision), by: by.name });
    await insertCheckingActivity(within, revision, by, 'passed a revision', { note });
    return null;
  });
}

async function stateOf(within: Db, { id }: RevisionRecord): Promise<string> {
  return (await within.selectFrom('revision').select('state').where('id', '=', id).executeTakeFirstOrThrow()).state;
}

function move(within: Db, { office, id }: RevisionRecord, act: CheckingAct, reason: string | null): Promise<boolean> {
  const { from, to } = moveOf(act);
  return updateRevisionState(within, office, id, from, to, { reason });
}

async function record(
  within: Db,
  { office, id, input, engine }: RevisionRecord,
  what: 'sent' | 'returned' | 'passed',
  by: By,
  note: string,
): Promise<string> {
  const at = instant();
  const madeOn = { input_sha256: input?.sha256 ?? '', engine: engine ?? '' };
  await within
    .insertInto('checking_act')
    .values({ office, revision: id, what, person: by.id, at, note, ...madeOn })
    .execute();
  return at;
}

/** Who sent it and who looks after the batch, but for who does it. */
async function preparersEmails(within: Db, { office, batch, sent, createdBy }: RevisionRecord, by: By): Promise<string[]> {
  const row = await within.selectFrom('batch').select(['keeper', 'created_by']).where('id', '=', batch).executeTakeFirstOrThrow();
  const people = new Set([sent?.id ?? createdBy.id, row.keeper ?? row.created_by]);
  return emailsOf(within, office, [...people].filter((person) => person !== by.id)); // prettier-ignore
}

function aboutOf({ projectName, projectNumber, batch, batchName, letter }: RevisionRecord): AboutRevision {
  const project = projectNumber === null || projectNumber === '' ? projectName : `${projectNumber} ${projectName}`;
  return { project, batch, batchName, letter };
}
