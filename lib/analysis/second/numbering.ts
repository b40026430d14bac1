import { restraintOf, type Setup } from './second-setup';

/** By node and direction, 3 a node: the number of its unknown, or −1 where it is held or nothing turns it. */
export interface Numbering {
  readonly number: Int32Array;
  readonly count: number;
  /** By row of K: the unknowns that members join it with; row r's are joined[starts[r]] … joined[starts[r + 1] − 1]. */
  readonly joined: Int32Array;
  readonly starts: Int32Array;
}

/** Unknowns of a frame without its slack members. A node whose member ends are all pinned has no rotation. */
export function numberingOf({ frame, members, supportAt }: Setup, slack: ReadonlySet<number>): Numbering {
  const turned = new Uint8Array(frame.nodes.length);
  members.forEach(({ start, end, startGive, endGive }, i) => {
    if (slack.has(i)) return;
    if (startGive !== Infinity) turned[start] = 1;
    if (endGive !== Infinity) turned[end] = 1;
  });
  const number = new Int32Array(3 * frame.nodes.length);
  let count = 0;
  for (let u = 0; u < number.length; u++) {
    const node = Math.floor(u / 3);
    const restraint = restraintOf(supportAt[node], u % 3);
    const none = u % 3 === 2 && !turned[node] && !(typeof restraint === 'number' && restraint > 0);
    number[u] = restraint === 'fixed' || none ? -1 : count++;
  }
  return { number, count, ...neighbours(members, slack, number, count) };
}

function neighbours(
  members: Setup['members'],
  slack: ReadonlySet<number>,
  number: Int32Array,
  count: number,
): Pick<Numbering, 'joined' | 'starts'> {
  const rows = Array.from({ length: count }, (_, row) => new Set([row]));
  members.forEach(({ start, end }, i) => {
    if (slack.has(i)) return;
    const at = [start, end].flatMap((node) => [0, 1, 2].map((r) => number[3 * node + r]!)).filter((u) => u >= 0);
    for (const row of at) for (const column of at) rows[row]!.add(column);
  });
  const starts = new Int32Array(count + 1);
  rows.forEach((columns, row) => (starts[row + 1] = starts[row]! + columns.size));
  return { joined: Int32Array.from(rows.flatMap((columns) => [...columns].sort((a, b) => a - b))), starts };
}
