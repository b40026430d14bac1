import { describe, expect, it } from 'vitest';
import type { Frame, Member, NodeLoad, Support } from '@/lib/model/frame';
import { defaultSettings, type Settings } from '@/lib/model/settings';
import type { ResultState } from '@/lib/results/result';
import { createAnalyser } from '../analyser';
import { plainCase, plainFrame, plainMember, plainSection } from '../plain-frame';

const pinned = (node: number): Support => ({ node, ux: 'fixed', uy: 'fixed', rz: 'free', angle_rad: 0 });
const tie = (id: string, start: number, end: number): Member =>
  plainMember(id, start, end, { startJoint: 'pin', endJoint: 'pin', axialOnly: true, tensionOnly: true });
const load = (c: number, node: number, Fx_N: number, Fy_N: number): NodeLoad => ({ case: c, node, Fx_N, Fy_N, Mz_Nm: 0 });
const combination = (name: string, ...factors: number[]) => ({
  name,
  purpose: 'strength' as const,
  terms: factors.map((factor, c) => ({ case: c, factor })),
});
const H = 12e3;
const P = 80e3;
/** cos of the braces: 3 m across, 4 m up. */
const cos = 3 / 5;

/** One bay, 3 m by 4 m, hinged all round: columns AB, DC, beam BC, ties AC and DB; cases wind (H at B) and dead (P at B and C). */
function bay(other: Partial<Parameters<typeof plainFrame>[0]> = {}, ties = [tie('AC', 0, 2), tie('DB', 3, 1)]): Frame {
  return plainFrame({
    nodes: [['A', 0, 0], ['B', 0, 4], ['C', 3, 4], ['D', 3, 0]],
    members: [
      plainMember('AB', 0, 1, { endJoint: 'pin' }),
      plainMember('DC', 3, 2, { endJoint: 'pin' }),
      plainMember('BC', 1, 2, { startJoint: 'pin', endJoint: 'pin' }),
      ...ties,
    ],
    supports: [pinned(0), pinned(3)],
    cases: [plainCase('wind'), plainCase('dead')],
    nodeLoads: [load(0, 1, H, 0), load(1, 1, 0, -P), load(1, 2, 0, -P)],
    combinations: [combination('right', 1), combination('left', -1), combination('all', 1, 1)],
    ...other,
  }); // prettier-ignore
}
function analysed(frame: Frame, settings: Partial<Settings> = {}) {
  return createAnalyser().analyse(frame, { settings: { ...defaultSettings, ...settings } });
}
function states(frame: Frame, settings: Partial<Settings> = {}): ResultState[] {
  const analysis = analysed(frame, settings);
  if (!analysis.ok) throw new Error(analysis.failure.message);
  return analysis.states;
}
function failure(frame: Frame, settings: Partial<Settings> = {}): string {
  const analysis = analysed(frame, settings);
  if (analysis.ok) throw new Error('Expected no solution, got one');
  return analysis.failure.message;
}
const N = (state: ResultState, member: number): number => state.endForces[6 * member]!;

describe('a bay braced by ties', () => {
  it('by statics: the taut one carries H/cos, the column under its head H tan, the slack one nothing', () => {
    const [right, left] = states(bay());
    // right: AC is pulled; its vertical part presses DC at C
    expect(N(right!, 3)).toBeCloseTo(H / cos, 6);
    expect(N(right!, 1)).toBeCloseTo((-H * 4) / 3, 6);
    expect(N(right!, 2)).toBeCloseTo(-H, 6);
    expect([N(right!, 4), N(right!, 0)].map((n) => Math.abs(n) < 1e-6)).toEqual([true, true]);
    expect(N(left!, 4)).toBeCloseTo(H / cos, 6);
    expect([right!.method!.slack, left!.method!.slack]).toEqual([[4], [3]]);
  });

  it('by statics with columns that shorten under dead load, which press both ties at first', () => {
    const [, , all] = states(bay({ nodeLoads: [load(0, 1, H, 0), load(1, 1, 0, -50 * P), load(1, 2, 0, -50 * P)] }));
    expect(all!.method!.slack).toEqual([4]);
    expect(N(all!, 3)).toBeCloseTo(H / cos, 4);
  });

  it('has no results for its load cases alone', () => {
    expect(states(bay()).map(({ name, kind }) => [name, kind])).toEqual([
      ['right', 'combination'],
      ['left', 'combination'],
      ['all', 'combination'],
    ]);
    expect(states(bay({ combinations: [] }))).toEqual([]);
  });

  it('to second order carries what its own sway adds: (H + ΣP Δ/h)/cos', () => {
    const [, , all] = states(bay(), { analysis: 'second order' });
    const sway = (all!.displacements[3]! + all!.displacements[6]!) / 2;
    expect(all!.method!.slack).toEqual([4]);
    expect(N(all!, 3) / ((H + (2 * P * sway) / 4) / cos)).toBeCloseTo(1, 4);
    expect(all!.order).toBe(2);
  });

  it('stands under gravity alone by the tie that would catch it, without force in either', () => {
    const frame = bay({ combinations: [combination('gravity', 0, 1)] });
    const [gravity] = states(frame);
    expect([N(gravity!, 3), N(gravity!, 4)].map((n) => Math.abs(n) < 1e-6)).toEqual([true, true]);
    expect(gravity!.method!.slack).toHaveLength(1);
    expect(N(gravity!, 0)).toBeCloseTo(-P, 6);
    expect(states(frame, { analysis: 'second order', imperfections: 'EN 1993-1-1' })).toHaveLength(2);
  });

  it('leans on either tie with imperfections, by statics φ ΣN/cos to first order', () => {
    const frame = bay({ combinations: [combination('gravity', 0, 1)] });
    const [right, left] = states(frame, { imperfections: 'EN 1993-1-1' });
    // h = 4 m: α_h = 1; two columns: α_m = √0.75
    const phi = Math.sqrt(0.75) / 200;
    expect(N(right!, 3)).toBeCloseTo((2 * phi * P) / cos, 6);
    expect(N(left!, 4)).toBeCloseTo((2 * phi * P) / cos, 6);
  });

  it('keeps the weight of its slack tie: on the ground', () => {
    const heavy = bay({ cases: [plainCase('wind', 1), plainCase('dead')], combinations: [combination('right', 1)] });
    const [right] = states(heavy);
    const weight = 7850 * 53.81e-4 * 9.80665 * (4 + 4 + 3 + 5 + 5);
    expect(right!.reactions[1]! + right!.reactions[4]!).toBeCloseTo(weight, 6);
    expect([...right!.endForces.slice(24)]).toEqual([0, 0, 0, 0, 0, 0]);
  });
});

describe('a thin tie that only the imperfections pull', () => {
  it('does not govern α_cr by the compression that it has without them', () => {
    const rod = plainSection('rod', 1e-4, 1e-9);
    const column = plainSection('column', 53.81e-4, 8356e-8, 0.3);
    const rods = [tie('AC', 0, 2), tie('DB', 3, 1)].map((member) => ({ ...member, section: 1 }));
    const frame = bay({ sections: [column, rod], combinations: [combination('gravity', 0, 1)] }, rods);
    for (const state of states(frame, { analysis: 'second order', imperfections: 'EN 1993-1-1' }))
      // far above: the columns' own buckling between pins is 135, held sideways by the rod
      expect(state.criticalLoadFactor).toBeGreaterThan(20);
  });
});

describe('ties crossing at a node', () => {
  it('carry H/cos along the taut diagonal, the node held by what would catch it', () => {
    const frame = plainFrame({
      nodes: [['A', 0, 0], ['B', 0, 4], ['C', 3, 4], ['D', 3, 0], ['X', 1.5, 2]],
      members: [
        plainMember('AB', 0, 1, { endJoint: 'pin' }), plainMember('DC', 3, 2, { endJoint: 'pin' }),
        plainMember('BC', 1, 2, { startJoint: 'pin', endJoint: 'pin' }),
        tie('AX', 0, 4), tie('XC', 4, 2), tie('DX', 3, 4), tie('XB', 4, 1),
      ],
      supports: [pinned(0), pinned(3)],
      nodeLoads: [load(0, 1, H, 0)],
      combinations: [combination('right', 1)],
    }); // prettier-ignore
    const [right] = states(frame);
    expect(N(right!, 3)).toBeCloseTo(H / cos, 5);
    expect(N(right!, 4)).toBeCloseTo(H / cos, 5);
    expect(Math.abs(N(right!, 5)) + Math.abs(N(right!, 6))).toBeLessThan(1e-5);
  });
});

describe('a frame whose ties do not settle', () => {
  it('is one braced by a single tie that is pressed: not solved, combination and member named', () => {
    const message = failure(bay({ combinations: [combination('left', -1)] }, [tie('AC', 0, 2)]));
    expect(message).toMatch(/^left: its tension-only member AC is slack, and without it node B can freely slide horizontally/);
    expect(failure(bay({ combinations: [combination('gravity', 0, 1)] }, [tie('AC', 0, 2)]))).toContain('member AC is slack');
  });

  it('is one whose tie is not pinned at both ends', () => {
    const stiff = { ...tie('AC', 0, 2), axialOnly: false, startJoint: 'rigid' as const };
    expect(failure(bay({}, [stiff]))).toContain('Member AC is tension only: its joints must be pinned');
  });
});

describe('a slack tie in a frame that stands without it', () => {
  const portal = (members: Member[]): Frame =>
    plainFrame({
      nodes: [['A', 0, 0], ['B', 0, 4], ['C', 3, 4], ['D', 3, 0]],
      members: [plainMember('AB', 0, 1), plainMember('BC', 1, 2), plainMember('DC', 3, 2), ...members],
      supports: [pinned(0), pinned(3)],
      nodeLoads: [load(0, 1, -H, -P), load(0, 2, 0, -P)],
      combinations: [combination('C1', 1)],
    }); // prettier-ignore

  it('counts for nothing: forces and α_cr are those of the frame without it', () => {
    for (const analysis of ['first order', 'second order'] as const) {
      const [without] = states(portal([]), { analysis }).slice(1);
      const [slack] = states(portal([tie('AC', 0, 2)]), { analysis });
      expect(slack!.method!.slack).toEqual([3]);
      expect(Math.abs(slack!.criticalLoadFactor! / without!.criticalLoadFactor! - 1)).toBeLessThan(1e-9);
      for (let i = 0; i < 18; i++) expect(Math.abs(slack!.endForces[i]! - without!.endForces[i]!)).toBeLessThan(1e-7 * P);
    }
  });

  it('is taut where it is pulled by heat: cooled, it holds', () => {
    const cooled = portal([tie('AC', 0, 2)]);
    const frame = { ...cooled, memberLoads: [{ kind: 'temperature' as const, case: 0, member: 3, dT_K: -300, dTAcross_K: 0 }] };
    const [state] = states(frame);
    expect(state!.method?.slack ?? []).toEqual([]);
    expect(N(state!, 3)).toBeGreaterThan(0);
  });
});
