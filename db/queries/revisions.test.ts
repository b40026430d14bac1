import { expect, it } from 'vitest';
import { listBatches } from '@/db/queries/batches';
import { findRevision, insertRevision, letterOf, listRevisions, updateRevisionState } from '@/db/queries/revisions';
import { listProjects, listProjectsOf, updateAssigned } from '@/db/queries/projects';
import { insertPerson } from '@/db/queries/people';
import { newDatabase } from '@/db/testing/database';
import { intakeOf, office, portal, read, run, seeded } from '@/db/testing/sample';

it('letters revisions A to Z, then AA', () => {
  expect([0, 1, 25, 26, 27, 51, 52, 701, 702].map(letterOf)).toEqual(['A', 'B', 'Z', 'AA', 'AB', 'AZ', 'BA', 'ZZ', 'AAA']);
});

it('gives each new revision of a batch the next letter', async () => {
  const { db } = await newDatabase();
  const own = await office(db, 'Northlight');
  for (const letter of ['A', 'B', 'C']) expect((await insertRevision(db, own.office, own))?.letter).toBe(letter);
  expect((await listRevisions(db, own.office, own.batch)).map((one) => one.letter)).toEqual(['A', 'B', 'C']);
});

it('moves a revision only from the states that were named, so that of two who start a run one does', async () => {
  const { db } = await newDatabase();
  const own = await office(db, 'Northlight');
  const { id, letter } = (await insertRevision(db, own.office, own))!;
  expect(await updateRevisionState(db, own.office, id, ['read'], 'running', { runBy: own.person })).toBe(false);
  expect(await updateRevisionState(db, own.office, id, ['reading'], 'read')).toBe(true);
  expect(await updateRevisionState(db, own.office, id, ['read', 'stopped'], 'running', { runBy: own.person })).toBe(true);
  expect(await updateRevisionState(db, own.office, id, ['read', 'stopped'], 'running', { runBy: own.person })).toBe(false);
  const running = await findRevision(db, own.office, own.batch, letter);
  expect(running).toMatchObject({ state: 'running', runBy: { id: own.person, name: 'Northlight analyst' }, runFinishedAt: null });
  expect(await updateRevisionState(db, own.office, id, ['running'], 'failed', { reason: 'Disk full' })).toBe(true);
  expect(await findRevision(db, own.office, own.batch, letter)).toMatchObject({ state: 'failed', reason: 'Disk full' });
});

it('refuses a state that there is not', async () => {
  const { raw, ...rest } = await newDatabase();
  const own = await office(rest.db, 'Northlight');
  const { id } = (await insertRevision(rest.db, own.office, own))!;
  expect(() => raw.prepare("update revision set state = 'finished' where id = ?").run(id)).toThrow(/CHECK/);
});

it('lists a project’s batches with their latest revision and its frames by verdict', async () => {
  const database = await newDatabase();
  const own = await office(database.db, 'Northlight');
  await read(database, own, intakeOf([portal('F1', 10)]));
  const frames = [portal('F1', 10), portal('F2', 12), null, portal('F4', 14)];
  const { id } = await read(database, own, intakeOf(frames));
  const [waiting] = await listBatches(database.db, own.office, own.project);
  expect(waiting?.latest).toMatchObject({ letter: 'B', state: 'read', frames: 4, errors: 1, createdBy: 'Northlight analyst' });
  expect(waiting?.latest?.verdicts).toEqual({ over: 0, notChecked: 0, near: 0, within: 0, waiting: 3, stopped: 1 });
  run(database.raw, id, own.person, seeded(1));
  const [done] = await listBatches(database.db, own.office, own.project);
  const { over, notChecked, near, within, ...rest } = done!.latest!.verdicts;
  expect(over + notChecked + near + within).toBe(3);
  expect(rest).toEqual({ waiting: 0, stopped: 1 });
});

it('lists to a client the projects they are assigned to, and assigns only people of the office', async () => {
  const { db } = await newDatabase();
  const own = await office(db, 'Northlight');
  const other = await office(db, 'Southgate');
  const client = await insertPerson(db, own.office, { email: 'c@c.example', name: 'Client', passwordHash: 'x', role: 'client' });
  expect(await listProjectsOf(db, own.office, client!)).toEqual([]);
  expect(await updateAssigned(db, own.office, own.project, [client!, other.person])).toBe(true);
  expect((await listProjectsOf(db, own.office, client!)).map((one) => one.id)).toEqual([own.project]);
  expect(await listProjectsOf(db, own.office, other.person)).toEqual([]);
  expect(await updateAssigned(db, other.office, own.project, [])).toBe(false);
  expect((await listProjectsOf(db, own.office, client!)).length).toBe(1);
  expect(await listProjects(db, own.office)).toMatchObject([{ id: own.project, name: 'Sheds', number: '24-01', batches: 1 }]);
});
