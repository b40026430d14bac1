import type { DrawingData, DrawingLine } from './drawing-data';
import { plus, type Paper, type Point } from './paper';

/** A member on paper: from a to b, with the directions of local x and local y there. */
export interface MemberAxis {
  readonly index: number;
  readonly a: Point;
  readonly b: Point;
  /** Local x, local y (90° anticlockwise from it, so upwards on paper for a member drawn left to right). */
  readonly t: Point;
  readonly n: Point;
  /** m */
  readonly length: number;
  /** px */
  readonly drawn: number;
}

export function memberAxes(data: DrawingData, paper: Paper): MemberAxis[] {
  return data.members.map((member, index) => {
    const [p, q] = [data.nodes[member.start]!, data.nodes[member.end]!];
    const length = Math.hypot(q.x - p.x, q.y - p.y) || 1e-9;
    const [c, s] = [(q.x - p.x) / length, (q.y - p.y) / length];
    return {
      index, a: paper.at(p.x, p.y), b: paper.at(q.x, q.y), t: { x: c, y: -s }, n: { x: -s, y: -c }, length, drawn: length * paper.scale,
    }; // prettier-ignore
  });
}

/** The point of a member at x metres from its start, `off` pixels towards local +y. */
export const along = (axis: MemberAxis, x: number, off = 0): Point =>
  plus(plus(axis.a, axis.t, (x / axis.length) * axis.drawn), axis.n, off);

export type LineQuantity = 'N' | 'V' | 'M' | 'u' | 'v';

/** A sampled value at x, straight between samples; at a jump the value after it. */
export function valueAt(line: DrawingLine, quantity: LineQuantity, x: number): number {
  const xs = line.x;
  const ys = line[quantity];
  if (xs.length === 0) return 0;
  if (x <= (xs[0] ?? 0)) return ys[0] ?? 0;
  let hi = xs.findIndex((sample) => sample > x);
  if (hi < 0) hi = xs.length - 1;
  const [x0, x1] = [xs[hi - 1] ?? 0, xs[hi] ?? 0];
  const [y0, y1] = [ys[hi - 1] ?? 0, ys[hi] ?? 0];
  return x1 > x0 ? y0 + ((y1 - y0) * Math.min(x - x0, x1 - x0)) / (x1 - x0) : y1;
}
