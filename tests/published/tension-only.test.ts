import { describe, expect, it } from 'vitest';
import { createAnalyser } from '@/lib/analysis/analyser';
import { plainCase, plainFrame, plainMember, plainSection } from '@/lib/analysis/plain-frame';
import { defaultSettings, type Settings } from '@/lib/model/settings';
import type { Frame, Restraint, Support } from '@/lib/model/frame';
import type { ResultState } from '@/lib/results/result';

// A bay with X-bracing that takes tension only, against statics: joint by joint, and on the deflected shape where that is
// second order. Columns and beam pinned and stiff along their axes, so that only the tie stretches.
const [b, h] = [6, 4];
const L = Math.hypot(b, h);
const [cos, sin] = [b / L, h / L];
const area = 2e-4;
const EA = 210e9 * area;
const held = (node: number, ux: Restraint, uy: Restraint): Support => ({ node, ux, uy, rz: 'free', angle_rad: 0 });

function bay(H: number, P: number): Frame {
  const tie = { section: 1, axialOnly: true, tensionOnly: true, startJoint: 'pin', endJoint: 'pin' } as const;
  const pinned = { axialOnly: true, startJoint: 'pin', endJoint: 'pin' } as const;
  return plainFrame({
    nodes: [['A', 0, 0], ['B', 0, h], ['C', b, h], ['D', b, 0]],
    members: [
      plainMember('AB', 0, 1, pinned), plainMember('BC', 1, 2, pinned), plainMember('DC', 3, 2, pinned),
      plainMember('AC', 0, 2, tie), plainMember('DB', 3, 1, tie),
    ],
    sections: [plainSection('stiff', 1e3, 8e-3, 0.3), plainSection('rod', area, 3e-9, 0.016)],
    supports: [held(0, 'fixed', 'fixed'), held(3, 'fixed', 'fixed')],
    cases: [plainCase('wind'), plainCase('dead')],
    nodeLoads: [
      { case: 0, node: 1, Fx_N: H, Fy_N: 0, Mz_Nm: 0 },
      { case: 1, node: 1, Fx_N: 0, Fy_N: -P, Mz_Nm: 0 }, { case: 1, node: 2, Fx_N: 0, Fy_N: -P, Mz_Nm: 0 },
    ],
    combinations: [
      { name: 'right', purpose: 'strength', terms: [{ case: 0, factor: 1 }, { case: 1, factor: 1 }] },
      { name: 'left', purpose: 'strength', terms: [{ case: 0, factor: -1 }, { case: 1, factor: 1 }] },
    ],
  }); // prettier-ignore
}

function states(frame: Frame, analysis: Settings['analysis']): ResultState[] {
  const found = createAnalyser().analyse(frame, { settings: { ...defaultSettings, analysis } });
  if (!found.ok) throw new Error(found.failure.message);
  return found.states;
}
const force = (state: ResultState, member: number): number => state.endForces[6 * member]!;
const near = (found: number, value: number, share: number): void =>
  expect(Math.abs(found / value - 1), `${found} against ${value}`).toBeLessThan(share);

describe('X-bracing that takes tension only', () => {
  const [H, P] = [30e3, 200e3];

  it('works in the diagonal that the wind pulls: H/cos θ there, nothing in the other, P and P + H tan θ in the columns', () => {
    const [right, left] = states(bay(H, P), 'first order');
    expect([right!.name, left!.name]).toEqual(['right', 'left']);
    near(force(right!, 3), H / cos, 1e-8);
    expect(force(right!, 4)).toBe(0);
    near(-force(right!, 0), P, 1e-8);
    near(-force(right!, 2), P + (H * h) / b, 1e-8);
    near(right!.displacements[3]!, (H * L) / (EA * cos * cos), 1e-6);
    expect(right!.method!.slack).toEqual([4]);
    near(force(left!, 4), H / cos, 1e-8);
    expect(left!.method!.slack).toEqual([3]);
  });

  it('carries the lean of its columns as well in second order: statics on the deflected shape', () => {
    // u of the beam: T = EA u cos θ/L; along it H = T cos θ + T u sin²θ/L − (N₁ + N₂) u/h with N₁ = −P, N₂ = −P − T sin θ + T u sin θ cos θ/L
    let u = 0;
    for (let pass = 0; pass < 200; pass++) {
      const T = (EA * u * cos) / L;
      const columns = 2 * P + T * sin - (T * u * sin * cos) / L;
      u = (H + (columns * u) / h - (T * u * sin * sin) / L) / ((EA * cos * cos) / L);
    }
    const [right, left] = states(bay(H, P), 'second order');
    near(right!.displacements[3]!, u, 1e-6);
    near(force(right!, 3), (EA * u * cos) / L, 1e-6);
    near(-left!.displacements[6]!, u, 1e-5);
    expect(right!.order).toBe(2);
  });

  it('has no state for its cases alone', () => {
    expect(states(bay(H, P), 'first order').map((state) => state.kind)).toEqual(['combination', 'combination']);
  });

  it('is unstable where the columns lean more than the tie can hold', () => {
    // 2P/h above EA cos²θ/L
    const tooMuch = (0.55 * EA * cos * cos * h) / L;
    const found = createAnalyser().analyse(bay(H, tooMuch), { settings: { ...defaultSettings, analysis: 'second order' } });
    expect(found).toMatchObject({ ok: false, failure: { code: 'not-solved' } });
  });
});
