import { describe, expect, it } from 'vitest';
import { batchUnit } from '@/lib/units/batch-unit';
import { type DecimalMark, decimalMarkShown, readNumber, readQuantity } from '@/lib/units/read-number';

const value = (text: string, decimalMark: DecimalMark | null = null): number | string => {
  const read = readNumber(text, { decimalMark });
  return read.kind === 'number' ? read.value : read.kind;
};

describe('readNumber', () => {
  it.each<[string, number]>([
    ['12', 12],
    ['-3.5', -3.5],
    ['−3.5', -3.5],
    ['+4', 4],
    ['- 2', -2],
    ['.5', 0.5],
    ['5.', 5],
    ['1e-5', 1e-5],
    ['1.2E+3', 1200],
    ['1 234.5', 1234.5],
    ['1\u00a0234.5', 1234.5],
    ['1\u202f234\u202f567', 1234567],
    ["1'234.5", 1234.5],
    ['1,234.5', 1234.5],
    ['1,234,567', 1234567],
    ['  7  ', 7],
    ['01', 1],
    ['1,5', 1.5],
    ['0,123', 0.123],
    ['1234,567', 1234.567],
    ['1.234,5', 1234.5],
  ])('reads %s', (text, expected) => {
    expect(value(text)).toBe(expected);
  });

  it('does not guess at one comma and three digits', () => {
    expect(value('1,234')).toBe('ambiguous');
    expect(value('1,234', '.')).toBe('ambiguous');
    expect(value('1,234', ',')).toBe(1.234);
    expect(value('1.234')).toBe(1.234);
    expect(value('1.234', ',')).toBe('ambiguous');
  });

  it('keeps to the decimal mark of the file', () => {
    expect(value('1,5', ',')).toBe(1.5);
    expect(value('1.234,5', ',')).toBe(1234.5);
    expect(value('1 234,5', ',')).toBe(1234.5);
    expect(value('1,5', '.')).toBe('not-a-number');
    expect(value('1.5', ',')).toBe('not-a-number');
  });

  it.each([
    '',
    'abc',
    '28,5O',
    '1.2.3',
    '12 34',
    '1,23,4',
    '--3',
    'Infinity',
    'NaN',
    '0x10',
    '1e999',
    '=2',
    '5 -m',
    '1/2',
    '1e5.5',
  ])('takes %j for no number', (text) => {
    expect(value(text)).toBe('not-a-number');
  });

  it('reads a unit typed in the cell', () => {
    expect(readNumber('6000 mm', { decimalMark: null })).toMatchObject({ value: 6000, unit: { symbol: 'mm' } });
    expect(readNumber('6000mm', { decimalMark: null })).toMatchObject({ value: 6000, unit: { symbol: 'mm' } });
    expect(readNumber('1 234,5 kN/m', { decimalMark: ',' })).toMatchObject({ value: 1234.5, unit: { symbol: 'kN/m' } });
    expect(readNumber('5 furlong', { decimalMark: null })).toEqual({ kind: 'unknown-unit', unitText: 'furlong' });
  });

  it('reads feet and inches', () => {
    expect(readNumber(`5'-6"`, { decimalMark: null })).toMatchObject({ value: 5.5, unit: { symbol: 'ft' } });
    expect(readNumber(`-10' 3 1/2"`, { decimalMark: null })).toMatchObject({ value: -(10 + 3.5 / 12) });
    expect(readNumber(`6'`, { decimalMark: null })).toMatchObject({ value: 6, unit: { symbol: 'ft' } });
  });
});

describe('readQuantity', () => {
  const m = batchUnit('length', 'metric');
  it('takes the heading’s unit unless the cell has its own', () => {
    expect(readQuantity('6', { quantity: 'length', unit: m, decimalMark: null })).toEqual({
      kind: 'number',
      si: 6,
      converted: null,
    });
    expect(readQuantity('6000 mm', { quantity: 'length', unit: m, decimalMark: null })).toMatchObject({
      si: 6,
      converted: { symbol: 'mm' },
    });
  });
  it('refuses a unit of another kind', () => {
    expect(readQuantity('6 kN', { quantity: 'length', unit: m, decimalMark: null }).kind).toBe('wrong-unit-kind');
  });
});

describe('decimalMarkShown', () => {
  it('counts only numbers that can be read one way', () => {
    expect(['1,5', '0,123', '1234,567', '1.234,5', '1,5 m', '−2,25'].map(decimalMarkShown)).toEqual(Array(6).fill(','));
    expect(['1.5', '0.123', '1,234.5', '1 234.5'].map(decimalMarkShown)).toEqual(Array(4).fill('.'));
    expect(['1,234', '1.234', '12', 'a,5', '1,2,3', '', '1.2.2026'].map(decimalMarkShown)).toEqual(Array(7).fill(null));
  });
});
