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

/** The same on three columns, wind at the first of them. */
function wide(storeys: number) {
  const floors = Array.from({ length: storeys }, (_, s) => s);
  return plainFrame({
    nodes: [...floors, storeys].flatMap((s) => [0, 5, 11].map((x, c): [string, number, number] => [`${'ABC'[c]}${s}`, x, 3 * s])),
    members: floors.flatMap((s) => [
      ...[0, 1, 2].map((c) => pinnedMember(`c${c}${s}`, 3 * s + c, 3 * s + 3 + c, false)),
      ...[0, 1].flatMap((c) => [
        pinnedMember(`g${c}${s}`, 3 * s + 3 + c, 3 * s + 4 + c, false),
        pinnedMember(`x${c}${s}`, 3 * s + c, 3 * s + 4 + c, true),
        pinnedMember(`y${c}${s}`, 3 * s + 1 + c, 3 * s + 3 + c, true),
      ]),
    ]),
    sections: [plainSection('column', 53.81e-4, 8356e-8, 0.3), plainSection('rod', 3.14e-4, 0.785e-8)],
    supports: [0, 1, 2].map((node) => ({ node, ux: 'fixed' as const, uy: 'fixed' as const, rz: 'free' as const, angle_rad: 0 })),
    cases: [plainCase('dead'), plainCase('wind')],
    nodeLoads: floors.flatMap((s) => [
      ...[0, 1, 2].map((c) => ({ case: 0, node: 3 * s + 3 + c, Fx_N: 0, Fy_N: -1e3 * (10 + c), Mz_Nm: 0 })),
      { case: 1, node: 3 * s + 3, Fx_N: 500, Fy_N: 0, Mz_Nm: 0 },
    ]),
    combinations: [0, 1, -1].map((wind) => ({ name: `wind ${wind}`, purpose: 'service' as const, terms: [{ case: 0, factor: 1 }, { case: 1, factor: wind }] })),
  }); // prettier-ignore
}

it.each([3, 15, 25])(
  'a tower of %i storeys on three columns: what a cut through each storey carries is the wind above it',
  (storeys) => {
    const frame = wide(storeys);
    const analysis = createAnalyser().analyse(frame, { settings: { ...defaultSettings, analysis: 'second order' } });
    if (!analysis.ok) throw new Error(analysis.failure.message);
    for (const { name, displacements: d, endForces, method } of analysis.states) {
      const wind = Number(name.slice(5));
      for (let s = 0; s < storeys; s++) {
        let across = 0;
        for (let i = 9 * s; i < 9 * (s + 1); i++) {
          const { id, start, end } = frame.members[i]!;
          if (id.startsWith('g')) continue;
          // from each hinge to the next a straight bar: N along it, N × its turn square to it
          const [a, b] = [frame.nodes[start]!, frame.nodes[end]!];
          const L = Math.hypot(b.x_m - a.x_m, b.y_m - a.y_m);
          const [cos, sin] = [(b.x_m - a.x_m) / L, (b.y_m - a.y_m) / L];
          const turn = ((d[3 * end + 1]! - d[3 * start + 1]!) * cos - (d[3 * end]! - d[3 * start]!) * sin) / L;
          across += endForces[6 * i]! * (cos - turn * sin);
          if (/^[xy]/.test(id))
            expect(method!.slack.includes(i) ? endForces[6 * i]! : Math.min(0, endForces[6 * i]! + 1e-3)).toBe(0);
        }
        expect(Math.abs(across - wind * 500 * (storeys - s)), `${name}, storey ${s}`).toBeLessThan(1e-6 * 1e3 * 33 * storeys);
      }
    }
  },
);

it('columns pressed past what they carry alone lean on the rod that catches them, though their shortening slackens both', () => {
  const h = 6;
  const P = 2e6;
  const frame = plainFrame({
    nodes: [['A', 0, 0], ['B', 0, h], ['C', 5, h], ['D', 5, 0]],
    members: [
      plainMember('AB', 0, 1),
      plainMember('DC', 3, 2),
      pinnedMember('BC', 1, 2, false),
      pinnedMember('AC', 0, 2, true),
      pinnedMember('DB', 3, 1, true),
    ],
    sections: [plainSection('column', 53.81e-4, 8356e-8, 0.3), plainSection('rod', 3.14e-4, 0.785e-8)],
    supports: [0, 3].map((node) => ({ node, ux: 'fixed' as const, uy: 'fixed' as const, rz: 'fixed' as const, angle_rad: 0 })),
    cases: [plainCase('dead')],
    nodeLoads: [1, 2].map((node) => ({ case: 0, node, Fx_N: node === 1 ? 1 : 0, Fy_N: -P, Mz_Nm: 0 })),
    combinations: [{ name: 'G', purpose: 'service', terms: [{ case: 0, factor: 1 }] }],
  }); // prettier-ignore
  const free = (Math.PI ** 2 * 210e9 * 8356e-8) / (2 * h) ** 2;
  expect(P).toBeGreaterThan(1.5 * free);
  const analyse = (analysis: 'first order' | 'second order') => {
    const found = createAnalyser().analyse(frame, { settings: { ...defaultSettings, analysis } });
    if (!found.ok) throw new Error(found.failure.message);
    return found;
  };
  expect(analyse('first order').states[0]!.method!.slack).toEqual([3, 4]);
  const { states, certificate } = analyse('second order');
  expect(states[0]!.method!.slack).toEqual([4]);
  // what holds a cantilever at a sway Δ beyond its critical load: H = P Δ / (tan(kh)/k − h), k² = P/EI, two of them
  const k = Math.sqrt(P / (210e9 * 8356e-8));
  const held = (-2 * P * states[0]!.displacements[6]!) / (Math.tan(k * h) / k - h);
  expect((states[0]!.endForces[6 * 3]! * 5) / Math.hypot(5, h) / held).toBeCloseTo(1, 2);
  // the rod is stretched only once the sway has made up for the column's shortening: cos × sway > sin × Ph/EA
  expect(5 * states[0]!.displacements[6]!).toBeGreaterThan((h * P * h) / (210e9 * 53.81e-4));
  expect(certificate.second).toBeLessThan(1e-8);
});
