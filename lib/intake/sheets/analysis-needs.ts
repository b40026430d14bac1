import type { Draft } from '@/lib/intake/draft';
import { forNobody } from '@/lib/intake/reader';
import type { Row } from '@/lib/intake/table';
import * as say from '@/lib/problems/wording';
import { inPlane } from '@/lib/sections/in-plane';

/**
 * What the chosen analysis needs of sections and materials and they have not, each at the cell that can mend it: shear area
 * and G for shear deformation, fy for the stiffness reduction of AISC 360 (τ_b). Tension-only members neither shear nor
 * are compressed, so nothing is asked of theirs.
 */
export function tellAnalysisNeeds(draft: Draft): void {
  const { shearDeformation, stiffnessReduction } = draft.batch.settings;
  if (!shearDeformation && stiffnessReduction === 'none') return;
  draft.members.forEach((member, i) => {
    if (member.tensionOnly) return;
    if (shearDeformation) needShear(draft, i);
    if (stiffnessReduction !== 'none') needYield(draft, i);
  });
}

function needShear(draft: Draft, i: number): void {
  const member = draft.members[i]!;
  const section = draft.sections[member.section]!;
  const material = draft.materials[member.material]!;
  if (inPlane(section, member.turned).AvShear_m2 === null)
    tellPart(draft, i, 'section', 'Av', say.shearAreaMissing(section.name, member.turned));
  if (material.G_Pa === null) tellPart(draft, i, 'material', 'G', say.shearModulusMissing(material.name));
}

function needYield(draft: Draft, i: number): void {
  const member = draft.members[i]!;
  const section = draft.sections[member.section]!;
  const material = draft.materials[member.material]!;
  if (material.fy_Pa !== null) return;
  if (material.grade !== null && section.properties.t_m === null)
    tellPart(draft, i, 'section', 't', say.reductionNeedsThickness(section.name, material.grade));
  else tellPart(draft, i, 'material', 'fy', say.reductionNeedsYield(material.name));
}

/** At the column of the section's or material's own row, at its id where the sheet has no such column, else at the member. */
function tellPart(draft: Draft, i: number, part: 'section' | 'material', column: string, message: string): void {
  const { batch, members, memberRows, sectionRows, materialRows, reading } = draft;
  const member = members[i]!;
  const own: Row | null | undefined = part === 'section' ? sectionRows[member.section] : materialRows[member.material];
  const fault = { code: 'not-a-number', message } as const;
  if (own) batch.reader.tell(own, own.part.byName.has(column) ? column : part, fault, { ...forNobody, frame: draft.entry.id });
  else batch.reader.tell(memberRows[i]!, 'section', fault, reading);
}
