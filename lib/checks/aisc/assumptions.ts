import type { Note } from '../design-code/clause-row';
import type { CodeMember } from '../design-code/code-member';
import type { Demand } from '../design-code/demand';
import { refused, type MemberStrength } from './member-strength';

/** What the checks of AISC 360-22 take for granted of a member, said once each. */
export function saidOnce(member: CodeMember, of: MemberStrength, demands: readonly Demand[], note: Note): void {
  const { basis, bending, compression } = of;
  const pressed = !member.tensionOnly && demands.some((demand) => demand.compression > 0);
  if (demands.some((demand) => demand.tension > 0))
    note('AISC 360-22 D2: gross yielding only; rupture of net sections and connections are not checked');
  for (const demand of demands) if (demand.inPlane.allowed) note(`AISC 360-22: ${demand.inPlane.how}`);
  if (member.tensionOnly) note('Tension-only members: not pressed, so no buckling of theirs is checked');
  if (pressed && compression.torsional)
    note(
      'AISC 360-22 E4: twisting is held where the member is held out of the plane and at both faces, L_cz the longest of these lengths',
    );
  if (!refused(bending) && (bending.clause === 'F2' || bending.clause === 'F3'))
    note('AISC 360-22 F2: loads across a member act at the height of its shear centre');
  if (basis.plates.shape === 'channel')
    note('AISC 360-22 F2, F6: loads act through the shear centre of a channel and do not twist it');
  if (basis.plates.shape === 'rhs' || basis.plates.shape === 'chs')
    note('AISC 360-22 B4.2: the wall t of a hollow section is taken as its design wall thickness');
  if (basis.plates.shape === 'chs' && demands.some((demand) => demand.shear > 0))
    note('AISC 360-22 G5: L_v taken as the length of the member');
  if (basis.plates.shape === 'I' && basis.plates.builtUp && member.section.made === null)
    note(`Section ${member.section.name}: not said how made, taken as built up (AISC 360-22 Tables B4.1a, B4.1b; G2)`);
}
