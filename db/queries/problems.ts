import type { Db } from '@/db/open';
import type { DB, ProblemTable } from '@/db/schema';
import type { InputRow, SheetRead } from '@/lib/intake/intake';
import type { Problem, ProblemCode } from '@/lib/problems/problem';

const severities = ['error', 'warning', 'note'] as const;

/** A revision's problems in order: those of the sheets, then those the analysis found. */
export async function listProblems(db: Db, office: number, revision: number): Promise<Problem[]> {
  const rows = await db
    .selectFrom('problem')
    .selectAll('problem')
    .innerJoin('revision', 'revision.id', 'problem.revision')
    .where('revision.office', '=', office)
    .where('problem.revision', '=', revision)
    .orderBy('problem.ordinal')
    .execute();
  return rows.map(problemOf);
}

/** What was recognised of each sheet. */
export async function listSheets(db: Db, office: number, revision: number): Promise<SheetRead[]> {
  const rows = await db
    .selectFrom('sheet_read')
    .selectAll('sheet_read')
    .innerJoin('revision', 'revision.id', 'sheet_read.revision')
    .where('revision.office', '=', office)
    .where('sheet_read.revision', '=', revision)
    .orderBy('sheet_read.ordinal')
    .execute();
  return rows.map((row) => ({
    name: row.name,
    file: row.file,
    known: row.known,
    headingRow: row.heading_row,
    rows: row.rows,
    headings: JSON.parse(row.headings) as SheetRead['headings'],
    decimalMark: row.decimal_mark,
  }));
}

/** Rows as typed, in order; a thousand are held at once. */
export async function* iterateInputRows(db: Db, office: number, revision: number): AsyncGenerator<InputRow> {
  for (let last = -1; ;) {
    const rows = await inputRows(db, office, revision)
      .where('input_row.ordinal', '>', last)
      .orderBy('input_row.ordinal')
      .limit(1000)
      .execute();
    if (rows.length === 0) return;
    for (const row of rows) yield inputRow(row);
    last = rows.at(-1)!.ordinal;
  }
}

/** The rows as typed around a row of a sheet, for a fragment of the sheet beside a problem. */
export async function listInputRowsAround(
  db: Db,
  office: number,
  revision: number,
  at: { readonly sheet: string; readonly row: number; readonly around: number },
): Promise<InputRow[]> {
  const rows = await inputRows(db, office, revision)
    .where('input_row.sheet', '=', at.sheet)
    .where('input_row.row', '>=', at.row - at.around)
    .where('input_row.row', '<=', at.row + at.around)
    .orderBy('input_row.ordinal')
    .limit(4 * at.around + 4)
    .execute();
  return rows.map(inputRow);
}

function inputRows(db: Db, office: number, revision: number) {
  return db
    .selectFrom('input_row')
    .innerJoin('revision', 'revision.id', 'input_row.revision')
    .selectAll('input_row')
    .where('revision.office', '=', office)
    .where('input_row.revision', '=', revision);
}

function inputRow({ sheet, row, cells, part, marks, changed_by: changedBy }: DB['input_row']): InputRow {
  const kept = { sheet, row, cells: JSON.parse(cells) as InputRow['cells'], marks, changedBy };
  return part === null ? kept : { ...kept, part };
}

function problemOf(row: ProblemTable): Problem {
  return {
    severity: severities[row.severity] ?? 'error',
    code: row.code as ProblemCode,
    sheet: row.sheet === '' ? null : row.sheet,
    file: row.file,
    row: row.row,
    column: row.heading,
    cell: row.cell,
    frames: JSON.parse(row.frames) as string[],
    found: row.found,
    message: row.message,
    stopsAll: row.stops_all === 1,
  };
}
