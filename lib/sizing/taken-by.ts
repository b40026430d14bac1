import type { Frame } from '@/lib/model/frame';
import { groupsOf } from '@/lib/sizing/members-of';
import type { SectionTaken } from '@/lib/sizing/section-taken';
import type { SizedBy } from '@/lib/sizing/sizing';

/** Members of the frame as it is stored: one, or all of a role, group or section. */
export interface TryOf {
  readonly by: SizedBy | 'member';
  readonly name: string;
}

export interface TriedSection {
  readonly of: TryOf;
  readonly taken: SectionTaken;
}

/** Whether a member is what a try is of. @param frame as it is stored */
export function takenBy(frame: Frame, of: TryOf): (member: number) => boolean {
  if (of.by === 'member') return (i) => frame.members[i]?.id === of.name;
  const found = groupsOf(frame, [{ by: of.by, name: of.name }]);
  return (i) => !('twice' in found) && found.of[i] === 0;
}
