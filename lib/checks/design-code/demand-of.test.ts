import { describe, expect, it } from 'vitest';
import { beamFrame, line, member, method, segment, settings, state } from '../hand-made';
import { spansOf } from '../spans';
import type { Frame } from '@/lib/model/frame';
import type { MemberLine, ResultState } from '@/lib/results/result';
import { codeMemberOf, lengthAssumptions, notOneMember } from './code-member-of';
import type { Demand } from './demand';
import { demandOf, demandSource } from './demand-of';
import { inPlaneRules } from './in-plane-rule';

const frameOf = (change: Parameters<typeof member>[3]): Frame => beamFrame({ members: [member('AB', 0, 1, change)] });

function asked(frame: Frame, lines: readonly MemberLine[], of: ResultState = state('C1', 'strength')): Demand {
  const code = codeMemberOf(frame, spansOf(frame)[0]!);
  return demandOf(demandSource(frame, code), of, lines, inPlaneRules(settings({ strengthCheck: 'EN 1993-1-1' }), of));
}

/** 10 kN/m on 10 m between pins: M = 50x − 5x², in kN·m. */
const uniform = line(10, { N: [-40e3], V: [50e3, -10e3], M: [0, 50e3, -5e3] });

describe('what a state asks of a physical member', () => {
  it('finds the greatest forces and where they stand', () => {
    const demand = asked(beamFrame(), [uniform]);
    expect(demand).toMatchObject({ tension: 0, compression: 40e3, shear: 50e3, shearAt: 0, sagging: 125e3, hogging: 0 });
    expect(demand.saggingAt).toBeCloseTo(5, 9);
    expect(demand.places.map((place) => place.x)).toEqual([0, expect.closeTo(5, 9), 10]);
  });

  it('takes both sides of a jump, and nothing twice where none is', () => {
    const force: MemberLine = {
      length: 10,
      segments: [segment(0, 4, { V: [6e3], M: [0, 6e3] }), segment(4, 10, { V: [-4e3], M: [24e3, -4e3] })],
    };
    expect(asked(beamFrame(), [force]).places.map(({ x, V }) => [x, V])).toEqual([[0, 6e3], [4, 6e3], [4, -4e3], [10, -4e3]]); // prettier-ignore
    const even: MemberLine = { length: 10, segments: [segment(0, 4, { N: [-5e3] }), segment(4, 10, { N: [-5e3] })] };
    expect(asked(beamFrame(), [even]).places).toHaveLength(3);
  });

  it('what rounding leaves of zero is zero', () => {
    const demand = asked(beamFrame(), [line(10, { N: [-1e-4], M: [1e-6] })]);
    expect([demand.compression, demand.moment, demand.sagging]).toEqual([0, 0, 0]);
  });

  it('divides a face between its restraints, the last stretch shorter, with moments at the quarter points', () => {
    const demand = asked(frameOf({ lengthLtbTop_m: 4 }), [uniform]);
    const top = demand.stretches('top');
    expect(top.map(({ from_m, to_m, length_m }) => [from_m, to_m, length_m])).toEqual([[0, 4, 4], [4, 8, 4], [8, 10, 2]]); // prettier-ignore
    expect(top[0]).toMatchObject({ start: 0, quarter: 45e3, middle: 80e3, threeQuarter: 105e3, end: 120e3, compressing: 120e3 });
    expect(top[1]).toMatchObject({ start: 120e3, end: 80e3, compression: 40e3 });
    expect(top[1]!.largest).toBeCloseTo(125e3, 3);
    expect(demand.stretches('bottom')).toHaveLength(1);
    expect(demand.stretches('bottom')[0]!.compressing).toBe(0);
  });

  it('a length longer than the span is an effective one: one stretch of that length', () => {
    const [only, more] = asked(frameOf({ lengthLtbTop_m: 14 }), [uniform]).stretches('top');
    expect(more).toBeUndefined();
    expect(only).toMatchObject({ from_m: 0, to_m: 10, length_m: 14 });
  });

  it('a stretch is loaded where a load across the member acts on it in that combination', () => {
    const loads = [{ case: 0, member: 0, kind: 'distributed' as const, axes: 'global' as const, direction: 'y' as const, q1_N_m: -1e3, q2_N_m: -1e3, from_m: 0, to_m: 3 }]; // prettier-ignore
    const frame = { ...frameOf({ lengthLtbTop_m: 5 }), memberLoads: loads };
    expect(asked(frame, [uniform]).stretches('top').map((one) => one.loaded)).toEqual([true, false]); // prettier-ignore
    const without = { ...state('C2', 'strength'), factors: new Float64Array([0]) };
    expect(asked(frame, [uniform], without).stretches('top').map((one) => one.loaded)).toEqual([false, false]); // prettier-ignore
    const along = { ...frame, memberLoads: [{ ...loads[0]!, direction: 'x' as const }] };
    expect(asked(along, [uniform]).whole().loaded).toBe(false);
  });

  it('a free end holds nothing, and its blank length out of the plane is twice the span', () => {
    const frame = beamFrame({ supports: [{ node: 0, ux: 'fixed', uy: 'fixed', rz: 'fixed', angle_rad: 0 }] });
    expect(asked(frame, [uniform]).whole()).toMatchObject({ heldAtStart: true, heldAtEnd: false });
    const code = codeMemberOf(frame, spansOf(frame)[0]!);
    expect(code.outOfPlane).toEqual({ length_m: 20, from: 'twice span' });
    expect(lengthAssumptions(code).join('; ')).toMatch(
      /major, LTB top, LTB bottom taken as the length of the span; .*twice the length/,
    );
  });
});

describe('a physical member of several pieces', () => {
  const two = (second: Parameters<typeof member>[3], drawn: readonly [number, number] = [1, 2]): Frame =>
    beamFrame({
      nodes: [
        { id: 'A', x_m: 0, y_m: 0, place: null },
        { id: 'M', x_m: 4, y_m: 0, place: null },
        { id: 'B', x_m: 10, y_m: 0, place: null },
      ],
      members: [member('AM', 0, 1, { span: 'rafter' }), member('MB', drawn[0], drawn[1], { span: 'rafter', ...second })],
    });
  const first = line(4, { V: [50e3, -10e3], M: [0, 50e3, -5e3] });

  it('is one line from end to end, a piece drawn the other way turned round', () => {
    const onward = line(6, { V: [10e3, -10e3], M: [120e3, 10e3, -5e3] });
    // from B to M: M and what it does to the faces change sign, V does not
    const back = line(6, { V: [-50e3, 10e3], M: [0, -50e3, 5e3] });
    const [plain, turned] = [asked(two({}), [first, onward]), asked(two({}, [2, 1]), [first, back])];
    for (const demand of [plain, turned]) {
      expect(demand.sagging).toBeCloseTo(125e3, 3);
      expect(demand.saggingAt).toBeCloseTo(5, 9);
      expect(demand.whole()).toMatchObject({ from_m: 0, to_m: 10 });
      expect(demand.whole().middle).toBeCloseTo(125e3, 3);
    }
    expect(turned.places.map((place) => place.V)).toEqual(plain.places.map((place) => expect.closeTo(place.V, 3)));
  });

  it('is not one member where its pieces differ', () => {
    const frame = two({ turned: true });
    expect(notOneMember(frame, spansOf(frame)[0]!)).toBe('pieces of the span have different sections');
    expect(notOneMember(two({}), spansOf(two({}))[0]!)).toBeNull();
  });
});

describe('lengths in the plane of the frame', () => {
  const second = (alpha: number | null, lean: 'right' | null = 'right'): ResultState => ({
    ...state('C1', 'strength', [], alpha),
    order: 2,
    method: method({ imperfection: lean }),
  });

  it('EN 1993-1-1: a blank one stands with second order and imperfections, or α_cr of 10 and more', () => {
    const chosen = { strengthCheck: 'EN 1993-1-1', imperfections: 'EN 1993-1-1' } as const;
    const rules = (of: ResultState) => inPlaneRules(settings(chosen), of);
    expect(inPlaneRules(settings({ ...chosen, imperfections: 'AISC 360' }), second(2)).blank.allowed).toBe(false);
    expect(rules(second(2)).blank.allowed).toBe(true);
    expect(rules(state('C1', 'strength', [], 10)).blank.allowed).toBe(true);
    expect(rules(state('C1', 'strength', [], null)).blank.allowed).toBe(true);
    expect(rules(second(4.27, null)).blank).toEqual({ allowed: false, why: expect.stringMatching(/α_cr 4\.2 below 10/) });
    expect(rules(second(4.27, null)).typed.allowed).toBe(true);
  });

  it('AISC 360-22: direct analysis with K = 1, or typed lengths where α_cr is 3 or more at the loads of LRFD', () => {
    const aisc = { strengthCheck: 'AISC 360-22 LRFD', imperfections: 'AISC 360' } as const;
    const rules = (change: object, of: ResultState) => inPlaneRules(settings({ ...aisc, ...change }), of);
    const allowed = (change: object, of: ResultState): boolean[] => {
      const { typed, blank } = rules(change, of);
      return [typed.allowed, blank.allowed];
    };
    expect(allowed({ stiffnessReduction: 'AISC 360' }, second(2))).toEqual([true, true]);
    expect(allowed({}, second(3))).toEqual([true, false]);
    expect(allowed({}, second(2.9))).toEqual([false, false]);
    expect(allowed({ strengthCheck: 'AISC 360-22 ASD' }, second(4.7))).toEqual([false, false]);
    expect(allowed({ imperfections: 'none', stiffnessReduction: 'AISC 360' }, second(20))).toEqual([false, false]);
    expect(allowed({ stiffnessReduction: 'AISC 360' }, state('C1', 'strength', [], 20))).toEqual([false, false]);
  });
});
