import { expect, it } from 'vitest';
import {
  findCompared,
  iterateKeptRows,
  listComparedFrames,
  listComparedMembers,
  listComparedReactions,
} from '@/db/queries/compare';
import { insertBatch } from '@/db/queries/batches';
import { newDatabase } from '@/db/testing/database';
import { intakeOf, office, portal, read, run, seeded } from '@/db/testing/sample';

async function twoRevisions() {
  const database = await newDatabase();
  const own = await office(database.db, 'Northlight');
  const a = await read(database, own, intakeOf([portal('F1', 10), portal('F2', 12), null]));
  run(database.raw, a.id, own.person, seeded(1));
  const b = await read(database, own, intakeOf([portal('F1', 10), portal('F2', 14), null]));
  return { ...database, own, a, b };
}

it('finds two revisions of one batch, and no two of different batches', async () => {
  const { db, raw, own, a, b, ...database } = await twoRevisions();
  expect(findCompared(raw, own.office, a.id, b.id)).toMatchObject({ before: a.id, after: b.id });
  const batch = (await insertBatch(db, own.office, { project: own.project, name: 'Shed B', person: own.person }))!;
  const elsewhere = await read({ db, raw, ...database }, { ...own, batch }, intakeOf([portal('F1', 10)]));
  expect(findCompared(raw, own.office, a.id, elsewhere.id)).toBeUndefined();
});

it('gives a frame that was carried over the same version, and one that was not run or was stopped as not checked', async () => {
  const { raw, own, a, b } = await twoRevisions();
  const before = findCompared(raw, own.office, a.id, b.id)!;
  const [was, is] = [listComparedFrames(raw, a.id), listComparedFrames(raw, b.id)];
  expect(is[0]!.version).toBe(was[0]!.version);
  expect(is[0]).toEqual(was[0]);
  expect(is[1]!.version).not.toBe(was[1]!.version);
  expect(is[1]).toMatchObject({ status: 'waiting', verdict: 'not checked', ratio: null, mass: null, criticalLoadFactor: null });
  expect(is[2]).toMatchObject({ status: 'stopped', verdict: 'not checked', version: null });
  run(raw, b.id, own.person, seeded(2));
  expect(listComparedFrames(raw, b.id)[1]).toMatchObject({ status: 'solved', count: 2 });
  expect(findCompared(raw, own.office, a.id, b.id)!.stamp).not.toBe(before.stamp);
});

it('gives a frame’s members and reactions, and rows as typed', async () => {
  const { raw, a } = await twoRevisions();
  expect(listComparedMembers(raw, a.id, 1).map(({ id, role }) => [id, role])).toEqual([
    ['AB', 'column'],
    ['BC', 'rafter'],
    ['CD', 'rafter'],
    ['DE', 'column'],
  ]);
  expect(new Set(listComparedReactions(raw, a.id, 1).map(({ node }) => node))).toEqual(new Set(['A', 'E']));
  expect([...iterateKeptRows(raw, a.id)].map(({ cells }) => cells)[0]).toBe('["F1",null,"row 1"]');
});
