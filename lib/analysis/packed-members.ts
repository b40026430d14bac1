import type { Frame } from '@/lib/model/frame';
import type { MemberData } from './member-data';

/** Numbers a member in `PackedMembers`: length, cos, sin, EA, EI, and 1 = plain. */
export const packedSize = 6;

/**
 * Members in a row of numbers, so that a frame's stiffness reads through memory once. Plain = rigid joints, no shear
 * deformation, and both nodes in global axes.
 */
export interface PackedMembers {
  readonly numbers: Float64Array;
  /** Some support is a spring. */
  readonly sprung: boolean;
}

const known = new WeakMap<readonly MemberData[], PackedMembers>();

/** Worked out once for each set of members. @param frame theirs   @param angles of its nodes' axes */
export function packedMembers(frame: Frame, data: readonly MemberData[], angles: Float64Array): PackedMembers {
  const before = known.get(data);
  if (before) return before;
  const numbers = new Float64Array(packedSize * data.length);
  data.forEach((m, i) => {
    const rigid = m.startSpring === Infinity && m.endSpring === Infinity;
    const plain = rigid && m.GAv === Infinity && angles[m.start] === 0 && angles[m.end] === 0;
    numbers.set([m.length, m.cos, m.sin, m.EA, m.EI, plain ? 1 : 0], packedSize * i);
  });
  const sprung = frame.supports.some(({ ux, uy, rz }) => [ux, uy, rz].some((restraint) => typeof restraint === 'number'));
  const packed = { numbers, sprung };
  known.set(data, packed);
  return packed;
}
