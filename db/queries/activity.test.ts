import { expect, it } from 'vitest';
import { insertActivity, listActivity } from '@/db/queries/activity';
import { newDatabase } from '@/db/testing/database';
import { office } from '@/db/testing/sample';

it('lists what was done, the last first', async () => {
  const { db } = await newDatabase();
  const own = await office(db, 'Northlight');
  await insertActivity(db, own.office, { what: 'added a project', person: own.person, project: own.project });
  await insertActivity(db, own.office, { what: 'ran a revision', person: null, batch: own.batch, detail: { frames: 240 } });
  const listed = await listActivity(db, own.office);
  expect(listed.map((one) => [one.what, one.person, one.detail])).toEqual([
    ['ran a revision', null, { frames: 240 }],
    ['added a project', 'Northlight analyst', {}],
  ]);
  expect((await listActivity(db, own.office, { limit: 1 })).length).toBe(1);
});

it('lets nobody change or remove an entry', async () => {
  const { db, raw } = await newDatabase();
  const own = await office(db, 'Northlight');
  await insertActivity(db, own.office, { what: 'ran a revision', person: own.person });
  expect(() => raw.prepare("update activity set what = 'nothing'").run()).toThrow('Activity is only added to');
  expect(() => raw.prepare('delete from activity').run()).toThrow('Activity is only added to');
  expect((await listActivity(db, own.office)).length).toBe(1);
});
