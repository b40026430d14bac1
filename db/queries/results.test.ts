import { expect, it } from 'vitest';
import { findFrame, findFrameIndex, findNeighbours, iterateFrames } from '@/db/queries/frames';
import { insertIntake, insertProblems } from '@/db/queries/intake';
import { listRows } from '@/db/queries/lists';
import { iterateInputRows, listInputRowsAround, listProblems, listSheets } from '@/db/queries/problems';
import { countWaiting, type FrameResults, insertChunkResults, listWaiting } from '@/db/queries/results';
import { findRevision, insertRevision } from '@/db/queries/revisions';
import { newDatabase } from '@/db/testing/database';
import { collected, intakeOf, office, portal, problem, read, resultsOf, run, seeded } from '@/db/testing/sample';
import type { OpenDatabase } from '@/db/open';
import type { View } from '@/lib/tables/view';

const lists = ['member_row', 'check_row', 'reaction_row', 'movement_row', 'tally', 'revision_frame'];
/** Everything that a revision's tables show, without the revision's own id. */
function contents({ raw }: OpenDatabase, revision: number) {
  return lists.map((table) =>
    raw.prepare(`select * from ${table} where revision = ?`).all(revision).map((row) => ({ ...(row as object), revision: 0 })),
  ); // prettier-ignore
}

/** An evaluation as it is kept: each state with the extremes of its members. */
const stored = ({ evaluation, extremes }: FrameResults) => ({
  ...evaluation,
  states: evaluation.states.map((state, i) => ({ ...state, extremes: extremes[i] })),
});

it('gives back what was read: settings, input, rows as typed, sheets, problems in their order', async () => {
  const database = await newDatabase();
  const own = await office(database.db, 'Northlight');
  const intake = intakeOf([portal('F1', 10), null]);
  const { id, stored } = await read(database, own, intake);
  expect(stored).toEqual({ frames: 2, stopped: 1, carried: 0 });
  const revision = await findRevision(database.db, own.office, own.batch, 'A');
  expect(revision).toMatchObject({ state: 'read', title: 'Sheds', frames: 2, framesStopped: 1, errors: 1, notes: 1 });
  expect(revision?.settings).toEqual(intake.settings);
  expect(revision?.input).toEqual(intake.input);
  expect(await listProblems(database.db, own.office, id)).toEqual(intake.problems);
  expect(await listSheets(database.db, own.office, id)).toEqual(intake.sheets);
  expect(await collected(iterateInputRows(database.db, own.office, id))).toEqual(intake.rows);
  const around = { sheet: 'Members', row: 3, around: 1 };
  expect(await listInputRowsAround(database.db, own.office, id, around)).toEqual(intake.rows.slice(1));
});

it('adds what the analysis found after the problems of the sheets', async () => {
  const database = await newDatabase();
  const own = await office(database.db, 'Northlight');
  const { id } = await read(database, own, intakeOf([portal('F1', 10)]));
  insertProblems(database.raw, id, [problem({ code: 'mechanism' })]);
  const codes = (await listProblems(database.db, own.office, id)).map((one) => one.code);
  expect(codes).toEqual(['unknown-section', 'default-used', 'mechanism']);
});

it('begins afresh where a reading was cut short, and reads a revision once', async () => {
  const database = await newDatabase();
  const own = await office(database.db, 'Northlight');
  const revision = (await insertRevision(database.db, own.office, own))!;
  const torn = intakeOf([portal('F1', 10)]);
  const cut = { ...torn, frames: [...torn.frames, { id: 'F2', get frame(): never { throw new Error('killed'); } }] }; // prettier-ignore
  expect(() => insertIntake(database.raw, own.office, revision.id, cut)).toThrow('killed');
  expect((await findRevision(database.db, own.office, own.batch, 'A'))?.state).toBe('reading');
  const stored = insertIntake(database.raw, own.office, revision.id, intakeOf([portal('F1', 10), portal('F2', 11)]));
  expect(stored.frames).toBe(2);
  expect((await listProblems(database.db, own.office, revision.id)).length).toBe(2);
  expect(() => insertIntake(database.raw, own.office, revision.id, torn)).toThrow('in state "reading"');
});

it('lists what waits in the order of frames, each content once, without what is in hand', async () => {
  const database = await newDatabase();
  const own = await office(database.db, 'Northlight');
  const { id } = await read(database, own, intakeOf([portal('F1', 10), portal('F2', 12), portal('F3', 10), portal('F4', 14)]));
  expect(countWaiting(database.raw, id)).toEqual({ total: 3, waiting: 3 });
  const waiting = listWaiting(database.raw, id, 100);
  expect(waiting.map((one) => one.frame)).toEqual([portal('F1', 10), portal('F2', 12), portal('F4', 14)]);
  const inHand = new Set([waiting[0]!.version]);
  expect(listWaiting(database.raw, id, 1, inHand).map((one) => one.frame.id)).toEqual(['F2']);
});

it('gives back what was computed to the last bit, for every frame of the same content', async () => {
  const database = await newDatabase();
  const own = await office(database.db, 'Northlight');
  const { id } = await read(database, own, intakeOf([portal('F1', 10), portal('F2', 12), null, portal('F4', 10)]));
  const random = seeded(7);
  const results = listWaiting(database.raw, id, 100).map((one) => resultsOf(one.version, one.frame, random));
  expect(insertChunkResults(database.raw, results, { person: own.person })).toEqual(results.map((one) => one.version));
  const first = await findFrame(database.db, own.office, id, 0);
  expect(first).toMatchObject({ id: 'F1', status: 'solved', frame: portal('F1', 10), runBy: 'Northlight analyst' });
  expect(first?.evaluation).toEqual(stored(results[0]!));
  expect(first?.members).toEqual(results[0]!.members);
  const twin = await findFrame(database.db, own.office, id, 3);
  expect(twin).toMatchObject({ id: 'F4', frame: portal('F4', 10) });
  expect(twin?.evaluation).toEqual(stored(results[0]!));
  expect(await findFrame(database.db, own.office, id, 2)).toMatchObject({ status: 'stopped', frame: null, evaluation: null });
  expect(await findFrame(database.db, own.office, id, 4)).toBeUndefined();
  expect(await findFrameIndex(database.db, own.office, id, 'F4')).toBe(3);
  const all = await collected(iterateFrames(database.db, own.office, id));
  expect(all.map((one) => [one.index, one.read.id, one.evaluation?.status])).toEqual([
    [0, 'F1', 'solved'], [1, 'F2', 'solved'], [2, 'F3', undefined], [3, 'F4', 'solved'],
  ]); // prettier-ignore
});

it('leaves a version that was stored before alone, whatever comes after', async () => {
  const database = await newDatabase();
  const own = await office(database.db, 'Northlight');
  const { id } = await read(database, own, intakeOf([portal('F1', 10), portal('F2', 12)]));
  const [first, second] = listWaiting(database.raw, id, 2);
  const kept = resultsOf(first!.version, first!.frame, seeded(1));
  insertChunkResults(database.raw, [kept], { person: own.person });
  const before = contents(database, id);
  expect(insertChunkResults(database.raw, [resultsOf(first!.version, first!.frame, seeded(2))], { person: null })).toEqual([]);
  expect(contents(database, id)).toEqual(before);
  const other = resultsOf(second!.version, second!.frame, seeded(3));
  expect(insertChunkResults(database.raw, [kept, other], { person: own.person })).toEqual([second!.version]);
  expect(listWaiting(database.raw, id, 2)).toEqual([]);
});

it('keeps nothing of a frame whose storing failed half-way', async () => {
  const database = await newDatabase();
  const own = await office(database.db, 'Northlight');
  const { id } = await read(database, own, intakeOf([portal('F1', 10)]));
  const [one] = listWaiting(database.raw, id, 1);
  const results = resultsOf(one!.version, one!.frame, seeded(1));
  const before = contents(database, id);
  const broken = { ...results, members: results.members.map((row) => ({ ...row, verdict: 'fine' as 'within' })) };
  expect(() => insertChunkResults(database.raw, [broken], { person: null })).toThrow();
  expect(contents(database, id)).toEqual(before);
  expect(listWaiting(database.raw, id, 1).length).toBe(1);
});

it('carries results over to a revision with the same frames, as if it had been run itself', async () => {
  const database = await newDatabase();
  const own = await office(database.db, 'Northlight');
  const frames = [portal('F1', 10), portal('F2', 12), null, portal('F4', 10)];
  const first = await read(database, own, intakeOf(frames));
  run(database.raw, first.id, own.person, seeded(4));
  const again = await read(database, own, intakeOf(frames));
  expect(again.stored.carried).toBe(3);
  expect(contents(database, again.id)).toEqual(contents(database, first.id));
  expect(database.raw.prepare('select count(*) from frame_version').pluck().get()).toBe(2);
});

it('runs only what a changed section touches, and gives results to every revision that waits for them', async () => {
  const database = await newDatabase();
  const own = await office(database.db, 'Northlight');
  const first = await read(database, own, intakeOf([portal('F1', 10), portal('F2', 12)]));
  run(database.raw, first.id, own.person, seeded(5));
  const changed = intakeOf([portal('F1', 10), portal('F2', 12, 'IPE 330')]);
  const second = await read(database, own, changed);
  const third = await read(database, own, changed);
  expect(countWaiting(database.raw, second.id)).toEqual({ total: 2, waiting: 1 });
  expect(run(database.raw, second.id, own.person, seeded(6))).toBe(1);
  expect(countWaiting(database.raw, third.id).waiting).toBe(0);
  expect(contents(database, third.id)).toEqual(contents(database, second.id));
  const all: View = { table: 'frames', filters: [], sort: null, columns: null };
  const old = await listRows(database.db, own.office, first.id, all, { limit: 10 });
  expect(old?.rows[1]?.cells.section).not.toBe('IPE 330');
});

it('runs a frame anew where a setting that matters to its results differs', async () => {
  const database = await newDatabase();
  const own = await office(database.db, 'Northlight');
  const first = await read(database, own, intakeOf([portal('F1', 10)]));
  run(database.raw, first.id, own.person, seeded(5));
  const intake = intakeOf([portal('F1', 10)]);
  const strict = await read(database, own, { ...intake, settings: { ...intake.settings, stressFactor: 0.5 } });
  expect(strict.stored.carried).toBe(0);
  expect(countWaiting(database.raw, strict.id).waiting).toBe(1);
});

it('says of a frame without a solution why, and lists nothing else of it', async () => {
  const database = await newDatabase();
  const own = await office(database.db, 'Northlight');
  const { id } = await read(database, own, intakeOf([portal('F1', 10)]));
  const [one] = listWaiting(database.raw, id, 1);
  const failure = { code: 'mechanism', message: 'node D can slide sideways freely', node: 'D' } as const;
  const evaluation = {
    status: 'not solved', failure, verdict: 'not checked', governing: null, notChecked: [failure.message], assumptions: [],
    mass: null, states: [], checks: [], allChecks: null, certificate: null,
  } as const; // prettier-ignore
  insertChunkResults(database.raw, [{ ...one!, evaluation, members: [], extremes: [] }], { person: own.person });
  const view: View = { table: 'frames', filters: [], sort: null, columns: null };
  const page = await listRows(database.db, own.office, id, view, { limit: 10 });
  expect(page?.rows[0]?.cells).toMatchObject({
    status: 'not solved', verdict: 'not checked', ratio: null, criticalLoadFactor: null, mass: null, reason: failure.message,
  }); // prettier-ignore
  expect((await findFrame(database.db, own.office, id, 0))?.evaluation).toEqual(evaluation);
});

it('walks to the frames before and after in a view’s order, each frame once', async () => {
  const database = await newDatabase();
  const own = await office(database.db, 'Northlight');
  const frames = Array.from({ length: 30 }, (_, i) => portal(`F${i + 1}`, 10 + i));
  const { id } = await read(database, own, intakeOf(frames));
  run(database.raw, id, own.person, seeded(8));
  const filters: View['filters'] = [{ column: 'role', op: 'in', values: ['column'] }];
  const view: View = { table: 'members', filters, sort: { column: 'ratio', descending: true }, columns: null };
  const rows = (await listRows(database.db, own.office, id, view, { limit: 100 }))!.rows;
  const order = [...new Set(rows.map((row) => row.frameIndex!))];
  expect(order.length).toBe(30);
  for (const [i, index] of order.entries()) {
    expect(await findNeighbours(database.db, own.office, id, index, view)).toEqual({
      previous: order[i - 1] ?? null, next: order[i + 1] ?? null, place: i + 1, of: 30,
    }); // prettier-ignore
  }
  const none: View = { ...view, filters: [{ column: 'role', op: 'in', values: ['brace'] }] };
  expect(await findNeighbours(database.db, own.office, id, 3, none)).toEqual({ previous: null, next: null, place: null, of: 0 });
});
