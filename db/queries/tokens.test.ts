import { expect, it } from 'vitest';
import { endToken, findToken, insertToken, listTokens } from '@/db/queries/tokens';
import { newDatabase } from '@/db/testing/database';
import { office } from '@/db/testing/sample';

const tomorrow = () => new Date(Date.now() + 86_400_000).toISOString();

it('keeps of a token only its hash', async () => {
  const { db, raw } = await newDatabase();
  const own = await office(db, 'Northlight');
  const of = { person: own.person, name: 'nightly', scope: 'read', expiresAt: tomorrow() } as const;
  const { token } = await insertToken(db, own.office, of);
  expect(token).toMatch(/^tally_[\w-]{43}$/);
  expect(JSON.stringify(raw.prepare('select * from token').all())).not.toContain(token.slice(6));
  expect((await findToken(db, token))?.person).toMatchObject({ id: own.person, office: own.office, role: 'analyst' });
});

it('finds no token that has expired or ended, and tells to a minute when one was used', async () => {
  const { db } = await newDatabase();
  const own = await office(db, 'Northlight');
  const of = { person: own.person, name: 'nightly', scope: 'read', expiresAt: tomorrow() } as const;
  const { id, token } = await insertToken(db, own.office, of);
  const now = new Date();
  await findToken(db, token, now);
  await findToken(db, token, new Date(now.getTime() + 30_000));
  expect((await listTokens(db, own.office, own.person))[0]!.usedAt).toBe(now.toISOString());
  expect(await findToken(db, token, new Date(Date.now() + 2 * 86_400_000)), 'after its end').toBeUndefined();
  expect(await endToken(db, own.office + 1, own.person, id), 'another office').toBe(false);
  expect(await endToken(db, own.office, own.person, id)).toBe(true);
  expect(await findToken(db, token)).toBeUndefined();
});
