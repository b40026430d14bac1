/** An office's own combination set put to a batch: what its rules make of the load cases, written into the Combinations sheet. */
import type { OfficeCombinationsChange } from '@/lib/changes/change';
import { ChangeRefused } from '@/lib/changes/change-refused';
import { changeSetting } from '@/lib/changes/change-setting';
import { listedIn, type RowToWrite, withoutListed, withRows } from '@/lib/changes/combination-rows';
import { mostRowsWritten, readAgain, refuseNewErrors, uncombined } from '@/lib/changes/list-combinations';
import { type Generated, generateCombinations, mostGenerated, sameTerms } from '@/lib/combinations/generate';
import { type OfficeSet, officeRuleSet } from '@/lib/combinations/office-set';
import { idKey } from '@/lib/intake/ids';
import type { StoredInput } from '@/lib/intake/rows/input-rows';
import type { Combination, LoadCase } from '@/lib/model/frame';

/**
 * Writes what a set makes as rows, beside the listed ones or in their place, and sets `combination set` to as listed: the
 * input workbook then holds every combination and gives the same frames wherever it is read. A listed combination of the
 * same name, or of the same factors, stands in place of one that would be made.
 *
 * @throws {ChangeRefused} for rules that cannot be read, too many combinations, a design code that needs another level of
 *   safety, and a load case that no combination would hold
 */
export function officeCombinations(
  input: StoredInput,
  { listed }: OfficeCombinationsChange,
  set: OfficeSet,
  by: string,
): StoredInput {
  const { set: rules } = officeRuleSet(set);
  if (rules === null) throw new ChangeRefused(`The set ${set.name} has a rule that cannot be read`);
  const before = readAgain(input);
  const { strengthCheck } = before.settings;
  const needs = strengthCheck === 'AISC 360-22 ASD' ? 'allowable' : 'factored';
  if (strengthCheck !== 'elastic stress' && needs === 'factored' && set.level !== needs)
    throw new ChangeRefused(`${strengthCheck} needs factored combinations; ${set.name} is of allowable stress`);
  const base = listed === 'replace' ? withoutListed(input) : input;
  const isListed = listed === 'replace' ? () => false : listedIn(input);
  const frames = before.frames.flatMap(({ frame }) => frame ?? []);
  const made = new Map<readonly LoadCase[], Generated>();
  const rows = new Map<string, { row: RowToWrite; frames: string[] }>();
  for (const frame of frames) {
    let own = made.get(frame.cases);
    if (!own) made.set(frame.cases, (own = generateCombinations(frame.cases, rules)));
    if (own.tooMany !== null)
      throw new ChangeRefused(`${set.name} makes ${own.tooMany.toLocaleString('en-GB')} combinations of the cases of ${frame.id}; at most ${mostGenerated.toLocaleString('en-GB')} are taken`); // prettier-ignore
    const kept = frame.combinations.filter(({ name }) => isListed(name));
    const list = beside(own.list, kept);
    const [lost] = uncombined(frame.cases, [...list, ...kept]);
    if (lost) throw new ChangeRefused(`${set.name} puts ${lost.name} (${lost.kind}) of ${frame.id} into no combination. Add a rule that holds it, or a row`); // prettier-ignore
    for (const { name, purpose, terms } of list) {
      const named = terms.map((term) => ({ case: frame.cases[term.case]?.name ?? '', factor: term.factor }));
      const key = JSON.stringify([name, purpose, named]);
      const known = rows.get(key);
      if (known) known.frames.push(frame.id);
      else rows.set(key, { row: { name, purpose, terms: named, frame: null }, frames: [frame.id] });
    }
  }
  if (rows.size === 0) throw new ChangeRefused(`${set.name} makes no combination of these load cases`);
  const written = [...rows.values()].flatMap(({ row, frames: of }) =>
    of.length === frames.length ? [row] : of.map((frame) => ({ ...row, frame })),
  );
  if (written.length > mostRowsWritten) throw new ChangeRefused(`More than ${mostRowsWritten.toLocaleString('en-GB')} rows would be written. List the combinations in the sheets`); // prettier-ignore
  const after = withRows(base, written, by);
  const chosen = before.settings.combinationSet === null ? after : changeSetting(after, { kind: 'setting', setting: 'combinationSet', value: 'as listed' }, by); // prettier-ignore
  refuseNewErrors(before, chosen);
  return chosen;
}

/** What is made, without what a listed one stands for already. */
function beside(made: readonly Combination[], listed: readonly Combination[]): readonly Combination[] {
  const names = new Set(listed.map(({ name }) => idKey(name)));
  const factors = new Set(listed.map(({ purpose, terms }) => sameTerms(purpose, terms)));
  return made.filter(({ name, purpose, terms }) => !names.has(idKey(name)) && !factors.has(sameTerms(purpose, terms)));
}
