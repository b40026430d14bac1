import { describe, expect, it } from 'vitest';
import type { Frame, MemberLoad, NodeLoad, Restraint, Support } from '@/lib/model/frame';
import type { ResultState } from '@/lib/results/result';
import { memberExtremes } from '../member-extremes';
import { memberLine } from '../member-line';
import { plainCase, plainFrame, plainMember, plainSection } from '../plain-frame';
import { valueAt } from '../value-at';
import { analyseCombination, stateOf } from './analyse-combination';

// Closed forms: Timoshenko and Gere, Theory of Elastic Stability, 2nd ed., ch. 1 (from memory); those in tension by the same
// equation EI v'''' − (N v')' = q with N > 0. Members stiff along their axis, so that only bending counts.
const EI = 210e9 * 8356e-8;
const L = 6;
const held = (node: number, ux: Restraint, uy: Restraint, rz: Restraint = 'free'): Support => ({
  node,
  ux,
  uy,
  rz,
  angle_rad: 0,
});
const once = [{ name: 'C1', purpose: 'strength' as const, terms: [{ case: 0, factor: 1 }] }];
const load = (q1: number, q2 = q1, from_m = 0, to_m = L): MemberLoad => ({ kind: 'distributed', case: 0, member: 0, axes: 'local', direction: 'y', q1_N_m: q1, q2_N_m: q2, from_m, to_m }); // prettier-ignore
const point = (P: number, at: number): MemberLoad => ({ kind: 'point', case: 0, member: 0, axes: 'local', direction: 'y', P_N: P, at_m: at }); // prettier-ignore

/** A lying member A–B under tension N, ends as given. */
function member(
  N: number,
  memberLoads: MemberLoad[],
  [start, end]: readonly [Restraint, Restraint] = ['free', 'free'],
  nodeLoads: NodeLoad[] = [],
  joints = {},
): Frame {
  return plainFrame({
    nodes: [['A', 0, 0], ['B', L, 0]],
    members: [plainMember('AB', 0, 1, joints)],
    sections: [plainSection('stiff', 10, 8356e-8, 0.3)],
    supports: [held(0, 'fixed', 'fixed', start), held(1, 'free', 'fixed', end)],
    nodeLoads: [{ case: 0, node: 1, Fx_N: N, Fy_N: 0, Mz_Nm: 0 }, ...nodeLoads],
    memberLoads,
    combinations: once,
  }); // prettier-ignore
}
const at = (frame: Frame, state: ResultState, x: number) => valueAt(memberLine(frame, state, 0), x);
function near(found: number, value: number, share = 1e-9): void {
  expect(Math.abs(found / value - 1), `${found} against ${value}`).toBeLessThan(share);
}
const euler = (Math.PI ** 2 * EI) / L ** 2;
const compressions = [0.01, 0.1, 0.4, 0.8, 0.98].map((share) => share * euler);
const tensions = [0.01, 1, 40, 4000].map((share) => share * euler);
const q = 5e3;

describe('a member between pins under compression P', () => {
  it('and a uniform load bends to (q EI/P)(sec u − 1), u = (L/2)√(P/EI)', () => {
    for (const P of compressions) {
      const sec = 1 / Math.cos((L / 2) * Math.sqrt(P / EI));
      const frame = member(-P, [load(-q)]);
      const state = stateOf(frame);
      near(at(frame, state, L / 2).M, ((q * EI) / P) * (sec - 1));
      near(at(frame, state, L / 2).v, -(((q * EI) / P) * (sec - 1) - (q * L * L) / 8) / P, 1e-7);
      const { M, deflection } = memberExtremes(memberLine(frame, state, 0));
      near(M.max, ((q * EI) / P) * (sec - 1));
      near(M.maxAt, L / 2, 1e-6);
      near(deflection.at, L / 2, 1e-6);
    }
  });

  it('and a force Q at c bends under it to (Q/k) sin kc sin k(L − c)/sin kL', () => {
    for (const P of compressions) {
      const k = Math.sqrt(P / EI);
      const c = 2.2;
      const frame = member(-P, [point(-8e3, c)]);
      near(at(frame, stateOf(frame), c).M, ((8e3 / k) * Math.sin(k * c) * Math.sin(k * (L - c))) / Math.sin(k * L));
    }
  });

  it('and a moment at its start bends to M₀ sin k(L − x)/sin kL', () => {
    for (const P of compressions) {
      const k = Math.sqrt(P / EI);
      const frame = member(-P, [], ['free', 'free'], [{ case: 0, node: 0, Fx_N: 0, Fy_N: 0, Mz_Nm: -7e3 }]);
      const state = stateOf(frame);
      for (const x of [0, 1, 3.3, 5]) near(at(frame, state, x).M, (7e3 * Math.sin(k * (L - x))) / Math.sin(k * L));
    }
  });

  it('is unstable from Euler’s load on, and says at which share of its load', () => {
    for (const factor of [1.001, 1.5, 3.9, 4.1, 30]) {
      const result = analyseCombination(member(-factor * euler, [load(-q)]));
      expect(result).toMatchObject({ ok: false, why: 'unstable' });
      if ('why' in result) expect(Math.abs(result.reached * factor - 1)).toBeLessThan(2e-3 * factor);
    }
    expect(stateOf(member(-0.999 * euler, [load(-q)])).order).toBe(2);
  });

  it('is unstable beyond Euler’s load with the pins in its own ends too, where no node feels it', () => {
    const pins = { axialOnly: true, startJoint: 'pin', endJoint: 'pin' };
    for (const factor of [1.001, 2, 4.1, 9.1, 50])
      expect(analyseCombination(member(-factor * euler, [load(-q)], ['free', 'free'], [], pins))).toMatchObject({ ok: false, why: 'unstable' }); // prettier-ignore
    const P = 0.98 * euler;
    const frame = member(-P, [load(-q)], ['free', 'free'], [], pins);
    near(at(frame, stateOf(frame), L / 2).M, ((q * EI) / P) * (1 / Math.cos((L / 2) * Math.sqrt(P / EI)) - 1), 1e-8);
  });
});

describe('a member under tension T', () => {
  it('between pins and under a uniform load bends to (q EI/T)(1 − sech u), however long a tie it is', () => {
    for (const T of tensions) {
      const u = (L / 2) * Math.sqrt(T / EI);
      const frame = member(T, [load(-q)]);
      const state = stateOf(frame);
      near(at(frame, state, L / 2).M, ((q * EI) / T) * (1 - 1 / Math.cosh(u)), 2e-9);
      near(at(frame, state, L / 2).v, -((q * L * L) / 8 - ((q * EI) / T) * (1 - 1 / Math.cosh(u))) / T, 1e-9 * Math.max(1, (8 * EI) / T / L / L)); // prettier-ignore
    }
  });

  it('built in at both ends keeps (q EI/T)(u coth u − 1) there, and a force in the middle (P/2k) tanh u/2', () => {
    for (const T of tensions) {
      const k = Math.sqrt(T / EI);
      const u = (k * L) / 2;
      const uniform = member(T, [load(-q)], ['fixed', 'fixed']);
      const state = stateOf(uniform);
      near(-state.endForces[2]!, ((q * EI) / T) * (u / Math.tanh(u) - 1), 1e-8);
      near(-state.endForces[5]!, ((q * EI) / T) * (u / Math.tanh(u) - 1), 1e-8);
      const force = member(T, [point(-8e3, L / 2)], ['fixed', 'fixed']);
      near(-stateOf(force).endForces[2]!, (8e3 / (2 * k)) * Math.tanh(u / 2));
      near(at(force, stateOf(force), L / 2).M, (8e3 / (2 * k)) * Math.tanh(u / 2));
    }
  });
});

describe('a sprung or pinned joint', () => {
  it('of stiffness k between a column and its node is the same as in the support', () => {
    const P = 0.6 * euler;
    const k = (0.7 * EI) / L;
    const loads = [load(-q, 2 * q, 1, 4), point(3e3, 5)];
    const support = stateOf(member(-P, loads, [k, 'free']));
    const joint = stateOf(member(-P, loads, ['fixed', 'free'], [], { startJoint: k }));
    joint.endForces.forEach((value, i) => expect(value).toBeCloseTo(support.endForces[i]!, 4));
    const frame = member(-P, loads, ['fixed', 'free'], [], { startJoint: k });
    near(at(frame, joint, 2).v, at(member(-P, loads, [k, 'free']), support, 2).v);
  });
});

describe('an axial force that varies along a column', () => {
  // 7.8373 EI/L³ clamped and free, 18.57 between pins: Timoshenko and Gere, art. 2.12 (from memory)
  const own = (w: number): MemberLoad => ({ kind: 'distributed', case: 0, member: 0, axes: 'global', direction: 'y', q1_N_m: -w, q2_N_m: -w, from_m: 0, to_m: L }); // prettier-ignore
  const column = (w: number, base: Restraint, top: Support, H = 10): Frame =>
    plainFrame({
      nodes: [['A', 0, 0], ['B', 0, L]],
      members: [plainMember('AB', 0, 1)],
      sections: [plainSection('stiff', 10, 8356e-8, 0.3)],
      supports: [held(0, 'fixed', 'fixed', base), top],
      nodeLoads: [{ case: 0, node: 1, Fx_N: H, Fy_N: 0, Mz_Nm: 0 }],
      memberLoads: [own(w)],
      combinations: once,
    }); // prettier-ignore
  const top = held(1, 'free', 'free');

  it('buckles a cantilever at 7.8373 EI/L³ a metre of its weight, one between pins at 18.569 EI/L³', () => {
    const unit = EI / L ** 3;
    expect(analyseCombination(column(7.8374 * unit, 'fixed', top))).toMatchObject({ ok: false, why: 'unstable' });
    expect(stateOf(column(7.8373 * unit, 'fixed', top, 0.1)).order).toBe(2);
    const pinned = held(1, 'fixed', 'free');
    expect(analyseCombination(column(18.57 * unit, 'free', pinned))).toMatchObject({ ok: false, why: 'unstable' });
    expect(stateOf(column(18.567 * unit, 'free', pinned)).order).toBe(2);
  });

  it('bends as the power series of EI v‴ + w(L − x) v′ = −H says', () => {
    // v′ = Σ c_n y^n in y = L − x: EI v′″(y) + w y v′ = −H, clamped at y = L, moment nil at y = 0
    const w = (5 * EI) / L ** 3;
    const H = 10;
    const series = (c0: number, load: number): { slope: number; tip: number } => {
      const c = [c0, 0, -load / EI / 2];
      for (let n = 3; n < 60; n++) c.push(-(w / EI) * (c[n - 3]! / (n * (n - 1))));
      let [slope, tip] = [0, 0];
      c.forEach((value, n) => {
        slope += value * L ** n;
        tip += (value * L ** (n + 1)) / (n + 1);
      });
      return { slope, tip };
    };
    const [one, bare] = [series(1, 0), series(0, H)];
    const turn = -bare.slope / one.slope;
    const tip = bare.tip + turn * one.tip;
    const state = stateOf(column(w, 'fixed', top));
    near(Math.abs(state.displacements[3]!), Math.abs(tip));
  });

  it('varies by a force along it, and the line carries both sides of its jump', () => {
    const frame = plainFrame({
      nodes: [['A', 0, 0], ['B', 0, L]],
      members: [plainMember('AB', 0, 1)],
      supports: [held(0, 'fixed', 'fixed', 'fixed'), held(1, 'fixed', 'free')],
      cases: [plainCase('loads')],
      memberLoads: [
        { kind: 'point', case: 0, member: 0, axes: 'local', direction: 'x', P_N: -4e5, at_m: 3.5 },
        load(-q),
      ],
      combinations: once,
    }); // prettier-ignore
    const halved = plainFrame({
      ...frame,
      nodes: [['A', 0, 0], ['C', 0, 3.5], ['B', 0, L]],
      members: [plainMember('AC', 0, 1), plainMember('CB', 1, 2)],
      supports: [held(0, 'fixed', 'fixed', 'fixed'), held(2, 'fixed', 'free')],
      nodeLoads: [{ case: 0, node: 1, Fx_N: 0, Fy_N: -4e5, Mz_Nm: 0 }],
      memberLoads: [{ ...load(-q), to_m: 3.5 } as MemberLoad, { ...load(-q), member: 1, to_m: 2.5 } as MemberLoad],
    }); // prettier-ignore
    const [one, two] = [stateOf(frame), stateOf(halved)];
    const line = memberLine(frame, one, 0);
    const below = valueAt(line, 3.5, 'before');
    near(below.M, two.endForces[5]!, 1e-8);
    near(below.V, two.endForces[4]!, 1e-8);
    near(below.N, two.endForces[3]!, 1e-8);
    near(valueAt(line, 3.5).V, two.endForces[7]!, 1e-8);
    near(valueAt(line, 3.5).N + 1e5, two.endForces[6]! + 1e5, 1e-8);
  });
});
