import type { Frame } from '@/lib/model/frame';
import { numbers } from '../numbers';

/** Notional load as a share of the gravity load (AISC 360-22 C2.2b, eq. C2-1: N_i = 0.002 α Y_i). */
const share = 0.002;

/**
 * Notional loads towards +X by node: 0.002 α times the gravity load that the combination introduces there, so that they
 * are spread over each level as its gravity load is. Where the combination lifts a node it gives none; a node held in x and
 * y passes its own load straight into the ground and gives none either. Fx, Fy by node, 2 each, N.
 *
 * @param gravity by case and node, downwards (gravity-by-node.ts)   @param factors of the combination, by case
 * @param alpha 1.0 LRFD, 1.6 ASD
 */
export function notionalLoads(
  frame: Frame,
  gravity: readonly Float64Array[],
  factors: Float64Array,
  alpha: number,
): Float64Array {
  const forces = numbers(2 * frame.nodes.length);
  for (let node = 0; node < frame.nodes.length; node++) {
    let Y = 0;
    for (let c = 0; c < gravity.length; c++) Y += factors[c]! * gravity[c]![node]!;
    if (Y > 0) forces[2 * node] = share * alpha * Y;
  }
  for (const support of frame.supports) if (support.ux === 'fixed' && support.uy === 'fixed') forces[2 * support.node] = 0;
  return forces;
}
