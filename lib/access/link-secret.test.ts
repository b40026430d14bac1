import { expect, it } from 'vitest';
import { linkSecret, secretHash } from './link-secret';

it('gives the same secret for a link each time, another for another link or server', () => {
  const secret = linkSecret('of this server', 'nonce 1');
  expect(secret).toMatch(/^[\w-]{43}$/);
  expect(linkSecret('of this server', 'nonce 1')).toBe(secret);
  expect(linkSecret('of this server', 'nonce 2')).not.toBe(secret);
  expect(linkSecret('of another', 'nonce 1')).not.toBe(secret);
});

it('keeps SHA-256 of a secret (FIPS 180-4, example “abc”)', () => {
  expect(secretHash('abc')).toBe('ba7816bf8f01cfea414140de5dae2223b00361a396177a9cb410ff61f20015ad');
});
