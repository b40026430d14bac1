import { describe, expect, it } from 'vitest';
import { defaultSettings } from '@/lib/model/settings';
import { createAnalyser } from '../analyser';
import { plainCase, plainFrame, plainMember, plainSection } from '../plain-frame';
import { ropeAmong } from './ropes';
import { memberData } from '../member-data';

/** Two members of 5 m in a line, pulled with 50 kN, 100 N across between them; E = 210 GPa. */
const pulled = (I_m4: number) =>
  plainFrame({
    nodes: [['A', 0, 0], ['B', 5, 0], ['C', 10, 0]],
    members: [plainMember('AB', 0, 1), plainMember('BC', 1, 2)],
    sections: [plainSection('wire', 1e-4, I_m4)],
    supports: [
      { node: 0, ux: 'fixed', uy: 'fixed', rz: 'free', angle_rad: 0 },
      { node: 2, ux: 'free', uy: 'fixed', rz: 'free', angle_rad: 0 },
    ],
    cases: [plainCase('pull')],
    nodeLoads: [{ case: 0, node: 2, Fx_N: 50e3, Fy_N: 0, Mz_Nm: 0 }, { case: 0, node: 1, Fx_N: 0, Fy_N: -100, Mz_Nm: 0 }],
    combinations: [{ name: 'C1', purpose: 'strength', terms: [{ case: 0, factor: 1 }] }],
  }); // prettier-ignore
const analysed = (I_m4: number) =>
  createAnalyser().analyse(pulled(I_m4), { settings: { ...defaultSettings, analysis: 'second order' } });

describe('a member with hardly any I that is pulled', () => {
  it('hangs as a string does, P L/(4 N) at midspan, as long as it can be followed', () => {
    const analysis = analysed(2e-12);
    if (!analysis.ok) throw new Error(analysis.failure.message);
    // string: 100 N × 5 m / 2 / 50 kN, less what its little stiffness takes
    expect(analysis.states[1]!.displacements[4]! / -0.005).toBeCloseTo(1, 2);
  });

  it('is refused beyond, with the I that it would need: N L²/(2000² E)', () => {
    const analysis = analysed(1e-14);
    if (analysis.ok) throw new Error('Expected a refusal');
    // 50e3 · 25/(4e6 · 210e9) = 1.49e-12 m⁴
    expect(analysis.failure.code).toBe('not-solved');
    expect(analysis.failure.message).toMatch(/^C1: member AB is pulled so hard .* is 24398\. With an I of 0\.00015 cm⁴ or more/);
  });

  it('is no rope where it is pressed, slack or pulled little', () => {
    const frame = pulled(1e-14);
    const forces = (N: number) => Float64Array.from({ length: 12 }, (_, i) => (i % 3 === 0 ? N : 0));
    const among = (N: number, slack: number[] = []) => ropeAmong(frame, memberData(frame), forces(N), 1, slack, { sum: 0 });
    expect([among(-50e3), among(50), among(50e3, [0, 1])]).toEqual([null, null, null]);
    expect(among(50e3)).toMatchObject({ member: 0 });
  });

  it('counts all members and states of a frame together', () => {
    const frame = pulled(1e-11);
    const forces = Float64Array.from({ length: 12 }, (_, i) => (i % 3 === 0 ? 50e3 : 0));
    const count = { sum: 0 };
    let states = 0;
    while (!ropeAmong(frame, memberData(frame), forces, 1, [], count)) states++;
    // 200,000 over 771.5 a member
    expect(states).toBe(129);
  });
});
