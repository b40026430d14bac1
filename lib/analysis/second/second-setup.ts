import type { Frame, Support } from '@/lib/model/frame';
import type { Numbering } from './numbering';
import { loadsAlong, type AlongMember } from './second-loads';
import { memberFacts, type MemberFacts } from './second-model';

/** What all states of a frame share in the second analysis. */
export interface Setup {
  readonly frame: Frame;
  readonly members: readonly MemberFacts[];
  readonly along: readonly AlongMember[];
  /** The axes a node's unknowns are along: cos and sin of its support's angle, 2 a node. */
  readonly axes: Float64Array;
  readonly supportAt: readonly (Support | undefined)[];
  /** What is worked out once for each set of slack members. */
  readonly numberings: Map<string, Numbering>;
  readonly inverses: Map<string, Float64Array | null>;
  readonly room: { K: Float64Array };
}

/** @param shear whether members shear as well as bend */
export function setUp(frame: Frame, shear: boolean): Setup {
  const members = memberFacts(frame, shear);
  const axes = new Float64Array(2 * frame.nodes.length);
  const supportAt: (Support | undefined)[] = frame.nodes.map(() => undefined);
  for (const support of frame.supports) supportAt[support.node] = support;
  supportAt.forEach((support, node) => {
    const angle = support?.angle_rad ?? 0;
    axes[2 * node] = Math.cos(angle);
    axes[2 * node + 1] = Math.sin(angle);
  });
  const along = loadsAlong(frame, members);
  return { frame, members, along, axes, supportAt, numberings: new Map(), inverses: new Map(), room: { K: new Float64Array(0) } };
}

/** What makes a state: its loads, what the members are made of in it, and the forces that bend it further. */
export interface Given {
  /** Factor on each case, loadScale counted in. */
  readonly factors: ArrayLike<number>;
  /** Fx, Fy by node, N, global; null = none. */
  readonly notional: ArrayLike<number> | null;
  /** Factors on EA and EI by member; null = all 1. GAv and the joints take that of EA. */
  readonly stiffness: ArrayLike<number> | null;
  readonly slack: ReadonlySet<number>;
  /** N at the start of each member by which the geometry is reckoned; null = first order. */
  readonly axial: ArrayLike<number> | null;
}

/** A direction's restraint of a node: 0, 1 its support's ux and uy, 2 rz. */
export function restraintOf(support: Support | undefined, r: number): Support['ux'] {
  if (!support) return 'free';
  return r === 0 ? support.ux : r === 1 ? support.uy : support.rz;
}
