import type { GoverningCount, SectionWork } from '@/components/charts/charts-data';
import type { WorstFrame } from '@/components/charts/worst-frames';
import type { BatchSummary, SummaryCell } from '@/db/queries/summary';
import { pages } from '@/lib/api/addresses';

export function worstFrames(batch: number, letter: string, cells: readonly SummaryCell[]): WorstFrame[] {
  return cells.map(({ index, id, verdict, ratio, check, subject, section, combination }) => ({
    id,
    href: pages.frame(batch, letter, index + 1),
    ratio,
    verdict: verdict ?? 'not checked',
    check,
    subject,
    section,
    combination,
  }));
}

/** Which check governs how many frames, by verdict; the most frequent first. */
export function governingCounts(cells: readonly SummaryCell[]): GoverningCount[] {
  const counts = new Map<string, { over: number; near: number; within: number; notChecked: number }>();
  for (const { check, verdict } of cells) {
    if (check === null || verdict === null) continue;
    const count = counts.get(check) ?? { over: 0, near: 0, within: 0, notChecked: 0 };
    count[verdict === 'not checked' ? 'notChecked' : verdict] += 1;
    counts.set(check, count);
  }
  const all = (one: GoverningCount) => one.over + one.near + one.within + one.notChecked;
  return [...counts].map(([check, count]) => ({ check, ...count })).sort((a, b) => all(b) - all(a));
}

export function sectionWork(sections: BatchSummary['sections']): SectionWork[] {
  return sections.slice(0, 8).map(({ section, members, median, worst, verdict }) => ({
    section,
    members,
    median,
    worst,
    verdict: verdict ?? 'not checked',
  }));
}
