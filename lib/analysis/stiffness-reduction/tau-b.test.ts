import { describe, expect, it } from 'vitest';
import { tauB } from './tau-b';

describe('τ_b', () => {
  it('is 1 up to half of the squash load, in tension too', () => {
    for (const share of [-2, 0, 0.3, 0.5]) expect(tauB(share)).toBe(1);
  });

  it('is 4 (αPr/Pns)(1 − αPr/Pns) above it: 0.84 at 0.7, 0.36 at 0.9 (AISC 360-22 (C2-2b), by hand)', () => {
    expect(tauB(0.7)).toBeCloseTo(0.84, 12);
    expect(tauB(0.9)).toBeCloseTo(0.36, 12);
    expect(tauB(0.5 + 1e-12)).toBeCloseTo(1, 11);
  });

  it('is nothing from the squash load on', () => {
    expect(tauB(1)).toBe(0);
    expect(tauB(1.4)).toBe(0);
  });
});
