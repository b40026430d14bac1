/** A section's outline to scale, from the nominal dimensions of its range: paths about the middle of its depth and width, y downwards. */
import type { RangeDimensions } from '@/lib/sections/ranges/range';

interface Corner {
  readonly x: number;
  readonly y: number;
  /** Radius by which the corner is rounded, inside or outside. */
  readonly r?: number;
}

export interface SectionOutline {
  /** One path with the hole's outline in it, to be filled by the even-odd rule; in the range's unit. */
  readonly path: string;
  readonly width: number;
  readonly depth: number;
}

export function sectionOutline(dims: RangeDimensions): SectionOutline {
  if (dims.shape === 'chs') {
    const { d, t } = dims;
    return { path: `${circle(d / 2)} ${circle(d / 2 - t)}`, width: d, depth: d };
  }
  const { h, b } = dims;
  if (dims.shape === 'rhs') {
    const { t, ro, ri } = dims;
    return { path: `${box(b, h, ro)} ${box(b - 2 * t, h - 2 * t, ri)}`, width: b, depth: h };
  }
  const { tw, tf, r } = dims;
  const taper = 'toe' in dims ? dims : null;
  /** Thickness of the flange at a distance from where tapers are measured (the middle of an I, the back of a channel). */
  const thickness = (x: number): number => (taper ? tf + taper.slope * (taper.at - x) : tf);
  const toe = taper ? taper.toe : 0;
  const channel = dims.shape === 'channel' || dims.shape === 'tapered channel';
  // the right half of the upper flange, from its toe to the web
  const [root, end] = channel ? [tw, b] : [tw / 2, b / 2];
  const shift = channel ? -b / 2 : 0;
  const top = -h / 2;
  const upper: Corner[] = [
    { x: end + shift, y: top },
    { x: end + shift, y: top + thickness(end), r: toe },
    { x: root + shift, y: top + thickness(root), r },
  ];
  const lower = upper.map(({ x, y, r: radius }): Corner => ({ x, y: -y, r: radius })).reverse();
  const right = [...upper, ...lower];
  const left: Corner[] = channel
    ? [
        { x: -b / 2, y: h / 2 },
        { x: -b / 2, y: top },
      ]
    : right.map(({ x, y, r: radius }): Corner => ({ x: -x, y, r: radius })).reverse();
  return { path: rounded([...right, ...left]), width: b, depth: h };
}

const number = (value: number): string => String(Math.round(value * 1e4) / 1e4);
const point = (x: number, y: number): string => `${number(x)} ${number(y)}`;

function circle(r: number): string {
  const n = number(r);
  return `M${number(-r)} 0A${n} ${n} 0 1 1 ${n} 0A${n} ${n} 0 1 1 ${number(-r)} 0Z`;
}

function box(b: number, h: number, r: number): string {
  const [x, y] = [b / 2, h / 2];
  return rounded([
    { x: -x, y: -y, r },
    { x, y: -y, r },
    { x, y, r },
    { x: -x, y, r },
  ]);
}

/** A closed path through corners, each rounded by an arc that touches both of its sides. */
function rounded(corners: readonly Corner[]): string {
  const pieces = corners.map((corner, i) => {
    const before = corners[(i + corners.length - 1) % corners.length] ?? corner;
    const after = corners[(i + 1) % corners.length] ?? corner;
    const [ux, uy] = direction(corner, before);
    const [vx, vy] = direction(corner, after);
    const r = corner.r ?? 0;
    const half = Math.acos(Math.max(-1, Math.min(1, ux * vx + uy * vy))) / 2;
    if (r <= 0 || half === 0) return point(corner.x, corner.y);
    const reach = r / Math.tan(half);
    const from = point(corner.x + ux * reach, corner.y + uy * reach);
    const to = point(corner.x + vx * reach, corner.y + vy * reach);
    const sweep = ux * vy - uy * vx < 0 ? 1 : 0;
    return `${from}A${number(r)} ${number(r)} 0 0 ${sweep} ${to}`;
  });
  return `M${pieces.join('L')}Z`;
}

function direction(from: Corner, to: Corner): readonly [number, number] {
  const [x, y] = [to.x - from.x, to.y - from.y];
  const length = Math.hypot(x, y) || 1;
  return [x / length, y / length];
}
