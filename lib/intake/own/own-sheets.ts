/** The office's own sections and materials as sheets, so that a batch's rows say by themselves what its frames are made of. */
import type { RawCell, RawPart, RawRow, RawSheet } from '@/lib/intake/files/raw-sheet';
import type { OwnKind, OwnRecord, OwnThing } from '@/lib/intake/own/own-thing';
import { sheetDefinitions, type SheetDefinition } from '@/lib/intake/sheet-definitions';
import type { Row } from '@/lib/intake/table';
import { rawCell } from '@/lib/intake/table';
import { wordKey } from '@/lib/intake/words';
import { unitLabel } from '@/lib/units/batch-unit';
import type { System } from '@/lib/units/quantity';

/** Sheets that hold them in an input workbook. US units stand on sheets of their own. */
const names = {
  section: { metric: 'Office sections', us: 'Office sections US' },
  material: { metric: 'Office materials', us: 'Office materials US' },
} as const;

const sheetOf = { section: 'Sections', material: 'Materials' } as const;

/** No file of a sender has both this name and a sheet of those names: the sheet of a text file is called like it. */
const file = 'office.csv';

/** What a sheet of the office's own holds, by its name; null for any other sheet. */
export function officeSheetKind(name: string): OwnKind | null {
  const [, kind] = /^office(section|material)s?(?:us)?\d*$/.exec(wordKey(name)) ?? [];
  return kind === 'section' || kind === 'material' ? kind : null;
}

/** Whether a sheet was written here and not sent. */
export const isOfficePart = (part: Pick<RawPart, 'file' | 'name'>): boolean =>
  part.file === file && officeSheetKind(part.name) !== null;

export function ownDefinition(kind: OwnKind): SheetDefinition {
  const definition = sheetDefinitions.get(sheetOf[kind]);
  if (!definition) throw new RangeError(`Expected a definition of ${sheetOf[kind]}`);
  return definition;
}

/**
 * @param order of the first sheet, among all of the batch
 * @param taken names of sheets that the batch has: a further sheet is numbered
 */
export function ownSheets(things: readonly OwnThing[], order: number, taken: readonly string[] = []): RawSheet[] {
  const keys = new Set(taken.map(wordKey));
  const free = (name: string, number = 1): string => {
    const numbered = number === 1 ? name : `${name} ${number}`;
    return keys.has(wordKey(numbered)) ? free(name, number + 1) : numbered;
  };
  const sheets: RawSheet[] = [];
  for (const kind of ['section', 'material'] as const) {
    for (const units of ['metric', 'us'] as const) {
      const own = things.filter((thing) => thing.kind === kind && thing.units === units);
      if (own.length === 0) continue;
      const name = free(names[kind][units]);
      const rows = rowsOf(kind, units, own.map((thing) => ({ ...thing, source: sourceText(thing) }))); // prettier-ignore
      sheets.push({ name, parts: [{ name, file, order: order + sheets.length, decimalMark: '.', rows }] });
    }
  }
  return sheets;
}

/** Rows of a sheet with a heading row: the columns that any of the records fills, with their units. */
export function rowsOf(kind: OwnKind, units: System, records: readonly (OwnRecord & { source: string })[]): RawRow[] {
  const { columns } = ownDefinition(kind);
  const filled = [...columns.keys()].filter((name) => records.some(({ cells }) => (cells[name] ?? '') !== ''));
  const heading = (name: string): string => {
    const quantity = columns.get(name) ?? null;
    const unit = quantity === null || quantity === 'load' || quantity === 'number' ? '' : unitLabel(quantity, units);
    return unit === '' ? name : `${name} [${unit}]`;
  };
  const line = (row: number, texts: readonly string[]): RawRow => ({
    row,
    cells: texts.map((text): RawCell | null => (text === '' ? null : { kind: 'text', text })),
  });
  return [
    line(1, [kind, ...filled.map(heading), 'source']),
    ...records.map(({ name, cells, source }, i) => line(i + 2, [name, ...filled.map((column) => cells[column] ?? ''), source])),
  ];
}

const sourceText = ({ version, note }: OwnThing): string => `office v${version}${note === '' ? '' : `: ${note}`}`;

/** What a row of an office's sheet says of its version; null where it is no such row. */
export function versionOf(row: Row): { readonly version: number; readonly note: string } | null {
  if (!isOfficePart(row.part.raw)) return null;
  const [, version, note = ''] = /^office v(\d+)(?:: (.*))?$/s.exec(rawCell(row, 'source')?.text ?? '') ?? [];
  return version === undefined ? null : { version: Number(version), note };
}
