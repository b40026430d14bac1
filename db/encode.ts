import { deflateRawSync, inflateRawSync } from 'node:zlib';
import type { Frame } from '@/lib/model/frame';
import type { ResultState } from '@/lib/results/result';

/** The numbers of a state; its name, kind, purpose, order and α_cr stand in columns beside them. */
export type StateNumbers = Pick<ResultState, 'factors' | 'displacements' | 'reactions' | 'endForces'>;

const layout = 1;
const headBytes = 24;

/**
 * A state's numbers as one blob: a head of little-endian uint32 (layout, then the four lengths, then 0), and the
 * Float64 little-endian of factors, displacements, reactions and end forces in this order. Exact, −0 and NaN included.
 */
export function packState(state: StateNumbers): Buffer {
  const parts = [state.factors, state.displacements, state.reactions, state.endForces];
  const bytes = Buffer.allocUnsafe(headBytes + 8 * parts.reduce((sum, part) => sum + part.length, 0));
  bytes.writeUInt32LE(layout, 0);
  parts.forEach((part, i) => bytes.writeUInt32LE(part.length, 4 + 4 * i));
  bytes.writeUInt32LE(0, 20);
  let at = headBytes;
  for (const part of parts) for (let i = 0; i < part.length; i++, at += 8) bytes.writeDoubleLE(part[i]!, at);
  return bytes;
}

/** @throws {RangeError} where the bytes are not what packState writes */
export function unpackState(bytes: Uint8Array): StateNumbers {
  const buffer = Buffer.from(bytes.buffer, bytes.byteOffset, bytes.byteLength);
  if (buffer.length < headBytes || buffer.readUInt32LE(0) !== layout) throw new RangeError('Expected a packed state of layout 1');
  let at = headBytes;
  const next = (i: number): Float64Array => {
    const part = new Float64Array(buffer.readUInt32LE(4 + 4 * i));
    if (at + 8 * part.length > buffer.length) throw new RangeError(`Expected a whole packed state, got ${buffer.length} bytes`);
    for (let k = 0; k < part.length; k++, at += 8) part[k] = buffer.readDoubleLE(at);
    return part;
  };
  return { factors: next(0), displacements: next(1), reactions: next(2), endForces: next(3) };
}

/** What a frame is without what only names it: what a frame version keeps. */
export type FrameModel = Omit<Frame, 'id' | 'title' | 'group' | 'count' | 'note'>;

export function packModel(frame: Frame): Buffer {
  const { id: _id, title: _title, group: _group, count: _count, note: _note, ...model } = frame;
  return packJson(model);
}

export const unpackModel = (bytes: Uint8Array): FrameModel => unpackJson(bytes) as FrameModel;

/** JSON, deflated; numbers that JSON has no word for come back as they were. */
export function packJson(value: unknown): Buffer {
  const text = JSON.stringify(value, (_, field: unknown) =>
    typeof field === 'number' && !Number.isFinite(field) ? { notFinite: String(field) } : field,
  );
  return deflateRawSync(text, { level: 1 });
}

export function unpackJson(bytes: Uint8Array): unknown {
  const text = inflateRawSync(bytes).toString('utf8');
  if (!text.includes('"notFinite"')) return JSON.parse(text);
  return JSON.parse(text, (_, field: unknown) =>
    typeof field === 'object' && field !== null && 'notFinite' in field ? Number(field.notFinite) : field,
  );
}
