import { endianness } from 'node:os';
import { deflateRawSync, inflateRawSync } from 'node:zlib';

/**
 * Plain data as bytes, and back to the last bit: models, evaluations. Most of such data is numbers that no text gives
 * shortly, and the same few words and sorts of records over and over. So numbers that are not small whole ones lie beside
 * the text as Float64, a record is its sort and its values in order, and a word is its place in a list.
 *
 * Head of 8 bytes (a mark, how many numbers), the numbers little-endian, then JSON (deflated where it is long: of a usual
 * frame's few kB that would cost more than all the rest): [sorts, words, value], where an
 * array is [−1, …], a record [index of its keys among the sorts, …], 0.5 the next of the numbers and −2, −3 … a word.
 */
export function pack(value: unknown): Buffer {
  begin();
  put(value);
  // only words may be beyond ASCII: the rest, most of it, is written as it is
  const named = Buffer.from(`[${JSON.stringify(sorts)},${JSON.stringify([...words.keys()])},`);
  const begins = headBytes + 8 * filled;
  const whole = Buffer.allocUnsafe(begins + named.length + text.length + 1);
  whole.set(named, begins);
  whole.write(`${text}]`, begins + named.length, 'latin1');
  const long = whole.length - begins > mostPlain;
  const bytes = long ? Buffer.concat([whole.subarray(0, begins), deflateRawSync(whole.subarray(begins), { level: 1 })]) : whole;
  bytes.writeUInt32LE(long ? deflatedMark : mark, 0);
  bytes.writeUInt32LE(filled, 4);
  const numbers = bytes.subarray(headBytes, begins);
  numbers.set(new Uint8Array(block.buffer, 0, 8 * filled));
  if (turned) numbers.swap64();
  return bytes;
}

// no deflated data begins with these bits, so that what was kept as deflated JSON alone is told apart
const mark = 7;
const deflatedMark = 15;
const mostPlain = 20_000;
const headBytes = 8;
const turned = endianness() === 'BE';
const nextNumber = 0.5;

// what is being packed: its text so far, its numbers, its words and its sorts of records
let text = '';
let block = new Float64Array(1024);
let filled = 0;
const words = new Map<string, number>();
let sorts: string[][] = [];
let turn = 0;

/** Keys met one after the other: a record's sort is found by following its own. Kept from one packing to the next. */
interface Step {
  readonly next: Map<string, Step>;
  readonly keys: readonly string[];
  sort: number;
  /** The packing that `sort` is of. */
  turn: number;
}
const step = (keys: readonly string[]): Step => ({ next: new Map(), keys, sort: -1, turn: 0 });
const mostSteps = 5000;
let steps = 0;
let root = step([]);

function begin(): void {
  text = '';
  filled = 0;
  words.clear();
  sorts = [];
  turn++;
  if (steps > mostSteps) [root, steps] = [step([]), 0];
}

function put(value: unknown): void {
  if (typeof value === 'number') putNumber(value);
  else if (typeof value === 'string') {
    let word = words.get(value);
    if (word === undefined) words.set(value, (word = -2 - words.size));
    text += word;
  } else if (typeof value === 'boolean') text += value;
  else if (typeof value !== 'object' || value === null) text += 'null';
  else if (Array.isArray(value)) {
    text += '[-1';
    for (let i = 0; i < value.length; i++) {
      text += ',';
      put(value[i]);
    }
    text += ']';
  } else putRecord(value as Readonly<Record<string, unknown>>);
}

function putNumber(value: number): void {
  if (Number.isInteger(value) && value < 1e5 && value >= 0 && !Object.is(value, -0)) {
    text += value;
    return;
  }
  if (filled === block.length) {
    const more = new Float64Array(2 * filled);
    more.set(block);
    block = more;
  }
  block[filled++] = value;
  text += nextNumber;
}

function putRecord(record: Readonly<Record<string, unknown>>): void {
  let at = root;
  const keys = Object.keys(record);
  for (let i = 0; i < keys.length; i++) {
    const key = keys[i]!;
    if (record[key] === undefined) continue;
    let next = at.next.get(key);
    if (!next) {
      steps++;
      at.next.set(key, (next = step([...at.keys, key])));
    }
    at = next;
  }
  if (at.turn !== turn) {
    at.turn = turn;
    at.sort = sorts.length;
    sorts.push([...at.keys]);
  }
  text += `[${at.sort}`;
  for (let i = 0; i < keys.length; i++) {
    const field = record[keys[i]!];
    if (field === undefined) continue;
    text += ',';
    put(field);
  }
  text += ']';
}

/** @throws {Error} where the bytes are not what `pack` writes */
export function unpack(bytes: Uint8Array): unknown {
  const buffer = Buffer.from(bytes.buffer, bytes.byteOffset, bytes.byteLength);
  const long = buffer[0] === deflatedMark;
  if (!long && buffer[0] !== mark) return unpackDeflated(buffer);
  const numbers = new Float64Array(buffer.readUInt32LE(4));
  const end = headBytes + 8 * numbers.length;
  if (buffer.length < end) throw new RangeError(`Expected whole packed data, got ${buffer.length} bytes`);
  const raw = Buffer.from(numbers.buffer);
  buffer.copy(raw, 0, headBytes, end);
  if (turned) raw.swap64();
  const rest = buffer.subarray(end);
  const read = JSON.parse((long ? inflateRawSync(rest) : rest).toString()) as [string[][], string[], unknown];
  return take(read[2], { sorts: read[0], words: read[1], numbers, at: 0 });
}

interface Unpacking {
  readonly sorts: readonly (readonly string[])[];
  readonly words: readonly string[];
  readonly numbers: Float64Array;
  at: number;
}

function take(value: unknown, from: Unpacking): unknown {
  if (typeof value === 'number') {
    if (value === nextNumber) return from.numbers[from.at++];
    return value < -1 ? from.words[-2 - value] : value;
  }
  if (!Array.isArray(value)) return value;
  const items = value as unknown[];
  if (items[0] === -1) {
    const list: unknown[] = [];
    for (let i = 1; i < items.length; i++) list.push(take(items[i], from));
    return list;
  }
  const keys = from.sorts[items[0] as number]!;
  const record: Record<string, unknown> = {};
  for (let i = 0; i < keys.length; i++) {
    const key = keys[i]!;
    const field = take(items[i + 1], from);
    if (key === '__proto__')
      Object.defineProperty(record, key, { value: field, enumerable: true, writable: true, configurable: true });
    else record[key] = field;
  }
  return record;
}

/** Deflated JSON, as data was kept before: numbers that JSON has no word for stand as { notFinite }. */
function unpackDeflated(buffer: Buffer): unknown {
  return JSON.parse(inflateRawSync(buffer).toString(), (_, field: unknown) =>
    typeof field === 'object' && field !== null && 'notFinite' in field ? Number(field.notFinite) : field,
  );
}
