/** What a row of a standard range holds: nominal dimensions in the range's unit; every property is derived from them. */
export type RangeDimensions =
  | {
      readonly shape: 'I' | 'channel';
      readonly h: number;
      readonly b: number;
      readonly tw: number;
      readonly tf: number;
      readonly r: number;
    }
  | ({
      readonly shape: 'tapered I' | 'tapered channel';
      readonly h: number;
      readonly b: number;
      readonly tw: number;
      readonly tf: number;
      readonly r: number;
      /** Radius at the inner corner of the toe. */
      readonly toe: number;
    } & Taper)
  | {
      readonly shape: 'rhs';
      readonly h: number;
      readonly b: number;
      readonly t: number;
      readonly ro: number;
      readonly ri: number;
    }
  | { readonly shape: 'chs'; readonly d: number; readonly t: number };

/** Slope of a flange's inner face, and where its thickness tf is measured: from the back of a channel, from the middle of an I. */
export interface Taper {
  readonly slope: number;
  readonly at: number;
}

export interface RangeRow {
  /** As the standard writes it. */
  readonly designation: string;
  readonly dimensions: RangeDimensions;
}

/** A standard range: nominal dimensions only. */
export interface Range {
  readonly standard: string;
  readonly unit: 'mm' | 'in';
  readonly made: 'rolled' | 'hot finished' | 'cold formed' | null;
  readonly rows: readonly RangeRow[];
}

type OpenRow = readonly [designation: string, h: number, b: number, tw: number, tf: number, r: number];
/** Toe radius: half the root radius where not given. */
type TaperedRow = readonly [...OpenRow, toe?: number | undefined, slope?: number];
type TaperOf = (h: number, b: number, tw: number, slope?: number) => Taper;

const openRows =
  (shape: 'I' | 'channel') =>
  (rows: readonly OpenRow[]): readonly RangeRow[] =>
    rows.map(([designation, h, b, tw, tf, r]) => ({ designation, dimensions: { shape, h, b, tw, tf, r } }));

export const iRows = openRows('I');
export const channelRows = openRows('channel');

const taperedRows =
  (shape: 'tapered I' | 'tapered channel') =>
  (rows: readonly TaperedRow[], taper: TaperOf): readonly RangeRow[] =>
    rows.map(([designation, h, b, tw, tf, r, toe = r / 2, slope]) => ({
      designation,
      dimensions: { shape, h, b, tw, tf, r, toe, ...taper(h, b, tw, slope) },
    }));

export const taperedIRows = taperedRows('tapered I');
export const taperedChannelRows = taperedRows('tapered channel');

/** Outer and inner corner radius that a product standard calculates with, from the wall. */
type Corners = (t: number) => readonly [outer: number, inner: number];

/** EN 10210-2, annex A. */
export const hotFinishedCorners: Corners = (t) => [1.5 * t, t];
/** EN 10219-2, annex B. */
export const coldFormedCorners: Corners = (t) => (t <= 6 ? [2 * t, t] : t <= 10 ? [2.5 * t, 1.5 * t] : [3 * t, 2 * t]);

export function boxRows(
  letters: string,
  corners: Corners,
  sizes: readonly (readonly [h: number, b: number, walls: readonly number[]])[],
): readonly RangeRow[] {
  return sizes.flatMap(([h, b, walls]) =>
    walls.map((t): RangeRow => {
      const [ro, ri] = corners(t);
      return { designation: `${letters} ${h}x${b}x${t}`, dimensions: { shape: 'rhs', h, b, t, ro, ri } };
    }),
  );
}

export function tubeRows(
  letters: string,
  sizes: readonly (readonly [d: number, walls: readonly number[]])[],
): readonly RangeRow[] {
  return sizes.flatMap(([d, walls]) =>
    walls.map((t): RangeRow => ({ designation: `${letters} ${d}x${t}`, dimensions: { shape: 'chs', d, t } })),
  );
}

/** `3-1/2` → 3.5, `5/16` → 0.3125. */
function inches(text: string): number {
  const [, whole = '0', over = '0', under = '1'] = /^(?:(\d+)(?:-|$))?(?:(\d+)\/(\d+))?$/.exec(text) ?? [];
  return Number(whole) + Number(over) / Number(under);
}

/** Design wall of a nominal one, as printed to three decimals (AISC 360-22 B4.2: 0.93 of the nominal). */
const designWall = (nominal: number): number => Math.round(930 * nominal + 1e-9) / 1000;

/** Sizes and walls as the designation writes them; corners of twice the design wall outside, once inside. */
export function hssRows(sizes: readonly (readonly [h: string, b: string, walls: string])[]): readonly RangeRow[] {
  return sizes.flatMap(([h, b, walls]) =>
    walls.split(' ').map((wall): RangeRow => {
      const t = designWall(inches(wall));
      return {
        designation: `HSS${h}X${b}X${wall}`,
        dimensions: { shape: 'rhs', h: inches(h), b: inches(b), t, ro: 2 * t, ri: t },
      };
    }),
  );
}

/** Diameters and nominal walls as the designation writes them, each with its design wall. */
export function roundHssRows(
  sizes: readonly (readonly [d: string, walls: Readonly<Record<string, number>>])[],
): readonly RangeRow[] {
  return sizes.flatMap(([d, walls]) =>
    Object.entries(walls).map(([wall, t]): RangeRow => ({
      designation: `HSS${d}X${wall}`,
      dimensions: { shape: 'chs', d: Number(d), t },
    })),
  );
}

/** Outer diameter and design wall. */
export function pipeRows(rows: readonly (readonly [designation: string, d: number, t: number])[]): readonly RangeRow[] {
  return rows.map(([designation, d, t]) => ({ designation, dimensions: { shape: 'chs', d, t } }));
}
