import { describe, expect, it } from 'vitest';
import type { Frame, NodeLoad, Restraint, Support } from '@/lib/model/frame';
import { defaultSettings, type Settings } from '@/lib/model/settings';
import type { ResultState } from '@/lib/results/result';
import { createAnalyser } from './analyser';
import { plainCase, plainFrame, plainMember, plainSection } from './plain-frame';

// Closed forms of the beam-column: Timoshenko and Gere, Theory of Elastic Stability, 2nd ed., ch. 1 (from memory).
const EI = 210e9 * 8356e-8;
const h = 4;
const support = (node: number, ux: Restraint, uy: Restraint, rz: Restraint = 'free'): Support => ({
  node,
  ux,
  uy,
  rz,
  angle_rad: 0,
});
const load = (node: number, Fx_N: number, Fy_N: number, c = 0): NodeLoad => ({ case: c, node, Fx_N, Fy_N, Mz_Nm: 0 });
const once = [{ name: 'C1', purpose: 'strength' as const, terms: [{ case: 0, factor: 1 }] }];

function analysed(frame: Frame, settings: Partial<Settings>) {
  return createAnalyser().analyse(frame, { settings: { ...defaultSettings, ...settings } });
}
function states(frame: Frame, settings: Partial<Settings>): ResultState[] {
  const analysis = analysed(frame, settings);
  if (!analysis.ok) throw new Error(analysis.failure.message);
  expect(analysis.certificate.second).toBeLessThan(1e-7);
  return analysis.states;
}
function failure(frame: Frame, settings: Partial<Settings>): string {
  const analysis = analysed(frame, settings);
  if (analysis.ok) throw new Error('Expected no solution, got one');
  expect(analysis.failure.code).toBe('not-solved');
  return analysis.failure.message;
}
const near = (found: number | undefined, value: number, share = 1e-7): void =>
  expect(Math.abs(found! - value), `${found} against ${value}`).toBeLessThanOrEqual(share * Math.abs(value));

/** A cantilever column of 4 m under P, with fy such that P/(fy A) is `squash`. */
function cantilever(P: number, other: Partial<Parameters<typeof plainFrame>[0]> = {}, squash = 0.1): Frame {
  const frame = plainFrame({
    nodes: [['A', 0, 0], ['B', 0, h]],
    members: [plainMember('AB', 0, 1)],
    sections: [plainSection('stiff', 1, 8356e-8, 0.3)],
    supports: [support(0, 'fixed', 'fixed', 'fixed')],
    cases: [plainCase('dead')],
    nodeLoads: [load(1, 0, -P)],
    combinations: once,
    ...other,
  }); // prettier-ignore
  return { ...frame, materials: [{ ...frame.materials[0]!, fy_Pa: P / squash }] };
}
/** Base moment of a cantilever under H and P at its top. */
const tangent = (H: number, P: number, stiffness = EI): number => {
  const k = Math.sqrt(P / stiffness);
  return (H * Math.tan(k * h)) / k;
};

describe('the states of a frame', () => {
  const frame = cantilever(1e5, {
    cases: [plainCase('dead'), plainCase('wind')],
    combinations: [...once, { name: 'S', purpose: 'service', terms: [{ case: 1, factor: 1 }] }, { ...once[0]!, name: 'C2 (−)' }],
  });

  it('are cases, then combinations, both ways where strength has imperfections', () => {
    const names = (settings: Partial<Settings>): string[] => states(frame, settings).map(({ name, order }) => `${name} ${order}`);
    expect(names({})).toEqual(['dead 1', 'wind 1', 'C1 1', 'S 1', 'C2 (−) 1']);
    expect(names({ analysis: 'second order', imperfections: 'EN 1993-1-1' })).toEqual([
      'dead 1', 'wind 1', 'C1 → 2', 'C1 ← 2', 'S 2', 'C2 (−) → 2', 'C2 (−) ← 2',
    ]); // prettier-ignore
  });

  it('say how they were analysed, and nothing where they are plain', () => {
    expect(states(frame, {}).every((state) => state.method === null)).toBe(true);
    const [dead, , right, left, service] = states(frame, { analysis: 'second order', imperfections: 'AISC 360' });
    expect(dead!.method).toBeNull();
    expect(right!.method).toMatchObject({ imperfection: 'right', loadScale: 1, slack: [], stiffness: null });
    expect(left!.method!.notional![2]).toBe(-right!.method!.notional![2]!);
    expect(service!.method).toMatchObject({ imperfection: null, notional: null });
    expect(right!.method!.iterations).toBeGreaterThanOrEqual(1);
    expect(right!.method!.change).toBeLessThan(1e-9);
  });

  it('have α_cr for strength only, the same both ways', () => {
    const [, , right, left, service] = states(frame, { analysis: 'second order', imperfections: 'EN 1993-1-1' });
    near(right!.criticalLoadFactor!, (Math.PI ** 2 * EI) / (2 * h) ** 2 / 1e5, 1e-9);
    expect(left!.criticalLoadFactor).toBe(right!.criticalLoadFactor);
    expect(service!.criticalLoadFactor).toBeNull();
  });

  it('are the same bytes in both directions where there is no column, without forces', () => {
    const beam = { ...frame, members: [{ ...frame.members[0]!, role: 'arm' as const }] };
    const [, , right, left] = states(beam, { analysis: 'second order', imperfections: 'EN 1993-1-1' });
    expect([right!.name, right!.method!.notional, right!.method!.imperfection]).toEqual(['C1 →', null, 'right']);
    expect([...left!.displacements]).toEqual([...right!.displacements]);
  });
});

describe('imperfections of EN 1993-1-1', () => {
  it('bend a cantilever column by φPh to first order, φ = 1/200, the base’s own share in its reaction', () => {
    const [, right, left] = states(cantilever(1e5), { imperfections: 'EN 1993-1-1' });
    near(right!.reactions[2], (1e5 * h) / 200);
    near(left!.reactions[2], (-1e5 * h) / 200);
    // φP at the top, the opposite straight on the support
    expect(Math.abs(right!.reactions[0]!)).toBeLessThan(1e-6);
  });

  it('bend it by φP tan(kh)/k to second order', () => {
    const P = 6e5;
    const [, right] = states(cantilever(P), { analysis: 'second order', imperfections: 'EN 1993-1-1' });
    near(right!.reactions[2], tangent(P / 200, P));
  });
});

describe('imperfections and reduced stiffness of AISC 360-22', () => {
  it('LRFD: 0.002 P and 0.8 EI', () => {
    const P = 5e5;
    const settings = { analysis: 'second order', imperfections: 'AISC 360', stiffnessReduction: 'AISC 360', strengthCheck: 'AISC 360-22 LRFD' } as const; // prettier-ignore
    const [, right] = states(cantilever(P), settings);
    near(right!.reactions[2], tangent(0.002 * P, P, 0.8 * EI));
    expect([...right!.method!.stiffness!]).toEqual([0.8, 0.8]);
  });

  it('ASD: under 1.6 P, 0.002 · 1.6 P, and divided by 1.6 (C2.1(d), C2.2b)', () => {
    const P = 4e5;
    const settings = { analysis: 'second order', imperfections: 'AISC 360', stiffnessReduction: 'AISC 360', strengthCheck: 'AISC 360-22 ASD' } as const; // prettier-ignore
    const [, right] = states(cantilever(P), settings);
    near(right!.reactions[2], tangent(0.002 * 1.6 * P, 1.6 * P, 0.8 * EI) / 1.6);
    near(right!.reactions[1], P);
    expect(right!.method).toMatchObject({ loadScale: 1.6 });
    near(right!.method!.notional![2], 0.002 * 1.6 * P);
  });

  it('τ_b: 0.84 at P = 0.7 fy A, and 0.8 of everything', () => {
    const P = 5e5;
    const settings = { analysis: 'second order', imperfections: 'AISC 360', stiffnessReduction: 'AISC 360' } as const;
    const [, right] = states(cantilever(P, {}, 0.7), settings);
    near(right!.method!.stiffness![1], 0.8 * 0.84, 1e-9);
    near(right!.reactions[2], tangent(0.002 * P, P, 0.8 * 0.84 * EI));
  });

  it('ASD to first order: τ_b with 1.6 P all the same', () => {
    const settings = { stiffnessReduction: 'AISC 360', strengthCheck: 'AISC 360-22 ASD' } as const;
    const [, state] = states(cantilever(5e5, {}, 0.5), settings);
    near(state!.method!.stiffness![1], 0.8 * 4 * 0.8 * 0.2, 1e-9);
  });

  it('is not solved at the squash load, the member named', () => {
    const message = failure(cantilever(5e5, {}, 1.01), { stiffnessReduction: 'AISC 360' });
    expect(message).toContain('C1: unstable at this load: member AB is pressed to 1.01 of fy × A');
  });

  it('leaves service combinations as they are', () => {
    const frame = cantilever(5e5, { combinations: [{ ...once[0]!, purpose: 'service' }] });
    const settings = { analysis: 'second order', imperfections: 'AISC 360', stiffnessReduction: 'AISC 360', strengthCheck: 'AISC 360-22 ASD' } as const; // prettier-ignore
    const found = states(frame, settings);
    expect(found.map(({ name }) => name)).toEqual(['dead', 'C1']);
    expect(found[1]!.method).toMatchObject({ stiffness: null, loadScale: 1, notional: null });
  });
});

describe('a leaning column', () => {
  it('adds its load over its height to the sway of the one that holds it: Δ = H/(P₁/(tan kh/k − h) − P₂/h)', () => {
    const [P1, P2, H] = [2e5, 3e5, 5e3];
    const frame = cantilever(P1, {
      nodes: [['A', 0, 0], ['B', 0, h], ['C', 6, 0], ['D', 6, h]],
      members: [plainMember('AB', 0, 1), plainMember('CD', 2, 3, { axialOnly: true }), plainMember('BD', 1, 3, { axialOnly: true })],
      sections: [plainSection('stiff', 1e4, 8356e-8, 0.3)],
      supports: [support(0, 'fixed', 'fixed', 'fixed'), support(2, 'fixed', 'fixed')],
      nodeLoads: [load(1, H, -P1), load(3, 0, -P2)],
    }); // prettier-ignore
    const [, state] = states(frame, { analysis: 'second order' });
    const k = Math.sqrt(P1 / EI);
    near(state!.displacements[3], H / (P1 / (Math.tan(k * h) / k - h) - P2 / h), 1e-6);
  });
});

describe('an unstable combination', () => {
  it('names itself, how far it got and α_cr', () => {
    const P = (1.25 * (Math.PI ** 2 * EI)) / (2 * h) ** 2;
    const frame = cantilever(P, { nodeLoads: [load(1, 1e3, -P)], combinations: [{ ...once[0]!, name: 'ULS 7' }] });
    const message = failure(frame, { analysis: 'second order' });
    expect(message).toMatch(
      /^ULS 7: unstable at this load: it stood up to 0\.7\d* of its loads, where member AB has turned by 0\.1 rad.*; its critical load factor.* is 0\.8\./,
    );
    const still = { ...frame, nodeLoads: [load(1, 1, -P)] };
    expect(failure(still, { analysis: 'second order' })).toMatch(
      /^ULS 7: unstable at this load: it stood up to 0\.(79|80)\d* of its loads.*; its critical load factor.* is 0\.8\./,
    );
    expect(failure(frame, { analysis: 'second order', imperfections: 'EN 1993-1-1' })).toMatch(/^ULS 7 →: unstable/);
  });
});
