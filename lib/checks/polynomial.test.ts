import { describe, expect, it } from 'vitest';
import { rootsWithin, valueAt } from './polynomial';

const roots = (c: number[], h: number): number[] => {
  const out = new Float64Array(32);
  return [...out.subarray(0, rootsWithin(c, c.length - 1, h, out))];
};
/** c₀ + c₁ s + … with the given roots. */
const withRoots = (...at: number[]): number[] =>
  at.reduce<number[]>((c, r) => [...c, 0].map((_, k) => (k > 0 ? (c[k - 1] ?? 0) : 0) - r * (c[k] ?? 0)), [1]);

function expectRoots(c: number[], h: number, expected: number[]): void {
  const found = roots(c, h);
  expect(found.length, `${found} against ${expected}`).toBe(expected.length);
  found.forEach((s, i) =>
    expect(Math.abs(s - (expected[i] ?? NaN)), `${s} against ${expected[i]}`).toBeLessThanOrEqual(1e-9 * h),
  );
}

describe('roots of a polynomial on a stretch', () => {
  it('of a line, a parabola and a cubic', () => {
    expectRoots(withRoots(3), 10, [3]);
    expectRoots(withRoots(1, 7), 10, [1, 7]);
    expectRoots(withRoots(-2, 4, 9), 10, [4, 9]);
  });

  it('at irrational places', () => {
    expectRoots([-2, 0, 1], 3, [Math.SQRT2]);
    expectRoots([-5, 0, 0, 1], 3, [Math.cbrt(5)]);
  });

  it('of degree five and six, some outside the stretch', () => {
    expectRoots(withRoots(0.5, 2, 3.25, 8, 20), 10, [0.5, 2, 3.25, 8]);
    expectRoots(withRoots(-1, 0.1, 0.2, 5, 9.9, 11), 10, [0.1, 0.2, 5, 9.9]);
  });

  it('where the curve only touches zero', () => {
    expectRoots(withRoots(4, 4), 10, [4]);
    expectRoots(withRoots(4, 4, 4, 4), 10, [4]);
  });

  it('not at the ends, nor of a constant, nor of nothing', () => {
    expectRoots(withRoots(0, 10), 10, []);
    expectRoots([7], 10, []);
    expectRoots([0, 0, 0], 10, []);
    expectRoots([1, 1], 0, []);
  });

  it('keeps its digits where the leading term is small or the figures are large', () => {
    expectRoots([-3e9, 1e9, 1e-3], 10, [3]);
    expectRoots(
      withRoots(2, 6).map((c) => c * 1e12),
      10,
      [2, 6],
    );
    expectRoots([1e8, -2e8 / 3, 1e-20, 1e-20], 10, [1.5]);
  });

  it('agrees with roots drawn at random (seed 7)', () => {
    let seed = 7;
    const random = (): number => (seed = (seed * 16807) % 2147483647) / 2147483647;
    for (let i = 0; i < 300; i++) {
      const degree = 1 + Math.floor(random() * 6);
      const at = Array.from({ length: degree }, () => random() * 12 - 1).sort((a, b) => a - b);
      if (at.some((r, k) => k > 0 && r - (at[k - 1] ?? 0) < 0.02)) continue;
      const c = withRoots(...at);
      const inside = at.filter((r) => r > 0 && r < 10);
      const found = roots(c, 10);
      expect(found.length, `seed 7, draw ${i}: ${at}`).toBe(inside.length);
      found.forEach((s, k) => expect(Math.abs(s - (inside[k] ?? NaN)), `draw ${i}: ${s} of ${at}`).toBeLessThan(1e-5));
    }
  });

  it('refuses a degree that it has no room for', () => expect(() => roots(new Array<number>(14).fill(1), 1)).toThrow(RangeError));

  it('gives values by Horner', () => expect(valueAt([1, 2, 3], 2, 2)).toBe(17));
});
