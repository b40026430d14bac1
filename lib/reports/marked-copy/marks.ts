import { cellPosition } from '@/lib/intake/files/cell-address';
import type { Problem, Severity } from '@/lib/problems/problem';

/** What is marked at one cell: the worst severity and all its problems' words. */
export interface Mark {
  readonly address: string;
  readonly row: number;
  /** 0-based from A. */
  readonly column: number;
  readonly severity: 'error' | 'warning';
  readonly note: string;
}

const word: Readonly<Record<Severity, string>> = { error: 'Error', warning: 'Warning', note: 'Note' };

/** One problem as a line of a cell's note. */
const noteOf = (problem: Problem): string => `${word[problem.severity]}: ${problem.message}`;

/** What a spreadsheet can show in one cell's note. */
const longestNote = 8_000;

/** Marks of one sheet, by row and column. Notes to the reader (severity note) stand on the list of problems only. */
export function marksOf(problems: readonly Problem[]): readonly Mark[] {
  const cells = new Map<string, Mark>();
  for (const problem of problems) {
    const position = problem.cell === null ? null : cellPosition(problem.cell);
    if (!position || problem.severity === 'note') continue;
    const address = (problem.cell ?? '').replaceAll('$', '').toUpperCase();
    const before = cells.get(address);
    const note = before ? `${before.note}\n\n${noteOf(problem)}` : noteOf(problem);
    const severity = before?.severity === 'error' ? 'error' : problem.severity;
    cells.set(address, { address, ...position, severity, note: note.slice(0, longestNote) });
  }
  return [...cells.values()].sort((a, b) => a.row - b.row || a.column - b.column);
}

/** Problems by sheet name as in the file, those of this file or of no file in particular. */
export function bySheet(problems: readonly Problem[], file: string): ReadonlyMap<string, readonly Problem[]> {
  const sheets = new Map<string, Problem[]>();
  for (const problem of problems) {
    if (problem.sheet === null || (problem.file !== null && problem.file !== file)) continue;
    const list = sheets.get(problem.sheet) ?? [];
    list.push(problem);
    sheets.set(problem.sheet, list);
  }
  return sheets;
}

/** Fills, light enough to read black on: red for an error, amber for a warning. */
export const fillColour: Readonly<Record<Mark['severity'], string>> = { error: 'FFFFC7C2', warning: 'FFFFE6A8' };

export const problemHeadings = [
  'severity',
  'code',
  'sheet',
  'row',
  'column',
  'cell',
  'found',
  'frames',
  'what it means, what to do',
];

/** A problem as a row of the added sheet. */
export function problemRow(problem: Problem): readonly string[] {
  const frames =
    problem.frames.length > 20 ? [...problem.frames.slice(0, 20), `and ${problem.frames.length - 20} more`] : problem.frames;
  return [
    problem.severity,
    problem.code,
    problem.sheet ?? problem.file ?? '',
    problem.row === null ? '' : String(problem.row),
    problem.column ?? '',
    problem.cell ?? '',
    problem.found ?? '',
    frames.join(', '),
    problem.message,
  ];
}
