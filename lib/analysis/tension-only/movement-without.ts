import type { Frame } from '@/lib/model/frame';
import { assemble } from '../assemble';
import { factor } from '../factor';
import { pivotTolerance, type SolvedCases } from '../first-order-cases';
import { toLocal } from '../load-vectors';
import { describeMovement, nullVector } from '../mechanism';
import type { Topology } from '../topology';

/** A movement that costs nothing once some members are left out. */
export interface MovementWithout {
  /** "node B can freely slide horizontally. Hold B in x …" */
  readonly words: string;
  /** Whichever way the frame goes, some tension-only member (a slack one too) is stretched. */
  readonly caught: boolean;
  /** How far each tension-only member (slack ones too), in order, is stretched by it, up to a common factor of any sign. */
  readonly stretches: readonly number[];
}

/** Share of the movement below which a tie is not stretched by it. */
const unstretched = 1e-6;

/** How a frame moves freely without its slack members; null where it does not. @param slack members left out */
export function movementWithout(
  frame: Frame,
  t: Topology,
  { data, angles, diagonal }: SolvedCases,
  slack: readonly number[],
): MovementWithout | null {
  const K = new Float64Array(9 * t.blocks);
  const left = data.map((m, i) => (slack.includes(i) ? { ...m, EA: 0 } : m));
  const inner = new Float64Array(6 * t.size);
  // judged against K with all members: a direction that only they held has nothing of its own left but, in a tall frame, what
  // rounding gathers
  let unheld = -1;
  for (const tolerance of [pivotTolerance, 1e3 * pivotTolerance]) {
    K.fill(0);
    assemble(K, t, frame, left, angles);
    unheld = factor(K, t, diagonal, inner, new Float64Array(3 * t.size), tolerance);
    if (unheld >= 0) break;
  }
  if (unheld < 0) return null;
  const z = nullVector(K, t, inner, unheld);
  const { node, how, remedy } = describeMovement(frame, t, angles, z);
  const moved = new Float64Array(3 * frame.nodes.length);
  let most = 0;
  for (let p = 0; p < t.size; p++)
    for (let r = 0; r < 2; r++) {
      const at = 3 * t.nodeAt[p]! + r;
      if (t.free[at]) moved[at] = z[3 * p + r]!;
      most = Math.max(most, Math.abs(moved[at]!));
    }
  const u = new Float64Array(6);
  const stretches = frame.members.flatMap((member, i) => {
    if (!member.tensionOnly) return [];
    const m = data[i]!;
    toLocal(m, angles, moved, 3 * m.start, 3 * m.end, u);
    return [u[3]! - u[0]!];
  });
  const caught = Math.max(...stretches) > unstretched * most && Math.min(...stretches) < -unstretched * most;
  return { words: `node ${node} can freely ${how}. ${remedy}.`, caught, stretches };
}
