import type { Frame } from '@/lib/model/frame';
import { bounds } from './bounds';
import { typedTotals } from './typed-totals';

/**
 * Global equilibrium of one case: loads as typed and reactions, in x, y and about the middle of the frame,
 * relative to the sum of their sizes; a case without load or reaction counts 0. Certificate item 1.
 *
 * @param floor sizes below this are the rounding of bigger forces that cancel (a settlement of a determinate frame), N
 */
export function globalEquilibrium(frame: Frame, loadCase: number, reactions: Float64Array, floor: number): number {
  const { left, right, low, high, size } = bounds(frame);
  const x0 = (left + right) / 2;
  const y0 = (low + high) / 2;
  let { Fx, Fy, Mz, sizeF, sizeM } = typedTotals(frame, loadCase, x0, y0);
  frame.supports.forEach((support, i) => {
    const node = frame.nodes[support.node]!;
    const rx = reactions[3 * i]!;
    const ry = reactions[3 * i + 1]!;
    const rm = reactions[3 * i + 2]!;
    const lever = (node.x_m - x0) * ry - (node.y_m - y0) * rx;
    Fx += rx;
    Fy += ry;
    Mz += rm + lever;
    sizeF += Math.hypot(rx, ry);
    sizeM += Math.abs((node.x_m - x0) * ry) + Math.abs((node.y_m - y0) * rx) + Math.abs(rm);
  });
  // moments without any lever of their own are judged against the forces over the frame's size, and the other way round
  const scale = Math.max(sizeF, sizeM / size, floor);
  if (!(scale > 0)) return scale === 0 ? 0 : NaN;
  return Math.max(Math.abs(Fx), Math.abs(Fy), Math.abs(Mz) / size) / scale;
}
