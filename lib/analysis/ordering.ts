/** An order of elimination, and what it leaves to be done. */
export interface Elimination {
  /** order[position] = vertex. */
  readonly order: Int32Array;
  /** Positions later than each that it is joined to when its turn comes, ascending: the pattern of its row of U. */
  readonly rows: readonly Int32Array[];
}

/**
 * Minimum degree ordering of a graph (Tinney and Walker 1967): always the vertex with the fewest neighbours left, whose neighbours
 * are then joined to one another. Ties go to the vertex with the fewest eliminations before it, so that independent parts come in
 * turn and a processor can work at both, then to the lowest number.
 *
 * Depends on the numbering of its input and on nothing else, so a cached order is the order computed anew.
 *
 * @param neighbours neighbours[v] = the vertices joined to v
 */
export function minimumDegree(neighbours: readonly Iterable<number>[]): Elimination {
  const count = neighbours.length;
  const joined = neighbours.map((each) => new Set(each));
  const level = new Int32Array(count);
  const order = new Int32Array(count);
  const positionOf = new Int32Array(count).fill(-1);
  const left = Array.from({ length: count }, (_, v) => v);
  for (let position = 0; position < count; position++) {
    const v = takeNext(left, joined, level);
    order[position] = v;
    positionOf[v] = position;
    const around = joined[v]!;
    for (const w of around) {
      const others = joined[w]!;
      others.delete(v);
      for (const x of around) if (x !== w) others.add(x);
      level[w] = Math.max(level[w]!, level[v]! + 1);
    }
  }
  const rows = Array.from(order, (v) => Int32Array.from(joined[v]!, (w) => positionOf[w]!).sort());
  return { order, rows };
}

/** The next vertex out of those left, removed from them. */
function takeNext(left: number[], joined: readonly ReadonlySet<number>[], level: Int32Array): number {
  let best = 0;
  let degree = Infinity;
  for (let i = 0; i < left.length; i++) {
    const v = left[i]!;
    const size = joined[v]!.size;
    if (size > degree) continue;
    const b = left[best]!;
    if (size === degree && (level[v]! > level[b]! || (level[v] === level[b] && v > b))) continue;
    best = i;
    degree = size;
  }
  const v = left[best]!;
  left[best] = left[left.length - 1]!;
  left.pop();
  return v;
}
