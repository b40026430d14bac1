import type { SectionChange } from '@/lib/changes/change';
import { idKey } from '@/lib/intake/ids';
import { askedOf } from '@/lib/sizing/members-of';
import type { GroupFound } from '@/lib/sizing/sizing';

interface ChangesOf {
  /** In an order in which none takes up members that one before it has just changed. */
  readonly changes: readonly SectionChange[];
  /** Why they cannot be made one after the other; null where they can. */
  readonly refused: string | null;
}

/** What was found as changes of section for the next revision; a group that has its section already needs none. */
export function changesOf(groups: readonly Pick<GroupFound, 'by' | 'name' | 'chosen' | 'before'>[]): ChangesOf {
  let left = groups.flatMap(({ by, name, chosen, before }) =>
    chosen === null || before.every((one) => one === chosen) ? [] : [{ by, name, to: chosen }],
  );
  const changes: SectionChange[] = [];
  while (left.length > 0) {
    // members of a section are asked for by it: no other group may have taken it before
    const next = left.find(
      ({ to }, i) => !left.some((one, j) => j !== i && one.by === 'section' && idKey(one.name) === idKey(to)),
    );
    if (!next) {
      const names = left.map(({ name, to }) => `${name} to ${to}`).join(', ');
      return {
        changes: [],
        refused: `These sections change places (${names}), which one revision cannot do. Make them one after the other.`,
      };
    }
    changes.push({ kind: 'section', what: askedOf(next), to: next.to });
    left = left.filter((one) => one !== next);
  }
  return { changes, refused: null };
}
