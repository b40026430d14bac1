import type { FrameEntry } from '@/lib/intake/batch';
import { idKey } from '@/lib/intake/ids';
import { sameContent } from '@/lib/intake/keyed-rows';
import type { ProblemList } from '@/lib/intake/problem-list';
import type { Family } from '@/lib/intake/families/family';
import { forNobody, type Reader, type Reading } from '@/lib/intake/reader';
import { type LeveledRow, level, RowsByFrame } from '@/lib/intake/rows-by-frame';
import { absentPlace, type Row, rawCell, type Table } from '@/lib/intake/table';
import { type CaseKind, caseKinds, type LoadCase } from '@/lib/model/frame';
import * as say from '@/lib/problems/wording';

/** A frame's load cases: shared between frames where they are the same. */
export interface FrameCases {
  readonly list: readonly LoadCase[];
  readonly byKey: ReadonlyMap<string, number>;
  /** False where a row of one of them is wrong (told). */
  readonly sound: boolean;
}

interface Known {
  readonly framesByKey: ReadonlyMap<string, FrameEntry>;
  readonly families: ReadonlyMap<string, Family>;
}

/** The batch's load cases: of the sheet, or (sheet absent) as first used; with those of built-in families after them. */
export class LoadCases {
  /** Every case's name by its key, in order of first definition. */
  readonly names = new Map<string, string>();
  readonly present: boolean;
  /** Sheet absent: the cases that load sheets name; they apply to every frame. */
  private readonly used = new Set<string>();
  private readonly rows: RowsByFrame;
  private readonly shared = new Map<string, FrameCases>();
  private readonly readOnce = new Map<
    Row,
    { case: LoadCase | undefined; entries: ReturnType<ProblemList['record']>['entries'] }
  >();

  constructor(
    private readonly table: Table | undefined,
    loads: readonly (Table | undefined)[],
    known: Known,
    usedFamilies: readonly Family[],
    private readonly reader: Reader,
    private readonly problems: ProblemList,
  ) {
    this.present = (table?.rows.length ?? 0) > 0;
    this.rows = new RowsByFrame('Load cases', table, known, reader);
    for (const row of table?.rows ?? []) this.name(row);
    const builtIn = usedFamilies.flatMap((family) => family.builtIn?.get('Load cases')?.rows ?? []);
    const builtInKeys = new Set(builtIn.map((row) => idKey(rawCell(row, 'case')?.text ?? '')));
    if (!this.present) this.asUsed(loads, builtInKeys);
    for (const row of builtIn) this.name(row);
  }

  private name(row: Row): void {
    const id = this.reader.needId(row, 'case', forNobody);
    if (id !== undefined && !this.names.has(idKey(id))) this.names.set(idKey(id), id);
  }

  /** Sheet absent: the cases named in load sheets, in order of first use, kind other, with a warning. */
  private asUsed(loads: readonly (Table | undefined)[], builtIn: ReadonlySet<string>): void {
    for (const table of loads) {
      for (const row of table?.rows ?? []) {
        const cell = rawCell(row, 'case');
        if (!cell || cell.kind === 'date' || cell.kind === 'error' || cell.kind === 'formula' || cell.text.startsWith('{'))
          continue;
        const key = idKey(cell.text);
        if (key === '' || this.used.has(key)) continue;
        this.used.add(key);
        this.names.set(key, cell.text.trim());
      }
    }
    const guessed = [...this.names].filter(([key]) => !builtIn.has(key)).map(([, name]) => name);
    if (guessed.length === 0) return;
    const message = say.casesAsUsed(guessed);
    this.problems.add(absentPlace('Load cases'), { code: 'default-used', severity: 'warning', message }, null);
  }

  for(frame: FrameEntry): FrameCases {
    const rows = this.rows.for(frame);
    const chosen = this.choose(rows, frame);
    let sound = true;
    const cases: { row: Row | null; load: LoadCase }[] = [];
    for (const [key, name] of this.names) {
      const row = chosen.get(key);
      if (row) {
        const load = this.read(row.own, row.builtIn, frame);
        if (load) cases.push({ row: row.own, load });
        else sound = false;
      } else if (this.used.has(key)) cases.push({ row: null, load: plainCase(name) });
    }
    const list = cases.map((each) => each.load);
    const key = list.map((each) => `${each.name}|${each.kind}|${each.selfWeight}|${each.alternative}|${each.reversible}|${each.note}`).join('¦'); // prettier-ignore
    let shared = this.shared.get(`${sound}${key}`);
    if (!shared) {
      shared = { list, byKey: new Map(list.map((each, i) => [idKey(each.name), i])), sound };
      this.shared.set(`${sound}${key}`, shared);
    }
    return shared;
  }

  private choose(rows: readonly LeveledRow[], frame: FrameEntry): Map<string, { own: Row; builtIn: Row | null }> {
    const chosen = new Map<string, { own: Row; level: number; builtIn: Row | null }>();
    for (const { row, level: at } of rows) {
      if (at === level.all) this.rows.fits(row);
      if (!this.reader.keeps(row, frame.reading)) continue;
      const key = idKey(rawCell(row, 'case')?.text ?? '');
      if (key === '') continue;
      const before = chosen.get(key);
      if (at === level.builtIn) chosen.set(key, before ? { ...before, builtIn: row } : { own: row, level: at, builtIn: row });
      else if (!before || before.level < at) chosen.set(key, { own: row, level: at, builtIn: before?.builtIn ?? null });
      else if (before.level === at) this.twin(row, before.own, frame.reading);
    }
    return chosen;
  }

  private twin(row: Row, first: Row, reading: Reading): void {
    const fault = sameContent(row, first)
      ? ({ code: 'repeated-row', message: say.repeatedRow(first.raw.row) } as const)
      : ({ code: 'conflicting-row', message: say.conflictingRow('case', first.raw.row) } as const);
    this.reader.tell(row, 'case', fault, reading);
  }

  /** A case as its row says; cells that the row leaves blank are the built-in family's. */
  private read(row: Row, builtIn: Row | null, frame: FrameEntry): LoadCase | undefined {
    const own = this.once(row, frame);
    if (!own || !builtIn || builtIn === row) return own;
    const base = this.once(builtIn, frame);
    if (!base) return own;
    const typed = (name: string): boolean => rawCell(row, name) !== null;
    return {
      name: own.name,
      kind: typed('kind') ? own.kind : base.kind,
      selfWeight: typed('self weight') ? own.selfWeight : base.selfWeight,
      alternative: typed('alternative') ? own.alternative : base.alternative,
      reversible: typed('reversible') ? own.reversible : base.reversible,
      note: own.note ?? base.note,
    };
  }

  private once(row: Row, frame: FrameEntry): LoadCase | undefined {
    const own = row.raw.cells.some((cell) => cell?.text.startsWith('{'));
    if (own) return this.readCase(row, frame.reading);
    let read = this.readOnce.get(row);
    if (!read) {
      const { value, entries } = this.problems.record(() => this.readCase(row, forNobody));
      read = { case: value, entries };
      this.readOnce.set(row, read);
    }
    for (const entry of read.entries) this.problems.touch(entry, frame.id);
    return read.case;
  }

  private readCase(row: Row, reading: Reading): LoadCase | undefined {
    const { reader } = this;
    const name = reader.id(row, 'case', reading);
    const kind = reader.word<CaseKind>(row, 'kind', caseKinds, reading);
    const selfWeight = reader.number(row, 'self weight', reading);
    const alternative = reader.id(row, 'alternative', reading);
    const reversible = reader.yesNo(row, 'reversible', reading);
    const note = reader.text(row, 'note', reading);
    if (!name || kind === undefined || selfWeight === undefined || alternative === undefined || reversible === undefined)
      return undefined;
    return {
      name: this.names.get(idKey(name)) ?? name,
      kind: kind ?? 'other',
      selfWeight: selfWeight ?? 0,
      alternative,
      reversible,
      note: note ?? null,
    };
  }

  tellUnfit(frames: readonly FrameEntry[]): void {
    if (this.table) this.rows.tellUnfit(this.reader, frames, this.problems);
  }
}

function plainCase(name: string): LoadCase {
  return { name, kind: 'other', selfWeight: 0, alternative: null, reversible: false, note: null };
}
