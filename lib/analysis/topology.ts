import type { Frame } from '@/lib/model/frame';
import { springOf } from './member-data';
import { memberPlaces, type MemberPlaces } from './member-places';
import { reverseCuthillMcKee } from './ordering';

/**
 * What the factorisation needs to know about a frame apart from its numbers: which nodes have unknowns, their order,
 * and the profile of K. Frames of one shape share it.
 *
 * K is kept as the upper triangle in 3 × 3 node blocks, column by column, each column from its first block row
 * down to the diagonal: block (i, j) starts at 9 × (columnStart[j] + i − firstRow[j]).
 */
export interface Topology {
  readonly key: string;
  /** Nodes with unknowns, and their number of blocks. */
  readonly size: number;
  /** nodeAt[position] = node; positionOf[node] = position, −1 where all is held. */
  readonly nodeAt: Int32Array;
  readonly positionOf: Int32Array;
  readonly firstRow: Int32Array;
  readonly columnStart: Int32Array;
  readonly blocks: number;
  /** 1 = unknown, 0 = held or (rotation) not there: 3 a node. */
  readonly free: Uint8Array;
  /** 1 = the node turns with no member and no support: it has no rotation of its own. */
  readonly noRotation: Uint8Array;
  readonly places: MemberPlaces;
}

/** Which displacements of each node are unknown, and which nodes have no rotation of their own (sheets §4). */
export function unknowns(frame: Frame): { free: Uint8Array; noRotation: Uint8Array } {
  const free = new Uint8Array(3 * frame.nodes.length);
  const noRotation = new Uint8Array(frame.nodes.length).fill(1);
  for (let i = 0; i < frame.nodes.length; i++) free[3 * i] = free[3 * i + 1] = 1;
  for (const member of frame.members) {
    if (member.axialOnly) continue;
    if (springOf(member.startJoint) > 0) noRotation[member.start] = 0;
    if (springOf(member.endJoint) > 0) noRotation[member.end] = 0;
  }
  for (const support of frame.supports) {
    if (support.rz !== 'free' && support.rz !== 0) noRotation[support.node] = 0;
  }
  for (let i = 0; i < frame.nodes.length; i++) free[3 * i + 2] = noRotation[i] ? 0 : 1;
  for (const support of frame.supports) {
    if (support.ux === 'fixed') free[3 * support.node] = 0;
    if (support.uy === 'fixed') free[3 * support.node + 1] = 0;
    if (support.rz === 'fixed') free[3 * support.node + 2] = 0;
  }
  return { free, noRotation };
}

/** Everything the ordering depends on, in one string. */
export function topologyKey(frame: Frame, free: Uint8Array, noRotation: Uint8Array): string {
  let key = `${frame.nodes.length};`;
  for (const member of frame.members) key += `${member.start},${member.end};`;
  for (let i = 0; i < free.length; i++) key += free[i];
  return key + noRotation.join('');
}

export function buildTopology(frame: Frame): Topology {
  const { free, noRotation } = unknowns(frame);
  const key = topologyKey(frame, free, noRotation);
  const active: number[] = [];
  const indexOf = new Int32Array(frame.nodes.length).fill(-1);
  for (let i = 0; i < frame.nodes.length; i++)
    if (free[3 * i] || free[3 * i + 1] || free[3 * i + 2]) indexOf[i] = active.push(i) - 1;
  const joined = active.map(() => new Set<number>());
  for (const member of frame.members) {
    const a = indexOf[member.start]!;
    const b = indexOf[member.end]!;
    if (a < 0 || b < 0 || a === b) continue;
    joined[a]!.add(b);
    joined[b]!.add(a);
  }
  const order = reverseCuthillMcKee(joined.map((set) => [...set]));
  const size = active.length;
  const nodeAt = new Int32Array(size);
  const positionOf = new Int32Array(frame.nodes.length).fill(-1);
  order.forEach((vertex, position) => {
    nodeAt[position] = active[vertex]!;
    positionOf[active[vertex]!] = position;
  });
  const firstRow = new Int32Array(size);
  const columnStart = new Int32Array(size);
  let blocks = 0;
  for (let j = 0; j < size; j++) {
    let first = j;
    for (const vertex of joined[order[j]!]!) first = Math.min(first, positionOf[active[vertex]!]!);
    firstRow[j] = first;
    columnStart[j] = blocks;
    blocks += j - first + 1;
  }
  const shape = { key, size, nodeAt, positionOf, firstRow, columnStart, blocks, free, noRotation };
  return { ...shape, places: memberPlaces(frame, shape) };
}
