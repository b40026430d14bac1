import type { Frame, Limit } from '@/lib/model/frame';
import type { Settings } from '@/lib/model/settings';
import type { ResultState } from '@/lib/results/result';
import { keepGoverning, notCheckedRow, type Findings, type Subject } from './check-row';
import { limitsOf, nodesNamed } from './limits';
import { checkMovement } from './movement';
import { sameId } from './spans';

/**
 * Change of distance between two nodes in every service combination (small displacements: along the line between them;
 * for nodes at one place, how far they part). A limit's ratio divides their distance.
 */
export function checkSpread(frame: Frame, settings: Settings, states: readonly ResultState[], findings: Findings): void {
  const pairs = new Map<string, { a: number; b: number; limits: Limit[] }>();
  for (const limit of limitsOf(frame, 'spread')) {
    const others = otherNodes(limit, frame);
    for (const a of nodesNamed(limit, frame))
      for (const b of others) {
        if (a === b) continue;
        const key = a < b ? `${a} ${b}` : `${b} ${a}`;
        const pair = pairs.get(key);
        if (pair) pair.limits.push(limit);
        else pairs.set(key, { a, b, limits: [limit] });
      }
    if (others.length === 0)
      keepGoverning(findings, [
        notCheckedRow(subjectOf(`${limit.name}–${limit.toNode ?? ''}`), null, `needs to node in ${limit.source}`),
      ]);
  }
  for (const { a, b, limits } of pairs.values()) {
    const from = frame.nodes[a]!;
    const to = frame.nodes[b]!;
    const [dx, dy] = [to.x_m - from.x_m, to.y_m - from.y_m];
    const distance = Math.hypot(dx, dy);
    const apart = (c: number) => {
      const d = states[c]!.displacements;
      const [dux, duy] = [d[3 * b]! - d[3 * a]!, d[3 * b + 1]! - d[3 * a + 1]!];
      return { dux, duy, change: distance > 0 ? (dux * dx + duy * dy) / distance : Math.hypot(dux, duy) };
    };
    const measured = (c: number) => ({ value: Math.abs(apart(c).change), at: null });
    const inputs = (c: number) => ({ ...apart(c), dx, dy });
    checkMovement(subjectOf(`${from.id}–${to.id}`), 'spread', limits, distance, settings, states, measured, inputs, findings);
  }
}

const subjectOf = (subject: string): Subject => ({
  subjectKind: 'spread',
  subject,
  check: 'spread',
  quantity: 'displacement',
  reference: 'Limits',
  member: null,
});

/** The node of that id, else the nodes of that place. */
function otherNodes(limit: Limit, frame: Frame): readonly number[] {
  const word = limit.toNode;
  if (word === null) return [];
  const all = frame.nodes.map((_, i) => i);
  const node = all.filter((i) => sameId(frame.nodes[i]!.id, word));
  return node.length > 0 ? node : all.filter((i) => frame.nodes[i]!.place !== null && sameId(frame.nodes[i]!.place!, word));
}
