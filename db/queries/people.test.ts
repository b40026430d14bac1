import { expect, it } from 'vitest';
import { insertOffice } from '@/db/queries/offices';
import { countFailedAttempts, findAccount, findPerson, insertPerson, insertSignInAttempt, listPeople } from '@/db/queries/people';
import { endSession, findSession, insertSession } from '@/db/queries/sessions';
import { newDatabase } from '@/db/testing/database';

const later = '2099-01-01T00:00:00.000Z';

async function oneOffice() {
  const database = await newDatabase();
  const office = await insertOffice(database.db, 'Northlight');
  const person = await insertPerson(database.db, office, {
    email: 'Lead@Northlight.example', name: 'Lead', passwordHash: 'hash', role: 'lead',
  }); // prettier-ignore
  return { ...database, office, person: person! };
}

it('finds an account whatever the case of its address, with the office and the role it has there', async () => {
  const { db, office, person } = await oneOffice();
  expect(await findAccount(db, 'lead@NORTHLIGHT.example')).toEqual({
    id: person, name: 'Lead', email: 'Lead@Northlight.example', passwordHash: 'hash',
    offices: [{ id: office, name: 'Northlight', role: 'lead' }],
  }); // prettier-ignore
  expect(await findAccount(db, 'nobody@northlight.example')).toBeUndefined();
});

it('does not add a person whose address someone has, in another case or another office', async () => {
  const { db, office } = await oneOffice();
  const other = await insertOffice(db, 'Southgate');
  const again = { email: 'LEAD@northlight.example', name: 'Again', passwordHash: 'x', role: 'analyst' } as const;
  expect(await insertPerson(db, office, again)).toBeUndefined();
  expect(await insertPerson(db, other, again)).toBeUndefined();
  expect((await listPeople(db, office)).map((one) => one.name)).toEqual(['Lead']);
  expect(await listPeople(db, other)).toEqual([]);
});

it('knows who stands behind a session until it ends or expires, with the role they hold now', async () => {
  const { db, office, person } = await oneOffice();
  const id = await insertSession(db, { person, office, expiresAt: later });
  expect(id).toMatch(/^[\w-]{43}$/);
  expect(await findSession(db, id)).toEqual({
    session: id, person, name: 'Lead', email: 'Lead@Northlight.example', office, officeName: 'Northlight', role: 'lead',
  }); // prettier-ignore
  await db.updateTable('membership').set({ role: 'checker' }).where('person', '=', person).execute();
  expect((await findSession(db, id))?.role).toBe('checker');
  expect(await findSession(db, id, '2099-01-01T00:00:00.001Z')).toBeUndefined();
  await endSession(db, id);
  expect(await findSession(db, id)).toBeUndefined();
});

it('knows nobody behind the session of a person who left the office', async () => {
  const { db, office, person } = await oneOffice();
  const id = await insertSession(db, { person, office, expiresAt: later });
  await db.updateTable('membership').set({ ended_at: '2026-12-01T00:00:00.000Z' }).where('person', '=', person).execute();
  expect(await findSession(db, id)).toBeUndefined();
  expect(await findPerson(db, office, person)).toBeUndefined();
});

it('refuses a session in an office that the person does not belong to', async () => {
  const { db, person } = await oneOffice();
  const other = await insertOffice(db, 'Southgate');
  await expect(insertSession(db, { person, office: other, expiresAt: later })).rejects.toThrow(/FOREIGN KEY/);
});

it('counts failed sign-ins of an account and from an address, not those that succeeded', async () => {
  const { db } = await oneOffice();
  const email = 'lead@northlight.example';
  await insertSignInAttempt(db, { email, address: '192.0.2.1', succeeded: false });
  await insertSignInAttempt(db, { email: 'LEAD@northlight.example', address: '192.0.2.2', succeeded: false });
  await insertSignInAttempt(db, { email, address: '192.0.2.1', succeeded: true });
  const since = '2020-01-01T00:00:00.000Z';
  expect(await countFailedAttempts(db, { email }, since)).toBe(2);
  expect(await countFailedAttempts(db, { address: '192.0.2.1' }, since)).toBe(1);
  expect(await countFailedAttempts(db, { email }, later)).toBe(0);
});
