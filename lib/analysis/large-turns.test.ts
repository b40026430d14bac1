import { expect, it } from 'vitest';
import { plainFrame, plainMember } from './plain-frame';
import { largeTurns } from './large-turns';
import { stateOf } from './second-order/analyse-combination';

const cantilever = (H: number) =>
  plainFrame({
    nodes: [['A', 0, 0], ['B', 0, 4]],
    members: [plainMember('AB', 0, 1)],
    supports: [{ node: 0, ux: 'fixed', uy: 'fixed', rz: 'fixed', angle_rad: 0 }],
    nodeLoads: [{ case: 0, node: 1, Fx_N: H, Fy_N: 0, Mz_Nm: 0 }],
    combinations: [{ name: 'C1', purpose: 'strength', terms: [{ case: 0, factor: 1 }] }],
  }); // prettier-ignore

it('a sway of more than h/20 is said, with its member and combination; a smaller one is not', () => {
  // sway PL²/3EI of the height: 0.05 at 164.5 kN
  const said = (H: number) => largeTurns(cantilever(H), [stateOf(cantilever(H), 0, {}, 1)]);
  expect(said(164e3)).toEqual([]);
  expect(said(170e3).join()).toMatch(/^small displacements: member AB in C1 turns by 0\.052 rad/);
});
