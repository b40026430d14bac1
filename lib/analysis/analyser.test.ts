import { describe, expect, it } from 'vitest';
import type { Frame, MemberLoad, Restraint, Support } from '@/lib/model/frame';
import { defaultSettings, type Settings } from '@/lib/model/settings';
import type { ResultState } from '@/lib/results/result';
import { createAnalyser } from './analyser';
import { appliedTotals } from './applied-totals';
import { outsideTolerance } from './certificate';
import { plainCase, plainFrame, plainMember, plainSection } from './plain-frame';

const EI = 210e9 * 8356e-8;
const EA = 210e9 * 53.81e-4;
const support = (node: number, ux: Restraint, uy: Restraint, rz: Restraint = 'free', angle_rad = 0): Support => ({
  node,
  ux,
  uy,
  rz,
  angle_rad,
});
const on = { case: 0, member: 0 };
const uniform = (q: number, L: number): MemberLoad => ({ ...on, kind: 'distributed', axes: 'global', direction: 'y', q1_N_m: q, q2_N_m: q, from_m: 0, to_m: L }); // prettier-ignore

function statesOf(frame: Frame): ResultState[] {
  const analysis = createAnalyser().analyse(frame);
  if (!analysis.ok) throw new Error(analysis.failure.message);
  return analysis.states;
}
function failureOf(frame: Frame): string {
  const analysis = createAnalyser().analyse(frame);
  if (analysis.ok) throw new Error('Expected no solution, got one');
  expect(analysis.failure.code).toBe('not-solved');
  return analysis.failure.message;
}
/** A beam of 6 m from A to B. */
function beam(supports: Support[], other: Partial<Parameters<typeof plainFrame>[0]> = {}, joints = {}): Frame {
  return plainFrame({ nodes: [['A', 0, 0], ['B', 6, 0]], members: [plainMember('AB', 0, 1, joints)], supports, ...other }); // prettier-ignore
}
const simply = [support(0, 'fixed', 'fixed'), support(1, 'free', 'fixed')];
const near = (found: number | undefined, value: number, share = 1e-9): void =>
  expect(Math.abs(found! - value), `${found} against ${value}`).toBeLessThanOrEqual(share * Math.abs(value));

describe('analysis', () => {
  it('gives a cantilever under a tip load P a deflection of PL³/3EI and a rotation of PL²/2EI', () => {
    const [state] = statesOf(
      beam([support(0, 'fixed', 'fixed', 'fixed')], { nodeLoads: [{ case: 0, node: 1, Fx_N: 0, Fy_N: -5e3, Mz_Nm: 0 }] }),
    );
    near(state!.displacements[4], (-5e3 * 6 ** 3) / (3 * EI));
    near(state!.displacements[5], (-5e3 * 6 ** 2) / (2 * EI));
    near(state!.reactions[1], 5e3);
    near(state!.reactions[2], 30e3);
    // at the start N, V, M; M is hogging there
    expect([...state!.endForces.slice(1, 3)].map(Math.round)).toEqual([5e3, -30e3]);
  });

  it('gives a beam with joints of stiffness k at both ends moments of qL²/12 ÷ (1 + 2EI/kL)', () => {
    const k = 4e6;
    const fixed = [support(0, 'fixed', 'fixed', 'fixed'), support(1, 'free', 'fixed', 'fixed')];
    const [state] = statesOf(beam(fixed, { memberLoads: [uniform(-1e4, 6)] }, { startJoint: k, endJoint: k }));
    near(state!.endForces[2], (-1e4 * 36) / 12 / (1 + (2 * EI) / (k * 6)));
    near(state!.endForces[5], (-1e4 * 36) / 12 / (1 + (2 * EI) / (k * 6)));
  });

  it('puts loads that stand straight on a support into its reaction, held or not', () => {
    const [state] = statesOf(beam(simply, { nodeLoads: [{ case: 0, node: 0, Fx_N: 2e3, Fy_N: -7e3, Mz_Nm: 0 }] }));
    expect([...state!.reactions]).toEqual([-2e3, 7e3, 0, 0, 0, 0]);
    expect(state!.endForces.every((q) => Math.abs(q) < 1e-9)).toBe(true);
  });

  it('counts a point load exactly at a member’s end: the start stands before it, the end after it', () => {
    const load = (at_m: number): MemberLoad => ({ ...on, kind: 'point', axes: 'global', direction: 'y', P_N: -9e3, at_m });
    const [start] = statesOf(beam(simply, { memberLoads: [load(0)] }));
    near(start!.reactions[1], 9e3);
    near(start!.endForces[1], 9e3);
    expect(Math.abs(start!.endForces[4]!)).toBeLessThan(1e-9);
    const [end] = statesOf(beam(simply, { memberLoads: [load(6)] }));
    near(end!.reactions[4], 9e3);
    near(end!.endForces[4], -9e3);
  });

  it('gives a sprung support −k times its movement, in its own turned axes', () => {
    const turned = Math.PI / 6;
    const k = 2e5;
    const frame = beam([support(0, 'fixed', 'fixed', 'fixed'), support(1, k, 'free', 'free', turned)], {
      memberLoads: [uniform(-1e4, 6)],
    });
    const [state] = statesOf(frame);
    const along = state!.displacements[3]! * Math.cos(turned) + state!.displacements[4]! * Math.sin(turned);
    near(state!.reactions[3], -k * along * Math.cos(turned));
    near(state!.reactions[4], -k * along * Math.sin(turned));
  });

  it('moves a turned support by its settlement along its own axes', () => {
    const frame = plainFrame({
      nodes: [['A', 0, 0], ['B', 6, 0]],
      members: [plainMember('AB', 0, 1)],
      supports: [support(0, 'fixed', 'fixed', 'fixed', 0.4)],
      settlements: [{ case: 0, node: 0, dx_m: 0.01, dy_m: null, rz_rad: 0.002 }],
    }); // prettier-ignore
    const [state] = statesOf(frame);
    near(state!.displacements[0], 0.01 * Math.cos(0.4));
    near(state!.displacements[3], 0.01 * Math.cos(0.4));
    near(state!.displacements[4], 0.01 * Math.sin(0.4) + 0.002 * 6);
  });

  it('lets heat stretch and bend a free beam without force: v″ = −α dT/depth', () => {
    const [state] = statesOf(beam(simply, { memberLoads: [{ ...on, kind: 'temperature', dT_K: 20, dTAcross_K: 15 }] }));
    near(state!.displacements[3], 12e-6 * 20 * 6);
    // top warmer: it rises in the middle, the start turns anticlockwise by κL/2
    near(state!.displacements[2], (12e-6 * 15 * 6) / 0.3 / 2);
    expect(state!.endForces.every((q) => Math.abs(q) < 1e-6)).toBe(true);
  });

  it('leaves out the rotation of a node where every member is pinned', () => {
    const frame = plainFrame({
      nodes: [['A', 0, 0], ['B', 3, 4], ['C', 6, 0]],
      members: [plainMember('AB', 0, 1, { axialOnly: true }), plainMember('BC', 1, 2, { startJoint: 'pin' })],
      supports: [support(0, 'fixed', 'fixed'), support(2, 'fixed', 'fixed')],
      nodeLoads: [{ case: 0, node: 1, Fx_N: 0, Fy_N: -8e3, Mz_Nm: 0 }],
    }); // prettier-ignore
    const [state] = statesOf(frame);
    expect(state!.displacements[5]).toBeNaN();
    expect(state!.displacements[2]).toBeNaN();
    expect(state!.displacements[8]).not.toBeNaN();
    near(state!.endForces[0], -5e3);
  });

  it('bends an axial only member between its ends as a simple beam', () => {
    const frame = beam(
      [support(0, 'fixed', 'fixed'), support(1, 'free', 'fixed')],
      { memberLoads: [uniform(-1e4, 6)] },
      { axialOnly: true },
    );
    const [state] = statesOf(frame);
    near(state!.endForces[1], 3e4);
    expect(state!.endForces[2]).toBe(0);
  });

  it('turns a section: bending about its minor axis', () => {
    const section = plainSection('turned', 53.81e-4, 8356e-8, 0.3);
    const frame = beam(
      [support(0, 'fixed', 'fixed', 'fixed')],
      {
        sections: [{ ...section, properties: { ...section.properties, Iminor_m4: 604e-8 } }],
        nodeLoads: [{ case: 0, node: 1, Fx_N: 0, Fy_N: -5e3, Mz_Nm: 0 }],
      },
      { turned: true },
    );
    near(statesOf(frame)[0]!.displacements[4], (-5e3 * 6 ** 3) / (3 * 210e9 * 604e-8));
  });

  it('adds a combination up from its cases, a case twice if it stands there twice', () => {
    const frame = beam(simply, {
      cases: [plainCase('dead', 1), plainCase('live')],
      memberLoads: [{ ...uniform(-1e4, 6), case: 1 }],
      combinations: [{ name: 'C', purpose: 'service', terms: [{ case: 0, factor: 1.2 }, { case: 1, factor: 1 }, { case: 1, factor: 0.6 }] }],
    }); // prettier-ignore
    const [dead, live, sum] = statesOf(frame);
    expect([...sum!.factors]).toEqual([1.2, 1.6]);
    near(dead!.reactions[1], (7850 * 53.81e-4 * 9.80665 * 6) / 2);
    near(sum!.reactions[1], 1.2 * dead!.reactions[1]! + 1.6 * live!.reactions[1]!);
    expect(sum).toMatchObject({ kind: 'combination', purpose: 'service', criticalLoadFactor: null, order: 1 });
  });

  it('gives the same bytes from a fresh analyser as from one that has seen other frames of the shape', () => {
    const frame = (q: number): Frame => beam(simply, { memberLoads: [uniform(q, 6)], combinations: [{ name: 'C', purpose: 'strength', terms: [{ case: 0, factor: 1 }] }] }); // prettier-ignore
    const used = createAnalyser();
    for (const q of [-1, -2, -3]) used.analyse(frame(q));
    expect(JSON.stringify(used.analyse(frame(-4)))).toBe(JSON.stringify(createAnalyser().analyse(frame(-4))));
  });

  it('keeps frames of one connectivity but other supports or joints apart', () => {
    const analyser = createAnalyser();
    const loads = { memberLoads: [uniform(-1e4, 6)] };
    const fixed = [support(0, 'fixed', 'fixed', 'fixed'), support(1, 'fixed', 'fixed', 'fixed')];
    const ok = [beam(simply, loads), beam(fixed, loads), beam(fixed, loads, { endJoint: 'pin' })].map((frame) => {
      const analysis = analyser.analyse(frame);
      return analysis.ok ? Math.round(analysis.states[0]!.endForces[2]!) : null;
    });
    expect(ok).toEqual([0, -30000, -45000]);
  });

  it('certifies what it gives', () => {
    const analysis = createAnalyser().analyse(beam(simply, { memberLoads: [uniform(-1e4, 6)] }));
    if (!analysis.ok) throw new Error(analysis.failure.message);
    const { residual, equilibrium, condition, digits, second, secondReason } = analysis.certificate;
    expect(residual).toBeLessThan(1e-14);
    expect(equilibrium).toBeLessThan(1e-14);
    expect(condition).toBeGreaterThan(1);
    expect(digits).toBeCloseTo(-Math.log10(Number.EPSILON * condition), 10);
    expect(second).toBeLessThan(1e-10);
    expect(secondReason).toBeNull();
  });

  it('says why there is no second analysis: sampled, or too large', () => {
    const sampled = createAnalyser().analyse(beam(simply), { second: false });
    expect(sampled.ok && sampled.certificate).toMatchObject({ second: null, secondReason: 'sampled' });
    const nodes = Array.from({ length: 110 }, (_, i) => [`N${i}`, i, 0] as const);
    const long = plainFrame({ nodes, members: nodes.slice(1).map(([id], i) => plainMember(id, i, i + 1)), supports: [support(0, 'fixed', 'fixed', 'fixed')] }); // prettier-ignore
    const large = createAnalyser().analyse(long);
    expect(large.ok && large.certificate).toMatchObject({ second: null, secondReason: 'too large' });
  });
});

describe('a frame that is not solved', () => {
  it('is one whose certificate is outside a tolerance, with the figure', () => {
    const good = { residual: 0, equilibrium: 0, condition: 1, digits: 15, second: 0, secondReason: null };
    expect(outsideTolerance(good)).toBeNull();
    expect(outsideTolerance({ ...good, residual: 2e-10 })).toContain('residual 2.0e-10');
    expect(outsideTolerance({ ...good, equilibrium: 3e-8 })).toContain('3.0e-8');
    expect(outsideTolerance({ ...good, second: 4e-6 })).toContain('differ by 4.0e-6');
    expect(outsideTolerance({ ...good, residual: NaN })).toContain('too large or too small');
    expect(outsideTolerance({ ...good, second: null, secondReason: 'sampled' })).toBeNull();
  });

  it('is one whose stiffnesses leave fewer than six digits, with the node that is hardly held', () => {
    const frame = beam([support(0, 0.01, 'fixed'), support(1, 'free', 'fixed')], {
      nodeLoads: [{ case: 0, node: 1, Fx_N: 1, Fy_N: 0, Mz_Nm: 0 }],
    });
    const message = failureOf(frame);
    expect(message).toMatch(/Node [AB] can almost freely slide horizontally/);
    expect(message).toContain('6 are asked for');
  });

  it('is one with a tension-only member that is not pinned, named', () => {
    expect(failureOf(beam(simply, {}, { tensionOnly: true }))).toContain('Member AB is tension only');
  });

  it('is one whose settings need what it does not give: G, fy', () => {
    const needs = (other: Partial<Settings>): string => {
      const analysis = createAnalyser().analyse(beam(simply), { settings: { ...defaultSettings, ...other } });
      return analysis.ok ? '' : analysis.failure.message;
    };
    expect(needs({ shearDeformation: true })).toContain('material steel needs G');
    expect(needs({ stiffnessReduction: 'AISC 360' })).toContain('material steel of member AB needs fy');
    expect(needs({ analysis: 'second order', imperfections: 'EN 1993-1-1' })).toBe('');
  });

  it('is one that lacks a property it needs: density, expansion, depth, I minor', () => {
    const material = { ...beam(simply).materials[0]!, density_kg_m3: null, expansion_perK: null };
    expect(failureOf(beam(simply, { materials: [material], cases: [plainCase('dead', 1)] }))).toContain('needs a density');
    const warm: MemberLoad = { ...on, kind: 'temperature', dT_K: 20, dTAcross_K: 0 };
    expect(failureOf(beam(simply, { materials: [material], memberLoads: [warm] }))).toContain('needs its expansion');
    const flat = { sections: [plainSection('S', 1e-3, 1e-6)], memberLoads: [{ ...warm, dTAcross_K: 5 }] };
    expect(failureOf(beam(simply, flat))).toContain('needs its depth');
    expect(failureOf(beam(simply, {}, { turned: true }))).toContain('needs I minor');
  });

  it('is one with a member of no length, a moment that nothing takes, or a settlement of what is not fixed', () => {
    expect(failureOf(beam(simply, { nodes: [['A', 1, 1], ['B', 1, 1]] }))).toContain('has no length'); // prettier-ignore
    const pinned = { nodeLoads: [{ case: 0, node: 0, Fx_N: 0, Fy_N: 0, Mz_Nm: 5 }] };
    expect(failureOf(beam(simply, pinned, { axialOnly: true }))).toContain('Node A has a moment');
    const settled = { settlements: [{ case: 0, node: 1, dx_m: 0.01, dy_m: null, rz_rad: null }] };
    expect(failureOf(beam(simply, settled))).toContain('Node B has a settlement dx');
  });
});

describe('applied load totals', () => {
  it('add up every sort of load as typed, about the origin', () => {
    const frame = plainFrame({
      nodes: [['A', 1, 2], ['B', 4, 6]],
      members: [plainMember('AB', 0, 1)],
      supports: [support(0, 'fixed', 'fixed', 'fixed')],
      cases: [plainCase('dead', 1), plainCase('other')],
      nodeLoads: [{ case: 1, node: 1, Fx_N: 10, Fy_N: -20, Mz_Nm: 5 }],
      memberLoads: [
        { case: 1, member: 0, kind: 'distributed', axes: 'projected', direction: 'y', q1_N_m: -2, q2_N_m: -2, from_m: 0, to_m: 5 },
        { case: 1, member: 0, kind: 'point', axes: 'local', direction: 'y', P_N: 10, at_m: 5 },
        { case: 1, member: 0, kind: 'moment', M_Nm: 7, at_m: 1 },
      ],
    }); // prettier-ignore
    const [dead, other] = appliedTotals(frame);
    near(dead!.Fy_N, -7850 * 53.81e-4 * 5 * 9.80665);
    near(dead!.Mz_Nm, dead!.Fy_N * 2.5);
    // 10 − 8 = 2; −20 − 6 + 6; moments 4·(−20) − 6·10 + 5, −6·2.5, 4·6 + 6·8, 7
    near(other!.Fx_N, 10 - 8, 1e-12);
    near(other!.Fy_N, -20, 1e-12);
    near(other!.Mz_Nm, -135 - 15 + 72 + 7, 1e-12);
    expect(other!.case).toBe('other');
  });
});

it('a bar under its own axial load stretches PL/EA', () => {
  const [state] = statesOf(beam(simply, { nodeLoads: [{ case: 0, node: 1, Fx_N: 1e5, Fy_N: 0, Mz_Nm: 0 }] }));
  near(state!.displacements[3], (1e5 * 6) / EA);
  near(state!.endForces[0], 1e5);
});
