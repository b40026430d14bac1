import { expect, it } from 'vitest';
import { figure } from './figure';
import { verdictOf, worstOf } from './verdict';

it.each([
  [0, 'within'],
  [0.8999999, 'within'],
  [0.9, 'near'],
  [1, 'near'],
  [1.0000001, 'over'],
  [Infinity, 'over'],
  [NaN, 'not checked'],
])('a ratio of %d is %s with a near limit of 0.9', (ratio, verdict) => expect(verdictOf(ratio, 0.9)).toBe(verdict));

it('the worst verdict is over, then not checked, then near, then within', () => {
  expect(worstOf(['within', 'near', 'not checked', 'over'])).toBe('over');
  expect(worstOf(['near', 'not checked', 'within'])).toBe('not checked');
  expect(worstOf(['within', 'near'])).toBe('near');
  expect(worstOf(['within'])).toBe('within');
  expect(worstOf([])).toBe('not checked');
});

it.each([
  [0.0401, 'up', '0.041'],
  [0.04, 'up', '0.040'],
  [0.1900000000001, 'up', '0.19'],
  [1.234, 'up', '1.3'],
  [123.4, 'up', '124'],
  [9.99, 'down', '9.9'],
  [4.2, 'down', '4.2'],
  [0, 'up', '0'],
  [Infinity, 'up', '∞'],
] as const)('%d is printed, rounded %s, as %s', (value, side, text) => expect(figure(value, side)).toBe(text));
