import { expect, it } from 'vitest';
import { insertActivity, listActivity, listActivityChoices } from '@/db/queries/activity';
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

it('finds what one person did, of one kind, on some days, page by page', async () => {
  const { db } = await newDatabase();
  const own = await office(db, 'Northlight');
  const other = await office(db, 'Southgate');
  for (let i = 0; i < 5; i++) {
    await insertActivity(db, own.office, { what: 'started a run', person: own.person, project: own.project, detail: { i } });
    await insertActivity(db, own.office, { what: 'brought sheets in', person: null, project: own.project });
    await insertActivity(db, other.office, { what: 'started a run', person: other.person, project: other.project });
  }
  const runs = { project: own.project, what: 'started a run', person: own.person, limit: 3 };
  const first = await listActivity(db, own.office, runs);
  const second = await listActivity(db, own.office, { ...runs, before: first.at(-1)!.id });
  expect([...first, ...second].map((one) => one.detail['i'])).toEqual([4, 3, 2, 1, 0]);
  expect(await listActivity(db, own.office, { ...runs, until: '2020-01-01' })).toEqual([]);
  expect((await listActivity(db, own.office, { project: own.project, from: '2020-01-01', until: '2999-01-01' })).length).toBe(10);
  // what it ends with is not among it
  const { at } = second.at(-1)!;
  expect(await listActivity(db, own.office, { ...runs, until: at })).toEqual([]);
  expect(await listActivity(db, own.office, { project: other.project }), 'another office’s').toEqual([]);
  expect(await listActivityChoices(db, own.office, own.project)).toEqual({
    people: [{ id: own.person, name: 'Northlight analyst' }],
    whats: ['brought sheets in', 'started a run'],
  });
  expect(await listActivityChoices(db, own.office, other.project)).toEqual({ people: [], whats: [] });
});
