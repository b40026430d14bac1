/** Where every cell of a strip stands, for a width and a number of frames. Pixels. */
export interface StripLayout {
  readonly columns: number;
  readonly width: number;
  readonly left: number;
  readonly right: number;
  readonly pitch: number;
  readonly cell: number;
  /** From 0 to 1.25. */
  readonly height: number;
  /** Above the scale, for group names or air. */
  readonly gap: number;
  readonly rowPitch: number;
  readonly groups: boolean;
}

/** Extra space after each ten. */
const tens = 5;
const below = 2;

/**
 * Rows of fifty (twenty-five under 600 px of strip), 48 px high up to 300 frames, 18 px at 1,000, so that
 * a thousand stand on one screen.
 */
export function layOutStrip(count: number, width: number): StripLayout {
  const columns = width >= 600 ? 50 : 25;
  const rows = Math.max(1, Math.ceil(count / columns));
  const left = count > 999 ? 40 : 34;
  const right = 62;
  const gaps = Math.ceil(columns / 10) - 1;
  const pitch = (width - left - right - gaps * tens) / columns;
  const rowPitch = count <= 300 ? (columns === 50 ? 61 : 46) : Math.max(24, Math.min(61, Math.floor(500 / rows)));
  const groups = rowPitch >= 44;
  // a name's own height and a little air above and below it
  const gap = groups ? 14 : 4;
  return {
    columns, width, left, right, pitch, cell: pitch * 0.78, gap, rowPitch, groups, height: rowPitch - gap - below,
  }; // prettier-ignore
}

/** Left edge of the cell in a column. */
export function columnX(layout: StripLayout, column: number): number {
  return layout.left + column * layout.pitch + Math.floor(column / 10) * tens + (layout.pitch - layout.cell) / 2;
}

/** The column under x, within the row; the nearest where x falls between cells. */
export function columnAt(layout: StripLayout, x: number): number {
  let best = 0;
  for (let column = 0; column < layout.columns; column++) {
    if (x >= columnX(layout, column) - (layout.pitch - layout.cell) / 2) best = column;
  }
  return best;
}
