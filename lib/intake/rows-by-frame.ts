import type { FrameEntry } from '@/lib/intake/batch';
import type { Family } from '@/lib/intake/families/family';
import { idKey } from '@/lib/intake/ids';
import type { ProblemList } from '@/lib/intake/problem-list';
import { forNobody, type Reader } from '@/lib/intake/reader';
import type { SheetName } from '@/lib/intake/sheet-definitions';
import { type Row, rawCell, type Table } from '@/lib/intake/table';
import * as say from '@/lib/problems/wording';

/** How closely a row names a frame: a closer one replaces a wider one of the same key. */
export const level = { all: 0, builtIn: 1, family: 2, named: 3 } as const;

export interface LeveledRow {
  readonly row: Row;
  readonly level: number;
}

interface Known {
  readonly framesByKey: ReadonlyMap<string, FrameEntry>;
  readonly families: ReadonlyMap<string, Family>;
}

/** The rows of one sheet by the frames they are for: named, by family, or all (`*`, or blank where that is allowed). */
export class RowsByFrame {
  private readonly named = new Map<number, LeveledRow[]>();
  private readonly ofFamily = new Map<string, LeveledRow[]>();
  private readonly ofBuiltIn = new Map<string, LeveledRow[]>();
  private readonly all: LeveledRow[] = [];
  private readonly fitting = new Set<Row>();

  constructor(sheet: SheetName, table: Table | undefined, known: Known, reader: Reader) {
    const definition = table?.definition;
    const needed = definition?.required.some((names) => names.includes('frame')) ?? false;
    for (const row of table?.rows ?? []) this.place(row, needed, known, reader);
    for (const family of known.families.values()) {
      const rows = family.builtIn?.get(sheet)?.rows ?? [];
      if (rows.length > 0) this.ofBuiltIn.set(family.key, rows.map((row) => ({ row, level: level.builtIn }))); // prettier-ignore
    }
  }

  private place(row: Row, needed: boolean, known: Known, reader: Reader): void {
    const cell = rawCell(row, 'frame');
    if (!cell && !needed) {
      this.all.push({ row, level: level.all });
      return;
    }
    const id = reader.needId(row, 'frame', forNobody);
    if (id === undefined) return;
    if (id === '*') {
      this.all.push({ row, level: level.all });
      return;
    }
    const key = idKey(id);
    const frame = known.framesByKey.get(key);
    if (known.families.has(key)) add(this.ofFamily, key, { row, level: level.family });
    else if (frame) {
      add(this.named, frame.index, { row, level: level.named });
      // the note on a merged frame cell concerns that frame
      if (cell?.mergedFrom) reader.id(row, 'frame', { ...forNobody, frame: frame.id });
    }
    // the sheet that would name the frames is missing, and has been told
    else if (known.framesByKey.size === 0 && reader.problems.stopsAll) return;
    else reader.tell(row, 'frame', { code: 'unknown-node', message: say.unknownFrame(id) }, { ...forNobody, frame: id });
  }

  /** Rows for a frame, widest first; within a level in sheet order. */
  for(frame: FrameEntry): readonly LeveledRow[] {
    const named = this.named.get(frame.index) ?? [];
    const { variant } = frame;
    if (this.all.length === 0 && !variant) return named;
    const wider = variant
      ? [...(this.ofBuiltIn.get(variant.family.key) ?? []), ...(this.ofFamily.get(variant.family.key) ?? [])]
      : [];
    return [...this.all, ...wider, ...named];
  }

  /** One text for frames whose rows are the same ones. */
  scopeOf(frame: FrameEntry): string {
    const family = frame.variant?.family.key ?? '';
    const own = family !== '' && (this.ofFamily.has(family) || this.ofBuiltIn.has(family)) ? family : '';
    return `${own}|${this.named.has(frame.index) ? frame.index : ''}`;
  }

  /** Notes that a row for all frames fits one. */
  fits(row: Row): void {
    this.fitting.add(row);
  }

  /** Tells the rows for all frames that fit none; to be asked when every frame is read. */
  tellUnfit(reader: Reader, frames: readonly FrameEntry[], problems: ProblemList): void {
    const running = frames.filter((frame) => frame.run);
    // a variant that could not be read may be the very frame it is for
    if (running.length === 0 || problems.stopsAll || running.some((frame) => frame.variant?.complete === false)) return;
    for (const { row } of this.all) {
      if (this.fitting.has(row) || rawCell(row, 'frame') === null) continue;
      reader.tell(row, 'frame', { code: 'unknown-node', message: say.starFitsNone() }, forNobody);
    }
  }
}

function add<K>(map: Map<K, LeveledRow[]>, key: K, row: LeveledRow): void {
  const list = map.get(key);
  if (list) list.push(row);
  else map.set(key, [row]);
}
