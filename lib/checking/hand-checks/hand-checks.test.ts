import { describe, expect, it } from 'vitest';
import { createAnalyser } from '@/lib/analysis/analyser';
import { plainCase, plainFrame, plainMember, plainSection } from '@/lib/analysis/plain-frame';
import type { Frame, MemberLoad, Support } from '@/lib/model/frame';
import type { ResultState } from '@/lib/results/result';
import { handChecks } from './hand-checks';

const base = (node: number, rz: Support['rz'] = 'fixed'): Support => ({ node, ux: 'fixed', uy: 'fixed', rz, angle_rad: 0 });
const even = (member: number, q: number, more: Partial<Extract<MemberLoad, { kind: 'distributed' }>> = {}, L = 6): MemberLoad => ({
  case: 0, member, kind: 'distributed', axes: 'global', direction: 'y', q1_N_m: q, q2_N_m: q, from_m: 0, to_m: L, ...more,
}); // prettier-ignore

function solved(frame: Frame): readonly ResultState[] {
  const analysis = createAnalyser().analyse(frame);
  if (!analysis.ok) throw new Error(analysis.failure.message);
  return analysis.states;
}
const byHand = (frame: Frame) => handChecks(frame, solved(frame));

/** One bay, 6 m wide and 4 m high; columns AB, DC, beam BC. Stout against axial strain. */
function bay(rz: Support['rz'], more: Partial<Omit<Frame, 'nodes'>> = {}, beamI = 8356e-8): Frame {
  return plainFrame({
    nodes: [['A', 0, 0], ['B', 0, 4], ['C', 6, 4], ['D', 6, 0]],
    members: [plainMember('AB', 0, 1), plainMember('BC', 1, 2, { section: 1 }), plainMember('DC', 3, 2)],
    sections: [plainSection('column', 10, 8356e-8), plainSection('beam', 10, beamI)],
    supports: [base(0, rz), base(3, rz)],
    ...more,
  }); // prettier-ignore
}
const push = { nodeLoads: [{ case: 0, node: 1, Fx_N: 10e3, Fy_N: 0, Mz_Nm: 0 }] };
/** EI of the columns, N·m². */
const EI = 210e9 * 8356e-8;

describe('loads as typed against reactions', () => {
  it('agree for a beam under an even load: 20 kN/m on 6 m is 120 kN, 360 kN·m about its left end', () => {
    const beam = plainFrame({
      nodes: [['A', 0, 0], ['B', 6, 0]],
      members: [plainMember('AB', 0, 1)],
      supports: [base(0, 'free'), { ...base(1, 'free'), ux: 'free' }],
      memberLoads: [even(0, -20e3)],
    }); // prettier-ignore
    const { about, balance } = byHand(beam);
    expect(about).toBe('A');
    const [line] = balance;
    expect(line!.loads.V).toBeCloseTo(-120e3, 3);
    expect(line!.loads.M).toBeCloseTo(-360e3, 3);
    expect(line!.reactions.V).toBeCloseTo(120e3, 3);
    expect(line!.reactions.M).toBeCloseTo(360e3, 3);
    expect(line!.agreement).toBe('agrees');
  });

  it('differ where a reaction is out by a thousandth, and where a load was forgotten', () => {
    const frame = bay('fixed', { ...push, memberLoads: [even(1, -5e3)] });
    const states = solved(frame);
    expect(handChecks(frame, states).balance[0]!.agreement).toBe('agrees');
    const reactions = Float64Array.from(states[0]!.reactions);
    reactions[1]! *= 1.001;
    expect(handChecks(frame, [{ ...states[0]!, reactions }]).balance[0]!.agreement).toBe('differs');
    expect(handChecks({ ...frame, nodeLoads: [] }, states).balance[0]!.agreement).toBe('differs');
  });

  it('agree for every kind of load: local, projected, varying, points, moments, weight', () => {
    const frame = plainFrame({
      nodes: [['A', 0, 0], ['B', 1, 4], ['C', 7, 6]],
      members: [plainMember('AB', 0, 1), plainMember('BC', 1, 2)],
      supports: [base(0), base(2, 'free')],
      cases: [plainCase('loads'), plainCase('weight', 1)],
      memberLoads: [
        even(0, 3e3, { axes: 'local', q2_N_m: 1e3, from_m: 0.5, to_m: 3 }),
        even(1, -4e3, { axes: 'projected', to_m: Math.hypot(6, 2) }),
        { case: 0, member: 1, kind: 'point', axes: 'local', direction: 'x', P_N: 5e3, at_m: 2 },
        { case: 0, member: 0, kind: 'moment', M_Nm: 7e3, at_m: 1 },
        { case: 0, member: 0, kind: 'temperature', dT_K: 20, dTAcross_K: 5 },
      ],
    }); // prettier-ignore
    expect(byHand(frame).balance.map(({ result, agreement }) => [result, agreement])).toEqual([
      ['loads', 'agrees'],
      ['weight', 'agrees'],
    ]);
  });
});

describe('the moment at mid-span less the mean of the end moments', () => {
  it('is wL²/8 of a beam in a frame: 20 kN/m on 6 m gives 90 kN·m', () => {
    const { spans } = byHand(bay('free', { memberLoads: [even(1, -20e3)] }));
    expect(spans).toHaveLength(1);
    expect(spans[0]).toMatchObject({ member: 'BC', w: 20e3, agreement: 'agrees' });
    expect(spans[0]!.expected).toBeCloseTo(90e3, 6);
    expect(spans[0]!.found).toBeCloseTo(90e3, 3);
    expect(spans[0]!.start).toBeLessThan(0);
  });

  it('takes the part square to an inclined member: q on plan has w = q cos²α', () => {
    const roof = plainFrame({
      nodes: [['A', 0, 0], ['B', 8, 6]],
      members: [plainMember('AB', 0, 1)],
      supports: [base(0), base(1)],
      memberLoads: [even(0, -5e3, { axes: 'projected' }, 10)],
    }); // prettier-ignore
    const [span] = byHand(roof).spans;
    expect(span!.w).toBeCloseTo(5e3 * 0.64, 6);
    expect(span!.agreement).toBe('agrees');
  });

  it('has the sign of the load: a member drawn the other way, and uplift', () => {
    const other = bay('free', { memberLoads: [even(1, -20e3)] });
    const turned = { ...other, members: other.members.map((m) => (m.id === 'BC' ? { ...m, start: 2, end: 1 } : m)) };
    expect(byHand(turned).spans[0]).toMatchObject({ w: -20e3, agreement: 'agrees' });
    expect(byHand(bay('free', { memberLoads: [even(1, 20e3)] })).spans[0]!.expected).toBeCloseTo(-90e3, 6);
  });

  it('says of a member why it does not apply, and nothing of one that is not loaded across', () => {
    const point: MemberLoad = { case: 0, member: 1, kind: 'point', axes: 'global', direction: 'y', P_N: -1e3, at_m: 2 };
    const { spans, spansLeftOut } = byHand(
      bay('free', { memberLoads: [point, even(0, 2e3, { direction: 'x' }, 2), even(2, 2e3, {}, 4)] }),
    );
    expect(spans).toEqual([]);
    expect(spansLeftOut.map(({ member, why }) => [member, why])).toEqual([
      ['AB', 'a load covers a part of it only'],
      ['BC', 'a point load acts on it'],
    ]);
  });

  it('differs where an end moment of the results is not what the load makes it', () => {
    const frame = bay('free', { memberLoads: [even(1, -20e3)] });
    const [state] = solved(frame);
    const endForces = Float64Array.from(state!.endForces);
    endForces[6 + 5]! += 1000;
    expect(handChecks(frame, [{ ...state!, endForces }]).spans[0]!.agreement).toBe('differs');
  });
});

describe('sway beside its bounds for a rigid beam', () => {
  // Hh³/(24EI) and Hh³/(6EI) for two columns (slope-deflection)
  const [fixed, pinned] = [(10e3 * 64) / (24 * EI), (10e3 * 64) / (6 * EI)];

  it('meets Hh³/24EI with fixed bases and Hh³/6EI with pinned ones where the beam is as good as rigid', () => {
    const [a] = byHand(bay('fixed', push, 1)).sway;
    expect(a!.fixed).toBeCloseTo(fixed, 9);
    expect(a!.pinned).toBeCloseTo(pinned, 9);
    expect(a!.sway / fixed).toBeCloseTo(1, 3);
    expect(a).toMatchObject({ outcome: 'between', agreement: 'agrees' });
    const [b] = byHand(bay('free', push, 1)).sway;
    expect(b!.sway / pinned).toBeCloseTo(1, 3);
    expect(b!.fixed).toBeCloseTo(fixed, 9);
    expect(b!.agreement).toBe('agrees');
  });

  it('with pinned bases may not lie between the two: its columns alone move more', () => {
    const frame = bay('free', push, 1);
    const [state] = solved(frame);
    const displacements = state!.displacements.map((value) => value * 0.6);
    expect(handChecks(frame, [{ ...state!, displacements }]).sway[0]).toMatchObject({ outcome: 'below', agreement: 'differs' });
  });

  it('with fixed bases lies between for any beam, and meets the formula of one bay', () => {
    for (const I of [1e-9, 2e-5, 8356e-8, 1e-3]) {
      const [line] = byHand(bay('fixed', push, I)).sway;
      expect(line, `I ${I}`).toMatchObject({ outcome: 'between', agreement: 'agrees' });
      expect(line!.sway / line!.withBeam!).toBeCloseTo(1, 3);
    }
  });

  it('with pinned bases lies above by what the beam bends, and says so', () => {
    const [line] = byHand(bay('free', push)).sway;
    expect(line!.outcome).toBe('above');
    expect(line!.sway / line!.withBeam!).toBeCloseTo(1, 3);
    expect(line).toMatchObject({ agreement: 'agrees' });
    expect(line!.why).toMatch(/what the beam bends/);
  });

  it('counts load along a column with the share that its head holds: ½ fixed, ⅝ pinned', () => {
    const wind = { memberLoads: [even(0, 2e3, { direction: 'x' }, 4)] };
    const [line] = byHand(bay('fixed', wind, 1)).sway;
    expect(line!.fixed).toBeCloseTo((4e3 * 64) / (24 * EI), 9);
    expect(line!.pinned).toBeCloseTo((5e3 * 64) / (6 * EI), 9);
    expect(line!.sway / line!.fixed).toBeCloseTo(1, 3);
    expect(byHand(bay('free', wind, 1)).sway[0]!.sway / line!.pinned!).toBeCloseTo(1, 3);
  });

  it('differs where the results sway less than the columns can', () => {
    const frame = bay('fixed', push);
    const [state] = solved(frame);
    const displacements = state!.displacements.map((value) => value / 3);
    const [line] = handChecks(frame, [{ ...state!, displacements }]).sway;
    expect(line).toMatchObject({ outcome: 'below', agreement: 'differs' });
  });

  it.each<[string, Frame, RegExp]>([
    ['vertical loads', bay('fixed', { ...push, memberLoads: [even(1, -5e3)] }), /vertical loads/],
    ['no horizontal load', bay('fixed', { memberLoads: [even(1, -5e3)] }), /no horizontal load/],
    ['a base on a spring', bay(1e6, push), /turns on a spring/],
    [
      'a brace',
      bay('free', { ...push, members: [...bay('free').members, plainMember('AC', 0, 2, { axialOnly: true })] }),
      /not one member alone stands on A/,
    ],
  ])('says why not with %s', (_, frame, words) => {
    const { sway, swayLeftOut } = byHand(frame);
    expect(sway).toEqual([]);
    expect(swayLeftOut[0]!.why).toMatch(words);
  });
});

it('says that there is nothing to work out without results', () => {
  expect(handChecks(bay('fixed'), []).none).toMatch(/no results/);
});
