import fc from 'fast-check';
import { expect, it } from 'vitest';
import { packModel, packState, unpackModel, unpackState } from '@/db/encode';
import { portal } from '@/db/testing/sample';
import type { StateMethod } from '@/lib/results/result';

const bits = (numbers: Float64Array) => [...new BigUint64Array(numbers.slice().buffer)];

it('gives a state back to the last bit, −0, infinities and not-a-number included', () => {
  const numbers = fc.float64Array({ maxLength: 40 });
  fc.assert(
    fc.property(numbers, numbers, numbers, numbers, (factors, displacements, reactions, endForces) => {
      const back = unpackState(packState({ factors, displacements, reactions, endForces, method: null }));
      expect(bits(back.factors)).toEqual(bits(factors));
      expect(bits(back.displacements)).toEqual(bits(displacements));
      expect(bits(back.reactions)).toEqual(bits(reactions));
      expect(bits(back.endForces)).toEqual(bits(endForces));
    }),
    { seed: 20261201, numRuns: 60 },
  );
});

it('refuses bytes that are not a whole packed state', () => {
  const none = new Float64Array(0);
  const lists = { factors: Float64Array.of(1, 2), displacements: none, reactions: none, endForces: none };
  const packed = packState({ ...lists, method: null });
  expect(() => unpackState(packed.subarray(0, 30))).toThrow(RangeError);
  expect(() => unpackState(Buffer.alloc(24))).toThrow('Expected a packed state of layout 1 or 2');
  const second = packState({ ...lists, method });
  for (let bytes = 0; bytes < second.length; bytes += 4) expect(() => unpackState(second.subarray(0, bytes))).toThrow(RangeError);
});

const method: StateMethod = {
  shearDeformation: true,
  imperfection: 'left',
  notional: Float64Array.of(0, -1250.5, -0, 3e-7),
  loadScale: 1.6,
  stiffness: Float64Array.of(0.8, 0.8, 0.8, 0.731),
  slack: [4, 17],
  iterations: 7,
  change: 3.1e-11,
};

it.each<[string, Partial<StateMethod>]>([
  ['everything', {}],
  ['no forces for imperfections, no slack member', { imperfection: null, notional: null, slack: [], loadScale: 1 }],
  ['empty lists, which are not the same as none', { notional: new Float64Array(0), stiffness: new Float64Array(0) }],
  ['shear deformation alone', { imperfection: null, notional: null, stiffness: null, slack: [], iterations: 1, change: 0 }],
  ['leaning right', { imperfection: 'right', shearDeformation: false, stiffness: null }],
])('gives back what sets a state apart from plain first order: %s', (_what, change) => {
  const some = Float64Array.of(1, NaN, -0);
  const state = { factors: some, displacements: some, reactions: some, endForces: some, extremes: some };
  const kept = unpackState(packState({ ...state, method: { ...method, ...change } }));
  expect(kept).toEqual({ ...state, method: { ...method, ...change } });
  expect(Object.is(kept.reactions[2], -0)).toBe(true);
});

it('reads what was kept before states had a method', () => {
  const state = { factors: Float64Array.of(1), displacements: Float64Array.of(2, 3), reactions: Float64Array.of(4), endForces: Float64Array.of(5) }; // prettier-ignore
  const old = Buffer.alloc(24 + 8 * 5);
  [1, 1, 2, 1, 1, 0].forEach((head, i) => old.writeUInt32LE(head, 4 * i));
  [1, 2, 3, 4, 5].forEach((number, i) => old.writeDoubleLE(number, 24 + 8 * i));
  expect(packState({ ...state, method: null }).equals(old)).toBe(true);
  expect(unpackState(old)).toEqual({ ...state, method: null });
});

it('keeps a model without what only names its frame', () => {
  const { id: _id, title: _title, group: _group, count: _count, note: _note, ...model } = portal('F1', 24);
  expect(unpackModel(packModel(portal('F1', 24)))).toEqual(model);
});
