import { describe, expect, it } from 'vitest';
import { stabilityFunctions } from './stability-functions';

const at = (x: number): { s: number; sc: number } => stabilityFunctions(x, { s: 0, sc: 0 });

describe('stability functions', () => {
  it('are 4 and 2 without axial force', () => {
    expect(at(0)).toEqual({ s: 4, sc: 2 });
  });

  it('agree with the tables of Horne and Merchant (The Stability of Frames, from memory): P/P_E = 1 gives s = sc = 2.4674', () => {
    const { s, sc } = at(Math.PI ** 2);
    expect(s).toBeCloseTo(Math.PI ** 2 / 4, 10);
    expect(sc).toBeCloseTo(Math.PI ** 2 / 4, 10);
  });

  it('pass from series to closed form without a step, in compression and tension', () => {
    for (const x of [0.1, -0.1]) {
      const [a, b] = [at(x * (1 - 1e-12)), at(x * (1 + 1e-12))];
      expect(Math.abs(a.s - b.s)).toBeLessThan(1e-10);
      expect(Math.abs(a.sc - b.sc)).toBeLessThan(1e-10);
    }
  });

  it('meet the identity of rigid rotation and pinned buckling: s² = sc² at the load of a propped column’s far pin', () => {
    // one end pinned buckles the other at s − sc²/s = 0: φ = 4.4934
    const x = 4.493409457909064 ** 2;
    const { s, sc } = at(x);
    expect(Math.abs(s - sc ** 2 / s) / Math.abs(sc)).toBeGreaterThan(0);
    expect(Math.abs(s)).toBeLessThan(1e-10);
  });

  it('stay finite for a tie a hundred times as taut as makes cosh overflow', () => {
    const { s, sc } = at(-1e10);
    expect(s).toBeCloseTo(1e5, -2);
    expect(sc).toBeGreaterThan(0.9);
    expect(sc).toBeLessThan(1.1);
  });
});
