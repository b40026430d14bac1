import { describe, expect, it } from 'vitest';
import type { Frame, MemberLoad, NodeLoad, Restraint, Support } from '@/lib/model/frame';
import { defaultSettings } from '@/lib/model/settings';
import { createAnalyser } from '../analyser';
import { plainCase, plainFrame, plainMember, plainSection } from '../plain-frame';

// Euler's cases and the column under its own weight: Timoshenko and Gere, Theory of Elastic Stability, 2nd ed., ch. 2
// (from memory; roots worked out again to the digits given).
const EI = 210e9 * 8356e-8;
const L = 6;
const support = (node: number, ux: Restraint, uy: Restraint, rz: Restraint = 'free'): Support => ({
  node,
  ux,
  uy,
  rz,
  angle_rad: 0,
});
const strength = [{ name: 'C1', purpose: 'strength' as const, terms: [{ case: 0, factor: 1 }] }];
const down = (node: number, P: number): NodeLoad => ({ case: 0, node, Fx_N: 0, Fy_N: -P, Mz_Nm: 0 });

/** Section stiff along its axis, so that only bending counts, as in the closed forms. */
const inextensible = [plainSection('stiff', 10, 8356e-8, 0.3)];

function alpha(frame: Frame): number | null {
  const analysis = createAnalyser().analyse(frame);
  if (!analysis.ok) throw new Error(analysis.failure.message);
  return analysis.states[analysis.states.length - 1]!.criticalLoadFactor;
}
function column(base: Restraint, top: Support, other: Partial<Parameters<typeof plainFrame>[0]> = {}, joints = {}): Frame {
  return plainFrame({
    nodes: [['A', 0, 0], ['B', 0, L]],
    members: [plainMember('AB', 0, 1, joints)],
    sections: inextensible,
    supports: [support(0, 'fixed', 'fixed', base), top],
    nodeLoads: [down(1, 1e3)],
    combinations: strength,
    ...other,
  }); // prettier-ignore
}
const near = (found: number | null, value: number, share: number): void => {
  expect(Math.abs((found ?? NaN) / value - 1), `${found} against ${value}`).toBeLessThan(share);
};

describe('the critical load factor', () => {
  it('is Euler’s load of a column between pins, its only buckling being between its nodes', () => {
    near(alpha(column('free', support(1, 'fixed', 'free'))), (Math.PI ** 2 * EI) / L ** 2 / 1e3, 1e-9);
  });

  it('is the same for pins in the member’s own ends, and for an axial only member', () => {
    const euler = (Math.PI ** 2 * EI) / L ** 2 / 1e3;
    near(alpha(column('fixed', support(1, 'fixed', 'free', 'fixed'), {}, { startJoint: 'pin', endJoint: 'pin' })), euler, 1e-9);
    near(alpha(column('free', support(1, 'fixed', 'free'), {}, { axialOnly: true })), euler, 1e-9);
  });

  it('is Euler’s load for a cantilever, a guided and a fully fixed column', () => {
    near(alpha(column('fixed', { ...support(1, 'free', 'free') })), (Math.PI ** 2 * EI) / (2 * L) ** 2 / 1e3, 1e-9);
    near(alpha(column('fixed', support(1, 'free', 'free', 'fixed'))), (Math.PI ** 2 * EI) / L ** 2 / 1e3, 1e-9);
    near(alpha(column('fixed', support(1, 'fixed', 'free', 'fixed'))), (4 * Math.PI ** 2 * EI) / L ** 2 / 1e3, 1e-9);
  });

  it('is 4.4934² EI/L² for a propped column', () => {
    near(alpha(column('fixed', support(1, 'fixed', 'free'))), (4.493409457909064 ** 2 * EI) / L ** 2 / 1e3, 1e-9);
  });

  it('of a cantilever on a rotational spring meets φ tan φ = kL/EI, the spring in the support or in the joint', () => {
    // φ tan φ = 1 at φ = 0.860333589
    const value = (0.8603335890193797 ** 2 * EI) / L ** 2 / 1e3;
    near(alpha(column(EI / L, support(1, 'free', 'free'))), value, 1e-9);
    near(alpha(column('fixed', support(1, 'free', 'free'), {}, { startJoint: EI / L })), value, 1e-9);
  });

  it('of a cantilever under its own weight is 7.83735 EI/L³, of a pinned column 18.5687 EI/L³, within 1e-5', () => {
    const q = 1e3;
    const own: MemberLoad = { kind: 'distributed', case: 0, member: 0, axes: 'global', direction: 'y', q1_N_m: -q, q2_N_m: -q, from_m: 0, to_m: L }; // prettier-ignore
    const loads = { nodeLoads: [], memberLoads: [own] };
    near(alpha(column('fixed', support(1, 'free', 'free'), loads)), (7.837347 * EI) / L ** 3 / q, 1e-5);
    near(alpha(column('free', support(1, 'fixed', 'free'), loads)), (18.5687 * EI) / L ** 3 / q, 1e-5);
  });

  it('counts two equal columns that buckle at one load', () => {
    const frame = plainFrame({
      nodes: [['A', 0, 0], ['B', 0, L], ['C', 9, 0], ['D', 9, L]],
      members: [plainMember('AB', 0, 1), plainMember('CD', 2, 3)],
      sections: inextensible,
      supports: [support(0, 'fixed', 'fixed', 'fixed'), support(2, 'fixed', 'fixed', 'fixed')],
      nodeLoads: [down(1, 1e3), down(3, 1e3)],
      combinations: strength,
    }); // prettier-ignore
    near(alpha(frame), (Math.PI ** 2 * EI) / (2 * L) ** 2 / 1e3, 1e-6);
  });

  it('takes the whole combination: a column that leans on another takes half of what that one can carry', () => {
    // pinned columns of 1 each side of one fixed column: the sway stiffness of one holds three loads (small-P limit)
    const frame = plainFrame({
      nodes: [['A', 0, 0], ['B', 0, L], ['C', 8, 0], ['D', 8, L]],
      members: [plainMember('AB', 0, 1), plainMember('CD', 2, 3, { axialOnly: true }), plainMember('BD', 1, 3, { axialOnly: true })],
      sections: [...inextensible],
      supports: [support(0, 'fixed', 'fixed', 'fixed'), support(2, 'fixed', 'fixed')],
      nodeLoads: [down(1, 1e3), down(3, 1e3)],
      combinations: strength,
    }); // prettier-ignore
    // sway stiffness under P: P k/(tan kL − kL) = P/L (leaning column): tan φ = 2φ, φ = 1.165561
    near(alpha(frame), (1.1655611852072113 ** 2 * EI) / L ** 2 / 1e3, 1e-6);
  });

  it('is none for a tie, an unloaded frame and a warmed determinate frame, and is not asked of a service combination', () => {
    expect(alpha(column('fixed', support(1, 'free', 'free'), { nodeLoads: [down(1, -1e3)] }))).toBeNull();
    expect(alpha(column('fixed', support(1, 'free', 'free'), { nodeLoads: [] }))).toBeNull();
    const warm: MemberLoad = { kind: 'temperature', case: 0, member: 0, dT_K: 30, dTAcross_K: 10 };
    expect(alpha(column('fixed', support(1, 'free', 'free'), { nodeLoads: [], memberLoads: [warm] }))).toBeNull();
    expect(
      alpha(column('fixed', support(1, 'free', 'free'), { combinations: [{ ...strength[0]!, purpose: 'service' }] })),
    ).toBeNull();
  });

  it('finds a positive factor although a tie’s negative ones are nearer to nought', () => {
    // the tie carries 100 times what the strut does
    const frame = plainFrame({
      nodes: [['A', 0, 0], ['B', 0, L], ['C', 5, 0], ['D', 5, L]],
      members: [plainMember('AB', 0, 1), plainMember('CD', 2, 3)],
      sections: inextensible,
      supports: [support(0, 'fixed', 'fixed', 'fixed'), support(2, 'fixed', 'fixed', 'fixed')],
      cases: [plainCase('loads')],
      nodeLoads: [down(1, 1e3), down(3, -1e5)],
      combinations: strength,
    }); // prettier-ignore
    near(alpha(frame), (Math.PI ** 2 * EI) / (2 * L) ** 2 / 1e3, 1e-9);
  });

  it('is halved when the loads are doubled, and turns with a sign', () => {
    const frame = column('fixed', support(1, 'free', 'free'));
    const combinations = [1, 2, -1].map((factor) => ({
      name: `${factor}`,
      purpose: 'strength' as const,
      terms: [{ case: 0, factor }],
    }));
    const analysis = createAnalyser().analyse({ ...frame, combinations });
    if (!analysis.ok) throw new Error(analysis.failure.message);
    const [one, two, minus] = analysis.states.slice(1).map((state) => state.criticalLoadFactor);
    near(two!, one! / 2, 1e-10);
    expect(minus).toBeNull();
  });

  it('with shear is Engesser’s P/(1 + P/GAv): columns between pins, on one foot, fixed at both ends', () => {
    // Timoshenko and Gere, Theory of Elastic Stability, 2nd ed., 2.17 (from memory)
    const GAv = 2e6;
    const sheared = (frame: Frame): number => {
      const properties = { ...frame.sections[0]!.properties, AvShear_m2: GAv / 81e9 };
      const of = {
        ...frame,
        sections: [{ ...frame.sections[0]!, properties }],
        materials: [{ ...frame.materials[0]!, G_Pa: 81e9 }],
      };
      const analysis = createAnalyser().analyse(of, { settings: { ...defaultSettings, shearDeformation: true } });
      if (!analysis.ok) throw new Error(analysis.failure.message);
      return analysis.states[1]!.criticalLoadFactor!;
    };
    const lost = (P: number): number => P / (1 + P / GAv) / 1e3;
    const euler = (Math.PI ** 2 * EI) / L ** 2;
    near(sheared(column('free', support(1, 'fixed', 'free'))), lost(euler), 1e-9);
    near(sheared(column('fixed', support(1, 'free', 'free'))), lost(euler / 4), 1e-9);
    near(sheared(column('fixed', support(1, 'fixed', 'free', 'fixed'))), lost(4 * euler), 1e-9);
    near(sheared(column('fixed', support(1, 'free', 'free', 'fixed'))), lost(euler), 1e-9);
  });
});
