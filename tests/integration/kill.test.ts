import { spawn } from 'node:child_process';
import { createHash } from 'node:crypto';
import { copyFileSync, mkdtempSync, readFileSync, rmSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { migrate } from '@/db/migrate';
import { openDatabase, type OpenDatabase } from '@/db/open';
import { insertJob } from '@/db/queries/jobs';
import { countWaiting } from '@/db/queries/results';
import { findRevisionById } from '@/db/queries/revisions';
import { insertUpload } from '@/db/queries/uploads';
import { resultsJson } from '@/lib/results/json';
import { portalSheds } from '@/samples/portal-sheds';
import { writeWorkbook } from '@/samples/write';
import { chunkSize } from '@/worker/run-work';
import { readingRevision, testOffice } from '@/worker/test-office';
import { revisionSource } from '@/worker/threads/revision-source';
import { buildChild } from '../setup/build-child';
import { sha256 } from './sha256';

const root = new URL('../..', import.meta.url).pathname;
const bundles = join(root, 'dist-worker');
const folder = mkdtempSync(join(tmpdir(), 'tallyframe-kill-'));
const child = join(root, 'dist-worker', 'kill-child.mjs');
const seed = 20261201;

beforeAll(async () => {
  // The bundler runs as a program, since it is plain JavaScript without types.
  await ended(spawn(process.execPath, ['worker/build.mjs'], { cwd: root, stdio: 'inherit' }));
  await buildChild('kill-child.ts', child);
});
afterAll(() => {
  rmSync(folder, { recursive: true, force: true });
  rmSync(child, { force: true });
});

interface Revision {
  readonly office: number;
  readonly revision: number;
  readonly person: number;
}

/** Enough for ten lives that each do a chunk or two. */
const frames = 600;

/** An office with portals brought in and waiting to be read. */
async function prepare(file: string): Promise<Revision> {
  const database = openDatabase(file);
  await migrate(database.db);
  await writeWorkbook(folder, 'sheds.xlsx', portalSheds(frames / 20));
  const bytes = readFileSync(join(folder, 'sheds.xlsx'));
  const { office, revision, person } = await readingRevision(database, await testOffice(database, 'North'));
  const upload = { revision, name: 'sheds.xlsx', size: bytes.length, sha256: sha256(bytes), bytes, person };
  await insertUpload(database.db, office, upload);
  await insertJob(database.db, office, { kind: 'read', revision, person });
  database.raw.pragma('wal_checkpoint(TRUNCATE)');
  await database.close();
  return { office, revision, person };
}

const ended = (process: ReturnType<typeof spawn>): Promise<number | null> =>
  new Promise((resolve) => process.on('exit', (code) => resolve(code)));

interface Kill {
  readonly after: 'started' | 'chunk' | 'solved';
  readonly ms: number;
}

/**
 * Starts the working process; kills it some time after it has said a word.
 * @returns whether it was killed before its end, and the time from its first chunk to its end
 */
async function live(file: string, { office, revision, person }: Revision, kill?: Kill): Promise<{ killed: boolean; ms: number }> {
  const words = [child, file, bundles, `${office},${revision},${person}`];
  const process_ = spawn(process.execPath, words, { cwd: root, stdio: ['ignore', 'pipe', 'inherit'] });
  let killing = false;
  let said = '';
  let from = 0;
  process_.stdout.on('data', (text: Buffer) => {
    said += text.toString();
    if (from === 0 && said.includes('chunk')) from = performance.now();
    if (!kill || killing || !said.includes(kill.after)) return;
    killing = true;
    setTimeout(() => process_.kill('SIGKILL'), kill.ms);
  });
  const code = await ended(process_);
  if (code !== 0 && code !== null) throw new Error(`The working process ended with ${code}`);
  return { killed: code === null, ms: performance.now() - from };
}

const tables = [
  ['frame_version', 'id'],
  ['result_state', 'version, ordinal'],
  ['revision_frame', 'revision, frame'],
  ['member_row', 'revision, frame, member'],
  ['check_row', 'revision, frame, ordinal'],
  ['reaction_row', 'revision, frame, result, support'],
  ['movement_row', 'revision, frame, result, node_index'],
  ['frame_result', 'revision, frame, result'],
  ['frame_peak', 'revision, frame'],
  ['tally', 'revision, list, a, b, c, d, e'],
  ['problem', 'revision, ordinal'],
  ['input_row', 'revision, ordinal'],
] as const;

/** Every row of what a run leaves, but for the moments at which it was solved. */
function contents({ raw }: OpenDatabase): Record<string, string> {
  return Object.fromEntries(
    tables.map(([table, order]) => {
      const rows = raw.prepare<[], Record<string, unknown>>(`select * from ${table} order by ${order}`).iterate();
      const hash = createHash('sha256');
      let count = 0;
      for (const { solved_at: _moment, ...row } of rows) {
        count += 1;
        for (const value of Object.values(row))
          hash.update(Buffer.isBuffer(value) ? value : `${typeof value} ${String(value)}\n`);
      }
      return [table, `${count} rows ${hash.digest('hex')}`];
    }),
  );
}

async function json(database: OpenDatabase, { office, revision }: Revision): Promise<string> {
  let text = '';
  for await (const piece of resultsJson(await revisionSource(database, office, revision), { all: false })) text += piece;
  return text;
}

/** A generator of numbers from 0 to 1 that always gives the same ones (mulberry32). */
function random(from: number): () => number {
  let a = from;
  return () => {
    a = (a + 0x6d2b79f5) | 0;
    let t = Math.imul(a ^ (a >>> 15), 1 | a);
    t = (t + Math.imul(t ^ (t >>> 7), 61 | t)) ^ t;
    return ((t ^ (t >>> 14)) >>> 0) / 2 ** 32;
  };
}

describe(`a process killed in mid-work (seed ${seed})`, () => {
  it('starts again, loses nothing, does nothing twice, and ends with the bytes of an undisturbed run', async () => {
    const calm = join(folder, 'calm.sqlite');
    const troubled = join(folder, 'troubled.sqlite');
    const revision = await prepare(calm);
    copyFileSync(calm, troubled);
    const { ms } = await live(calm, revision);
    // Moments are drawn in shares of the time that this machine takes for a chunk, so that they fall in mid-run on any.
    const chunk = ms / (frames / chunkSize);

    const next = random(seed);
    const moments = [
      ...Array.from({ length: 2 }, (): Kill => ({ after: 'started', ms: next() * 2 * chunk })),
      ...Array.from({ length: 10 }, (_, i): Kill => ({ after: i % 2 ? 'solved' : 'chunk', ms: next() * chunk })),
    ];
    const leftAfter: number[] = [];
    for (const moment of moments) {
      const { killed } = await live(troubled, revision, moment);
      expect(killed, `it was killed ${moment.ms} ms after “${moment.after}”, before it had finished`).toBe(true);
      const database = openDatabase(troubled);
      leftAfter.push(countWaiting(database.raw, revision.revision).waiting);
      await database.close();
    }
    await live(troubled, revision);

    const [one, other] = [openDatabase(calm), openDatabase(troubled)];
    for (const { db } of [one, other])
      expect((await findRevisionById(db, revision.office, revision.revision))?.state).toBe('run');
    expect(await json(other, revision)).toBe(await json(one, revision));
    expect(contents(other)).toEqual(contents(one));
    // Kills fell between frames that were kept and frames that were not, several times over.
    expect(new Set(leftAfter.filter((left) => left > 0 && left < frames)).size).toBeGreaterThan(3);
    await one.close();
    await other.close();
  }, 180_000);
});
