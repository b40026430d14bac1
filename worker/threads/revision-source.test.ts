import { expect, it } from 'vitest';
import { newDatabase } from '@/db/testing/database';
import { collected, intakeOf, office, portal, read, run, seeded } from '@/db/testing/sample';
import type { FrameNeed, ReportFrame } from '@/lib/reports/workbook/report-source';
import { revisionSource } from './revision-source';

/** A run revision of three frames, two of the same content, and its frames as a sheet goes through them. */
async function source() {
  const database = await newDatabase();
  const own = await office(database.db, 'Northlight');
  const rows = [3, 5, 2].map((cells, row) => ({
    sheet: 'Nodes', row, cells: Array<string>(cells).fill('x'), marks: null, changedBy: null,
  })); // prettier-ignore
  const { id } = await read(database, own, intakeOf([portal('F1', 10), portal('F2', 12), portal('F3', 10)], { rows }));
  run(database.raw, id, own.person, seeded(1));
  return revisionSource(database, own.office, id);
}

async function* passed(frames: Iterable<ReportFrame> | AsyncIterable<ReportFrame>): AsyncIterable<ReportFrame> {
  yield* frames;
}

const statesOnly: FrameNeed = { states: true, checks: false };

it('gives each sheet the same states, whether they were read for an earlier sheet or not', async () => {
  const { frames } = await source();
  const anew = await collected(passed(frames(statesOnly)));
  await collected(passed(frames({ states: false })));
  const [first, second] = [await collected(passed(frames(statesOnly))), await collected(passed(frames(statesOnly)))];
  const states = (list: readonly ReportFrame[]) => list.map(({ id, evaluation }) => [id, evaluation?.states]);
  expect(states(anew).map(([id]) => id)).toEqual(['F1', 'F2', 'F3']);
  expect(anew[0]?.evaluation?.states.length).toBeGreaterThan(0);
  expect(anew[0]?.evaluation?.states).not.toEqual(anew[1]?.evaluation?.states);
  expect(states(first)).toEqual(states(anew));
  expect(states(second)).toEqual(states(anew));
});

it('knows how wide the input is without going through its rows', async () => {
  const { inputRows, inputWidth } = await source();
  expect(inputWidth?.()).toBe(Math.max(...[...inputRows()].map((row) => row.cells.length)));
  expect(inputWidth?.()).toBe(5);
});
