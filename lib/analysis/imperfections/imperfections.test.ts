import { describe, expect, it } from 'vitest';
import type { Frame, MemberLoad } from '@/lib/model/frame';
import { plainCase, plainFrame, plainMember } from '../plain-frame';
import { columnsOf } from './columns';
import { gravityByNode } from './gravity-by-node';
import { notionalLoads } from './notional-loads';
import { initialSway, swayForces, swayImperfection } from './sway-imperfection';

const held = (node: number) => ({ node, ux: 'fixed' as const, uy: 'fixed' as const, rz: 'free' as const, angle_rad: 0 });

/** Two bays of 6 m, 9 m high, the middle column of two pieces of one span; columns 0, 1 + 2, 3, beams 4, 5. */
function twoBays(): Frame {
  return plainFrame({
    nodes: [['A', 0, 0], ['B', 0, 9], ['C', 6, 0], ['M', 6, 4], ['D', 6, 9], ['E', 12, 0], ['F', 12, 9]],
    members: [
      plainMember('AB', 0, 1),
      plainMember('CM', 2, 3, { span: 'mid' }),
      plainMember('DM', 4, 3, { span: 'mid' }),
      plainMember('EF', 5, 6, { role: 'column' }),
      plainMember('BD', 1, 4),
      plainMember('DF', 4, 6),
    ],
    supports: [held(0), held(2), held(5)],
    cases: [plainCase('dead')],
  }); // prettier-ignore
}
/** End forces with these axial forces at both ends, compression positive. */
const axial = (...P: number[]): Float64Array => Float64Array.from(P.flatMap((p) => [-p, 0, 0, -p, 0, 0]));

describe('columns', () => {
  it('are members that stand, a span of pieces being one, drawn either way', () => {
    expect(columnsOf(twoBays())).toEqual([
      { pieces: [{ member: 0, foot: 0, top: 1 }], foot: 0, top: 1 },
      { pieces: [{ member: 1, foot: 2, top: 3 }, { member: 2, foot: 3, top: 4 }], foot: 2, top: 4 },
      { pieces: [{ member: 3, foot: 5, top: 6 }], foot: 5, top: 6 },
    ]); // prettier-ignore
  });

  it('are not braces that happen to stand, and lean 20° at most without a role', () => {
    const lean = (dx: number, role: 'brace' | null) =>
      columnsOf(plainFrame({ nodes: [['A', 0, 0], ['B', dx, 5]], members: [plainMember('AB', 0, 1, { role })] })).length; // prettier-ignore
    expect([lean(0, 'brace'), lean(0, null), lean(5 * Math.tan(0.349), null), lean(5 * Math.tan(0.35), null)]).toEqual([
      0, 1, 1, 0,
    ]);
  });
});

describe('initial sway of EN 1993-1-1 5.3.2', () => {
  it('is φ₀ α_h α_m: 1/200 · 2/3 · √(2/3) for 9 m and three columns, by hand from (5.5)', () => {
    const { phi, alphaH, alphaM } = initialSway(9, 3);
    expect(alphaH).toBeCloseTo(2 / 3, 12);
    expect(alphaM).toBeCloseTo(0.816496580927726, 12);
    expect(phi).toBeCloseTo(0.00272165526975909, 14);
  });

  it('keeps α_h within 2/3 and 1', () => {
    expect(initialSway(3, 1)).toMatchObject({ alphaH: 1, phi: 0.005 });
    expect(initialSway(20, 1).alphaH).toBe(2 / 3);
    // 2/√6.25 = 0.8
    expect(initialSway(6.25, 1).phi).toBeCloseTo(0.004, 15);
  });

  it('counts the columns that carry at least half of the mean, tension and light ones left out', () => {
    const frame = twoBays();
    const m = (...P: number[]): number => swayImperfection(frame, columnsOf(frame), axial(...P, 0, 0)).m;
    expect(m(100, 200, 200, 100)).toBe(3);
    // mean 140, half of it 70
    expect(m(60, 300, 300, 60)).toBe(1);
    // exactly half of the mean of 100, 100 and 40 (80) counts
    expect(m(100, 100, 100, 40)).toBe(3);
    expect(m(100, 100, 100, -50)).toBe(2);
  });

  it('pushes with φN at the top of each column and the opposite at its foot', () => {
    const frame = twoBays();
    const phi = initialSway(9, 3).phi;
    const H = swayForces(frame, columnsOf(frame), axial(100e3, 200e3, 190e3, 110e3, 0, 0));
    const x = (node: number): number => H[2 * node]! / phi;
    expect(x(0)).toBeCloseTo(-100e3, 6);
    expect(x(1)).toBeCloseTo(100e3, 6);
    expect(x(2)).toBeCloseTo(-200e3, 6);
    // between the pieces what comes in there
    expect(x(3)).toBeCloseTo(10e3, 6);
    expect(x(4)).toBeCloseTo(190e3, 6);
    expect(x(6)).toBeCloseTo(110e3, 6);
    expect(H.filter((_, i) => i % 2 === 1).every((Fy) => Fy === 0)).toBe(true);
    expect(H.reduce((sum, F) => sum + F, 0)).toBeCloseTo(0, 9);
  });

  it('takes nothing from a column in tension, and nothing at all without columns', () => {
    const frame = twoBays();
    const H = swayForces(frame, columnsOf(frame), axial(100e3, 100e3, 100e3, -70e3, 0, 0));
    expect([H[2 * 5], H[2 * 6]]).toEqual([0, 0]);
    expect(swayForces(frame, [], axial(1, 1, 1, 1, 1, 1)).every((F) => F === 0)).toBe(true);
  });

  it('takes the larger end of a column whose force varies', () => {
    const frame = twoBays();
    const endForces = axial(100e3, 100e3, 100e3, 100e3, 0, 0);
    endForces[3] = -80e3;
    const H = swayForces(frame, columnsOf(frame), endForces);
    expect(H[2]).toBeCloseTo(initialSway(9, 3).phi * 100e3, 9);
  });
});

describe('notional loads of AISC 360-22 C2.2b', () => {
  const q = (member: number, value: number, axes: 'global' | 'projected' | 'local' = 'global'): MemberLoad => ({
    kind: 'distributed', case: 0, member, axes, direction: 'y', q1_N_m: value, q2_N_m: value, from_m: 0, to_m: 6,
  }); // prettier-ignore

  it('are 0.002 α Y, spread as the gravity load is: by hand for 10 kN/m on both beams and 30 kN on the middle', () => {
    const frame = {
      ...twoBays(),
      memberLoads: [q(4, -10e3), q(5, -10e3)],
      nodeLoads: [{ case: 0, node: 4, Fx_N: 7e3, Fy_N: -30e3, Mz_Nm: 9 }],
    };
    const loads = (alpha: number): number[] => [...notionalLoads(frame, gravityByNode(frame), Float64Array.of(1.2), alpha)];
    // B 30, D 60 + 30, F 30 kN × 1.2 × 0.002
    expect(loads(1).map((F) => Math.round(F * 1e6) / 1e6)).toEqual([0, 0, 72, 0, 0, 0, 0, 0, 216, 0, 0, 0, 72, 0]);
    expect(loads(1.6)[8]).toBeCloseTo(1.6 * 216, 9);
  });

  it('count self-weight and loads along a column at its ends, the foot’s share going into the ground', () => {
    const frame = { ...twoBays(), cases: [plainCase('dead', 1)] };
    const [down] = gravityByNode(frame);
    const w = 7850 * 53.81e-4 * 9.80665;
    expect(down![1]).toBeCloseTo((w * (9 + 6)) / 2, 6);
    const H = notionalLoads(frame, [down!], Float64Array.of(1), 1);
    expect(H[0]).toBe(0);
    expect(H[2]).toBeCloseTo(0.002 * down![1]!, 9);
  });

  it('leave out wind, upward loads and moments, and share part loads by the lever rule', () => {
    const base = twoBays();
    const part: MemberLoad = {
      kind: 'distributed',
      case: 0,
      member: 4,
      axes: 'global',
      direction: 'y',
      q1_N_m: 0,
      q2_N_m: -12e3,
      from_m: 0,
      to_m: 3,
    };
    const frame = { ...base, memberLoads: [part, { kind: 'moment' as const, case: 0, member: 5, M_Nm: 5e3, at_m: 2 }] };
    // 18 kN at 2 m of 6
    const [down] = gravityByNode(frame);
    expect(down![1]).toBeCloseTo(12e3, 6);
    expect(down![4]).toBeCloseTo(6e3, 6);
    const wind = { ...frame, cases: [{ ...plainCase('W'), kind: 'wind' as const }] };
    expect(gravityByNode(wind)[0]!.every((Y) => Y === 0)).toBe(true);
    expect(notionalLoads(frame, [down!], Float64Array.of(-1), 1).every((F) => F === 0)).toBe(true);
  });
});
