import { orNull } from '@/db/absent';
import { type Db, driverOf, type RawDatabase } from '@/db/open';
import { statement } from '@/db/statements';
import { verdictOf } from '@/db/verdict-rank';
import { framesToSee, type FrameToList, type ListedFrame, type ListPart, type ReasonToSee } from '@/lib/checking/sample-rule';
import { wholeFrameReason } from '@/lib/checking/whole-frame';
import type { CheckProgress } from '@/lib/checking/why-not-pass';
import type { Verdict } from '@/lib/results/result';

/** A frame that has to be seen, with why, and why something of it is not checked that none of its checks says. */
export interface FrameForList extends ListedFrame {
  readonly whole: string | null;
}

/** Frames read at once; between them the server answers others. */
const piece = 500;

interface Read {
  readonly frame: number;
  readonly frame_id: string;
  readonly verdict: number;
  readonly ratio: number;
  readonly check_name: string;
  readonly family: string;
  readonly reason: string | null;
}

/** What the rule lists of a revision, read piece by piece. */
export async function findFramesToSee(db: Db, revision: number, inputHash: string): Promise<FrameForList[]> {
  const raw = driverOf(db);
  const some = statement<Read>(
    raw,
    `select frame, frame_id, verdict, ratio, check_name, family, reason from revision_frame
     where revision = ? and frame > ? and status = 'solved' order by frame limit ${piece}`,
  );
  const parameters = statement<{ frame: number; name: string; number: number }>(
    raw,
    `select f.frame, p.name, p.number from revision_frame f join frame_parameter p on p.version = f.version
     where f.revision = ? and f.frame between ? and ? and p.number is not null`,
  );
  const frames: FrameToList[] = [];
  const whole = new Map<number, string>();
  for (let last = -1; ;) {
    const rows = some.all(revision, last);
    if (rows.length === 0) break;
    const of = new Map<number, Record<string, number>>();
    for (const { frame, name, number } of parameters.all(revision, rows[0]!.frame, rows.at(-1)!.frame)) {
      const known = of.get(frame);
      if (known) known[name] = number;
      else of.set(frame, { [name]: number });
    }
    for (const row of rows) {
      const reason = row.reason === null ? null : wholeFrameReason(row.reason, notCheckedRows(raw, revision, row.frame));
      if (reason !== null) whole.set(row.frame, reason);
      frames.push({
        index: row.frame,
        id: row.frame_id,
        verdict: verdictOf(row.verdict) ?? 'not checked',
        ratio: orNull(row.ratio),
        check: row.check_name === '' ? null : row.check_name,
        family: row.family === '' ? null : row.family,
        parameters: of.get(row.frame) ?? {},
      });
    }
    last = rows.at(-1)!.frame;
    await new Promise((resolve) => setImmediate(resolve));
  }
  return framesToSee(frames, inputHash).map((one) => ({ ...one, whole: whole.get(one.index) ?? null }));
}

function notCheckedRows(raw: RawDatabase, revision: number, frame: number): { check: string; reason: string | null }[] {
  return statement<{ check: string; reason: string | null }>(
    raw,
    'select check_name as "check", reason from check_row where revision = ? and frame = ? and verdict = 2',
  ).all(revision, frame);
}

/** Keeps the list with the revision: what had to be seen stays what it was. Kept already, it is left alone. */
export async function insertCheckingList(within: Db, revision: number, list: readonly FrameForList[]): Promise<void> {
  for (let from = 0; from < list.length; from += piece) {
    const values = list.slice(from, from + piece).map(({ index, part, reasons, whole }, i) => ({
      revision,
      frame: index,
      ordinal: from + i,
      part,
      reasons: JSON.stringify(reasons),
      whole,
    }));
    await within
      .insertInto('checking_list')
      .values(values)
      .onConflict((conflict) => conflict.doNothing())
      .execute();
  }
}

/** A frame of the list as the checker goes through it. */
export interface ListRow {
  /** Place in sheet order, from 0. */
  readonly index: number;
  readonly id: string;
  readonly part: ListPart;
  readonly reasons: readonly ReasonToSee[];
  readonly verdict: Verdict;
  readonly ratio: number | null;
  readonly check: string | null;
  readonly subject: string | null;
  readonly seen: boolean;
  readonly queries: number;
  readonly openQueries: number;
  /** Checks, and the frame as a whole, that are over or not checked; how many of them are accepted. */
  readonly toAccept: number;
  readonly accepted: number;
}

/** The list of a revision that was sent to check, in its order; [] before that, and for another office's. */
export async function listToSee(db: Db, office: number, revision: number): Promise<ListRow[]> {
  const raw = driverOf(db);
  const rows = statement<ListedRow>(
    raw,
    `select l.frame as "index", f.frame_id as id, l.part, l.reasons, l.whole, f.verdict, f.ratio, f.check_name as "check", f.subject
     from checking_list l join revision r on r.id = l.revision and r.office = ?
     join revision_frame f on f.revision = l.revision and f.frame = l.frame
     where l.revision = ? order by l.ordinal`,
  ).all(office, revision);
  if (rows.length === 0) return [];
  // counted over the whole revision at once: looked up frame by frame it would be minutes at 20,000
  const count = (sql: string): Map<number, number> =>
    new Map(
      statement<{ frame: number; n: number }>(raw, `select frame, count(*) as n from ${sql} group by frame`)
        .all(revision)
        .map(({ frame, n }) => [frame, n]),
    );
  const seen = count('checking_seen where revision = ?');
  const queries = count('checking_query where revision = ?');
  const open = count('checking_query where revision = ? and closed_at is null');
  const toAccept = count('check_row where revision = ? and verdict >= 2');
  const accepted = count('checking_acceptance where revision = ? and ended_at is null');
  return rows.map(({ whole, reasons, verdict, ratio, check, ...row }) => ({
    ...row,
    reasons: JSON.parse(reasons) as ReasonToSee[],
    verdict: verdictOf(verdict) ?? 'not checked',
    ratio: orNull(ratio),
    check: check === '' ? null : check,
    seen: seen.has(row.index),
    queries: queries.get(row.index) ?? 0,
    openQueries: open.get(row.index) ?? 0,
    toAccept: (toAccept.get(row.index) ?? 0) + (whole === null ? 0 : 1),
    accepted: accepted.get(row.index) ?? 0,
  }));
}

interface ListedRow {
  readonly index: number;
  readonly id: string;
  readonly part: ListPart;
  readonly reasons: string;
  readonly whole: string | null;
  readonly verdict: number;
  readonly ratio: number;
  readonly check: string;
  readonly subject: string | null;
}

/** How far checking is. All zero for a revision that was never sent, or is not the office's. */
export async function findCheckProgress(db: Db, office: number, revision: number): Promise<CheckProgress> {
  const own = await db
    .selectFrom('revision')
    .select('sent_at')
    .where('id', '=', revision)
    .where('office', '=', office)
    .executeTakeFirst();
  if (!own || own.sent_at === null) return { listed: 0, seen: 0, openQueries: 0, toAccept: 0, accepted: 0 };
  const n = (row: { n: number } | undefined): number => row?.n ?? 0;
  const list = db.selectFrom('checking_list').select((eb) => eb.fn.countAll<number>().as('n')).where('revision', '=', revision); // prettier-ignore
  const seen = db
    .selectFrom('checking_list as l')
    .select((eb) => eb.fn.countAll<number>().as('n'))
    .where('l.revision', '=', revision)
    .where((eb) =>
      eb.exists(
        eb
          .selectFrom('checking_seen as s')
          .select('s.frame')
          .whereRef('s.revision', '=', 'l.revision')
          .whereRef('s.frame', '=', 'l.frame'),
      ),
    );
  const open = db
    .selectFrom('checking_query')
    .select((eb) => eb.fn.countAll<number>().as('n'))
    .where('revision', '=', revision)
    .where('closed_at', 'is', null);
  const rows = db
    .selectFrom('check_row')
    .select((eb) => eb.fn.countAll<number>().as('n'))
    .where('revision', '=', revision)
    .where('verdict', '>=', 2);
  const accepted = db
    .selectFrom('checking_acceptance')
    .select((eb) => eb.fn.countAll<number>().as('n'))
    .where('revision', '=', revision)
    .where('ended_at', 'is', null);
  return {
    listed: n(await list.executeTakeFirst()),
    seen: n(await seen.executeTakeFirst()),
    openQueries: n(await open.executeTakeFirst()),
    toAccept: n(await rows.executeTakeFirst()) + n(await list.where('whole', 'is not', null).executeTakeFirst()),
    accepted: n(await accepted.executeTakeFirst()),
  };
}
