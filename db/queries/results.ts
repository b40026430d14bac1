import { instant } from '@/db/clock';
import { packState, unpackModel, unpackState } from '@/db/encode';
import { pack, unpack } from '@/db/pack';
import { ListWriter, type Solved, summaryOf } from '@/db/lists/list-writer';
import type { RawDatabase } from '@/db/open';
import { inShortTransactions } from '@/db/short-transactions';
import type { Frame, Purpose } from '@/lib/model/frame';
import type { MemberGoverning } from '@/lib/results/member-results';
import type { FrameEvaluation, ResultState } from '@/lib/results/result';

/** A frame version that waits to be run, under the name of the first frame that has it. */
export interface WaitingFrame {
  readonly version: number;
  readonly hash: string;
  readonly frame: Frame;
}

export interface FrameResults {
  readonly version: number;
  readonly frame: Frame;
  readonly evaluation: FrameEvaluation;
  /** By member; [] for a frame that was not solved. */
  readonly members: readonly MemberGoverning[];
  /** By state of the evaluation: 14 numbers a member (lib/analysis/member-extremes.ts). */
  readonly extremes: readonly Float64Array[];
}

/** What stands in frame_version.evaluation: all but the states, which have rows of their own. */
interface StoredEvaluation {
  readonly evaluation: Omit<FrameEvaluation, 'states' | 'allChecks'>;
  readonly members: readonly MemberGoverning[];
}

/** Versions of the revision that still wait, in the order of its frames. Skips those in `inHand`. */
export function listWaiting(
  raw: RawDatabase,
  revision: number,
  limit: number,
  inHand: ReadonlySet<number> = new Set(),
): WaitingFrame[] {
  const rows = raw
    .prepare<[number], NamedVersion & { id: number; hash: string }>(
      `select v.id, v.hash, v.model, f.frame_id, f.title, f.group_name, f.count, f.note
       from revision_frame f indexed by revision_frame_status join frame_version v on v.id = f.version
       where f.revision = ? and f.status = 'waiting' order by f.frame`,
    )
    .iterate(revision);
  const found = new Map<number, WaitingFrame>();
  for (const row of rows) {
    if (inHand.has(row.id) || found.has(row.id)) continue;
    found.set(row.id, { version: row.id, hash: row.hash, frame: frameOf(row) });
    if (found.size >= limit) break;
  }
  return [...found.values()];
}

/** Versions of the revision: all, and those that still wait. */
export function countWaiting(raw: RawDatabase, revision: number): { total: number; waiting: number } {
  const { total, waiting } = raw
    .prepare<[number], { total: number; waiting: number | null }>(
      `select count(distinct version) as total, count(distinct case when status = 'waiting' then version end) as waiting
       from revision_frame where revision = ?`,
    )
    .get(revision)!;
  return { total, waiting: waiting ?? 0 };
}

/**
 * Stores a chunk's results, for every revision that has these versions, a frame never in part: in one transaction
 * where the chunk is small (about 2 ms a frame of four members and twelve results), in several where it is not.
 * A version that was stored before is left alone.
 *
 * @returns the versions that were stored now
 */
export function insertChunkResults(
  raw: RawDatabase,
  results: readonly FrameResults[],
  run: { readonly person: number | null },
): number[] {
  const lists = new ListWriter(raw);
  const write = resultWriter(raw, lists, run.person);
  const stored: number[] = [];
  inShortTransactions(
    raw,
    results,
    (result) => {
      if (write(result)) stored.push(result.version);
    },
    () => lists.flush(),
  );
  return stored;
}

function resultWriter(raw: RawDatabase, lists: ListWriter, person: number | null): (result: FrameResults) => boolean {
  const solve = raw.prepare(
    `update frame_version set state = ?, evaluation = ?, verdict = ?, ratio = ?, check_name = ?, subject = ?, section = ?,
     combination = ?, critical_load_factor = ?, mass = ?, reason = ?, residual = ?, equilibrium = ?, condition = ?, digits = ?,
     second = ?, second_reason = ?, solved_at = ? where id = ? and state = 'waiting'`,
  );
  const state = raw.prepare('insert into result_state values (?, ?, ?, ?, ?, ?, ?, ?)');
  const places = raw.prepare<[number], { revision: number; frame: number }>(
    'select revision, frame from revision_frame where version = ? order by revision, frame',
  );
  return ({ version, frame, evaluation, members, extremes }) => {
    const s = summaryOf({ frame, evaluation });
    const c = evaluation.certificate;
    const { changes } = solve.run(
      evaluation.status, packEvaluation({ frame, evaluation, members }), s.verdict, s.ratio, s.check, s.subject, s.section,
      s.combination, s.criticalLoadFactor, s.mass, s.reason, c?.residual ?? null, c?.equilibrium ?? null, c?.condition ?? null,
      c?.digits ?? null, c?.second ?? null, c?.secondReason ?? null, instant(), version,
    ); // prettier-ignore
    if (changes === 0) return false;
    evaluation.states.forEach((one, i) => {
      const packed = packState({ ...one, extremes: extremes[i] });
      state.run(version, i, one.name, one.kind, one.purpose, one.order, one.criticalLoadFactor, packed);
    });
    const where = places.all(version);
    for (const place of where) lists.write(place.revision, place.frame, { frame, evaluation, members }, person);
    return true;
  };
}

function packEvaluation({ evaluation, members }: Solved): Buffer {
  const { states: _states, allChecks: _all, ...rest } = evaluation;
  return pack({ evaluation: rest, members } satisfies StoredEvaluation);
}

export interface NamedVersion {
  readonly frame_id: string;
  readonly title: string | null;
  readonly group_name: string;
  readonly count: number;
  readonly note: string | null;
  readonly model: Buffer;
}

/** A stored model under the name that a revision's frame gives it. */
export function frameOf(row: NamedVersion): Frame {
  const { frame_id: id, title, group_name, count, note } = row;
  return { id, title, group: group_name === '' ? null : group_name, count, note, ...unpackModel(row.model) };
}

export interface StoredState {
  readonly name: string;
  readonly kind: 'case' | 'combination';
  readonly purpose: Purpose | null;
  readonly order_of: 1 | 2;
  readonly critical_load_factor: number | null;
  readonly packed: Buffer;
}

/** A version's evaluation as it was stored, put together with its states in their order. */
/** The states alone: for files that print nothing else of an evaluation, whose other fields stay empty. */
export function statesOnly(states: readonly StoredState[]): FrameEvaluation {
  return {
    status: states.length > 0 ? 'solved' : 'not solved',
    failure: null,
    verdict: 'not checked',
    governing: null,
    notChecked: [],
    assumptions: [],
    mass: null,
    states: states.map(stateOf),
    checks: [],
    allChecks: null,
    certificate: null,
  };
}

export function evaluationOf(stored: Buffer, states: readonly StoredState[]): Omit<Solved, 'frame'> {
  const { evaluation, members } = unpack(stored) as StoredEvaluation;
  return { evaluation: { ...evaluation, states: states.map(stateOf), allChecks: null }, members };
}

function stateOf(row: StoredState): ResultState {
  const { name, kind, purpose, order_of: order, critical_load_factor: criticalLoadFactor } = row;
  return { name, kind, purpose, order, criticalLoadFactor, ...unpackState(row.packed) };
}
