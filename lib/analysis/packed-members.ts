import type { MemberData } from './member-data';

/** Numbers a member in `packedMembers`: length, cos, sin, EA, EI, and 1 = plain. */
export const packedSize = 6;

const known = new WeakMap<readonly MemberData[], Float64Array>();

/**
 * Members in a row of numbers, so that a frame's stiffness reads through memory once. Plain = rigid joints, no shear
 * deformation, and both nodes in global axes. Worked out once for each set of members.
 *
 * @param angles of the nodes' axes: always the same for the same members
 */
export function packedMembers(data: readonly MemberData[], angles: Float64Array): Float64Array {
  const before = known.get(data);
  if (before) return before;
  const numbers = new Float64Array(packedSize * data.length);
  data.forEach((m, i) => {
    const rigid = m.startSpring === Infinity && m.endSpring === Infinity;
    const plain = rigid && m.GAv === Infinity && angles[m.start] === 0 && angles[m.end] === 0;
    numbers.set([m.length, m.cos, m.sin, m.EA, m.EI, plain ? 1 : 0], packedSize * i);
  });
  known.set(data, numbers);
  return numbers;
}
