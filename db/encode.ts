import { endianness } from 'node:os';
import { pack, unpack } from '@/db/pack';
import type { Frame } from '@/lib/model/frame';
import type { ResultState } from '@/lib/results/result';

/** The numbers of a state; its name, kind, purpose, order and α_cr stand in columns beside them. */
export type StateNumbers = Pick<ResultState, 'factors' | 'displacements' | 'reactions' | 'endForces' | 'extremes'>;

const layout = 1;
const headBytes = 24;
const turned = endianness() === 'BE';
const nothing = new Float64Array(0);

/**
 * A state's numbers as one blob: a head of little-endian uint32 (layout, then the five lengths), and the Float64
 * little-endian of factors, displacements, reactions, end forces and extremes in this order. Exact, −0 and NaN included.
 */
export function packState(state: StateNumbers): Buffer {
  const parts = [state.factors, state.displacements, state.reactions, state.endForces, state.extremes ?? nothing];
  let numbers = 0;
  for (const part of parts) numbers += part.length;
  const whole = new ArrayBuffer(headBytes + 8 * numbers);
  const head = new DataView(whole);
  head.setUint32(0, layout, true);
  let at = headBytes;
  for (let i = 0; i < parts.length; i++) {
    const part = parts[i]!;
    head.setUint32(4 + 4 * i, part.length, true);
    new Float64Array(whole, at, part.length).set(part);
    at += 8 * part.length;
  }
  if (turned) Buffer.from(whole, headBytes).swap64();
  return Buffer.from(whole);
}

/** @throws {RangeError} where the bytes are not what packState writes */
export function unpackState(bytes: Uint8Array): StateNumbers {
  const buffer = Buffer.from(bytes.buffer, bytes.byteOffset, bytes.byteLength);
  if (buffer.length < headBytes || buffer.readUInt32LE(0) !== layout) throw new RangeError('Expected a packed state of layout 1');
  const lengths = [4, 8, 12, 16, 20].map((at) => buffer.readUInt32LE(at));
  const numbers = lengths.reduce((sum, length) => sum + length, 0);
  if (headBytes + 8 * numbers > buffer.length) throw new RangeError(`Expected a whole packed state, got ${buffer.length} bytes`);
  const copy = new Float64Array(numbers);
  const raw = Buffer.from(copy.buffer);
  buffer.copy(raw, 0, headBytes, headBytes + 8 * numbers);
  if (turned) raw.swap64();
  let at = 0;
  const [factors, displacements, reactions, endForces, extremes] = lengths.map((length) => copy.subarray(at, (at += length)));
  const state = { factors: factors!, displacements: displacements!, reactions: reactions!, endForces: endForces! };
  return extremes!.length > 0 ? { ...state, extremes: extremes! } : state;
}

/** What a frame is without what only names it: what a frame version keeps. */
export type FrameModel = Omit<Frame, 'id' | 'title' | 'group' | 'count' | 'note'>;

export function packModel(frame: Frame): Buffer {
  const { id: _id, title: _title, group: _group, count: _count, note: _note, ...model } = frame;
  return pack(model);
}

export const unpackModel = (bytes: Uint8Array): FrameModel => unpack(bytes) as FrameModel;
