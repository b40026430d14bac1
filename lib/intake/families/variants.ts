import type { FrameEntry, Variant } from '@/lib/intake/batch';
import { nearestAny } from '@/lib/intake/distance';
import { evaluate } from '@/lib/intake/expressions/evaluate';
import { ExpressionFault } from '@/lib/intake/expressions/tokens';
import { Expressions } from '@/lib/intake/expressions/expression';
import { type Family, nearestFamily, type Parameter, parameterQuantities } from '@/lib/intake/families/family';
import type { Place, ProblemList } from '@/lib/intake/problem-list';
import type { Read, Reader, Reading } from '@/lib/intake/reader';
import type { Materials } from '@/lib/intake/sheets/materials';
import type { Sections } from '@/lib/intake/sheets/sections';
import { type Column, headingPlace, type Part, placeAt, placeOf, type Row } from '@/lib/intake/table';
import { idKey } from '@/lib/intake/ids';
import { wordKey } from '@/lib/intake/words';
import type { FamilyParameter } from '@/lib/model/frame';
import * as say from '@/lib/problems/wording';
import { factorFor } from '@/lib/units/parse-unit';

/** Reads the parameters of variants: one reader for all rows of the Variants sheet. */
export class VariantReader {
  private readonly expressions = new Expressions();
  private readonly bound = new Map<Part, ReadonlyMap<string, Column>>();
  private readonly factors = new Map<Column, Map<Parameter, number>>();

  constructor(
    private readonly families: ReadonlyMap<string, Family>,
    private readonly sections: Sections,
    private readonly materials: Materials,
    private readonly reader: Reader,
    private readonly problems: ProblemList,
  ) {}

  /** Columns of a part by the key of the parameter they head; columns that head none of any family are told. */
  private columns(part: Part): ReadonlyMap<string, Column> {
    let columns = this.bound.get(part);
    if (columns) return columns;
    const found = new Map<string, Column>();
    const used = this.familiesOf(part);
    const names = used.flatMap((family) => [...family.parameters.values()].map((p) => [p.key, p.name] as const));
    const known = new Set(names.map(([key]) => key));
    for (const column of part.columns) {
      if (column.known !== null) continue;
      const whole = wordKey(column.text);
      const key = known.has(whole) ? whole : wordKey(column.name);
      if (known.has(key) && !found.has(key)) found.set(key, column);
      else if (known.has(key)) {
        const fault = {
          code: 'conflicting-row',
          message: say.columnTwice(column.name, found.get(key)?.text ?? ''),
          stopsAll: true,
        } as const;
        this.problems.add(headingPlace(part, column), fault, null);
      } else if (used.length > 0 && part.dataRows.some((row) => row.cells[column.index])) {
        const message = say.unknownParameter(column.name, nearestAny(key, names), used.map((family) => family.name)); // prettier-ignore
        column.problem = this.problems.add(headingPlace(part, column), { code: 'unknown-word', message }, null);
      } else if (used.length > 0) {
        this.problems.add(
          headingPlace(part, column),
          { code: 'column-ignored', message: say.columnIgnored(column.text, 'Variants') },
          null,
        );
      }
    }
    columns = found;
    this.bound.set(part, columns);
    return columns;
  }

  private familiesOf(part: Part): Family[] {
    const at = part.byName.get('family')?.index ?? -1;
    const keys = new Set(part.dataRows.map((row) => idKey(row.cells[at]?.text ?? '')));
    return [...this.families.values()].filter((family) => keys.has(family.key));
  }

  /** A variant's family with its parameters in SI; null where the family itself is not known (told). */
  read(row: Row, frameId: string): { variant: Variant; reading: Reading } | null {
    const nobody: Reading = { frame: frameId, parameters: null, variantPlace: null };
    const name = this.reader.needId(row, 'family', nobody);
    if (name === undefined) return null;
    const family = this.families.get(idKey(name));
    if (!family) {
      this.reader.tell(
        row,
        'family',
        { code: 'unknown-word', message: say.unknownFamily(name, nearestFamily(name, this.families)) },
        nobody,
      );
      return null;
    }
    const columns = this.columns(row.part);
    const values = new Map<string, number | string>();
    const shown: Record<string, FamilyParameter> = {};
    let complete = family.sound;
    if (!family.sound) this.reader.tell(row, 'family', { code: 'bad-expression', message: say.familyWrong(name) }, nobody);
    for (const parameter of family.parameters.values()) {
      const value = this.parameter(row, parameter, columns.get(parameter.key), family, nobody);
      if (value === undefined) complete = false;
      else {
        values.set(parameter.key, value);
        shown[parameter.name] = { value, quantity: parameter.quantity };
      }
    }
    for (const column of row.part.columns) {
      if (!row.raw.cells[column.index] || column.known !== null) continue;
      if (column.problem) this.problems.touch(column.problem, frameId);
      else if (![...family.parameters.keys()].some((key) => columns.get(key) === column)) {
        const fault = { code: 'unknown-word', message: say.parameterOfOther(column.name, name) } as const;
        this.problems.add(placeAt(row, column), fault, frameId);
      }
    }
    const variantPlace = (parameter: string | null): Place => {
      const column = parameter === null ? undefined : columns.get(wordKey(parameter));
      return column ? placeAt(row, column) : placeOf(row, 'frame');
    };
    const reading: Reading = { frame: frameId, parameters: values, variantPlace };
    if (complete) complete = this.obeys(family, reading);
    return { variant: { family, origin: { name: family.name, parameters: shown }, row, complete }, reading };
  }

  private parameter(
    row: Row,
    parameter: Parameter,
    column: Column | undefined,
    family: Family,
    reading: Reading,
  ): number | string | undefined {
    const value = column ? this.typed(row, parameter, column, reading) : null;
    if (value === undefined) return undefined;
    if (value !== null) return this.inRange(row, parameter, column, value, reading);
    if (parameter.default !== null) {
      // a section by default is a name like any other
      return parameter.default;
    }
    if (column)
      this.problems.add(placeAt(row, column), { code: 'missing-id', message: say.parameterBlank(parameter.name) }, reading.frame);
    else {
      const place = { ...headingPlace(row.part, { index: 0, text: parameter.name }), column: null, found: null };
      this.problems.add(
        place,
        { code: 'missing-column', message: say.parameterColumn(parameter.name, family.name) },
        reading.frame,
      );
    }
    return undefined;
  }

  private typed(row: Row, parameter: Parameter, column: Column, reading: Reading): Read<number | string> {
    const tell = (fault: { code: 'unknown-section' | 'unknown-material' | 'unknown-word'; message: string }): undefined => {
      this.problems.add(placeAt(row, column), fault, reading.frame);
      return undefined;
    };
    const quantity = parameterQuantities[parameter.quantity];
    const cell = row.raw.cells[column.index];
    const mayBeNone = parameter.default === 'none' && cell?.kind === 'text' && wordKey(cell.text) === 'none';
    if (mayBeNone) return 'none';
    if (quantity !== null) return this.reader.numberAs(row, column, quantity, this.factor(row.part, column, parameter), reading);
    const text = this.reader.textAt(row, column, reading);
    if (text === null || text === undefined) return text;
    if (parameter.quantity === 'choice') {
      const choice = parameter.choices.find((each) => wordKey(each) === wordKey(text));
      return choice ?? tell({ code: 'unknown-word', message: say.unknownWord(parameter.name, text, parameter.choices) });
    }
    const found = parameter.quantity === 'section' ? this.sections.find(text) : this.materials.find(text);
    if (!('suggestion' in found)) return text;
    if (found.retired) {
      return tell({
        code: parameter.quantity === 'section' ? 'unknown-section' : 'unknown-material',
        message: say.retired(text),
      });
    }
    return parameter.quantity === 'section'
      ? tell({ code: 'unknown-section', message: say.unknownSection(text, found.suggestion) })
      : tell({ code: 'unknown-material', message: say.unknownMaterial(text, found.suggestion) });
  }

  /** SI per number of a column: its heading's unit, else the family's (else the batch's, which the family's falls back on). */
  private factor(part: Part, column: Column, parameter: Parameter): number {
    let known = this.factors.get(column);
    if (!known) this.factors.set(column, (known = new Map()));
    const before = known.get(parameter);
    if (before !== undefined) return before;
    let factor = parameter.factor;
    const quantity = parameterQuantities[parameter.quantity];
    const typed =
      column.text.trim() === column.name
        ? null
        : column.text
            .slice(column.name.length)
            .trim()
            .replace(/^[[(](.*)[\])]$/s, '$1');
    if (column.unit && quantity !== null) {
      const own = factorFor(column.unit, quantity);
      if (own !== null) factor = own;
      else column.problem ??= this.problems.add(headingPlace(part, column), { code: 'wrong-unit-kind', message: say.wrongUnitKind(column.unit.text, quantity) }, null); // prettier-ignore
    } else if (typed && quantity !== null && quantity !== 'number' && wordKey(column.text) !== parameter.key) {
      column.problem ??= this.problems.add(headingPlace(part, column), { code: 'unknown-unit', message: say.unknownUnit(typed, column.text) }, null); // prettier-ignore
    }
    known.set(parameter, factor);
    return factor;
  }

  private inRange(
    row: Row,
    parameter: Parameter,
    column: Column | undefined,
    value: number | string,
    reading: Reading,
  ): number | string | undefined {
    if (typeof value === 'string' || !column) return value;
    const { min, max } = parameter;
    const tooSmall = min !== null && (min.open ? value <= min.value : value < min.value - Math.abs(min.value) * 1e-12);
    const tooLarge = max !== null && (max.open ? value >= max.value : value > max.value + Math.abs(max.value) * 1e-12);
    if (!tooSmall && !tooLarge) return value;
    const range = { min: min && min.value / parameter.factor, max: max && max.value / parameter.factor, open: (tooSmall ? min?.open : max?.open) ?? false }; // prettier-ignore
    this.problems.add(
      placeAt(row, column),
      { code: 'out-of-range', message: say.parameterRange(parameter.name, range) },
      reading.frame,
    );
    return undefined;
  }

  private obeys(family: Family, reading: Reading): boolean {
    let sound = true;
    for (const rule of family.rules) {
      const { node } = this.expressions.read(rule.when);
      try {
        if (!node || !reading.parameters || evaluate(node, reading.parameters) !== true) continue;
      } catch (fault) {
        if (!(fault instanceof ExpressionFault)) throw fault;
        continue;
      }
      const place = reading.variantPlace?.(rule.parameter);
      if (place) this.problems.add(place, { code: 'out-of-range', message: rule.message }, reading.frame);
      sound = false;
    }
    return sound;
  }
}

/** True for a frame whose rows can be read: not a variant, or one with all its parameters. */
export function isReadable(frame: FrameEntry): boolean {
  return frame.variant === null || frame.variant.complete;
}
