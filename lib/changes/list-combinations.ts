/** Combinations changed on screen, as an edit of a batch's rows: listed ones, new ones, and generated ones written down. */
import type { ListCombinationsChange } from '@/lib/changes/change';
import { ChangeRefused } from '@/lib/changes/change-refused';
import { changeSetting } from '@/lib/changes/change-setting';
import { listedIn, type RowToWrite, withEdits, withRows } from '@/lib/changes/combination-rows';
import { type CombinationShown, shownCombinations } from '@/lib/combinations/shown-combinations';
import { idKey } from '@/lib/intake/ids';
import type { Intake } from '@/lib/intake/intake';
import type { StoredInput } from '@/lib/intake/rows/input-rows';
import { readRows } from '@/lib/intake/rows/read-rows';
import type { Combination, Frame, LoadCase } from '@/lib/model/frame';

/** Rows that one change writes at most. */
export const mostRowsWritten = 100_000;

/** The rows as the reader takes them. */
export const readAgain = (input: StoredInput): Intake =>
  readRows({ ...input, identity: { name: '', sha256: '', files: [] }, problems: [] });

/**
 * Edits the Combinations sheet: rows left out, factors changed, rows added. With `generated: 'write'` (as where it is not
 * said) every generated combination is written as a row too and `combination set` becomes as listed; with `keep` the set
 * goes on generating. What all frames share is one row; what is of some only is a row for each.
 *
 * @throws {ChangeRefused} for a name that is unknown or taken, a case that is unknown, more rows than `mostRowsWritten`,
 *   rows that the reader would refuse, and a case that would silently be in no combination any more
 */
export function listCombinations(input: StoredInput, change: ListCombinationsChange, by: string): StoredInput {
  const read = readAgain(input);
  const frames = read.frames.flatMap(({ frame }) => frame ?? []);
  const shown = shownCombinations(frames, read.settings.combinationSet);
  const write = change.generated !== 'keep';
  const listed = listedIn(input);
  const ofSet = shown.filter(({ name, clause }) => clause !== null && !listed(name));
  const set = read.settings.combinationSet;
  if (
    write &&
    ofSet.length === 0 &&
    set === null &&
    (change.add ?? []).length + change.leaveOut.length + change.factors.length === 0
  )
    throw new ChangeRefused('Nothing is generated in this revision');
  const edits = editsOf(change, shown, write);
  const rows = [...(write ? rowsToWrite(frames, ofSet, edits) : []), ...rowsAdded(change, frames, shown)];
  if (rows.length > mostRowsWritten) throw new ChangeRefused(`More than ${mostRowsWritten.toLocaleString('en-GB')} rows would be written. List the combinations in the sheets`); // prettier-ignore
  const edited = withEdits(input, edits, by);
  const written = rows.length === 0 ? edited : withRows(edited, rows, by);
  const after = write && set !== null ? changeSetting(written, { kind: 'setting', setting: 'combinationSet', value: 'as listed' }, by) : written; // prettier-ignore
  refuseNewErrors(read, after);
  return after;
}

type Edits = ReturnType<typeof editsOf>;

function editsOf({ leaveOut, factors }: ListCombinationsChange, shown: readonly CombinationShown[], write: boolean) {
  const known = new Map(shown.map((each) => [idKey(each.name), each]));
  const byName = new Map<string, Map<string, { case: string; factor: number }>>();
  const of = (name: string): CombinationShown => {
    const found = known.get(idKey(name));
    if (!found) throw new ChangeRefused(`${name} is no combination of this revision. Open it again`);
    if (found.clause !== null && !write)
      throw new ChangeRefused(`${name} is generated: it can be changed only where the generated ones are written into the sheet`);
    return found;
  };
  for (const { combination, case: name, factor } of factors) {
    const own = byName.get(idKey(of(combination).name)) ?? new Map<string, { case: string; factor: number }>();
    own.set(idKey(name), { case: name, factor });
    byName.set(idKey(combination), own);
  }
  return { out: new Set(leaveOut.map((name) => idKey(of(name).name))), factors: byName };
}

function rowsToWrite(frames: readonly Frame[], ofSet: readonly CombinationShown[], { out, factors }: Edits): RowToWrite[] {
  return ofSet
    .filter(({ name }) => !out.has(idKey(name)))
    .flatMap(({ name, purpose, terms, frames: count }): RowToWrite[] => {
      const changed = factors.get(idKey(name));
      const own = terms.map((term) => ({ ...term, factor: changed?.get(idKey(term.case))?.factor ?? term.factor }));
      const added = [...(changed ?? [])].filter(([key]) => !terms.some((term) => idKey(term.case) === key));
      own.push(...added.map(([, term]) => ({ ...term })));
      if (count === frames.length) return [{ name, purpose, terms: own, frame: null }];
      return frames.filter((frame) => has(frame, name, terms)).map(({ id }) => ({ name, purpose, terms: own, frame: id }));
    });
}

/** Whether a frame has a combination of this name with these very terms. */
function has({ cases, combinations }: Frame, name: string, terms: RowToWrite['terms']): boolean {
  const own = combinations.find((each) => each.name === name);
  return (
    own?.terms.length === terms.length &&
    own.terms.every((term, i) => cases[term.case]?.name === terms[i]?.case && term.factor === terms[i]?.factor)
  );
}

function rowsAdded({ add }: ListCombinationsChange, frames: readonly Frame[], shown: readonly CombinationShown[]): RowToWrite[] {
  if (!add || add.length === 0) return [];
  const taken = new Set(shown.map(({ name }) => idKey(name)));
  const cases = new Map<string, string>();
  for (const list of new Set(frames.map((frame) => frame.cases))) for (const { name } of list) cases.set(idKey(name), name);
  return add.map(({ name, purpose, terms }) => {
    if (taken.has(idKey(name))) throw new ChangeRefused(`There is a combination ${name} already. Give the new one another name`);
    if (cases.has(idKey(name))) throw new ChangeRefused(`${name} is the name of a load case. Give the combination another`);
    taken.add(idKey(name));
    const own = terms.map((term) => {
      const known = cases.get(idKey(term.case));
      if (known === undefined) throw new ChangeRefused(`${term.case} is no load case of this revision`);
      return { case: known, factor: term.factor };
    });
    return { name, purpose, terms: own, frame: null };
  });
}

/**
 * Reads the rows again: what the reader refuses now and did not before stops the change, and so does a case that was "not
 * checked" for want of a rule and would no longer be said to be.
 *
 * @throws {ChangeRefused}
 */
export function refuseNewErrors(before: Intake, after: StoredInput): void {
  const read = readAgain(after);
  const said = (problems: Intake['problems']) => problems.filter(({ severity }) => severity === 'error');
  const known = new Set(said(before.problems).map(({ code, message }) => `${code} ${message}`));
  const fresh = said(read.problems).find(({ code, message }) => !known.has(`${code} ${message}`));
  if (fresh) throw new ChangeRefused(`${fresh.sheet ?? 'The sheets'}: ${fresh.message.replace(/\.$/, '')}`);
  for (const [i, { frame }] of read.frames.entries()) {
    const was = before.frames[i]?.frame;
    if (!frame || !was) continue;
    const lost = uncombined(frame.cases, frame.combinations).find(
      ({ name }) =>
        was.notChecked.some((reason) => reason.includes(name)) && !frame.notChecked.some((reason) => reason.includes(name)),
    );
    if (lost) throw new ChangeRefused(`No combination would hold ${lost.name} (${lost.kind}), for which the set has no rule. Add one that does`); // prettier-ignore
  }
}

/** Cases that no combination holds. */
export function uncombined(cases: readonly LoadCase[], combinations: readonly Combination[]): LoadCase[] {
  const held = new Set(combinations.flatMap(({ terms }) => terms.map((term) => term.case)));
  return cases.filter((_, i) => !held.has(i));
}
