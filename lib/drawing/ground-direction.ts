import type { DrawingData, DrawingSupport } from './drawing-data';
import type { Point } from './paper';

/** World direction turned anticlockwise, on paper. */
export const turned = (d: Point, angle: number): Point => ({
  x: d.x * Math.cos(angle) - d.y * Math.sin(angle),
  y: -(d.x * Math.sin(angle) + d.y * Math.cos(angle)),
});

/**
 * From the frame to the ground: square to the one held direction of a roller, else away from the members at the node,
 * along whichever axis is nearer; down where nothing tells.
 */
export function awayFrom(data: DrawingData, support: DrawingSupport): Point {
  const here = data.nodes[support.node];
  let [x, y] = [0, 0];
  for (const member of data.members) {
    if (member.start !== support.node && member.end !== support.node) continue;
    const other = data.nodes[member.start === support.node ? member.end : member.start];
    if (!other || !here) continue;
    const length = Math.hypot(other.x - here.x, other.y - here.y) || 1;
    x += (other.x - here.x) / length;
    y += (other.y - here.y) / length;
  }
  const frame: Point = { x, y: -y };
  const facing = (d: Point): Point => (d.x * frame.x + d.y * frame.y > 0.01 ? { x: -d.x, y: -d.y } : d);
  const axisX = turned({ x: 1, y: 0 }, support.angle);
  const axisY = turned({ x: 0, y: -1 }, support.angle);
  if (support.ux === 'fixed' && support.uy === 'free') return facing(axisX);
  if (support.uy === 'fixed' && support.ux === 'free') return facing(axisY);
  if (Math.abs(support.angle) > 1e-6) return facing(axisY);
  const upright = Math.abs(frame.y) >= Math.abs(frame.x) * 0.9;
  if (upright || support.rz !== 'fixed') {
    const beamLike = Math.abs(frame.y) < 0.05;
    if (!upright && !beamLike) return frame.x > 0 ? { x: -1, y: 0 } : { x: 1, y: 0 };
    return frame.y > 0.05 ? { x: 0, y: -1 } : { x: 0, y: 1 };
  }
  return frame.x > 0 ? { x: -1, y: 0 } : { x: 1, y: 0 };
}
