import type { Frame, Material, Member, Section } from '@/lib/model/frame';
import type { SectionTaken } from '@/lib/sizing/section-taken';

/** Why a section cannot be had, as a sentence. */
export interface Unfit {
  readonly unfit: string;
}

/**
 * The frame with other sections for some of its members, as its sheets would give it after the change: sections and materials
 * in the order of members, each material as it is for the thickness of its section. Everything else is the same object.
 *
 * @param takes what a member takes; null = it keeps its own
 * @returns why it cannot be, where a member is turned and the section's minor axis is not known, or its material is not to be had
 */
export function withSections(frame: Frame, takes: (member: number) => SectionTaken | null): Frame | Unfit {
  const sections: Section[] = [];
  const materials: Material[] = [];
  const thicknesses: (number | null)[] = [];
  const names = new Map<string, number>();
  const members: Member[] = [];
  for (const [i, member] of frame.members.entries()) {
    const own = sectionOf(frame, member);
    const had = materialOf(frame, member);
    const taken = takes(i);
    const section = taken?.section ?? own;
    const material = taken === null || taken.section.name === own.name ? had : taken.materials[had.name];
    if (material === undefined) return { unfit: `${section.name} is not to be had of ${had.name}.` };
    if (member.turned && section.properties.Iminor_m4 === null)
      return { unfit: `${member.id} is turned, and of ${section.name} the minor axis is not known.` };
    // names of sections are unique within a batch; one that another member has already is the same section
    let at = names.get(section.name);
    if (at === undefined) names.set(section.name, (at = sections.push(section) - 1));
    // the sheets resolve a material once for each thickness, and so list it once for each
    const t = section.properties.t_m;
    let of = materials.findIndex((one, m) => thicknesses[m] === t && (one === material || sameMaterial(one, material)));
    if (of < 0) {
      of = materials.push(material) - 1;
      thicknesses.push(t);
    }
    members.push(at === member.section && of === member.material ? member : { ...member, section: at, material: of });
  }
  return { ...frame, members, sections, materials };
}

const figures = ['E_Pa', 'G_Pa', 'fy_Pa', 'fu_Pa', 'density_kg_m3', 'expansion_perK'] as const;

const sameMaterial = (a: Material, b: Material): boolean =>
  a.name === b.name && a.grade === b.grade && figures.every((key) => a[key] === b[key]);

function sectionOf(frame: Frame, { section, id }: Member): Section {
  const found = frame.sections[section];
  if (!found) throw new RangeError(`Expected the section of ${id}`);
  return found;
}

function materialOf(frame: Frame, { material, id }: Member): Material {
  const found = frame.materials[material];
  if (!found) throw new RangeError(`Expected the material of ${id}`);
  return found;
}
