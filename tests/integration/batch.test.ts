import { spawn } from 'node:child_process';
import { existsSync, mkdtempSync, readdirSync, readFileSync, rmSync, statSync, writeFileSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import ExcelJS from 'exceljs';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { insertUpload } from '@/db/queries/uploads';
import { findRevisionById } from '@/db/queries/revisions';
import { resultsSchema, type ResultsJson } from '@/lib/results/schema';
import { askForReading, askForRun } from '@/worker/ask';
import { createPools } from '@/worker/pools';
import { WorkQueue } from '@/worker/queue';
import { reportStream, resultStream } from '@/worker/result-stream';
import { readPdf } from '@/worker/threads/read-pdf';
import { readingRevision, testDatabase, testOffice } from '@/worker/test-office';
import { sha256 } from './sha256';

const root = new URL('../..', import.meta.url).pathname;
const samples = join(root, 'samples');
const out = mkdtempSync(join(tmpdir(), 'tallyframe-batch-'));
afterAll(() => rmSync(out, { recursive: true, force: true }));

interface Ended {
  readonly code: number | null;
  readonly stdout: string;
  readonly stderr: string;
}

/** Types a command in a folder and waits for its end. */
function typed(folder: string, program: string, words: readonly string[]): Promise<Ended> {
  return new Promise((resolve) => {
    const child = spawn(program, words, { cwd: folder, stdio: ['ignore', 'pipe', 'pipe'] });
    let stdout = '';
    let stderr = '';
    child.stdout.on('data', (text: Buffer) => (stdout += text.toString()));
    child.stderr.on('data', (text: Buffer) => (stderr += text.toString()));
    child.on('exit', (code) => resolve({ code, stdout, stderr }));
  });
}
const batch = (...words: string[]): Promise<Ended> =>
  typed(samples, process.execPath, [join(root, 'worker/batch.mjs'), ...words]);
/** Where two texts part, with what stands round it in each; null where they are the same. Megabytes of JSON are no message. */
function firstDifference(one: string, other: string): readonly string[] | null {
  if (one === other) return null;
  let at = 0;
  while (one[at] === other[at]) at++;
  return [one, other].map((text) => text.slice(Math.max(0, at - 120), at + 60));
}
const sheetValues = (book: ExcelJS.Workbook, name: string): unknown => book.getWorksheet(name)?.getSheetValues();
const results = (name: string): ResultsJson => resultsSchema.parse(JSON.parse(readFileSync(join(out, name), 'utf8')));

// The first call builds what is stale; the others are to be judged by what they say.
beforeAll(async () => void (await batch()));

describe('the command line', () => {
  it('solves a workbook, ends with 0, and writes the published JSON and nothing else', async () => {
    const ended = await batch('pipe-rack-12.xlsx', '--json', join(out, 'rack.json'));
    expect(ended).toEqual({ code: 0, stdout: '', stderr: '' });
    const json = results('rack.json');
    expect(json.frames).toHaveLength(12);
    expect(json.frames.every((frame) => frame.status === 'solved' && frame.certificate !== null)).toBe(true);
    expect(json.input).toMatchObject({
      name: 'pipe-rack-12.xlsx',
      sha256: sha256(readFileSync(join(samples, 'pipe-rack-12.xlsx'))),
    });
  });

  it('gives the same bytes each time, over threads too', async () => {
    for (const name of ['one.json', 'two.json'])
      expect((await batch('portal-sheds-240.xlsx', '--json', join(out, name))).code).toBe(0);
    const one = readFileSync(join(out, 'one.json'));
    expect(one.length).toBeGreaterThan(1e6);
    expect(readFileSync(join(out, 'two.json')).equals(one)).toBe(true);
  });

  it('ends with 1 where some frames were not solved, and names the cells', async () => {
    const book = new ExcelJS.Workbook();
    await book.xlsx.readFile(join(samples, 'pipe-rack-12.xlsx'));
    const members = book.getWorksheet('Members')!;
    const frame = members.getCell('A3').text;
    members.getCell('E3').value = 'HE 2OO A';
    await book.xlsx.writeFile(join(out, 'slip.xlsx'));
    const ended = await batch(join(out, 'slip.xlsx'), '--json', join(out, 'slip.json'));
    expect(ended).toEqual({ code: 1, stdout: '', stderr: '' });
    const json = results('slip.json');
    expect(json.problems).toMatchObject([{ severity: 'error', code: 'unknown-section', sheet: 'Members', cell: 'E3', frame }]);
    expect(json.frames.filter((each) => each.status !== 'solved').map((each) => each.frame)).toEqual([frame]);
    expect(json.frames).toHaveLength(12);
  });

  it('ends with 1 where a frame is unstable in second order, and says in which combination and how far it got', async () => {
    const book = new ExcelJS.Workbook();
    await book.xlsx.readFile(join(samples, 'direct-analysis-us-9.xlsx'));
    const combinations = book.getWorksheet('Combinations')!;
    expect(combinations.getCell('A2').value).toBe('D+L');
    combinations.getCell('C2').value = 30;
    await book.xlsx.writeFile(join(out, 'unstable.xlsx'));
    const ended = await batch(join(out, 'unstable.xlsx'), '--json', join(out, 'unstable.json'));
    expect(ended).toEqual({ code: 1, stdout: '', stderr: '' });
    for (const frame of results('unstable.json').frames) {
      expect(frame).toMatchObject({ status: 'not solved', verdict: 'not checked', results: [], certificate: null });
      expect(frame.notChecked[0]).toMatch(/^not solved: D\+L →/);
      expect(frame.notChecked[0]).toMatch(/of its loads|squash/);
    }
    expect((await batch(join(out, 'unstable.xlsx'))).stdout).toMatch(/9 not solved[\s\S]*D\+L →/);
  });

  it.each([
    ['a file cut short', ['problems/unreadable.xlsx'], /./],
    ['a file that is not there', ['nowhere.xlsx'], /nowhere\.xlsx could not be read: there is no such file/],
    ['no file', [], /No file is named\.[\s\S]*Usage:/],
    ['an unknown option', ['pipe-rack-12.xlsx', '--pdf'], /--pdf is not an option\.[\s\S]*Usage:/],
    ['an option without its value', ['pipe-rack-12.xlsx', '--xlsx'], /--xlsx needs a file to write to\.[\s\S]*Usage:/],
  ])('ends with 2 and says why for %s', async (_what, words, why) => {
    const ended = await batch(...words);
    expect(ended.code).toBe(2);
    expect(ended.stdout).toBe('');
    expect(ended.stderr).toMatch(why);
  });

  it('takes paths from where it was typed, through npm too', async () => {
    const ended = await typed(samples, 'npm', [
      '--prefix', root, 'run', '--silent', 'batch', '--', 'pipe-rack-12.xlsx', '--json', join(out, 'npm.json'),
    ]); // prettier-ignore
    expect(ended).toMatchObject({ code: 0, stdout: '' });
    expect(existsSync(join(out, 'npm.json'))).toBe(true);
  });

  it('reads several CSV files as one batch', async () => {
    const files = readdirSync(join(samples, 'walkways-csv')).map((name) => `walkways-csv/${name}`);
    const ended = await batch(...files, '--json', join(out, 'walkways.json'));
    expect(ended.stderr).toBe('');
    expect(ended.code).toBe(0);
    expect(results('walkways.json').input.files).toHaveLength(files.length);
  });

  it('ends with 0 where the list of frames leaves none to solve', async () => {
    const sheets = {
      Frames: 'frame,run\nF1,no\n',
      Nodes: 'frame,node,x,y\nF1,A,0,0\nF1,B,3,0\n',
      Members: 'frame,member,start,end,section\nF1,AB,A,B,IPE 200\n',
      Supports: 'frame,node,ux,uy,rz\nF1,A,fixed,fixed,fixed\n',
    };
    const files = Object.entries(sheets).map(([name, text]) => {
      const path = join(out, `${name}.csv`);
      writeFileSync(path, text);
      return path;
    });
    const ended = await batch(...files, '--json', join(out, 'none.json'));
    expect(ended).toMatchObject({ code: 0, stderr: expect.stringContaining('nothing to solve') as string });
    expect(results('none.json').frames).toEqual([]);
  });

  it('prints a summary where no output is named', async () => {
    const { code, stdout } = await batch('pipe-rack-12.xlsx');
    expect(code).toBe(0);
    expect(stdout).toMatch(/^12 frames: \d+ over, \d+ not checked, \d+ near, \d+ within; 0 not solved$/m);
    expect(stdout).toMatch(/^frame +verdict +ratio +governed by, why not checked$/m);
  });

  it('writes the workbook, and its sheets as CSV with the same rows', async () => {
    const ended = await batch('pipe-rack-12.xlsx', '--xlsx', join(out, 'rack.xlsx'), '--csv', join(out, 'rack'));
    expect(ended).toEqual({ code: 0, stdout: '', stderr: '' });
    const book = new ExcelJS.Workbook();
    await book.xlsx.readFile(join(out, 'rack.xlsx'));
    const names = book.worksheets.map((sheet) => sheet.name);
    expect(names.slice(0, 4)).toEqual(['Cover', 'Frames', 'Flags', 'Members']);
    expect(readdirSync(join(out, 'rack')).sort()).toEqual(names.map((name) => `${name}.csv`).sort());
    const frames = readFileSync(join(out, 'rack', 'Frames.csv'), 'utf8')
      .trim()
      .split('\r\n');
    expect(frames).toHaveLength(book.getWorksheet('Frames')!.rowCount);
    expect(frames).toHaveLength(13);
  });

  it('writes the calculation report as a draft, with a bookmark for every frame', async () => {
    const ended = await batch('braced-bents-12.xlsx', '--report', join(out, 'bents.pdf'));
    expect(ended).toEqual({ code: 0, stdout: '', stderr: '' });
    const { pages, outline } = await readPdf(readFileSync(join(out, 'bents.pdf')));
    expect(outline.at(-1)!.items.map(({ title }) => title)).toEqual(Array.from({ length: 12 }, (_, i) => `X${String(i + 1).padStart(2, '0')}`)); // prettier-ignore
    expect(pages.every((text) => text.includes('draft, not issued'))).toBe(true);
  });

  it('lists every combination with --all', async () => {
    await batch('pipe-rack-12.xlsx', '--json', join(out, 'all.json'), '--all');
    const count = (name: string): number => results(name).frames.reduce((sum, frame) => sum + frame.checks.length, 0);
    expect(count('all.json')).toBeGreaterThan(count('rack.json'));
    expect(results('all.json').frames.map((frame) => frame.governing)).toEqual(
      results('rack.json').frames.map((f) => f.governing),
    );
  });

  it('says what is in the way of an output', async () => {
    writeFileSync(join(out, 'taken'), '');
    const ended = await batch('pipe-rack-12.xlsx', '--json', join(out, 'taken', 'x.json'));
    expect(ended.code).toBe(2);
    expect(ended.stderr).toMatch(/x\.json could not be written/);
  });
});

describe('the queue and the command line', () => {
  it('give the same JSON for the same file, the queue through its threads and the database', async () => {
    const database = await testDatabase();
    const pools = createPools(join(root, 'dist-worker'));
    const faults: unknown[] = [];
    const queue = new WorkQueue({ database, file: database.file, pools, log: (_, facts) => faults.push(facts['error']) });
    try {
      for (const [name, folder] of [
        ['portal-sheds-240.xlsx', samples],
        ['slender-sheds-24.xlsx', samples],
        ['direct-analysis-us-9.xlsx', samples],
        ['braced-bents-12.xlsx', samples],
        ['slip.xlsx', out],
      ] as const) {
        const of = await readingRevision(database, await testOffice(database, name));
        const bytes = readFileSync(join(folder, name));
        const { office, revision, person } = of;
        const size = statSync(join(folder, name)).size;
        await insertUpload(database.db, office, { revision, name, size, sha256: sha256(bytes), bytes, person });
        await askForReading(queue, database, of);
        await queue.idle();
        expect(await askForRun(queue, database, of)).toBe(true);
        await queue.idle();
        expect(faults).toEqual([]);
        expect((await findRevisionById(database.db, office, revision))?.state).toBe('run');
        const stream = resultStream(pools, { file: database.file, office, revision, as: 'json' });
        const json = Buffer.from(await new Response(stream).arrayBuffer());
        await batch(join(folder, name), '--json', join(out, 'same.json'));
        expect(firstDifference(json.toString(), readFileSync(join(out, 'same.json'), 'utf8')), name).toBeNull();
        if (name === 'portal-sheds-240.xlsx') {
          // Someone who goes away in the middle takes the thread with him and leaves the next one undisturbed.
          const reader = resultStream(pools, { file: database.file, office, revision, as: 'json' }).getReader();
          expect((await reader.read()).value?.byteLength).toBeGreaterThan(1000);
          await reader.cancel();
        }
        // Workbooks take long to be read whole: of one with slack members and of one with problems.
        if (!['braced-bents-12.xlsx', 'slip.xlsx'].includes(name)) continue;
        const book = new ExcelJS.Workbook();
        const workbook = resultStream(pools, { file: database.file, office, revision, as: 'xlsx' });
        await book.xlsx.load(await new Response(workbook).arrayBuffer());
        expect(book.worksheets[0]?.name).toBe('Cover');
        const report = reportStream(pools, { file: database.file, office, revision, frames: [1] });
        const { pages, outline } = await readPdf(Buffer.from(await new Response(report).arrayBuffer()));
        expect(outline.at(-1)!.items).toHaveLength(1);
        expect(pages[0]).toContain((await findRevisionById(database.db, office, revision))!.projectName);
        const own = `${name}-own.xlsx`;
        await batch(join(folder, name), '--xlsx', join(out, own));
        const typedBook = new ExcelJS.Workbook();
        await typedBook.xlsx.readFile(join(out, own));
        for (const sheet of ['Frames', 'Analysis', 'Applied load totals', 'Reactions'])
          expect(sheetValues(book, sheet), `${name} ${sheet}`).toEqual(sheetValues(typedBook, sheet));
        expect(book.getWorksheet('Analysis') !== undefined).toBe(folder === samples);
      }
    } finally {
      await queue.close();
      await pools.close();
      await database.remove();
    }
  });
});
