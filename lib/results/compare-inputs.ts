/** Where the rows as typed of two revisions differ, in the sheet's own terms: sheet, row, heading, before and after. */
import { cellPosition } from '@/lib/intake/files/cell-address';
import { idKey } from '@/lib/intake/ids';
import type { SheetRead } from '@/lib/intake/intake';
import type { SettingName, Settings } from '@/lib/model/settings';
import { settingWords } from '@/lib/model/settings';
import { settingText } from '@/lib/changes/setting-text';

/** A row as it is kept: its sheet's place among the sheets, and its cells as one text of JSON. */
export interface KeptRow {
  readonly part: number | null;
  readonly sheet: string;
  readonly row: number;
  readonly cells: string;
}

export interface InputOf {
  readonly sheets: readonly Pick<SheetRead, 'name' | 'known' | 'headingRow' | 'headings'>[];
  readonly rows: Iterable<KeptRow>;
}

/** One cell that differs, or a row that one revision has only. */
export interface InputDifference {
  readonly sheet: string;
  /** What names the row on its sheet: "D09-01, BC". */
  readonly where: string;
  /** The heading; null = the whole row. */
  readonly what: string | null;
  /** As typed; null = blank, or no such row. */
  readonly before: string | null;
  readonly after: string | null;
  /** Rows as in the files, 1-based. */
  readonly rowBefore: number | null;
  readonly rowAfter: number | null;
}

/** Differences that are one and the same change of several rows. */
export interface InputGroup extends Pick<InputDifference, 'sheet' | 'what' | 'before' | 'after'> {
  readonly cells: number;
  /** The first few rows of it. */
  readonly where: readonly string[];
}

export interface SettingDifference {
  readonly setting: string;
  readonly before: string;
  readonly after: string;
}

/** Columns that name a row of a sheet, by the sheet's name in the contract. A row's title is made of those that it fills. */
const keys: Readonly<Record<string, readonly string[]>> = {
  Frames: ['frame'],
  Nodes: ['frame', 'node'],
  Members: ['frame', 'member'],
  Sections: ['section'],
  Materials: ['material'],
  Supports: ['frame', 'node'],
  'Load cases': ['frame', 'case'],
  'Node loads': ['frame', 'case', 'node'],
  'Member loads': ['frame', 'case', 'member', 'load', 'direction'],
  Settlements: ['frame', 'case', 'node'],
  Combinations: ['frame', 'combination', 'case'],
  Limits: ['frame', 'applies to', 'measure', 'direction', 'to node', 'combination'],
  Families: ['family', 'parameter'],
  Variants: ['frame'],
};

/** Settings are compared as such, with what stands where the sheet is silent. */
const asSettings = 'Setup';

interface Part {
  readonly known: string;
  readonly name: string;
  readonly headingRow: number;
  /** Heading as in the contract, else as typed, by column. */
  readonly labels: ReadonlyMap<number, string>;
  readonly typed: string;
}

interface Row extends KeptRow {
  readonly of: Part;
}

/**
 * Cells that differ, sheet by sheet. Rows that both have, wherever they stand, are no difference; of the others those of
 * one name (frame, member …) are compared cell by cell, and what is left is a row of one revision only. Sheets that
 * were not recognised took no part in the results and are left out.
 */
export function compareInputs(before: InputOf, after: InputOf): InputDifference[] {
  const [earlier, later] = [partsOf(before), partsOf(after)];
  const same = sameHeadings(earlier, later);
  const textOf = (row: Row): string => (same.has(row.of.known) ? row.cells : canonical(row));
  const left = new Map<string, Row[]>();
  for (const row of rowsOf(before, earlier)) push(left, `${row.of.known}\n${textOf(row)}`, row);
  const added: Row[] = [];
  for (const row of rowsOf(after, later)) {
    if (left.get(`${row.of.known}\n${textOf(row)}`)?.pop() === undefined) added.push(row);
  }
  const gone = [...left.values()].flat().sort((a, b) => (a.part ?? 0) - (b.part ?? 0) || a.row - b.row);
  return [...headingDifferences(earlier, later), ...differingRows(gone, added)];
}

function partsOf({ sheets }: InputOf): (Part | null)[] {
  return sheets.map(({ name, known, headingRow, headings }) => {
    if (known === null || headingRow === null || known === asSettings) return null;
    const labels = new Map<number, string>();
    for (const { text, cell, known: column } of headings) {
      const at = cellPosition(cell);
      if (at) labels.set(at.column, column ?? text);
    }
    return { known, name, headingRow, labels, typed: JSON.stringify(headings.map(({ text, cell }) => [text, cell.replace(/\d+$/, '')])) }; // prettier-ignore
  });
}

/** Sheets whose headings stand in the same columns everywhere, so that equal rows are equal texts. */
function sameHeadings(...revisions: readonly (readonly (Part | null)[])[]): Set<string> {
  const seen = new Map<string, Set<string>>();
  for (const part of revisions.flat()) {
    if (part) seen.set(part.known, (seen.get(part.known) ?? new Set()).add(part.typed));
  }
  return new Set([...seen].filter(([, typed]) => typed.size === 1).map(([known]) => known));
}

function* rowsOf({ sheets, rows }: InputOf, parts: readonly (Part | null)[]): Generator<Row> {
  const byName = new Map(sheets.map(({ name }, place) => [name, place]));
  for (const row of rows) {
    const of = parts[row.part ?? byName.get(row.sheet) ?? -1];
    if (of && row.row > of.headingRow) yield { ...row, of };
  }
}

const cellsOf = ({ cells }: KeptRow): readonly (string | null)[] => JSON.parse(cells) as (string | null)[];

/** A row's filled cells by heading. */
function byHeading(row: Row): Map<string, string> {
  const found = new Map<string, string>();
  cellsOf(row).forEach((text, column) => {
    const label = row.of.labels.get(column);
    if (label !== undefined && text !== null && text.trim() !== '') found.set(label, text.trim());
  });
  return found;
}

const canonical = (row: Row): string => JSON.stringify([...byHeading(row)].sort(([a], [b]) => (a < b ? -1 : 1)));

function headingDifferences(before: readonly (Part | null)[], after: readonly (Part | null)[]): InputDifference[] {
  const typed = (parts: readonly (Part | null)[]): Map<string, Set<string>> => {
    const found = new Map<string, Set<string>>();
    for (const part of parts) {
      if (!part) continue;
      const own = found.get(part.known) ?? new Set<string>();
      for (const [text] of JSON.parse(part.typed) as [string, string][]) own.add(text);
      found.set(part.known, own);
    }
    return found;
  };
  const [earlier, later] = [typed(before), typed(after)];
  const one = (sheet: string, was: string | null, is: string | null): InputDifference => ({ sheet, where: 'headings', what: 'heading', before: was, after: is, rowBefore: null, rowAfter: null }); // prettier-ignore
  return [...new Set([...earlier.keys(), ...later.keys()])].flatMap((sheet) => {
    const [was, is] = [earlier.get(sheet) ?? new Set<string>(), later.get(sheet) ?? new Set<string>()];
    // a sheet that only one revision has is told by its rows
    if (was.size === 0 || is.size === 0) return [];
    return [
      ...[...was].filter((text) => !is.has(text)).map((text) => one(sheet, text, null)),
      ...[...is].filter((text) => !was.has(text)).map((text) => one(sheet, null, text)),
    ];
  });
}

function differingRows(gone: readonly Row[], added: readonly Row[]): InputDifference[] {
  const waiting = new Map<string, Row[]>();
  for (const row of gone) push(waiting, keyOf(row), row);
  for (const rows of waiting.values()) rows.reverse();
  const found: InputDifference[] = [];
  for (const row of added) {
    const was = waiting.get(keyOf(row))?.pop();
    found.push(...(was ? differingCells(was, row) : [wholeRow(row, 'after')]));
  }
  const left = new Set([...waiting.values()].flat());
  return [...found, ...gone.filter((row) => left.has(row)).map((row) => wholeRow(row, 'before'))];
}

function namesOf(row: Row): string[] {
  const cells = byHeading(row);
  const named = (keys[row.of.known] ?? [row.of.labels.get(0) ?? '']).flatMap((key) => cells.get(key) ?? []);
  return named.length > 0 ? named : [...cells.values()].slice(0, 1);
}

const keyOf = (row: Row): string => `${row.of.known}\n${namesOf(row).map(idKey).join('\n')}`;
const titleOf = (row: Row): string => namesOf(row).join(', ') || `row ${row.row}`;

function differingCells(before: Row, after: Row): InputDifference[] {
  const [was, is] = [byHeading(before), byHeading(after)];
  const where = titleOf(after);
  return [...new Set([...is.keys(), ...was.keys()])].flatMap((what): InputDifference[] => {
    const [one, two] = [was.get(what) ?? null, is.get(what) ?? null];
    const at = { sheet: after.of.known, where, what, rowBefore: before.row, rowAfter: after.row };
    return one === two ? [] : [{ ...at, before: one, after: two }];
  });
}

function wholeRow(row: Row, side: 'before' | 'after'): InputDifference {
  const text = [...byHeading(row)].map(([heading, cell]) => `${heading} ${cell}`).join(', ') || 'a blank row';
  const at = { sheet: row.of.known, where: titleOf(row), what: null };
  return side === 'after'
    ? { ...at, before: null, after: text, rowBefore: null, rowAfter: row.row }
    : { ...at, before: text, after: null, rowBefore: row.row, rowAfter: null };
}

/** How many rows a group names. */
const named = 4;

/** The same change of many rows as one line; rows that one revision has only, a line a sheet. */
export function groupDifferences(differences: readonly InputDifference[]): InputGroup[] {
  const groups = new Map<string, { -readonly [K in keyof InputGroup]: InputGroup[K] } & { where: string[] }>();
  for (const { sheet, what, before, after, where } of differences) {
    const key = JSON.stringify(what === null ? [sheet, before === null] : [sheet, what, before, after]);
    const known = groups.get(key);
    if (!known) groups.set(key, { sheet, what, before, after, cells: 1, where: [where] });
    else {
      known.cells += 1;
      if (known.where.length < named && !known.where.includes(where)) known.where.push(where);
      if (what === null) [known.before, known.after] = [before && 'rows', after && 'rows'];
    }
  }
  return [...groups.values()];
}

/** Settings that are not the same, as people read them. */
export function compareSettings(before: Settings, after: Settings): SettingDifference[] {
  return (Object.keys(settingWords) as SettingName[]).flatMap((name) => {
    // a revision kept from before a setting was known has no word of it
    const text = (of: Settings): string => (of[name] === undefined ? 'not known then' : (settingText(name, of) ?? 'none given'));
    const [was, is] = [text(before), text(after)];
    return was === is ? [] : [{ setting: settingWords[name], before: was, after: is }];
  });
}

function push<T>(map: Map<string, T[]>, key: string, one: T): void {
  const known = map.get(key);
  if (known) known.push(one);
  else map.set(key, [one]);
}
