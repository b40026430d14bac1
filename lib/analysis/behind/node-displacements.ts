import type { Frame } from '@/lib/model/frame';
import type { ResultState } from '@/lib/results/result';
import { nodeAngles } from '../assemble';

/** A state's displacements in the axes of the nodes (a support's own, else global), 3 a node; 0 for a rotation that is not there. */
export function nodeDisplacements(frame: Frame, state: ResultState): Float64Array {
  const angles = nodeAngles(frame);
  const d = state.displacements.slice();
  for (let i = 0; i < frame.nodes.length; i++) {
    const angle = angles[i]!;
    const [x, y] = [d[3 * i]!, d[3 * i + 1]!];
    if (angle !== 0) {
      d[3 * i] = x * Math.cos(angle) + y * Math.sin(angle);
      d[3 * i + 1] = y * Math.cos(angle) - x * Math.sin(angle);
    }
    if (Number.isNaN(d[3 * i + 2]!)) d[3 * i + 2] = 0;
  }
  return d;
}
