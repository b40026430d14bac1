import type { Frame } from '@/lib/model/frame';
import type { Failure } from '@/lib/results/result';
import { memberDataFor } from './member-data';

/** What shear deformation needs and this frame does not give: G and a shear area of every member; null = nothing. */
export function shearRefusal(frame: Frame): Failure | null {
  const data = memberDataFor(frame, { shearDeformation: true, stiffness: null });
  const i = data.findIndex((m) => !(m.GAv > 0));
  if (i < 0) return null;
  const member = frame.members[i]!;
  const G = frame.materials[member.material]!.G_Pa;
  const needs =
    G === null || !(G > 0)
      ? `material ${frame.materials[member.material]!.name} needs G`
      : `section ${frame.sections[member.section]!.name} needs Av`;
  return { code: 'not-solved', message: `Shear deformation is on: ${needs} (member ${member.id}).`, node: null };
}
