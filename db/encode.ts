import { endianness } from 'node:os';
import { packMethod, unpackMethod } from '@/db/pack-method';
import { pack, unpack } from '@/db/pack';
import type { Frame } from '@/lib/model/frame';
import type { ResultState } from '@/lib/results/result';

/** A state without its name, kind, purpose, order and α_cr, which stand in columns beside the blob. */
export type StateNumbers = Pick<ResultState, 'factors' | 'displacements' | 'reactions' | 'endForces' | 'extremes' | 'method'>;

/** Layout 1: plain first order. Layout 2: what sets the state apart from it is a sixth list of numbers. */
const layouts = [1, 2] as const;
const headBytes = { 1: 24, 2: 32 } as const;
const lists = { 1: 5, 2: 6 } as const;
const turned = endianness() === 'BE';
const nothing = new Float64Array(0);

/**
 * A state's numbers as one blob: a head of little-endian uint32 (layout, then the lengths of its lists, then zero up to a
 * whole number of eights), and the Float64 little-endian of factors, displacements, reactions, end forces, extremes and,
 * where the state is not of plain first order, its method, in this order. Exact, −0 and NaN included.
 */
export function packState(state: StateNumbers): Buffer {
  const parts = [state.factors, state.displacements, state.reactions, state.endForces, state.extremes ?? nothing];
  const layout = state.method === null ? 1 : 2;
  if (state.method !== null) parts.push(packMethod(state.method));
  let numbers = 0;
  for (const part of parts) numbers += part.length;
  const begins = headBytes[layout];
  const whole = new ArrayBuffer(begins + 8 * numbers);
  const head = new DataView(whole);
  head.setUint32(0, layout, true);
  let at = begins;
  for (let i = 0; i < parts.length; i++) {
    const part = parts[i]!;
    head.setUint32(4 + 4 * i, part.length, true);
    new Float64Array(whole, at, part.length).set(part);
    at += 8 * part.length;
  }
  if (turned) Buffer.from(whole, begins).swap64();
  return Buffer.from(whole);
}

/** @throws {RangeError} where the bytes are not what packState writes */
export function unpackState(bytes: Uint8Array): StateNumbers {
  const buffer = Buffer.from(bytes.buffer, bytes.byteOffset, bytes.byteLength);
  const layout = buffer.length < headBytes[1] ? undefined : layouts.find((each) => each === buffer.readUInt32LE(0));
  if (layout === undefined) throw new RangeError('Expected a packed state of layout 1 or 2');
  const begins = headBytes[layout];
  if (buffer.length < begins) throw new RangeError(`Expected a whole packed state, got ${buffer.length} bytes`);
  const lengths = Array.from({ length: lists[layout] }, (_, i) => buffer.readUInt32LE(4 + 4 * i));
  const numbers = lengths.reduce((sum, length) => sum + length, 0);
  if (begins + 8 * numbers > buffer.length) throw new RangeError(`Expected a whole packed state, got ${buffer.length} bytes`);
  const copy = new Float64Array(numbers);
  const raw = Buffer.from(copy.buffer);
  buffer.copy(raw, 0, begins, begins + 8 * numbers);
  if (turned) raw.swap64();
  let at = 0;
  const [factors, displacements, reactions, endForces, extremes, method] = lengths.map((length) =>
    copy.subarray(at, (at += length)),
  );
  const state = {
    factors: factors!,
    displacements: displacements!,
    reactions: reactions!,
    endForces: endForces!,
    method: method ? unpackMethod(method) : null,
  };
  return extremes!.length > 0 ? { ...state, extremes: extremes! } : state;
}

/** What a frame is without what only names it: what a frame version keeps. */
export type FrameModel = Omit<Frame, 'id' | 'title' | 'group' | 'count' | 'note'>;

export function packModel(frame: Frame): Buffer {
  const { id: _id, title: _title, group: _group, count: _count, note: _note, ...model } = frame;
  return pack(model);
}

export const unpackModel = (bytes: Uint8Array): FrameModel => unpack(bytes) as FrameModel;
