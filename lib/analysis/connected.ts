import type { Frame } from '@/lib/model/frame';
import type { Failure } from '@/lib/results/result';

/** Parts that no support reaches: "not-connected", with the nodes named. Null when every part is held somewhere. */
export function unheldPart(frame: Frame): Failure | null {
  const part = Int32Array.from(frame.nodes, (_, i) => i);
  const root = (i: number): number => {
    while (part[i] !== i) i = part[i] = part[part[i]!]!;
    return i;
  };
  const members = new Uint8Array(frame.nodes.length);
  for (const member of frame.members) {
    members[member.start] = members[member.end] = 1;
    const a = root(member.start);
    const b = root(member.end);
    // the lowest index stands for the part, so that it's named by its first node
    part[Math.max(a, b)] = Math.min(a, b);
  }
  const lone = frame.nodes.findIndex((_, i) => !members[i]);
  if (lone >= 0) {
    const name = frame.nodes[lone]!.id;
    return {
      code: 'not-connected',
      node: name,
      message: `Node ${name} has no member, so it is not part of the frame. Join it with a member, or take it out of Nodes.`,
    };
  }
  const held = new Set<number>();
  for (const support of frame.supports)
    if ([support.ux, support.uy, support.rz].some((r) => r !== 'free' && r !== 0)) held.add(root(support.node));
  if (held.size === 0 && frame.nodes.length > 0)
    return {
      code: 'not-connected',
      node: frame.nodes[0]!.id,
      message: 'Nothing holds the frame: none of its nodes has a support. Give it supports in Supports.',
    };
  for (let i = 0; i < frame.nodes.length; i++) {
    const r = root(i);
    if (held.has(r)) continue;
    const names = frame.nodes.filter((_, k) => root(k) === r).map((node) => node.id);
    return {
      code: 'not-connected',
      node: names[0]!,
      message:
        `The part with ${list('node', names)} is not connected to the rest and has no support. ` +
        `Join it to the frame (nodes at one place with two names are not joined), or give it supports.`,
    };
  }
  return null;
}

/** "node A", "nodes A, B and C", "nodes A, B, C and 7 more". */
export function list(noun: string, names: readonly string[]): string {
  if (names.length === 1) return `${noun} ${names[0]}`;
  const plural = `${noun}s`;
  if (names.length <= 4) return `${plural} ${names.slice(0, -1).join(', ')} and ${names[names.length - 1]}`;
  return `${plural} ${names.slice(0, 3).join(', ')} and ${names.length - 3} more`;
}
