import 'server-only';
import type { z } from 'zod';
import { db } from '@/db/client';
import { listMakings, type FrameMakings } from '@/db/queries/issued-frames';
import { listIssuesFor, type IssueRecord } from '@/db/queries/issues';
import { findRevisionById } from '@/db/queries/revisions';
import { findSummary, type SummaryCell } from '@/db/queries/summary';
import type { Person } from '@/lib/access/may';
import type { issuedFramesInput } from '@/lib/api/issue-inputs';
import type { IssuedCounts } from '@/lib/issuing/issue-sentence';
import { idKey } from '@/lib/intake/ids';
import type { Acceptance } from '@/lib/reports/issue-cover';
import type { FramePair } from '@/lib/results/compare';
import type { InputGroup, SettingDifference } from '@/lib/results/compare-inputs';
import type { Verdict } from '@/lib/results/result';
import { comparedPage, settingsThatDiffer } from './compared';

/** A frame that was issued: what was stored of it, never computed again. */
export type IssuedCell = SummaryCell & { readonly verdict: Verdict };

/** The frames that were issued, in sheet order: those that have a solution. */
export async function issuedCells(issue: IssueRecord): Promise<IssuedCell[]> {
  const summary = await findSummary(db(), issue.office, issue.revision.id);
  return (summary?.cells ?? []).flatMap((cell) =>
    cell.status === 'solved' && cell.verdict !== null ? [{ ...cell, verdict: cell.verdict }] : [],
  );
}

export function issuedCounts(cells: readonly IssuedCell[], issue: IssueRecord): IssuedCounts {
  const counts = { over: 0, notChecked: 0, near: 0, within: 0 };
  for (const { verdict } of cells) counts[verdict === 'not checked' ? 'notChecked' : verdict] += 1;
  return { ...counts, notIssued: issue.cover.notIssued.length };
}

/** A frame by its number in sheet order, from 1, or by its name. @returns undefined where no such frame was issued */
export async function frameOfIssue(issue: IssueRecord, named: number | string): Promise<IssuedCell | undefined> {
  const key = typeof named === 'string' ? idKey(named) : null;
  return (await issuedCells(issue)).find(({ index, id }) => (key === null ? index + 1 === named : idKey(id) === key));
}

export interface IssuedFrame extends FrameMakings {
  /** In sheet order, from 1. */
  readonly number: number;
  readonly id: string;
  readonly group: string | null;
  readonly verdict: Verdict;
  readonly ratio: number | null;
  /** What a checker accepted of it, with the reason. */
  readonly accepted: readonly Acceptance[];
}

export interface IssuedFrames {
  readonly rows: readonly IssuedFrame[];
  readonly matching: number;
  readonly groups: readonly string[];
}

/** A page of the frames that were issued. */
export async function issuedFrames(
  issue: IssueRecord,
  cells: readonly IssuedCell[],
  asked: z.output<typeof issuedFramesInput>,
): Promise<IssuedFrames> {
  const find = asked.find?.toLowerCase();
  const fitting = cells.filter(
    ({ id, group, verdict }) =>
      (find === undefined || find === '' || id.toLowerCase().includes(find)) &&
      (asked.group === undefined || asked.group === '' || group === asked.group) &&
      (asked.verdict === undefined || verdict === asked.verdict),
  );
  const page = fitting.slice((asked.page - 1) * asked.size, asked.page * asked.size);
  const makings = await listMakings(db(), issue.office, issue.revision.id, page.map(({ index }) => index)); // prettier-ignore
  return {
    rows: page.map(({ index, id, group, verdict, ratio }) => ({
      number: index + 1,
      id,
      group,
      verdict,
      ratio,
      accepted: issue.cover.acceptances.filter(({ frame }) => frame === id),
      ...(makings.get(index) ?? { sections: [], parameters: [] }),
    })),
    matching: fitting.length,
    groups: [...new Set(cells.flatMap(({ group }) => group ?? []))],
  };
}

export interface ChangedSince {
  readonly issue: { readonly id: number; readonly number: string; readonly at: string; readonly state: string };
  readonly frames: { readonly before: number; readonly after: number; readonly carried: number };
  /** The frames that moved most, worst first; at most as many as were asked for. */
  readonly moved: readonly FramePair[];
  readonly matching: number;
  readonly inputs: readonly InputGroup[];
  readonly settings: readonly SettingDifference[];
}

/** Frames that a page of changes names one by one. */
const mostMoved = 40;

/** What changed since the issue of the same batch that this client got before; null where they got none. */
export async function changedSince(person: Person, issue: IssueRecord): Promise<ChangedSince | null> {
  const earlier = (await listIssuesFor(db(), person.office, person.id)).find(
    (one) => one.batch.id === issue.batch.id && one.id < issue.id,
  );
  if (!earlier) return null;
  const [before, after] = [
    await findRevisionById(db(), issue.office, earlier.revision.id),
    await findRevisionById(db(), issue.office, issue.revision.id),
  ];
  if (!before || !after) return null;
  const asked = { list: 'frames', show: 'moved', by: 0.005, page: 1, size: mostMoved } as const;
  const two = { before, after, all: [before, after] };
  const { totals, inputs, page, matching } = await comparedPage(two, asked, false);
  return {
    issue: { id: earlier.id, number: earlier.number, at: earlier.issuedAt, state: earlier.state },
    frames: totals.frames,
    moved: page.list === 'frames' ? page.rows : [],
    matching,
    inputs: inputs.first,
    settings: settingsThatDiffer(two),
  };
}
