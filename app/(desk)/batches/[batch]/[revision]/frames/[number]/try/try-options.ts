import type { FinderOption } from '@/components/ui/finder';
import type { Frame } from '@/lib/model/frame';
import type { TryOf } from '@/lib/sizing/taken-by';

/** "role rafter", "member AB": one text for what a try is of. */
export const wordsOf = ({ by, name }: TryOf): string => `${by} ${name}`;

/** What of a frame another section can be tried on: roles, groups, sections and members that it has. */
export function tryOptions(frame: Frame): { readonly options: readonly FinderOption[]; readonly of: ReadonlyMap<string, TryOf> } {
  const of = new Map<string, TryOf>();
  const options: FinderOption[] = [];
  const add = (by: TryOf['by'], heading: string, name: string, note: string): void => {
    const value = wordsOf({ by, name });
    if (of.has(value)) return;
    of.set(value, { by, name });
    options.push({ value, label: value, group: heading, note });
  };
  const section = (i: number): string => frame.sections[i]?.name ?? '';
  const many = (count: number): string => `${count} ${count === 1 ? 'member' : 'members'}`;
  for (const { role } of frame.members)
    if (role !== null) add('role', 'Roles', role, many(frame.members.filter((one) => one.role === role).length));
  for (const { group } of frame.members)
    if (group !== null) add('group', 'Groups', group, many(frame.members.filter((one) => one.group === group).length));
  for (const { section: i } of frame.members)
    add('section', 'Sections', section(i), many(frame.members.filter((one) => one.section === i).length));
  for (const member of frame.members)
    add('member', 'Members', member.id, [member.role, section(member.section)].filter(Boolean).join(', '));
  return { options, of };
}
