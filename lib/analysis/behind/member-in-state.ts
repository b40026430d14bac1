import type { Frame } from '@/lib/model/frame';
import type { ResultState } from '@/lib/results/result';
import { emptyMemberStiffness, memberStiffness, type MemberStiffness } from '../assemble';
import { fixedEndForces } from '../fixed-end-forces';
import { emptyJointStiffness, jointStiffness, type JointStiffness } from '../joint-stiffness';
import { memberDataFor, type MemberData } from '../member-data';
import { memberLoads } from '../member-loads';

/** A member as one state of its frame takes it: what q = k T d + q_F is made of, by the engine's own functions. */
export interface MemberInState {
  readonly data: MemberData;
  readonly k: MemberStiffness;
  /** Fixities of its joints, and what they make of the rotational stiffness. */
  readonly joints: JointStiffness;
  /** q_F = [X₁ Y₁ m₁ X₂ Y₂ m₂] of the state's loads along the member, local axes, N and N·m. */
  readonly fixedEnd: Float64Array;
  /** Of which each case that acts on it, its factor put in; they sum to q_F. */
  readonly fixedEndByCase: readonly { readonly case: number; readonly factor: number; readonly forces: Float64Array }[];
}

/** @throws {RangeError} where the member is not of the frame */
export function memberInState(frame: Frame, state: ResultState, member: number): MemberInState {
  const data = memberDataFor(frame, state.method)[member];
  if (!data) throw new RangeError(`Expected a member below ${frame.members.length}, got ${member}`);
  const k = memberStiffness(data, emptyMemberStiffness());
  const joints = jointStiffness(data, emptyJointStiffness());
  const loads = memberLoads(frame);
  const fixedEnd = new Float64Array(6);
  const fixedEndByCase = frame.cases.flatMap((_, c) => {
    const factor = state.factors[c]!;
    const acting = factor === 0 ? undefined : loads[member * frame.cases.length + c];
    if (!acting) return [];
    const forces = new Float64Array(6);
    fixedEndForces(data, acting, joints, forces, 0);
    for (let r = 0; r < 6; r++) {
      forces[r] = forces[r]! * factor;
      fixedEnd[r] = fixedEnd[r]! + forces[r]!;
    }
    return [{ case: c, factor, forces }];
  });
  return { data, k, joints, fixedEnd, fixedEndByCase };
}
