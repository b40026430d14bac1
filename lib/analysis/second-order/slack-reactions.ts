import type { MemberData } from '../member-data';
import { stride, type MemberLoading } from './member-loading';

/**
 * What the nodes hold of a slack member's loads, as a simple beam would hand them on: X₁, Y₁, m₁, X₂, Y₂, m₂ in local axes,
 * what the nodes do to it (moments nil). Its weight stays on the frame, its stiffness and its temperature do not.
 */
export function slackReactions(m: MemberData, loading: MemberLoading, out: Float64Array): Float64Array {
  const L = m.length;
  const { stretches } = loading;
  let across = loading.endPy;
  let lever = loading.endPy * L + loading.endM;
  let along = 0;
  let x = 0;
  for (let i = 0; i < loading.count; i++) {
    const o = stride * i;
    const l = stretches[o]!;
    const q0 = stretches[o + 4]!;
    const q1 = stretches[o + 5]!;
    const P = stretches[o + 6]!;
    const q = l * (q0 + (l * q1) / 2);
    across += P + q;
    lever += P * x + stretches[o + 7]! + q * x + l * l * (q0 / 2 + (l * q1) / 3);
    along += l * (stretches[o + 1]! + l * (stretches[o + 2]! / 2 + (l * stretches[o + 3]!) / 3));
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
