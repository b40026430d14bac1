/** In a thread: by what members of a revision's frames may be sized together. */
import { versionsToSize } from '@/db/queries/sizing';
import { sizedBy, type SizedBy } from '@/lib/sizing/sizing';
import { openOnce } from './open-once';

export interface ListGroupsTask {
  /** The database's file. */
  readonly file: string;
  readonly revision: number;
}

export interface GroupListed {
  readonly by: SizedBy;
  readonly name: string;
  readonly members: number;
}

/** Those of most members first. */
export function listGroups({ file, revision }: ListGroupsTask): GroupListed[] {
  const counts: Record<SizedBy, Map<string, number>> = { role: new Map(), group: new Map(), section: new Map() };
  const add = (by: SizedBy, name: string | null | undefined, many: number): void => {
    if (name) counts[by].set(name, (counts[by].get(name) ?? 0) + many);
  };
  for (const { frame, frames } of versionsToSize(openOnce(file).raw, revision)) {
    for (const member of frame.members) {
      add('role', member.role, frames);
      add('group', member.group, frames);
      add('section', frame.sections[member.section]?.name, frames);
    }
  }
  return sizedBy.flatMap((by) =>
    [...counts[by]].map(([name, members]) => ({ by, name, members })).sort((a, b) => b.members - a.members),
  );
}
