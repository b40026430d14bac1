import { noneHigh, noneLow } from '@/db/absent';
import { instant } from '@/db/clock';
import { packModel } from '@/db/encode';
import { ListWriter } from '@/db/lists/list-writer';
import type { RawDatabase } from '@/db/open';
import { insertCombinations } from '@/db/queries/combinations';
import { insertRevisionParts } from '@/db/queries/own-parts';
import { evaluationOf, type StoredState } from '@/db/queries/results';
import { inShortTransactions } from '@/db/short-transactions';
import { shownCombinations } from '@/lib/combinations/shown-combinations';
import type { FrameRead, Intake } from '@/lib/intake/intake';
import type { Settings } from '@/lib/model/settings';
import type { Problem } from '@/lib/problems/problem';
import { engineVersion } from '@/lib/analysis/engine-version';
import { frameHash } from '@/lib/results/frame-hash';

export interface IntakeStored {
  readonly frames: number;
  /** Frames kept from running by errors. */
  readonly stopped: number;
  /** Frames whose results are carried over from an earlier revision of the batch. */
  readonly carried: number;
}

const severities = ['error', 'warning', 'note'] as const;

/**
 * Stores what was read of a revision in state "reading", in transactions under 50 ms, and moves it to "read".
 * May be called again after it was cut short: it begins afresh. A frame whose content an earlier revision of the batch
 * has run already brings its results along.
 *
 * @throws {RangeError} where the revision is not the office's or not in state "reading"
 */
export function insertIntake(raw: RawDatabase, office: number, revision: number, intake: Intake): IntakeStored {
  const found = raw
    .prepare<[number, number], Owner & { state: string }>(
      'select batch, state, created_by as person, made_from as madeFrom from revision where id = ? and office = ?',
    )
    .get(revision, office);
  if (found?.state !== 'reading') throw new RangeError(`Expected revision ${revision} of office ${office} in state "reading"`);
  clear(raw, revision);
  const row = raw.prepare(
    'insert into input_row (revision, ordinal, sheet, row, cells, part, marks, changed_by) values (?, ?, ?, ?, ?, ?, ?, ?)',
  );
  inShortTransactions(
    raw,
    intake.rows.entries(),
    ([i, one]) =>
    row.run(
      revision, i, one.sheet, one.row, JSON.stringify(one.cells), one.part ?? null, one.marks ?? null, one.changedBy ?? null,
    ), // prettier-ignore
  );
  const sheet = raw.prepare(
    `insert into sheet_read (revision, ordinal, name, file, known, heading_row, rows, headings, decimal_mark)
     values (?, ?, ?, ?, ?, ?, ?, ?, ?)`,
  );
  inShortTransactions(raw, intake.sheets.entries(), ([i, one]) =>
    sheet.run(
      revision,
      i,
      one.name,
      one.file,
      one.known,
      one.headingRow,
      one.rows,
      JSON.stringify(one.headings),
      one.decimalMark ?? null,
    ),
  );
  insertProblems(raw, revision, intake.problems);
  const read = intake.frames.flatMap(({ frame }) => frame ?? []);
  insertCombinations(raw, revision, shownCombinations(read, intake.settings.combinationSet));
  insertRevisionParts(raw, office, revision, intake.parts ?? []);
  const carried = insertFrames(raw, revision, found, intake);
  const stopped = intake.frames.filter((one) => one.frame === null).length;
  const count = (severity: string) => intake.problems.filter((one) => one.severity === severity).length;
  const { input, settings } = intake;
  raw
    .prepare(
      `update revision set state = 'read', title = ?, units = ?, settings = ?, origins = ?, input_name = ?, input_sha256 = ?,
       input_files = ?, engine = ?, frames = ?, frames_stopped = ?, errors = ?, warnings = ?, notes = ?, stamp = stamp + 1,
       changed_at = ? where id = ? and state = 'reading'`,
    )
    .run(
      settings.title, settings.units, JSON.stringify(settings), JSON.stringify(intake.origins), input.name, input.sha256,
      JSON.stringify(input.files), engineVersion, intake.frames.length, stopped, count('error'), count('warning'),
      count('note'), instant(), revision,
    ); // prettier-ignore
  return { frames: intake.frames.length, stopped, carried };
}

/** Adds problems after those the revision has: those of the sheets, later those that the analysis found (a mechanism). */
export function insertProblems(raw: RawDatabase, revision: number, problems: readonly Problem[]): void {
  const problem = raw.prepare(`insert into problem values (${Array(13).fill('?').join(',')})`);
  const { next } = raw
    .prepare<[number], { next: number }>('select coalesce(max(ordinal) + 1, 0) as next from problem where revision = ?')
    .get(revision)!;
  inShortTransactions(raw, problems.entries(), ([i, one]) =>
    problem.run(
      revision, next + i, severities.indexOf(one.severity), one.code, one.sheet ?? '', one.file, one.row, one.column, one.cell,
      JSON.stringify(one.frames), one.found, one.message, one.stopsAll ? 1 : 0,
    ),
  ); // prettier-ignore
}

interface Owner {
  readonly batch: number;
  readonly person: number;
  /** The revision it was made from by changes. */
  readonly madeFrom: number | null;
}

function insertFrames(raw: RawDatabase, revision: number, owner: Owner, intake: Intake): number {
  const lists = new ListWriter(raw);
  const write = frameWriter(raw, lists, revision, owner);
  let carried = 0;
  inShortTransactions(
    raw,
    prepared(intake.frames, intake.settings),
    (one) => {
      if (write(one)) carried += 1;
    },
    () => lists.flush(),
  );
  return carried;
}

interface Prepared {
  readonly index: number;
  readonly read: FrameRead;
  readonly hash: string;
  readonly model: Buffer | null;
}

function* prepared(frames: readonly FrameRead[], settings: Settings): Generator<Prepared> {
  for (const [index, read] of frames.entries()) {
    const { frame } = read;
    yield { index, read, hash: frame ? frameHash(frame, settings) : '', model: frame && packModel(frame) };
  }
}

/** @returns a function that stores one frame and says whether its results were carried over */
function frameWriter(raw: RawDatabase, lists: ListWriter, revision: number, owner: Owner) {
  const { batch } = owner;
  const add = raw.prepare(
    `insert into frame_version (batch, hash, engine, state, model) values (?, ?, ?, 'waiting', ?) on conflict do nothing`,
  );
  const version = raw.prepare<[number, string], { id: number; state: string; evaluation: Buffer | null }>(
    'select id, state, evaluation from frame_version where batch = ? and hash = ?',
  );
  const parameter = raw.prepare('insert or ignore into frame_parameter values (?, ?, ?, ?, ?)');
  const place = raw.prepare(
    `insert into revision_frame (revision, frame, frame_id, title, group_name, family, count, note, version, status, verdict,
     ratio, check_name, section, combination, critical_load_factor, mass, uploaded_by, changed_by)
     values (?, ?, ?, ?, ?, ?, ?, ?, ?, ?, -1, ${noneLow}, '', '', '', ${noneHigh}, ${noneLow}, ?, ?)`,
  );
  const whose = whoseWork(raw, owner);
  const runBy = raw
    .prepare<[number, number], number | null>(
      'select run_by from revision_frame where version = ? and revision <> ? and run_by is not null limit 1',
    )
    .pluck();
  const states = raw.prepare<[number], StoredState>('select * from result_state where version = ? order by ordinal');
  return ({ index, read, hash, model }: Prepared): boolean => {
    const { frame } = read;
    if (!frame || !model) {
      place.run(revision, index, read.id, null, '', '', 1, null, null, 'stopped', ...whose(read.id, null));
      return false;
    }
    const isNew = add.run(batch, hash, engineVersion, model).changes === 1;
    const own = version.get(batch, hash)!;
    for (const [name, { value, quantity }] of isNew && frame.family ? Object.entries(frame.family.parameters) : [])
      parameter.run(own.id, name, typeof value === 'number' ? value : null, typeof value === 'string' ? value : null, quantity);
    place.run(
      revision, index, read.id, frame.title, frame.group ?? '', frame.family?.name ?? '', frame.count, frame.note, own.id,
      'waiting', ...whose(read.id, own.id),
    ); // prettier-ignore
    if (!own.evaluation) return false;
    const stored = evaluationOf(own.evaluation, states.all(own.id));
    lists.write(revision, index, { frame, ...stored }, runBy.get(own.id, revision) ?? null);
    return true;
  };
}

/**
 * Who uploaded a frame and who changed it. In a revision made by changes a frame is still theirs who uploaded it; one whose
 * content moved was changed by who made the revision, another is carried over with whoever changed it before.
 */
function whoseWork(raw: RawDatabase, { person, madeFrom }: Owner) {
  const earlier = raw.prepare<[number, string], { version: number | null; uploaded: number | null; changed: number | null }>(
    `select version, uploaded_by as uploaded, changed_by as changed from revision_frame
     where revision = ? and frame_id = ? order by frame limit 1`,
  );
  return (frame: string, version: number | null): [uploaded: number | null, changed: number | null] => {
    if (madeFrom === null) return [person, null];
    const before = earlier.get(madeFrom, frame);
    if (!before) return [person, person];
    return [before.uploaded, before.version === version ? before.changed : person];
  };
}

/** Takes away what a reading that was cut short left behind. */
function clear(raw: RawDatabase, revision: number): void {
  const tables = [
    'input_row', 'sheet_read', 'combination_read', 'problem', 'member_row', 'check_row', 'reaction_row', 'movement_row', 'frame_result', 'frame_peak', 'tally', 'revision_frame',
  ]; // prettier-ignore
  inShortTransactions(raw, tables, (table) => raw.prepare(`delete from ${table} where revision = ?`).run(revision));
}
