import { createHash } from 'node:crypto';
import ExcelJS from 'exceljs';
import { afterEach, beforeEach, describe, expect, it } from 'vitest';
import { insertAnswer, insertQuestion, sendIssueTo, withdrawIssue } from '@/db/queries/issue-acts';
import { findIssueBasis } from '@/db/queries/issue-basis';
import { insertDownload, issueFilePieces, listDownloads, listIssueFiles } from '@/db/queries/issue-files';
import { insertIssue } from '@/db/queries/issue-making';
import { listQuestions } from '@/db/queries/issue-questions';
import { findIssue, findIssueFor, findIssueOfRevision, listIssuesFor, type IssueRecord } from '@/db/queries/issues';
import { findLatestJob } from '@/db/queries/jobs';
import { insertPerson } from '@/db/queries/people';
import { updateAssigned } from '@/db/queries/projects';
import { findRevisionById, updateRevisionState } from '@/db/queries/revisions';
import type { MailMessage } from '@/lib/mail/message';
import type { IssueFileKind } from '@/lib/issuing/issue-file';
import { askForRun } from './ask';
import { askForIssue, type Issuer } from './ask-issue';
import { WorkQueue } from './queue';
import { pretendPools, readRevision, testDatabase, testOffice, type TestDatabase, type TestOffice } from './test-office';
import { tellFailures } from './threads/failures';
import { listRun } from './threads/list-run';
import { makeIssue } from './threads/make-issue';
import { retestIssue } from './threads/retest-issue';
import { solveChunk } from './threads/solve';

const sha256 = (bytes: Buffer): string => createHash('sha256').update(bytes).digest('hex');

let database: TestDatabase;
let office: TestOffice;
let lead: Issuer;
let clients: { id: number; name: string }[];
let logged: string[];

const threads = { listRun, solveChunk, tellFailures, makeIssue, retestIssue };
const queueOf = (tasks: Parameters<typeof pretendPools>[0] = threads): WorkQueue =>
  new WorkQueue({
    database,
    file: database.file,
    pools: pretendPools(tasks),
    log: (message, { error }) => logged.push(`${message}: ${String(error)}`),
  });

async function person(name: string, role: 'lead' | 'client' | 'checker'): Promise<{ id: number; name: string }> {
  const email = `${name.toLowerCase().replace(/\W+/g, '.')}@people.example`;
  return { id: (await insertPerson(database.db, office.office, { email, name, role, passwordHash: 'none' }))!, name };
}

beforeEach(async () => {
  database = await testDatabase();
  logged = [];
  office = await testOffice(database, 'North');
  lead = { ...(await person('Lea Dwright', 'lead')), role: 'lead' };
  clients = [await person('Cli Entham', 'client'), await person('Cli Entsley', 'client')];
  await updateAssigned(database.db, office.office, office.project, clients.map(({ id }) => id)); // prettier-ignore
});
afterEach(() => database.remove());

/** A revision that was run and passed by a checker. */
async function checked(frames = 3, from = 1, batch?: number): Promise<{ office: number; revision: number; batch: number }> {
  const of = await readRevision(database, office, frames, from, batch);
  database.raw
    .prepare(
      "insert into sheet_read (revision, ordinal, name, file, heading_row, rows, headings) values (?, 0, 'Members', 'a.xlsx', 1, 1, '[]')",
    )
    .run(of.revision);
  database.raw
    .prepare(`insert into input_row (revision, ordinal, sheet, row, cells, part) values (?, 0, 'Members', 1, '["frame"]', 0)`)
    .run(of.revision);
  const queue = queueOf();
  await askForRun(queue, database, of);
  await queue.idle();
  expect(await updateRevisionState(database.db, of.office, of.revision, ['run'], 'checked')).toBe(true);
  return of;
}

async function issue(
  of: { office: number; revision: number },
  more: { queue?: WorkQueue; to?: typeof clients; by?: Issuer } = {},
): Promise<IssueRecord> {
  const queue = more.queue ?? queueOf();
  const asked = { note: 'For the shop.', clients: more.to ?? clients.slice(0, 1), reportFrames: 'all', person: more.by ?? lead } as const; // prettier-ignore
  const answer = await askForIssue(queue, database, of, asked);
  if ('why' in answer) throw new Error(answer.why.join(' '));
  await queue.idle();
  return (await findIssue(database.db, of.office, answer.issue))!;
}

const bytesOf = ({ id }: IssueRecord, kind: IssueFileKind): Buffer => Buffer.concat([...issueFilePieces(database.raw, id, kind)]);
const stateOf = async (of: { office: number; revision: number }) => (await findRevisionById(database.db, of.office, of.revision))!.state; // prettier-ignore

async function letters(): Promise<string[]> {
  const rows = await database.db.selectFrom('outbox').select(['recipient', 'payload']).orderBy('id').execute();
  return rows.map(({ recipient, payload }) => {
    const message = JSON.parse(payload) as MailMessage;
    const supersedes = message.kind === 'issued' && message.supersedes ? ` in place of ${message.supersedes}` : '';
    return 'about' in message && 'number' in message.about
      ? `${message.kind} ${message.about.number}${supersedes} → ${recipient}`
      : `${message.kind} → ${recipient}`;
  });
}
const lettersAboutIssues = async (): Promise<string[]> =>
  (await letters()).filter((letter) => !letter.startsWith('run finished'));

describe('issuing', () => {
  it('makes report, workbook and input once, each with the SHA-256 of its bytes, then tells the clients', async () => {
    const of = await checked();
    const made = await issue(of);
    expect(made.state).toBe('issued');
    expect(await stateOf(of)).toBe('issued');
    expect(await lettersAboutIssues()).toEqual([`issued ${made.number} → cli.entham@people.example`]);
    const files = await listIssueFiles(database.db, of.office, made.id);
    expect(files.map(({ kind }) => kind)).toEqual(['report', 'workbook', 'input']);
    for (const { kind, size, sha256: hash } of files) {
      const bytes = bytesOf(made, kind);
      expect([kind, bytes.length, sha256(bytes)]).toEqual([kind, size, hash]);
    }
    expect(bytesOf(made, 'report').subarray(0, 5).toString()).toBe('%PDF-');
    expect(files[0]?.pages).toBeGreaterThan(2);
    expect(logged).toEqual([]);
  });

  it('says on the workbook’s cover who prepared, approved and gets it, and under what number', async () => {
    const made = await issue(await checked());
    const book = new ExcelJS.Workbook();
    await book.xlsx.load(bytesOf(made, 'workbook') as unknown as ArrayBuffer);
    const cover = new Map<string, string>();
    book.getWorksheet('Cover')!.eachRow((row) => cover.set(String(row.getCell(1).value), String(row.getCell(2).value)));
    const today = made.issuedAt.slice(0, 10);
    expect(cover.get('issue')).toBe(made.number);
    expect(cover.get('prepared')).toContain('Ana Lyst');
    expect(cover.get('approved')).toBe(`Lea Dwright, ${today}`);
    expect(cover.get('issued to')).toBe('Cli Entham');
    expect(cover.get('note')).toBe('For the shop.');
    expect(cover.get('seal')).toContain('room for a seal');
    expect(cover.get('state')).toBeUndefined();
  });

  it('shows a client what was issued to them in their projects, and nothing else', async () => {
    const made = await issue(await checked());
    const [first, second] = clients.map(({ id }) => id) as [number, number];
    const seenBy = async (one: number) => (await listIssuesFor(database.db, office.office, one)).map(({ id }) => id);
    expect(await seenBy(first)).toEqual([made.id]);
    expect(await seenBy(second)).toEqual([]);
    expect(await findIssueFor(database.db, office.office, second, made.id)).toBeUndefined();
    const south = await testOffice(database, 'South');
    expect(await findIssue(database.db, south.office, made.id)).toBeUndefined();
    await updateAssigned(database.db, office.office, office.project, [second]);
    expect(await seenBy(first), 'no longer of the project').toEqual([]);
  });

  it('lets a later issue of the batch supersede the earlier one, whose clients get the later one too', async () => {
    const a = await checked();
    const first = await issue(a);
    const b = await checked(3, 2, a.batch);
    const second = await issue(b, { to: clients });
    expect([(await findIssue(database.db, a.office, first.id))?.state, await stateOf(a)]).toEqual(['superseded', 'superseded']);
    expect([second.state, await stateOf(b)]).toEqual(['issued', 'issued']);
    expect(second.supersedes?.number).toBe(first.number);
    expect((await findIssue(database.db, a.office, first.id))?.supersededBy?.number).toBe(second.number);
    expect([first.number, second.number]).toEqual([`P${office.project}-01`, `P${office.project}-02`]);
    expect((await lettersAboutIssues()).slice(1)).toEqual([
      `issued ${second.number} in place of ${first.number} → cli.entham@people.example`,
      `issued ${second.number} in place of ${first.number} → cli.entsley@people.example`,
    ]);
  });

  it('refuses, with the reason, whoever had a part in it, what is not checked, and a revision before the one in force', async () => {
    const a = await checked();
    const b = await checked(3, 5, a.batch);
    const asked = { note: null, clients: [], reportFrames: 'all' } as const;
    const queue = queueOf();
    const why = async (of: typeof a, by: Issuer): Promise<string> => {
      const answer = await askForIssue(queue, database, of, { ...asked, person: by });
      return 'why' in answer ? answer.why.join(' ') : 'asked';
    };
    expect(await why(a, { id: office.person, name: 'Ana Lyst', role: 'lead' })).toContain('You had a part in making it');
    expect(await why(a, { ...(await person('Che Cker', 'checker')), role: 'checker' })).toContain('the lead issues');
    await issue(b);
    expect(await why(a, lead)).toContain('Revision B, which is later, is issued');
    expect(await why(b, lead)).toContain('It is issued already');
  });

  it('begun again after a kill in mid-file makes that file anew, keeps the whole ones, and hands over once', async () => {
    const of = await checked();
    const calls: string[] = [];
    // the process dies while a thread has written a piece of the workbook: its job stays as it was
    const dying = queueOf({
      ...threads,
      makeIssue: async (task: Parameters<typeof makeIssue>[0]) => {
        calls.push('first life');
        database.raw
          .prepare(
            "insert into issue_file (issue, kind, name, size, sha256, made_at) values (?, 'report', 'r.pdf', 3, 'aa', 'then')",
          )
          .run(task.issue);
        for (const kind of ['report', 'workbook'])
          database.raw
            .prepare('insert into issue_piece (issue, kind, ordinal, bytes) values (?, ?, 0, ?)')
            .run(task.issue, kind, Buffer.from('abc'));
        await new Promise(() => undefined);
      },
    } as never);
    const asked = { note: null, clients: clients.slice(0, 1), reportFrames: 'all', person: lead } as const;
    await askForIssue(dying, database, of, asked);
    while (calls.length === 0) await new Promise((resolve) => setTimeout(resolve, 5));
    const next = queueOf();
    await next.start();
    await next.idle();
    const made = (await findIssueOfRevision(database.db, of.office, of.revision))!;
    expect(made.state).toBe('issued');
    const files = await listIssueFiles(database.db, of.office, made.id);
    expect(files.find(({ kind }) => kind === 'report')?.sha256, 'a whole file is not made again').toBe('aa');
    expect(sha256(bytesOf(made, 'workbook'))).toBe(files.find(({ kind }) => kind === 'workbook')?.sha256);
    expect(await lettersAboutIssues()).toHaveLength(1);
  });

  it('begun again after a kill between the hand-over and its record does nothing twice', async () => {
    const of = await checked();
    const made = await issue(of);
    const job = (await findLatestJob(database.db, of.office, of.revision, 'issue'))!;
    await database.db.updateTable('job').set({ state: 'running', finished_at: null }).where('id', '=', job.id).execute();
    const before = await listIssueFiles(database.db, of.office, made.id);
    const next = queueOf({ ...threads, makeIssue: () => expect.fail('no file is to be made again') } as never);
    await next.start();
    await next.idle();
    expect((await findLatestJob(database.db, of.office, of.revision, 'issue'))?.state).toBe('done');
    expect(await listIssueFiles(database.db, of.office, made.id)).toEqual(before);
    expect(await lettersAboutIssues()).toHaveLength(1);
    expect(logged).toEqual([]);
  });

  it('tells nobody where a file could not be made, leaves the revision checked, and gives the number again', async () => {
    const of = await checked();
    const broken = queueOf({ ...threads, makeIssue: () => Promise.reject(new Error('no room')) } as never);
    const failed = await issue(of, { queue: broken });
    expect([failed.state, await stateOf(of)]).toEqual(['failed', 'checked']);
    expect(await lettersAboutIssues()).toEqual([]);
    const again = await issue(of);
    expect([again.number, again.state]).toEqual([failed.number, 'issued']);
    expect(await findIssue(database.db, of.office, failed.id === again.id ? 0 : failed.id)).toBeUndefined();
  });

  it('is not begun where a checker returned the revision after it was looked at', async () => {
    const of = await checked();
    const basis = (await findIssueBasis(database.db, of.office, of.revision))!;
    await updateRevisionState(database.db, of.office, of.revision, ['checked'], 'returned');
    const asked = { note: null, clients: [], reportFrames: 'all', person: lead } as const;
    expect(await insertIssue(database.db, of.office, basis, asked)).toBeUndefined();
    // nor where it was passed again since, with what may be other acceptances
    await updateRevisionState(database.db, of.office, of.revision, ['returned'], 'checked');
    await database.db
      .updateTable('revision')
      .set({ checked_by: lead.id, checked_at: '2026-12-01T12:00:00.000Z' })
      .where('id', '=', of.revision)
      .execute();
    expect(await insertIssue(database.db, of.office, basis, asked)).toBeUndefined();
    const now = (await findIssueBasis(database.db, of.office, of.revision))!;
    expect(await insertIssue(database.db, of.office, now, asked)).toBeTypeOf('number');
  });

  it('hands nothing over where the revision was returned meanwhile', async () => {
    const of = await checked();
    const queue = queueOf({
      ...threads,
      makeIssue: async (task: Parameters<typeof makeIssue>[0]) => {
        await makeIssue(task);
        await updateRevisionState(database.db, of.office, of.revision, ['checked'], 'returned');
      },
    } as never);
    const made = await issue(of, { queue });
    expect([made.state, await stateOf(of)]).toEqual(['failed', 'returned']);
    expect(await lettersAboutIssues()).toEqual([]);
  });
});

describe('an issue that clients have', () => {
  it('is withdrawn with its reason, and everyone who was sent it or took a file of it is told', async () => {
    const of = await checked();
    const made = await issue(of);
    const [file] = await listIssueFiles(database.db, of.office, made.id);
    await insertDownload(database.db, of.office, { issue: made.id, file: file!.id, person: office.person });
    await insertDownload(database.db, of.office, { issue: made.id, file: file!.id, person: clients[0]!.id });
    expect((await listDownloads(database.db, of.office, made.id)).map(({ name }) => name)).toEqual(['Cli Entham', 'Ana Lyst']);
    const said = { by: lead, reason: 'The snow of depot 7 was halved.' };
    // whose sign-in has ended may build from it all the same
    await database.db.updateTable('membership').set({ ended_at: '2026-12-01' }).where('person', '=', clients[0]!.id).execute();
    expect(await withdrawIssue(database.db, made, said)).toBe(2);
    expect(await stateOf(of)).toBe('withdrawn');
    expect((await findIssue(database.db, of.office, made.id))?.withdrawn).toMatchObject({
      by: 'Lea Dwright',
      reason: said.reason,
    });
    expect((await lettersAboutIssues()).slice(1)).toEqual([
      `withdrawn ${made.number} → cli.entham@people.example`,
      `withdrawn ${made.number} → north@office.example`,
    ]);
    expect(await withdrawIssue(database.db, made, said), 'once').toBeUndefined();
    expect(await sendIssueTo(database.db, made, { by: lead, clients: clients.slice(1) }), 'to nobody more').toEqual([]);
    expect(await lettersAboutIssues()).toHaveLength(3);
  });

  it('can be sent to one more, who alone is told', async () => {
    const made = await issue(await checked());
    expect(await sendIssueTo(database.db, made, { by: lead, clients })).toEqual([clients[1]!.id]);
    expect((await lettersAboutIssues()).slice(1)).toEqual([`issued ${made.number} → cli.entsley@people.example`]);
  });

  it('takes a question to the lead and who prepared it, and the answer to who asked', async () => {
    const of = await checked();
    const made = await issue(of);
    const by = clients[0]!;
    const id = await insertQuestion(database.db, made, {
      by,
      frame: { index: 1, id: 'F2' },
      text: 'May the splice sit at 2.4 m?',
    });
    const ask = async () => (await listQuestions(database.db, of.office, made.id))[0]!;
    expect(await ask()).toMatchObject({ id, frameId: 'F2', open: true, answers: [] });
    await insertAnswer(database.db, made, await ask(), { by: lead, text: 'Yes.' });
    expect(await ask()).toMatchObject({ open: false });
    await insertAnswer(database.db, made, await ask(), { by, text: 'With how many bolts?' });
    expect(await ask()).toMatchObject({ open: true });
    expect((await lettersAboutIssues()).slice(1)).toEqual([
      `question ${made.number} → lea.dwright@people.example`,
      `question ${made.number} → north@office.example`,
      `answer ${made.number} → cli.entham@people.example`,
      `question ${made.number} → lea.dwright@people.example`,
      `question ${made.number} → north@office.example`,
    ]);
    expect(await listQuestions(database.db, of.office, made.id, { person: clients[1]!.id })).toEqual([]);
  });
});
