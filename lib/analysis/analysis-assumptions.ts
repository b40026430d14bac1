import type { Frame } from '@/lib/model/frame';
import type { Settings } from '@/lib/model/settings';
import { columnsOf } from './imperfections/columns';

/** What the analysis takes for granted in this frame beyond what its sheets say, in whole sentences without a full stop. */
export function analysisAssumptions(frame: Frame, settings: Settings): readonly string[] {
  const said: string[] = [];
  const strength = frame.combinations.some(({ purpose }) => purpose === 'strength');
  const asd = settings.strengthCheck === 'AISC 360-22 ASD';
  if (settings.imperfections !== 'none' && strength) {
    if (columnsOf(frame).length === 0)
      said.push('imperfections: the frame has no columns, so there are no imperfection forces; both directions are the same');
    else if (settings.imperfections === 'EN 1993-1-1')
      said.push(
        'imperfections: initial sway only (EN 1993-1-1 5.3.2(3)a); initial bow of members is left to their buckling checks (5.3.2(6))',
      );
    else
      said.push(
        `imperfections: notional loads of 0.002 α Y, α = ${asd ? '1.6' : '1.0'}, with every strength combination (AISC 360-22 C2.2b), Y the loads of all cases but wind, seismic and temperature`,
      );
  }
  if (settings.stiffnessReduction !== 'none' && strength) {
    said.push(
      'stiffness reduction: 0.8 on members and their joints, τ_b with Pns = fy A, sections taken as nonslender; supports’ springs are not reduced',
    );
    if (settings.strengthCheck === 'elastic stress')
      said.push('stiffness reduction: α = 1, combinations with elastic stress being analysed under the loads as given');
  }
  if (asd && settings.analysis === 'second order' && strength)
    said.push(
      'second order: strength combinations are analysed under 1.6 times their loads and results divided by 1.6 (AISC 360-22 C2.1(d))',
    );
  if (asd && strength)
    said.push(
      'critical load factor: of the loads as the ASD combinations give them, not of 1.6 times them; by first-order axial forces and full stiffness',
    );
  if (frame.members.some((member) => member.tensionOnly))
    said.push('tension-only members: pinned at both ends, slack without tension; load cases alone have no results');
  return said;
}
