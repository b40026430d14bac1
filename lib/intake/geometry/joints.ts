import type { Draft } from '@/lib/intake/draft';

/**
 * Nodes without a rotation of their own (sheets §4): every member end there pinned or axial only, and rz neither held nor
 * sprung.
 */
export function nodesWithoutRotation(draft: Draft): Set<number> {
  const turning = new Set<number>();
  const met = new Set<number>();
  for (const member of draft.members) {
    met.add(member.start).add(member.end);
    if (member.startJoint !== 'pin') turning.add(member.start);
    if (member.endJoint !== 'pin') turning.add(member.end);
  }
  for (const support of draft.supports) if (support.rz !== 'free') turning.add(support.node);
  return new Set([...met].filter((node) => !turning.has(node)));
}
