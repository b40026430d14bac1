import type { Change } from '@/lib/changes/change';
import { changeSection, readForChange } from '@/lib/changes/change-section';
import { changeSetting } from '@/lib/changes/change-setting';
import { listCombinations } from '@/lib/changes/list-combinations';
import { withLatest } from '@/lib/changes/with-own';
import { officeCombinations } from '@/lib/changes/office-combinations';
import type { OfficeSet } from '@/lib/combinations/office-set';
import type { OwnThing } from '@/lib/intake/own/own-thing';
import type { StoredInput } from '@/lib/intake/rows/input-rows';

/**
 * An input with changes made to its rows, one after the other; rows that no change touches stay the very same.
 *
 * @param by who made the changes: their rows say so
 * @param sets the versions of the office's combination sets that the changes name, by `setKey`
 * @param own the office's own sections and materials as they stand
 * @throws {RangeError} for a change that the sheets would refuse: that is asked for before (`readSetting`, `previewSection`)
 */
export function applyChanges(
  input: StoredInput,
  changes: readonly Change[],
  by: string,
  sets: ReadonlyMap<string, OfficeSet> = new Map(),
  own: readonly OwnThing[] = [],
): StoredInput {
  return changes.reduce((rows, change) => applyOne(rows, change, by, sets, own), input);
}

/** A version of an office's set, as `applyChanges` looks for it. */
export const setKey = ({ set, version }: { readonly set: number; readonly version: number }): string => `${set}.${version}`;

function applyOne(
  input: StoredInput,
  change: Change,
  by: string,
  sets: ReadonlyMap<string, OfficeSet>,
  own: readonly OwnThing[],
): StoredInput {
  switch (change.kind) {
    case 'setting':
      return changeSetting(input, change, by);
    case 'section': {
      const made = changeSection(input, readForChange(input, own), change, by);
      if ('refused' in made) throw new RangeError(`Expected a change of section that the rows can say: ${made.refused}`);
      return made.input;
    }
    case 'list combinations':
      return listCombinations(input, change, by);
    case 'own version':
      return withLatest(input, change, own);
    case 'office combinations': {
      const set = sets.get(setKey(change));
      if (!set) throw new RangeError(`Expected version ${change.version} of the office's combination set ${change.set}`);
      return officeCombinations(input, change, set, by);
    }
  }
}
