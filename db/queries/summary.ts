import { orNull } from '@/db/absent';
import { type Db, driverOf, type RawDatabase } from '@/db/open';
import { stampOf } from '@/db/queries/lists';
import type { VerdictCounts } from '@/db/queries/verdict-counts';
import { remembered } from '@/db/remembered';
import type { FrameStatus } from '@/db/schema';
import { statement } from '@/db/statements';
import { verdictOf } from '@/db/verdict-rank';
import type { Verdict } from '@/lib/results/result';

export interface SummaryCell {
  /** Place in sheet order, from 0. */
  readonly index: number;
  readonly id: string;
  readonly status: FrameStatus;
  /** Null: not run yet, or stopped. */
  readonly verdict: Verdict | null;
  readonly ratio: number | null;
  readonly check: string | null;
  readonly subject: string | null;
  readonly section: string | null;
  readonly combination: string | null;
  readonly group: string | null;
  readonly reason: string | null;
}

export interface BatchSummary {
  readonly counts: VerdictCounts;
  readonly cells: readonly SummaryCell[];
  /** Frames by ratio in steps up to 0.05, 0.10 … (1.00 in the one below 1.00); the last holds all above. Without a ratio: left out. */
  readonly spread: { readonly step: number; readonly frames: readonly number[] };
  /** Which check governs how many frames, and how many of these are over; the most frequent first. */
  readonly governing: readonly { readonly check: string; readonly frames: number; readonly over: number }[];
  /** Sections by how hard their members work; the hardest first. */
  readonly sections: readonly SectionSummary[];
  /** Worst first, at most ten: over before not checked before near, then by ratio. */
  readonly worst: readonly SummaryCell[];
  /** Parameters of the batch's families. */
  readonly parameters: readonly { readonly name: string; readonly quantity: string; readonly numeric: boolean }[];
  /** kg of all frames with their number off, those without a known mass left out; null where none is known. */
  readonly mass: number | null;
}

export interface SectionSummary {
  readonly section: string;
  readonly members: number;
  /** Of its members that have a ratio. */
  readonly median: number | null;
  readonly worst: number | null;
  /** Of the member that is worst; null where none has a ratio. */
  readonly verdict: Verdict | null;
  readonly over: number;
}

const perUnit = 20;
const steps = 26; // up to 1.25, and all above

/** A revision at a glance. @returns undefined where it is not the office's */
export async function findSummary(db: Db, office: number, revision: number): Promise<BatchSummary | undefined> {
  const raw = driverOf(db);
  const stamp = stampOf(raw, office, revision);
  if (stamp === undefined) return undefined;
  return remembered(raw, 'summary', `${revision} ${stamp}`, () => summarise(raw, revision));
}

function summarise(raw: RawDatabase, revision: number): BatchSummary {
  const { cells, counts, mass } = readFrames(raw, revision);
  return {
    counts,
    cells,
    spread: spreadOf(cells),
    governing: governingChecks(cells),
    sections: sectionsOf(raw, revision),
    worst: worstOf(raw, revision, cells),
    parameters: parametersOf(raw, revision),
    mass,
  };
}

function spreadOf(cells: readonly SummaryCell[]): BatchSummary['spread'] {
  const frames = Array<number>(steps).fill(0);
  for (const { ratio } of cells) {
    if (ratio === null) continue;
    const at = Math.max(Math.ceil(ratio * perUnit) - 1, 0);
    frames[Math.min(at, steps - 1)]! += 1;
  }
  return { step: 1 / perUnit, frames };
}

/** Parameters of the families of a revision's frames, by name. Empty for a revision that is not the office's. */
export async function listParameters(db: Db, office: number, revision: number): Promise<BatchSummary['parameters']> {
  const raw = driverOf(db);
  return stampOf(raw, office, revision) === undefined ? [] : parametersOf(raw, revision);
}

/** Values of one numeric parameter beside each frame's ratio, in sheet order: a picture over a parameter. */
export async function listParameterRatios(
  db: Db,
  office: number,
  revision: number,
  parameter: string,
): Promise<{ index: number; value: number; ratio: number | null; verdict: Verdict | null; group: string | null }[]> {
  const rows = await db
    .selectFrom('revision_frame')
    .innerJoin('revision', 'revision.id', 'revision_frame.revision')
    .innerJoin('frame_parameter', 'frame_parameter.version', 'revision_frame.version')
    .select((eb) => [
      'revision_frame.frame as index',
      eb.ref('frame_parameter.number').$notNull().as('value'),
      'revision_frame.ratio',
      'revision_frame.verdict',
      'revision_frame.group_name as group',
    ])
    .where('revision.office', '=', office)
    .where('revision_frame.revision', '=', revision)
    .where('frame_parameter.name', '=', parameter)
    .where('frame_parameter.number', 'is not', null)
    .orderBy('revision_frame.frame')
    .execute();
  return rows.map((row) => ({ ...row, ratio: orNull(row.ratio), verdict: verdictOf(row.verdict), group: row.group || null }));
}

/** What is counted over all frames while they are read. */
interface Frames {
  readonly cells: SummaryCell[];
  readonly counts: { -readonly [K in keyof VerdictCounts]: VerdictCounts[K] };
  mass: number | null;
}

const columns = `frame, frame_id, status, verdict, ratio, check_name, subject, section, combination, group_name, reason, mass, count`;
type Read = [
  index: number, id: string, status: FrameStatus, verdict: number, ratio: number, check: string, subject: string | null,
  section: string, combination: string, group: string, reason: string | null, mass: number, count: number,
]; // prettier-ignore
/** Rows read at once, so that they are gone before they are many. */
const piece = 500;
const ranks = ['within', 'near', 'notChecked', 'over'] as const;

function readFrames(raw: RawDatabase, revision: number): Frames {
  const some = raw
    .prepare<[number, number], Read>(
      `select ${columns} from revision_frame where revision = ? and frame > ? order by frame limit ${piece}`,
    )
    .raw();
  const counts = { over: 0, notChecked: 0, near: 0, within: 0, waiting: 0, stopped: 0 };
  const found: Frames = { cells: [], counts, mass: null };
  // few words stand in many frames: each is kept once
  const words = new Map<string, string>();
  const once = (word: string | null): string | null => {
    if (word === null || word === '') return null;
    const known = words.get(word);
    if (known === undefined) words.set(word, word);
    return known ?? word;
  };
  for (let last = -1; ;) {
    const rows = some.all(revision, last);
    for (const [index, id, status, rank, ratio, checkName, subject, section, combination, group, reason, mass, count] of rows) {
      const check = once(checkName);
      found.cells.push({
        index, id, check,
        status: once(status) as FrameStatus,
        reason: once(reason),
        verdict: verdictOf(rank),
        ratio: orNull(ratio),
        subject: check === null ? null : (once(subject) ?? id),
        section: once(section),
        combination: once(combination),
        group: once(group),
      }); // prettier-ignore
      counts[status === 'stopped' ? 'stopped' : (ranks[rank] ?? 'waiting')] += 1;
      if (orNull(mass) !== null) found.mass = (found.mass ?? 0) + mass * count;
    }
    if (rows.length < piece) return found;
    last = rows.at(-1)![0];
  }
}

function governingChecks(cells: readonly SummaryCell[]): BatchSummary['governing'] {
  const checks = new Map<string, { check: string; frames: number; over: number }>();
  for (const { check, verdict } of cells) {
    if (check === null) continue;
    const known = checks.get(check) ?? { check, frames: 0, over: 0 };
    known.frames += 1;
    if (verdict === 'over') known.over += 1;
    checks.set(check, known);
  }
  return [...checks.values()].sort((a, b) => b.frames - a.frames || (a.check < b.check ? -1 : 1));
}

/** From the list of members by section, whose order makes the median the row in the middle. */
function sectionsOf(raw: RawDatabase, revision: number): SectionSummary[] {
  const counted = statement<{ section: string; members: number; over: number }>(
    raw,
    `select b as section, sum(rows) as members, sum(case when e = '3' then rows else 0 end) as over
     from tally where revision = ? and list = 'members' group by b`,
  ).all(revision);
  const ratios = 'from member_row indexed by member_row_section_ratio where revision = ? and section = ? and ratio >= 0';
  const withRatio = statement<{ n: number }>(raw, `select count(*) as n ${ratios}`);
  const inOrder = `${ratios} order by ratio desc`;
  const nth = statement<{ ratio: number }>(raw, `select ratio ${inOrder} limit 2 offset ?`);
  const first = statement<{ ratio: number; verdict: number }>(raw, `select ratio, verdict ${inOrder}, frame, member limit 1`);
  const found = counted.map(({ section, members, over }): SectionSummary => {
    const { n } = withRatio.get(revision, section)!;
    if (n === 0) return { section, members, median: null, worst: null, verdict: null, over };
    const at = (offset: number) => nth.all(revision, section, offset);
    const [low, high] = at((n - 1) >> 1);
    const median = n % 2 === 1 ? low!.ratio : (low!.ratio + high!.ratio) / 2;
    const { ratio: worst, verdict } = first.get(revision, section)!;
    return { section, members, median, worst, verdict: verdictOf(verdict), over };
  });
  return found.sort((a, b) => (b.worst ?? -1) - (a.worst ?? -1) || (a.section < b.section ? -1 : 1));
}

function worstOf(raw: RawDatabase, revision: number, cells: readonly SummaryCell[]): SummaryCell[] {
  const rows = statement<{ frame: number }>(
    raw,
    `select frame from revision_frame where revision = ? and verdict = ? order by ratio desc, frame limit 10`,
  );
  const frames = [3, 2, 1, 0].flatMap((verdict) => rows.all(revision, verdict));
  return frames.slice(0, 10).flatMap(({ frame }) => cells[frame] ?? []);
}

function parametersOf(raw: RawDatabase, revision: number): BatchSummary['parameters'] {
  const families = statement<{ family: string }>(
    raw,
    `with recursive step (family) as (
       select min(family) from revision_frame where revision = ? and family > ''
       union all
       select (select min(family) from revision_frame where revision = ? and family > step.family) from step where family is not null)
     select family from step where family is not null`,
  ).all(revision, revision);
  // A family's variants have the same parameters, so one frame of each is enough.
  const ofOne = statement<{ name: string; quantity: string; numeric: number }>(
    raw,
    `select name, quantity, number is not null as numeric from frame_parameter where version =
       (select version from revision_frame where revision = ? and family = ? and version is not null limit 1)`,
  );
  const found = new Map<string, BatchSummary['parameters'][number]>();
  for (const { family } of families) {
    for (const row of ofOne.all(revision, family)) found.set(row.name, { ...row, numeric: row.numeric === 1 });
  }
  return [...found.values()].sort((a, b) => (a.name < b.name ? -1 : 1));
}
