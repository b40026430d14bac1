import { describe, expect, it } from 'vitest';
import type { Frame, Section } from '@/lib/model/frame';
import { plainCase, plainFrame, plainMember, plainSection } from '../plain-frame';
import { actingUnder } from './second-loads';
import { solveState } from './second-order';
import { setUp } from './second-setup';
import type { SecondState } from './second-state';

function analysed(frame: Frame, shear = false): SecondState | null {
  const setup = setUp(frame, shear);
  const factors = frame.cases.map(() => 1);
  const acting = setup.along.map((along) => actingUnder(along, factors));
  const axial = new Float64Array(frame.members.length);
  return solveState(setup, { factors, notional: null, stiffness: null, slack: new Set(), axial }, acting);
}

function close(found: number | undefined, expected: number, tolerance = 1e-8): void {
  expect(found! / expected, `found ${found}, expected ${expected}`).toBeGreaterThan(1 - tolerance);
  expect(found! / expected, `found ${found}, expected ${expected}`).toBeLessThan(1 + tolerance);
}

// W14×48, 28 ft, of AISC 360-22 Commentary C2.1, Figs. C-C2.2 and C-C2.3, in inches and kips
const [E, I, L, w, H] = [29000, 484, 336, 0.2 / 12, 1];
const Av = 13.8 * 0.34;
const G = 11200;
const section = (): Section => {
  const plain = plainSection('W14×48', 14.1, I);
  return { ...plain, properties: { ...plain.properties, AvTyped_m2: Av } };
};
const wide = (parts: Parameters<typeof plainFrame>[0]): Frame => {
  const frame = plainFrame({ sections: [section()], ...parts });
  return { ...frame, materials: [{ ...frame.materials[0]!, E_Pa: E, G_Pa: G }] };
};
const held = { angle_rad: 0, rz: 'free' } as const;
const simple = (P: number): Frame =>
  wide({
    nodes: [['A', 0, 0], ['M', 0, L / 2], ['B', 0, L]],
    members: [plainMember('AM', 0, 1), plainMember('MB', 1, 2)],
    supports: [{ node: 0, ux: 'fixed', uy: 'fixed', ...held }, { node: 2, ux: 'fixed', uy: 'free', ...held }],
    nodeLoads: [{ case: 0, node: 2, Fx_N: 0, Fy_N: -P, Mz_Nm: 0 }],
    memberLoads: [0, 1].map((member) => ({
      kind: 'distributed', case: 0, member, axes: 'global', direction: 'x', q1_N_m: w, q2_N_m: w, from_m: 0, to_m: L / 2,
    })),
  }); // prettier-ignore
const cantilever = (P: number): Frame =>
  wide({
    nodes: [['A', 0, 0], ['B', 0, L]],
    members: [plainMember('AB', 0, 1)],
    supports: [{ node: 0, ux: 'fixed', uy: 'fixed', rz: 'fixed', angle_rad: 0 }],
    nodeLoads: [{ case: 0, node: 1, Fx_N: H, Fy_N: -P, Mz_Nm: 0 }],
  }); // prettier-ignore

describe('the second analysis, second order', () => {
  // closed forms: EI v″″ + P v″ = w with shear by Engesser, k² = P/(EI(1 − P/GAv)); printed figures from memory
  it.each([
    [150, 269, 0.224, 270, 0.23],
    [300, 313, 0.261, 316, 0.269],
    [450, 375, 0.311, 380, 0.322],
  ])('meets the braced benchmark under %d kip, with and without shear', (P, M, d, MShear, dShear) => {
    for (const [shear, printedM, printedD] of [[false, M, d], [true, MShear, dShear]] as const) {
      const state = analysed(simple(P), shear)!;
      const k = Math.sqrt(P / (E * I * (1 - (shear ? P / (G * Av) : 0))));
      const exact = ((w * E * I) / P) * (1 / Math.cos((k * L) / 2) - 1);
      close(Math.abs(state.endForces[5]!), exact);
      close(state.displacements[3]!, (exact - (w * L * L) / 8) / P);
      close(exact, printedM, 0.01);
      close(state.displacements[3]!, printedD, 0.01);
    } // prettier-ignore
  });

  it.each([
    [100, 469, 1.33, 470, 1.34],
    [150, 598, 1.75, 601, 1.77],
    [200, 848, 2.56, 856, 2.6],
  ])('meets the sway benchmark under %d kip, with and without shear', (P, M, d, MShear, dShear) => {
    for (const [shear, printedM, printedD] of [[false, M, d], [true, MShear, dShear]] as const) {
      const state = analysed(cantilever(P), shear)!;
      const soft = 1 - (shear ? P / (G * Av) : 0);
      const k = Math.sqrt(P / (E * I * soft));
      const exact = ((H / soft) * Math.tan(k * L)) / k;
      close(state.reactions[2], exact);
      close(state.displacements[3], (exact - H * L) / P);
      close(exact, printedM, 0.01);
      close(state.displacements[3], printedD, 0.01);
    } // prettier-ignore
  });

  it('stiffens a member in tension by the hyperbolic functions', () => {
    const k = Math.sqrt(200 / (E * I));
    close(analysed(cantilever(-200))!.reactions[2], (H * Math.tanh(k * L)) / k);
  });

  it('sways with what a leaning column carries', () => {
    // cantilever under P, beside it a column pinned at both ends under Q: H = (K(P) − Q/L) Δ, K(P) = P/(tan kL/k − L)
    const [P, Q] = [80, 60];
    const one = cantilever(P);
    const frame: Frame = {
      ...one,
      nodes: [...one.nodes, ...[L, 0].map((y_m, i) => ({ id: `C${i}`, x_m: 200, y_m, place: null }))],
      members: [
        ...one.members,
        plainMember('beam', 1, 2, { startJoint: 'pin', endJoint: 'pin' }),
        plainMember('leaning', 3, 2, { startJoint: 'pin', endJoint: 'pin' }),
      ],
      sections: [{ ...section(), properties: { ...section().properties, A_m2: 1e5 } }],
      supports: [...one.supports, { node: 3, ux: 'fixed', uy: 'fixed', ...held }],
      nodeLoads: [...one.nodeLoads, { case: 0, node: 2, Fx_N: 0, Fy_N: -Q, Mz_Nm: 0 }],
    };
    const k = Math.sqrt(P / (E * I));
    close(analysed(frame)!.displacements[3], H / (P / (Math.tan(k * L) / k - L) - Q / L), 1e-6);
  });

  it('bends a column by its own weight as Bessel functions say: 7.8373 EI/L² is the most it carries', () => {
    // Greenhill 1881: the smallest root of J₋₁⸝₃(2/3 √(qL³/EI)) is 1.866351
    const most = ((1.5 * 1.8663508) ** 2 * E * I) / L ** 3;
    const heavy = (q: number): Frame => ({
      ...cantilever(0),
      cases: [plainCase('loads')],
      memberLoads: [
        { kind: 'distributed', case: 0, member: 0, axes: 'global', direction: 'y', q1_N_m: -q, q2_N_m: -q, from_m: 0, to_m: L },
      ],
    });
    const first = (H * L ** 3) / (3 * E * I);
    expect(analysed(heavy(0.99999 * most))!.displacements[3]! / first).toBeGreaterThan(50_000);
    expect(analysed(heavy(1.00001 * most))).toBeNull();
  });
});
