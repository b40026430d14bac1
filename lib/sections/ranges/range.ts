/** A row of a standard range: designation as the standard writes it, then h, b, tw, tf, r in the range's unit. */
export type RangeRow = readonly [designation: string, h: number, b: number, tw: number, tf: number, r: number];

/** A standard range of I sections: nominal dimensions only; every property is derived from them. */
export interface Range {
  readonly unit: 'mm' | 'in';
  readonly rows: readonly RangeRow[];
}
