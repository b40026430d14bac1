/**
 * What is gathered in one pass over the frames: the cover's counts, and the sheets whose rows are few enough to keep.
 * The long sheets make passes of their own and hold nothing.
 */
import { acceptedWords } from '@/lib/reports/accepted-words';
import { flagsOf, frameRow, type Flag } from '@/lib/reports/workbook/frame-rows';
import { DistinctParts } from '@/lib/reports/workbook/distinct-parts';
import { loadTotals } from '@/lib/reports/workbook/load-totals';
import type { ReportRow } from '@/lib/reports/workbook/report-sheet';
import type { ReportFrame, ReportSource } from '@/lib/reports/workbook/report-source';
import { verdictOf } from '@/lib/reports/workbook/verdict-of';
import type { Verdict } from '@/lib/results/result';

export interface BatchFacts {
  readonly frames: number;
  readonly over: number;
  readonly notChecked: number;
  readonly near: number;
  readonly within: number;
  readonly notSolved: number;
  /** Each once, with how many frames it holds for. */
  readonly assumptions: readonly string[];
  readonly frameRows: readonly ReportRow[];
  /** Worst first. */
  readonly flagRows: readonly ReportRow[];
  readonly totalRows: readonly ReportRow[];
  readonly parts: DistinctParts;
  /** Some frame has tension-only members. */
  readonly tied: boolean;
}

export async function gatherFacts(source: ReportSource): Promise<BatchFacts> {
  const system = source.settings.units;
  const counts: Record<Verdict, number> = { over: 0, 'not checked': 0, near: 0, within: 0 };
  const assumed = new Map<string, number>();
  const frameRows: ReportRow[] = [];
  const flags: Flag[] = [];
  const totalRows: ReportRow[] = [];
  const parts = new DistinctParts();
  const accepted = source.issue ? acceptedWords(source.issue.acceptances) : null;
  let notSolved = 0;
  let tied = false;
  const take = (each: ReportFrame): void => {
    counts[verdictOf(each)] += 1;
    if (each.evaluation?.status !== 'solved') notSolved += 1;
    for (const line of each.evaluation?.assumptions ?? []) assumed.set(line, (assumed.get(line) ?? 0) + 1);
    frameRows.push(frameRow(each, system));
    flags.push(...flagsOf(each, accepted));
    if (each.frame === null) return;
    parts.add(each.frame);
    tied ||= each.frame.members.some((member) => member.tensionOnly);
    totalRows.push(...loadTotals(each.id, each.frame, system));
  };
  for await (const each of source.frames({ states: false })) take(each);
  flags.sort((a, b) => a.order - b.order || b.ratio - a.ratio || a.number - b.number);
  return {
    frames: frameRows.length,
    over: counts.over,
    notChecked: counts['not checked'],
    near: counts.near,
    within: counts.within,
    notSolved,
    assumptions: [...assumed].map(([line, count]) =>
      count === frameRows.length ? line : `${line} (${count} of ${frameRows.length} frames)`,
    ),
    frameRows,
    flagRows: flags.map((flag) => flag.row),
    totalRows,
    parts,
    tied,
  };
}
