import type { Frame } from '@/lib/model/frame';
import { springOf } from './member-data';
import { memberPlaces, type MemberPlaces } from './member-places';
import { minimumDegree } from './ordering';

/**
 * What the factorisation needs to know about a frame apart from its numbers: which nodes have unknowns, their order,
 * and the pattern of K and U. Frames of one shape share it.
 *
 * K is kept as the upper triangle in 3 × 3 node blocks, row by row, the block on the diagonal first: those of row i are
 * rowStart[i] … rowStart[i + 1] − 1, block b begins at 9 b, its column is columns[b].
 */
export interface Topology {
  readonly key: string;
  /** Nodes with unknowns, and their number of blocks. */
  readonly size: number;
  /** nodeAt[position] = node; positionOf[node] = position, −1 where all is held. */
  readonly nodeAt: Int32Array;
  readonly positionOf: Int32Array;
  readonly rowStart: Int32Array;
  readonly columns: Int32Array;
  readonly blocks: number;
  /** Where each update of the factorisation goes, in its order: by row i, by its blocks b, by its blocks a ≤ b: block (column a, column b). */
  readonly targets: Int32Array;
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
  const { order, rows } = minimumDegree(joined);
  const size = active.length;
  const nodeAt = new Int32Array(size);
  const positionOf = new Int32Array(frame.nodes.length).fill(-1);
  order.forEach((vertex, position) => {
    nodeAt[position] = active[vertex]!;
    positionOf[active[vertex]!] = position;
  });
  const pattern = patternOf(rows);
  const shape = { key, size, nodeAt, positionOf, ...pattern, free, noRotation };
  return { ...shape, places: memberPlaces(frame, shape) };
}

/** Blocks of K and U, and where updates go. @param rows columns of each row beyond its own, ascending, fill included */
export function patternOf(rows: readonly Int32Array[]): Pick<Topology, 'rowStart' | 'columns' | 'blocks' | 'targets'> {
  const rowStart = new Int32Array(rows.length + 1);
  rows.forEach((row, i) => (rowStart[i + 1] = rowStart[i]! + row.length + 1));
  const blocks = rowStart[rows.length]!;
  const columns = new Int32Array(blocks);
  let updates = 0;
  rows.forEach((row, i) => {
    columns[rowStart[i]!] = i;
    columns.set(row, rowStart[i]! + 1);
    updates += (row.length * (row.length + 1)) / 2;
  });
  const targets = new Int32Array(updates);
  let k = 0;
  for (const row of rows)
    for (let b = 0; b < row.length; b++)
      for (let a = 0; a <= b; a++) targets[k++] = 9 * find({ rowStart, columns }, row[a]!, row[b]!);
  return { rowStart, columns, blocks, targets };
}

/** Number of the block at node positions i ≤ j, which must be there. */
function find({ rowStart, columns }: Pick<Topology, 'rowStart' | 'columns'>, i: number, j: number): number {
  let low = rowStart[i]!;
  let high = rowStart[i + 1]! - 1;
  while (low < high) {
    const middle = (low + high) >> 1;
    if (columns[middle]! < j) low = middle + 1;
    else high = middle;
  }
  return low;
}

/** Index in K of the block at node positions i ≤ j. */
export function blockAt(t: Pick<Topology, 'rowStart' | 'columns'>, i: number, j: number): number {
  return 9 * (i === j ? t.rowStart[i]! : find(t, i, j));
}
