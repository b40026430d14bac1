import { isOfficePart, officeSheetKind, ownSheets } from '@/lib/intake/own/own-sheets';
import type { OwnKind, OwnThing } from '@/lib/intake/own/own-thing';
import { idKey } from '@/lib/intake/ids';
import { rowsOfPart, type StoredInput } from '@/lib/intake/rows/input-rows';

/** The input with things of the office's own on sheets behind the others: its rows say by themselves what its frames are made of. */
export function withOwn({ sheets, rows }: StoredInput, things: Iterable<OwnThing>): StoredInput {
  const names = sheets.map(({ name }) => name);
  const parts = ownSheets([...things], sheets.length, names).flatMap((sheet) => sheet.parts);
  return {
    sheets: [...sheets, ...parts.map(({ name, file, decimalMark }) => ({ name, file, decimalMark }))],
    rows: [...rows, ...parts.flatMap((part) => rowsOfPart(part, part.order))],
  };
}

/**
 * The input with the office's latest version of a section or material in place of the one that its rows hold.
 *
 * @throws {RangeError} where the rows hold none of the name, or the office offers none
 */
export function withLatest(
  input: StoredInput,
  { part: kind, name }: { readonly part: OwnKind; readonly name: string },
  own: readonly OwnThing[],
): StoredInput {
  const key = idKey(name);
  const latest = own.find((thing) => thing.kind === kind && !thing.retired && idKey(thing.name) === key);
  const kept = input.rows.filter(({ part, cells }) => {
    const sheet = input.sheets[part ?? -1];
    const office = sheet !== undefined && isOfficePart(sheet) && officeSheetKind(sheet.name) === kind;
    return !(office && idKey(cells[0] ?? '') === key);
  });
  if (!latest || kept.length === input.rows.length) throw new RangeError(`Expected a ${kind} of the office’s own, got ${name}`);
  return withOwn({ sheets: input.sheets, rows: kept }, [latest]);
}
