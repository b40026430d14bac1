import { expect, it, test } from 'vitest';
import { distance, nearest } from '@/lib/intake/distance';

test.each([
  ['section', 'section', 0],
  ['secton', 'section', 1],
  ['esction', 'section', 1],
  ['sction', 'section', 1],
  ['lenghty', 'lengthy', 1],
  ['profile', 'section', 3],
  ['', 'ab', 2],
])('%s and %s are %i letters apart (above 2: 3)', (a, b, expected) => {
  expect(distance(a, b, 2)).toBe(expected);
});
it('only names of four letters or more are suggested', () => {
  const known = [['end', 'end'], ['start', 'start'], ['section', 'section']] as const; // prettier-ignore
  expect([nearest('ent', known), nearest('strat', known), nearest('paint', known)]).toEqual([null, 'start', null]);
});
