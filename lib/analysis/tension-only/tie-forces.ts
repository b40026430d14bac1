import type { Frame, MemberLoad } from '@/lib/model/frame';
import type { ResultState } from '@/lib/results/result';
import { memberDataFor } from '../member-data';

/** Forces below this share of the frame's largest are none, and so are those below `rounding` of stiffness × movement. */
const nothing = 1e-8;
const rounding = 1e-11;

/**
 * What each tie's ends ask of it: EA (Δ/L − ε₀), Δ how far its nodes have moved apart along it, ε₀ its free strain. Of a taut
 * tie that is its mean axial force, of a slack one the force that it would take up.
 *
 * @returns forces in the order of `ties`, N, and the size up to which a force is none
 */
export function tieForces(
  frame: Frame,
  state: ResultState,
  ties: readonly number[],
): { readonly forces: Float64Array; readonly nothing: number } {
  const data = memberDataFor(frame, state.method);
  const d = state.displacements;
  let moved = 0;
  for (let i = 0; i < d.length; i++) if (i % 3 !== 2) moved = Math.max(moved, Math.abs(d[i]!));
  let largest = 0;
  for (let i = 0; i < data.length; i++)
    largest = Math.max(largest, Math.abs(state.endForces[6 * i]!), Math.abs(state.endForces[6 * i + 3]!));
  let stiffest = 0;
  const forces = Float64Array.from(ties, (tie) => {
    const { start, end, cos, sin, EA, length, expansion } = data[tie]!;
    stiffest = Math.max(stiffest, EA / length);
    const apart = (d[3 * end]! - d[3 * start]!) * cos + (d[3 * end + 1]! - d[3 * start + 1]!) * sin;
    const warm = warmth(frame, tie, state.factors);
    return EA * (apart / length - (warm === 0 ? 0 : expansion * warm));
  });
  return { forces, nothing: Math.max(nothing * largest, rounding * stiffest * moved) };
}

/** Temperature rise of a member in a combination, K. */
function warmth(frame: Frame, member: number, factors: Float64Array): number {
  const isWarm = (load: MemberLoad) => load.kind === 'temperature' && load.member === member;
  return frame.memberLoads
    .filter(isWarm)
    .reduce((sum, load) => (load.kind === 'temperature' ? sum + factors[load.case]! * load.dT_K : sum), 0);
}
