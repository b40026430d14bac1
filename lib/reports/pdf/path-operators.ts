import { num } from './canvas';

/**
 * A path in the letters of SVG (M, L, H, V, A with equal radii, z; a and v, h relative) as PDF path operators.
 *
 * @throws {RangeError} naming a letter that it doesn't know
 */
export function pathOperators(d: string): string {
  const out: string[] = [];
  let [x, y, x0, y0] = [0, 0, 0, 0];
  for (const [, letter = '', rest = ''] of d.matchAll(/([A-Za-z])([^A-Za-z]*)/g)) {
    const n = (rest.match(/-?(?:\d+\.?\d*|\.\d+)(?:e-?\d+)?/g) ?? []).map(Number);
    const size = { M: 2, L: 2, H: 1, V: 1, h: 1, v: 1, A: 7, a: 7, z: 0, Z: 0 }[letter];
    if (size === undefined) throw new RangeError(`Expected a path of M, L, H, V, A and z, got ${letter}`);
    if (size === 0) {
      out.push('h');
      [x, y] = [x0, y0];
    }
    for (let i = 0; size > 0 && i + size <= n.length; i += size) {
      const [p, q] = [n[i]!, n[i + 1]!];
      if (size === 7) {
        const [ex, ey] = letter === 'a' ? [x + n[i + 5]!, y + n[i + 6]!] : [n[i + 5]!, n[i + 6]!];
        out.push(arc(x, y, p, n[i + 3]! === 1, n[i + 4]! === 1, ex, ey));
        [x, y] = [ex, ey];
        continue;
      }
      if (size === 2) [x, y] = [p, q];
      else if (letter === 'H') x = p;
      else if (letter === 'h') x += p;
      else if (letter === 'V') y = p;
      else y += p;
      const moves = letter === 'M' && i === 0;
      if (moves) [x0, y0] = [x, y];
      out.push(`${num(x)} ${num(y)} ${moves ? 'm' : 'l'}`);
    }
  }
  return out.join(' ');
}

/** A circle's arc from one point to another as curves of a quarter at most. */
function arc(x1: number, y1: number, radius: number, large: boolean, sweep: boolean, x2: number, y2: number): string {
  const half = Math.hypot(x2 - x1, y2 - y1) / 2;
  if (half === 0) return '';
  const r = Math.max(radius, half);
  const off = Math.sqrt(r * r - half * half) * (large === sweep ? -1 : 1);
  const [cx, cy] = [(x1 + x2) / 2 - (off * (y2 - y1)) / (2 * half), (y1 + y2) / 2 + (off * (x2 - x1)) / (2 * half)];
  const from = Math.atan2(y1 - cy, x1 - cx);
  let turn = Math.atan2(y2 - cy, x2 - cx) - from;
  if (sweep && turn < 0) turn += 2 * Math.PI;
  if (!sweep && turn > 0) turn -= 2 * Math.PI;
  const pieces = Math.max(1, Math.ceil(Math.abs(turn) / (Math.PI / 2) - 1e-9));
  const step = turn / pieces;
  const k = (4 / 3) * Math.tan(step / 4) * r;
  const out: string[] = [];
  for (let i = 0; i < pieces; i++) {
    const [a, b] = [from + i * step, from + (i + 1) * step];
    const [ax, ay, bx, by] = [cx + r * Math.cos(a), cy + r * Math.sin(a), cx + r * Math.cos(b), cy + r * Math.sin(b)];
    const points = [ax - k * Math.sin(a), ay + k * Math.cos(a), bx + k * Math.sin(b), by - k * Math.cos(b), bx, by];
    out.push(`${points.map(num).join(' ')} c`);
  }
  return out.join(' ');
}
