import { expect, it } from 'vitest';
import { cantileverFrame } from '@/lib/results/cantilever-frame';
import type { ResultState } from '@/lib/results/result';
import { slackAssumptions } from '@/lib/results/state-facts';

const one = cantileverFrame('K');
const rods = ['R1', 'R2', 'L1'].map((id) => ({ ...one.members[0]!, id, tensionOnly: true }));
const frame = { ...one, members: [...one.members, ...rods] };
const none = new Float64Array(0);
const state = (name: string, slack: readonly number[]): ResultState => ({
  name, kind: 'combination', purpose: 'strength', factors: none, order: 2, criticalLoadFactor: null,
  method: { shearDeformation: false, imperfection: null, notional: null, loadScale: 1, stiffness: null, slack, iterations: 3, change: 0 },
  displacements: none, reactions: none, endForces: none,
}); // prettier-ignore

it('names together what is slack in the same results', () => {
  const states = [state('C1 →', [1, 2]), state('C1 ←', [3]), state('S1', [1, 2])];
  expect(slackAssumptions(frame, states)).toEqual(['R1, R2: tension only, slack in C1 →, S1', 'L1: tension only, slack in C1 ←']);
});

it('counts the results of a member that is slack in many, and names the first', () => {
  const states = Array.from({ length: 162 }, (_, i) => state(`C${i + 1}`, i < 97 ? [1] : []));
  expect(slackAssumptions(frame, states)).toEqual(['R1: tension only, slack in 97 of 162 results (C1, C2, C3, C4, C5 …)']);
});
