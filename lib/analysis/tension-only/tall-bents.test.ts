import { expect, it } from 'vitest';
import { defaultSettings } from '@/lib/model/settings';
import { createAnalyser } from '../analyser';
import { plainCase, plainFrame, plainMember, plainSection } from '../plain-frame';

const pinnedMember = (id: string, start: number, end: number, tensionOnly: boolean) =>
  plainMember(id, start, end, {
    startJoint: 'pin',
    endJoint: 'pin',
    axialOnly: true,
    tensionOnly,
    section: tensionOnly ? 1 : 0,
  });

/** Storeys of 5 m by 3 m, hinged at every joint, two rods crossing in each; 10 kN a floor on the left, more on the right. */
function tower(storeys: number, continuous = false) {
  const column = (id: string, start: number, end: number) =>
    continuous ? plainMember(id, start, end) : pinnedMember(id, start, end, false);
  const floors = Array.from({ length: storeys }, (_, s) => s);
  return plainFrame({
    nodes: [...floors, storeys].flatMap((s): [string, number, number][] => [
      [`A${s}`, 0, 3 * s],
      [`B${s}`, 5, 3 * s],
    ]),
    members: floors.flatMap((s) => [
      column(`a${s}`, 2 * s, 2 * s + 2),
      column(`b${s}`, 2 * s + 1, 2 * s + 3),
      pinnedMember(`g${s}`, 2 * s + 2, 2 * s + 3, false),
      pinnedMember(`x${s}`, 2 * s, 2 * s + 3, true),
      pinnedMember(`y${s}`, 2 * s + 1, 2 * s + 2, true),
    ]),
    sections: [plainSection('column', 53.81e-4, 8356e-8, 0.3), plainSection('rod', 3.14e-4, 0.785e-8)],
    supports: [0, 1].map((node) => ({ node, ux: 'fixed' as const, uy: 'fixed' as const, rz: 'free' as const, angle_rad: 0 })),
    cases: [plainCase('dead')],
    nodeLoads: floors.flatMap((s) =>
      [0, 1].map((side) => ({
        case: 0, node: 2 * s + 2 + side, Fx_N: 0, Fy_N: -1e3 * (10 + side * (s + 1)), Mz_Nm: 0,
      })),
    ),
    combinations: [{ name: 'G', purpose: 'service', terms: [{ case: 0, factor: 1 }] }],
  }); // prettier-ignore
}

it.each([2, 5, 8, 12])(
  'a tower of %i storeys stands under gravity alone, to second order, on the rods that its own lean pulls',
  (storeys) => {
    const frame = tower(storeys);
    const analysis = createAnalyser().analyse(frame, { settings: { ...defaultSettings, analysis: 'second order' } });
    if (!analysis.ok) throw new Error(analysis.failure.message);
    const [state] = analysis.states;
    const slack = new Set(state!.method!.slack);
    const sway = (node: number) => state!.displacements[3 * node]!;
    for (let s = 0; s < storeys; s++) {
      const rods = [5 * s + 3, 5 * s + 4];
      // one rod a storey, pulled by what stands above on its lean: ΣP Δ/h, over the rod's cosine
      const [taut] = rods.filter((rod) => !slack.has(rod));
      expect(rods.filter((rod) => slack.has(rod))).toHaveLength(1);
      let moment = 0;
      for (const { node, Fy_N } of frame.nodeLoads)
        if (node >= 2 * s + 2) moment -= Fy_N * (sway(2 * s + 2 + (node % 2)) - sway(2 * s + (node % 2)));
      const force = state!.endForces[6 * taut!]!;
      expect(force).toBeGreaterThan(-1e-3);
      // columns of a storey carry unlike loads, so that the sum over them is near only
      expect(Math.abs(force)).toBeLessThan((1.5 * Math.abs(moment)) / 3 / (5 / Math.hypot(5, 3)) + 1);
    }
  },
);

it.each([3, 10])(
  'a tower of %i storeys on continuous columns keeps a rod where it could turn about its feet without',
  (storeys) => {
    const analysis = createAnalyser().analyse(tower(storeys, true), { settings: defaultSettings });
    if (!analysis.ok) throw new Error(analysis.failure.message);
    expect(analysis.states[0]!.method!.slack.length).toBeLessThan(2 * storeys);
    expect(analysis.certificate.second).toBeLessThan(1e-8);
  },
);
