import type { MemberData } from '../member-data';
import { stride, type MemberLoading } from './member-loading';

/**
 * What the nodes hold of a slack member's loads, as a simple beam would hand them on: X₁, Y₁, m₁, X₂, Y₂, m₂ in local axes,
 * what the nodes do to it (moments nil). Its weight stays on the frame, its stiffness and its temperature do not.
 */
export function slackReactions(m: MemberData, loading: MemberLoading, out: Float64Array): Float64Array {
  const L = m.length;
  let [across, lever, along] = [loading.endPy, loading.endPy * L + loading.endM, 0];
  let x = 0;
  for (let i = 0; i < loading.count; i++) {
    const o = stride * i;
    const at = (r: number): number => loading.stretches[o + r]!;
    const l = at(0);
    const q = l * (at(4) + (l * at(5)) / 2);
    across += at(6) + q;
    lever += at(6) * x + at(7) + q * x + l * l * (at(4) / 2 + (l * at(5)) / 3);
    along += l * (at(1) + l * (at(2) / 2 + (l * at(3)) / 3));
    x += l;
  }
  out[0] = along / L;
  out[1] = lever / L - across;
  out[2] = 0;
  out[3] = loading.endN - along / L;
  out[4] = -lever / L;
  out[5] = 0;
  return out;
}
