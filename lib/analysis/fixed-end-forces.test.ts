import { describe, expect, it } from 'vitest';
import { fixedEndForces } from './fixed-end-forces';
import { emptyJointStiffness, jointStiffness, type JointStiffness } from './joint-stiffness';
import type { MemberData } from './member-data';
import type { LocalLoads } from './member-loads';

const L = 8;
const EI = 3e7;
const EA = 2e9;
const none: LocalLoads = { lines: [], places: [], strain: 0, curvature: 0 };
const across = (a: number, b: number, q1: number, q2: number): LocalLoads => ({ ...none, lines: [{ a, b, qx1: 0, qx2: 0, qy1: q1, qy2: q2 }] }); // prettier-ignore

const member = (k1: number, k2: number, GAv: number): MemberData => ({ start: 0, end: 1, length: L, cos: 1, sin: 0, EA, EI, GAv, startSpring: k1, endSpring: k2, weight: 0, expansion: 0, depth: 1 }); // prettier-ignore
const stiffness = (k1: number, k2: number, GAv = Infinity): JointStiffness => jointStiffness(member(k1, k2, GAv), emptyJointStiffness()); // prettier-ignore

function forces(loads: LocalLoads, k1 = Infinity, k2 = Infinity, GAv = Infinity): number[] {
  const out = new Float64Array(6);
  fixedEndForces(member(k1, k2, GAv), loads, stiffness(k1, k2, GAv), out, 0);
  return [...out];
}
function expectForces(found: number[], wanted: number[]): void {
  const scale = Math.max(...wanted.map(Math.abs));
  wanted.forEach((value, i) => expect(Math.abs(found[i]! - value), `${found.join(', ')} against ${wanted.join(', ')}`).toBeLessThan(1e-12 * scale)); // prettier-ignore
}

// Fixed-end moments: Kassimali, Matrix Analysis of Structures, inside back cover (from memory)
describe('fixed-end forces', () => {
  it('of a uniform load q: qL/2, qL²/12', () => {
    expectForces(forces(across(0, L, -5, -5)), [0, 20, (5 * 64) / 12, 0, 20, (-5 * 64) / 12]);
  });

  it('of a triangle rising to q at the end: 3qL/20, 7qL/20, qL²/30, qL²/20', () => {
    expectForces(forces(across(0, L, 0, -6)), [0, (3 * 6 * L) / 20, (6 * 64) / 30, 0, (7 * 6 * L) / 20, (-6 * 64) / 20]);
  });

  it('of a uniform load over the first part a: qa²/12L² (6L² − 8aL + 3a²), qa³/12L² (4L − 3a)', () => {
    const a = 3;
    const m1 = ((5 * a ** 2) / (12 * L ** 2)) * (6 * L ** 2 - 8 * a * L + 3 * a ** 2);
    const m2 = ((5 * a ** 3) / (12 * L ** 2)) * (4 * L - 3 * a);
    const y2 = (5 * a * (a / 2) - m1 + m2) / L;
    expectForces(forces(across(0, a, -5, -5)), [0, 15 - y2, m1, 0, y2, -m2]);
  });

  it('of a point load P at a: Pab²/L², Pa²b/L²', () => {
    const [a, b, P] = [3, 5, 40];
    const loads = { ...none, places: [{ x: a, Px: 0, Py: -P, M: 0 }] };
    expectForces(forces(loads), [0, (P * b * b * (3 * a + b)) / L ** 3, (P * a * b * b) / L ** 2, 0, (P * a * a * (a + 3 * b)) / L ** 3, (-P * a * a * b) / L ** 2]); // prettier-ignore
  });

  it('of an anticlockwise moment M at a: Mb(2a − b)/L², Ma(2b − a)/L², and 6Mab/L³', () => {
    const [a, b, M] = [3, 5, 40];
    const loads = { ...none, places: [{ x: a, Px: 0, Py: 0, M }] };
    expectForces(forces(loads), [0, (6 * M * a * b) / L ** 3, (M * b * (2 * a - b)) / L ** 2, 0, (-6 * M * a * b) / L ** 3, (M * a * (2 * b - a)) / L ** 2]); // prettier-ignore
  });

  it('of loads along the member: shared like a lever', () => {
    const loads = { ...none, lines: [{ a: 0, b: L, qx1: 3, qx2: 9, qy1: 0, qy2: 0 }] };
    expectForces(forces(loads), [-(L * (2 * 3 + 9)) / 6, 0, 0, -(L * (3 + 2 * 9)) / 6, 0, 0]);
    expectForces(forces({ ...none, places: [{ x: 2, Px: 10, Py: 0, M: 0 }] }), [-7.5, 0, 0, -2.5, 0, 0]);
  });

  it('of heat: EA ε₀ and EI κ₀', () => {
    expectForces(forces({ ...none, strain: 1e-4, curvature: -2e-4 }), [EA * 1e-4, 0, EI * -2e-4, -EA * 1e-4, 0, EI * 2e-4]);
  });

  it('of a propped member, the start pinned: qL²/8 at the other end, of pins at both ends none', () => {
    expectForces(forces(across(0, L, -5, -5), 0), [0, (3 / 8) * 40, 0, 0, (5 / 8) * 40, (-5 * 64) / 8]);
    expectForces(forces(across(0, L, -5, -5), 0, 0), [0, 20, 0, 0, 20, 0]);
  });

  it('pass between pinned and rigid with a joint’s stiffness', () => {
    const rigid = forces(across(1, 7, -5, -2));
    const stiff = forces(across(1, 7, -5, -2), 1e20, 1e20);
    const pinned = forces(across(1, 7, -5, -2), 0, 0);
    const loose = forces(across(1, 7, -5, -2), 1e-9, 1e-9);
    rigid.forEach((value, i) => expect(stiff[i]).toBeCloseTo(value, 9));
    pinned.forEach((value, i) => expect(loose[i]).toBeCloseTo(value, 9));
  });
});

describe('a member’s stiffness between its nodes', () => {
  it('is 4EI/L and 2EI/L rigid, 3EI/L with the far end pinned, nothing with its own end pinned', () => {
    const a = (4 * EI) / L;
    expect(stiffness(Infinity, Infinity)).toMatchObject({ S11: a, S12: a / 2, S22: a });
    expect(stiffness(0, Infinity)).toMatchObject({ S11: 0, S12: 0, S22: (3 * EI) / L });
    expect(stiffness(Infinity, 0)).toMatchObject({ S11: (3 * EI) / L, S12: 0, S22: 0 });
  });

  it('puts joints and member one after another: 1/k + L/3EI at one end, the other pinned', () => {
    const k = 5e6;
    const { S11 } = stiffness(k, 0);
    expect(1 / S11).toBeCloseTo(1 / k + L / (3 * EI), 15);
  });

  it('loses by shear what 1/GAvL adds to the flexibility', () => {
    // unit moments at both ends: L/3EI + 1/GAvL, −L/6EI + 1/GAvL (Przemieniecki, Theory of Matrix Structural Analysis, ch. 5)
    const GAv = 4e6;
    const { S11, S12, S22 } = stiffness(Infinity, Infinity, GAv);
    const near = L / (3 * EI) + 1 / (GAv * L);
    const far = -L / (6 * EI) + 1 / (GAv * L);
    expect(S11 * near + S12 * far).toBeCloseTo(1, 12);
    expect(S11 * far + S12 * near).toBeCloseTo(0, 12);
    expect(S22).toBe(S11);
    const k = 5e6;
    expect(1 / stiffness(k, 0, GAv).S11 / (1 / k + near)).toBeCloseTo(1, 12);
  });
});

describe('fixed-end forces of a member that shears', () => {
  const GAv = 4e6;
  const shear = (12 * EI) / (GAv * L * L);

  it('of a uniform load are those of one that does not', () => {
    expectForces(forces(across(0, L, -5, -5), Infinity, Infinity, GAv), [0, 20, (5 * 64) / 12, 0, 20, (-5 * 64) / 12]);
  });

  it('of a force at a are P a b (b + ½ΦL)/(1 + Φ)L², Φ = 12EI/GAvL²', () => {
    // by the moments of a cantilever closed to its far end; from memory, checked by integration below
    const [P, a] = [7, 3];
    const b = L - a;
    const m1 = (P * a * b * (b + (shear * L) / 2)) / ((1 + shear) * L * L);
    const m2 = (-P * a * b * (a + (shear * L) / 2)) / ((1 + shear) * L * L);
    const loads: LocalLoads = { ...none, places: [{ x: a, Px: 0, Py: -P, M: 0 }] };
    const Y = (m1 + m2) / L;
    expectForces(forces(loads, Infinity, Infinity, GAv), [0, (P * b) / L + Y, m1, 0, (P * a) / L - Y, m2]);
  });

  it('close both ends: slopes from M/EI and V/GAv come back to nothing, for partial linear loads, forces and moments', () => {
    const loads: LocalLoads = { lines: [{ a: 1, b: 6, qx1: 0, qx2: 0, qy1: -3, qy2: 9 }], places: [{ x: 2.5, Px: 0, Py: 4, M: 11 }], strain: 0, curvature: 0 }; // prettier-ignore
    const [, Y1, m1] = forces(loads, Infinity, Infinity, GAv);
    let [psi, v, V, M] = [0, 0, Y1!, -m1!];
    const n = 400000;
    for (let i = 0; i < n; i++) {
      // midpoint rule; the load point stands between two steps
      const x = ((i + 0.5) * L) / n;
      if (i === (2.5 / L) * n) [V, M] = [V + 4, M - 11];
      const h = L / n;
      const q = x > 1 && x < 6 ? -3 + (12 * (x - 1)) / 5 : 0;
      const Vm = V + (q * h) / 2;
      const Mm = M + (V * h) / 2;
      v += h * (psi + (Mm * h) / EI / 2 - Vm / GAv);
      psi += (h * Mm) / EI;
      M += h * Vm;
      V += h * q;
    }
    expect(Math.abs(psi)).toBeLessThan(1e-8 * Math.abs((m1! * L) / EI));
    expect(Math.abs(v)).toBeLessThan(1e-8 * Math.abs((m1! * L * L) / EI));
  });
});
