/** Every frame of a revision with its results, for result files: read piece by piece on the raw driver, in a thread. */
import type { RawDatabase } from '@/db/open';
import { evaluationOf, frameOf, statesOnly, type NamedVersion, type StoredState } from '@/db/queries/results';
import type { Frame } from '@/lib/model/frame';
import type { FrameEvaluation, ResultState } from '@/lib/results/result';

export interface FrameRow {
  /** Place in sheet order, from 0. */
  readonly index: number;
  readonly id: string;
  readonly title: string | null;
  readonly group: string | null;
  readonly count: number;
  readonly note: string | null;
  /** Null where errors of its sheets stop it. */
  readonly frame: Frame | null;
  /** Null until run. */
  readonly evaluation: FrameEvaluation | null;
  readonly version: number | null;
}

type Row = Omit<NamedVersion, 'model'> & {
  readonly frame: number;
  readonly version: number | null;
  readonly model: Buffer | null;
  readonly evaluation: Buffer | null;
  readonly state: 'waiting' | 'solved' | 'not solved' | null;
};

/** The states of one frame version, in their order. */
export function readStates(raw: RawDatabase): (version: number) => readonly ResultState[] {
  const states = raw.prepare<[number], StoredState>('select * from result_state where version = ? order by ordinal');
  return (version) => statesOnly(states.all(version)).states;
}

/** Frames read from the database at once. */
const piece = 100;

/**
 * @param need without `states` an evaluation's states are left empty; with `checks` false all but its states is: what is
 *   not needed is not read
 */
export function* frameRows(
  raw: RawDatabase,
  revision: number,
  need: { readonly states: boolean; readonly checks?: boolean },
): Generator<FrameRow> {
  const some = raw.prepare<[number, number], Row>(
    `select f.frame, f.frame_id, f.title, f.group_name, f.count, f.note, f.version, v.model, ${
      need.checks === false ? 'null as evaluation' : 'v.evaluation'
    }, v.state
     from revision_frame f left join frame_version v on v.id = f.version
     where f.revision = ? and f.frame > ? order by f.frame limit ${piece}`,
  );
  const states = raw.prepare<[number], StoredState>('select * from result_state where version = ? order by ordinal');
  for (let last = -1; ;) {
    const rows = some.all(revision, last);
    for (const row of rows) {
      const { frame: index, frame_id: id, title, group_name, count, note, model, evaluation, version } = row;
      const found = need.states && version !== null ? states.all(version) : [];
      const solved = version !== null && row.state !== 'waiting';
      const stored =
        need.checks === false ? (solved ? statesOnly(found) : null) : evaluation && evaluationOf(evaluation, found).evaluation;
      yield {
        index,
        id,
        title,
        group: group_name === '' ? null : group_name,
        count,
        note,
        frame: model && frameOf({ ...row, model }),
        evaluation: stored,
        version,
      };
    }
    if (rows.length < piece) return;
    last = rows.at(-1)!.frame;
  }
}
