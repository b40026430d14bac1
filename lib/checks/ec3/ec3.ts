import type { Settings } from '@/lib/model/settings';
import type { ClauseRow, DesignCode, Note } from '../design-code/clause-row';
import type { CodeMember } from '../design-code/code-member';
import type { Demand } from '../design-code/demand';
import { bucklingRows } from './buckling-rows';
import { crossSectionRows } from './cross-section-rows';
import { ec3Member } from './ec3-member';
import { refusedRow } from './ec3-rows';
import { ec3Working } from './working-ec3';

/** Rows of EN 1993-1-1 for a member: 5.5, 6.2.3 to 6.2.10, 6.3.1 to 6.3.3 for each state. */
function rows(member: CodeMember, demands: readonly Demand[], settings: Settings, note: Note): readonly ClauseRow[] {
  const of = ec3Member(member, settings);
  if (typeof of === 'string') {
    const whole = { check: settings.strengthCheck, reference: 'EN 1993-1-1' };
    return demands.map((demand) => refusedRow(whole, demand, of));
  }
  note('EN 1993-1-1: gross sections (holes are not known), η = 1.0 in shear');
  note(
    'EN 1993-1-1: recommended values but for γM0 and γM1 as set; other values of a national annex are not read (the United Kingdom’s for lateral-torsional buckling: λ̄LT,0 = 0.2 and β = 1.0 for welded sections, kc = 1/√C1)',
  );
  if (of.lateral.kind === 'rolled' || of.lateral.kind === 'general')
    note(
      `M_cr: doubly symmetric section, ends of each length between restraints held sideways and against twist, free to warp; C1 from its diagram of moments; loads at the ${settings.loadHeight}`,
    );
  if (of.lateral.kind !== 'none' && (member.free.start || member.free.end))
    note('M_cr to a free end: over twice the length, uniform moment (C1 = 1), the other end held against twist and warping');
  if (of.shape === 'I' && of.buckling.length > 2)
    note(
      'Torsional buckling (6.3.1.4): twist is held where the member is held out of the plane and at both faces; the longest of these lengths',
    );
  const found: ClauseRow[] = [];
  for (const demand of demands) {
    crossSectionRows(of, demand, found);
    bucklingRows(of, demand, settings, found);
  }
  return found;
}

/** EN 1993-1-1:2005 with its corrigenda, recommended values but for γM0 and γM1. */
export const ec3: DesignCode = { name: 'EN 1993-1-1', rows, working: ec3Working };
