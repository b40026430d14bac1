/** What the cover counts, gathered in one pass over the frames. */
import type { ReportFrame } from '@/lib/reports/workbook/report-source';
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
}

export function verdictOf(each: ReportFrame): Verdict {
  return each.evaluation?.verdict ?? 'not checked';
}

export async function gatherFacts(frames: Iterable<ReportFrame> | AsyncIterable<ReportFrame>): Promise<BatchFacts> {
  const counts: Record<Verdict, number> = { over: 0, 'not checked': 0, near: 0, within: 0 };
  const assumed = new Map<string, number>();
  let total = 0;
  let notSolved = 0;
  for await (const each of frames) {
    total += 1;
    counts[verdictOf(each)] += 1;
    if (each.evaluation?.status !== 'solved') notSolved += 1;
    for (const line of each.evaluation?.assumptions ?? []) assumed.set(line, (assumed.get(line) ?? 0) + 1);
  }
  return {
    frames: total,
    over: counts.over,
    notChecked: counts['not checked'],
    near: counts.near,
    within: counts.within,
    notSolved,
    assumptions: [...assumed].map(([line, count]) => (count === total ? line : `${line} (${count} of ${total} frames)`)),
  };
}
