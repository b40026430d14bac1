import { restraintOf, type Setup } from './second-setup';

/** By node and direction, 3 a node: the number of its unknown, or −1 where it is held or nothing turns it. */
export interface Numbering {
  readonly number: Int32Array;
  readonly count: number;
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
  return { number, count };
}
