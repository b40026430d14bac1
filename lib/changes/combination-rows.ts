/** Rows of the Combinations sheet: written behind those there are, edited in place, or taken out. */
import { ChangeRefused } from '@/lib/changes/change-refused';
import { withCell, withCells } from '@/lib/changes/with-cell';
import { expandSigns, signedName, splitSign } from '@/lib/combinations/expand-signs';
import { sheetKey } from '@/lib/intake/files/names';
import type { RawCell, RawPart, RawRow } from '@/lib/intake/files/raw-sheet';
import { idKey } from '@/lib/intake/ids';
import { ProblemList } from '@/lib/intake/problem-list';
import { readTable } from '@/lib/intake/read-table';
import { isTyped, plainCell } from '@/lib/intake/rows/cell-marks';
import { partOf, rowsOfPart, type StoredInput } from '@/lib/intake/rows/input-rows';
import { sheetDefinitions } from '@/lib/intake/sheet-definitions';
import type { Part } from '@/lib/intake/table';
import { wordKey } from '@/lib/intake/words';
import type { Purpose } from '@/lib/model/frame';

export interface RowToWrite {
  readonly name: string;
  readonly purpose: Purpose;
  readonly terms: readonly { readonly case: string; readonly factor: number }[];
  /** null = for every frame. */
  readonly frame: string | null;
}

/** New factors, by key of the case. */
type Factors = ReadonlyMap<string, { readonly case: string; readonly factor: number }>;

/** What becomes of listed combinations, by key of their name. */
export interface RowEdits {
  readonly out: ReadonlySet<string>;
  readonly factors: ReadonlyMap<string, Factors>;
}

function readPart(input: StoredInput, place: number): Part | undefined {
  const sheet = input.sheets[place];
  const definition = sheetDefinitions.get('Combinations');
  if (!definition) throw new RangeError('Expected a definition of Combinations');
  if (!sheet || sheetKey(sheet.name) !== sheetKey('Combinations')) return undefined;
  const part = partOf(sheet, place, input.rows.filter((row) => row.part === place)); // prettier-ignore
  const [read] = readTable({ name: sheet.name, parts: [part] }, definition, 'metric', new ProblemList()).parts;
  const sound = read && read.headingRow !== null && read.byName.has('combination') && read.byName.has('purpose');
  return sound ? read : undefined;
}

function withPart(input: StoredInput, place: number, part: RawPart): StoredInput {
  const rows = input.sheets.map((_, i) => (i === place ? rowsOfPart(part, i) : input.rows.filter((row) => row.part === i)));
  return { sheets: input.sheets, rows: rows.flat() };
}

/** The input with these rows behind the last sheet of combinations, or on a new one. */
export function withRows(input: StoredInput, rows: readonly RowToWrite[], by: string): StoredInput {
  const place = input.sheets.findLastIndex((_, i) => readPart(input, i) !== undefined);
  const known = readPart(input, place);
  if (known) return withPart(input, place, appended(known, rows, by));
  const file = input.sheets.find((each) => isTyped(each.file))?.file ?? 'Combinations.csv';
  const headings = ['combination', 'purpose'].map((text) => plainCell(text, false));
  const empty: RawPart = { name: 'Combinations', file, order: input.sheets.length, decimalMark: null, rows: [{ row: 1, cells: headings, changedBy: by }] }; // prettier-ignore
  const definition = sheetDefinitions.get('Combinations');
  const [read] = definition ? readTable({ name: empty.name, parts: [empty] }, definition, 'metric', new ProblemList()).parts : [];
  if (!read) throw new RangeError('Expected a sheet that was made to be read');
  const made = appended(read, rows, by);
  return {
    sheets: [...input.sheets, { name: empty.name, file, decimalMark: null }],
    rows: [...input.rows, ...rowsOfPart(made, input.sheets.length)],
  };
}

/** Tells whether a combination stands on the sheet, by itself or as one of the signs of a ± row. */
export function listedIn(input: StoredInput): (name: string) => boolean {
  const names = new Set<string>();
  for (const place of input.sheets.keys()) {
    const read = readPart(input, place);
    for (const row of read?.dataRows ?? []) names.add(idKey(signedName(textOf(row, read?.byName.get('combination')?.index))));
  }
  return (name) => names.has(idKey(name)) || names.has(withoutSigns(idKey(name)));
}

/** The input without any row of a combination. */
export function withoutListed(input: StoredInput): StoredInput {
  return input.sheets.reduce((rows, _, place) => {
    const read = readPart(rows, place);
    if (!read) return rows;
    const gone = new Set(read.dataRows.map(({ row }) => row));
    return withPart(rows, place, { ...read.raw, rows: read.raw.rows.filter(({ row }) => !gone.has(row)) });
  }, input);
}

/** The input with listed combinations taken out, or with other factors. One of a ± row is written out beside its like. */
export function withEdits(input: StoredInput, edits: RowEdits, by: string): StoredInput {
  if (edits.out.size + edits.factors.size === 0) return input;
  return input.sheets.reduce((rows, _, place) => {
    const read = readPart(rows, place);
    return read ? withPart(rows, place, edited(read, edits, by)) : rows;
  }, input);
}

/** Names of columns that a case of the same name could be taken for. */
const reserved = new Set(['combination', 'purpose', 'case', 'factor', 'frame', 'when'].map(wordKey));

/** A sheet under work: its rows, and columns added behind the last where one is wanted. */
class Writing {
  rows: readonly RawRow[];
  private width: number;
  private next: number;
  readonly wide: boolean;

  constructor(
    readonly read: Part,
    readonly by: string,
  ) {
    this.rows = read.raw.rows;
    this.width = Math.max(...this.rows.map(({ cells }) => cells.length));
    this.next = (this.rows.at(-1)?.row ?? 0) + 1;
    this.wide = !read.byName.has('case') && !read.byName.has('factor');
  }

  column(found: number | undefined, heading: string): number {
    if (found !== undefined) return found;
    this.rows = withCell(this.rows, this.read.headingRow ?? 1, this.width, plainCell(heading, false), this.by);
    this.width += 1;
    return this.width - 1;
  }

  known(name: string): number {
    return this.column(this.read.byName.get(name)?.index, name);
  }

  private readonly ofCases = new Map<string, number>();
  caseColumn(name: string): number {
    if (reserved.has(wordKey(name))) throw new ChangeRefused(`A case named “${name}” cannot head a column of Combinations`);
    const known = this.ofCases.get(idKey(name));
    if (known !== undefined) return known;
    const found = this.read.columns.find((each) => each.known === null && idKey(each.text) === idKey(name))?.index;
    const made = this.column(found, name);
    this.ofCases.set(idKey(name), made);
    return made;
  }

  number(value: number): RawCell {
    return plainCell(String(value), isTyped(this.read.raw.file));
  }

  /** Adds a row with these cells. */
  add(values: readonly (readonly [column: number, cell: RawCell])[], from: readonly (RawCell | null)[] = []): void {
    const last = Math.max(from.length - 1, ...values.map(([index]) => index));
    const given = new Map(values);
    const cells = Array.from({ length: last + 1 }, (_, i) => given.get(i) ?? from[i] ?? null);
    this.rows = [...this.rows, { row: this.next++, cells, changedBy: this.by }];
  }
}

function appended(read: Part, rows: readonly RowToWrite[], by: string): RawPart {
  const sheet = new Writing(read, by);
  const [nameAt, purposeAt] = [sheet.known('combination'), sheet.known('purpose')];
  const frameAt = rows.some(({ frame }) => frame !== null) ? sheet.known('frame') : null;
  const head = ({ name, purpose, frame }: RowToWrite): (readonly [number, RawCell])[] => [
    [nameAt, plainCell(name, false)],
    [purposeAt, plainCell(purpose, false)],
    ...(frameAt !== null && frame !== null ? [[frameAt, plainCell(frame, false)] as const] : []),
  ];
  const [caseAt, factorAt] = sheet.wide ? [0, 0] : [sheet.known('case'), sheet.known('factor')];
  if (sheet.wide) for (const { terms } of rows) for (const term of terms) sheet.caseColumn(term.case);
  for (const row of rows) {
    if (sheet.wide) {
      sheet.add([...head(row), ...row.terms.map((term) => [sheet.caseColumn(term.case), sheet.number(term.factor)] as const)]);
      continue;
    }
    for (const term of row.terms)
      sheet.add([...head(row), [caseAt, plainCell(term.case, false)], [factorAt, sheet.number(term.factor)]]);
  }
  return { ...read.raw, rows: sheet.rows };
}

const withoutSigns = (key: string): string => key.replace(/\s*\([-+−\s]+\)$/, '');
const textOf = (row: RawRow, column: number | undefined): string => (column === undefined ? '' : (row.cells[column]?.text ?? ''));

function edited(read: Part, { out, factors }: RowEdits, by: string): RawPart {
  const sheet = new Writing(read, by);
  const nameAt = sheet.known('combination');
  const touched = new Set([...out, ...factors.keys()]);
  // a row a term: the rows of one name and frame are one combination
  const groups = new Map<string, RawRow[]>();
  for (const row of read.dataRows) {
    const key = idKey(signedName(textOf(row, nameAt)));
    if (key === '' || !(touched.has(key) || [...touched].some((each) => withoutSigns(each) === key))) continue;
    const group = sheet.wide ? `${row.row}` : JSON.stringify([key, textOf(row, read.byName.get('frame')?.index)]);
    const known = groups.get(group);
    if (known) known.push(row);
    else groups.set(group, [row]);
  }
  const gone = new Set<number>();
  for (const rows of groups.values()) {
    const name = signedName(textOf(rows[0]!, nameAt).trim());
    const key = idKey(name);
    if (out.has(key)) {
      for (const { row } of rows) gone.add(row);
      continue;
    }
    const cells = termCells(sheet, rows);
    if (cells.some(({ signed }) => signed)) {
      writeOut(sheet, { rows, cells, name, nameAt }, { out, factors });
      for (const { row } of rows) gone.add(row);
      continue;
    }
    setFactors(sheet, rows, cells, factors.get(key));
  }
  return { ...read.raw, rows: sheet.rows.filter(({ row }) => !gone.has(row)) };
}

interface TermCell {
  readonly row: RawRow;
  readonly column: number;
  readonly caseKey: string;
  readonly text: string;
  readonly signed: boolean;
}

/** The cells that hold a combination's factors, in the order in which the reader takes their signs. */
function termCells({ read, wide }: Writing, rows: readonly RawRow[]): TermCell[] {
  const cell = (row: RawRow, column: number, caseKey: string): TermCell[] => {
    const text = textOf(row, column).trim();
    return text === '' ? [] : [{ row, column, caseKey, text, signed: splitSign(text) !== null }];
  };
  const [caseAt, factorAt] = [read.byName.get('case')?.index, read.byName.get('factor')?.index];
  if (!wide) return rows.flatMap((row) => (factorAt === undefined ? [] : cell(row, factorAt, idKey(textOf(row, caseAt)))));
  const known = read.columns.filter((each) => each.known === null);
  return rows.flatMap((row) => known.flatMap(({ index, text }) => cell(row, index, idKey(text))));
}

function setFactors(sheet: Writing, rows: readonly RawRow[], cells: readonly TermCell[], given: Factors | undefined): void {
  for (const [caseKey, { case: name, factor }] of given ?? []) {
    const own = cells.filter((each) => each.caseKey === caseKey);
    if (own.length > 0 || sheet.wide) {
      const at = sheet.wide ? sheet.caseColumn(name) : (own[0]?.column ?? 0);
      const targets = sheet.wide ? rows : own.map(({ row }) => row);
      const edits = new Map(targets.map(({ row }) => [row, new Map([[at, sheet.number(factor)]])]));
      sheet.rows = withCells(sheet.rows, edits, sheet.by);
      continue;
    }
    const [caseAt, factorAt] = [sheet.known('case'), sheet.known('factor')];
    sheet.add([[caseAt, plainCell(name, false)], [factorAt, sheet.number(factor)]], rows[0]?.cells); // prettier-ignore
  }
}

/** A ± row written out as the combinations that it stands for, without those taken out. */
function writeOut(
  sheet: Writing,
  { rows, cells, name, nameAt }: { rows: readonly RawRow[]; cells: readonly TermCell[]; name: string; nameAt: number },
  { out, factors }: RowEdits,
): void {
  const terms = cells.map(({ text, signed }) => {
    const factor = Number((signed ? (splitSign(text) ?? '') : text).replace('−', '-').replace(',', '.'));
    if (!Number.isFinite(factor)) throw new ChangeRefused(`The factor “${text}” of ${name} can only be changed in the sheet`);
    return { factor, signed };
  });
  for (const variant of expandSigns(name, terms)) {
    const key = idKey(variant.name);
    if (out.has(key)) continue;
    const given = factors.get(key) ?? new Map<string, { case: string; factor: number }>();
    const missing = [...given].find(([caseKey]) => !cells.some((each) => each.caseKey === caseKey));
    if (missing) throw new ChangeRefused(`${missing[1].case} can be put into ${variant.name} only in the sheet`);
    for (const row of rows) {
      const values = cells.flatMap((cell, i): (readonly [number, RawCell])[] =>
        cell.row === row ? [[cell.column, sheet.number(given.get(cell.caseKey)?.factor ?? variant.factors[i] ?? 0)]] : [],
      );
      sheet.add([[nameAt, plainCell(variant.name, false)], ...values], row.cells);
    }
  }
}
