import { asksFor } from '@/lib/changes/members-asked';
import type { Frame, Role } from '@/lib/model/frame';
import type { SizingGroup } from '@/lib/sizing/sizing';

/** What a change of section asks for, so that it is for the very members of the group. */
export function askedOf({ by, name }: Pick<SizingGroup, 'by' | 'name'>): { section?: string; role?: Role; group?: string } {
  return by === 'role' ? { role: name as Role } : { [by]: name };
}

/**
 * Which group each member of a frame is of: its place among the groups, −1 = none.
 *
 * @returns the member that is of two groups, where there is one: it cannot take two sections
 */
export function groupsOf(
  frame: Frame,
  groups: readonly Pick<SizingGroup, 'by' | 'name'>[],
): { readonly of: Int8Array } | { readonly twice: string } {
  const of = new Int8Array(frame.members.length).fill(-1);
  for (const [g, group] of groups.entries()) {
    const { takes } = asksFor(askedOf(group));
    for (const [i, member] of frame.members.entries()) {
      const section = frame.sections[member.section];
      if (!section || !takes(frame.id, member, section)) continue;
      if (of[i] !== -1) return { twice: `${member.id} of ${frame.id}` };
      of[i] = g;
    }
  }
  return { of };
}
