/** Sizings of a revision: asked for, going on, done. What frames answered is kept in pieces until then. */
import { instant } from '@/db/clock';
import type { Db, RawDatabase } from '@/db/open';
import { pack, unpack } from '@/db/pack';
import { frameOf, type NamedVersion } from '@/db/queries/results';
import type { JobState } from '@/db/schema';
import type { InputRow } from '@/lib/intake/intake';
import type { Frame } from '@/lib/model/frame';
import type { FrameAnswer, SizingFound, SizingRequest } from '@/lib/sizing/sizing';

export interface SizingRecord {
  readonly id: number;
  readonly office: number;
  readonly revision: number;
  readonly person: string;
  readonly at: string;
  readonly request: SizingRequest;
  readonly inputHash: string | null;
  readonly engine: string;
  readonly state: JobState;
  readonly total: number;
  readonly done: number;
  readonly seconds: number;
  readonly found: SizingFound | null;
  readonly reason: string | null;
  readonly finishedAt: string | null;
}

export async function insertSizing(
  db: Db,
  office: number,
  of: { readonly revision: number; readonly person: number; readonly request: SizingRequest; readonly engine: string },
): Promise<number> {
  const { revision, person, request, engine } = of;
  const row = await db
    .insertInto('sizing')
    .values({ office, revision, person, at: instant(), request: JSON.stringify(request), engine, state: 'queued' })
    .returning('id')
    .executeTakeFirstOrThrow();
  return row.id;
}

const selected = (db: Db, office: number) =>
  db
    .selectFrom('sizing')
    .innerJoin('person', 'person.id', 'sizing.person')
    .select([
      'sizing.id', 'sizing.office', 'sizing.revision', 'person.name as person', 'sizing.at', 'sizing.request', 'sizing.engine',
      'sizing.input_hash as inputHash', 'sizing.state', 'sizing.total', 'sizing.done', 'sizing.seconds', 'sizing.found',
      'sizing.reason', 'sizing.finished_at as finishedAt',
    ])
    .where('sizing.office', '=', office); // prettier-ignore

type Row = Omit<SizingRecord, 'request' | 'found'> & { readonly request: string; readonly found: string | null };
const record = (row: Row): SizingRecord => ({
  ...row,
  request: JSON.parse(row.request) as SizingRequest,
  found: row.found === null ? null : (JSON.parse(row.found) as SizingFound),
});

export async function findSizing(db: Db, office: number, revision: number, id: number): Promise<SizingRecord | undefined> {
  const row = await selected(db, office).where('sizing.revision', '=', revision).where('sizing.id', '=', id).executeTakeFirst();
  return row && record(row);
}

/** The newest sizings of a revision. */
export async function listSizings(db: Db, office: number, revision: number, limit = 20): Promise<SizingRecord[]> {
  const rows = await selected(db, office)
    .where('sizing.revision', '=', revision)
    .orderBy('sizing.id', 'desc')
    .limit(limit)
    .execute();
  return rows.map(record);
}

/** Moves a sizing on from one of some states; false where it was in none of them. */
export async function updateSizingState(
  db: Db,
  office: number,
  id: number,
  from: readonly JobState[],
  to: JobState,
  more: { readonly reason?: string | null; readonly found?: SizingFound; readonly seconds?: number } = {},
): Promise<boolean> {
  const ended = to === 'done' || to === 'stopped' || to === 'failed';
  const result = await db
    .updateTable('sizing')
    .set((eb) => ({
      state: to,
      reason: more.reason ?? null,
      finished_at: ended ? instant() : null,
      seconds: eb('seconds', '+', more.seconds ?? 0),
      ...(more.found === undefined ? {} : { found: JSON.stringify(more.found) }),
    }))
    .where('office', '=', office)
    .where('id', '=', id)
    .where('state', 'in', [...from])
    .executeTakeFirst();
  return result.numUpdatedRows === 1n;
}

export async function updateSizingProgress(db: Db, id: number, { done, total }: { done: number; total: number }): Promise<void> {
  await db.updateTable('sizing').set({ done, total }).where('id', '=', id).execute();
}

/** Says what it is made from. What was answered by another engine, or of other frames, is thrown away. */
export function beginSizing(raw: RawDatabase, id: number, { hash, engine }: { hash: string; engine: string }): void {
  const before = raw.prepare<[number], { input_hash: string | null }>('select input_hash from sizing where id = ?').get(id);
  if (before?.input_hash !== hash) deletePieces(raw, id);
  raw.prepare('update sizing set input_hash = ?, engine = ? where id = ?').run(hash, engine, id);
}

/** Answers of some frames (their versions) to one choice. */
export interface AnswerPiece {
  /** By group: the section's place among its candidates, −1 = as it is. */
  readonly choice: readonly number[];
  readonly versions: readonly number[];
  readonly answers: readonly FrameAnswer[];
}

export function insertPiece(raw: RawDatabase, sizing: number, { choice, versions, answers }: AnswerPiece): void {
  raw
    .prepare('insert into sizing_piece (sizing, choice, packed) values (?, ?, ?)')
    .run(sizing, JSON.stringify(choice), pack({ versions, answers }));
}

export function listPieces(raw: RawDatabase, sizing: number): AnswerPiece[] {
  return raw
    .prepare<[number], { choice: string; packed: Buffer }>('select choice, packed from sizing_piece where sizing = ? order by id')
    .all(sizing)
    .map(({ choice, packed }) => ({
      choice: JSON.parse(choice) as number[],
      ...(unpack(packed) as Pick<AnswerPiece, 'versions' | 'answers'>),
    }));
}

export function deletePieces(raw: RawDatabase, sizing: number): void {
  raw.prepare('delete from sizing_piece where sizing = ?').run(sizing);
}

export interface VersionToSize {
  readonly version: number;
  readonly hash: string;
  readonly frame: Frame;
  /** Frames of the sheets that are this one, and their number off, added up. */
  readonly frames: number;
  readonly off: number;
  readonly ratio: number | null;
}

/** A revision's different frames in the order of its sheets, under the name of the first that has each. */
export function* versionsToSize(raw: RawDatabase, revision: number): Generator<VersionToSize> {
  type Listed = { version: number; frames: number; off: number; first: number };
  const listed = raw
    .prepare<[number], Listed>(
      `select version, count(*) as frames, sum(count) as off, min(frame) as first from revision_frame
       where revision = ? and version is not null group by version order by first`,
    )
    .all(revision);
  const read = versionReader(raw, revision);
  for (const { version, frames, off, first } of listed) {
    const row = read.get(first);
    if (row) yield { version, hash: row.hash, frame: frameOf(row), frames, off, ratio: row.ratio };
  }
}

type Read = NamedVersion & { hash: string; ratio: number | null };
const versionReader = (raw: RawDatabase, revision: number) => {
  const one = raw.prepare<[number, number], Read>(
    `select v.hash, v.ratio, v.model, f.frame_id, f.title, f.group_name, f.count, f.note
     from revision_frame f join frame_version v on v.id = f.version where f.revision = ? and f.frame = ?`,
  );
  return { get: (frame: number) => one.get(revision, frame) };
};

/** The frame of a version, under the name of the first of the revision that has it. */
export function findVersionFrame(raw: RawDatabase, revision: number, version: number): Frame | undefined {
  const row = raw
    .prepare<[number, number], NamedVersion>(
      `select v.model, f.frame_id, f.title, f.group_name, f.count, f.note
       from revision_frame f join frame_version v on v.id = f.version
       where f.revision = ? and f.version = ? order by f.frame limit 1`,
    )
    .get(revision, version);
  return row && frameOf(row);
}

/** Rows as typed of some sheets only, in order. @param parts ordinals of the sheets */
export function rowsOfSheets(raw: RawDatabase, revision: number, parts: readonly number[]): InputRow[] {
  type Kept = { sheet: string; row: number; cells: string; part: number; marks: string | null; changedBy: string | null };
  return raw
    .prepare<[number, string], Kept>(
      `select sheet, row, cells, part, marks, changed_by as changedBy from input_row
       where revision = ? and part in (select value from json_each(?)) order by ordinal`,
    )
    .all(revision, JSON.stringify(parts))
    .map((kept) => ({ ...kept, cells: JSON.parse(kept.cells) as (string | null)[] }));
}
