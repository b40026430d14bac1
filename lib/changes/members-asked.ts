/** Which members a change of section is for. */
import type { SectionChange } from '@/lib/changes/change';
import { idKey } from '@/lib/intake/ids';
import type { Member, Section } from '@/lib/model/frame';

type Asked = SectionChange['what'];

interface MembersAsked {
  /** Whether a member is asked for; members named one by one are counted. */
  readonly takes: (frame: string, member: Member, section: Section) => boolean;
  /** "AB of F9": the first of the members named one by one that was not seen; else null. */
  readonly missing: () => string | null;
}

/** A member is asked for where it fits everything that is said: its section, role, group, span, frame, and the list of members. */
export function asksFor({ section, role, group, span, frame, members }: Asked): MembersAsked {
  const listed = members && new Map(members.map((one) => [key(one.frame, one.member), one]));
  const unseen = new Map(listed);
  const fits = (wanted: string | undefined, has: string | null): boolean =>
    wanted === undefined || (has !== null && idKey(wanted) === idKey(has));
  return {
    takes: (of, member, has) => {
      if (listed) {
        const one = key(of, member.id);
        unseen.delete(one);
        if (!listed.has(one)) return false;
      }
      return (
        fits(section, has.name) &&
        (role === undefined || member.role === role) &&
        fits(group, member.group) &&
        fits(span, member.span) &&
        fits(frame, of)
      );
    },
    missing: () => {
      const [first] = unseen.values();
      return first ? `${first.member} of ${first.frame}` : null;
    },
  };
}

const key = (frame: string, member: string): string => `${idKey(frame)}\n${idKey(member)}`;

/** "section IPE 300, role rafter, 12 members": what is asked for, in words. */
export function askedWords({ section, role, group, span, frame, members }: Asked): string {
  const [only] = members ?? [];
  const words = [
    section === undefined ? null : `members of section ${section}`,
    role === undefined ? null : `role ${role}`,
    group === undefined ? null : `group ${group}`,
    span === undefined ? null : `span ${span}`,
    frame === undefined ? null : `frame ${frame}`,
    only === undefined ? null : members?.length === 1 ? `${only.member} of ${only.frame}` : `${members?.length} members chosen`,
  ];
  return words.filter((word) => word !== null).join(', ');
}
