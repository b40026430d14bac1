/** Generated combinations written into the Combinations sheet, as an edit of a batch's rows. */
import type { ListCombinationsChange } from '@/lib/changes/change';
import { changeSetting } from '@/lib/changes/change-setting';
import { withCell } from '@/lib/changes/with-cell';
import { shownCombinations } from '@/lib/combinations/shown-combinations';
import { sheetKey } from '@/lib/intake/files/names';
import type { RawPart, RawRow } from '@/lib/intake/files/raw-sheet';
import { idKey } from '@/lib/intake/ids';
import { ProblemList } from '@/lib/intake/problem-list';
import { readTable } from '@/lib/intake/read-table';
import { isTyped, plainCell } from '@/lib/intake/rows/cell-marks';
import { partOf, rowsOfPart, type StoredInput } from '@/lib/intake/rows/input-rows';
import { readRows } from '@/lib/intake/rows/read-rows';
import { sheetDefinitions } from '@/lib/intake/sheet-definitions';
import type { Part } from '@/lib/intake/table';
import { wordKey } from '@/lib/intake/words';
import type { Frame, Purpose } from '@/lib/model/frame';

/** Rows that one change writes at most. */
export const mostRowsWritten = 100_000;

interface RowToWrite {
  readonly name: string;
  readonly purpose: Purpose;
  readonly terms: readonly { readonly case: string; readonly factor: number }[];
  /** null = for every frame. */
  readonly frame: string | null;
}

/**
 * Writes each generated combination as a row of Combinations, a column a case (or a row a term, where the sheet has that
 * form), without those left out and with factors that were changed, and sets `combination set` to as listed. What all
 * frames share is one row; what is of some only is a row for each. Listed rows stay as they were typed.
 *
 * @throws {RangeError} where no rule set is chosen, a name is not generated, or more rows than `mostRowsWritten` would come
 */
export function listCombinations(input: StoredInput, change: ListCombinationsChange, by: string): StoredInput {
  const rows = rowsToWrite(input, change);
  const written = rows.length === 0 ? input : withRows(input, rows, by);
  return changeSetting(written, { kind: 'setting', setting: 'combinationSet', value: 'as listed' }, by);
}

function rowsToWrite(input: StoredInput, { leaveOut, factors }: ListCombinationsChange): RowToWrite[] {
  const identity = { name: '', sha256: '', files: [] };
  const { frames: read, settings } = readRows({ ...input, identity, problems: [] });
  const frames = read.flatMap(({ frame }) => frame ?? []);
  const shown = shownCombinations(frames, settings.combinationSet).filter(({ clause }) => clause !== null);
  if (shown.length === 0) throw new RangeError('Expected a batch with generated combinations');
  const names = new Set(shown.map(({ name }) => idKey(name)));
  for (const name of [...leaveOut, ...factors.map(({ combination }) => combination)])
    if (!names.has(idKey(name))) throw new RangeError(`Expected a generated combination, got ${name}`);
  const out = new Set(leaveOut.map(idKey));
  const changed = new Map(factors.map((each) => [`${idKey(each.combination)}|${idKey(each.case)}`, each.factor]));
  const rows = shown
    .filter(({ name }) => !out.has(idKey(name)))
    .flatMap(({ name, purpose, terms, frames: count }): RowToWrite[] => {
      const own = terms.map((term) => ({ ...term, factor: changed.get(`${idKey(name)}|${idKey(term.case)}`) ?? term.factor }));
      if (count === frames.length) return [{ name, purpose, terms: own, frame: null }];
      return frames.filter((frame) => has(frame, name, terms)).map(({ id }) => ({ name, purpose, terms: own, frame: id }));
    });
  if (rows.length > mostRowsWritten) throw new RangeError(`Expected at most ${mostRowsWritten} rows, got ${rows.length}`);
  return rows;
}

/** Whether a frame has a combination of this name with these very terms. */
function has({ cases, combinations }: Frame, name: string, terms: RowToWrite['terms']): boolean {
  const own = combinations.find((each) => each.name === name);
  return (
    own?.terms.length === terms.length &&
    own.terms.every((term, i) => cases[term.case]?.name === terms[i]?.case && term.factor === terms[i]?.factor)
  );
}

/** The input with these rows behind the last sheet of combinations, or on a new one. */
function withRows(input: StoredInput, rows: readonly RowToWrite[], by: string): StoredInput {
  const place = input.sheets.findLastIndex((sheet) => sheetKey(sheet.name) === sheetKey('Combinations'));
  const sheet = input.sheets[place];
  const definition = sheetDefinitions.get('Combinations');
  if (!definition) throw new RangeError('Expected a definition of Combinations');
  if (sheet) {
    const part = partOf(sheet, place, input.rows.filter((row) => row.part === place)); // prettier-ignore
    const [read] = readTable({ name: sheet.name, parts: [part] }, definition, 'metric', new ProblemList()).parts;
    if (read && read.headingRow !== null && read.byName.has('combination') && read.byName.has('purpose')) {
      const edited = appended(read, read.headingRow, rows, by);
      const others = input.sheets.map((_, i) =>
        i === place ? rowsOfPart(edited, i) : input.rows.filter((row) => row.part === i),
      );
      return { sheets: input.sheets, rows: others.flat() };
    }
  }
  const file = input.sheets.find((each) => isTyped(each.file))?.file ?? 'Combinations.csv';
  const headings = ['combination', 'purpose'].map((text) => plainCell(text, false));
  const empty: RawPart = { name: 'Combinations', file, order: input.sheets.length, decimalMark: null, rows: [{ row: 1, cells: headings, changedBy: by }] }; // prettier-ignore
  const [read] = readTable({ name: empty.name, parts: [empty] }, definition, 'metric', new ProblemList()).parts;
  if (!read) throw new RangeError('Expected a sheet that was made to be read');
  const made = appended(read, 1, rows, by);
  return {
    sheets: [...input.sheets, { name: empty.name, file, decimalMark: null }],
    rows: [...input.rows, ...rowsOfPart(made, input.sheets.length)],
  };
}

/** Names of columns that a case of the same name could be taken for. */
const reserved = new Set(['combination', 'purpose', 'case', 'factor', 'frame'].map(wordKey));

function appended(read: Part, headingRow: number, rows: readonly RowToWrite[], by: string): RawPart {
  let part = read.raw;
  let width = Math.max(...part.rows.map(({ cells }) => cells.length));
  /** Column of a heading, added behind the last where there is none. */
  const column = (found: number | undefined, heading: string): number => {
    if (found !== undefined) return found;
    part = { ...part, rows: withCell(part.rows, headingRow, width, plainCell(heading, false), by) };
    width += 1;
    return width - 1;
  };
  const known = (name: string) => read.byName.get(name)?.index;
  const at = { combination: column(known('combination'), 'combination'), purpose: column(known('purpose'), 'purpose') };
  const frameAt = rows.some(({ frame }) => frame !== null) ? column(known('frame'), 'frame') : null;
  const cases = [...new Set(rows.flatMap(({ terms }) => terms.map((term) => term.case)))];
  const wide = !read.byName.has('case') && !read.byName.has('factor');
  if (wide && cases.some((name) => reserved.has(wordKey(name)))) throw new RangeError('Expected cases that can head a column');
  let next = (part.rows.at(-1)?.row ?? 0) + 1;
  const row = (values: readonly (readonly [column: number, text: string, number?: boolean])[]): RawRow => {
    const last = Math.max(...values.map(([index]) => index));
    const cells = Array.from({ length: last + 1 }, (_, i) => {
      const value = values.find(([index]) => index === i);
      return value ? plainCell(value[1], value[2] === true && isTyped(part.file)) : null;
    });
    return { row: next++, cells, changedBy: by };
  };
  const head = ({ name, purpose, frame }: RowToWrite) =>
    [
      [at.combination, name],
      [at.purpose, purpose],
      ...(frameAt !== null && frame !== null ? [[frameAt, frame] as const] : []),
    ] as const;
  if (!wide) {
    const [caseAt, factorAt] = [column(known('case'), 'case'), column(known('factor'), 'factor')];
    const terms = rows.flatMap((each) =>
      each.terms.map((term) => row([...head(each), [caseAt, term.case], [factorAt, String(term.factor), true]])),
    );
    return { ...part, rows: [...part.rows, ...terms] };
  }
  const columnOf = new Map(
    cases.map((name) => [
      name,
      column(read.columns.find((each) => each.known === null && idKey(each.text) === idKey(name))?.index, name),
    ]),
  );
  const lines = rows.map((each) =>
    row([...head(each), ...each.terms.map((term) => [columnOf.get(term.case) ?? 0, String(term.factor), true] as const)]),
  );
  return { ...part, rows: [...part.rows, ...lines] };
}
