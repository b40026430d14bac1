import { describe, expect, it } from 'vitest';
import { evaluate, rootsWithin } from './polynomial';

/** Coefficients of (x − r₁)(x − r₂)… */
const from = (roots: number[]): number[] =>
  roots.reduce<number[]>((p, r) => p.map((_, i) => (p[i - 1] ?? 0) - r * p[i]!).concat(p[p.length - 1]!), [1]);

const roots = (p: number[], length: number, nothing: number): number[] => {
  const out = new Float64Array(8);
  return [...out.subarray(0, rootsWithin(p, p.length - 1, length, nothing, out))];
};

describe('polynomials', () => {
  it('are evaluated', () => {
    expect(evaluate([1, 2, 3], 2)).toBe(17);
    expect(evaluate([], 3)).toBe(0);
  });

  it('have their roots found within the length only, in order, to the last digits', () => {
    const wanted = [Math.SQRT1_2, 1.5, Math.E, Math.PI];
    const found = roots(from([...wanted, -1]), 4, 0);
    expect(found).toHaveLength(4);
    found.forEach((root, i) => expect(root).toBeCloseTo(wanted[i]!, 12));
    expect(roots(from([-1, 5]), 4, 0)).toEqual([]);
  });

  it('of degree two keep a small root that subtraction would lose', () => {
    const [small] = roots([1e-9, -1e3, 1], 10, 0);
    expect(small! / 1e-12).toBeCloseTo(1, 10);
  });

  it('whose first term or slope is nothing but rounding are taken for what is left of them', () => {
    expect(roots([-2, 1, 0, 1e-30], 4, 1e-15)).toEqual([2]);
    expect(roots([-2, 1, 1e-30, 0, 0], 4, 1e-15)).toEqual([2]);
  });

  it('of more than degree eight are not offered', () => {
    expect(() => roots(Array(10).fill(1) as number[], 4, 0)).toThrow(RangeError);
  });

  it('have no roots where they are constant or nothing but rounding', () => {
    expect(roots([3], 5, 0)).toEqual([]);
    expect(roots([1e-18, -1e-18], 5, 1e-12)).toEqual([]);
  });
});
