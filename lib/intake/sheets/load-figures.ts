import type { Draft } from '@/lib/intake/draft';
import type { Read } from '@/lib/intake/reader';
import { type Column, columnOf, type Row, rawCell } from '@/lib/intake/table';
import * as say from '@/lib/problems/wording';
import { batchUnit } from '@/lib/units/batch-unit';
import { factorFor, type Unit } from '@/lib/units/parse-unit';
import type { Quantity } from '@/lib/units/quantity';

/** Up to this share of its length beyond a member's end a load is clipped; beyond it, refused. */
const clippedShare = 1e-3;

type Kind = 'distributed' | 'point' | 'moment' | 'temperature';

/**
 * The figures of one member load: its value by its heading's units of force and length in the powers that the row's
 * load fixes, and its positions along the member.
 */
export class LoadFigures {
  private readonly column: Column | undefined;
  private readonly unit: Unit | null;
  /** True where the value is an area load: a width is given, or the heading's unit is one. */
  private readonly perArea: boolean;

  constructor(
    private readonly draft: Draft,
    private readonly row: Row,
    private readonly kind: Kind,
    /** m; null where the member's row is wrong. */
    private readonly L: number | null,
  ) {
    this.column = columnOf(row, 'value');
    this.unit = this.column?.unit ?? null;
    this.perArea = kind === 'distributed' && (this.unit?.perArea === true || rawCell(row, 'width') !== null);
  }

  /** Value in SI, an area load already times its width. Undefined where it is missing or wrong (told). */
  value(): number | undefined {
    const { reader } = this.draft.batch;
    const read = this.column ? this.figure(this.column, this.unit) : null;
    if (read === null)
      reader.tell(this.row, 'value', { code: 'not-a-number', message: say.numberMissing('value') }, this.draft.reading);
    if (read === null || read === undefined) return undefined;
    const width = this.width();
    return width === undefined ? undefined : read * width;
  }

  /** Blank = the value; without a unit of its own it is in the value's. */
  endValue(): Read<number> {
    const column = columnOf(this.row, 'end value');
    if (!column) return null;
    const read = this.figure(column, column.unit ?? this.unit);
    if (read === null || read === undefined) return read;
    const width = this.width();
    return width === undefined ? undefined : read * width;
  }

  private figure(column: Column, unit: Unit | null): Read<number> {
    const quantity: Quantity =
      this.kind === 'point' ? 'force' : this.kind === 'moment' ? 'moment' : this.perArea ? 'areaLoad' : 'lineLoad';
    return this.draft.batch.reader.numberAs(this.row, column, quantity, this.factor(quantity, unit), this.draft.reading);
  }

  private factor(quantity: Quantity, unit: Unit | null): number {
    const { system } = this.draft.batch;
    const usual = factorFor(batchUnit(quantity, system), quantity) ?? NaN;
    if (!unit) return usual;
    const own = factorFor(unit, quantity);
    if (own !== null) return own;
    const force = unit.force_N ?? batchUnit('force', system).force_N ?? NaN;
    const length = unit.length_m ?? batchUnit('length', system).length_m ?? NaN;
    if (quantity === 'force') return force;
    if (quantity === 'moment') return force * length;
    return quantity === 'areaLoad' ? force / length ** 2 : force / length;
  }

  /** Width of an area load: the row's, else the frame's spacing; 1 for other loads. */
  private width(): number | undefined {
    if (!this.perArea) return 1;
    const { reader } = this.draft.batch;
    const typed = reader.number(this.row, 'width', this.draft.reading);
    if (typed === undefined) return undefined;
    if (typed !== null && typed <= 0) {
      const fault = { code: 'not-positive', message: say.notPositive('width', rawCell(this.row, 'width')?.text ?? '') } as const;
      reader.tell(this.row, 'width', fault, this.draft.reading);
      return undefined;
    }
    const width = typed ?? this.draft.entry.spacing_m;
    if (width === null) reader.tell(this.row, 'width', { code: 'not-a-number', message: say.widthMissing() }, this.draft.reading);
    return width ?? undefined;
  }

  /** Where a distributed load stands: from 0 to L unless said. */
  stretch(): { from: number; to: number } | undefined {
    const from = this.along('from');
    const to = this.along('to');
    if (from === undefined || to === undefined || this.L === null) return undefined;
    const [a, b] = [from ?? 0, to ?? this.L];
    if (a < b) return { from: a, to: b };
    const at = from === null ? 'to' : 'from';
    this.draft.batch.reader.tell(this.row, at, { code: 'out-of-range', message: say.fromAfterTo(a === b) }, this.draft.reading);
    return undefined;
  }

  /** Where a point force or moment stands. */
  position(): { from: number; to: number } | undefined {
    const at = this.along('from');
    if (at === null) {
      this.draft.batch.reader.tell(
        this.row,
        'from',
        { code: 'not-a-number', message: say.pointNeedsFrom(this.kind) },
        this.draft.reading,
      );
    }
    return at === null || at === undefined ? undefined : { from: at, to: at };
  }

  private along(name: 'from' | 'to'): Read<number> {
    const { reader } = this.draft.batch;
    const value = reader.number(this.row, name, this.draft.reading);
    if (value === null || value === undefined || this.L === null) return value;
    const beyond = Math.max(value - this.L, -value);
    if (beyond <= 0) return value;
    const clipped = Math.min(Math.max(value, 0), this.L);
    if (beyond <= 1e-9 * this.L) return clipped;
    if (beyond <= clippedShare * this.L * (1 + 1e-9)) {
      reader.tell(this.row, name, { code: 'clipped', message: say.clipped(value < 0) }, this.draft.reading);
      return clipped;
    }
    reader.tell(this.row, name, { code: 'load-beyond-end', message: say.beyondEnd(this.L, value < 0) }, this.draft.reading);
    return undefined;
  }
}
