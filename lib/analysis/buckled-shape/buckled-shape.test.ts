import { describe, expect, it } from 'vitest';
import type { Frame, Member, Restraint, Support } from '@/lib/model/frame';
import { defaultSettings } from '@/lib/model/settings';
import { createAnalyser } from '../analyser';
import { plainFrame, plainMember, plainSection } from '../plain-frame';
import { buckledShape, type BuckledShape } from './buckled-shape';

const L = 6;
const support = (node: number, ux: Restraint, uy: Restraint, rz: Restraint = 'free'): Support => ({
  node,
  ux,
  uy,
  rz,
  angle_rad: 0,
});
function column(base: Restraint, top: Support | null, other: Partial<Member> = {}): Frame {
  return plainFrame({
    nodes: [['A', 0, 0], ['B', 0, L]],
    members: [plainMember('AB', 0, 1, other)],
    sections: [plainSection('stiff', 10, 8356e-8, 0.3)],
    supports: [support(0, 'fixed', 'fixed', base), ...(top ? [top] : [])],
    nodeLoads: [{ case: 0, node: 1, Fx_N: 0, Fy_N: -1e3, Mz_Nm: 0 }],
    combinations: [{ name: 'C1', purpose: 'strength', terms: [{ case: 0, factor: 1 }] }],
  }); // prettier-ignore
}
function shape(frame: Frame, analysis: 'first order' | 'second order' = 'first order', state = -1): BuckledShape | null {
  const result = createAnalyser().analyse(frame, { settings: { ...defaultSettings, analysis } });
  if (!result.ok) throw new Error(result.failure.message);
  return buckledShape(frame, result.states.at(state)!);
}
/** The sideways movement of a standing member against a formula of y. */
function expectLine(points: Float64Array, at: (y: number) => number): void {
  expect(points.length).toBeGreaterThanOrEqual(4 * 17);
  for (let i = 0; i < points.length; i += 4) expect(points[i + 2]).toBeCloseTo(at(points[i + 1]!), 5);
}

// Timoshenko and Gere, Theory of Elastic Stability, 2nd ed., ch. 2 (from memory)
describe('the buckled shape', () => {
  it('of a cantilever column is 1 − cos(πy/2L), its top going to the right', () => {
    for (const analysis of ['first order', 'second order'] as const) {
      const found = shape(column('fixed', null), analysis)!;
      expectLine(found.members[0]!, (y) => 1 - Math.cos((Math.PI * y) / 2 / L));
      expect(found.kind).toBe('sway');
    }
  });

  it('of a column between pins is sin(πy/L), though no node moves: pins of the frame or of the member', () => {
    for (const frame of [
      column('free', support(1, 'fixed', 'free')),
      column('fixed', support(1, 'fixed', 'free', 'fixed'), { axialOnly: true, startJoint: 'pin', endJoint: 'pin' }),
    ]) {
      const found = shape(frame)!;
      expectLine(found.members[0]!, (y) => Math.sin((Math.PI * y) / L));
      expect(found.kind).toBe('member');
    }
  });

  it('of a column fixed at both ends is ½(1 − cos(2πy/L))', () => {
    const found = shape(column('fixed', support(1, 'fixed', 'free', 'fixed')))!;
    expectLine(found.members[0]!, (y) => (1 - Math.cos((2 * Math.PI * y) / L)) / 2);
  });

  it('carries the state’s α_cr, and is none where nothing is pressed or none was asked for', () => {
    expect(shape(column('fixed', null))!.factor).toBeCloseTo((Math.PI ** 2 * 210e9 * 8356e-8) / (2 * L) ** 2 / 1e3, 4);
    expect(shape({ ...column('fixed', null), nodeLoads: [] })).toBeNull();
    expect(shape(column('fixed', null), 'first order', 0)).toBeNull();
  });

  it('of two equal columns is one that both share', () => {
    const frame = plainFrame({
      ...column('fixed', null),
      nodes: [['A', 0, 0], ['B', 0, L], ['C', 9, 0], ['D', 9, L]],
      members: [plainMember('AB', 0, 1), plainMember('CD', 2, 3)],
      supports: [support(0, 'fixed', 'fixed', 'fixed'), support(2, 'fixed', 'fixed', 'fixed')],
      nodeLoads: [1, 3].map((node) => ({ case: 0, node, Fx_N: 0, Fy_N: -1e3, Mz_Nm: 0 })),
    }); // prettier-ignore
    const found = shape(frame)!;
    for (const points of found.members) expect(points[4 * 16 + 2]).toBeGreaterThan(0.3);
  });

  it('leaves slack ties straight between their nodes', () => {
    const tie: Member = plainMember('AD', 0, 3, { axialOnly: true, tensionOnly: true, startJoint: 'pin', endJoint: 'pin' });
    const frame = plainFrame({
      ...column('fixed', null),
      nodes: [['A', 0, 0], ['B', 0, L], ['C', 6, 0], ['D', 6, L]],
      members: [plainMember('AB', 0, 1), plainMember('CD', 2, 3), plainMember('BD', 1, 3), tie],
      supports: [support(0, 'fixed', 'fixed'), support(2, 'fixed', 'fixed')],
      nodeLoads: [{ case: 0, node: 1, Fx_N: -50, Fy_N: -1e3, Mz_Nm: 0 }],
    }); // prettier-ignore
    const found = shape(frame)!;
    expect(found.members.map((points) => points.length / 4)).toEqual([17, 17, 17, 2]);
    expect([...found.members[3]!.slice(6)]).toEqual([...found.members[1]!.slice(-2)]);
    expect(found.kind).toBe('sway');
  });
});
