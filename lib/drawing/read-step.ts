import type { DrawingData } from './drawing-data';

/** A point of a member that is being read: x in m from its start. */
export interface ReadPoint {
  readonly member: number;
  readonly x: number;
}

/** Arrow left and right walk along the member in twentieths, up and down go to the next one. Null: the key does nothing here. */
export function readStep(key: string, data: DrawingData, point: ReadPoint | null): ReadPoint | null {
  const count = data.members.length;
  const lengthOf = (index: number) => {
    const member = data.members[index]!;
    const [p, q] = [data.nodes[member.start]!, data.nodes[member.end]!];
    return Math.hypot(q.x - p.x, q.y - p.y);
  };
  if (count === 0 || !['ArrowLeft', 'ArrowRight', 'ArrowUp', 'ArrowDown', 'Home', 'End'].includes(key)) return null;
  if (!point) return { member: 0, x: 0 };
  const length = lengthOf(point.member);
  if (key === 'Home' || key === 'End') return { ...point, x: key === 'Home' ? 0 : length };
  if (key === 'ArrowLeft' || key === 'ArrowRight') {
    const x = point.x + ((key === 'ArrowRight' ? 1 : -1) * length) / 20;
    return { ...point, x: Math.min(Math.max(x, 0), length) };
  }
  const member = (point.member + (key === 'ArrowDown' ? 1 : -1) + count) % count;
  return { member, x: (point.x / length) * lengthOf(member) };
}
