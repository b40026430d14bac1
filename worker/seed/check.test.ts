import { expect, it } from 'vitest';
import { findCheckProgress } from '@/db/queries/checking-list';
import { insertPerson } from '@/db/queries/people';
import { findRevisionById, updateRevisionState } from '@/db/queries/revisions';
import { newDatabase } from '@/db/testing/database';
import { intakeOf, office, portal, read, run, seeded } from '@/db/testing/sample';
import { checkSeeded } from './check';

it.each([
  ['begun', 'to check'],
  ['passed', 'checked'],
] as const)('a revision of the invented office whose checking has %s is in state “%s”', async (how, state) => {
  const { db, raw, close } = await newDatabase();
  const own = await office(db, 'Northlight');
  const sheds = Array.from({ length: 12 }, (_, i) => portal(`F${i + 1}`, 10 + i));
  const { id: revision } = await read({ db, raw, close }, own, intakeOf(sheds));
  run(raw, revision, own.person, seeded(5));
  await updateRevisionState(db, own.office, revision, ['read'], 'run');
  const person = { email: 'cai@office.example', name: 'Cai', role: 'checker', passwordHash: 'x' } as const;
  const checker = { id: (await insertPerson(db, own.office, person))!, name: 'Cai' };
  await checkSeeded(db, { office: own.office, revision, by: { id: own.person, name: 'Ana' }, checker, how });
  expect((await findRevisionById(db, own.office, revision))?.state).toBe(state);
  const { seen, listed, openQueries, toAccept, accepted } = await findCheckProgress(db, own.office, revision);
  expect(seen).toBe(how === 'passed' ? listed : 6);
  expect(openQueries).toBe(how === 'passed' ? 0 : 1);
  expect(accepted).toBe(how === 'passed' ? toAccept : 0);
});
