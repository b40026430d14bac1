/** A process killed while an issue is being made: it is made once all the same, with the bytes of an undisturbed making. */
import { spawn } from 'node:child_process';
import { copyFileSync, mkdtempSync, readFileSync, rmSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { migrate } from '@/db/migrate';
import { openDatabase } from '@/db/open';
import { findIssueBasis } from '@/db/queries/issue-basis';
import { issueFilePieces, listIssueFiles } from '@/db/queries/issue-files';
import { insertIssue } from '@/db/queries/issue-making';
import { findIssueOfRevision } from '@/db/queries/issues';
import { insertJob } from '@/db/queries/jobs';
import { insertPerson } from '@/db/queries/people';
import { updateRevisionState } from '@/db/queries/revisions';
import { insertUpload } from '@/db/queries/uploads';
import { portalSheds } from '@/samples/portal-sheds';
import { writeWorkbook } from '@/samples/write';
import { readingRevision, testOffice } from '@/worker/test-office';
import { buildChild } from '../setup/build-child';
import { sha256 } from './sha256';

const root = new URL('../..', import.meta.url).pathname;
const folder = mkdtempSync(join(tmpdir(), 'tallyframe-issue-kill-'));
const child = join(root, 'dist-worker', 'issue-kill-child.mjs');

beforeAll(async () => {
  // The bundler runs as a program, since it is plain JavaScript without types.
  await ended(spawn(process.execPath, ['worker/build.mjs'], { cwd: root, stdio: 'inherit' }));
  await buildChild('kill-child.ts', child);
});
afterAll(() => {
  rmSync(folder, { recursive: true, force: true });
  rmSync(child, { force: true });
});

const ended = (process_: ReturnType<typeof spawn>): Promise<number | null> =>
  new Promise((resolve) => process_.on('exit', (code) => resolve(code)));

interface Of {
  readonly office: number;
  readonly revision: number;
  readonly person: number;
}

/** Lets the working process take up what is unfinished. @returns whether it was killed, and ms from its start to its end */
async function live(file: string, of: Of | null, killAfter_ms?: number): Promise<{ killed: boolean; ms: number }> {
  const words = [child, file, join(root, 'dist-worker'), ...(of ? [`${of.office},${of.revision},${of.person}`] : [])];
  const process_ = spawn(process.execPath, words, { cwd: root, stdio: ['ignore', 'pipe', 'inherit'] });
  let from = performance.now();
  process_.stdout.on('data', (text: Buffer) => {
    if (!text.toString().includes('started')) return;
    from = performance.now();
    if (killAfter_ms !== undefined) setTimeout(() => process_.kill('SIGKILL'), killAfter_ms);
  });
  const code = await ended(process_);
  if (code !== 0 && code !== null) throw new Error(`The working process ended with ${code}`);
  return { killed: code === null, ms: performance.now() - from };
}

/** Sheds that were run and passed, and the wish to issue them to one client. */
async function prepare(file: string): Promise<Of> {
  const database = openDatabase(file);
  await migrate(database.db);
  const { db } = database;
  await writeWorkbook(folder, 'sheds.xlsx', portalSheds(1));
  const bytes = readFileSync(join(folder, 'sheds.xlsx'));
  const { office, revision, person } = await readingRevision(database, await testOffice(database, 'North'));
  await insertUpload(db, office, { revision, name: 'sheds.xlsx', size: bytes.length, sha256: sha256(bytes), bytes, person });
  await insertJob(db, office, { kind: 'read', revision, person });
  await live(file, { office, revision, person });
  expect(await updateRevisionState(db, office, revision, ['run'], 'checked')).toBe(true);
  const of = async (name: string, role: 'lead' | 'client') => ({
    id: (await insertPerson(db, office, { email: `${role}@north.example`, name, role, passwordHash: 'none' }))!,
    name,
  });
  const [lead, client] = [await of('Lea Dwright', 'lead'), await of('Cli Entham', 'client')];
  const basis = (await findIssueBasis(db, office, revision))!;
  const asked = { note: null, clients: [client], reportFrames: 'flagged', person: lead } as const;
  expect(await insertIssue(db, office, basis, asked)).toBeDefined();
  database.raw.pragma('wal_checkpoint(TRUNCATE)');
  await database.close();
  return { office, revision, person };
}

/** What came of it: states, letters, and each file by the SHA-256 of the bytes that are kept. */
async function outcome(file: string, { office, revision }: Of) {
  const { db, raw, close } = openDatabase(file);
  const issue = (await findIssueOfRevision(db, office, revision))!;
  const files = await listIssueFiles(db, office, issue.id);
  const letters = await db.selectFrom('outbox').select(['kind', 'recipient']).where('kind', '=', 'issued').execute();
  const told = {
    state: issue.state,
    letters,
    files: files.map(({ kind, sha256: said }) => {
      const bytes = Buffer.concat([...issueFilePieces(raw, issue.id, kind)]);
      const kept = sha256(bytes);
      expect(kept, `the ${kind} that is kept is the one that was recorded`).toBe(said);
      // the entries of a workbook's zip carry the clock
      return { kind, sha256: kind === 'workbook' ? null : kept };
    }),
    issues: await db.selectFrom('issue').select('number').execute(),
  };
  await close();
  return told;
}

describe('a process killed while an issue is made', () => {
  it('makes it once all the same, with the files of an undisturbed making, and tells each client once', async () => {
    const calm = join(folder, 'calm.sqlite');
    const troubled = join(folder, 'troubled.sqlite');
    const of = await prepare(calm);
    copyFileSync(calm, troubled);
    const { ms } = await live(calm, null);
    const undisturbed = await outcome(calm, of);
    expect(undisturbed.state).toBe('issued');
    expect(undisturbed.files.map(({ kind }) => kind)).toEqual(['report', 'workbook', 'input']);

    let kills = 0;
    // moments in shares of the time that this machine takes, the last of them about the hand-over
    for (const share of [0.25, 0.6, 0.85]) if ((await live(troubled, null, share * ms)).killed) kills++;
    await live(troubled, null);
    expect(kills).toBeGreaterThan(0);
    expect(await outcome(troubled, of)).toEqual(undisturbed);
  }, 180_000);
});
