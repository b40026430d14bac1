import fc from 'fast-check';
import { expect, it } from 'vitest';
import { packModel, packState, unpackModel, unpackState } from '@/db/encode';
import { portal } from '@/db/testing/sample';

const bits = (numbers: Float64Array) => [...new BigUint64Array(numbers.slice().buffer)];

it('gives a state back to the last bit, −0, infinities and not-a-number included', () => {
  const numbers = fc.float64Array({ maxLength: 40 });
  fc.assert(
    fc.property(numbers, numbers, numbers, numbers, (factors, displacements, reactions, endForces) => {
      const back = unpackState(packState({ factors, displacements, reactions, endForces }));
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
  const packed = packState({ factors: Float64Array.of(1, 2), displacements: none, reactions: none, endForces: none });
  expect(() => unpackState(packed.subarray(0, 30))).toThrow(RangeError);
  expect(() => unpackState(Buffer.alloc(24))).toThrow('Expected a packed state of layout 1');
});

it('keeps a model without what only names its frame', () => {
  const { id: _id, title: _title, group: _group, count: _count, note: _note, ...model } = portal('F1', 24);
  expect(unpackModel(packModel(portal('F1', 24)))).toEqual(model);
});
