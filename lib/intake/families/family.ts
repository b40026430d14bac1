import { nearestAny } from '@/lib/intake/distance';
import { idKey } from '@/lib/intake/ids';
import type { ProblemList } from '@/lib/intake/problem-list';
import { forNobody, type Read, type Reader } from '@/lib/intake/reader';
import type { SheetName } from '@/lib/intake/sheet-definitions';
import { columnOf, type Row, rawCell, type Table } from '@/lib/intake/table';
import { wordKey } from '@/lib/intake/words';
import * as say from '@/lib/problems/wording';
import { batchUnit } from '@/lib/units/batch-unit';
import { factorFor, parseUnit } from '@/lib/units/parse-unit';
import type { Quantity, System } from '@/lib/units/quantity';

/** Quantities of parameters as the Families sheet names them; null = text. */
export const parameterQuantities = {
  length: 'length',
  angle: 'angle',
  force: 'force',
  moment: 'moment',
  'line load': 'lineLoad',
  'area load': 'areaLoad',
  'translation stiffness': 'springTranslation',
  'rotation stiffness': 'springRotation',
  temperature: 'temperature',
  number: 'number',
  section: null,
  material: null,
  choice: null,
} as const satisfies Record<string, Quantity | null>;
export type ParameterQuantity = keyof typeof parameterQuantities;
const quantityNames = Object.keys(parameterQuantities) as ParameterQuantity[];

/** A bound of a parameter in SI; `open`: the bound itself is not allowed. */
export interface Bound {
  readonly value: number;
  readonly open: boolean;
}

export interface Parameter {
  readonly name: string;
  readonly key: string;
  readonly quantity: ParameterQuantity;
  /** SI per number where a variant's heading says no unit. */
  readonly factor: number;
  /** SI or text; 'none' = may be left out, and is then blank wherever it is used; null = must be given. */
  readonly default: number | string | null;
  readonly min: Bound | null;
  readonly max: Bound | null;
  readonly choices: readonly string[];
}

/** A combination of parameters that makes no frame. */
export interface Rule {
  /** True for what is not allowed. */
  readonly when: string;
  readonly parameter: string;
  readonly message: string;
}

export interface Family {
  readonly name: string;
  readonly key: string;
  readonly parameters: ReadonlyMap<string, Parameter>;
  /** A built-in family's own sheets; null = described in the file. */
  readonly builtIn: ReadonlyMap<SheetName, Table> | null;
  readonly rules: readonly Rule[];
  /** False where a row of its description is wrong (told): its variants cannot be read. */
  readonly sound: boolean;
}

/** Reads the Families sheet: a family for each name, in order. */
export function readFamilies(
  table: Table | undefined,
  system: System,
  reader: Reader,
  problems: ProblemList,
): Map<string, Family> {
  const families = new Map<string, Family & { parameters: Map<string, Parameter> }>();
  for (const row of table?.rows ?? []) {
    const name = reader.needId(row, 'family', forNobody);
    if (name === undefined) continue;
    const key = idKey(name);
    const family = families.get(key) ?? {
      name,
      key,
      parameters: new Map<string, Parameter>(),
      builtIn: null,
      rules: [],
      sound: true,
    };
    families.set(key, family);
    const { value: parameter, entries } = problems.record(() => readParameter(row, system, reader));
    let sound = parameter !== undefined && !entries.some((entry) => entry.severity === 'error');
    if (parameter && family.parameters.has(parameter.key)) {
      reader.tell(row, 'parameter', { code: 'conflicting-row', message: say.parameterTwice(parameter.name) }, forNobody);
      sound = false;
    } else if (parameter) family.parameters.set(parameter.key, parameter);
    if (!sound) families.set(key, { ...family, sound: false });
  }
  return families;
}

function readParameter(row: Row, system: System, reader: Reader): Parameter | undefined {
  const name = reader.needId(row, 'parameter', forNobody);
  const quantity = reader.word(row, 'quantity', quantityNames, forNobody);
  if (quantity === null)
    reader.tell(row, 'quantity', { code: 'unknown-word', message: say.unknownWord('quantity', '', quantityNames) }, forNobody);
  if (name === undefined || !quantity) return undefined;
  const unitQuantity = parameterQuantities[quantity];
  const factor = unitQuantity === null ? NaN : unitFactor(row, unitQuantity, system, reader);
  const choicesText = reader.text(row, 'choices', forNobody) ?? '';
  const choices = choicesText.split(/[,;|]/).map((each) => each.trim()).filter((each) => each !== ''); // prettier-ignore
  const value = (column: string): Read<number | string> => {
    const text = reader.text(row, column, forNobody);
    if (text === null || text === undefined || unitQuantity === null || wordKey(text) === 'none') return text;
    const at = columnOf(row, column);
    return at ? reader.numberAs(row, at, unitQuantity, factor, forNobody) : null;
  };
  const fallback = value('default');
  const choice = quantity === 'choice' && typeof fallback === 'string' && wordKey(fallback) !== 'none' ? choices.find((each) => wordKey(each) === wordKey(fallback)) : undefined; // prettier-ignore
  if (quantity === 'choice' && choices.length === 0) {
    reader.tell(row, 'choices', { code: 'unknown-word', message: say.choicesMissing(name) }, forNobody);
  }
  if (quantity === 'choice' && typeof fallback === 'string' && choices.length > 0 && !choice && wordKey(fallback) !== 'none') {
    reader.tell(row, 'default', { code: 'unknown-word', message: say.unknownWord('default', fallback, choices) }, forNobody);
  }
  return {
    name,
    key: wordKey(name),
    quantity,
    factor,
    default: choice ?? (typeof fallback === 'string' && wordKey(fallback) === 'none' ? 'none' : (fallback ?? null)),
    min: bound(row, 'min', unitQuantity, factor, reader),
    max: bound(row, 'max', unitQuantity, factor, reader),
    choices,
  };
}

function unitFactor(row: Row, quantity: Quantity, system: System, reader: Reader): number {
  const text = reader.text(row, 'unit', forNobody);
  const usual = factorFor(batchUnit(quantity, system), quantity) ?? NaN;
  if (text === null || text === undefined || text === '-') return usual;
  const unit = parseUnit(text.replace(/^[[(](.*)[\])]$/, '$1'));
  if (!unit) {
    reader.tell(row, 'unit', { code: 'unknown-unit', message: say.unknownUnit(text, 'unit') }, forNobody);
    return usual;
  }
  const factor = factorFor(unit, quantity);
  if (factor === null)
    reader.tell(row, 'unit', { code: 'wrong-unit-kind', message: say.wrongUnitKind(text, quantity) }, forNobody);
  return factor ?? usual;
}

/** A bound; one that is itself not allowed is written `> 0` or `< 1`. */
function bound(row: Row, column: string, quantity: Quantity | null, factor: number, reader: Reader): Bound | null {
  const at = columnOf(row, column);
  const cell = rawCell(row, column);
  if (!at || !cell || quantity === null) return null;
  const open = /^\s*[<>]\s*(.*)$/s.exec(cell.text)?.[1];
  const read = open === undefined ? row : withCell(row, at.index, open);
  const value = reader.numberAs(read, at, quantity, factor, forNobody);
  return value === null || value === undefined ? null : { value, open: open !== undefined };
}

function withCell(row: Row, index: number, text: string): Row {
  const cells = row.raw.cells.map((cell, i) => (i === index ? ({ kind: 'text', text } as const) : cell));
  // read as if from a text file: no note on a number stored as text
  return { part: { ...row.part, typed: false }, raw: { ...row.raw, cells } };
}

/** The nearest family's name, for a hint. */
export function nearestFamily(name: string, families: ReadonlyMap<string, Family>): string | null {
  return nearestAny(idKey(name), [...families.values()].map((family) => [family.key, family.name] as const)); // prettier-ignore
}
