/** A checker's marks on the frames of a revision: seen, accepted with a reason, their own values. */
import { orNull } from '@/db/absent';
import { instant } from '@/db/clock';
import type { Db } from '@/db/open';
import { insertCheckingActivity } from '@/db/queries/checking-activity';
import type { RevisionRecord } from '@/db/queries/revisions';
import { verdictOf } from '@/db/verdict-rank';
import { canBeMarked } from '@/lib/checking/checking-states';
import { wholeFrameCheck } from '@/lib/reports/accepted-words';

/** What is marked: a frame at its place from 0, with what its results hang on. */
export interface MarkedFrame {
  readonly index: number;
  readonly id: string;
  readonly engine: string;
  readonly hash: string;
}

interface By {
  readonly id: number;
}

/** A frame of a revision at its place from 0; without an engine where it has no solution. */
export async function findMarkedFrame(
  db: Db,
  office: number,
  revision: number,
  index: number,
): Promise<{ index: number; id: string; engine: string | null; hash: string } | undefined> {
  const row = await db
    .selectFrom('revision_frame')
    .innerJoin('revision', 'revision.id', 'revision_frame.revision')
    .leftJoin('frame_version', 'frame_version.id', 'revision_frame.version')
    .select(['revision_frame.frame_id', 'revision_frame.status', 'frame_version.engine', 'frame_version.hash'])
    .where('revision.office', '=', office)
    .where('revision_frame.revision', '=', revision)
    .where('revision_frame.frame', '=', index)
    .executeTakeFirst();
  return row && { index, id: row.frame_id, engine: row.status === 'solved' ? row.engine : null, hash: row.hash ?? '' };
}

/** Why nothing of a revision can be marked as it stands now; null = it can. Within the transaction that marks. */
export async function markable(within: Db, { id }: Pick<RevisionRecord, 'id'>): Promise<string | null> {
  const { state } = await within.selectFrom('revision').select('state').where('id', '=', id).executeTakeFirstOrThrow();
  if (canBeMarked(state)) return null;
  return `Frames are marked while the revision is with the checker; this one is ${state}.`;
}

/** Marks a frame seen by a person, or takes their own mark back. @returns why not; null = done */
export async function updateSeen(
  db: Db,
  revision: RevisionRecord,
  frame: MarkedFrame,
  by: By,
  seen: boolean,
): Promise<string | null> {
  return db.transaction().execute(async (within) => {
    const against = await markable(within, revision);
    if (against !== null) return against;
    const key = { revision: revision.id, frame: frame.index, person: by.id };
    const changed = seen
      ? await within
          .insertInto('checking_seen')
          .values({ ...key, at: instant(), ...madeOn(revision, frame), frame_hash: frame.hash })
          .onConflict((conflict) => conflict.doNothing())
          .returning('frame')
          .execute()
      : await within
          .deleteFrom('checking_seen')
          .where('revision', '=', key.revision)
          .where('frame', '=', key.frame)
          .where('person', '=', key.person)
          .returning('frame')
          .execute();
    if (changed.length > 0)
      await insertCheckingActivity(within, revision, by, seen ? 'saw a frame' : 'took back a mark', { frame: frame.id });
    return null;
  });
}

/** Row −1 of what is accepted: the frame as a whole. */
const wholeFrame = -1;

export interface ToAccept {
  /** Ordinal of its row among the frame's checks, or −1. */
  readonly item: number;
  readonly subject: string | null;
  readonly check: string;
  readonly combination: string | null;
  readonly verdict: 'over' | 'not checked';
  readonly ratio: number | null;
  /** Why it is not checked. */
  readonly why: string | null;
}

/** What of a frame is over or not checked; the frame as a whole last. */
export async function listToAccept(db: Db, revision: number, frame: number): Promise<ToAccept[]> {
  const rows = await db
    .selectFrom('check_row')
    .select(['ordinal', 'subject', 'check_name', 'combination', 'verdict', 'ratio', 'reason'])
    .where('revision', '=', revision)
    .where('frame', '=', frame)
    .where('verdict', '>=', 2)
    .orderBy('verdict', 'desc')
    .orderBy('ratio', 'desc')
    .orderBy('ordinal')
    .execute();
  const listed = await db
    .selectFrom('checking_list')
    .select('whole')
    .where('revision', '=', revision)
    .where('frame', '=', frame)
    .executeTakeFirst();
  const checks = rows.map((row): ToAccept => ({
    item: row.ordinal,
    subject: row.subject,
    check: row.check_name,
    combination: row.combination === '' ? null : row.combination,
    verdict: verdictOf(row.verdict) === 'over' ? 'over' : 'not checked',
    ratio: orNull(row.ratio),
    why: row.reason,
  }));
  const whole = listed?.whole ?? null;
  if (whole === null) return checks;
  const said = { subject: null, check: wholeFrameCheck, combination: null, ratio: null, why: whole };
  return [...checks, { item: wholeFrame, verdict: 'not checked', ...said }];
}

/**
 * Accepts checks of a frame that are over or not checked, each with the reason; one accepted before gets the new reason.
 *
 * @param items ordinals as listToAccept has them
 * @param alike also every other frame's check of the same name that is not checked for the very same reason
 * @returns how many were accepted, or why not
 */
export async function insertAcceptances(
  db: Db,
  revision: RevisionRecord,
  frame: MarkedFrame,
  by: By,
  { items, reason, alike }: { readonly items: readonly number[]; readonly reason: string; readonly alike: boolean },
): Promise<number | string> {
  return db.transaction().execute(async (within) => {
    const against = await markable(within, revision);
    if (against !== null) return against;
    const known = await listToAccept(within, revision.id, frame.index);
    const chosen = known.filter(({ item }) => items.includes(item));
    if (chosen.length !== new Set(items).size)
      return 'One of these checks is neither over nor not checked. Open the frame again.';
    const byPlace = new Map(chosen.map((one) => [`${frame.index} ${one.item}`, { frame: frame.index, ...one }]));
    // two checks of this frame may be not checked for one cause, which others share: each of those is accepted once
    if (alike)
      for (const one of chosen)
        for (const same of await sameElsewhere(within, revision.id, frame.index, one))
          byPlace.set(`${same.frame} ${same.item}`, same);
    const all = [...byPlace.values()];
    const at = instant();
    // elsewhere only what nobody accepted yet is
    for (const { item } of chosen)
      await within
        .updateTable('checking_acceptance')
        .set({ ended_by: by.id, ended_at: at })
        .where('revision', '=', revision.id)
        .where('frame', '=', frame.index)
        .where('item', '=', item)
        .where('ended_at', 'is', null)
        .execute();
    const shared = { office: revision.office, revision: revision.id, reason, person: by.id, at, ...madeOn(revision, frame) };
    for (let from = 0; from < all.length; from += 500) {
      const values = all.slice(from, from + 500).map(({ frame: index, item, subject, check, combination, verdict, ratio }) => ({
        ...shared,
        frame: index,
        item,
        subject,
        check_name: check,
        combination,
        verdict,
        ratio,
        ended_by: null,
        ended_at: null,
      }));
      await within.insertInto('checking_acceptance').values(values).execute();
    }
    const what = chosen.map(({ subject, check }) => [subject, check].filter(Boolean).join(' ')).join(', ');
    await insertCheckingActivity(within, revision, by, 'accepted a check', {
      frame: frame.id,
      check: what,
      reason,
      checks: all.length,
    });
    return all.length;
  });
}

/** The most checks that one reason is given to at once. */
const mostAlike = 20_000;

async function sameElsewhere(within: Db, revision: number, frame: number, { item, check, verdict, why }: ToAccept) {
  if (verdict !== 'not checked') return [];
  const accepted = await within
    .selectFrom('checking_acceptance')
    .select(['frame', 'item'])
    .where('revision', '=', revision)
    .where('ended_at', 'is', null)
    .execute();
  const done = new Set(accepted.map((one) => `${one.frame} ${one.item}`));
  if (item === wholeFrame) {
    const frames = await within
      .selectFrom('checking_list')
      .select('frame')
      .where('revision', '=', revision)
      .where('frame', '!=', frame)
      .where('whole', '=', why)
      .limit(mostAlike)
      .execute();
    const said = { subject: null, check, combination: null, ratio: null, why, verdict, item };
    return frames.filter((one) => !done.has(`${one.frame} ${item}`)).map((one) => ({ frame: one.frame, ...said }));
  }
  const rows = await within
    .selectFrom('check_row')
    .select(['frame', 'ordinal', 'subject', 'combination'])
    .where('revision', '=', revision)
    .where('verdict', '=', 2)
    .where('check_name', '=', check)
    .where('reason', 'is', why)
    .where('frame', '!=', frame)
    .limit(mostAlike)
    .execute();
  return rows
    .filter((row) => !done.has(`${row.frame} ${row.ordinal}`))
    .map((row) => ({
      frame: row.frame,
      item: row.ordinal,
      subject: row.subject,
      check,
      combination: row.combination === '' ? null : row.combination,
      verdict,
      ratio: null,
      why,
    }));
}

/** Takes an acceptance back. @returns why not; null = done (or there was none) */
export async function endAcceptance(
  db: Db,
  revision: RevisionRecord,
  frame: MarkedFrame,
  by: By,
  item: number,
): Promise<string | null> {
  return db.transaction().execute(async (within) => {
    const against = await markable(within, revision);
    if (against !== null) return against;
    const ended = await within
      .updateTable('checking_acceptance')
      .set({ ended_by: by.id, ended_at: instant() })
      .where('revision', '=', revision.id)
      .where('frame', '=', frame.index)
      .where('item', '=', item)
      .where('ended_at', 'is', null)
      .returning('check_name')
      .executeTakeFirst();
    if (ended)
      await insertCheckingActivity(within, revision, by, 'took back an acceptance', { frame: frame.id, check: ended.check_name });
    return null;
  });
}

/** A checker's own value beside one of ours; SI. */
export interface OwnValue {
  readonly label: string;
  readonly figure: unknown;
  readonly quantity: string;
  readonly ours: number;
  readonly theirs: number;
  readonly typed: string;
  readonly note: string;
}

/** @returns why not; null = kept */
export async function insertOwnValue(
  db: Db,
  revision: RevisionRecord,
  frame: MarkedFrame,
  by: By,
  value: OwnValue,
): Promise<string | null> {
  return db.transaction().execute(async (within) => {
    const against = await markable(within, revision);
    if (against !== null) return against;
    const { figure, ...rest } = value;
    await within
      .insertInto('checking_own_value')
      .values({
        office: revision.office,
        revision: revision.id,
        frame: frame.index,
        figure: JSON.stringify(figure),
        ...rest,
        person: by.id,
        at: instant(),
        ...madeOn(revision, frame),
      })
      .execute();
    await insertCheckingActivity(within, revision, by, 'kept an own value', {
      frame: frame.id,
      of: value.label,
      ours: value.ours,
      theirs: value.theirs,
    });
    return null;
  });
}

const madeOn = ({ input }: RevisionRecord, { engine }: MarkedFrame) => ({ input_sha256: input?.sha256 ?? '', engine });
