import type { Frame } from '@/lib/model/frame';
import type { ResultState } from '@/lib/results/result';
import type { SecondState } from './second-state';

/**
 * Largest difference between both analyses of one state, relative to the largest value of its sort: movements (rotations
 * × the frame's size) and forces (moments ÷ the frame's size). Rotations that a node does not have are left out.
 *
 * @param forceFloor forces below this are the rounding of bigger ones that cancel, N
 *   (and movements below a thousandth of the largest force over the largest axial stiffness are rounding, too)
 */
export function largestDifference(frame: Frame, first: ResultState, second: SecondState, forceFloor: number): number {
  const { size, stiffest } = measuresOf(frame);
  const forces: Extent = { off: 0, scale: forceFloor };
  extend(forces, first.reactions, second.reactions, 1 / size);
  extend(forces, first.endForces, second.endForces, 1 / size);
  const movements: Extent = { off: 0, scale: (1e-3 * forces.scale) / stiffest };
  extend(movements, first.displacements, second.displacements, size, true);
  const [a, b] = [forces, movements].map(({ off, scale }) => (scale === 0 ? off && Infinity : off / scale));
  return a! >= b! ? a! : b! > a! ? b! : NaN;
}

interface Extent {
  off: number;
  scale: number;
}

/** @param weight of every third value (moments, rotations)   @param lacks whether a node may have no rotation (NaN) */
function extend(extent: Extent, first: ArrayLike<number>, second: ArrayLike<number>, weight: number, lacks = false): void {
  for (let i = 0; i < first.length; i++) {
    const a = first[i]!;
    const b = second[i]!;
    if (lacks && i % 3 === 2 && Number.isNaN(a)) continue;
    const w = i % 3 === 2 ? weight : 1;
    extent.scale = Math.max(extent.scale, Math.abs(a) * w, Math.abs(b) * w);
    extent.off = Math.max(extent.off, Math.abs(a - b) * w);
  }
}

const known = new WeakMap<Frame, { size: number; stiffest: number }>();

/** Diagonal of the box around the nodes, m, and the largest EA/L, N/m. */
function measuresOf(frame: Frame): { size: number; stiffest: number } {
  const before = known.get(frame);
  if (before) return before;
  const span = (along: readonly number[]): number => Math.max(...along) - Math.min(...along);
  const size = Math.hypot(span(frame.nodes.map((n) => n.x_m)), span(frame.nodes.map((n) => n.y_m))) || 1;
  const stiffest = frame.members.reduce((most, m) => {
    const [a, b] = [frame.nodes[m.start]!, frame.nodes[m.end]!];
    const EA = frame.materials[m.material]!.E_Pa * frame.sections[m.section]!.properties.A_m2;
    return Math.max(most, EA / Math.hypot(b.x_m - a.x_m, b.y_m - a.y_m));
  }, 0);
  const measures = { size, stiffest };
  known.set(frame, measures);
  return measures;
}
