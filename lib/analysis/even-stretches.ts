import type { Frame } from '@/lib/model/frame';
import { stretchesOf } from './member-stretches';

/** Numbers of a case on a member: q_x, its slope, q_y, its slope from the start, free strain and curvature. */
export const evenNumbers = 6;

/** Loads of the members along which nothing begins, ends or stands, in one row, so that every state reads through memory once. */
export interface EvenStretches {
  /** By member, 1 = such a one. */
  readonly even: Uint8Array;
  /** How many there are. */
  readonly count: number;
  /** By member, then case, `evenNumbers` each. */
  readonly acting: Float64Array;
}

const known = new WeakMap<Frame, EvenStretches>();
// asked for line after line of one frame
let latest: Frame | null = null;
let ofLatest: EvenStretches | null = null;

/** Worked out once a frame. */
export function evenStretches(frame: Frame): EvenStretches {
  if (frame === latest && ofLatest) return ofLatest;
  const found = known.get(frame) ?? build(frame);
  latest = frame;
  return (ofLatest = found);
}

function build(frame: Frame): EvenStretches {
  const count = frame.cases.length;
  const even = new Uint8Array(frame.members.length);
  const acting = new Float64Array(evenNumbers * count * frame.members.length);
  for (let i = 0; i < even.length; i++) {
    const { places, cases } = stretchesOf(frame, i);
    if (places.length > 2 || cases.some((one) => one?.jumps)) continue;
    even[i] = 1;
    cases.forEach((one, c) => {
      if (!one) return;
      const o = evenNumbers * (i * count + c);
      for (let k = 0; k < 4; k++) acting[o + k] = one.lines[k]!;
      acting[o + 4] = one.strain;
      acting[o + 5] = one.curvature;
    });
  }
  const made = { even, count: even.reduce((sum, one) => sum + one, 0), acting };
  known.set(frame, made);
  return made;
}
