/** What a form or a sheet says of an office's own sections and materials → what is kept of them, or every problem at its cell. */
import type { RawSheet } from '@/lib/intake/files/raw-sheet';
import { officeSheetKind, ownDefinition, rowsOf } from '@/lib/intake/own/own-sheets';
import type { OwnKind, OwnRecord } from '@/lib/intake/own/own-thing';
import { ProblemList } from '@/lib/intake/problem-list';
import { readTable } from '@/lib/intake/read-table';
import { forNobody, Reader } from '@/lib/intake/reader';
import { Materials, type MaterialRow } from '@/lib/intake/sheets/materials';
import { propertyColumns } from '@/lib/intake/sheets/section-properties';
import { Sections } from '@/lib/intake/sheets/sections';
import { type Row, rawCell, type Table } from '@/lib/intake/table';
import { sheetKey } from '@/lib/intake/words';
import { gradeFor } from '@/lib/materials/grade-for';
import type { Material, Section } from '@/lib/model/frame';
import * as say from '@/lib/problems/wording';
import type { Problem } from '@/lib/problems/problem';
import { findDesignation } from '@/lib/sections/find-designation';
import { fromSI } from '@/lib/units/batch-unit';
import type { Quantity, System } from '@/lib/units/quantity';

/** One of them as it will be kept. */
export interface OwnRecordRead {
  readonly kind: OwnKind;
  readonly record: OwnRecord;
  readonly note: string;
  /** What it comes to: a section, or a material for a thickness that is not known. */
  readonly section: Section | null;
  readonly material: Material | null;
}

export interface OwnRecordsRead {
  /** Those without an error, in order. */
  readonly records: readonly OwnRecordRead[];
  readonly problems: readonly Problem[];
}

/** @param note where the figures come from */
export function readOwnRecord(kind: OwnKind, record: OwnRecord, note: string): OwnRecordsRead {
  const rows = rowsOf(kind, record.units, [{ ...record, source: note }]);
  const sheet = { name: ownDefinition(kind).name, parts: [{ name: ownDefinition(kind).name, file: 'form.csv', order: 0, decimalMark: null, rows }] }; // prettier-ignore
  return readOwnSheet(kind, sheet, record.units);
}

/**
 * A table of them: the sheet of the name (Sections, Materials), or the only sheet there is, whatever it is called. Properties
 * beside a shape are published ones and are used as given.
 *
 * @param units of numbers whose headings say none, and in which they are kept
 */
export function readOwnFiles(kind: OwnKind, sheets: readonly RawSheet[], units: System): OwnRecordsRead | null {
  const { name } = ownDefinition(kind);
  const named = sheets.filter((sheet) => sheetKey(sheet.name) === sheetKey(name) || officeSheetKind(sheet.name) === kind);
  const own = named.length === 0 && sheets.length === 1 ? sheets : named;
  const [first] = own;
  return first ? readOwnSheet(kind, { name, parts: own.flatMap(({ parts }) => parts) }, units) : null;
}

function readOwnSheet(kind: OwnKind, sheet: RawSheet, units: System): OwnRecordsRead {
  const problems = new ProblemList();
  const reader = new Reader(problems);
  const table = readTable(sheet, ownDefinition(kind), units, problems);
  const records = kind === 'section' ? sectionsOf(table, reader, problems, units) : materialsOf(table, reader, problems, units);
  return { records, problems: problems.list() };
}

const noteOf = (row: Row): string =>
  (rawCell(row, 'source')?.text ?? '')
    .replace(/^office v\d+(: )?/, '')
    .trim()
    .slice(0, 300);

/** A number in its unit as a person would type it: conversions leave no tail of digits. */
const figure = (si: number, quantity: Quantity, units: System): string =>
  String(Number(fromSI(si, quantity, units).toPrecision(12)));

function sectionsOf(table: Table, reader: Reader, problems: ProblemList, units: System): OwnRecordRead[] {
  const read = new Sections(table, reader, problems, { published: true });
  return read.rows().flatMap(([, { section, row, entries }]): OwnRecordRead[] => {
    if (!section || !row) return [];
    if (section.designation !== null) {
      reader.tell(row, 'section', { code: 'duplicate-id', message: say.isStandard(section.designation) }, forNobody);
      return [];
    }
    if (!mayBeCalled(row, section.name, 'section', reader) || entries.some(({ severity }) => severity === 'error')) return [];
    const cells: Record<string, string> = {};
    for (const [name, si] of Object.entries(section.dimensions ?? {}))
      if (typeof si === 'number') cells[name] = figure(si, 'dimension', units);
    if (section.shape !== null) cells['shape'] = section.shape === 'round' ? 'bar' : section.shape;
    const { columns } = table.definition;
    const typed = propertyColumns.filter(([key]) => section.sources[key] === 'typed');
    for (const [key, column] of typed) {
      const quantity = columns.get(column);
      const si = section.properties[key];
      if (si !== null && quantity && quantity !== 'load') cells[column] = figure(si, quantity, units);
    }
    const width = section.shape === null ? section.properties.width_m : null;
    if (width !== null) cells['b'] = figure(width, 'dimension', units);
    if (typed.length > 0 && (section.shape !== null || width !== null)) cells['published'] = 'yes';
    const material = rawCell(row, 'material')?.text.trim() ?? '';
    if (material !== '') cells['material'] = material;
    const record = { name: section.name, units, cells };
    return [{ kind: 'section', record, note: noteOf(row), section: resolvedSection(record), material: null }];
  });
}

/** The section as it will be read from the record that is kept. */
function resolvedSection(record: OwnRecord): Section {
  const { read } = again('section', record);
  const section = read instanceof Sections ? read.rows()[0]?.[1].section : null;
  if (!section) throw new RangeError(`Expected a record of a section, got ${JSON.stringify(record)}`);
  return section;
}

/** The material as it will be read from the record that is kept, for a section's thickest part. */
export function resolvedMaterial(record: OwnRecord, thickness_m: number | null): Material {
  const { read } = again('material', record);
  const source: MaterialRow | null = read instanceof Materials ? (read.rows()[0]?.[1].source ?? null) : null;
  if (!source || !(read instanceof Materials))
    throw new RangeError(`Expected a record of a material, got ${JSON.stringify(record)}`);
  return read.resolve(source, thickness_m, null);
}

function again(kind: OwnKind, record: OwnRecord): { readonly read: Sections | Materials } {
  const problems = new ProblemList();
  const reader = new Reader(problems);
  const name = ownDefinition(kind).name;
  const rows = rowsOf(kind, record.units, [{ ...record, source: '' }]);
  const sheet = { name, parts: [{ name, file: 'kept.csv', order: 0, decimalMark: '.' as const, rows }] };
  const table = readTable(sheet, ownDefinition(kind), record.units, problems);
  return { read: kind === 'section' ? new Sections(table, reader, problems) : new Materials(table, reader, problems) };
}

const materialColumns = [
  ['E_Pa', 'E'],
  ['G_Pa', 'G'],
  ['fy_Pa', 'fy'],
  ['fu_Pa', 'fu'],
  ['density_kg_m3', 'density'],
  ['expansion_perK', 'expansion'],
] as const;

function materialsOf(table: Table, reader: Reader, problems: ProblemList, units: System): OwnRecordRead[] {
  return new Materials(table, reader, problems).rows().flatMap(([, { source, row, entries }]): OwnRecordRead[] => {
    if (!source || !row || !mayBeCalled(row, source.name, 'material', reader)) return [];
    if (entries.some(({ severity }) => severity === 'error')) return [];
    const cells: Record<string, string> = {};
    if (source.grade !== null) cells['grade'] = source.grade;
    for (const [key, column] of materialColumns) {
      const si = source.typed[key];
      const quantity = table.definition.columns.get(column);
      if (si !== undefined && quantity && quantity !== 'load') cells[column] = figure(si, quantity, units);
    }
    if (source.steps !== null) cells['fy by thickness'] = rawCell(row, 'fy by thickness')?.text.trim() ?? '';
    const record = { name: source.name, units, cells };
    return [{ kind: 'material', record, note: noteOf(row), section: null, material: resolvedMaterial(record, null) }];
  });
}

/** A name of the office's own: no standard one, which it would shadow, and none that sheets could not say. */
function mayBeCalled(row: Row, name: string, kind: OwnKind, reader: Reader): boolean {
  const standard = kind === 'section' ? findDesignation(name) : gradeFor(name, null);
  const held = 'section' in standard ? standard.section.designation : 'properties' in standard ? standard.properties.grade : null;
  const fault =
    held !== null
      ? ({ code: 'duplicate-id', message: say.isStandard(held) } as const)
      : name.length > 60 || /[{}\n*]/.test(name)
        ? ({ code: 'unknown-word', message: say.badName() } as const)
        : null;
  if (fault) reader.tell(row, kind, fault, forNobody);
  return fault === null;
}
