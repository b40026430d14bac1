import type { Draft } from '@/lib/intake/draft';
import * as say from '@/lib/problems/wording';

const touch_m = 1e-3;

interface Piece {
  readonly index: number;
  readonly a: number;
  readonly b: number;
  readonly x1: number;
  readonly y1: number;
  readonly x2: number;
  readonly y2: number;
}

/** Tells members that cross or touch another without a node there: one warning for each later member. */
export function tellCrossings(draft: Draft): void {
  const pieces: Piece[] = draft.members.flatMap((member, index) => {
    const [p, q] = [draft.nodes[member.start], draft.nodes[member.end]];
    if (!p || !q || (draft.lengths[index] ?? 0) < touch_m) return [];
    return [{ index, a: member.start, b: member.end, x1: p.x_m, y1: p.y_m, x2: q.x_m, y2: q.y_m }];
  });
  const sorted = [...pieces].sort((p, q) => Math.min(p.x1, p.x2) - Math.min(q.x1, q.x2));
  const told = new Map<number, number>();
  // the two rods of a braced panel pass each other: a node there would let the slack one hold the other
  const tensionOnly = ({ index }: Piece): boolean => draft.members[index]?.tensionOnly ?? false;
  let open: Piece[] = [];
  for (const piece of sorted) {
    const left = Math.min(piece.x1, piece.x2);
    open = open.filter((other) => Math.max(other.x1, other.x2) >= left - touch_m);
    for (const other of open) {
      if (tensionOnly(piece) && tensionOnly(other)) continue;
      if (!cross(piece, other)) continue;
      const [first, later] = piece.index < other.index ? [piece.index, other.index] : [other.index, piece.index];
      told.set(later, Math.min(told.get(later) ?? Infinity, first));
    }
    open.push(piece);
  }
  for (const [later, first] of told) {
    const row = draft.memberRows[later];
    const [one, two] = [draft.members[later], draft.members[first]];
    if (!row || !one || !two) continue;
    draft.batch.reader.tell(row, 'member', { code: 'crossing', message: say.crossing(one.id, two.id) }, draft.reading);
  }
}

function cross(p: Piece, q: Piece): boolean {
  if (Math.max(p.y1, p.y2) < Math.min(q.y1, q.y2) - touch_m || Math.max(q.y1, q.y2) < Math.min(p.y1, p.y2) - touch_m)
    return false;
  const shared = [p.a, p.b].filter((end) => end === q.a || end === q.b);
  // both ends shared: that is "same ends", told elsewhere
  if (shared.length === 2) return false;
  // an end of one within the other, off the other's ends, is a joint that was forgotten
  const ends: readonly (readonly [number, number, number, Piece])[] = [
    [p.a, p.x1, p.y1, q],
    [p.b, p.x2, p.y2, q],
    [q.a, q.x1, q.y1, p],
    [q.b, q.x2, q.y2, p],
  ];
  for (const [node, x, y, on] of ends) if (!shared.includes(node) && within(x, y, on)) return true;
  if (shared.length > 0) return false;
  const d1 = side(q, p.x1, p.y1);
  const d2 = side(q, p.x2, p.y2);
  const d3 = side(p, q.x1, q.y1);
  const d4 = side(p, q.x2, q.y2);
  return d1 * d2 < 0 && d3 * d4 < 0 && [d1, d2, d3, d4].every((d) => Math.abs(d) > touch_m);
}

/** Distance of a point from a piece's line, with its side, m. */
function side(on: Piece, x: number, y: number): number {
  const L = Math.hypot(on.x2 - on.x1, on.y2 - on.y1);
  return ((on.x2 - on.x1) * (y - on.y1) - (on.y2 - on.y1) * (x - on.x1)) / L;
}

/** True where a point stands on a piece, away from its ends. */
function within(x: number, y: number, on: Piece): boolean {
  if (Math.abs(side(on, x, y)) > touch_m) return false;
  const L = Math.hypot(on.x2 - on.x1, on.y2 - on.y1);
  const along = ((x - on.x1) * (on.x2 - on.x1) + (y - on.y1) * (on.y2 - on.y1)) / L;
  return along > touch_m && along < L - touch_m;
}
