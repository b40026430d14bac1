import { describe, expect, it } from 'vitest';
import { shearStabilityFunctions, stabilityFunctions } from './stability-functions';

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

describe('stability functions of a member that shears', () => {
  const at = (x: number, shear: number) => shearStabilityFunctions(x, shear, { s: 0, sc: 0 });

  it('are (4 + Φ)/(1 + Φ) and (2 − Φ)/(1 + Φ) without axial force (Przemieniecki, Theory of Matrix Structural Analysis, ch. 5)', () => {
    const { s, sc } = at(0, 0.7);
    expect(s).toBeCloseTo(4.7 / 1.7, 12);
    expect(sc).toBeCloseTo(1.3 / 1.7, 12);
  });

  it('are those of bending alone where shear is next to nothing', () => {
    for (const x of [-30, -2, 0.05, 3, 15]) {
      const plain = stabilityFunctions(x, { s: 0, sc: 0 });
      const { s, sc } = at(x, 1e-12);
      expect(s).toBeCloseTo(plain.s, 8);
      expect(sc).toBeCloseTo(plain.sc, 8);
    }
  });

  it('pass from series to closed form without a step', () => {
    const shear = 0.6;
    // φ² = x/β = ±0.1
    for (const y of [0.1, -0.1]) {
      const x = y / (1 + (y * shear) / 12);
      const [a, b] = [at(x * (1 - 1e-12), shear), at(x * (1 + 1e-12), shear)];
      expect(Math.abs(a.s - b.s)).toBeLessThan(1e-10);
      expect(Math.abs(a.sc - b.sc)).toBeLessThan(1e-10);
    }
  });

  it('solve the member’s equations, integrated step by step, in compression and tension', () => {
    for (const [x, shear] of [
      [5, 0.5],
      [-8, 0.9],
      [0.02, 0.3],
    ] as const) {
      const [psi, M, v] = marched(x, shear, at(x, shear));
      expect(Math.abs(psi)).toBeLessThan(1e-7);
      expect(Math.abs(v)).toBeLessThan(1e-7);
      expect(M).toBeCloseTo(at(x, shear).sc, 6);
    }
  });
});

/** L = EI = 1: from ψ = 1 at the start to ψ, M, v at the end by Runge and Kutta. */
function marched(P: number, shear: number, { s, sc }: { s: number; sc: number }): [number, number, number] {
  const GA = 12 / shear;
  const Q = s + sc;
  const rate = ([psi, M]: readonly number[]): [number, number, number] => {
    const V = (Q - P * psi!) / (1 - P / GA);
    return [M!, V, psi! - V / GA];
  };
  let y: [number, number, number] = [1, -s, 0];
  const n = 2000;
  const step = (a: readonly number[], k: readonly number[], h: number): [number, number, number] => [a[0]! + h * k[0]!, a[1]! + h * k[1]!, a[2]! + h * k[2]!]; // prettier-ignore
  for (let i = 0; i < n; i++) {
    const h = 1 / n;
    const k1 = rate(y);
    const k2 = rate(step(y, k1, h / 2));
    const k3 = rate(step(y, k2, h / 2));
    const k4 = rate(step(y, k3, h));
    y = [0, 1, 2].map((j) => y[j]! + (h / 6) * (k1[j]! + 2 * k2[j]! + 2 * k3[j]! + k4[j]!)) as [number, number, number];
  }
  return y;
}
