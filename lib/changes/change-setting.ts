/** A setting chosen on screen, as an edit of the Setup sheet. */
import type { SettingChange } from '@/lib/changes/change';
import { readSetting } from '@/lib/changes/setting-value';
import { withCell } from '@/lib/changes/with-cell';
import { sheetKey } from '@/lib/intake/files/names';
import type { RawPart, RawRow } from '@/lib/intake/files/raw-sheet';
import { ProblemList } from '@/lib/intake/problem-list';
import { readTable } from '@/lib/intake/read-table';
import { isTyped, plainCell } from '@/lib/intake/rows/cell-marks';
import { type InputSheet, partOf, rowsOfPart, type StoredInput } from '@/lib/intake/rows/input-rows';
import { sheetDefinitions } from '@/lib/intake/sheet-definitions';
import { type Column, rawCell } from '@/lib/intake/table';
import { wordKey } from '@/lib/intake/words';
import { settingWords } from '@/lib/model/settings';

/**
 * Writes the value into every row of Setup that names the setting; where none does, into a new last row; where there is
 * no Setup sheet with its two headings, into a new one. Words and order of everything else stay as they were typed.
 *
 * @throws {RangeError} for a value that the sheet's reader refuses
 */
export function changeSetting(input: StoredInput, { setting, value }: SettingChange, by: string): StoredInput {
  const read = readSetting(setting, value);
  if (read.refused !== null) throw new RangeError(`Expected a value that Setup takes, got: ${read.refused}`);
  const setups = setupsOf(input);
  const word = settingWords[setting];
  let named = false;
  const changed = new Map<number, RawPart>();
  for (const { place, part, valueColumn, dataRows } of setups) {
    const own = dataRows.filter(({ text }) => text !== null && wordKey(text) === wordKey(word));
    if (own.length === 0) continue;
    named = true;
    const edited = own.reduce(
      (rows, { raw }) => withCell(rows, raw.row, valueColumn, plainCell(read.typed, true), by),
      part.rows,
    );
    changed.set(place, { ...part, rows: edited });
  }
  if (!named) {
    const last = setups.at(-1);
    if (!last) return withSetup(input, word, read.typed, by);
    changed.set(last.place, { ...last.part, rows: [...last.part.rows, newRow(last, word, read.typed, by)] });
  }
  return withParts(input, changed);
}

interface SetupSheet {
  readonly place: number;
  readonly part: RawPart;
  readonly settingColumn: number;
  readonly valueColumn: number;
  readonly dataRows: readonly { readonly raw: RawRow; readonly text: string | null }[];
}

/** The Setup sheets in which a setting can be written, as the reader sees them. */
function setupsOf({ sheets, rows }: StoredInput): SetupSheet[] {
  const definition = sheetDefinitions.get('Setup');
  if (!definition) throw new RangeError('Expected a definition of Setup');
  return sheets.flatMap((sheet, place) => {
    if (sheetKey(sheet.name) !== sheetKey('Setup')) return [];
    const part = partOf(sheet, place, rows.filter((row) => row.part === place)); // prettier-ignore
    const [read] = readTable({ name: sheet.name, parts: [part] }, definition, 'metric', new ProblemList()).parts;
    const setting: Column | undefined = read?.byName.get('setting');
    const value: Column | undefined = read?.byName.get('value');
    if (!read || !setting || !value) return [];
    const dataRows = read.dataRows.map((raw) => ({ raw, text: rawCell({ part: read, raw }, 'setting')?.text ?? null }));
    return [{ place, part, settingColumn: setting.index, valueColumn: value.index, dataRows }];
  });
}

function newRow({ part, settingColumn, valueColumn }: SetupSheet, word: string, typed: string, by: string): RawRow {
  const row = (part.rows.at(-1)?.row ?? 0) + 1;
  const cells = Array.from({ length: Math.max(settingColumn, valueColumn) + 1 }, (_, column) =>
    column === settingColumn ? plainCell(word, false) : column === valueColumn ? plainCell(typed, true) : null,
  );
  return { row, cells, changedBy: by };
}

/** The input with some sheets' rows in place of those they had. */
function withParts({ sheets, rows }: StoredInput, changed: ReadonlyMap<number, RawPart>): StoredInput {
  const own = sheets.map((_, place) => {
    const part = changed.get(place);
    return part ? rowsOfPart(part, place) : rows.filter((row) => row.part === place);
  });
  return { sheets, rows: own.flat() };
}

/** The input with a Setup sheet of its own at the end. */
function withSetup({ sheets, rows }: StoredInput, word: string, typed: string, by: string): StoredInput {
  const file = sheets.find((sheet) => isTyped(sheet.file))?.file ?? 'Setup.csv';
  const sheet: InputSheet = { name: 'Setup', file, decimalMark: null };
  const part: RawPart = {
    name: 'Setup',
    file,
    order: sheets.length,
    decimalMark: null,
    rows: [
      { row: 1, cells: [plainCell('setting', false), plainCell('value', false)], changedBy: by },
      { row: 2, cells: [plainCell(word, false), plainCell(typed, true)], changedBy: by },
    ],
  };
  return { sheets: [...sheets, sheet], rows: [...rows, ...rowsOfPart(part, sheets.length)] };
}
