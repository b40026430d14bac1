import { expect, it } from 'vitest';
import { findRunCertificate, listPlacesOf } from '@/db/queries/run-certificate';
import { newDatabase } from '@/db/testing/database';
import { intakeOf, office, portal, read, run, seeded } from '@/db/testing/sample';

async function batch() {
  const database = await newDatabase();
  const own = await office(database.db, 'Northlight');
  const { id } = await read(database, own, intakeOf([portal('F1', 10), portal('F2', 12), portal('F3', 10), portal('F4', 14)]));
  return { ...database, own, id };
}

it('vouches for nothing before a frame is solved', async () => {
  const { db, own, id } = await batch();
  expect(await findRunCertificate(db, own.office, id)).toEqual({
    solved: 0,
    residual: null,
    equilibrium: null,
    digits: null,
    seconds: 0,
    second: null,
  });
});

it('tells the worst figure of any frame, not an average', async () => {
  const { db, raw, own, id } = await batch();
  run(raw, id, own.person, seeded(3));
  raw.exec('update frame_version set residual = 1e-16, equilibrium = 1e-15, digits = 12, second = null');
  raw.exec(
    'update frame_version set residual = 3e-15, digits = 9.5, second = 2e-11 where id = (select max(id) from frame_version)',
  );
  raw.prepare('update revision set stamp = stamp + 1 where id = ?').run(id);
  const told = await findRunCertificate(db, own.office, id);
  expect(told).toMatchObject({ residual: 3e-15, equilibrium: 1e-15, digits: 9.5, seconds: 1, second: 2e-11 });
  expect(told!.solved).toBe(raw.prepare('select count(*) from frame_version').pluck().get());
});

it('finds every frame that has a version, and nothing of another office', async () => {
  const { db, raw, own, id } = await batch();
  const version = raw
    .prepare<[number, number], number>('select version from revision_frame where revision = ? and frame = ?')
    .pluck();
  const first = version.get(id, 0)!;
  const same = [0, 1, 2, 3].filter((frame) => version.get(id, frame) === first);
  expect(await listPlacesOf(db, own.office, id, [first])).toEqual(same);
  const other = await office(db, 'Southgate');
  expect(await listPlacesOf(db, other.office, id, [first])).toEqual([]);
  expect(await findRunCertificate(db, other.office, id)).toBeUndefined();
});
