import { nearestAny } from '@/lib/intake/distance';
import { idKey } from '@/lib/intake/ids';
import type { Entry, ProblemList } from '@/lib/intake/problem-list';
import { forNobody, type Reader } from '@/lib/intake/reader';
import { readProperties, withPublished } from '@/lib/intake/sheets/section-properties';
import { type Row, rawCell, type Table } from '@/lib/intake/table';
import { oneRowAKey } from '@/lib/intake/keyed-rows';
import type { Offered } from '@/lib/intake/own/offered';
import type { Section, ShapeDimensions } from '@/lib/model/frame';
import * as say from '@/lib/problems/wording';
import { findDesignation } from '@/lib/sections/find-designation';
import { sectionFromShape, shapeWords } from '@/lib/sections/section-from-shape';

/** A section as found for a member: null where its row is wrong. */
export interface FoundSection {
  readonly section: Section | null;
  /** Row of the Sections sheet or of the office's own; null = straight from the library. */
  readonly row: Row | null;
  /** What was told of the row: frames that use it are touched. */
  readonly entries: readonly Entry[];
}

const dimensionNames = ['h', 'b', 'tw', 'tf', 'r', 't', 'd'] as const;
const propertyNames = ['A', 'I', 'W', 'W top', 'W bottom', 'depth', 'Av', 'Wpl', 'I minor', 'W minor', 'Wpl minor', 'It', 'Iw'];

/** What stands for a section that is nowhere. */
export interface UnknownSection {
  readonly suggestion: string | null;
  /** It was one of the office's own, and is no longer offered. */
  readonly retired?: boolean;
}

export interface SectionOptions {
  /** The office's own. */
  readonly own?: Offered<Section>;
  /** Properties beside a shape are published ones whether the row says so or not. */
  readonly published?: boolean;
}

/** The batch's sections: those of the Sections sheet, else the office's own, else library designations. */
export class Sections {
  private readonly bySheet = new Map<string, FoundSection>();
  private readonly notes = new Map<string, string>();
  private readonly fromLibrary = new Map<string, FoundSection | UnknownSection>();
  private readonly own: Offered<Section> | undefined;

  constructor(table: Table | undefined, reader: Reader, problems: ProblemList, { own, published = false }: SectionOptions = {}) {
    this.own = own;
    const ided = (row: Row): { id: string; key: string } | undefined => {
      if (!reader.keeps(row, forNobody)) return undefined;
      const id = reader.needId(row, 'section', forNobody);
      return id === undefined ? undefined : { id, key: idKey(id) };
    };
    const twins: Entry[] = [];
    const twinned = new Set<string>();
    const rows = (table?.rows ?? []).map((row) => ({ row, level: 0 }));
    const kept = oneRowAKey(rows, ided, (row, first, same) => {
      const told = problems.record(() => reader.tell(row, 'section', same
        ? { code: 'repeated-row', message: say.repeatedRow(first.raw.row) }
        : { code: 'conflicting-row', message: say.conflictingRow('section', first.raw.row) }, forNobody)); // prettier-ignore
      if (same) return;
      twins.push(...told.entries);
      twinned.add(idKey(reader.id(row, 'section', forNobody) ?? ''));
    });
    for (const { row, id, key } of kept) {
      const { value, entries } = problems.record(() => readSection(row, id, reader, { own, published }));
      const wrong = twinned.has(key) ? twins.filter((entry) => idKey(entry.place.found ?? '') === key) : [];
      this.bySheet.set(key, { section: value ?? null, row, entries: [...entries, ...wrong] });
    }
  }

  /** What was understood by a designation that leaves something open, the first time it is asked for; else null. */
  noteOnce(name: string): string | null {
    const note = this.notes.get(name) ?? null;
    this.notes.delete(name);
    return note;
  }

  /** Finds a section by its name, or the nearest name for a hint. */
  find(name: string): FoundSection | UnknownSection {
    const own = this.bySheet.get(idKey(name));
    if (own) return own;
    let found = this.fromLibrary.get(name);
    if (!found) {
      const office = this.own?.take(name);
      const designation = office ? { suggestion: null } : findDesignation(name);
      if (office) found = { section: office.value, row: office.row, entries: office.entries };
      else if ('section' in designation) found = { section: designation.section, row: null, entries: [] };
      else found = this.unknown(name, designation.suggestion);
      if ('section' in designation && designation.note) this.notes.set(name, designation.note);
      this.fromLibrary.set(name, found);
    }
    return found;
  }

  /** Every row of the Sections sheet, once a name, in order. */
  rows(): readonly (readonly [name: string, FoundSection])[] {
    return [...this.bySheet];
  }

  private unknown(name: string, suggestion: string | null): UnknownSection {
    if (this.own?.isRetired(name)) return { suggestion: null, retired: true };
    const known = [...this.bySheet].flatMap(([key, { section }]) => (section ? [[key, section.name] as const] : []));
    const named = [...known, ...(this.own?.names() ?? []).map((own) => [idKey(own), own] as const)];
    return { suggestion: suggestion ?? nearestAny(idKey(name), named) };
  }
}

function readSection(
  row: Row,
  name: string,
  reader: Reader,
  { own, published: always }: { readonly own: Offered<Section> | undefined; readonly published: boolean },
): Section | undefined {
  if (reader.faulty(row, forNobody)) return undefined;
  const designation = reader.id(row, 'designation', forNobody);
  const shape = reader.word(row, 'shape', shapeWords, forNobody);
  const typed = propertyNames.filter((each) => rawCell(row, each) !== null);
  const dimensions = dimensionNames.filter((each) => rawCell(row, each) !== null);
  const says = reader.yesNo(row, 'published', forNobody);
  if (designation === undefined || shape === undefined || says === undefined) return undefined;
  const published = says || always;
  const ways = [designation !== null && 'designation', shape !== null && 'shape', typed.length > 0 && 'properties'].filter((w) => w !== false); // prettier-ignore
  if (ways.length > 1 && !(published && designation === null)) {
    const at = shape !== null && designation !== null ? 'shape' : (typed[0] ?? 'shape');
    reader.tell(row, at, { code: 'conflicting-row', message: say.sectionTwoWays(ways) }, forNobody);
    return undefined;
  }
  if (shape !== null) {
    const shaped = fromShape(row, name, shape, reader);
    return shaped && typed.length > 0 ? withPublished(row, shaped, reader) : shaped;
  }
  const outer = published && typed.length > 0 ? outerDimensions(row, reader) : {};
  if (designation !== null || typed.length > 0) {
    // t beside properties is the governing thickness
    const unused = dimensions.filter((each) => designation !== null || (each !== 't' && !(each in outer)));
    for (const each of unused) reader.tell(row, each, { code: 'column-ignored', message: say.dimensionUnused(each) }, forNobody);
  }
  if (typed.length > 0) return readProperties(row, name, reader, outer);
  if (designation === null && dimensions.length > 0) {
    reader.tell(row, 'shape', { code: 'unknown-word', message: say.shapeMissing(shapeWords) }, forNobody);
    return undefined;
  }
  const office = own?.take(designation ?? name);
  if (own && office) {
    if (!office.value) return undefined;
    const section = { ...office.value, name };
    own.named(section, office);
    return section;
  }
  const found = findDesignation(designation ?? name);
  const at = designation === null ? 'section' : 'designation';
  if ('section' in found) {
    if (found.note) reader.tell(row, at, { code: 'derived', message: say.designationTaken(found.note) }, forNobody);
    return { ...found.section, name };
  }
  reader.tell(
    row,
    at,
    { code: 'unknown-section', message: say.unknownDesignation(designation ?? name, found.suggestion) },
    forNobody,
  );
  return undefined;
}

/** Depth and width of a published section without a shape: all that can be said of it without one. */
function outerDimensions(row: Row, reader: Reader): { h?: number; b?: number } {
  const outer: { h?: number; b?: number } = {};
  for (const each of ['h', 'b'] as const) {
    const value = reader.number(row, each, forNobody);
    if (typeof value === 'number' && value > 0) outer[each] = value;
  }
  return outer;
}

function fromShape(row: Row, name: string, shape: (typeof shapeWords)[number], reader: Reader): Section | undefined {
  const dims: Partial<Record<keyof ShapeDimensions, number>> = {};
  let sound = true;
  for (const each of dimensionNames) {
    const value = reader.number(row, each, forNobody);
    if (value === undefined) sound = false;
    else if (value !== null && (each === 'r' ? value < 0 : value <= 0)) {
      reader.tell(row, each, { code: 'not-positive', message: say.notPositive(each, rawCell(row, each)?.text ?? '') }, forNobody);
      sound = false;
    } else if (value !== null) dims[each] = value;
  }
  if (!sound) return undefined;
  const made = sectionFromShape(shape, dims);
  if ('trouble' in made) {
    const { missing, impossible } = made.trouble;
    for (const each of missing)
      reader.tell(row, each, { code: 'not-a-number', message: say.dimensionMissing(shape, each) }, forNobody);
    if (impossible) reader.tell(row, impossible.dimension, { code: 'out-of-range', message: say.impossibleShape(impossible.why) }, forNobody); // prettier-ignore
    return undefined;
  }
  for (const each of dimensionNames) {
    if (dims[each] === undefined || made.section.dimensions?.[each] !== null) continue;
    reader.tell(row, each, { code: 'column-ignored', message: say.dimensionUnused(each) }, forNobody);
  }
  const { h, b } = dims;
  if (shape === 'I' && h && b && (h / b < 0.5 || h / b > 6)) {
    reader.tell(row, 'h', { code: 'suspect-unit', message: say.suspectProportion(h / b) }, forNobody);
  }
  return { ...made.section, name, designation: null };
}
