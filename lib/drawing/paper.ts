/** Points on paper: pixels, y downwards. */
export interface Point {
  readonly x: number;
  readonly y: number;
}
export interface Bounds {
  readonly minX: number;
  readonly maxX: number;
  readonly minY: number;
  readonly maxY: number;
}
export interface Margins {
  readonly left: number;
  readonly right: number;
  readonly top: number;
  readonly bottom: number;
}

/** Where the frame stands on the paper: one scale both ways, never mirrored. */
export interface Paper {
  readonly width: number;
  readonly height: number;
  /** Pixels a metre. */
  readonly scale: number;
  readonly at: (x: number, y: number) => Point;
}

export function boundsOf(points: readonly Point[]): Bounds {
  const bounds = { minX: Infinity, maxX: -Infinity, minY: Infinity, maxY: -Infinity };
  for (const { x, y } of points) {
    bounds.minX = Math.min(bounds.minX, x);
    bounds.maxX = Math.max(bounds.maxX, x);
    bounds.minY = Math.min(bounds.minY, y);
    bounds.maxY = Math.max(bounds.maxY, y);
  }
  return points.length > 0 ? bounds : { minX: 0, maxX: 1, minY: 0, maxY: 1 };
}

/** Fits world bounds (m, y up) within the margins, centred; at most `most` px a metre, so that a small frame stays small. */
export function fitPaper(world: Bounds, width: number, height: number, margins: Margins, most = 220): Paper {
  const spanX = world.maxX - world.minX;
  const spanY = world.maxY - world.minY;
  const roomX = Math.max(width - margins.left - margins.right, 20);
  const roomY = Math.max(height - margins.top - margins.bottom, 20);
  const scale = Math.min(spanX > 0 ? roomX / spanX : Infinity, spanY > 0 ? roomY / spanY : Infinity, most);
  const originX = margins.left + (roomX - spanX * scale) / 2 - world.minX * scale;
  const originY = margins.top + (roomY - spanY * scale) / 2 + world.maxY * scale;
  return { width, height, scale, at: (x, y) => ({ x: originX + x * scale, y: originY - y * scale }) };
}

export const plus = (p: Point, d: Point, by = 1): Point => ({ x: p.x + d.x * by, y: p.y + d.y * by });
const fixed = (value: number) => String(Math.round(value * 100) / 100);
export const path = (points: readonly Point[], close = false): string =>
  points.length === 0 ? '' : `M${points.map((p) => `${fixed(p.x)} ${fixed(p.y)}`).join('L')}${close ? 'z' : ''}`;
export const line = (a: Point, b: Point): string => path([a, b]);
