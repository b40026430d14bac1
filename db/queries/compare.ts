/** What is read to compare two revisions of a batch. For a thread: a batch's frames are many. */
import { orNull } from '@/db/absent';
import type { RawDatabase } from '@/db/open';
import type { FrameStatus } from '@/db/schema';
import { statement } from '@/db/statements';
import { verdictOf } from '@/db/verdict-rank';
import type { ComparedFrame, ComparedMember } from '@/lib/results/compare';
import type { KeptRow } from '@/lib/results/compare-inputs';
import type { ReactionRead } from '@/lib/results/compare-reactions';

/** Two revisions of one batch, by their ids. */
export interface ComparedRevisions {
  readonly before: number;
  readonly after: number;
  /** Grows with every change of either's results. */
  readonly stamp: string;
}

/** Undefined where one of them is not the office's, or they are not of one batch. */
export function findCompared(raw: RawDatabase, office: number, before: number, after: number): ComparedRevisions | undefined {
  const of = statement<{ batch: number; stamp: number; state: string }>(
    raw,
    'select batch, stamp, state from revision where id = ? and office = ?',
  );
  const [one, two] = [of.get(before, office), of.get(after, office)];
  if (!one || !two || one.batch !== two.batch) return undefined;
  return { before, after, stamp: [one.stamp, one.state, two.stamp, two.state].join(' ') };
}

interface FrameRow {
  frame: number;
  frame_id: string;
  version: number | null;
  status: FrameStatus;
  verdict: number;
  ratio: number;
  check_name: string;
  subject: string | null;
  section: string;
  combination: string;
  critical_load_factor: number;
  mass: number;
  count: number;
}

/** A revision's frames in sheet order. Its id was found through `findCompared`, as in the functions below. */
export function listComparedFrames(raw: RawDatabase, revision: number): ComparedFrame[] {
  const rows = statement<FrameRow>(
    raw,
    `select frame, frame_id, version, status, verdict, ratio, check_name, subject, section, combination,
       critical_load_factor, mass, count from revision_frame where revision = ? order by frame`,
  ).all(revision);
  return rows.map((row) => ({
    index: row.frame,
    id: row.frame_id,
    version: row.version,
    status: row.status,
    // what was stopped or not run was not checked
    verdict: verdictOf(row.verdict) ?? 'not checked',
    ratio: orNull(row.ratio),
    check: row.check_name || null,
    subject: row.subject,
    section: row.section || null,
    combination: row.combination || null,
    criticalLoadFactor: orNull(row.critical_load_factor),
    mass: orNull(row.mass),
    count: row.count,
  }));
}

/** Members of one frame in their order; none where it was not solved. */
export function listComparedMembers(raw: RawDatabase, revision: number, frame: number): ComparedMember[] {
  const rows = statement<{
    member_id: string;
    role: string;
    section: string;
    check_name: string;
    combination: string | null;
    verdict: number;
    ratio: number;
  }>(
    raw,
    `select member_id, role, section, check_name, combination, verdict, ratio from member_row
     where revision = ? and frame = ? order by member`,
  ).all(revision, frame);
  return rows.map((row) => ({
    id: row.member_id,
    role: row.role,
    section: row.section,
    check: row.check_name || null,
    combination: row.combination,
    verdict: verdictOf(row.verdict) ?? 'not checked',
    ratio: orNull(row.ratio),
  }));
}

/** Reactions of one frame, a row a result and support. */
export function listComparedReactions(raw: RawDatabase, revision: number, frame: number): ReactionRead[] {
  return statement<ReactionRead>(
    raw,
    'select node, fx, fy, mz from reaction_row where revision = ? and frame = ? order by result, support',
  ).all(revision, frame);
}

/** Rows as typed, in order, without reading their cells. */
export function iterateKeptRows(raw: RawDatabase, revision: number): IterableIterator<KeptRow> {
  return raw
    .prepare<[number], KeptRow>('select part, sheet, row, cells from input_row where revision = ? order by ordinal')
    .iterate(revision);
}
