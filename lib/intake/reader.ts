import { ExpressionFault } from '@/lib/intake/expressions/tokens';
import { evaluate, type Parameters, type Value } from '@/lib/intake/expressions/evaluate';
import { Expressions, isExpression } from '@/lib/intake/expressions/expression';
import { looksLikeDate } from '@/lib/intake/date-text';
import type { RawCell } from '@/lib/intake/files/raw-sheet';
import { idShown, numberAsId } from '@/lib/intake/ids';
import type { Fault, Place, ProblemList } from '@/lib/intake/problem-list';
import { type Column, placeAt, placeOf, type Row } from '@/lib/intake/table';
import { readWord, readYesNo } from '@/lib/intake/words';
import type { ProblemCode } from '@/lib/problems/problem';
import * as say from '@/lib/problems/wording';
import { scaled } from '@/lib/units/batch-unit';
import { factorFor, type Unit } from '@/lib/units/parse-unit';
import { type Quantity, quantityWords } from '@/lib/units/quantity';
import { readNumber } from '@/lib/units/read-number';

/** For whom a row is read: a frame, with the parameters of its family if it is a variant. */
export interface Reading {
  readonly frame: string | null;
  readonly parameters: Parameters | null;
  /** Where a variant gave a parameter (its own frame cell for null); null = not a variant. */
  readonly variantPlace: ((parameter: string | null) => Place) | null;
}

export const forNobody: Reading = { frame: null, parameters: null, variantPlace: null };

/** undefined = something is wrong and has been told; null = blank. */
export type Read<T> = T | null | undefined;

const none: Parameters = new Map();

/**
 * Reads cells by the rules of sheets §2: text, ids, words, yes/no, numbers with their units, and expressions in braces.
 * What is wrong is told at the cell; of a built-in family's row at the variant's cell.
 */
export class Reader {
  private readonly expressions = new Expressions();
  constructor(readonly problems: ProblemList) {}

  /** Tells a fault of a row's cell. */
  tell(row: Row, name: string, fault: Fault | { code: ProblemCode; message: string }, reading: Reading): void {
    this.problems.add(this.placeFor(row, name, reading), fault, reading.frame);
  }

  /** The cell to blame: the row's own, or the variant's where the row is a built-in family's. */
  placeFor(row: Row, name: string, reading: Reading): Place {
    if (!isBuiltIn(row) || !reading.variantPlace) return placeOf(row, name);
    const text = cellOf(row, name)?.text ?? '';
    return reading.variantPlace(isExpression(text) ? (this.expressions.read(text).names[0] ?? null) : null);
  }

  /** Text as typed, trimmed; an expression's text. */
  text(row: Row, name: string, reading: Reading): Read<string> {
    const column = this.column(row, name, reading);
    return column ? this.textAt(row, column, reading) : column;
  }

  textAt(row: Row, column: Column, reading: Reading): Read<string> {
    const value = this.valueOf(row, column, reading);
    if (value === null || value === undefined) return value;
    if (typeof value === 'object') return value.text.trim() === '' ? null : value.text.trim();
    return textOf(value);
  }

  id(row: Row, name: string, reading: Reading): Read<string> {
    const value = this.value(row, name, reading);
    if (value === null || value === undefined) return value;
    if (typeof value !== 'object') {
      const text = textOf(value);
      return text === null ? null : idShown(text);
    }
    if (value.kind === 'date') {
      this.tell(row, name, { code: 'date-for-number', message: say.dateForId(value.text, value.iso) }, reading);
      return undefined;
    }
    const text = idShown(value.text);
    return text === '' ? null : text;
  }

  /** An id that may not be blank. */
  needId(row: Row, name: string, reading: Reading): string | undefined {
    const id = this.id(row, name, reading);
    if (id === null) this.tell(row, name, { code: 'missing-id', message: say.missingId(name) }, reading);
    return id ?? undefined;
  }

  word<T extends string>(row: Row, name: string, words: readonly T[], reading: Reading): Read<T> {
    const text = this.text(row, name, reading);
    if (text === null || text === undefined) return text;
    const word = readWord(text, words);
    if (word) return word;
    this.tell(row, name, { code: 'unknown-word', message: say.unknownWord(name, text, words) }, reading);
    return undefined;
  }

  /** One of the words, or a number in SI; any other text is an unknown word. */
  wordOrNumber<T extends string>(row: Row, name: string, words: readonly T[], reading: Reading): Read<T | number> {
    const text = this.text(row, name, reading);
    if (text === null || text === undefined) return text;
    const word = readWord(text, words);
    if (word) return word;
    const cell = cellOf(row, name);
    const wordy = cell?.kind === 'text' && !isExpression(cell.text) && !/^[\s+\-−–]*[.,]?\d/.test(cell.text);
    if (wordy || cell?.kind === 'boolean') {
      this.tell(row, name, { code: 'unknown-word', message: say.unknownWordOrNumber(name, text, words) }, reading);
      return undefined;
    }
    return this.number(row, name, reading);
  }

  yesNo(row: Row, name: string, reading: Reading): boolean | undefined {
    const value = this.value(row, name, reading);
    if (value === undefined) return undefined;
    if (value === null) return false;
    if (typeof value === 'boolean') return value;
    const text = typeof value === 'object' ? value.text : String(value);
    const answer = readYesNo(text);
    if (answer !== null) return answer;
    this.tell(row, name, { code: 'unknown-word', message: say.unknownWord(name, text, ['yes', 'no']) }, reading);
    return undefined;
  }

  /** A number in SI by its column's unit. Text that is none is told. */
  number(row: Row, name: string, reading: Reading): Read<number> {
    const column = this.column(row, name, reading);
    if (!column) return column;
    if (!row.raw.cells[column.index]) return null;
    const quantity = column.quantity === null || column.quantity === 'load' ? 'number' : column.quantity;
    return this.numberAs(row, column, quantity, column.factor, reading);
  }

  /** A number of a column as a quantity that the row decides. @param factor SI per number where the cell types no unit */
  numberAs(row: Row, column: Column, quantity: Quantity, factor: number, reading: Reading): Read<number> {
    const value = this.valueOf(row, column, reading);
    if (value === null || value === undefined) return value;
    const name = column.known ?? column.name;
    if (typeof value === 'number') return value;
    if (typeof value !== 'object') {
      const text = textOf(value);
      if (text === null) return null;
      this.tell(row, name, { code: 'bad-expression', message: say.textForNumber(text) }, reading);
      return undefined;
    }
    if (value.kind === 'number') return scaled(value.value, factor);
    return this.fromText(row, column, value, quantity, factor, reading);
  }

  private fromText(row: Row, column: Column, cell: RawCell, quantity: Quantity, factor: number, reading: Reading): Read<number> {
    const tell = (fault: Fault): undefined => {
      this.problems.add(
        isBuiltIn(row) ? this.placeFor(row, column.known ?? '', reading) : placeAt(row, column),
        fault,
        reading.frame,
      );
      return undefined;
    };
    if (cell.kind === 'date') return tell({ code: 'date-for-number', message: say.dateForNumber(cell.text, column.text) });
    if (cell.text.trim() === '') return null;
    const found = cell.kind === 'text' ? readNumber(cell.text, { decimalMark: row.part.raw.decimalMark }) : null;
    if (!found || found.kind === 'not-a-number') {
      if (looksLikeDate(cell.text)) return tell({ code: 'date-for-number', message: say.dateForNumber(cell.text, column.text) });
      return tell({ code: 'not-a-number', message: say.notANumber(cell.text, column.text, quantityWords[quantity]) });
    }
    if (found.kind === 'ambiguous') return tell({ code: 'not-a-number', message: say.ambiguousComma(cell.text) });
    if (found.kind === 'unknown-unit')
      return tell({ code: 'unknown-unit', message: say.unknownUnit(found.unitText, column.text) });
    if (found.unit) return this.withUnit(found.value, found.unit, quantity, tell);
    if (row.part.typed && !isBuiltIn(row)) tell({ code: 'text-number', message: say.textNumber(cell.text) });
    return scaled(found.value, factor);
  }

  private withUnit(value: number, unit: Unit, quantity: Quantity, tell: (fault: Fault) => undefined): Read<number> {
    const factor = factorFor(unit, quantity);
    if (factor === null) return tell({ code: 'wrong-unit-kind', message: say.wrongUnitKind(unit.text, quantity) });
    tell({ code: 'text-number', message: say.unitInCell(unit.text) });
    return scaled(value, factor);
  }

  /** False where a `when` drops the row, or cannot be evaluated (told). */
  keeps(row: Row, reading: Reading): boolean {
    const column = row.part.byName.get('when');
    const cell = column && row.raw.cells[column.index];
    if (!cell) return true;
    if (!isExpression(cell.text)) {
      this.tell(row, 'when', { code: 'bad-expression', message: say.whenNeedsBraces(cell.text) }, reading);
      return false;
    }
    const value = this.value(row, 'when', reading);
    if (typeof value === 'boolean') return value;
    if (value !== undefined) this.tell(row, 'when', { code: 'bad-expression', message: say.whenNeedsTruth() }, reading);
    return false;
  }

  /** Touches whoever fills a cell under a heading that means nothing known but matters. */
  faulty(row: Row, reading: Reading): boolean {
    let found = false;
    for (const column of row.part.faulty) {
      if (!column.problem || !row.raw.cells[column.index]) continue;
      found = true;
      this.blame(column, reading);
    }
    return found;
  }

  private blame(column: Column, reading: Reading): void {
    if (!column.problem) return;
    if (reading.frame !== null) this.problems.touch(column.problem, reading.frame);
    else this.problems.add(column.problem.place, { ...column.problem }, null);
  }

  private value(row: Row, name: string, reading: Reading): RawCell | Value | null | undefined {
    const column = this.column(row, name, reading);
    return column ? this.valueOf(row, column, reading) : column;
  }

  /** A row's column; null where the sheet has none; undefined where it needs one (told once, at the headings). */
  private column(row: Row, name: string, reading: Reading): Column | null | undefined {
    const column = row.part.byName.get(name);
    if (column) return column;
    const missing = row.part.missing.get(name);
    if (!missing) return null;
    if (reading.frame !== null) this.problems.touch(missing, reading.frame);
    else this.problems.add(missing.place, { ...missing }, null);
    return undefined;
  }

  private valueOf(row: Row, column: Column, reading: Reading): RawCell | Value | null | undefined {
    const cell = row.raw.cells[column.index];
    if (!cell) return null;
    if (column.problem) {
      this.blame(column, reading);
      return undefined;
    }
    if (cell.mergedFrom)
      this.problems.add(placeAt(row, column), { code: 'derived', message: say.mergedValue(cell.mergedFrom) }, reading.frame);
    if (cell.kind === 'number') return cell;
    if (cell.kind === 'error' || cell.kind === 'formula') {
      const fault: Fault =
        cell.kind === 'error'
          ? { code: 'error-value', message: say.errorValue(cell.text) }
          : { code: 'no-stored-value', message: say.noStoredValue(cell.text) };
      this.problems.add(placeAt(row, column), fault, reading.frame);
      return undefined;
    }
    return cell.kind === 'text' && isExpression(cell.text) ? this.expressionOf(row, column, cell.text, reading) : cell;
  }

  private expressionOf(row: Row, column: Column, text: string, reading: Reading): Value | undefined {
    const { node, fault, names } = this.expressions.read(text);
    const blame = (message: string, parameters: readonly string[]): undefined => {
      if (!isBuiltIn(row)) this.problems.add(placeAt(row, column), { code: 'bad-expression', message }, reading.frame);
      if (node && reading.variantPlace) {
        const at = reading.variantPlace(parameters[0] ?? names[0] ?? null);
        this.problems.add(at, { code: 'bad-expression', message: say.variantExpression(text, message) }, reading.frame);
      }
      return undefined;
    };
    if (!node) return blame(say.badExpression(fault ?? ''), []);
    if (!reading.parameters && names.length > 0) return blame(say.expressionOutsideFamily(), []);
    try {
      const value = evaluate(node, reading.parameters ?? none);
      // −0 is 0
      return value === 0 ? 0 : value;
    } catch (problem) {
      if (!(problem instanceof ExpressionFault)) throw problem;
      return blame(say.badExpression(problem.message), problem.names);
    }
  }
}

/** Rows of the built-in families stand in no file. */
export function isBuiltIn(row: Row): boolean {
  return row.part.raw.order < 0;
}

function cellOf(row: Row, name: string): RawCell | null {
  const column = row.part.byName.get(name);
  return column ? (row.raw.cells[column.index] ?? null) : null;
}

/** An expression's value as text; '' and "none" are blank. */
function textOf(value: Value): string | null {
  if (typeof value === 'number') return numberAsId(value);
  if (typeof value === 'boolean') return value ? 'yes' : 'no';
  const text = value.trim();
  return text === '' || text.toLowerCase() === 'none' ? null : text;
}
