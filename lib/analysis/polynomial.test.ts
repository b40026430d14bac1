import { describe, expect, it } from 'vitest';
import { derivative, evaluate, integral, rootsWithin } from './polynomial';

/** Coefficients of (x − r₁)(x − r₂)… */
const from = (roots: number[]): number[] =>
  roots.reduce<number[]>((p, r) => p.map((_, i) => (p[i - 1] ?? 0) - r * p[i]!).concat(p[p.length - 1]!), [1]);

describe('polynomials', () => {
  it('are evaluated, differentiated and integrated', () => {
    expect(evaluate([1, 2, 3], 2)).toBe(17);
    expect(derivative([1, 2, 3])).toEqual([2, 6]);
    expect(integral([2, 6], 1)).toEqual([1, 2, 3]);
    expect(evaluate([], 3)).toBe(0);
  });

  it('have their roots found within the length only, in order, to the last digits', () => {
    const wanted = [Math.SQRT1_2, 1.5, Math.E, Math.PI];
    const found = rootsWithin(from([...wanted, -1]), 4, 0);
    expect(found).toHaveLength(4);
    found.forEach((root, i) => expect(root).toBeCloseTo(wanted[i]!, 12));
    expect(rootsWithin(from([-1, 5]), 4, 0)).toEqual([]);
  });

  it('of degree two keep a small root that subtraction would lose', () => {
    const [small] = rootsWithin([1e-9, -1e3, 1], 10, 0);
    expect(small! / 1e-12).toBeCloseTo(1, 10);
  });

  it('have no roots where they are constant or nothing but rounding', () => {
    expect(rootsWithin([3], 5, 0)).toEqual([]);
    expect(rootsWithin([1e-18, -1e-18], 5, 1e-12)).toEqual([]);
  });
});
