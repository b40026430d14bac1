import fc from 'fast-check';
import { describe, expect, it, test } from 'vitest';
import { evaluate, type Value } from '@/lib/intake/expressions/evaluate';
import { Expressions, isExpression } from '@/lib/intake/expressions/expression';
import { type Node, parse } from '@/lib/intake/expressions/parse';
import { ExpressionFault } from '@/lib/intake/expressions/tokens';

const parameters = new Map<string, number | string>([
  ['span', 12],
  ['eaves', 4.5],
  ['topfx', -2],
  ['base', 'fixed'],
  ['zero', 0],
]);
const value = (text: string): Value => evaluate(parse(text), parameters);
const fault = (text: string): string => {
  try {
    value(text);
  } catch (error) {
    if (error instanceof ExpressionFault) return error.message;
    throw error;
  }
  return 'no fault';
};

describe('expressions', () => {
  test.each<[string, Value]>([
    ['span/2', 6],
    ['eaves + span', 16.5],
    ['2 + 3 * 4', 14],
    ['(2 + 3) * 4', 20],
    ['2 ^ 3 ^ 2', 512],
    ['-2 ^ 2', -4],
    ['2 ^ -1', 0.5],
    ['-span - -span', 0],
    ['8 / 4 / 2', 1],
    ['9 − 4 · 2', 1],
    ['.5 + 1.5e1', 15.5],
    ['Top_Fx', -2],
    ['min(3, span, 5)', 3],
    ['MAX(3, 5)', 5],
    ['atan2(1, 1)', Math.PI / 4],
    ['sqrt(16) + abs(-3)', 7],
    ['sin(0) + cos(0) + tan(0)', 1],
    ['span > 10 ? 1 : 2', 1],
    ['span > 20 ? 1 : eaves > 4 ? 2 : 3', 2],
    ['base = "Fixed"', true],
    ['base != “fixed”', false],
    ['base = "fixed" ? "fixed" : "free"', 'fixed'],
    ['span >= 12 and eaves < 5', true],
    ['not span > 10 or eaves <= 4.5', true],
    ['not (span > 10)', false],
    ['base = 3', false],
  ])('%s is %s', (text, expected) => {
    expect(value(text)).toEqual(expected);
  });

  it('evaluates one branch only, and of and/or only what decides', () => {
    expect(value('zero = 0 ? 1 : 1/zero')).toBe(1);
    expect(value('zero != 0 and 1/zero > 1')).toBe(false);
    expect(value('zero = 0 or 1/zero > 1')).toBe(true);
  });

  test.each([
    ['1/zero', 'divides by zero'],
    ['sqrt(0 - 1)', 'is not a number'],
    ['(0 - 8) ^ 0.5', 'is not a number'],
    ['10 ^ 400', 'is not a number'],
    ['base + 1', 'where a number is needed'],
    ['(span > 1) + 1', 'where a number is needed'],
    ['span ? 1 : 2', 'a comparison is needed'],
    ['rise', 'there is no parameter “rise”'],
    ['log(3)', 'there is no function “log”'],
    ['atan2(1)', 'atan2 takes 2 values'],
    ['sin(1, 2)', 'sin takes 1'],
    ['1 < 2 < 3', 'join two comparisons'],
    ['1 +', 'at the end'],
    ['(1 + 2', 'expected “)”'],
    ['1 2', 'does not belong'],
    ['2 m', 'does not belong'],
    ['3span', 'nothing that an expression knows'],
    ['span; eaves', 'nothing that an expression knows'],
    ['a.b', 'nothing that an expression knows'],
    ['span == 12', 'before “=”'],
    ['', 'nothing stands between'],
    ['constructor', 'there is no parameter'],
    ['toString(1)', 'there is no function'],
    ['__proto__', 'nothing that an expression knows'],
    ['('.repeat(100), 'nested too deeply'],
    ['-'.repeat(100) + '1', 'nested too deeply'],
    ['1+'.repeat(2000), 'longer than'],
  ])('%s: %s', (text, expected) => {
    expect(fault(text)).toContain(expected);
  });

  it('names the parameters of the part that fails', () => {
    try {
      value('span / (zero * eaves)');
    } catch (error) {
      expect(error).toMatchObject({ names: ['zero', 'eaves'] });
      return;
    }
    expect.fail('a division by zero went through');
  });

  it('only a cell that begins with a brace is one, and its closing brace must end it', () => {
    expect(['{span}', ' {span} ', '{a}{b}', '{span', 'B{span}', 'span'].map(isExpression)).toEqual([true, true, true, true, false, false]);
    for (const text of ['{span', '{span} mm']) expect(new Expressions().read(text).fault).toBe('its closing brace must end the cell');
  }); // prettier-ignore
});

/** A random tree of arithmetic with the value that JavaScript gives the same thing. */
const tree: fc.Arbitrary<{ text: string; value: number }> = fc.letrec<{ node: { text: string; value: number } }>((tie) => ({
  node: fc.oneof(
    { maxDepth: 5 },
    fc.integer({ min: 0, max: 50 }).map((n) => ({ text: String(n), value: n })),
    fc.tuple(tie('node'), fc.constantFrom('+', '-', '*'), tie('node')).map(([a, sign, b]) => ({
      text: `(${a.text} ${sign} ${b.text})`,
      value: sign === '+' ? a.value + b.value : sign === '-' ? a.value - b.value : a.value * b.value,
    })),
    tie('node').map((a) => ({ text: `(-${a.text})`, value: -a.value })),
  ),
})).node;

describe('for any expression', () => {
  it('arithmetic in brackets is what it is anywhere', () => {
    fc.assert(
      fc.property(tree, ({ text, value: expected }) => {
        // −0 and 0 are one number
        expect(Number(value(text)) + 0).toBe(expected + 0);
      }),
      { seed: 20261201 },
    );
  });

  it('a sum or product without brackets groups from the left, products first', () => {
    const chain = fc.array(fc.tuple(fc.constantFrom('+', '-', '*'), fc.integer({ min: 1, max: 9 })), {
      minLength: 1,
      maxLength: 12,
    });
    fc.assert(
      fc.property(fc.integer({ min: 1, max: 9 }), chain, (first, rest) => {
        const text = String(first) + rest.map(([sign, n]) => ` ${sign} ${n}`).join('');
        let sum = 0;
        let sign = 1;
        let product = first;
        for (const [operator, n] of rest) {
          if (operator === '*') product *= n;
          else {
            sum += sign * product;
            sign = operator === '+' ? 1 : -1;
            product = n;
          }
        }
        expect(value(text)).toBe(sum + sign * product);
      }),
      { seed: 20261201 },
    );
  });

  it('any text either reads or faults in words, and never otherwise', () => {
    const pieces = fc.constantFrom(
      'span',
      '1',
      '+',
      '-',
      '(',
      ')',
      '^',
      '?',
      ':',
      '"x"',
      'and',
      'not',
      'min',
      ',',
      '=',
      ' ',
      '}',
      '{',
      '\\',
      '0',
    );
    fc.assert(
      fc.property(
        fc.oneof(
          fc.string({ maxLength: 40 }),
          fc.array(pieces, { maxLength: 20 }).map((p) => p.join('')),
        ),
        (text) => {
          let node: Node;
          try {
            node = parse(text);
          } catch (error) {
            expect(error).toBeInstanceOf(ExpressionFault);
            return;
          }
          try {
            const found = evaluate(node, parameters);
            if (typeof found === 'number') expect(Number.isFinite(found)).toBe(true);
          } catch (error) {
            expect(error).toBeInstanceOf(ExpressionFault);
          }
        },
      ),
      { seed: 20261201, numRuns: 2000 },
    );
  });
});
