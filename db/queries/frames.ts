import { frameOrder } from '@/db/lists/frame-order';
import { type Db, driverOf } from '@/db/open';
import { stampOf } from '@/db/queries/lists';
import { evaluationOf, frameOf, type NamedVersion, type StoredState } from '@/db/queries/results';
import type { FrameStatus } from '@/db/schema';
import { statement } from '@/db/statements';
import type { Frame } from '@/lib/model/frame';
import type { MemberGoverning } from '@/lib/results/member-results';
import type { FrameEvaluation } from '@/lib/results/result';
import type { FrameOutcome } from '@/lib/results/source';
import type { View } from '@/lib/tables/view';

export interface FrameStored {
  /** Place in sheet order, from 0. */
  readonly index: number;
  readonly id: string;
  readonly title: string | null;
  readonly group: string | null;
  readonly count: number;
  readonly note: string | null;
  readonly status: FrameStatus;
  /** Null where errors of its sheets stop it. */
  readonly frame: Frame | null;
  /** Null until run. */
  readonly evaluation: FrameEvaluation | null;
  /** By member of the frame; [] where it was not solved. */
  readonly members: readonly MemberGoverning[];
  /** The engine that made the results, and the hash they hang on. */
  readonly engine: string | null;
  readonly hash: string | null;
  readonly uploadedBy: string | null;
  readonly changedBy: string | null;
  readonly runBy: string | null;
}

export interface Neighbours {
  readonly previous: number | null;
  readonly next: number | null;
  /** Its place in the list from 1, null where the filters leave it out; frames in the list. */
  readonly place: number | null;
  readonly of: number;
}

const selected = `f.frame, f.frame_id, f.title, f.group_name, f.count, f.note, f.status, v.id, v.model, v.evaluation, v.engine, v.hash,
  uploader.name as uploaded_by, changer.name as changed_by, runner.name as run_by
  from revision_frame f join revision r on r.id = f.revision and r.office = ?
  left join frame_version v on v.id = f.version
  left join person uploader on uploader.id = f.uploaded_by
  left join person changer on changer.id = f.changed_by
  left join person runner on runner.id = f.run_by
  where f.revision = ?`;

interface Read extends Omit<NamedVersion, 'model'> {
  frame: number;
  status: FrameStatus;
  id: number | null;
  model: Buffer | null;
  evaluation: Buffer | null;
  engine: string | null;
  hash: string | null;
  uploaded_by: string | null;
  changed_by: string | null;
  run_by: string | null;
}

/** One frame of a revision by its index from 0, with everything stored of it. */
export async function findFrame(db: Db, office: number, revision: number, index: number): Promise<FrameStored | undefined> {
  const row = statement<Read>(driverOf(db), `select ${selected} and f.frame = ?`).get(office, revision, index);
  return row && stored(db, row);
}

export async function findFrameIndex(db: Db, office: number, revision: number, frameId: string): Promise<number | undefined> {
  const row = await db
    .selectFrom('revision_frame')
    .innerJoin('revision', 'revision.id', 'revision_frame.revision')
    .select('revision_frame.frame')
    .where('revision.office', '=', office)
    .where('revision_frame.revision', '=', revision)
    .where('revision_frame.frame_id', '=', frameId)
    .executeTakeFirst();
  return row?.frame;
}

/** The frames before and after one in a view's order (each frame once, at its first row). */
export async function findNeighbours(db: Db, office: number, revision: number, index: number, view: View): Promise<Neighbours> {
  const raw = driverOf(db);
  const stamp = stampOf(raw, office, revision);
  if (stamp === undefined) return { previous: null, next: null, place: null, of: 0 };
  const order = frameOrder(raw, revision, stamp, view);
  const at = order.indexOf(index);
  if (at < 0) return { previous: null, next: null, place: null, of: order.length };
  return { previous: order[at - 1] ?? null, next: order[at + 1] ?? null, place: at + 1, of: order.length };
}

/** Every frame of a revision in order, one at a time, for result files; a few are held at once. */
export async function* iterateFrames(db: Db, office: number, revision: number): AsyncGenerator<FrameOutcome> {
  const page = statement<Read>(driverOf(db), `select ${selected} and f.frame > ? order by f.frame limit 20`);
  for (let last = -1; ;) {
    const rows = page.all(office, revision, last);
    if (rows.length === 0) return;
    for (const row of rows) {
      const { id, frame, evaluation } = stored(db, row);
      yield { index: row.frame, read: { id, frame }, evaluation };
      last = row.frame;
    }
    await new Promise((resolve) => setImmediate(resolve));
  }
}

function stored(db: Db, row: Read): FrameStored {
  const { model, evaluation: blob } = row;
  const states = statement<StoredState>(driverOf(db), 'select * from result_state where version = ? order by ordinal');
  const found = blob === null ? null : evaluationOf(blob, states.all(row.id));
  return {
    index: row.frame,
    id: row.frame_id,
    title: row.title,
    group: row.group_name === '' ? null : row.group_name,
    count: row.count,
    note: row.note,
    status: row.status,
    frame: model === null ? null : frameOf({ ...row, model }),
    evaluation: found?.evaluation ?? null,
    members: found?.members ?? [],
    engine: row.engine,
    hash: row.hash,
    uploadedBy: row.uploaded_by,
    changedBy: row.changed_by,
    runBy: row.run_by,
  };
}
