import type { FrameEntry } from '@/lib/intake/batch';
import { builtInFamilies } from '@/lib/intake/families/built-in';
import { type Family, readFamilies } from '@/lib/intake/families/family';
import type { VariantReader } from '@/lib/intake/families/variants';
import { idKey } from '@/lib/intake/ids';
import { sameContent } from '@/lib/intake/keyed-rows';
import type { Place, ProblemList } from '@/lib/intake/problem-list';
import { forNobody, type Reader } from '@/lib/intake/reader';
import type { SheetName } from '@/lib/intake/sheet-definitions';
import { placeOf, type Row, rawCell, type Table } from '@/lib/intake/table';
import * as say from '@/lib/problems/wording';
import type { System } from '@/lib/units/quantity';

/** Most frames of one batch (sheets §1). */
const mostFrames = 20_000;

type Tables = ReadonlyMap<SheetName, Table>;

/** Families of the file, and the built-in ones that its variants name. */
export function familiesInUse(tables: Tables, system: System, reader: Reader, problems: ProblemList): Map<string, Family> {
  const families = readFamilies(tables.get('Families'), system, reader, problems);
  const named = new Set((tables.get('Variants')?.rows ?? []).map((row) => idKey(rawCell(row, 'family')?.text ?? '')));
  for (const family of builtInFamilies(system)) {
    if (named.has(family.key) && !families.has(family.key)) families.set(family.key, family);
  }
  return families;
}

/** Every frame of the batch in order of first definition: Frames, then Variants, then Nodes. */
export class FrameList {
  readonly list: FrameEntry[] = [];
  readonly byKey = new Map<string, FrameEntry>();
  private readonly firstRows = new Map<string, Row>();
  private readonly inFrames = new Set<string>();
  private all: Row | null = null;

  constructor(
    private readonly tables: Tables,
    private readonly families: ReadonlyMap<string, Family>,
    private readonly reader: Reader,
    private readonly problems: ProblemList,
  ) {}

  read(variants: VariantReader): void {
    for (const row of this.tables.get('Frames')?.rows ?? []) this.fromFrames(row);
    for (const row of this.tables.get('Variants')?.rows ?? []) this.fromVariants(row, variants);
    for (const row of this.tables.get('Nodes')?.rows ?? []) this.fromNodes(row);
    if (this.all) for (const frame of this.list) if (!this.inFrames.has(frame.key)) this.fill(frame, this.all);
    for (const frame of this.list) frame.spacing_m ??= spacingParameter(frame);
    if (this.list.length > mostFrames) {
      const place = this.list[mostFrames]?.place;
      if (place)
        this.problems.add(
          place,
          { code: 'too-large', message: say.tooManyFrames(this.list.length, mostFrames), stopsAll: true },
          null,
        );
    }
  }

  private define(id: string, place: Place): FrameEntry {
    const key = idKey(id);
    const frame: FrameEntry = {
      index: this.list.length,
      id,
      key,
      place,
      title: null,
      group: null,
      note: null,
      count: 1,
      spacing_m: null,
      run: true,
      variant: null,
      reading: { ...forNobody, frame: id },
    };
    this.list.push(frame);
    this.byKey.set(key, frame);
    return frame;
  }

  /** A frame with the name of a family is listed, and not run; rows that bear the name stay the family's. */
  private refuse(id: string, row: Row): void {
    this.reader.tell(row, 'frame', { code: 'duplicate-id', message: say.frameIsFamily(id) }, { ...forNobody, frame: id });
    if (!this.byKey.has(idKey(id))) this.define(id, placeOf(row, 'frame'));
  }

  private fromFrames(row: Row): void {
    if (!this.reader.keeps(row, forNobody)) return;
    const id = this.reader.needId(row, 'frame', forNobody);
    if (id === undefined) return;
    if (id === '*') {
      this.all ??= row;
      return;
    }
    const key = idKey(id);
    if (this.families.has(key)) {
      this.refuse(id, row);
      return;
    }
    const first = this.firstRows.get(key);
    if (first) {
      const fault = sameContent(row, first)
        ? ({ code: 'repeated-row', message: say.repeatedRow(first.raw.row) } as const)
        : ({ code: 'conflicting-row', message: say.conflictingRow('frame', first.raw.row) } as const);
      this.reader.tell(row, 'frame', fault, { ...forNobody, frame: this.byKey.get(key)?.id ?? id });
      return;
    }
    this.firstRows.set(key, row);
    this.inFrames.add(key);
    this.fill(this.define(id, placeOf(row, 'frame')), row);
  }

  private fill(frame: FrameEntry, row: Row): void {
    const { reader } = this;
    const reading = { ...forNobody, frame: frame.id };
    frame.title = reader.text(row, 'title', reading) ?? null;
    frame.group = reader.text(row, 'group', reading) ?? null;
    frame.note = reader.text(row, 'note', reading) ?? null;
    const positive = (name: string): number | null => {
      const value = reader.number(row, name, reading) ?? null;
      if (value === null || value > 0) return value;
      reader.tell(row, name, { code: 'not-positive', message: say.notPositive(name, rawCell(row, name)?.text ?? '') }, reading);
      return null;
    };
    frame.count = positive('count') ?? 1;
    frame.spacing_m = positive('spacing');
    if (rawCell(row, 'run')) frame.run = reader.yesNo(row, 'run', reading) ?? true;
  }

  private fromVariants(row: Row, variants: VariantReader): void {
    if (!this.reader.keeps(row, forNobody)) return;
    const id = this.reader.needId(row, 'frame', forNobody);
    if (id === undefined) return;
    const key = idKey(id);
    if (this.families.has(key)) {
      this.refuse(id, row);
      return;
    }
    const before = this.byKey.get(key);
    if (before?.variant) {
      const same = sameContent(row, before.variant.row);
      const message = same
        ? say.repeatedRow(before.variant.row.raw.row)
        : say.duplicateId('frame', id, before.variant.row.raw.row);
      this.reader.tell(row, 'frame', { code: 'duplicate-id', message, severity: same ? 'warning' : 'error' }, { ...forNobody, frame: before.id }); // prettier-ignore
      return;
    }
    const frame = before ?? this.define(id, placeOf(row, 'frame'));
    this.noteIfNew(frame, row);
    const read = variants.read(row, frame.id);
    if (!read) return;
    frame.variant = read.variant;
    frame.reading = read.reading;
  }

  private fromNodes(row: Row): void {
    const cell = rawCell(row, 'frame');
    if (!cell || cell.kind === 'error' || cell.kind === 'formula' || cell.kind === 'date') return;
    const key = idKey(cell.text);
    if (key === '*' || key === '' || this.families.has(key) || this.byKey.has(key)) return;
    const id = this.reader.id(row, 'frame', forNobody);
    if (!id) return;
    this.noteIfNew(this.define(id, placeOf(row, 'frame')), row);
  }

  /** A frame that a present Frames sheet does not list is run, with a note. */
  private noteIfNew(frame: FrameEntry, row: Row): void {
    if (this.inFrames.has(frame.key) || (this.tables.get('Frames')?.rows.length ?? 0) === 0 || this.all) return;
    this.reader.tell(
      row,
      'frame',
      { code: 'default-used', message: say.frameNotListed(frame.id) },
      { ...forNobody, frame: frame.id },
    );
  }
}

/** A variant's own parameter `spacing`, where its family has one: the width that its area loads take unless Frames says another. */
function spacingParameter({ variant }: FrameEntry): number | null {
  const parameter = variant?.family.parameters.get('spacing');
  const value = parameter && variant?.origin.parameters[parameter.name]?.value;
  return parameter?.quantity === 'length' && typeof value === 'number' ? value : null;
}
