/** Numbers of one chunk; above half of it a row has memory of its own. */
const chunkLength = 4096;
let chunk = new ArrayBuffer(0);
let used = 0;

/**
 * A row of `length` zeros. Rows that stay with a state are cut one after another from chunks of memory, for memory of its own
 * costs each more than filling it; a chunk goes when none of its rows is held any more. Nothing is ever handed out twice.
 */
export function numbers(length: number): Float64Array {
  if (2 * length > chunkLength) return new Float64Array(length);
  if (used + 8 * length > chunk.byteLength) {
    chunk = new ArrayBuffer(8 * chunkLength);
    used = 0;
  }
  const row = new Float64Array(chunk, used, length);
  used += 8 * length;
  return row;
}

/** The same with what `values` holds from `from` to before `to`. */
export function copyOf(values: Float64Array, from = 0, to = values.length): Float64Array {
  const row = numbers(to - from);
  for (let i = from; i < to; i++) row[i - from] = values[i]!;
  return row;
}
