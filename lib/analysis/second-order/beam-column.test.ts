import { describe, expect, it } from 'vitest';
import type { Frame, MemberLoad, NodeLoad, Restraint, Support } from '@/lib/model/frame';
import type { ResultState } from '@/lib/results/result';
import { memberExtremes } from '../member-extremes';
import { memberLine } from '../member-line';
import { plainFrame, plainMember, plainSection } from '../plain-frame';
import { valueAt } from '../value-at';
import { stateOf } from './analyse-combination';

// Closed forms: Timoshenko and Gere, Theory of Elastic Stability, 2nd ed., ch. 1 (from memory), and by the differential
// equation EI v'''' − (N v')' = q solved by hand. Members stiff along their axis, so that only bending counts.
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
const load = (q: number, a = 0, b = L, q2 = q): MemberLoad => ({ kind: 'distributed', case: 0, member: 0, axes: 'local', direction: 'y', q1_N_m: q, q2_N_m: q2, from_m: a, to_m: b }); // prettier-ignore
const point = (P: number, at: number): MemberLoad => ({ kind: 'point', case: 0, member: 0, axes: 'local', direction: 'y', P_N: P, at_m: at }); // prettier-ignore
const moment = (M: number, at: number): MemberLoad => ({ kind: 'moment', case: 0, member: 0, M_Nm: M, at_m: at });

/** A lying member A–B, tension N, ends as given. */
function member(
  N: number,
  memberLoads: MemberLoad[],
  ends: readonly [Restraint, Restraint] = ['free', 'free'],
  nodeLoads: NodeLoad[] = [],
): Frame {
  return plainFrame({
    nodes: [['A', 0, 0], ['B', L, 0]],
    members: [plainMember('AB', 0, 1)],
    sections: [plainSection('stiff', 10, 8356e-8, 0.3)],
    supports: [held(0, 'fixed', 'fixed', ends[0]), held(1, 'free', 'fixed', ends[1])],
    nodeLoads: [{ case: 0, node: 1, Fx_N: N, Fy_N: 0, Mz_Nm: 0 }, ...nodeLoads],
    memberLoads,
    combinations: once,
  }); // prettier-ignore
}
const at = (frame: Frame, state: ResultState, x: number) => valueAt(memberLine(frame, state, 0), x);
function near(found: number, value: number, share = 1e-9, size = Math.abs(value)): void {
  expect(Math.abs(found - value) / size, `${found} against ${value}`).toBeLessThan(share);
}
const euler = (Math.PI ** 2 * EI) / L ** 2;
const shares = [0.01, 0.1, 0.4, 0.8, 0.98];

describe('a member between pins under compression P', () => {
  it('and a uniform load bends to (q EI/P)(sec u − 1), u = (L/2)√(P/EI)', () => {
    for (const share of shares) {
      const P = share * euler;
      const u = (L / 2) * Math.sqrt(P / EI);
      const frame = member(-P, [load(-5e3)]);
      const state = stateOf(frame);
      near(at(frame, state, L / 2).M, ((5e3 * EI) / P) * (1 / Math.cos(u) - 1));
      near(at(frame, state, L / 2).v, -((5e3 * EI) / P / P) * (1 / Math.cos(u) - 1) + (5e3 * L * L) / 8 / P, 1e-8);
      const { M } = memberExtremes(memberLine(frame, state, 0));
      near(M.max, ((5e3 * EI) / P) * (1 / Math.cos(u) - 1));
      near(M.maxAt, L / 2, 1e-6);
    }
  });

  it('and a force at c bends under it to (Q/k) sin kc sin k(L − c)/sin kL', () => {
    for (const share of shares) {
      const P = share * euler;
      const k = Math.sqrt(P / EI);
      const c = 2.2;
      const frame = member(-P, [point(-8e3, c)]);
      const state = stateOf(frame);
      near(at(frame, state, c).M, ((8e3 / k) * Math.sin(k * c) * Math.sin(k * (L - c))) / Math.sin(k * L));
    }
  });
});
