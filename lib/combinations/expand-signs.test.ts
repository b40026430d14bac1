import { expect, it } from 'vitest';
import { expandSigns, mostSigned, signedName, splitSign } from '@/lib/combinations/expand-signs';

it('a combination without ± stands for itself', () => {
  expect(expandSigns('C1', [{ factor: 1.35, signed: false }])).toEqual([{ name: 'C1', factors: [1.35] }]);
});
it('one ± makes two, plus first', () => {
  const terms = [
    { factor: 1, signed: false },
    { factor: 1.5, signed: true },
  ];
  expect(expandSigns('C1', terms)).toEqual([
    { name: 'C1 (+)', factors: [1, 1.5] },
    { name: 'C1 (−)', factors: [1, -1.5] },
  ]);
});
it('several ± make every pattern, in the order of the terms', () => {
  const terms = [
    { factor: 2, signed: true },
    { factor: -3, signed: true },
  ];
  expect(expandSigns('C', terms).map((v) => [v.name, ...v.factors])).toEqual([
    ['C (+ +)', 2, -3],
    ['C (+ −)', 2, 3],
    ['C (− +)', -2, -3],
    ['C (− −)', -2, 3],
  ]);
});
it('more signs than can be meant are a caller’s mistake', () => {
  expect(() =>
    expandSigns(
      'C',
      Array.from({ length: mostSigned + 1 }, () => ({ factor: 1, signed: true })),
    ),
  ).toThrow(RangeError);
});
it('± is read as people type it', () => {
  expect(['±1.5', '+/-1.5', '+-1.5', ' ± 1.5', '+ / − 1.5'].map(splitSign)).toEqual(['1.5', '1.5', '1.5', '1.5', '1.5']);
  expect(['1.5', '+1.5', '-1.5', ''].map(splitSign)).toEqual([null, null, null, null]);
});
it('a name with signs is written one way, however they are typed', () => {
  expect(['C1 (+-)', 'C1 (+ −)', 'C1(−)', 'C1', 'C1 (a)'].map(signedName)).toEqual([
    'C1 (+ −)',
    'C1 (+ −)',
    'C1 (−)',
    'C1',
    'C1 (a)',
  ]);
});
