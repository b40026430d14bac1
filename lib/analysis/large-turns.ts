import type { Frame } from '@/lib/model/frame';
import type { ResultState } from '@/lib/results/result';
import { memberData, type MemberData } from './member-data';

/** Turn of a member's chord above which results are said to lie at the edge of small displacements, rad: a sway of h/20. */
const large = 0.05;

/** By how much the line between a member's ends turns, rad. @param d displacements, 3 a node, global */
export function turnOf({ start, end, cos, sin, length }: MemberData, d: Float64Array): number {
  const across = (d[3 * end + 1]! - d[3 * start + 1]!) * cos - (d[3 * end]! - d[3 * start]!) * sin;
  return Math.abs(across) / length;
}

/**
 * Says which member turns the furthest, and where, if by more than a sway of h/20: the analysis takes sin and tan of a turn for
 * the turn itself. Second order refuses turns beyond twice that (second-order/solve-second-order.ts).
 */
export function largeTurns(frame: Frame, states: readonly ResultState[]): readonly string[] {
  const data = memberData(frame);
  let most = large;
  let where: string | null = null;
  for (const { kind, name, displacements: d } of states) {
    if (kind === 'case') continue;
    for (let i = 0; i < data.length; i++) {
      const turn = turnOf(data[i]!, d);
      if (!(turn > most)) continue;
      most = turn;
      where = `member ${frame.members[i]!.id} in ${name}`;
    }
  }
  if (where === null) return [];
  return [
    `small displacements: ${where} turns by ${most.toPrecision(2)} rad, more than a sway of h/20; so far from its drawn shape the frame’s forces are only near`,
  ];
}
