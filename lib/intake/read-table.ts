import { cellAddress } from '@/lib/intake/files/cell-address';
import type { RawCell, RawPart, RawRow, RawSheet } from '@/lib/intake/files/raw-sheet';
import { type HeadingMeaning, type HeadingText, meaningOf, splitHeading } from '@/lib/intake/headings';
import type { Entry, ProblemList } from '@/lib/intake/problem-list';
import { openEnded, type SheetDefinition } from '@/lib/intake/sheet-definitions';
import { type Column, headingPlace, type Part, partPlace, type Row, type Table } from '@/lib/intake/table';
import { settleUnit, unitRowOf } from '@/lib/intake/unit-row';
import { wordKey } from '@/lib/intake/words';
import * as say from '@/lib/problems/wording';
import type { System } from '@/lib/units/quantity';

const topRows = 20;

interface Heading extends HeadingText {
  readonly index: number;
  readonly meaning: HeadingMeaning;
}

/** Reads the sheets of one name as far as headings and data rows; tells what is wrong with the headings. */
export function readTable(sheet: RawSheet, definition: SheetDefinition, system: System, problems: ProblemList): Table {
  const parts = sheet.parts.map((raw) => readPart(raw, definition, system, problems));
  const rows: Row[] = [];
  for (const part of parts) for (const raw of part.dataRows) rows.push({ part, raw });
  return { definition, parts, rows };
}

function readPart(raw: RawPart, definition: SheetDefinition, system: System, problems: ProblemList): Part {
  const empty: Part = {
    raw,
    definition,
    headingRow: null,
    columns: [],
    byName: new Map(),
    missing: new Map(),
    faulty: [],
    typed: !/\.(csv|txt)$/i.test(raw.file),
    dataRows: [],
  };
  const found = findHeadings(raw, definition, system);
  if (!found) {
    if (raw.rows.length > 0) problems.add(partPlace(raw), { code: 'missing-column', message: say.noHeadings(definition), stopsAll: true }, null); // prettier-ignore
    return empty;
  }
  const headingRow = found.row.row;
  const missing = tellMissing(raw, headingRow, found.headings, definition, problems);
  const after = raw.rows.filter((row) => row.row > headingRow);
  const unitRow = after[0]?.row === headingRow + 1 ? unitRowOf(after[0], found.headings, definition) : null;
  const part = { ...empty, headingRow, missing };
  const columns = found.headings.map((heading) => columnFor(part, heading, definition, problems));
  for (const column of columns) settleUnit(part, column, unitRow, system, problems);
  const byName = new Map<string, Column>();
  for (const column of columns) {
    if (column.known === null) continue;
    const first = byName.get(column.known);
    if (!first) byName.set(column.known, column);
    else problems.add(headingPlace(part, column), { code: 'conflicting-row', message: say.columnTwice(column.known, first.text), stopsAll: true }, null); // prettier-ignore
  }
  const dataRows = dataRowsOf(part, columns, unitRow ? after.slice(1) : after, problems);
  tellUnheaded(part, columns, dataRows, problems);
  return { ...part, columns, byName, faulty: columns.filter((c) => c.known === null && c.problem), dataRows };
}

function findHeadings(raw: RawPart, definition: SheetDefinition, system: System): { row: RawRow; headings: Heading[] } | null {
  let best: { row: RawRow; headings: Heading[] } | null = null;
  let most = 0;
  for (const row of raw.rows) {
    if (row.row > topRows) break;
    const headings = headingsOf(row, definition, system);
    const known = new Set(headings.flatMap((h) => (h.meaning.kind === 'column' ? [h.meaning.known] : [])));
    if (definition.required.every((names) => names.some((name) => known.has(name)))) return { row, headings };
    if (known.size > most) {
      most = known.size;
      best = { row, headings };
    }
  }
  return best;
}

function headingsOf(row: RawRow, definition: SheetDefinition, system: System): Heading[] {
  return row.cells.flatMap((cell, index) => {
    // a merged heading stands over several columns: only its first is headed
    if (!cell || cell.mergedFrom) return [];
    const heading = splitHeading(cell.text);
    const whole = meaningOf(definition, cell.text, system);
    const meaning = whole.kind === 'column' ? whole : meaningOf(definition, heading.name, system);
    return [{ ...heading, index, meaning }];
  });
}

/** Columns without which the sheet's rows belong to nobody: then nothing of the batch can be trusted. */
const vital = new Set(['frame', 'setting', 'value', 'case', 'combination', 'applies to']);

/** Tells the columns that a sheet needs and has not: the frames with rows there are stopped, or all. */
function tellMissing(
  raw: RawPart,
  headingRow: number,
  headings: readonly Heading[],
  definition: SheetDefinition,
  problems: ProblemList,
): Map<string, Entry> {
  const known = new Set(headings.flatMap((h) => (h.meaning.kind === 'column' ? [h.meaning.known] : [])));
  const missing = new Map<string, Entry>();
  for (const names of definition.required) {
    if (names.some((name) => known.has(name))) continue;
    const place = { ...partPlace(raw), row: headingRow, heading: names.join(' or ') };
    const stopsAll = names.some((name) => vital.has(name));
    const entry = problems.add(
      place,
      { code: 'missing-column', message: say.missingColumn(names, definition.name), stopsAll },
      null,
    );
    for (const name of names) missing.set(name, entry);
  }
  return missing;
}

function columnFor(part: Part, heading: Heading, definition: SheetDefinition, problems: ProblemList): Column {
  const { meaning, index, text, name } = heading;
  const known = meaning.kind === 'column' ? meaning.known : null;
  const quantity = known === null ? null : (definition.columns.get(known) ?? null);
  const column: Column = { index, text, name, known, quantity, unit: null, factor: NaN, problem: null };
  const place = headingPlace(part, column);
  if (meaning.kind === 'axis') {
    column.problem = problems.add(place, { code: 'unknown-word', message: say.sayMajorOrMinor(text) }, null);
  } else if (meaning.kind === 'radius') {
    problems.add(place, { code: 'column-ignored', message: say.radiusIgnored(text) }, null);
  } else if (meaning.kind === 'unknown' && !openEnded.has(definition.name)) {
    if (meaning.near) problems.add(place, { code: 'near-miss-column', message: say.nearMissColumn(text, meaning.near) }, null);
    else problems.add(place, { code: 'column-ignored', message: say.columnIgnored(text, definition.name) }, null);
  }
  return column;
}

/** Rows with data: without blanks, comments, repeated headings and totals (which are told). */
function dataRowsOf(part: Part, columns: readonly Column[], rows: readonly RawRow[], problems: ProblemList): RawRow[] {
  const firstColumn = Math.min(...columns.map((column) => column.index));
  return rows.filter((row) => {
    const filled = columns.filter((column) => row.cells[column.index]);
    if (filled.length === 0) return false;
    if (isComment(row, firstColumn)) return false;
    if (columns.every((column) => sameText(row.cells[column.index], column.text))) return false;
    const first = filled[0];
    const cell = first && row.cells[first.index];
    if (first && cell?.kind === 'text' && /^(grand ?|sub-?)?totals?:?$/i.test(cell.text.trim())) {
      const place = { ...headingPlace(part, first), row: row.row, found: cell.text };
      problems.add(place, { code: 'unknown-word', message: say.totalRow() }, null);
      return false;
    }
    return true;
  });
}

/** Tells columns with something in data rows and no heading above, once each. */
function tellUnheaded(part: Part, columns: readonly Column[], rows: readonly RawRow[], problems: ProblemList): void {
  const known = new Set(columns.map((column) => column.index));
  for (const { cells } of rows) {
    for (let index = 0; index < cells.length; index += 1) {
      if (!cells[index] || known.has(index)) continue;
      known.add(index);
      const letters = cellAddress(1, index).replace(/\d+$/, '');
      const place = { ...headingPlace(part, { index, text: '' }), heading: null, found: null };
      problems.add(place, { code: 'column-ignored', message: say.columnUnheaded(letters) }, null);
    }
  }
}

function isComment(row: RawRow, firstColumn: number): boolean {
  const at = row.cells.slice(0, firstColumn + 1).find((cell) => cell);
  return at?.kind === 'text' && at.text.trimStart().startsWith('#');
}

const sameText = (cell: RawCell | null | undefined, text: string): boolean => !!cell && wordKey(cell.text) === wordKey(text);
