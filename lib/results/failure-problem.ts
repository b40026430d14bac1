/** Mechanisms and loose parts found by the analysis, told as problems at the cell that can put them right. */
import type { InputRow, Intake, SheetRead } from '@/lib/intake/intake';
import { idKey as compared } from '@/lib/intake/ids';
import type { Problem } from '@/lib/problems/problem';
import type { Failure } from '@/lib/results/result';

export interface FrameFailure {
  readonly frame: string;
  readonly failure: Failure;
}

/** What of an intake is needed to find cells and keep the order of problems. */
export interface FailureContext extends Pick<Intake, 'problems' | 'sheets'> {
  readonly rows: Iterable<InputRow>;
}

/**
 * The intake's problems and those that the analysis found, in the order of sheets in the file, rows, columns.
 * A failed certificate is no problem of a sheet: it stands in the frame's reasons only.
 */
export function problemsWithFailures(intake: FailureContext, failures: readonly FrameFailure[]): readonly Problem[] {
  return problemsInOrder([...intake.problems, ...failureProblems(intake, failures)], intake.sheets);
}

/** Problems in the order of sheets in the file, rows, columns; those of one cell stay as they are. */
export function problemsInOrder(problems: readonly Problem[], sheets: readonly SheetRead[]): readonly Problem[] {
  const byName = new Map<string, number>();
  const byFile = new Map<string, number>();
  sheets.forEach((sheet, i) => {
    if (!byName.has(sheet.name)) byName.set(sheet.name, i);
    byFile.set(`${sheet.file} ${sheet.name}`, i);
  });
  const at = (p: Problem): number =>
    p.sheet === null ? -1 : (byFile.get(`${p.file ?? ''} ${p.sheet}`) ?? byName.get(p.sheet) ?? sheets.length);
  return problems
    .map((problem, i) => ({ problem, i, sheet: at(problem), row: problem.row ?? 0, column: columnNumber(problem.cell) }))
    .sort((a, b) => a.sheet - b.sheet || a.row - b.row || a.column - b.column || a.i - b.i)
    .map(({ problem }) => problem);
}

/** Problems for what the analysis found, one a cell; without those that `intake.problems` already holds. */
export function failureProblems(intake: FailureContext, failures: readonly FrameFailure[]): readonly Problem[] {
  if (failures.length === 0) return [];
  const rows = new RowFinder(intake, new Set(failures.flatMap(({ frame }) => idKey(frame) ?? [])));
  const byCell = new Map<string, Problem & { frames: string[] }>();
  for (const { frame, failure } of failures) {
    if (failure.code === 'not-solved') continue;
    const place = rows.find(frame, failure);
    const key = place ? `${failure.code} ${place.sheet} ${place.cell}` : `${failure.code} ${frame}`;
    const same = byCell.get(key);
    if (same) {
      same.frames.push(frame);
      continue;
    }
    byCell.set(key, {
      severity: 'error',
      code: failure.code,
      sheet: place?.sheet ?? null,
      file: place?.file ?? null,
      row: place?.row ?? null,
      column: place?.column ?? null,
      cell: place?.cell ?? null,
      frames: [frame],
      found: place?.found ?? null,
      message: failure.message,
      stopsAll: false,
    });
  }
  const same = (p: Problem): string => `${p.code} ${p.sheet ?? ''} ${p.cell ?? ''} ${p.cell === null ? (p.frames[0] ?? '') : ''}`;
  const known = new Set(intake.problems.map(same));
  return [...byCell.values()].filter((problem) => !known.has(same(problem)));
}

interface Place {
  readonly sheet: string;
  readonly file: string;
  readonly row: number;
  readonly column: string;
  readonly cell: string;
  readonly found: string | null;
}

/** Sheets where a frame that moves freely or hangs apart can be mended. */
const mending: ReadonlySet<string> = new Set(['supports', 'members', 'nodes', 'variants', 'frames']);
/** In a frame column: every frame. */
const everyFrame = '*';

/** Finds a frame's first row on the sheets that can mend it: Supports, else Members or Nodes, else Variants, else Frames. */
class RowFinder {
  private readonly sheets: readonly { sheet: SheetRead; rows: Map<string, RowAt[]> }[];

  /** @param frames keys of the frames that will be asked for: rows of others are not kept */
  constructor(intake: FailureContext, frames: ReadonlySet<string>) {
    this.sheets = intake.sheets.map((sheet) => ({ sheet, rows: new Map<string, RowAt[]>() }));
    const wanted = this.sheets.filter(({ sheet }) => mending.has(sheet.known?.toLowerCase() ?? ''));
    for (const { sheet: name, row, cells } of intake.rows)
      for (const { sheet, rows } of wanted) {
        if (sheet.name !== name || (sheet.headingRow !== null && row <= sheet.headingRow)) continue;
        const id = idKey(cells[columnOf(sheet, 'frame')] ?? null);
        if (id === null || (id !== everyFrame && !frames.has(id))) continue;
        const list = rows.get(id);
        if (list) list.push({ row, cells });
        else rows.set(id, [{ row, cells }]);
      }
  }

  find(frame: string, failure: Failure): Place | null {
    const nodeColumns = ['node', 'start', 'end'];
    const kinds =
      failure.code === 'mechanism' ? ['supports', 'variants', 'nodes', 'frames'] : ['members', 'nodes', 'variants', 'frames'];
    for (const kind of kinds)
      for (const { sheet, rows } of this.sheets) {
        if (sheet.known?.toLowerCase() !== kind) continue;
        const own = rows.get(idKey(frame) ?? '') ?? (kind === 'frames' ? [] : (rows.get(everyFrame) ?? []));
        const named =
          kind === 'members' || kind === 'nodes' ? own.find((row) => this.names(sheet, row, failure, nodeColumns)) : own[0];
        const row = named ?? own[0];
        if (row) return place(sheet, row);
      }
    return null;
  }

  private names(sheet: SheetRead, row: RowAt, failure: Failure, columns: readonly string[]): boolean {
    const node = idKey(failure.node);
    return node !== null && columns.some((name) => idKey(row.cells[columnOf(sheet, name)] ?? null) === node);
  }
}

interface RowAt {
  readonly row: number;
  readonly cells: readonly (string | null)[];
}

function place(sheet: SheetRead, row: RowAt): Place {
  const column = columnOf(sheet, 'frame');
  const heading = sheet.headings.find((h) => columnNumber(h.cell) === column + 1);
  const letters = (heading?.cell ?? 'A1').replace(/\d+$/, '');
  return {
    sheet: sheet.name,
    file: sheet.file,
    row: row.row,
    column: heading?.text ?? 'frame',
    cell: `${letters}${row.row}`,
    found: row.cells[column] ?? null,
  };
}

/** 0-based column of a known heading, −1 where the sheet has none. */
function columnOf(sheet: SheetRead, known: string): number {
  const heading = sheet.headings.find((h) => h.known?.toLowerCase() === known);
  return heading ? columnNumber(heading.cell) - 1 : -1;
}

/** 1-based number of a cell's column: "AB7" → 28; 0 where there is no cell. */
function columnNumber(cell: string | null): number {
  let n = 0;
  for (const letter of cell?.match(/^[A-Z]+/)?.[0] ?? '') n = n * 26 + letter.charCodeAt(0) - 64;
  return n;
}

/** The form in which ids are compared; null for a blank cell. */
function idKey(text: string | null): string | null {
  const key = text === null ? '' : compared(text);
  return key === '' ? null : key;
}
