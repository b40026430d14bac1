import type { CodeMember } from '../design-code/code-member';
import { basisOf, type Basis } from './basis';
import { bendingStrength, type BendingStrength, type Refused } from './bending-strength';
import { compressionStrength, type CompressionStrength } from './compression-strength';
import { shearStrength, type ShearStrength } from './shear-strength';
import { available, USUAL, type Method } from './strength';
import { tensileYielding } from './tension';

/** Everything of a member's strength that does not depend on the combination. */
export interface MemberStrength {
  readonly basis: Basis;
  readonly tension: { readonly Pn: number; readonly Pc: number };
  readonly compression: CompressionStrength;
  readonly bending: BendingStrength | Refused;
  readonly shear: ShearStrength;
}

/** The available strengths of a member, or in words why it can't be checked at all. */
export function memberStrength(member: CodeMember, method: Method): MemberStrength | string {
  const basis = basisOf(member, method);
  if (typeof basis === 'string') return basis;
  const Pn = tensileYielding(basis.Fy, basis.Ag);
  return {
    basis,
    tension: { Pn, Pc: available(method, Pn, USUAL) },
    compression: compressionStrength(basis, member),
    bending: bendingStrength(basis),
    shear: shearStrength(basis, member.length_m),
  };
}

export const refused = (bending: BendingStrength | Refused): bending is Refused => 'reason' in bending;
