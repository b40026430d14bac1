import { describe, expect, it } from 'vitest';
import type { Frame, MemberLoad } from '@/lib/model/frame';
import type { MemberLine } from '@/lib/results/result';
import { createAnalyser } from './analyser';
import { memberExtremes } from './member-extremes';
import { memberLine } from './member-line';
import { plainFrame, plainMember } from './plain-frame';
import { sampleLine } from './sample-line';
import { valueAt } from './value-at';

const EI = 210e9 * 8356e-8;
const on = { case: 0, member: 0 };

function lineOf(memberLoads: MemberLoad[], L: number, fixedStart = false): MemberLine {
  const frame: Frame = plainFrame({
    nodes: [['A', 0, 0], ['B', L, 0]],
    members: [plainMember('AB', 0, 1)],
    supports: [
      { node: 0, ux: 'fixed', uy: 'fixed', rz: fixedStart ? 'fixed' : 'free', angle_rad: 0 },
      { node: 1, ux: 'free', uy: 'fixed', rz: 'free', angle_rad: 0 },
    ],
    memberLoads,
  }); // prettier-ignore
  const analysis = createAnalyser().analyse(frame);
  if (!analysis.ok) throw new Error(analysis.failure.message);
  return memberLine(frame, analysis.states[0]!, 0);
}
const line = (q1: number, q2: number, from_m: number, to_m: number, direction: 'x' | 'y' = 'y'): MemberLoad => ({ ...on, kind: 'distributed', axes: 'local', direction, q1_N_m: q1, q2_N_m: q2, from_m, to_m }); // prettier-ignore
const point = (P_N: number, at_m: number, direction: 'x' | 'y' = 'y'): MemberLoad => ({ ...on, kind: 'point', axes: 'local', direction, P_N, at_m }); // prettier-ignore

describe('extremes along a member', () => {
  it('stand at irrational places: a triangular load’s largest moment at L/√3, its deflection at L√(1 − √(8/15))', () => {
    // AISC Steel Construction Manual, Table 3-23 (from memory)
    const L = Math.SQRT2 * 5;
    const q = 12e3;
    const { M, deflection } = memberExtremes(lineOf([line(0, -q, 0, L)], L));
    expect(M.maxAt / L).toBeCloseTo(1 / Math.sqrt(3), 12);
    expect(M.max / ((q * L ** 2) / (9 * Math.sqrt(3)))).toBeCloseTo(1, 12);
    expect(deflection.at / L).toBeCloseTo(Math.sqrt(1 - Math.sqrt(8 / 15)), 9);
    expect(deflection.value / ((-0.00652218 * q * L ** 4) / EI)).toBeCloseTo(1, 5);
  });

  it('of a propped cantilever under a uniform load stand at (15 − √33)/16 L from the fixed end', () => {
    const { deflection, M } = memberExtremes(lineOf([line(-1e4, -1e4, 0, 6)], 6, true));
    expect(deflection.at).toBeCloseTo((6 * (15 - Math.sqrt(33))) / 16, 10);
    expect(M).toMatchObject({ minAt: 0, maxAt: expect.closeTo((6 * 5) / 8, 10) as number });
    expect(M.max).toBeCloseTo((9 / 128) * 1e4 * 36, 6);
  });

  it('count both sides of a jump, and name the place nearest the start among equals', () => {
    const { V, M, N } = memberExtremes(lineOf([point(-6e3, 2), point(-6e3, 4), point(5e3, 3, 'x')], 6));
    expect(V.max).toBeCloseTo(6e3, 6);
    expect(V.maxAt).toBe(0);
    expect(V.min).toBeCloseTo(-6e3, 6);
    expect(V.minAt).toBe(4);
    expect(M.max).toBeCloseTo(12e3, 6);
    expect(M.maxAt).toBe(2);
    // held at A: tension up to the force, nothing after it
    expect(N).toMatchObject({ max: 5e3, maxAt: 0, minAt: 3 });
    expect(Math.abs(N.min)).toBeLessThan(1e-9);
  });

  it('see a jump exactly at an end from both sides', () => {
    const loaded = lineOf([point(-9e3, 0), point(-3e3, 6)], 6);
    const { V } = memberExtremes(loaded);
    expect(V.max).toBeCloseTo(9e3, 9);
    expect(V.maxAt).toBe(0);
    expect(V.min).toBeCloseTo(-3e3, 9);
    expect(V.minAt).toBe(6);
    expect(valueAt(loaded, 0, 'before').V).toBeCloseTo(9e3, 9);
    expect(Math.abs(valueAt(loaded, 0, 'after').V)).toBeLessThan(1e-9);
    expect(Math.abs(valueAt(loaded, 6, 'before').V)).toBeLessThan(1e-9);
    expect(valueAt(loaded, 6, 'after').V).toBeCloseTo(-3e3, 9);
  });

  it('give a straight member no deflection at its start', () => {
    expect(memberExtremes(lineOf([], 6)).deflection).toEqual({ value: 0, at: 0 });
  });

  it('lie above every sample and are met by one', () => {
    const loaded = lineOf(
      [line(-3e3, 8e3, 1.1, 4.7), point(-5e3, 2.3), { ...on, kind: 'moment', M_Nm: 4e3, at_m: 3.3 }],
      6,
      true,
    );
    const { M, V, deflection } = memberExtremes(loaded);
    let most = 0;
    for (let i = 0; i <= 5000; i++) {
      const x = Math.min((6 * i) / 5000, loaded.length);
      for (const side of ['before', 'after'] as const) {
        const at = valueAt(loaded, x, side);
        expect(at.M).toBeLessThanOrEqual(M.max + 1e-6);
        expect(at.M).toBeGreaterThanOrEqual(M.min - 1e-6);
        expect(at.V).toBeLessThanOrEqual(V.max + 1e-6);
        most = Math.max(most, Math.abs(at.v));
      }
    }
    expect(Math.abs(deflection.value)).toBeGreaterThanOrEqual(most - 1e-15);
    expect(Math.abs(deflection.value) / most).toBeCloseTo(1, 5);
  });
});

describe('a member line', () => {
  it('keeps dM/dx = V and v″ = M/EI on every stretch', () => {
    for (const segment of lineOf([line(-3e3, 8e3, 1, 4), point(-5e3, 2)], 6, true).segments) {
      segment.V.forEach((c, i) => expect(segment.M[i + 1]! * (i + 1)).toBeCloseTo(c, 6));
      segment.M.forEach((c, i) =>
        expect((segment.v[i + 2]! * (i + 1) * (i + 2)) / (c / EI || 1)).toBeCloseTo(c === 0 ? 0 : 1, 9),
      );
    }
  });

  it('is sampled with its extremes and both sides of its jumps among the samples, in order', () => {
    const loaded = lineOf([line(0, -12e3, 0, 6), point(-6e3, 2.2)], 6);
    const { M, deflection } = memberExtremes(loaded);
    const samples = sampleLine(loaded, 10);
    const xs = samples.map((sample) => sample.x);
    expect(xs).toEqual([...xs].sort((a, b) => a - b));
    expect(xs).toContain(M.maxAt);
    expect(xs).toContain(deflection.at);
    expect(samples.filter((sample) => sample.x === 2.2).map((sample) => Math.round(sample.V))).toHaveLength(2);
    const [before, after] = samples.filter((sample) => sample.x === 2.2);
    expect(before!.V - after!.V).toBeCloseTo(6e3, 6);
    expect(() => sampleLine(loaded, 0)).toThrow(RangeError);
    expect(() => valueAt(loaded, 6.1)).toThrow(RangeError);
  });
});
