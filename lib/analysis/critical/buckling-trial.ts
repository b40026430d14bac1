import type { Frame } from '@/lib/model/frame';
import { addMemberAt, addSupports, emptyMemberStiffness } from '../assemble';
import { factor } from '../factor';
import type { MemberData } from '../member-data';
import type { Topology } from '../topology';
import type { AxialPiece } from './axial-pieces';
import { bucklingMember, pass, type InnerCount } from './buckling-member';

/** Room for K(λ), kept for one topology. */
export interface BucklingSpace {
  readonly K: Float64Array;
  readonly inner: Float64Array;
  readonly pivots: Float64Array;
}

export function bucklingSpace(t: Topology): BucklingSpace {
  return {
    K: new Float64Array(9 * t.blocks),
    inner: new Float64Array(6 * t.size),
    pivots: new Float64Array(3 * t.size),
  };
}

/** The frame without load. */
export interface Buckling {
  readonly frame: Frame;
  readonly t: Topology;
  readonly angles: Float64Array;
  readonly diagonal: Float64Array;
  readonly data: readonly MemberData[];
  readonly slack: readonly number[];
}

export interface Trial {
  readonly count: number;
  readonly logSize: number;
}

/** Number of critical loads below λ, and ln|det K(λ)| with the unknowns inside members. */
export function trial(
  { frame, t, angles, diagonal, data, slack }: Buckling,
  pieces: readonly (readonly AxialPiece[])[],
  lambda: number,
  space: BucklingSpace,
): Trial {
  const { K, inner, pivots } = space;
  const count: InnerCount = { negative: 0, logSize: 0, size: 1 };
  const k = emptyMemberStiffness();
  K.fill(0);
  for (let i = 0; i < data.length; i++) {
    if (slack.includes(i)) continue;
    bucklingMember(data[i]!, pieces[i]!, lambda, k, count);
    addMemberAt(K, t, i, data[i]!, k, angles);
  }
  addSupports(K, t, frame);
  factor(K, t, diagonal, inner, pivots, 0);
  for (let i = 0; i < 3 * t.size; i++) pass(pivots[i]!, count);
  return { count: count.negative, logSize: count.logSize + Math.log(count.size) };
}
