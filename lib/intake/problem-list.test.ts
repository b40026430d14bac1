import { expect, it } from 'vitest';
import { type Place, ProblemList } from '@/lib/intake/problem-list';

const at = (order: number, row: number | null, column: number | null): Place => ({
  order,
  sheet: `S${order}`,
  file: null,
  row,
  column,
  heading: 'h',
  found: null,
});

it('one problem a cell and code, with every frame it touches', () => {
  const list = new ProblemList();
  list.add(at(0, 2, 1), { code: 'not-a-number', message: 'a' }, 'F1');
  list.add(at(0, 2, 1), { code: 'not-a-number', message: 'b' }, 'F2');
  list.add(at(0, 2, 1), { code: 'text-number', message: 'c' }, 'F2');
  expect(list.list().map((p) => [p.code, p.cell, p.frames, p.message])).toEqual([
    ['not-a-number', 'B2', ['F1', 'F2'], 'a'],
    ['text-number', 'B2', ['F2'], 'c'],
  ]);
  expect([...list.stopped]).toEqual(['F1', 'F2']);
});
it('stands in the order of sheets, rows, columns; sheets that are not there come last', () => {
  const list = new ProblemList();
  for (const [order, row, column] of [[Infinity, null, null], [1, 2, 0], [0, 3, 0], [0, 2, 4], [0, 2, 1], [0, null, null]] as const) list.add(at(order, row, column), { code: 'derived', message: '' }, null); // prettier-ignore
  expect(list.list().map((p) => `${p.sheet} ${p.cell}`)).toEqual([
    'S0 null',
    'S0 B2',
    'S0 E2',
    'S0 A3',
    'S1 A2',
    'SInfinity null',
  ]);
});
it('an error that lowers verdicts stops nothing; one of the whole batch stops all', () => {
  const list = new ProblemList();
  list.add(at(0, 1, 1), { code: 'combination-without-case', message: '', stops: false }, 'F1');
  expect([list.stopped.size, list.stopsAll]).toEqual([0, false]);
  list.add(at(0, 1, 2), { code: 'missing-sheet', message: '', stopsAll: true }, null);
  expect(list.stopsAll).toBe(true);
});
it('a cell’s endless text is not repeated in full', () => {
  const list = new ProblemList();
  const text = 'x'.repeat(32_000);
  list.add({ ...at(0, 1, 1), found: text }, { code: 'not-a-number', message: text }, null);
  const [problem] = list.list();
  expect([problem?.found?.length, problem?.message.length]).toEqual([301, 801]);
});
it('a flood of notes is counted, not listed; errors all stand', () => {
  const list = new ProblemList();
  for (let row = 1; row <= 6000; row += 1) list.add(at(0, row, 0), { code: 'text-number', message: '' }, 'F1');
  for (let row = 1; row <= 6000; row += 1) list.add(at(0, row, 1), { code: 'not-a-number', message: '' }, 'F1');
  const found = list.list();
  expect(found.filter((p) => p.code === 'not-a-number')).toHaveLength(6000);
  expect(found.filter((p) => p.code === 'text-number')).toHaveLength(5001);
  expect(found.at(-1)?.message).toContain('1000 more');
});
