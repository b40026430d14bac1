/**
 * Reverse Cuthill–McKee ordering of a graph, part by part: neighbours get near numbers, so that the profile is narrow.
 *
 * Depends on the numbering of its input and on nothing else, so a cached order is the order computed anew.
 *
 * @param neighbours neighbours[v] = the vertices joined to v
 * @returns order[position] = vertex
 * Cuthill and McKee 1969; start vertex after George and Liu 1979.
 */
export function reverseCuthillMcKee(neighbours: readonly (readonly number[])[]): Int32Array {
  const count = neighbours.length;
  const order = new Int32Array(count);
  const done = new Uint8Array(count);
  let filled = 0;
  for (let seed = 0; seed < count; seed++) {
    if (done[seed]) continue;
    const start = farEnd(neighbours, seed);
    done[start] = 1;
    order[filled++] = start;
    for (let head = filled - 1; head < filled; head++) {
      const next = neighbours[order[head]!]!.filter((w) => !done[w]);
      next.sort((p, q) => neighbours[p]!.length - neighbours[q]!.length || p - q);
      for (const w of next) {
        if (done[w]) continue;
        done[w] = 1;
        order[filled++] = w;
      }
    }
  }
  return order.reverse();
}

/** A vertex at the end of a longest shortest path found by repeated breadth-first search. */
function farEnd(neighbours: readonly (readonly number[])[], seed: number): number {
  let start = seed;
  let depth = -1;
  for (;;) {
    const layers = layersFrom(neighbours, start);
    if (layers.length <= depth) return start;
    depth = layers.length;
    const last = layers[layers.length - 1]!;
    start = last.reduce((best, v) => (neighbours[v]!.length < neighbours[best]!.length ? v : best), last[0]!);
  }
}

function layersFrom(neighbours: readonly (readonly number[])[], start: number): number[][] {
  const seen = new Set([start]);
  const layers: number[][] = [[start]];
  for (;;) {
    const next: number[] = [];
    for (const v of layers[layers.length - 1]!)
      for (const w of neighbours[v]!)
        if (!seen.has(w)) {
          seen.add(w);
          next.push(w);
        }
    if (next.length === 0) return layers;
    layers.push(next);
  }
}
