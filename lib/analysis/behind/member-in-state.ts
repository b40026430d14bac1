import type { Frame } from '@/lib/model/frame';
import type { ResultState } from '@/lib/results/result';
import { emptyMemberStiffness, memberStiffness, type MemberStiffness } from '../assemble';
import { fixedEndForces } from '../fixed-end-forces';
import { emptyJointStiffness, jointStiffness, type JointStiffness } from '../joint-stiffness';
import { memberDataFor, type MemberData } from '../member-data';
import { memberLoads } from '../member-loads';
import { bentMember, type BentMember } from './bent-member';

/** A member as one state of its frame takes it: what q = k T d + q_F is made of, by the engine's own functions. */
export interface MemberInState {
  readonly data: MemberData;
  readonly k: MemberStiffness;
  /** Fixities of its joints, and what they make of the rotational stiffness without axial force. */
  readonly joints: JointStiffness;
  /** q_F = [X₁ Y₁ m₁ X₂ Y₂ m₂] of the state's loads along the member, local axes, N and N·m. */
  readonly fixedEnd: Float64Array;
  /** Of which each case that acts on it, its factor put in; they sum to q_F. Second order: [], cases can't be parted. */
  readonly fixedEndByCase: readonly { readonly case: number; readonly factor: number; readonly forces: Float64Array }[];
  /** Slack: it has no stiffness, and its loads stand on its nodes. */
  readonly slack: boolean;
  /** Under its axial force (second order); null = first order. */
  readonly bent: BentMember | null;
}

/** @throws {RangeError} where the member is not of the frame */
export function memberInState(frame: Frame, state: ResultState, member: number): MemberInState {
  const data = memberDataFor(frame, state.method)[member];
  if (!data) throw new RangeError(`Expected a member below ${frame.members.length}, got ${member}`);
  const joints = jointStiffness(data, emptyJointStiffness());
  const fixedEndByCase: { case: number; factor: number; forces: Float64Array }[] = [];
  if (state.method?.slack.includes(member)) {
    const k = emptyMemberStiffness();
    return { data, k, joints, fixedEnd: new Float64Array(6), fixedEndByCase, slack: true, bent: null };
  }
  if (state.order === 2) {
    const bent = bentMember(frame, state, member, data);
    return { data, k: bent.k, joints, fixedEnd: bent.fixedEnd, fixedEndByCase, slack: false, bent };
  }
  const k = memberStiffness(data, emptyMemberStiffness());
  const loads = memberLoads(frame);
  const fixedEnd = new Float64Array(6);
  frame.cases.forEach((_, c) => {
    const factor = state.factors[c]!;
    const acting = factor === 0 ? undefined : loads[member * frame.cases.length + c];
    if (!acting) return;
    const forces = new Float64Array(6);
    fixedEndForces(data, acting, joints, forces, 0);
    for (let r = 0; r < 6; r++) {
      forces[r] = forces[r]! * factor;
      fixedEnd[r] = fixedEnd[r]! + forces[r]!;
    }
    fixedEndByCase.push({ case: c, factor, forces });
  });
  return { data, k, joints, fixedEnd, fixedEndByCase, slack: false, bent: null };
}
