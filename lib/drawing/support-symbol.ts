import type { DrawingSupport } from './drawing-data';
import { turned } from './ground-direction';
import { line, path, plus, type Point } from './paper';

export interface SymbolPath {
  readonly d: string;
  readonly className: 'd-ground' | 'd-hatch' | 'd-symbol' | 'd-spring';
}

/**
 * What is drawn of a support by what it holds: fixed = line and hatching, pin = triangle on hatching, roller = on wheels,
 * spring = coil. Paths in order of drawing.
 *
 * @param at the node on paper   @param away unit direction on paper from the frame to the ground
 * @param r half the width of the symbol, px
 */
export function supportSymbol(support: DrawingSupport, at: Point, away: Point, r: number): SymbolPath[] {
  const { ux, uy, rz } = support;
  const side: Point = { x: -away.y, y: away.x };
  const held = [ux, uy].filter((state) => state === 'fixed').length;
  const springs = [ux, uy].filter((state) => state === 'spring').length;
  const rollers = held === 1 && springs === 0;
  const parts: SymbolPath[] = [];
  const ground = (from: Point, half: number) => {
    parts.push({ d: line(plus(from, side, -half), plus(from, side, half)), className: 'd-ground' });
    const ticks: string[] = [];
    for (let s = -half; s < half - 0.5; s += r * 0.42) {
      const foot = plus(from, side, s + r * 0.42);
      ticks.push(line(foot, plus(plus(foot, away, r * 0.45), side, -r * 0.45)));
    }
    parts.push({ d: ticks.join(''), className: 'd-hatch' });
  };
  const wheels = (from: Point) => {
    const w = r * 0.17;
    for (const s of [-0.45, 0.45]) {
      const c = plus(plus(from, away, w), side, s * r);
      parts.push({ d: `M${c.x - w} ${c.y}a${w} ${w} 0 1 0 ${2 * w} 0a${w} ${w} 0 1 0 ${-2 * w} 0`, className: 'd-symbol' });
    }
    return plus(from, away, 2 * w);
  };
  if (rz === 'fixed') {
    if (rollers) {
      parts.push({ d: line(plus(at, side, -r), plus(at, side, r)), className: 'd-ground' });
      ground(wheels(at), r);
    } else ground(at, r);
  } else if (held + springs > 0) {
    const foot = plus(at, away, r);
    if (held > 0) {
      parts.push({ d: path([at, plus(foot, side, -r * 0.62), plus(foot, side, r * 0.62)], true), className: 'd-symbol' });
      ground(rollers ? wheels(foot) : foot, r);
    }
  }
  if (ux === 'spring') coil(parts, at, turned({ x: 1, y: 0 }, support.angle), r, away);
  if (uy === 'spring') coil(parts, at, turned({ x: 0, y: 1 }, support.angle), r, away);
  if (rz === 'spring') parts.push({ d: spiral(at, r * 0.8), className: 'd-spring' });
  return parts;
}

/** A coil along the sprung direction, on the side away from the frame, ending on a short line of ground. */
function coil(parts: SymbolPath[], at: Point, direction: Point, r: number, away: Point): void {
  const facing = direction.x * away.x + direction.y * away.y;
  const d = facing < -0.01 ? { x: -direction.x, y: -direction.y } : direction;
  const s: Point = { x: -d.y, y: d.x };
  const points: Point[] = [at, plus(at, d, r * 0.3)];
  for (let i = 0; i < 6; i++) points.push(plus(plus(at, d, r * (0.4 + i * 0.16)), s, (i % 2 === 0 ? 1 : -1) * r * 0.32));
  const end = plus(at, d, r * 1.6);
  points.push(plus(at, d, r * 1.36), end);
  parts.push(
    { d: path(points), className: 'd-spring' },
    { d: line(plus(end, s, -r * 0.6), plus(end, s, r * 0.6)), className: 'd-ground' },
  );
}

function spiral(at: Point, r: number): string {
  const points: Point[] = [];
  for (let a = 0; a <= 4.2 * Math.PI; a += Math.PI / 10) {
    const reach = (r * a) / (4.2 * Math.PI);
    points.push({ x: at.x + reach * Math.cos(a), y: at.y + reach * Math.sin(a) });
  }
  return path(points);
}
