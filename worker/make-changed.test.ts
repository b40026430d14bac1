/** The whole way of a change: from a revision's rows to the next one's results, and out again as an input workbook. */
import { readFileSync } from 'node:fs';
import { basename } from 'node:path';
import { unzipSync } from 'fflate';
import { afterEach, beforeEach, describe, expect, it } from 'vitest';
import { listActivity } from '@/db/queries/activity';
import { findRevision, type RevisionRecord } from '@/db/queries/revisions';
import { listUploadedFiles, listUploads, insertUpload } from '@/db/queries/uploads';
import { listProblems, listSheets } from '@/db/queries/problems';
import { changeWords } from '@/lib/changes/change-words';
import { reportSheets } from '@/lib/reports/workbook/report-sheets';
import { resultsJson } from '@/lib/results/json';
import { askForChange, askForReading, askForRun } from './ask';
import { WorkQueue } from './queue';
import { pretendPools, readingRevision, testDatabase, testOffice, type TestDatabase, type TestOffice } from './test-office';
import { tellFailures } from './threads/failures';
import { listRun } from './threads/list-run';
import { readRevision } from './threads/read';
import { revisionSource } from './threads/revision-source';
import { solveChunk } from './threads/solve';
import { writeMarkedCopy } from './threads/write-marked-copy';
import { writeInput } from './threads/write-input';
import { openOnce } from './threads/open-once';

let database: TestDatabase;
let office: TestOffice;
let queue: WorkQueue;
let solved: number;
const logged: unknown[] = [];

beforeEach(async () => {
  database = await testDatabase();
  office = await testOffice(database, 'North');
  solved = 0;
  const solve = (task: Parameters<typeof solveChunk>[0]) => {
    solved += task.versions.length;
    return solveChunk(task);
  };
  const pools = pretendPools({ readRevision, listRun, solveChunk: solve, tellFailures });
  queue = new WorkQueue({ database, file: database.file, pools, log: (...line) => logged.push(line) });
});
afterEach(async () => {
  await openOnce(database.file).close();
  await database.remove();
  expect(logged.splice(0)).toEqual([]);
});

interface Sent {
  readonly name: string;
  readonly bytes: Uint8Array;
}

const samples = (...paths: string[]): Sent[] =>
  paths.map((path) => ({ name: basename(path), bytes: readFileSync(`samples/${path}`) }));

async function bring(files: readonly Sent[], batch?: number): Promise<RevisionRecord> {
  const of = await readingRevision(database, office, batch);
  for (const { name, bytes } of files) {
    const upload = { revision: of.revision, name, bytes, size: bytes.length, sha256: 'a'.repeat(64), person: of.person };
    await insertUpload(database.db, of.office, upload);
  }
  await askForReading(queue, database, of);
  await queue.idle();
  return (await listed(of.batch)).at(-1)!;
}

async function listed(batch: number): Promise<RevisionRecord[]> {
  const letters = ['A', 'B', 'C', 'D'];
  const found = await Promise.all(letters.map((letter) => findRevision(database.db, office.office, batch, letter)));
  return found.filter((one) => one !== undefined);
}

async function run({ id }: RevisionRecord): Promise<void> {
  expect(await askForRun(queue, database, { office: office.office, revision: id, person: office.person })).toBe(true);
  await queue.idle();
}

async function change(
  from: RevisionRecord,
  changes: readonly Parameters<typeof changeWords>[0][],
  runIt = true,
): Promise<RevisionRecord> {
  const words = changes.map((one) => ({ change: one, ...changeWords(one, from.settings!) }));
  const made = { from: from.id, person: office.person, changes: words, reason: 'to see', run: runIt };
  expect(await askForChange(queue, database, office.office, made)).toBeDefined();
  await queue.idle();
  return (await listed(from.batch)).at(-1)!;
}

/** The `frames` of the published JSON, as text. */
async function framesJson({ id }: RevisionRecord): Promise<string> {
  let text = '';
  for await (const piece of resultsJson(await revisionSource(database, office.office, id), { all: false })) text += piece;
  return text.slice(text.indexOf('"frames":'));
}

const walkways = ['Combinations', 'Load cases', 'Member loads', 'Members', 'Nodes', 'Sections', 'Setup', 'Supports'];

describe('a revision made by a setting', () => {
  it.each([
    ['a workbook', ['pipe-rack-12.xlsx']],
    ['text files', walkways.map((name) => `walkways-csv/${name}.csv`)],
    ['families', ['families/portal.xlsx']],
  ])('written out and uploaded anew gives the very same frames: %s', async (_, paths) => {
    const a = await bring(samples(...paths));
    await run(a);
    const b = await change(a, [
      { kind: 'setting', setting: 'swayRatio', value: '123' },
      { kind: 'setting', setting: 'nearLimit', value: '0.05' },
      { kind: 'setting', setting: 'deflectionRatio', value: '321' },
    ]);
    expect(b).toMatchObject({
      letter: 'B',
      state: 'run',
      madeFrom: 'A',
      settings: { ...a.settings, swayRatio: 123, nearLimit: 0.05, deflectionRatio: 321 },
    });
    expect(b.origins?.swayRatio.changedBy).toBe('Ana Lyst');
    const again = await bring([await writeInput({ file: database.file, office: office.office, revision: b.id })]);
    await run(again);
    expect(await framesJson(again)).toBe(await framesJson(b));
    expect(await framesJson(b)).not.toBe(await framesJson(a));
  });

  it('has the problems that its rows had, at their cells', async () => {
    const a = await bring(samples('messy.xlsx'));
    const b = await change(a, [{ kind: 'setting', setting: 'stability', value: 'by others' }], false);
    expect(b).toMatchObject({ state: 'read', frames: a.frames, framesStopped: a.framesStopped });
    const problems = async ({ id }: RevisionRecord) =>
      (await listProblems(database.db, office.office, id)).map(({ severity, code, sheet, cell, frames }) => [severity, code, sheet, cell, frames]); // prettier-ignore
    expect(await problems(b)).toEqual(await problems(a));
    expect(await listSheets(database.db, office.office, b.id)).toHaveLength(
      (await listSheets(database.db, office.office, a.id)).length,
    );
  });

  it('gives a marked copy of its own workbook, each bad cell with its note', async () => {
    const a = await bring(samples('messy.xlsx'));
    const b = await change(a, [{ kind: 'setting', setting: 'stability', value: 'by others' }], false);
    const copy = await writeMarkedCopy({ file: database.file, office: office.office, revision: b.id });
    expect(copy.name).toBe('Brackets B marked.xlsx');
    const parts = Object.keys(unzipSync(new Uint8Array(copy.bytes)));
    expect(parts.filter((path) => /comments\d*\.xml$/.test(path)).length).toBeGreaterThan(1);
  });

  it('is told on the cover of its results', async () => {
    const a = await bring(samples('pipe-rack-12.xlsx'));
    const b = await change(a, [{ kind: 'setting', setting: 'nearLimit', value: '0.8' }], false);
    const cover = (await reportSheets(await revisionSource(database, office.office, b.id)))[0]!;
    const lines: string[] = [];
    for await (const row of cover.rows()) lines.push(row.join(' '));
    expect(lines).toEqual(
      expect.arrayContaining(['near limit 0.8 changed on screen by Ana Lyst', ' near limit: 0.90 → 0.80', ' why: to see']),
    );
    expect(lines.join('\n')).toMatch(/made by a change from revision A by Ana Lyst/);
  });

  it('is known by its own input workbook', async () => {
    const a = await bring(samples('pipe-rack-12.xlsx'));
    const b = await change(a, [{ kind: 'setting', setting: 'nearLimit', value: '0.8' }], false);
    const [kept] = await listUploads(database.db, office.office, b.id);
    expect(kept?.name).toBe('Brackets B.xlsx');
    expect(b.input).toMatchObject({ name: kept?.name, sha256: kept?.sha256 });
    expect(b.input?.sha256).not.toBe(a.input?.sha256);
    const [file] = await listUploadedFiles(database.db, office.office, b.id);
    const written = await writeInput({ file: database.file, office: office.office, revision: b.id });
    expect(Buffer.compare(Buffer.from(file!.bytes), Buffer.from(written.bytes))).toBe(0);
  });

  it('runs nothing again that the change leaves alone, or that an earlier revision ran already', async () => {
    const a = await bring(samples('pipe-rack-12.xlsx'));
    await run(a);
    const inAll = solved;
    expect(inAll).toBeGreaterThan(0);
    const b = await change(a, [{ kind: 'setting', setting: 'title', value: 'Racks, east side' }]);
    expect([b.state, b.title, solved]).toEqual(['run', 'Racks, east side', inAll]);
    const c = await change(b, [{ kind: 'setting', setting: 'nearLimit', value: '0.8' }]);
    expect([c.state, solved]).toEqual(['run', 2 * inAll]);
    const d = await change(c, [{ kind: 'setting', setting: 'nearLimit', value: String(a.settings!.nearLimit) }]);
    expect([d.letter, d.state, solved]).toEqual(['D', 'run', 2 * inAll]);
    expect(await framesJson(d)).toBe(await framesJson(a));
  });

  it('waits to be run where that was not asked, and says in the activity who ran it where it was', async () => {
    const a = await bring(samples('pipe-rack-12.xlsx'));
    const b = await change(a, [{ kind: 'setting', setting: 'nearLimit', value: '0.8' }], false);
    expect([b.state, solved]).toEqual(['read', 0]);
    const c = await change(b, [{ kind: 'setting', setting: 'nearLimit', value: '0.7' }]);
    expect(c.state).toBe('run');
    const entries = await listActivity(database.db, office.office);
    expect(entries.map(({ what, letter, person }) => [what, letter, person])).toEqual([
      ['started a run', 'C', 'Ana Lyst'],
      ['made a revision by a change', 'C', 'Ana Lyst'],
      ['made a revision by a change', 'B', 'Ana Lyst'],
    ]);
  });

  it('can be made of rows that were kept before they said which sheet they stand on', async () => {
    const a = await bring(samples('pipe-rack-12.xlsx'));
    database.raw.prepare('update input_row set part = null, marks = null where revision = ?').run(a.id);
    const b = await change(a, [{ kind: 'setting', setting: 'nearLimit', value: '0.8' }], false);
    expect(b).toMatchObject({ state: 'read', frames: a.frames, framesStopped: a.framesStopped, settings: { nearLimit: 0.8 } });
  });
});
