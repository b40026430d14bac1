import { line, path, plus, type Point } from './paper';

/** A line with an open head at its end. */
export function arrow(from: Point, to: Point, size: number): string {
  const length = Math.hypot(to.x - from.x, to.y - from.y) || 1;
  const t = { x: (to.x - from.x) / length, y: (to.y - from.y) / length };
  const n = { x: -t.y, y: t.x };
  const back = plus(to, t, -size * 1.5);
  return line(from, to) + path([plus(back, n, size * 0.6), to, plus(back, n, -size * 0.6)]);
}

/** Three quarters of a circle with an open head: anticlockwise where positive. */
export function turn(at: Point, r: number, anticlockwise: boolean): string {
  const start = anticlockwise ? { x: at.x + r, y: at.y } : { x: at.x - r, y: at.y };
  const end = { x: at.x, y: at.y + r };
  const arc = `M${start.x} ${start.y}A${r} ${r} 0 1 ${anticlockwise ? 0 : 1} ${end.x} ${end.y}`;
  const way = anticlockwise ? 1 : -1;
  return arc + path([{ x: end.x - way * 5, y: end.y - 4 }, end, { x: end.x - way * 5, y: end.y + 3.5 }]);
}
