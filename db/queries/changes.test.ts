import { expect, it } from 'vitest';
import { listActivity } from '@/db/queries/activity';
import { countCarriedOver, findMaking, insertChangedRevision, listChanges } from '@/db/queries/changes';
import { insertIntake } from '@/db/queries/intake';
import { findLatestJob } from '@/db/queries/jobs';
import { insertPerson } from '@/db/queries/people';
import { findRevision, insertRevision } from '@/db/queries/revisions';
import { newDatabase } from '@/db/testing/database';
import { intakeOf, office, portal, read, run, seeded } from '@/db/testing/sample';
import { inputRows } from '@/db/queries/waiting';

const change = { kind: 'setting', setting: 'nearLimit', value: '0.8' } as const;
const nearLimit = { change, what: 'near limit', from: '0.90', to: '0.80' };

async function changed(runIt = false) {
  const database = await newDatabase();
  const own = await office(database.db, 'Northlight');
  const from = await read(database, own, intakeOf([portal('F1', 10), portal('F2', 12), null]));
  run(database.raw, from.id, own.person, seeded(1));
  const person = (await insertPerson(database.db, own.office, {
    email: 'ben@north.example', name: 'Ben Eak', role: 'analyst', passwordHash: 'none',
  }))!; // prettier-ignore
  const made = { from: from.id, person, changes: [nearLimit], reason: 'asked for by the checker', run: runIt };
  const revision = (await insertChangedRevision(database.db, own.office, made))!;
  return { ...database, own, from, person, revision };
}

it('records with the new revision what was changed, from what to what, why, by whom and when', async () => {
  const { db, raw, own, revision, person } = await changed();
  expect(revision.letter).toBe('B');
  expect(await findRevision(db, own.office, own.batch, 'B')).toMatchObject({
    state: 'reading',
    madeFrom: 'A',
    createdBy: { id: person, name: 'Ben Eak' },
  });
  const [recorded] = await listChanges(db, own.office, revision.id);
  expect(recorded).toMatchObject({ ...nearLimit, kind: 'setting', reason: 'asked for by the checker', person: 'Ben Eak' });
  expect(Date.parse(recorded!.at)).toBeGreaterThan(0);
  expect(findMaking(raw, own.office, revision.id)).toMatchObject({ letter: 'B', personName: 'Ben Eak' });
});

it('is in the activity, and has a job that reads it and goes on to run it where that was asked', async () => {
  const { db, own, revision } = await changed(true);
  const [entry] = await listActivity(db, own.office);
  expect(entry).toMatchObject({ what: 'made a revision by a change', letter: 'B', person: 'Ben Eak' });
  expect(entry?.detail).toEqual({
    madeFrom: 'A', what: 'near limit', from: '0.90', to: '0.80', reason: 'asked for by the checker',
  }); // prettier-ignore
  expect(await findLatestJob(db, own.office, revision.id, 'read')).toMatchObject({ state: 'queued', payload: { run: true } });
});

it('carries untouched frames over with who uploaded and ran them, and names who changed the others', async () => {
  const { db, raw, own, revision, person } = await changed();
  insertIntake(raw, own.office, revision.id, intakeOf([portal('F1', 10), portal('F2', 14), null]));
  const rows = raw
    .prepare('select frame_id, status, uploaded_by, changed_by, run_by from revision_frame where revision = ? order by frame')
    .raw()
    .all(revision.id);
  expect(rows).toEqual([
    ['F1', 'solved', own.person, null, own.person],
    ['F2', 'waiting', own.person, person, null],
    [expect.any(String), 'stopped', own.person, null, null],
  ]);
  expect(await countCarriedOver(db, own.office, revision.id)).toBe(1);
  expect(await countCarriedOver(db, own.office + 1, revision.id)).toBe(0);
});

it('keeps who changed a frame before where a later change leaves it alone', async () => {
  const { db, raw, own, revision, person } = await changed();
  insertIntake(raw, own.office, revision.id, intakeOf([portal('F1', 10), portal('F2', 14)]));
  const again = { from: revision.id, person: own.person, changes: [nearLimit], reason: 'again', run: false };
  const third = (await insertChangedRevision(db, own.office, again))!;
  insertIntake(raw, own.office, third.id, intakeOf([portal('F1', 11), portal('F2', 14)]));
  const changers = raw.prepare('select changed_by from revision_frame where revision = ? order by frame').pluck().all(third.id);
  expect([third.letter, changers]).toEqual(['C', [own.person, person]]);
});

it('keeps with each row which sheet it stands on, what its cells are and who changed it', async () => {
  const { raw, own, revision } = await changed();
  const rows = [{ sheet: 'Setup', row: 2, cells: ['near limit', '0.8'], part: 1, marks: '{"1":"text"}', changedBy: 'Ben Eak' }];
  insertIntake(raw, own.office, revision.id, intakeOf([portal('F1', 10)], { rows }));
  expect([...inputRows(raw, revision.id)]).toEqual(rows);
});

it('is not made of a revision that was not read yet', async () => {
  const { db, own, person } = await changed();
  const unread = (await insertRevision(db, own.office, { batch: own.batch, person }))!;
  const made = { from: unread.id, person, changes: [nearLimit], reason: 'too soon', run: false };
  expect(await insertChangedRevision(db, own.office, made)).toBeUndefined();
});
