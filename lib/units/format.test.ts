import { describe, expect, it } from 'vitest';
import { formatNumber, formatQuantity, formatRatio } from '@/lib/units/format';

describe('formatQuantity', () => {
  it('prints in the batch’s unit, three figures unless more is asked for', () => {
    expect(formatQuantity(12345, 'force', 'metric')).toBe('12.3');
    expect(formatQuantity(-12345, 'force', 'metric', { decimals: 1 })).toBe('−12.3');
    expect(formatQuantity(0.3048, 'length', 'us', { decimals: 2 })).toBe('1.00');
    expect(formatQuantity(1234567, 'force', 'metric')).toBe('1230');
    expect(formatQuantity(0.0000123, 'displacement', 'metric')).toBe('0.0123');
    expect(formatQuantity(null, 'force', 'metric')).toBe('–');
    expect(formatQuantity(NaN, 'force', 'metric')).toBe('–');
  });
  it('has no minus before a zero', () => {
    expect(formatNumber(-0.0001, { decimals: 2 })).toBe('0.00');
    expect(formatNumber(-0, { significant: 3 })).toBe('0');
  });
  it('keeps three figures where rounding carries', () => {
    expect(formatNumber(9.996, { significant: 3 })).toBe('10.0');
    expect(formatNumber(0.09996, { significant: 3 })).toBe('0.100');
  });
});

describe('formatRatio', () => {
  it('never crosses a boundary of its verdict', () => {
    expect(formatRatio(0.997, 0.9)).toBe('1.00');
    expect(formatRatio(1, 0.9)).toBe('1.00');
    expect(formatRatio(1.003, 0.9)).toBe('1.01');
    expect(formatRatio(1 + 1e-12, 0.9)).toBe('1.01');
    expect(formatRatio(0.897, 0.9)).toBe('0.89');
    expect(formatRatio(999.994, 0.9)).toBe('999.99');
    expect(formatRatio(3.015e9, 0.9)).toBe('> 999');
    expect(formatRatio(0.9, 0.9)).toBe('0.90');
    expect(formatRatio(0.904, 0.9)).toBe('0.90');
    expect(formatRatio(0.456, 0.9)).toBe('0.46');
    expect(formatRatio(1.456, 0.9)).toBe('1.46');
  });
  it('holds for a near limit between two hundredths', () => {
    expect(formatRatio(0.954, 0.955)).toBe('0.95');
    expect(formatRatio(0.956, 0.955)).toBe('0.96');
    expect(formatRatio(0.9952, 0.995)).toBe('1.00');
  });
  it('prints a missing ratio as missing', () => {
    expect(formatRatio(null, 0.9)).toBe('–');
    expect(formatRatio(Infinity, 0.9)).toBe('∞');
  });
});
