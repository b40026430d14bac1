import { expect, it } from 'vitest';
import { insertPerson } from '@/db/queries/people';
import { updateAssigned } from '@/db/queries/projects';
import { findSession, insertSession } from '@/db/queries/sessions';
import {
  disablePerson,
  enablePerson,
  findKeeper,
  findStanding,
  listStanding,
  transferWork,
  updateProjectsOf,
  updateRole,
} from '@/db/queries/standing';
import { findToken, insertToken } from '@/db/queries/tokens';
import { newDatabase } from '@/db/testing/database';
import { office } from '@/db/testing/sample';

const tomorrow = () => new Date(Date.now() + 86_400_000).toISOString();

async function setUp() {
  const database = await newDatabase();
  const own = await office(database.db, 'Northlight');
  const add = async (name: string, role: 'lead' | 'analyst' | 'client') =>
    (await insertPerson(database.db, own.office, { email: `${name}@n.example`, name, role, passwordHash: 'none' }))!;
  return { ...database, own, add };
}

it('keeps a lead in every office, whatever is tried', async () => {
  const { db, own, add } = await setUp();
  const first = await add('Orla', 'lead');
  expect(await updateRole(db, own.office, first, 'analyst')).toBe(false);
  expect(await disablePerson(db, own.office, first)).toBe(false);
  const second = await add('Bram', 'lead');
  expect(await disablePerson(db, own.office, first)).toBe(true);
  expect(await updateRole(db, own.office, second, 'analyst'), 'the other is disabled').toBe(false);
  await enablePerson(db, own.office, first);
  expect(await updateRole(db, own.office, second, 'analyst')).toBe(true);
  expect((await listStanding(db, own.office)).filter((one) => one.role === 'lead').map((one) => one.name)).toEqual(['Orla']);
});

it('ends sessions and tokens of whoever is disabled, and of nobody else', async () => {
  const { db, own, add } = await setUp();
  await add('Orla', 'lead');
  const given = async (person: number) => ({
    session: await insertSession(db, { person, office: own.office, expiresAt: tomorrow() }),
    token: (await insertToken(db, own.office, { person, name: 't', scope: 'read', expiresAt: tomorrow() })).token,
  });
  const other = await add('Ivo', 'analyst');
  const [theirs, others] = [await given(own.person), await given(other)];
  expect(await disablePerson(db, own.office, own.person)).toBe(true);
  expect(await findSession(db, theirs.session)).toBeUndefined();
  expect(await findToken(db, theirs.token)).toBeUndefined();
  expect(await findSession(db, others.session)).toBeDefined();
  await enablePerson(db, own.office, own.person);
  expect(await findSession(db, theirs.session), 'what has ended stays so').toBeUndefined();
  expect(await findToken(db, theirs.token)).toBeUndefined();
});

it('hands over who looks after a batch, not who made it', async () => {
  const { db, own, add } = await setUp();
  const other = await add('Ivo', 'analyst');
  await updateAssigned(db, own.office, own.project, [own.person]);
  expect(await findKeeper(db, own.office, own.batch)).toMatchObject({ id: own.person });
  expect(await transferWork(db, own.office, own.person, other)).toEqual({ batches: 1, projects: 1 });
  expect(await findKeeper(db, own.office, own.batch)).toMatchObject({ id: other });
  expect(await findStanding(db, own.office, other)).toMatchObject({ batches: 1, projects: [own.project] });
  expect(await findStanding(db, own.office, own.person)).toMatchObject({ batches: 0, projects: [own.project] });
  const { created_by } = await db.selectFrom('batch').select('created_by').executeTakeFirstOrThrow();
  expect(created_by).toBe(own.person);
});

it('assigns nobody to a project of another office, nor looks into one', async () => {
  const { db, own } = await setUp();
  const other = await office(db, 'Southgate');
  await updateProjectsOf(db, own.office, own.person, [own.project, other.project]);
  expect((await findStanding(db, own.office, own.person))?.projects).toEqual([own.project]);
  expect(await findStanding(db, own.office, other.person)).toBeUndefined();
  expect(await findKeeper(db, own.office, other.batch)).toBeUndefined();
  expect(await transferWork(db, own.office, other.person, own.person)).toEqual({ batches: 0, projects: 0 });
});
