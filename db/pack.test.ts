import { deflateRawSync } from 'node:zlib';
import fc from 'fast-check';
import { expect, it } from 'vitest';
import { pack, unpack } from '@/db/pack';

it('gives back any plain data to the last bit: −0, not-a-number, infinities, halves, any key', () => {
  const { tree } = fc.letrec((tie) => ({
    tree: fc.oneof(
      { depthSize: 'small' },
      fc.double(),
      fc.integer(),
      fc.constantFrom(0.5, -0, -1, 1e5, -1e5, NaN, Infinity, 5e-324),
      fc.boolean(),
      fc.constant(null),
      fc.string(),
      fc.array(tie('tree'), { maxLength: 5 }),
      fc.dictionary(fc.oneof(fc.string(), fc.constantFrom('__proto__', 'constructor', '', 'a', 'b')), tie('tree'), {
        maxKeys: 5,
      }),
    ),
  }));
  fc.assert(
    fc.property(tree, (value) => {
      expect(unpack(pack(value))).toEqual(value);
    }),
    { seed: 20261201, numRuns: 500 },
  );
});

it('leaves out what is not defined, and keeps records of one sort with other keys apart', () => {
  const value = { a: [{ x: 1, y: 2.5 }, { x: undefined, y: 3.5 }, { y: 4, x: 5 }], empty: [[], {}] }; // prettier-ignore
  expect(unpack(pack(value))).toEqual({ a: [{ x: 1, y: 2.5 }, { y: 3.5 }, { y: 4, x: 5 }], empty: [[], {}] });
});

it('gives back what is long, and so deflated', () => {
  const value = Array.from({ length: 4000 }, (_, i) => ({ id: `N${i}`, x: i / 7, at: i }));
  const packed = pack(value);
  expect(packed.length).toBeLessThan(JSON.stringify(value).length);
  expect(unpack(packed)).toEqual(value);
});

it('gives the same bytes for the same data, whatever was packed before', () => {
  const value = { N: Math.PI, list: [1.5, { at: 1e-9 }] };
  const first = pack(value);
  pack({ other: Array.from({ length: 3000 }, (_, i) => i + 0.25) });
  expect(pack(value).equals(first)).toBe(true);
});

it('reads what was kept as deflated JSON, and refuses what is torn', () => {
  const before = deflateRawSync('{"at":[{"notFinite":"NaN"},1]}', { level: 1 });
  expect(unpack(before)).toEqual({ at: [NaN, 1] });
  expect(() => unpack(pack({ a: 0.1, b: 0.2 }).subarray(0, 12))).toThrow(RangeError);
});
