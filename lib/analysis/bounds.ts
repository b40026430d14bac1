import type { Frame } from '@/lib/model/frame';

/** The box around the nodes and its diagonal, m; a diagonal of 0 counts 1. */
export function bounds(frame: Frame): { left: number; right: number; low: number; high: number; size: number } {
  let left = Infinity;
  let right = -Infinity;
  let low = Infinity;
  let high = -Infinity;
  for (const node of frame.nodes) {
    left = Math.min(left, node.x_m);
    right = Math.max(right, node.x_m);
    low = Math.min(low, node.y_m);
    high = Math.max(high, node.y_m);
  }
  return { left, right, low, high, size: Math.hypot(right - left, high - low) || 1 };
}
