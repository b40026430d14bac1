/** What a run still has to do, in a form that costs the server little: ids here, models only where they are solved. */
import { frameOf, type NamedVersion, type WaitingFrame } from '@/db/queries/results';
import { unpack } from '@/db/pack';
import type { RawDatabase } from '@/db/open';
import type { InputRow } from '@/lib/intake/intake';
import type { FrameEvaluation } from '@/lib/results/result';
import type { FrameFailure } from '@/lib/results/failure-problem';

export interface VersionListed {
  readonly version: number;
  readonly hash: string;
  readonly waiting: boolean;
}

/** A revision's different frame versions, in the order of the frames that have them first. */
export function listVersions(raw: RawDatabase, revision: number): VersionListed[] {
  return raw
    .prepare<[number], { version: number; hash: string; waiting: number }>(
      `select v.id as version, v.hash, v.state = 'waiting' as waiting
       from revision_frame f join frame_version v on v.id = f.version
       where f.revision = ? group by v.id order by min(f.frame)`,
    )
    .all(revision)
    .map((row) => ({ ...row, waiting: row.waiting === 1 }));
}

/** Those of the versions that still wait, with their models, under the name of the first frame of the revision that has each. */
export function listWaitingFrames(raw: RawDatabase, revision: number, versions: readonly number[]): WaitingFrame[] {
  const one = raw.prepare<[number, number], NamedVersion & { id: number; hash: string }>(
    `select v.id, v.hash, v.model, f.frame_id, f.title, f.group_name, f.count, f.note
     from frame_version v join revision_frame f on f.version = v.id and f.revision = ?
     where v.id = ? and v.state = 'waiting' order by f.frame limit 1`,
  );
  return versions.flatMap((version) => {
    const row = one.get(revision, version);
    return row ? [{ version: row.id, hash: row.hash, frame: frameOf(row) }] : [];
  });
}

/** Counts frames of a job as done, from the thread that did them. */
export function addJobProgress(raw: RawDatabase, job: number, frames: number): void {
  raw.prepare('update job set done = min(total, done + ?) where id = ?').run(frames, job);
}

/** Why frames of a revision were not solved, in their order. */
export function listFailures(raw: RawDatabase, revision: number): FrameFailure[] {
  return raw
    .prepare<[number], { frame_id: string; evaluation: Buffer }>(
      `select f.frame_id, v.evaluation from revision_frame f indexed by revision_frame_status
       join frame_version v on v.id = f.version
       where f.revision = ? and f.status = 'not solved' and v.evaluation is not null order by f.frame`,
    )
    .all(revision)
    .flatMap(({ frame_id, evaluation }) => {
      const { failure } = (unpack(evaluation) as { evaluation: Pick<FrameEvaluation, 'failure'> }).evaluation;
      return failure ? [{ frame: frame_id, failure }] : [];
    });
}

/** Counts a revision's problems afresh, after some were added. */
export function updateProblemCounts(raw: RawDatabase, revision: number): void {
  const count = (severity: number): string =>
    `(select count(*) from problem where problem.revision = revision.id and severity = ${severity})`;
  raw
    .prepare(
      `update revision set errors = ${count(0)}, warnings = ${count(1)}, notes = ${count(2)}, stamp = stamp + 1 where id = ?`,
    )
    .run(revision);
}

interface RowKept {
  readonly ordinal: number;
  readonly sheet: string;
  readonly row: number;
  readonly cells: string;
  readonly part: number | null;
  readonly marks: string | null;
  readonly changedBy: string | null;
}

/** Rows as typed, in order; reads a thousand at a time, and may be called again. */
export function* inputRows(raw: RawDatabase, revision: number): Generator<InputRow> {
  const some = raw.prepare<[number, number], RowKept>(
    `select ordinal, sheet, row, cells, part, marks, changed_by as changedBy from input_row
     where revision = ? and ordinal > ? order by ordinal limit 1000`,
  );
  for (let last = -1; ;) {
    const rows = some.all(revision, last);
    for (const { sheet, row, cells, part, marks, changedBy } of rows) {
      const kept = { sheet, row, cells: JSON.parse(cells) as (string | null)[], marks, changedBy };
      yield part === null ? kept : { ...kept, part };
    }
    if (rows.length < 1000) return;
    last = rows.at(-1)!.ordinal;
  }
}

/**
 * Fails revisions in state "reading" that no job will read: their upload was cut short when the server ended.
 *
 * @returns their ids
 */
export function failStrandedReadings(raw: RawDatabase, reason: string): number[] {
  return raw
    .prepare<[string], number>(
      `update revision set state = 'failed', reason = ? where state = 'reading'
       and not exists (select 1 from job where job.revision = revision.id and job.state in ('queued', 'running')) returning id`,
    )
    .pluck()
    .all(reason);
}

/** Cells of the widest row as typed; 0 where there is none. */
export function inputWidth(raw: RawDatabase, revision: number): number {
  return raw
    .prepare<[number], { widest: number }>(
      'select coalesce(max(json_array_length(cells)), 0) as widest from input_row where revision = ?',
    )
    .get(revision)!.widest;
}
