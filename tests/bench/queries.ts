/**
 * query.*: a filtered, sorted page of 100 among a million member rows through the exported route handler (session and
 * zod included) against the bare statement on the matching index; the same page at ten thousand rows; the batch
 * summary at 20,000 frames against 2,000.
 */
import { mkdtempSync, rmSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { encode } from 'next-auth/jwt';
import { migrate } from '@/db/migrate';
import { openDatabase, type OpenDatabase, type RawDatabase } from '@/db/open';
import { insertBatch } from '@/db/queries/batches';
import { insertOffice } from '@/db/queries/offices';
import { insertPerson } from '@/db/queries/people';
import { insertProject } from '@/db/queries/projects';
import { insertRevision } from '@/db/queries/revisions';
import { insertSession } from '@/db/queries/sessions';
import { median, percentile, ratio } from './rounds';

const roles = ['column', 'rafter', 'beam', 'strut'];
const sections = ['IPE 240', 'IPE 300', 'IPE 360', 'HE 200 A', 'HE 260 A', 'HE 300 B'];
const checks = ['normal stress', 'equivalent stress', 'stability', 'deflection'];
const pageSize = 100;

/** A seeded figure from 0 to 1 for each row, so that every run has the same rows. */
const spread = (n: number): number => (((n * 2_654_435_761) >>> 0) % 1_000_003) / 1_000_003;

/** A run revision whose lists hold `frames` frames of `each` members, as a run leaves them. */
function fill(raw: RawDatabase, revision: number, frames: number, each: number): void {
  const frame = raw.prepare(
    `insert into revision_frame (revision, frame, frame_id, group_name, family, count, status, verdict, ratio, check_name, subject,
     section, combination, critical_load_factor, mass) values (?, ?, ?, 'g', '', 1, 'solved', ?, ?, ?, 'AB', ?, 'C1', 20, 500)`,
  );
  const member = raw.prepare(`insert into member_row values (${Array(17).fill('?').join(',')})`);
  for (let from = 0; from < frames; from += 5000) {
    raw.transaction(() => {
      for (let at = from; at < Math.min(frames, from + 5000); at += 1) {
        let worst = 0;
        for (let m = 0; m < each; m += 1) {
          const n = at * each + m;
          const value = 0.3 + 0.8 * spread(n);
          worst = Math.max(worst, value);
          member.run(revision, at, m, `M${m}`, roles[n % 4], sections[n % 6], '', 6, 'C1', 1, 1, 1, 0, 0, checks[(n >> 2) % 4], value, rank(value)); // prettier-ignore
        }
        frame.run(revision, at, `F${at + 1}`, rank(worst), worst, checks[at % 4], sections[at % 6]);
      }
    })();
  }
  raw
    .prepare(
      `insert into tally select revision, 'members', role, section, group_name, check_name, cast(verdict as text), count(*)
       from member_row where revision = ? group by role, section, group_name, check_name, verdict`,
    )
    .run(revision);
  raw
    .prepare(`update revision set state = 'run', frames = ?, settings = '{}', origins = '{}' where id = ?`)
    .run(frames, revision);
}

const rank = (value: number): number => (value > 1 ? 3 : value >= 0.9 ? 1 : 0);

const views = [
  'role=rafter&ratio=0.8..&sort=-ratio',
  'section=IPE+300&sort=-ratio',
  'verdict=over&sort=-ratio',
  'check=deflection&sort=-ratio',
  'ratio=..0.9&sort=-ratio',
];

const bare = `select * from member_row indexed by member_row_role_ratio where revision = ? and role = ? and ratio >= ?
  order by ratio desc, frame, member limit ${pageSize}`;

interface Ready {
  readonly database: OpenDatabase;
  readonly cookie: string;
  readonly batches: Readonly<Record<'million' | 'tenThousand' | 'large' | 'small', { batch: number; revision: number }>>;
}

async function prepare(folder: string): Promise<Ready> {
  process.env['DATA_DIR'] = folder;
  process.env['NEXTAUTH_SECRET'] = 'only for the bench, and of no use elsewhere';
  process.env['LOG_LEVEL'] = 'silent';
  const database = openDatabase(join(folder, 'tallyframe.sqlite'));
  const { db, raw } = database;
  await migrate(db);
  const office = await insertOffice(db, 'Bench');
  const person =
    (await insertPerson(db, office, { email: 'a@bench.example', name: 'A', role: 'analyst', passwordHash: '-' })) ?? 0;
  const project = (await insertProject(db, office, { name: 'P', number: null, person })) ?? 0;
  const filled = async (frames: number, each: number): Promise<{ batch: number; revision: number }> => {
    const batch = (await insertBatch(db, office, { project, name: `${frames} frames`, person })) ?? 0;
    const revision = (await insertRevision(db, office, { batch, person }))?.id ?? 0;
    fill(raw, revision, frames, each);
    return { batch, revision };
  };
  const million = await filled(125_000, 8);
  const batches = { million, tenThousand: await filled(1250, 8), large: await filled(20_000, 8), small: await filled(2000, 8) };
  raw.exec('analyze');
  const session = await insertSession(db, { person, office, expiresAt: '2999-01-01T00:00:00.000Z' });
  const token = await encode({ token: { session }, secret: process.env['NEXTAUTH_SECRET'] });
  return { database, cookie: `next-auth.session-token=${token}`, batches };
}

type Get = (request: Request, context: { params: Promise<Record<string, string>> }) => Promise<Response>;

export async function queries(rounds: number): Promise<Record<string, number>> {
  const folder = mkdtempSync(join(tmpdir(), 'tallyframe-bench-'));
  try {
    const { database, cookie, batches } = await prepare(folder);
    const { GET: rows } = (await import('@/app/api/batches/[batch]/revisions/[revision]/tables/[table]/route')) as unknown as { GET: Get }; // prettier-ignore
    const ask = async (batch: number, search: string): Promise<unknown> => {
      const request = new Request(`http://localhost/api/x?${search}`, { headers: { cookie } });
      const answer = await rows(request, { params: Promise.resolve({ batch: String(batch), revision: 'A', table: 'members' }) });
      const body = (await answer.json()) as { rows?: unknown[] };
      if (answer.status !== 200 || body.rows?.length !== pageSize) throw new Error(`Expected a full page, got ${answer.status}`);
      return body;
    };
    const statement = database.raw.prepare(bare);
    const page: number[] = [];
    const alone: number[] = [];
    const small: number[] = [];
    for (let round = 0; round <= rounds; round += 1) {
      const times: [number[], number[], number[]] = [[], [], []];
      for (let turn = 0; turn < 120; turn += 1) {
        const search = `${views[turn % views.length] ?? ''}&size=${pageSize}`;
        const from = 0.8 + 0.001 * (turn % 50);
        times[0].push(await timed(() => ask(batches.million.batch, search)));
        times[1].push(await timed(() => statement.all(batches.million.revision, roles[turn % 4], from)));
        times[2].push(await timed(() => ask(batches.tenThousand.batch, search)));
      }
      if (round === 0) continue;
      page.push(percentile(times[0], 0.95));
      alone.push(percentile(times[1], 0.95));
      small.push(percentile(times[2], 0.95));
    }
    console.log(
      `  page ${median(page).toFixed(2)} ms, bare ${median(alone).toFixed(2)} ms, page of ten thousand ${median(small).toFixed(2)} ms (p95)`,
    );
    const growth = await summaryGrowth({ database, cookie, batches }, rounds);
    await database.close();
    return { 'query.page.bare': ratio(page, alone), 'query.page.growth': ratio(page, small), 'query.summary.growth': growth };
  } finally {
    rmSync(folder, { recursive: true, force: true });
  }
}

/** The summary as it is first asked for after its results changed, which is what it costs; asked again it is remembered. */
async function summaryGrowth({ database, cookie, batches }: Ready, rounds: number): Promise<number> {
  const { GET } = (await import('@/app/api/batches/[batch]/revisions/[revision]/summary/route')) as unknown as { GET: Get };
  const changed = database.raw.prepare('update revision set stamp = stamp + 1 where id = ?');
  const fresh = async ({ batch, revision }: { batch: number; revision: number }): Promise<number> => {
    changed.run(revision);
    const request = new Request('http://localhost/api/x', { headers: { cookie } });
    return timed(async () => {
      const answer = await GET(request, { params: Promise.resolve({ batch: String(batch), revision: 'A' }) });
      if (answer.status !== 200) throw new Error(`Expected a summary, got ${answer.status}`);
      await answer.text();
    });
  };
  const large: number[] = [];
  const small: number[] = [];
  for (let round = 0; round < rounds * 4; round += 1) {
    large.push(await fresh(batches.large));
    small.push(await fresh(batches.small));
  }
  return ratio(large.slice(2), small.slice(2));
}

async function timed(work: () => unknown): Promise<number> {
  const before = performance.now();
  await work();
  return performance.now() - before;
}
