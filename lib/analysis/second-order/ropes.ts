import type { Frame } from '@/lib/model/frame';
import { memberData, type MemberData } from '../member-data';

/** √(N/EI) × length up to which a pulled member is followed: its line takes twice as many pieces. A rod d 20 mm of 100 m at 500 MPa has 1,000. */
const mostOfOne = 2000;
/** … and of all members of a frame's states together, those below `few` not counted. */
const mostOfAll = 200_000;
const few = 50;

/** A member that bends so little that its second-order line would take more pieces than are of use. */
export interface Rope {
  readonly member: number;
  /** √(N/EI) × length. */
  readonly slenderness: number;
  /** With this I about its axis of bending it would be followed. */
  readonly leastI_m4: number;
}

/** What the pulled members of one frame's states have come to so far. */
export interface RopeCount {
  sum: number;
}

/**
 * The first member that is a rope; null if none is. Counts what the state adds to `count`.
 * @param endForces N, V, M at start and end by member, 6 each, N   @param scale times which they act on the members
 */
export function ropeAmong(
  frame: Frame,
  data: readonly MemberData[],
  endForces: Float64Array,
  scale: number,
  slack: readonly number[],
  count: RopeCount,
): Rope | null {
  for (let i = 0; i < data.length; i++) {
    const m = data[i]!;
    const N = scale * Math.max(endForces[6 * i]!, endForces[6 * i + 3]!);
    if (!(N > 0) || slack.includes(i)) continue;
    const slenderness = Math.sqrt(N / m.EI) * m.length;
    if (slenderness > few) count.sum += slenderness;
    const most = count.sum > mostOfAll ? few : mostOfOne;
    if (!(slenderness > most)) continue;
    const I = memberData(frame)[i]!.EI / frame.materials[frame.members[i]!.material]!.E_Pa;
    return { member: i, slenderness, leastI_m4: I * (slenderness / most) ** 2 };
  }
  return null;
}
