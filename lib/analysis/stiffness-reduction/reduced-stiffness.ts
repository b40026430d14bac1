import { inPlane } from '@/lib/sections/in-plane';
import type { Frame } from '@/lib/model/frame';
import { generalReduction, tauB } from './tau-b';

/** P_ns = F_y A_g by member, N: the section taken as nonslender (AISC 360-22 C2.3(b)); ∞ for tension-only members. */
export function squashLoads(frame: Frame): Float64Array {
  return Float64Array.from(frame.members, (member) => {
    if (member.tensionOnly) return Infinity;
    const { A_m2 } = inPlane(frame.sections[member.section]!, member.turned);
    return (frame.materials[member.material]!.fy_Pa ?? NaN) * A_m2;
  });
}

/** Before the forces are known: 0.8 on EA and EI of every member. 2 a member. */
export function firstReduction(frame: Frame): Float64Array {
  return new Float64Array(2 * frame.members.length).fill(generalReduction);
}

/**
 * Factors on EA and EI under the forces found: 0.8 and 0.8 τ_b. Joints' springs and shear stiffness take EA's.
 *
 * @param endForces N, V, M at start and end by member, 6 each   @param alpha times which they are α P_r
 * @param out 2 a member, overwritten   @returns the largest change of a factor, relative to 0.8
 */
export function reduce(endForces: Float64Array, squash: Float64Array, alpha: number, out: Float64Array): number {
  let change = 0;
  for (let i = 0; i < squash.length; i++) {
    const EI = generalReduction * tauB(shareOf(endForces, i, alpha, squash[i]!));
    change = Math.max(change, Math.abs(EI - out[2 * i + 1]!) / generalReduction);
    out[2 * i + 1] = EI;
  }
  return change;
}

/** α P_r/P_ns of a member, by the larger compression of its ends; 0 where neither is compressed. */
export function shareOf(endForces: Float64Array, member: number, alpha: number, squash: number): number {
  return (alpha * Math.max(0, -endForces[6 * member]!, -endForces[6 * member + 3]!)) / squash;
}
