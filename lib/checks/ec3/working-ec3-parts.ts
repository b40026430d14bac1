import type { Check } from '@/lib/results/result';
import type { Quantity } from '@/lib/units/quantity';
import { fraction, symbol, text, type Printer, type WorkingLine, type WorkingPart } from '../working-parts';

/** The inputs of a check by name; a number that is not there is the caller's mistake. */
export function reader(check: Check) {
  return {
    number(name: string): number {
      const value = check.inputs[name];
      if (typeof value !== 'number') throw new RangeError(`Expected ${check.check} to carry ${name}, got ${String(value)}`);
      return value;
    },
    has: (name: string): boolean => typeof check.inputs[name] === 'number',
    word: (name: string): string => String(check.inputs[name] ?? ''),
  };
}
export type Reader = ReturnType<typeof reader>;

export const words = text;
export const squared = (letter: string, sub?: string): WorkingPart => symbol(letter, sub, '2');
export const M0 = symbol('γ', 'M0');
export const M1 = symbol('γ', 'M1');

/** `symbol = formula = numbers = result`. */
export function sum(
  what: string,
  left: WorkingPart,
  formula: readonly WorkingPart[],
  numbers: readonly WorkingPart[],
  result: WorkingPart,
  source: string,
): WorkingLine {
  const middle = numbers.length > 0 ? [words('='), ...numbers] : [];
  return { what, parts: [left, words('='), ...formula, ...middle, words('='), result], source };
}

/** A row of `symbol = value` for what is put in. */
export function given(
  what: string,
  print: Printer,
  items: readonly (readonly [WorkingPart, number, Quantity])[],
  source?: string,
): WorkingLine {
  return {
    what,
    parts: items.flatMap(([letter, value, quantity]) => print.given(letter, value, quantity)),
    ...(source ? { source } : {}),
  };
}

/** Class of the section where it is checked, with the plate that decides and its c/t. */
export function classLine(of: Reader, print: Printer): WorkingLine {
  const plate = of.word('plate');
  const parts: WorkingPart[] = [words(`class ${of.word('class')}`)];
  if (plate && of.has('ct'))
    parts.push(
      words(`(${plate},`),
      fraction([symbol('c')], [symbol('t')]),
      words('='),
      print.number(of.number('ct'), 'number'),
      words(')'),
    );
  return { what: 'class of the section', parts, source: 'Table 5.2' };
}
