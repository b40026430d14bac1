import type { Draft } from '@/lib/intake/draft';
import { idKey } from '@/lib/intake/ids';
import { readWord } from '@/lib/intake/words';
import { type Limit, type Measure, roles } from '@/lib/model/frame';

export type LimitTarget = Pick<Limit, 'target' | 'name'>;

/**
 * What the word in "applies to" is in this frame: a member, span, node, place, group, role, or `*`; of these only what
 * the measure can be taken of. Null where it is nothing here.
 */
export function targetOf(draft: Draft, name: string, measure: Measure): LimitTarget | null {
  if (name === '*') return { target: 'all', name };
  const key = idKey(name);
  const ofNodes = measure === 'displacement' || measure === 'spread';
  if (!ofNodes) {
    const member = draft.members.find((each) => idKey(each.id) === key);
    if (member) return { target: 'member', name: member.id };
    const span = draft.members.find((each) => each.span !== null && idKey(each.span) === key)?.span;
    if (span) return { target: 'span', name: span };
  } else {
    const node = draft.nodes.find((each) => idKey(each.id) === key);
    if (node) return { target: 'node', name: node.id };
    const place = draft.nodes.find((each) => each.place !== null && idKey(each.place) === key)?.place;
    if (place) return { target: 'place', name: place };
  }
  const group = draft.members.find((each) => each.group !== null && idKey(each.group) === key)?.group;
  if (group) return { target: 'group', name: group };
  const role = readWord(name, roles);
  return role ? { target: 'role', name: role } : null;
}
