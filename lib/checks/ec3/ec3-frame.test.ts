import { describe, expect, it } from 'vitest';
import { createAnalyser } from '@/lib/analysis/analyser';
import { plainCase, plainFrame, plainMember } from '@/lib/analysis/plain-frame';
import type { Frame, Member, MemberLoad, NodeLoad, Section } from '@/lib/model/frame';
import { defaultSettings, type Settings } from '@/lib/model/settings';
import { evaluateFrame } from '@/lib/results/evaluate';
import type { Check } from '@/lib/results/result';
import { findDesignation } from '@/lib/sections/find-designation';
import { workingFormat } from '../working-format';
import { workingOf } from '../working';
import { memberOf } from './hand-made-ec3';

// Whole frames through analysis, checks and working.
function named(designation: string): Section {
  const found = findDesignation(designation);
  if (!('section' in found)) throw new Error(`no ${designation}`);
  return found.section;
}

function checked(frame: Frame, change: Partial<Settings> = {}): (name: string) => Check {
  const settings: Settings = { ...defaultSettings, strengthCheck: 'EN 1993-1-1', ...change };
  const found = evaluateFrame(createAnalyser(), frame, settings, { second: false, all: false });
  if (found.status !== 'solved') throw new Error(found.failure?.message);
  return (name) => {
    const check = found.checks.find((one) => one.check.startsWith(name));
    if (!check) throw new Error(`no ${name}: ${found.checks.map((one) => one.check).join(', ')}`);
    expect(workingOf(check, workingFormat('metric', 0.9)).length).toBeGreaterThan(1);
    return check;
  };
}

const one = (section: Section, L: number, loads: { node?: NodeLoad; member?: MemberLoad }, member: Partial<Member> = {}): Frame =>
  plainFrame({
    nodes: [
      ['A', 0, 0],
      ['B', L, 0],
    ],
    members: [plainMember('AB', 0, 1, member)],
    sections: [section],
    materials: [{ ...memberOf(section, { fy: 235e6 }).material }],
    supports: [
      { node: 0, ux: 'fixed', uy: 'fixed', rz: 'free', angle_rad: 0 },
      { node: 1, ux: 'free', uy: 'fixed', rz: 'free', angle_rad: 0 },
    ],
    cases: [plainCase('loads')],
    nodeLoads: loads.node ? [loads.node] : [],
    memberLoads: loads.member ? [loads.member] : [],
    combinations: [{ name: 'C1', purpose: 'strength', terms: [{ case: 0, factor: 1 }] }],
  });

describe('frames by EN 1993-1-1', () => {
  // CTICM and SCI, Steel Buildings in Europe: Multi-Storey Part 4 (2010), Worked Example A.5, sheets 2-3: A 149 cm², I_z 8560 cm⁴
  it('HE 300 B of S235 with 2000 kN over 8.00 m and 5.60 m: 2000/2348 about z', () => {
    const node = { case: 0, node: 1, Fx_N: -2000e3, Fy_N: 0, Mz_Nm: 0 };
    const row = checked(one(named('HE 300 B'), 8, { node }, { lengthMajor_m: 8, lengthMinor_m: 5.6 }))('6.3.1');
    expect(row.inputs.axis).toBe('z');
    expect(Math.abs(row.ratio! / (2000 / 2347.75) - 1)).toBeLessThan(2e-3);
    expect(Math.abs((row.inputs.lambda as number) / 0.787 - 1)).toBeLessThan(1e-3);
  });

  // the same source, Worked Example A.1, sheets 3-5: M_cr 113.9 kN·m, λ̄LT 1.288 (C1 1.127, here 1.136)
  it('IPE 330 of S235 over 5.70 m with a uniform load on its top flange: λ̄LT 1.288', () => {
    const member = { case: 0, member: 0, kind: 'distributed', axes: 'local', direction: 'y', from_m: 0, to_m: 5.7, q1_N_m: -18e3, q2_N_m: -18e3 } as const; // prettier-ignore
    const find = checked(one(named('IPE 330'), 5.7, { member }), { loadHeight: 'top flange' });
    const row = find('6.3.2');
    expect(Math.abs((row.inputs.lambdaLT as number) / 1.288 - 1)).toBeLessThan(5e-3);
    expect(row.value! / 1e3).toBeCloseTo((18 * 5.7 ** 2) / 8, 3);
    expect(find('6.2.6').value! / 1e3).toBeCloseTo((18 * 5.7) / 2, 3);
  });
});
