import type { RawRow } from '@/lib/intake/files/raw-sheet';
import type { HeadingMeaning } from '@/lib/intake/headings';
import { splitHeading } from '@/lib/intake/headings';
import type { Fault, ProblemList } from '@/lib/intake/problem-list';
import { openEnded, type SheetDefinition } from '@/lib/intake/sheet-definitions';
import { type Column, headingPlace, type Part } from '@/lib/intake/table';
import * as say from '@/lib/problems/wording';
import { batchUnit } from '@/lib/units/batch-unit';
import { factorFor, parseUnit, type Unit } from '@/lib/units/parse-unit';
import type { System } from '@/lib/units/quantity';

/** A unit as it stands in a unit row: brackets or not. */
function unitText(text: string): string {
  return text
    .trim()
    .replace(/^[[(](.*)[\])]$/s, '$1')
    .trim();
}

/**
 * The row if it is a unit row: every filled cell is a unit and at least one of them stands over numbers.
 * A row of ids such as `m`, `k` over text columns only is data. A row with a unit over numbers, no figure, and nothing
 * under the headings of texts is meant as one too: a word in it that is no unit is told, and not passed over.
 */
export function unitRowOf(
  row: RawRow,
  headings: readonly { readonly index: number; readonly meaning: HeadingMeaning }[],
  definition: SheetDefinition,
): RawRow | null {
  let overNumbers = false;
  let allUnits = true;
  let overTexts = false;
  for (const [index, cell] of row.cells.entries()) {
    if (!cell) continue;
    const text = unitText(cell.text);
    if (cell.kind !== 'text' || /^[\d.,+−]/.test(text)) return null;
    const unit = parseUnit(text);
    if (!unit) allUnits = false;
    const heading = headings.find((h) => h.index === index);
    if (!heading) continue;
    const open = heading.meaning.kind === 'unknown' && openEnded.has(definition.name);
    const numbers = open || (heading.meaning.kind === 'column' && definition.columns.get(heading.meaning.known) !== null);
    if (numbers && unit) overNumbers = true;
    if (!numbers && heading.meaning.kind === 'column' && !/^[-–—−]$/.test(text)) overTexts = true;
  }
  return overNumbers && (allUnits || !overTexts) ? row : null;
}

/** Finds a column's unit: its heading's, else the unit row's, else the batch's; tells an unknown one or one of the wrong kind. */
export function settleUnit(part: Part, column: Column, unitRow: RawRow | null, system: System, problems: ProblemList): void {
  const { quantity } = column;
  const inHeading = column.text.trim() === column.name ? null : splitHeading(column.text).unit;
  const inRow = unitRow?.cells[column.index]?.text ?? null;
  const typed = inHeading !== null && inHeading !== '' ? inHeading : inRow === null ? null : unitText(inRow);
  if (typed !== null && typed !== '' && typed !== '-') {
    const unit = parseUnit(typed);
    const fault = faultOf(unit, typed, column);
    if (unit && !fault) column.unit = unit;
    if (fault) {
      const place = inHeading
        ? headingPlace(part, column)
        : { ...headingPlace(part, column), row: unitRow?.row ?? null, found: inRow };
      column.problem = problems.add(place, fault, null);
    }
  }
  if (quantity === null || quantity === 'load') return;
  column.factor = factorFor(column.unit ?? batchUnit(quantity, system), quantity) ?? NaN;
}

function faultOf(unit: Unit | null, typed: string, column: Column): Fault | null {
  const { quantity, text } = column;
  if (quantity === null) return null;
  // "ratio (L/n)", "factor (γ)": words behind a plain number's heading are no units
  if (!unit) return quantity === 'number' ? null : { code: 'unknown-unit', message: say.unknownUnit(typed, text) };
  const fits =
    quantity === 'load'
      ? unit.quantities.some((q) => q === 'lineLoad' || q === 'areaLoad' || q === 'force' || q === 'moment')
      : factorFor(unit, quantity) !== null;
  return fits
    ? null
    : { code: 'wrong-unit-kind', message: say.wrongUnitKind(typed, quantity === 'load' ? 'lineLoad' : quantity) };
}
