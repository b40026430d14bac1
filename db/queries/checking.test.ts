import { expect, it } from 'vitest';
import { insertChangedRevision } from '@/db/queries/changes';
import { passRevision, returnRevision, sendToCheck } from '@/db/queries/checking-acts';
import { findChecking, findFrameMarks, listRevisionsToCheck, listStripMarks } from '@/db/queries/checking';
import { findCheckProgress, listToSee } from '@/db/queries/checking-list';
import {
  endAcceptance,
  insertAcceptances,
  insertOwnValue,
  listToAccept,
  updateSeen,
  type MarkedFrame,
} from '@/db/queries/checking-marks';
import { listPreparers, listWhoMayCheck } from '@/db/queries/checking-people';
import { answerQuery, insertQuery, listEarlierQueries, listQueries } from '@/db/queries/checking-queries';
import { insertIntake } from '@/db/queries/intake';
import { insertPerson } from '@/db/queries/people';
import { findRevisionById, updateRevisionState } from '@/db/queries/revisions';
import type { OfficeRole } from '@/db/schema';
import { newDatabase } from '@/db/testing/database';
import { intakeOf, office, portal, read, run, seeded } from '@/db/testing/sample';
import { moveOf } from '@/lib/checking/checking-states';

const engine = 'test engine';

async function someone(db: Parameters<typeof insertPerson>[0], of: number, name: string, role: OfficeRole) {
  const id = (await insertPerson(db, of, { name, role, email: `${name}@office.example`.toLowerCase(), passwordHash: 'x' }))!;
  return { id, name };
}

/** A run revision of twelve sheds, whose analyst is about to send it, and a checker and a lead who had no part in it. */
async function prepared({ frames = 12, seed = 3 } = {}) {
  const { db, raw } = await newDatabase();
  const own = await office(db, 'Northlight');
  const sheds = Array.from({ length: frames }, (_, i) => portal(`F${i + 1}`, 10 + i));
  const { id } = await read({ db, raw, close: async () => {} }, own, intakeOf(sheds));
  run(raw, id, own.person, seeded(seed));
  await updateRevisionState(db, own.office, id, ['read'], 'run');
  const revision = async () => (await findRevisionById(db, own.office, id))!;
  const checker = await someone(db, own.office, 'Cai', 'checker');
  const lead = await someone(db, own.office, 'Lea', 'lead');
  const analyst = { id: own.person, name: 'Northlight analyst' };
  const marked = (index: number): MarkedFrame => ({ index, id: `F${index + 1}`, engine, hash: `hash ${index}` });
  const send = async () => sendToCheck(db, await revision(), analyst, 'Please check by Friday.');
  return { db, raw, own, id, revision, checker, lead, analyst, marked, send };
}

type Prepared = Awaited<ReturnType<typeof prepared>>;

async function seeAndAcceptAll({ db, own, id, revision, checker, marked }: Prepared, reason = 'By hand it holds.') {
  for (const row of await listToSee(db, own.office, id)) {
    await updateSeen(db, await revision(), marked(row.index), checker, true);
    const items = (await listToAccept(db, id, row.index)).map(({ item }) => item);
    if (items.length > 0)
      await insertAcceptances(db, await revision(), marked(row.index), checker, { items, reason, alike: false });
  }
}

const letters = async ({ db }: Pick<Prepared, 'db'>) =>
  (await db.selectFrom('outbox').select(['kind', 'recipient']).orderBy('id').execute()).map(({ kind, recipient }) => `${kind}: ${recipient}`); // prettier-ignore
const activity = async ({ db, id }: Pick<Prepared, 'db' | 'id'>) =>
  (await db.selectFrom('activity').select('what').where('revision', '=', id).orderBy('id').execute()).map(({ what }) => what);

it('a revision is sent with its list, its note, its letters to those who may check, and its line of activity', async () => {
  const given = await prepared();
  const { db, own, id, checker } = given;
  expect(await given.send()).toBeNull();
  const sent = await given.revision();
  expect(sent).toMatchObject({ state: 'to check', sent: { name: 'Northlight analyst' }, checked: null });
  const list = await listToSee(db, own.office, id);
  expect(list.length).toBeGreaterThanOrEqual(5);
  expect(list.map(({ part }) => part)).toEqual(
    [...list].map(({ part }) => part).sort((a, b) => ['over', 'not checked', 'near', 'sample'].indexOf(a) - ['over', 'not checked', 'near', 'sample'].indexOf(b)), // prettier-ignore
  );
  expect(list.every(({ reasons, seen }) => reasons.length > 0 && !seen)).toBe(true);
  expect(list.flatMap(({ reasons }) => reasons)).toContainEqual({ kind: 'greatest', family: 'portal', parameter: 'span' });
  expect(await letters(given)).toEqual(['sent to check: cai@office.example', 'sent to check: lea@office.example']);
  expect(await activity(given)).toEqual(['sent a revision to check']);
  expect(await findChecking(db, own.office, id)).toMatchObject({
    sent: { id: own.person, name: 'Northlight analyst', note: 'Please check by Friday.' },
    passed: null,
    acceptances: [],
    notIssued: [],
  });
  expect((await listRevisionsToCheck(db, own.office)).map((one) => one.id)).toEqual([id]);
  expect((await listWhoMayCheck(db, own.office, id)).map((one) => one.id)).toEqual([checker.id, given.lead.id]);
  expect(await given.send()).toMatch(/with the checker already/);
});

it('is not sent as it was looked at, where a run has changed it meanwhile', async () => {
  const given = await prepared();
  const seen = await given.revision();
  await given.db
    .updateTable('revision')
    .set({ stamp: seen.stamp + 1 })
    .where('id', '=', given.id)
    .execute();
  expect(await sendToCheck(given.db, seen, given.analyst, '')).toMatch(/changed just now/);
  await updateRevisionState(given.db, given.own.office, given.id, ['run'], 'running');
  expect(await sendToCheck(given.db, { ...seen, stamp: seen.stamp + 1 }, given.analyst, '')).toMatch(/still running/);
  expect((await given.revision()).sent).toBeNull();
});

it('nobody checks what they made, and nothing is sent where nobody is left to check it', async () => {
  const given = await prepared();
  const { db, own, id } = given;
  expect(await listPreparers(db, own.office, id)).toEqual([
    { id: own.person, name: 'Northlight analyst', did: expect.arrayContaining(['uploaded', 'ran', 'made']) as string[] },
  ]);
  await db.updateTable('membership').set({ ended_at: '2026-12-01' }).where('person', '=', given.checker.id).execute();
  await db
    .updateTable('revision_frame')
    .set({ run_by: given.lead.id })
    .where('revision', '=', id)
    .where('frame', '=', 2)
    .execute();
  expect(await listWhoMayCheck(db, own.office, id)).toEqual([]);
  expect(await given.send()).toMatch(/Nobody of the office may check/);
  expect((await given.revision()).state).toBe('run');
});

it('who had a frame in an earlier revision has a part in every later one that carries it over', async () => {
  const given = await prepared();
  const { db, raw, own, checker } = given;
  await db.updateTable('revision_frame').set({ uploaded_by: checker.id }).where('revision', '=', given.id).where('frame', '=', 4).execute(); // prettier-ignore
  const opened = { db, raw, close: async () => {} };
  const carrying = await read(opened, own, intakeOf([portal('F5', 14), portal('X', 99)]));
  const without = await read(opened, own, intakeOf([portal('F1', 10)]));
  const ids = async (revision: number) => (await listPreparers(db, own.office, revision)).map((one) => one.id);
  expect(await ids(carrying.id)).toContain(checker.id);
  expect(await ids(without.id)).not.toContain(checker.id);
});

it('who changed a frame has a part in it, however often others change it afterwards', async () => {
  const given = await prepared();
  const { db, raw, own, id, analyst, checker, lead } = given;
  const asked = { changes: [], reason: 'Lighter.', run: false };
  const make = async (from: number, person: number, span: number) => {
    const { id: made } = (await insertChangedRevision(db, own.office, { ...asked, from, person }))!;
    insertIntake(raw, own.office, made, intakeOf([portal('F1', span)]));
    return made;
  };
  const later = await make(await make(id, lead.id, 20), analyst.id, 21);
  // the frame itself names who brought it in and who changed it last, and no earlier revision has its content
  const frame = await db
    .selectFrom('revision_frame')
    .select(['uploaded_by', 'changed_by'])
    .where('revision', '=', later)
    .execute();
  expect(frame).toEqual([{ uploaded_by: analyst.id, changed_by: analyst.id }]);
  const work = await listPreparers(db, own.office, later);
  expect(work.find((one) => one.id === lead.id)?.did).toEqual(['changed']);
  expect((await listWhoMayCheck(db, own.office, later)).map((one) => one.id)).toEqual([checker.id]);
  // sheets that are brought in anew are theirs who brings them
  const anew = await read({ db, raw, close: async () => {} }, own, intakeOf([portal('F1', 22)]));
  expect((await listWhoMayCheck(db, own.office, anew.id)).map((one) => one.id)).toEqual([checker.id, lead.id]);
});

it('is passed only when all of the list is seen, every query is closed, and every over and not checked is accepted', async () => {
  const given = await prepared();
  const { db, own, id, checker, marked } = given;
  await given.send();
  const query = await insertQuery(db, await given.revision(), marked(0), checker, {
    subject: 'BC',
    check: null,
    text: 'Haunch?',
  });
  expect(query).toBeTypeOf('number');
  const against = await passRevision(db, await given.revision(), checker, '');
  expect(against).toMatch(/not seen yet.*1 query is open.*not accepted/);
  await seeAndAcceptAll(given);
  expect(await passRevision(db, await given.revision(), checker, '')).toBe('1 query is open.');
  const answer = { text: 'None.', close: false, mayClose: false };
  expect(await answerQuery(db, await given.revision(), Number(query), given.analyst, answer)).toBeNull();
  const close = { text: null, close: true, mayClose: true };
  expect(await answerQuery(db, await given.revision(), Number(query), given.lead, close)).toMatch(/Only Cai/);
  expect(await answerQuery(db, await given.revision(), Number(query), checker, close)).toBeNull();
  expect(await passRevision(db, await given.revision(), checker, 'Well made.')).toBeNull();
  const passed = await given.revision();
  expect(passed).toMatchObject({ state: 'checked', checked: { id: checker.id, name: 'Cai' } });
  const checking = (await findChecking(db, own.office, id))!;
  expect(checking.passed).toMatchObject({ name: 'Cai', note: 'Well made.' });
  const { toAccept, accepted } = await findCheckProgress(db, own.office, id);
  expect(accepted).toBe(toAccept);
  expect(checking.acceptances).toHaveLength(toAccept);
  expect(checking.acceptances[0]).toMatchObject({ reason: 'By hand it holds.', by: { name: 'Cai' } });
  expect((await letters(given)).at(-1)).toBe('passed: northlight@office.example');
});

it('an over that nobody accepted stands against passing, also where its acceptance was taken back', async () => {
  const given = await prepared();
  const { db, id, checker, marked } = given;
  await given.send();
  await seeAndAcceptAll(given);
  const row = (await listToSee(db, given.own.office, id)).find(({ toAccept }) => toAccept > 0)!;
  const [first] = await listToAccept(db, id, row.index);
  expect(await endAcceptance(db, await given.revision(), marked(row.index), checker, first!.item)).toBeNull();
  expect(await passRevision(db, await given.revision(), checker, '')).toMatch(/1 check is over or not checked and not accepted/);
});

it('a check that is within is not accepted, and a new reason takes the place of the old one', async () => {
  const given = await prepared();
  const { db, own, id, checker, marked } = given;
  await given.send();
  const row = (await listToSee(db, own.office, id)).find(({ toAccept }) => toAccept > 0)!;
  const items = (await listToAccept(db, id, row.index)).map(({ item }) => item);
  const within = [0, 1, 2, 3, 4, 5, 6, 7].find((ordinal) => !items.includes(ordinal))!;
  const accept = async (chosen: readonly number[], reason: string) =>
    insertAcceptances(db, await given.revision(), marked(row.index), checker, { items: chosen, reason, alike: false });
  expect(await accept([within], 'Why not')).toMatch(/neither over nor not checked/);
  expect(await accept(items.slice(0, 1), 'First thought')).toBe(1);
  expect(await accept(items.slice(0, 1), 'Second thought')).toBe(1);
  const { accepted } = await findFrameMarks(db, own.office, id, row.index);
  expect(accepted.map(({ reason }) => reason)).toEqual(['Second thought']);
});

it('one reason is given to every check that is not checked for the very same cause, and to no over', async () => {
  const given = await prepared();
  const { db, own, id, checker, marked } = given;
  await given.send();
  const rows = await listToSee(db, own.office, id);
  const of = async (verdict: string) => {
    for (const row of rows) {
      const found = (await listToAccept(db, id, row.index)).find((one) => one.verdict === verdict && one.check === 'stability');
      if (found) return { row, found };
    }
    throw new Error(`Expected a check that is ${verdict}`);
  };
  const total = db.selectFrom('check_row').select('frame').where('revision', '=', id).where('check_name', '=', 'stability').where('verdict', '=', 2); // prettier-ignore
  const { row, found } = await of('not checked');
  const accept = { items: [found.item], reason: 'It is given by the maker.', alike: true };
  expect(await insertAcceptances(db, await given.revision(), marked(row.index), checker, accept)).toBe(
    (await total.execute()).length,
  );
  const both = rows.find(({ toAccept }) => toAccept > 1)!;
  const twice = (await listToAccept(db, id, both.index)).map(({ item }) => item);
  const again = { items: twice, reason: 'Each once.', alike: true };
  expect(await insertAcceptances(db, await given.revision(), marked(both.index), checker, again)).toBeGreaterThanOrEqual(
    twice.length,
  );
  const over = await of('over');
  const overs = { ...accept, items: [over.found.item] };
  expect(await insertAcceptances(db, await given.revision(), marked(over.row.index), checker, overs)).toBe(1);
});

it('marks say who, when, on which input and engine, and the strip shows the weightiest of a frame', async () => {
  const given = await prepared();
  const { db, own, id, checker, lead, marked } = given;
  await given.send();
  await updateSeen(db, await given.revision(), marked(1), checker, true);
  await updateSeen(db, await given.revision(), marked(1), checker, true);
  await updateSeen(db, await given.revision(), marked(1), lead, true);
  await updateSeen(db, await given.revision(), marked(2), checker, true);
  await insertQuery(db, await given.revision(), marked(2), checker, { subject: null, check: null, text: 'Why?' });
  const value = { label: 'reaction Fy at A, C1', figure: { kind: 'reaction' }, quantity: 'force', ours: 1000, theirs: 990, typed: '0.99 kN', note: '' }; // prettier-ignore
  expect(await insertOwnValue(db, await given.revision(), marked(1), checker, value)).toBeNull();
  const { seen, ownValues } = await findFrameMarks(db, own.office, id, 1);
  expect(seen.map(({ name, inputHash, engine: by }) => [name, inputHash, by])).toEqual([
    ['Cai', 'ab'.repeat(32), engine],
    ['Lea', 'ab'.repeat(32), engine],
  ]);
  expect(ownValues).toMatchObject([{ ours: 1000, theirs: 990, by: 'Cai', engine, inputHash: 'ab'.repeat(32) }]);
  expect(Object.fromEntries(await listStripMarks(db, own.office, id))).toEqual({ 1: 'seen', 2: 'queried' });
  await updateSeen(db, await given.revision(), marked(1), checker, false);
  expect((await findFrameMarks(db, own.office, id, 1)).seen.map(({ name }) => name)).toEqual(['Lea']);
  expect(await activity(given)).toEqual([
    'sent a revision to check', 'saw a frame', 'saw a frame', 'saw a frame', 'raised a query', 'kept an own value', 'took back a mark',
  ]); // prettier-ignore
});

it('is returned with a note, takes no marks from then on, and its queries are shown with the next revision', async () => {
  const given = await prepared();
  const { db, own, id, checker, marked } = given;
  await given.send();
  const query = Number(
    await insertQuery(db, await given.revision(), marked(0), checker, { subject: null, check: null, text: 'Snow?' }),
  );
  expect(await returnRevision(db, await given.revision(), checker, 'Snow is missing.')).toBeNull();
  const returned = await given.revision();
  expect(returned).toMatchObject({ state: 'returned', reason: 'Snow is missing.', checked: null });
  expect((await letters(given)).at(-1)).toBe('returned: northlight@office.example');
  expect(await updateSeen(db, returned, marked(0), checker, true)).toMatch(/this one is returned/);
  const answer = { text: 'It comes in B.', close: false, mayClose: false };
  expect(await answerQuery(db, returned, query, given.analyst, answer)).toBeNull();
  const next = await read({ db, raw: given.raw, close: async () => {} }, own, intakeOf([portal('F1', 10)]));
  const earlier = await listEarlierQueries(db, { office: own.office, batch: own.batch, id: next.id }, 'F1');
  expect(earlier).toMatchObject([
    { id: query, revision: 'A', frameId: 'F1', messages: [{ text: 'Snow?' }, { text: 'It comes in B.' }] },
  ]);
  expect(await listEarlierQueries(db, { office: own.office, batch: own.batch, id }, 'F1')).toEqual([]);
  expect(await given.send()).toBeNull();
  expect((await given.revision()).state).toBe('to check');
});

it('is frozen once it is passed, but may be returned as long as it was not issued', async () => {
  const given = await prepared();
  const { db, checker, marked } = given;
  await given.send();
  await seeAndAcceptAll(given);
  const query = { subject: null, check: null, text: 'Late' };
  await passRevision(db, await given.revision(), checker, '');
  const frozen = await given.revision();
  expect(await updateSeen(db, frozen, marked(0), checker, false)).toMatch(/this one is checked/);
  expect(await insertQuery(db, frozen, marked(0), checker, query)).toMatch(/this one is checked/);
  expect(await insertAcceptances(db, frozen, marked(0), checker, { items: [0], reason: 'x', alike: false })).toMatch(/checked/);
  expect(await passRevision(db, frozen, checker, '')).toMatch(/passed already/);
  expect(await returnRevision(db, frozen, checker, 'A load was missed.')).toBeNull();
  expect((await findChecking(db, given.own.office, given.id))?.passed).toBeNull();
  await updateRevisionState(db, given.own.office, given.id, ['returned'], 'issued');
  expect(await returnRevision(db, await given.revision(), checker, 'Too late')).toMatch(/withdraw/);
  expect(moveOf('return').from).not.toContain('issued');
});

it('shows nothing of it to another office', async () => {
  const given = await prepared();
  const { db, id, checker, marked } = given;
  const other = (await office(db, 'Southgate')).office;
  await given.send();
  await updateSeen(db, await given.revision(), marked(0), checker, true);
  await insertQuery(db, await given.revision(), marked(0), checker, { subject: null, check: null, text: 'Why?' });
  expect(await findChecking(db, other, id)).toBeUndefined();
  expect(await listPreparers(db, other, id)).toEqual([]);
  expect(await listWhoMayCheck(db, other, id)).toEqual([]);
  expect(await listToSee(db, other, id)).toEqual([]);
  expect(await findCheckProgress(db, other, id)).toMatchObject({ listed: 0, seen: 0 });
  expect(await listQueries(db, other, id)).toEqual([]);
  expect((await listStripMarks(db, other, id)).size).toBe(0);
  expect(await listRevisionsToCheck(db, other)).toEqual([]);
  expect(await findFrameMarks(db, other, id, 0)).toEqual({ seen: [], accepted: [], ownValues: [] });
});
