import { encode } from 'next-auth/jwt';
import { expect, it } from 'vitest';
import { sessionNamed } from './session-token';

const secret = 'for this test only, and of no use elsewhere';
const soon = (s: number): number => Date.now() / 1000 + s;

it('opens a token of its own, the second time as the first', async () => {
  const token = await encode({ token: { session: 'row-1' }, secret, maxAge: 600 });
  expect(await sessionNamed(token, secret)).toBe('row-1');
  expect(await sessionNamed(token, secret)).toBe('row-1');
});

it('lets a token that was opened before expire all the same', async () => {
  const token = await encode({ token: { session: 'row-2' }, secret, maxAge: 600 });
  expect(await sessionNamed(token, secret)).toBe('row-2');
  expect(await sessionNamed(token, secret, soon(590))).toBe('row-2');
  expect(await sessionNamed(token, secret, soon(610))).toBeUndefined();
});

it('takes no token made with another secret, changed, or naming no session, whatever was opened before', async () => {
  const token = await encode({ token: { session: 'row-3' }, secret, maxAge: 600 });
  expect(await sessionNamed(token, secret)).toBe('row-3');
  expect(await sessionNamed(token, `${secret}!`)).toBeUndefined();
  expect(await sessionNamed(`${token.slice(0, -2)}AA`, secret)).toBeUndefined();
  expect(await sessionNamed(await encode({ token: { sub: 'someone' }, secret }), secret)).toBeUndefined();
  expect(await sessionNamed('', secret)).toBeUndefined();
  expect(await sessionNamed(undefined, secret)).toBeUndefined();
});
