import type { Frame } from '@/lib/model/frame';
import type { ResultState } from '@/lib/results/result';
import { bounds } from '../bounds';
import { memberData } from '../member-data';
import type { SecondState } from './second-state';

/**
 * Largest difference between both analyses of one case, relative to the largest value of its sort: movements (rotations
 * × the frame's size) and forces (moments ÷ the frame's size). Rotations that a node does not have are left out.
 *
 * @param forceFloor forces below this are the rounding of bigger ones that cancel, N
 *   (and movements below a thousandth of the largest force over the largest axial stiffness are rounding, too)
 */
export function largestDifference(frame: Frame, first: ResultState, second: SecondState, forceFloor: number): number {
  const { size } = bounds(frame);
  const a = [...first.reactions, ...first.endForces];
  const b = [...second.reactions, ...second.endForces];
  const forced = relative(a, b, forceFloor, (i) => (i % 3 === 2 ? 1 / size : 1));
  const stiffest = memberData(frame).reduce((most, m) => Math.max(most, m.EA / m.length), 0);
  const moved = relative(first.displacements, second.displacements, (1e-3 * forced.scale) / stiffest, (i) =>
    i % 3 === 2 ? size : 1,
  );
  return Math.max(forced.off, moved.off);
}

function relative(
  a: ArrayLike<number>,
  b: ArrayLike<number>,
  floor: number,
  weight: (i: number) => number,
): { off: number; scale: number } {
  let scale = floor;
  let off = 0;
  for (let i = 0; i < a.length; i++) {
    if (Number.isNaN(a[i]!)) continue;
    scale = Math.max(scale, Math.abs(a[i]!) * weight(i), Math.abs(b[i]!) * weight(i));
    off = Math.max(off, Math.abs(a[i]! - b[i]!) * weight(i));
  }
  return { off: scale === 0 ? 0 : off / scale, scale };
}
