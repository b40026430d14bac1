import { expect, it } from 'vitest';
import { frameRows } from '@/db/queries/frame-rows';
import { findFrame } from '@/db/queries/frames';
import { listFacets, listRows } from '@/db/queries/lists';
import { type FrameResults, insertChunkResults, listWaiting } from '@/db/queries/results';
import { newDatabase } from '@/db/testing/database';
import { intakeOf, office, portal, read, resultsOf, seeded } from '@/db/testing/sample';
import type { StateMethod } from '@/lib/results/result';
import type { View } from '@/lib/tables/view';

/** Results of a frame with tension-only members and imperfections: no load case alone, C1 in both directions. */
function bothWays(version: number, frame: FrameResults['frame']): FrameResults {
  const results = resultsOf(version, frame, seeded(11));
  const [, , strength, service] = results.evaluation.states;
  const method = (imperfection: StateMethod['imperfection'], slack: number[]): StateMethod => {
    const notional = imperfection ? Float64Array.from({ length: 2 * frame.nodes.length }, (_, i) => i * 12.5) : null;
    return {
      shearDeformation: false,
      imperfection,
      notional,
      loadScale: 1,
      stiffness: null,
      slack,
      iterations: 5,
      change: 2e-10,
    };
  };
  const states = [
    { ...strength!, name: 'C1 →', order: 2 as const, method: method('right', [0]) },
    { ...strength!, name: 'C1 ←', order: 2 as const, method: method('left', [3]) },
    { ...service!, order: 2 as const, method: method(null, []) },
  ];
  const checks = results.evaluation.checks.map((check, i) => ({ ...check, combination: i % 2 ? 'C1 →' : 'C1 ←' }));
  return { ...results, extremes: states.map((_, i) => results.extremes[i + 2]!), evaluation: { ...results.evaluation, states, checks } }; // prettier-ignore
}

it('keeps states by their names, whichever they are, with what sets them apart from plain first order', async () => {
  const database = await newDatabase();
  const own = await office(database.db, 'Northlight');
  const { id } = await read(database, own, intakeOf([portal('F1', 10)]));
  const [waiting] = listWaiting(database.raw, id, 1);
  const results = bothWays(waiting!.version, waiting!.frame);
  insertChunkResults(database.raw, [results], { person: own.person });
  const stored = { ...results.evaluation, states: results.evaluation.states.map((state, i) => ({ ...state, extremes: results.extremes[i] })) }; // prettier-ignore
  expect((await findFrame(database.db, own.office, id, 0))?.evaluation).toEqual(stored);
  expect([...frameRows(database.raw, id, { states: true })][0]?.evaluation).toEqual(stored);
});

it('finds reactions, movements and checks of one direction by the name with its arrow', async () => {
  const database = await newDatabase();
  const own = await office(database.db, 'Northlight');
  const { id } = await read(database, own, intakeOf([portal('F1', 10), portal('F2', 12)]));
  const results = listWaiting(database.raw, id, 2).map(({ version, frame }) => bothWays(version, frame));
  insertChunkResults(database.raw, results, { person: own.person });
  const ask = async (table: View['table'], column: string, values: string[]) =>
    listRows(database.db, own.office, id, { table, filters: [{ column, op: 'in', values }], sort: null, columns: null }, { limit: 100 }); // prettier-ignore
  const reactions = await ask('reactions', 'result', ['C1 →']);
  expect(reactions?.rows.map((row) => row.cells.result)).toEqual(Array.from({ length: 4 }, () => 'C1 →'));
  const movements = await ask('movements', 'result', ['C1 ←', 'S1']);
  expect(new Set(movements?.rows.map((row) => row.cells.result))).toEqual(new Set(['C1 ←', 'S1']));
  const checks = await ask('checks', 'combination', ['C1 ←']);
  expect(checks?.rows.length).toBe(8);
  expect((await ask('reactions', 'kind', ['case']))?.rows).toEqual([]);
  const facets = await listFacets(database.db, own.office, id, 'reactions', 'result');
  expect(facets.map(({ value, count }) => [value, count])).toEqual(expect.arrayContaining([['C1 →', 4], ['C1 ←', 4]])); // prettier-ignore
});
