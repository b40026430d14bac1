import { expect, test } from 'vitest';
import { editedFactor } from '@/lib/combinations/edited-factor';

test.each([
  ['1.35', 1.35],
  ['−0,9', -0.9],
  [' 0 ', 0],
  ['', null],
  ['1e3', null],
  ['101', null],
  ['one', null],
])('the factor typed as “%s” is %s', (typed, factor) => {
  expect(editedFactor(typed)).toBe(factor);
});
