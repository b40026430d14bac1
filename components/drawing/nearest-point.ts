import type { DrawingData } from '@/lib/drawing/drawing-data';
import type { ReadPoint } from '@/lib/drawing/read-step';
import type { Point } from '@/lib/drawing/paper';

/** The member nearest to a point on paper, and how far along it, within 60 px; read from the lines as they are drawn. */
export function nearestPoint(svg: SVGSVGElement, data: DrawingData, at: Point): ReadPoint | null {
  let best: ReadPoint | null = null;
  let nearest = 60;
  svg.querySelectorAll<SVGPathElement>('path[data-member]').forEach((drawn, index) => {
    const numbers =
      drawn
        .getAttribute('d')
        ?.match(/-?[\d.]+/g)
        ?.map(Number) ?? [];
    const [x1, y1, x2, y2] = numbers;
    const member = data.members[index];
    if (x1 === undefined || y1 === undefined || x2 === undefined || y2 === undefined || !member) return;
    const [dx, dy] = [x2 - x1, y2 - y1];
    const share = Math.min(1, Math.max(0, ((at.x - x1) * dx + (at.y - y1) * dy) / (dx * dx + dy * dy || 1)));
    const distance = Math.hypot(x1 + dx * share - at.x, y1 + dy * share - at.y);
    if (distance >= nearest) return;
    const [p, q] = [data.nodes[member.start]!, data.nodes[member.end]!];
    nearest = distance;
    best = { member: index, x: share * Math.hypot(q.x - p.x, q.y - p.y) };
  });
  return best;
}
