import type { Check } from '@/lib/results/result';
import type { Quantity } from '@/lib/units/quantity';
import { fraction, symbol, text, type Printer, type WorkingLine, type WorkingPart } from '../working-parts';

/** A check's inputs and its printer, as the lines of every clause of AISC 360-22 use them. */
export interface Sheet {
  readonly print: Printer;
  /** A number of the inputs; null where it is not among them. */
  number(name: string): number | null;
  word(name: string): string | null;
  /** A number as printed; nothing where it is not among the inputs. */
  shown(name: string, quantity: Quantity): readonly WorkingPart[];
  result(name: string, quantity: Quantity): readonly WorkingPart[];
  /** `symbol = number`, each that is known. */
  given(...list: readonly (readonly [WorkingPart, string, Quantity])[]): readonly WorkingPart[];
}

export function sheetOf(check: Check, print: Printer): Sheet {
  const number = (name: string): number | null => {
    const value = check.inputs[name];
    return typeof value === 'number' ? value : null;
  };
  const shown = (name: string, quantity: Quantity): readonly WorkingPart[] => {
    const value = number(name);
    return value === null ? [] : [print.number(value, quantity)];
  };
  return {
    print,
    number,
    word: (name) => {
      const value = check.inputs[name];
      return typeof value === 'string' ? value : null;
    },
    shown,
    result: (name, quantity) => {
      const value = number(name);
      return value === null ? [] : [print.result(value, quantity)];
    },
    given: (...list) =>
      list.flatMap(([letter, name, quantity], i) => {
        const parts = print.given(letter, number(name), quantity);
        return i > 0 && parts.length > 0 ? [text(' '), ...parts] : parts;
      }),
  };
}

export const line = (what: string, parts: readonly WorkingPart[], source: string | null = null): WorkingLine => ({
  what,
  parts,
  source,
});
export const equals = text('=');
export const times = text('·');
/** A letter with its index: `F_y`. */
export const F_y = symbol('F', 'y');
export const squared = (letter: string, sub?: string): WorkingPart => symbol(letter, sub, '2');

/** `φP_n = 0.90 · 1 200 kN = …` by LRFD, `P_n/Ω = …/1.67 = …` by ASD: the last line of a strength. */
export function availableLine(sheet: Sheet, letter: string, names: readonly [string, string], quantity: Quantity): WorkingLine {
  const [nominal, available] = names;
  const asd = sheet.word('method') === 'ASD';
  const n = symbol(letter, 'n');
  const parts = asd
    ? [
        fraction([n], [symbol('Ω')]),
        equals,
        fraction(sheet.shown(nominal, quantity), sheet.shown('factor', 'number')),
        equals,
        ...sheet.result(available, quantity),
      ]
    : [
        symbol('φ'),
        n,
        equals,
        ...sheet.shown('factor', 'number'),
        times,
        ...sheet.shown(nominal, quantity),
        equals,
        ...sheet.result(available, quantity),
      ];
  return line(asd ? 'allowable strength' : 'design strength', parts, asd ? 'B3.2' : 'B3.1');
}

/** `λ = 9.34 ≤ λ_p = 9.15 …`: a plate's ratio against its limits. */
export function plateLine(sheet: Sheet, what: string, plate: 'flange' | 'web', source: string): readonly WorkingLine[] {
  const lambda = sheet.number(`${plate}Lambda`);
  if (lambda === null) return [];
  const verdict = sheet.word(`${plate}Class`);
  const parts = [
    ...sheet.given(
      [symbol('λ'), `${plate}Lambda`, 'number'],
      [symbol('λ', 'p'), `${plate}LambdaP`, 'number'],
      [symbol('λ', 'r'), `${plate}LambdaR`, 'number'],
    ),
    ...(verdict ? [text(`: ${verdict}`)] : []),
  ];
  return [line(what, parts, source)];
}
