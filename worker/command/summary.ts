/** What the command line prints where no output is named. */
import type { Problem } from '@/lib/problems/problem';
import type { Verdict } from '@/lib/results/result';
import { formatRatio } from '@/lib/units/format';
import type { EvaluatedBatch } from './evaluate-batch';

/** The first errors, a line each with its cell, and how many there are besides. */
export function errorLines(problems: readonly Problem[], most: number): string[] {
  const errors = problems.filter((problem) => problem.severity === 'error');
  const lines = errors.slice(0, most).map(({ file, sheet, cell, message }) => {
    const place = [sheet ?? file, cell].filter((part) => part !== null).join(', ');
    return place ? `${place}: ${message}` : message;
  });
  const more = errors.length - lines.length;
  return more > 0 ? [...lines, `… and ${more} more. --json OUT writes them all.`] : lines;
}

interface Line {
  readonly frame: string;
  readonly verdict: Verdict;
  readonly ratio: number | null;
  readonly where: string;
  readonly reason: string;
}

/** Where the sheets are silent: what an office would have said is not known here. */
const noOffice =
  'Limits are those of the sheets, which give none for some movement: no office’s own limits apply on the command line.';

/** Frames, counts by verdict, and the ten worst (over first, then near, by ratio) as a table. */
export async function summarise(source: EvaluatedBatch): Promise<string> {
  const counts: Record<Verdict, number> = { over: 0, 'not checked': 0, near: 0, within: 0 };
  let unsolved = 0;
  const worst: Line[] = [];
  let silent = false;
  for await (const { id, evaluation } of source.frames({ states: false })) {
    silent ||= evaluation?.notChecked.some((reason) => /no (deflection|sway) limit/.test(reason)) ?? false;
    const verdict = evaluation?.verdict ?? 'not checked';
    counts[verdict]++;
    if (evaluation?.status !== 'solved') unsolved++;
    const g = evaluation?.governing;
    worst.push({
      frame: id,
      verdict,
      ratio: g?.ratio ?? null,
      where: g ? [g.check, g.subject ?? '', g.combination ?? ''].filter(Boolean).join(' · ') : '',
      reason: verdict !== 'not checked' ? '' : evaluation ? (evaluation.notChecked[0] ?? '') : 'errors in its sheets',
    });
    // Keep the worst only, however many frames there are; the order of the sheet on a tie.
    if (worst.length > 200) keepWorst(worst);
  }
  keepWorst(worst);
  const by = (severity: string): string => {
    const count = source.problems.filter((problem) => problem.severity === severity).length;
    return `${count} ${severity}${count === 1 ? '' : 's'}`;
  };
  const lines = [
    `${source.input.name}  sha256 ${source.input.sha256.slice(0, 12)}…  ${source.engine}`,
    `${source.frameCount} frames: ${counts.over} over, ${counts['not checked']} not checked, ${counts.near} near, ${counts.within} within; ${unsolved} not solved`,
    `Problems in the sheets: ${by('error')}, ${by('warning')}, ${by('note')}`,
    ...errorLines(source.problems, 5).map((line) => `  ${line}`),
    ...(silent ? [noOffice] : []),
    '',
    'Worst first',
    ...table(worst, source.settings.nearLimit),
    '',
    'Results of a linear-elastic plane model of what the sheets say, to be reviewed by a competent engineer.',
  ];
  return `${lines.join('\n')}\n`;
}

const rank: Readonly<Record<Verdict, number>> = { over: 3, 'not checked': 2, near: 1, within: 0 };

function keepWorst(lines: Line[]): void {
  lines.sort((a, b) => rank[b.verdict] - rank[a.verdict] || (b.ratio ?? -1) - (a.ratio ?? -1));
  lines.length = Math.min(lines.length, 10);
}

function table(lines: readonly Line[], nearLimit: number): string[] {
  const cells = [
    ['frame', 'verdict', 'ratio', 'governed by, why not checked'],
    ...lines.map((line) => [
      line.frame,
      line.verdict,
      formatRatio(line.ratio, nearLimit),
      [line.where, line.reason].filter(Boolean).join(': '),
    ]),
  ];
  const widths = [0, 1, 2].map((column) => Math.max(...cells.map((row) => row[column]!.length)));
  return cells.map((row) => row.map((cell, i) => (i < 3 ? cell.padEnd(widths[i]!) : cell)).join('  ').trimEnd()); // prettier-ignore
}
