import { expect, it } from 'vitest';
import { sectionOutline } from '@/lib/library/section-outline';
import { designationsOf, librarySection, rangeNames, ranges } from '@/lib/sections/library';

const step = 0.04;

/** The area that a path of lines and circular arcs encloses; holes count as they are filled, by the even-odd rule. */
function areaOf(path: string): number {
  const rings = path.split('Z').filter((ring) => ring.trim() !== '');
  return Math.abs(rings.map((ring) => Math.abs(ringArea(ring))).reduce((outer, hole) => outer - hole));
}

function ringArea(ring: string): number {
  const points: [number, number][] = [];
  for (const [, command = '', figures = ''] of ring.matchAll(/([MLA])([^MLA]*)/g)) {
    const n = figures.trim().split(/\s+/).map(Number);
    if (command !== 'A') points.push([n[0]!, n[1]!]);
    else points.push(...arc(points.at(-1)!, n));
  }
  let twice = 0;
  points.forEach(([x, y], i) => {
    const [u, v] = points[(i + 1) % points.length]!;
    twice += x * v - u * y;
  });
  return twice / 2;
}

/** Points of an arc from where the pen stands; `sweep` 1 = clockwise on a page whose y runs downwards. */
function arc([x, y]: readonly [number, number], n: readonly number[]): [number, number][] {
  const [r = 0, , , , sweep = 0, ex = 0, ey = 0] = n;
  const [mx, my] = [(x + ex) / 2, (y + ey) / 2];
  const half = Math.hypot(ex - x, ey - y) / 2;
  const away = Math.sqrt(Math.max(0, r * r - half * half));
  const side = sweep === 1 ? 1 : -1;
  const [cx, cy] = [mx - (side * away * (ey - y)) / (2 * half), my + (side * away * (ex - x)) / (2 * half)];
  const start = Math.atan2(y - cy, x - cx);
  let turn = Math.atan2(ey - cy, ex - cx) - start;
  if (sweep === 1 && turn <= 0) turn += 2 * Math.PI;
  if (sweep === 0 && turn >= 0) turn -= 2 * Math.PI;
  const pieces = Math.ceil(Math.abs(turn) / step);
  return Array.from({ length: pieces }, (_, i) => {
    const angle = start + (turn * (i + 1)) / pieces;
    return [cx + r * Math.cos(angle), cy + r * Math.sin(angle)];
  });
}

it.each(rangeNames)('draws the sections of %s so that the outline holds the area that is computed with', (range) => {
  const { rows, unit } = ranges[range];
  const k = unit === 'mm' ? 1e-3 : 0.0254;
  expect(designationsOf(range).length).toBe(rows.length);
  for (const row of [rows[0]!, rows[Math.floor(rows.length / 2)]!, rows.at(-1)!]) {
    const { A_m2, depth_m, width_m } = librarySection(range, row).properties;
    const { path, depth, width } = sectionOutline(row.dimensions);
    expect(Math.abs(areaOf(path) * k * k - A_m2) / A_m2, row.designation).toBeLessThan(3e-3);
    expect(depth * k).toBeCloseTo(depth_m ?? NaN, 9);
    expect(width * k).toBeCloseTo(width_m ?? NaN, 9);
  }
});
