/** Frames and what is asked of them → the problem that the search takes. */
import type { Frame } from '@/lib/model/frame';
import { groupsOf } from '@/lib/sizing/members-of';
import type { FrameToSize, GroupSteel, GroupToSize, SizingProblem } from '@/lib/sizing/problem';
import type { SizingGroup } from '@/lib/sizing/sizing';

export interface FrameGiven {
  readonly frame: Frame;
  /** Frames of the sheets that are this one, and their number off, added up. */
  readonly frames: number;
  readonly off: number;
  readonly ratio: number | null;
}

/** A problem without its candidates: those are found for the groups' materials. */
export interface ProblemRead extends Omit<SizingProblem, 'groups'> {
  readonly groups: readonly Omit<GroupToSize, 'candidates'>[];
  /** Names of the materials that members of each group have. */
  readonly materials: readonly (readonly string[])[];
}

/**
 * Looks through frames one after the other, and keeps of each only what the search needs.
 *
 * @returns a sentence where it cannot be sized: a group has no member, or a member would take two sections
 */
export function problemOf(
  given: Iterable<FrameGiven>,
  groups: readonly SizingGroup[],
): ProblemRead | { readonly refused: string } {
  const frames: FrameToSize[] = [];
  const materials = groups.map(() => new Set<string>());
  const before = groups.map(() => new Set<string>());
  const members = groups.map(() => 0);
  for (const { frame, frames: many, off, ratio } of given) {
    const found = groupsOf(frame, groups);
    if ('twice' in found) return { refused: `${found.twice} is of two of the groups, and can take one section only.` };
    const steel = groups.map((): GroupSteel[] => []);
    let [mask, mass, rest]: [number, number | null, number | null] = [0, 0, 0];
    for (const [i, member] of frame.members.entries()) {
      const [a, b] = [frame.nodes[member.start], frame.nodes[member.end]];
      const [section, material] = [frame.sections[member.section], frame.materials[member.material]];
      if (!a || !b || !section || !material) throw new RangeError(`Expected the ends, section and material of ${member.id}`);
      const length_m = Math.hypot(b.x_m - a.x_m, b.y_m - a.y_m);
      const own = material.density_kg_m3 === null ? null : material.density_kg_m3 * section.properties.A_m2 * length_m;
      mass = mass === null || own === null ? null : mass + own;
      const g = found.of[i] ?? -1;
      if (g < 0) {
        rest = rest === null || own === null ? null : rest + own;
        continue;
      }
      mask |= 1 << g;
      members[g] = (members[g] ?? 0) + many;
      materials[g]?.add(material.name);
      before[g]?.add(section.name);
      const same = steel[g]?.findIndex((one) => one.material === material.name) ?? -1;
      const known = steel[g]?.[same];
      if (known) steel[g]?.splice(same, 1, { material: known.material, length_m: known.length_m + length_m });
      else steel[g]?.push({ material: material.name, length_m });
    }
    frames.push({ id: frame.id, frames: many, off, mask, ratio, mass_kg: mass, rest_kg: rest, steel });
  }
  const empty = groups.find((_, g) => members[g] === 0);
  if (empty) return { refused: `No frame that can run has a member of ${empty.by} ${empty.name}.` };
  return {
    frames,
    materials: materials.map((names) => [...names]),
    groups: groups.map((group, g) => ({
      ...group,
      members: members[g] ?? 0,
      before: [...(before[g] ?? [])],
      material: [...(materials[g] ?? [])][0] ?? '',
    })),
  };
}
