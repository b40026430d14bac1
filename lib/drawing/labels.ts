import type { Point } from './paper';

/** Text to be placed: where it would like to stand, best first. */
export interface LabelWish {
  readonly key: string;
  /** Several lines are parted by a line feed; they stay together. */
  readonly text: string;
  readonly className: string;
  /** Font size, px. */
  readonly size: number;
  /** Centre of the text, and its turn in degrees (kept readable by the caller). */
  readonly places: readonly { readonly at: Point; readonly turn?: number }[];
  /** Must stand somewhere, even over a line; others are left out where they would cover something. */
  readonly must?: boolean;
  /** A thin line leads from here where the label had to move away. */
  readonly from?: Point;
}
export interface PlacedLabel {
  readonly key: string;
  readonly text: string;
  readonly className: string;
  readonly size: number;
  readonly at: Point;
  readonly turn: number;
  readonly leader: Point | null;
}

const grain = 3;

/** What of the paper is taken, in squares of 3 px: 1 by a line, 2 by text. */
export class Taken {
  private readonly columns: number;
  private readonly rows: number;
  private readonly cells: Uint8Array;

  constructor(width: number, height: number) {
    this.columns = Math.ceil(width / grain);
    this.rows = Math.ceil(height / grain);
    this.cells = new Uint8Array(this.columns * this.rows);
  }

  line(a: Point, b: Point): void {
    const steps = Math.max(1, Math.ceil(Math.hypot(b.x - a.x, b.y - a.y) / grain));
    for (let i = 0; i <= steps; i++) this.mark(a.x + ((b.x - a.x) * i) / steps, a.y + ((b.y - a.y) * i) / steps, 1);
  }

  lines(points: readonly Point[]): void {
    for (let i = 1; i < points.length; i++) this.line(points[i - 1]!, points[i]!);
  }

  /** Squares under a text that text and lines already have; Infinity where it would leave the paper. */
  cost(at: Point, width: number, height: number, turn: number): number {
    let cost = 0;
    let outside = false;
    this.cover(at, width, height, turn, (column, row) => {
      if (column < 1 || row < 1 || column >= this.columns - 1 || row >= this.rows - 1) outside = true;
      else {
        const taken = this.cells[row * this.columns + column] ?? 0;
        cost += taken === 2 ? 40 : taken;
      }
    });
    return outside ? Infinity : cost;
  }

  text(at: Point, width: number, height: number, turn: number): void {
    this.cover(at, width, height, turn, (column, row) => {
      if (column >= 0 && row >= 0 && column < this.columns && row < this.rows) this.cells[row * this.columns + column] = 2;
    });
  }

  private mark(x: number, y: number, value: number): void {
    const [column, row] = [Math.floor(x / grain), Math.floor(y / grain)];
    if (column < 0 || row < 0 || column >= this.columns || row >= this.rows) return;
    const at = row * this.columns + column;
    this.cells[at] = Math.max(this.cells[at] ?? 0, value);
  }

  private cover(at: Point, width: number, height: number, turn: number, visit: (column: number, row: number) => void): void {
    const [c, s] = [Math.cos((turn * Math.PI) / 180), Math.sin((turn * Math.PI) / 180)];
    for (let u = -width / 2; u <= width / 2 + 0.01; u += grain) {
      for (let v = -height / 2; v <= height / 2 + 0.01; v += grain) {
        visit(Math.floor((at.x + u * c - v * s) / grain), Math.floor((at.y + u * s + v * c) / grain));
      }
    }
  }
}

/** Width of a text in the condensed cut, near enough for keeping texts apart. */
export const textWidth = (text: string, size: number): number =>
  Math.max(...text.split('\n').map((row) => row.length)) * size * 0.53 + 2;
export const textHeight = (text: string, size: number): number => size * (1.05 * text.split('\n').length - 0.1);

/** Places labels in order of importance, each at its cheapest place; one that would cover text is left out unless it must stand. */
export function placeLabels(wishes: readonly LabelWish[], taken: Taken): PlacedLabel[] {
  const placed: PlacedLabel[] = [];
  for (const wish of wishes) {
    const [width, height] = [textWidth(wish.text, wish.size), textHeight(wish.text, wish.size)];
    let best: { at: Point; turn: number; cost: number } | null = null;
    wish.places.forEach(({ at, turn = 0 }, rank) => {
      const cost = taken.cost(at, width, height, turn) + rank * 0.9;
      if (Number.isFinite(cost) && (best === null || cost < best.cost)) best = { at, turn, cost };
    });
    const found = best as { at: Point; turn: number; cost: number } | null;
    if (!found) continue;
    const most = wish.must ? 400 : 14 + wish.text.length * 1.2;
    if (found.cost > most) continue;
    taken.text(found.at, width, height, found.turn);
    const far = wish.from && Math.hypot(found.at.x - wish.from.x, found.at.y - wish.from.y) > 30 + width / 2;
    placed.push({ key: wish.key, text: wish.text, className: wish.className, size: wish.size, at: found.at, turn: found.turn, leader: far ? (wish.from ?? null) : null }); // prettier-ignore
  }
  return placed;
}

/** Places around a point, in the order of a preferred direction: near first, then farther. */
export function around(p: Point, prefer: Point, text: string, size: number, gap = 6): { at: Point }[] {
  const angle = Math.atan2(prefer.y, prefer.x);
  const turns = [0, 0.6, -0.6, 1.2, -1.2, 1.9, -1.9, 2.6, -2.6, Math.PI];
  const [w, h] = [textWidth(text, size) / 2, size / 2];
  return [0, 8, 18].flatMap((extra) =>
    turns.map((turn) => {
      const [c, s] = [Math.cos(angle + turn), Math.sin(angle + turn)];
      const reach = gap + extra;
      return { at: { x: p.x + c * (w + reach), y: p.y + s * (h + reach) } };
    }),
  );
}
