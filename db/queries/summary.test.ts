import { expect, it } from 'vitest';
import { listRows } from '@/db/queries/lists';
import { findSummary, listParameterRatios } from '@/db/queries/summary';
import { newDatabase } from '@/db/testing/database';
import { intakeOf, office, portal, read, run, seeded } from '@/db/testing/sample';
import type { View } from '@/lib/tables/view';

async function batch() {
  const database = await newDatabase();
  const own = await office(database.db, 'Northlight');
  const frames = Array.from({ length: 60 }, (_, i) =>
    i === 7 ? null : portal(`F${i + 1}`, 10 + i, i % 2 ? 'IPE 300' : 'IPE 330'),
  );
  const { id } = await read(database, own, intakeOf(frames));
  return { ...database, own, id };
}

it('shows every frame in sheet order before it is run: waiting, or stopped', async () => {
  const { db, own, id } = await batch();
  const summary = (await findSummary(db, own.office, id))!;
  expect(summary.cells.map((cell) => cell.index)).toEqual(Array.from({ length: 60 }, (_, i) => i));
  expect(summary.cells[7]).toMatchObject({ id: 'F8', status: 'stopped', verdict: null, ratio: null, subject: null });
  expect(summary.counts).toEqual({ over: 0, notChecked: 0, near: 0, within: 0, waiting: 59, stopped: 1 });
  expect(summary).toMatchObject({ governing: [], sections: [], worst: [], mass: null });
});

it('agrees with the tables: counts, spread, what governs, sections, the worst ten', async () => {
  const { db, raw, own, id } = await batch();
  run(raw, id, own.person, seeded(3));
  const summary = (await findSummary(db, own.office, id))!;
  const all = async (table: 'frames' | 'members'): Promise<Record<string, unknown>[]> => {
    const view: View = { table, filters: [], sort: null, columns: null };
    return (await listRows(db, own.office, id, view, { limit: 1000 }))!.rows.map((row) => row.cells);
  };
  const frames = await all('frames');
  expect(summary.counts.over).toBe(frames.filter((row) => row.verdict === 'over').length);
  expect(summary.spread.frames.reduce((a, b) => a + b)).toBe(frames.filter((row) => row.ratio !== null).length);
  const high = frames.filter((row) => Number(row.ratio) > 1).length;
  expect(summary.spread.frames.slice(20).reduce((a, b) => a + b)).toBe(high);
  expect(summary.governing.reduce((sum, one) => sum + one.frames, 0)).toBe(59);
  expect(summary.governing.reduce((sum, one) => sum + one.over, 0)).toBe(summary.counts.over);
  const members = await all('members');
  for (const one of summary.sections) {
    const own = members.filter((row) => row.section === one.section);
    const ratios = own.flatMap((row) => (typeof row.ratio === 'number' ? [row.ratio] : [])).sort((a, b) => a - b);
    expect(one.members).toBe(own.length);
    expect(one.worst).toBe(ratios.at(-1));
    expect(one.verdict).toBe(own.find((row) => row.ratio === one.worst)?.verdict);
    expect(one.median).toBe((ratios[(ratios.length - 1) >> 1]! + ratios[ratios.length >> 1]!) / 2);
    expect(one.over).toBe(own.filter((row) => row.verdict === 'over').length);
  }
  expect(summary.sections.map((one) => one.section).sort()).toEqual(['IPE 270', 'IPE 300', 'IPE 330']);
  const worst: View = { table: 'frames', filters: [], sort: { column: 'ratio', descending: true }, columns: null };
  const over: View = { ...worst, filters: [{ column: 'verdict', op: 'in', values: ['over'] }] };
  const page = (await listRows(db, own.office, id, over, { limit: 10 }))!.rows;
  expect(summary.worst.slice(0, page.length).map((one) => one.index)).toEqual(page.map((row) => row.frameIndex));
  const mass = frames.reduce((sum, row) => sum + 2 * Number(row.mass), 0);
  expect(summary.mass).toBeCloseTo(mass, 9);
});

it('names the parameters of the families, and gives one beside the ratios', async () => {
  const { db, raw, own, id } = await batch();
  run(raw, id, own.person, seeded(3));
  const summary = (await findSummary(db, own.office, id))!;
  expect(summary.parameters).toEqual([
    { name: 'base', quantity: 'choice', numeric: false },
    { name: 'span', quantity: 'length', numeric: true },
  ]);
  const spans = await listParameterRatios(db, own.office, id, 'span');
  expect(spans.length).toBe(59);
  expect(spans[20]).toEqual({
    index: 21, value: 31, ratio: summary.cells[21]!.ratio, verdict: summary.cells[21]!.verdict, group: 'wide',
  }); // prettier-ignore
  expect(await listParameterRatios(db, own.office, id, 'base')).toEqual([]);
});
