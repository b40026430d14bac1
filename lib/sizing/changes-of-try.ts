import type { SectionChange } from '@/lib/changes/change';
import type { Frame } from '@/lib/model/frame';
import { changesOf } from '@/lib/sizing/changes-of';
import { takenBy, type TriedSection } from '@/lib/sizing/taken-by';

export interface TryChanges {
  /** The very members of this frame. */
  readonly here: readonly SectionChange[];
  /** Every member of the role, group or section, in every frame; empty where a try is of single members or two are of one member. */
  readonly everywhere: readonly SectionChange[];
}

/** A try as changes for the next revision. @param frame as it is stored */
export function changesOfTry(frame: Frame, tried: readonly TriedSection[]): TryChanges {
  const bySection = new Map<string, string[]>();
  let twice = false;
  const has = tried.map(({ of }) => takenBy(frame, of));
  for (const [i, member] of frame.members.entries()) {
    const which = has.flatMap((takes, t) => (takes(i) ? [t] : []));
    if (which.length > 1) twice = true;
    const to = tried[which.at(-1) ?? -1]?.taken.section.name;
    if (to === undefined || to === frame.sections[member.section]?.name) continue;
    bySection.set(to, [...(bySection.get(to) ?? []), member.id]);
  }
  const here = [...bySection].map(([to, members]): SectionChange => ({
    kind: 'section',
    what: { members: members.map((member) => ({ frame: frame.id, member })) },
    to,
  }));
  const groups = tried.flatMap(({ of: { by, name }, taken }) =>
    by === 'member' ? [] : [{ by, name, chosen: taken.section.name, before: [''] }],
  );
  const everywhere = twice || groups.length < tried.length ? [] : changesOf(groups).changes;
  return { here, everywhere };
}
