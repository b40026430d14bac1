import type { Change } from '@/lib/changes/change';
import { changeSection, readForChange } from '@/lib/changes/change-section';
import { changeSetting } from '@/lib/changes/change-setting';
import { listCombinations } from '@/lib/changes/list-combinations';
import type { StoredInput } from '@/lib/intake/rows/input-rows';

/**
 * An input with changes made to its rows, one after the other; rows that no change touches stay the very same.
 *
 * @param by who made the changes: their rows say so
 * @throws {RangeError} for a change that the sheets would refuse: that is asked for before (`readSetting`, `previewSection`)
 */
export function applyChanges(input: StoredInput, changes: readonly Change[], by: string): StoredInput {
  return changes.reduce((rows, change) => applyOne(rows, change, by), input);
}

function applyOne(input: StoredInput, change: Change, by: string): StoredInput {
  switch (change.kind) {
    case 'setting':
      return changeSetting(input, change, by);
    case 'section': {
      const made = changeSection(input, readForChange(input), change, by);
      if ('refused' in made) throw new RangeError(`Expected a change of section that the rows can say: ${made.refused}`);
      return made.input;
    }
    case 'list combinations':
      return listCombinations(input, change, by);
  }
}
