import { expect, it } from 'vitest';
import { acceptInvitation, findInvitation, insertInvitation } from '@/db/queries/invitations';
import { endLinks, findLink, findLinkSecret, insertLink, useLink } from '@/db/queries/links';
import { resetPassword } from '@/db/queries/password-resets';
import { newDatabase } from '@/db/testing/database';
import { office } from '@/db/testing/sample';

const secret = 'of the server, for tests only';

async function setUp() {
  const database = await newDatabase();
  const own = await office(database.db, 'Northlight');
  const link = await insertLink(database.db, own.office, { person: own.person }, secret);
  const carried = (await findLinkSecret(database.db, link, secret))!;
  return { ...database, own, link, carried };
}

it('a link opens by its secret, for its own purpose, once', async () => {
  const { db, link, carried } = await setUp();
  expect(await findLink(db, 'password reset', carried)).toMatchObject({ id: link });
  expect(await findLink(db, 'invitation', carried), 'another purpose').toBeUndefined();
  expect(await findLink(db, 'password reset', `${carried}x`)).toBeUndefined();
  expect(await Promise.all([useLink(db, link), useLink(db, link)]), 'two at once').toEqual([true, false]);
  expect(await findLink(db, 'password reset', carried)).toBeUndefined();
});

it('a link ends with its time, with a later one, and when it is ended', async () => {
  const { db, own, link, carried } = await setUp();
  const later = await insertLink(db, own.office, { person: own.person }, secret);
  expect(await findLink(db, 'password reset', carried), 'a later one was made').toBeUndefined();
  const second = (await findLinkSecret(db, later, secret))!;
  await db.updateTable('single_use_link').set({ expires_at: '2026-01-01T00:00:00.000Z' }).where('id', '=', later).execute();
  expect(await findLink(db, 'password reset', second), 'expired').toBeUndefined();
  expect(await resetPassword(db, second, 'a hash'), 'expired').toBe(false);
  const third = await insertLink(db, own.office, { person: own.person }, secret);
  await endLinks(db, { person: own.person });
  expect(await findLinkSecret(db, third, secret)).toBeUndefined();
  expect(link).not.toBe(later);
});

it('a letter gets no secret where the server’s own is another by now', async () => {
  const { db, link } = await setUp();
  expect(await findLinkSecret(db, link, 'of another server')).toBeUndefined();
});

it('an invitation whose seven days are over lets nobody in', async () => {
  const { db, own } = await setUp();
  const by = { person: { id: own.person, name: 'Orla', officeName: 'Northlight' }, serverSecret: secret };
  await insertInvitation(db, own.office, { email: 'wren@client.example', role: 'client', projects: [own.project] }, by);
  const { id, created_at, expires_at } = await db
    .selectFrom('single_use_link')
    .selectAll()
    .where('purpose', '=', 'invitation')
    .executeTakeFirstOrThrow();
  expect(Date.parse(expires_at) - Date.parse(created_at)).toBe(7 * 86_400_000);
  const carried = (await findLinkSecret(db, id, secret))!;
  expect(await findInvitation(db, carried)).toMatchObject({
    email: 'wren@client.example',
    role: 'client',
    by: 'Northlight analyst',
  });
  await db.updateTable('single_use_link').set({ expires_at: created_at }).where('id', '=', id).execute();
  expect(await findInvitation(db, carried)).toBeUndefined();
  expect(await acceptInvitation(db, carried, { name: 'Wren', passwordHash: 'none' })).toBe('ended');
});
