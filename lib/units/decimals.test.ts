import { describe, expect, it } from 'vitest';
import { decimalsIn } from './decimals';
import { formatQuantity } from './format';

describe('the decimals of a column', () => {
  it('say of a movement in inches what they say in millimetres, so that 2.25 mm is never 0.1 in', () => {
    const text = (units: 'metric' | 'us') =>
      formatQuantity(2.252e-3, 'displacement', units, { decimals: decimalsIn(units, 'displacement', 1) });
    expect(text('metric')).toBe('2.3');
    expect(text('us')).toBe('0.089');
  });
  it('leave whole numbers whole, and lengths as they are', () => {
    expect(decimalsIn('us', 'stress', 0)).toBe(0);
    expect(decimalsIn('us', 'length', 2)).toBe(2);
    expect(decimalsIn('us', 'force', 1)).toBe(2);
  });
});
