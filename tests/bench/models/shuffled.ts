import type { Frame } from '@/lib/model/frame';

/** A seeded generator (Park and Miller): the same models every time. */
function seeded(seed: number): () => number {
  let state = seed;
  return () => (state = (state * 16807) % 2147483647) / 2147483647;
}

/** The same frame with its nodes numbered anyhow, the same way for every frame with as many: nothing may lean on their order. */
export function shuffled(frame: Frame): Frame {
  const random = seeded(4711);
  const from = frame.nodes.map((_, i) => i);
  for (let i = from.length - 1; i > 0; i -= 1) {
    const j = Math.floor(random() * (i + 1));
    [from[i], from[j]] = [from[j] ?? 0, from[i] ?? 0];
  }
  const to: number[] = [];
  from.forEach((old, index) => (to[old] = index));
  const at = (node: number): number => to[node] ?? 0;
  return {
    ...frame,
    nodes: from.flatMap((old) => frame.nodes[old] ?? []),
    members: frame.members.map((member) => ({ ...member, start: at(member.start), end: at(member.end) })),
    supports: frame.supports.map((support) => ({ ...support, node: at(support.node) })),
    nodeLoads: frame.nodeLoads.map((load) => ({ ...load, node: at(load.node) })),
    settlements: frame.settlements.map((one) => ({ ...one, node: at(one.node) })),
  };
}
