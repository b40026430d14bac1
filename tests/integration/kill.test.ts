import { spawn } from 'node:child_process';
import { copyFileSync, mkdtempSync, readFileSync, rmSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { build } from 'esbuild';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { migrate } from '@/db/migrate';
import { openDatabase, type OpenDatabase } from '@/db/open';
import { insertJob } from '@/db/queries/jobs';
import { countWaiting } from '@/db/queries/results';
import { findRevisionById } from '@/db/queries/revisions';
import { insertUpload } from '@/db/queries/uploads';
import { resultsJson } from '@/lib/results/json';
import { readingRevision, testOffice } from '@/worker/test-office';
import { revisionSource } from '@/worker/threads/revision-source';
import { sha256 } from './sha256';

const root = new URL('../..', import.meta.url).pathname;
const bundles = join(root, 'dist-worker');
const folder = mkdtempSync(join(tmpdir(), 'tallyframe-kill-'));
const child = join(root, 'dist-worker', 'kill-child.mjs');
const seed = 20261201;

beforeAll(async () => {
  // The bundler runs as a program, since it is plain JavaScript without types.
  await ended(spawn(process.execPath, ['worker/build.mjs'], { cwd: root, stdio: 'inherit' }));
  await build({
    entryPoints: [join(root, 'tests/integration/kill-child.ts')],
    outfile: child,
    bundle: true,
    platform: 'node',
    target: 'node20',
    format: 'esm',
    packages: 'external',
    tsconfig: join(root, 'tsconfig.json'),
    logLevel: 'warning',
  });
});
afterAll(() => rmSync(folder, { recursive: true, force: true }));

interface Revision {
  readonly office: number;
  readonly revision: number;
  readonly person: number;
}

/** Two offices, each with the thousand portals brought in and waiting to be read. */
async function prepare(file: string): Promise<Revision[]> {
  const database = openDatabase(file);
  await migrate(database.db);
  const bytes = readFileSync(join(root, 'samples/portal-sheds-1000.xlsx'));
  const made: Revision[] = [];
  for (const name of ['North', 'South']) {
    const of = await readingRevision(database, await testOffice(database, name));
    const { office, revision, person } = of;
    const upload = { revision, name: 'sheds.xlsx', size: bytes.length, sha256: sha256(bytes), bytes, person };
    await insertUpload(database.db, office, upload);
    await insertJob(database.db, office, { kind: 'read', revision, person });
    made.push({ office, revision, person });
  }
  database.raw.pragma('wal_checkpoint(TRUNCATE)');
  await database.close();
  return made;
}

const ended = (process: ReturnType<typeof spawn>): Promise<number | null> =>
  new Promise((resolve) => process.on('exit', (code) => resolve(code)));

/** Starts the working process; kills it some time after it has said a word. True where it was killed before its end. */
async function live(
  file: string,
  revisions: readonly Revision[],
  kill?: { readonly after: 'started' | 'chunk'; readonly ms: number },
): Promise<boolean> {
  const names = revisions.map(({ office, revision, person }) => `${office},${revision},${person}`);
  const process_ = spawn(process.execPath, [child, file, bundles, ...names], { cwd: root, stdio: ['ignore', 'pipe', 'inherit'] });
  let killing = false;
  let said = '';
  process_.stdout.on('data', (text: Buffer) => {
    said += text.toString();
    if (!kill || killing || !said.includes(kill.after)) return;
    killing = true;
    setTimeout(() => process_.kill('SIGKILL'), kill.ms);
  });
  const code = await ended(process_);
  if (code !== 0 && code !== null) throw new Error(`The working process ended with ${code}`);
  return code === null;
}

const tables = [
  ['frame_version', 'id'],
  ['result_state', 'version, ordinal'],
  ['member_result', 'version, result, member'],
  ['revision_frame', 'revision, frame'],
  ['member_row', 'revision, frame, member'],
  ['check_row', 'revision, frame, ordinal'],
  ['reaction_row', 'revision, frame, result, support'],
  ['movement_row', 'revision, frame, result, node_index'],
  ['tally', 'revision, list, a, b, c, d, e'],
  ['problem', 'revision, ordinal'],
  ['input_row', 'revision, ordinal'],
] as const;

/** Every row of what a run leaves, but for the moments at which it was solved. */
function contents({ raw }: OpenDatabase): Record<string, string> {
  return Object.fromEntries(
    tables.map(([table, order]) => {
      const rows = raw.prepare<[], Record<string, unknown>>(`select * from ${table} order by ${order}`).all();
      const text = rows.map(({ solved_at: _moment, ...row }) =>
        JSON.stringify(row, (_, value: unknown) => (Buffer.isBuffer(value) ? value.toString('base64') : value)),
      );
      return [table, `${rows.length} rows ${sha256(Buffer.from(text.join('\n')))}`];
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
    const revisions = await prepare(calm);
    copyFileSync(calm, troubled);
    await live(calm, revisions);

    const next = random(seed);
    const moments = [
      ...Array.from({ length: 2 }, () => ({ after: 'started' as const, ms: next() * 300 })),
      ...Array.from({ length: 10 }, () => ({ after: 'chunk' as const, ms: next() * 450 })),
    ];
    const leftAfter: number[] = [];
    for (const moment of moments) {
      expect(await live(troubled, revisions, moment), 'it was killed before it had finished').toBe(true);
      const database = openDatabase(troubled);
      leftAfter.push(revisions.reduce((sum, { revision }) => sum + countWaiting(database.raw, revision).waiting, 0));
      await database.close();
    }
    await live(troubled, revisions);

    const [one, other] = [openDatabase(calm), openDatabase(troubled)];
    for (const each of revisions) {
      for (const database of [one, other])
        expect((await findRevisionById(database.db, each.office, each.revision))?.state).toBe('run');
      expect(await json(other, each)).toBe(await json(one, each));
    }
    expect(contents(other)).toEqual(contents(one));
    // Some of the kills fell between chunks that were kept and chunks that were not.
    expect(new Set(leftAfter.filter((left) => left > 0)).size).toBeGreaterThan(3);
    await one.close();
    await other.close();
  }, 120_000);
});
