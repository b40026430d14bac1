import { expect, it } from 'vitest';
import { iterateRows, listFacets, listRows } from '@/db/queries/lists';
import { newDatabase } from '@/db/testing/database';
import { collected, intakeOf, office, portal, problem, read, run, seeded } from '@/db/testing/sample';
import { type Filter, type Row, type TableName, tables, type View } from '@/lib/tables/view';

/** A revision of 40 frames in three sections and two groups, two of them stopped, run. */
async function batch() {
  const database = await newDatabase();
  const own = await office(database.db, 'Northlight');
  const sections = ['IPE 300', 'IPE 330', 'HE 200 A'];
  const frames = Array.from({ length: 40 }, (_, i) =>
    i % 19 === 5 ? null : portal(`F${i + 1}`, 10 + i / 2, sections[i % 3], sections[(i + 1) % 3]),
  );
  const problems = Array.from({ length: 30 }, (_, i) =>
    problem({ severity: (['note', 'error', 'warning'] as const)[i % 3]!, cell: `E${i}`, sheet: i % 2 ? 'Members' : 'Nodes' }),
  );
  const { id } = await read(database, own, intakeOf(frames, { problems }));
  run(database.raw, id, own.person, seeded(20261201));
  const view = (table: TableName, filters: Filter[] = [], sort: View['sort'] = null, columns: View['columns'] = null): View => ({
    table, filters, sort, columns,
  }); // prettier-ignore
  const page = async (of: View, limit = 1000, more: { after?: string; before?: string } = {}) =>
    (await listRows(database.db, own.office, id, of, { limit, ...more }))!;
  return { ...database, own, id, view, page };
}
type Batch = Awaited<ReturnType<typeof batch>>;

/** Reads a view page by page, forwards and then backwards, and expects both ways to give the same rows. */
async function paged({ page }: Batch, view: View, limit: number): Promise<Row[]> {
  const forwards: Row[] = [];
  let at = await page(view, limit);
  expect(at.previous).toBeNull();
  for (;;) {
    forwards.push(...at.rows);
    if (at.next === null) break;
    at = await page(view, limit, { after: at.next });
  }
  const backwards = [...at.rows];
  while (at.previous !== null) {
    at = await page(view, limit, { before: at.previous });
    backwards.unshift(...at.rows);
  }
  expect(backwards.map((row) => row.id)).toEqual(forwards.map((row) => row.id));
  return forwards;
}

const worstFirst = ['over', 'not checked', 'near', 'within'];
const severities = ['error', 'warning', 'note'];

/** What a cell is sorted by: none below every number, or above where none means infinite. */
function sortValue(column: string, row: Row): number | string {
  const cell = row.cells[column] ?? null;
  if (column === 'verdict') return cell === null ? -9 : -worstFirst.indexOf(String(cell));
  if (column === 'severity') return severities.indexOf(String(cell));
  if (column === 'criticalLoadFactor') return cell === null ? Infinity : Number(cell);
  return typeof cell === 'string' ? cell : cell === null && column !== 'role' ? -Infinity : (cell ?? '');
}

it('gives every table in every order it offers, page by page as at once, and reversed as its mirror', async () => {
  const given = await batch();
  for (const table of Object.keys(tables) as TableName[]) {
    const sheetOrder = (await given.page(given.view(table))).rows;
    for (const { key } of tables[table].filter((column) => column.sort && column.key !== 'frame')) {
      for (const descending of [true, false]) {
        const view = given.view(table, [], { column: key, descending });
        const rows = await paged(given, view, 37);
        expect(rows.map((row) => row.id).sort(), `${table} by ${key}`).toEqual(sheetOrder.map((row) => row.id).sort());
        const values = rows.map((row) => sortValue(key, row));
        for (const [i, value] of values.slice(1).entries()) {
          expect(descending ? values[i]! >= value : values[i]! <= value, `${table} by ${key}, row ${i}`).toBe(true);
        }
        const mirror = await given.page(given.view(table, [], { column: key, descending: !descending }));
        expect(mirror.rows.map((row) => row.id).reverse()).toEqual(rows.map((row) => row.id));
      }
    }
  }
});

it('gives reactions and movements by size in pages of fewer rows than frames, equal ones among them, as at once', async () => {
  const given = await batch();
  for (const [table, key] of [['reactions', 'fy'], ['movements', 'ux'], ['movements', 'rz']] as const) {
    for (const descending of [true, false]) {
      const view = given.view(table, [], { column: key, descending });
      const whole = (await given.page(view, 100_000)).rows.map((row) => row.id);
      expect((await paged(given, view, 3)).map((row) => row.id)).toEqual(whole);
    }
  }
}); // prettier-ignore

it('stands equal rows in sheet order where verdicts or ratios are sorted worst first', async () => {
  const given = await batch();
  const place = new Map((await given.page(given.view('checks'))).rows.map((row, i) => [row.id, i]));
  for (const column of ['verdict', 'ratio']) {
    const { rows } = await given.page(given.view('checks', [], { column, descending: true }));
    for (const [i, row] of rows.slice(1).entries()) {
      if (row.cells[column] !== rows[i]!.cells[column]) continue;
      expect(place.get(row.id)!).toBeGreaterThan(place.get(rows[i]!.id)!);
    }
  }
});

it('gives sheet order upwards and downwards by frame', async () => {
  const given = await batch();
  const rows = await paged(given, given.view('members'), 7);
  expect(rows.map((row) => row.frameIndex)).toEqual([...rows.map((row) => row.frameIndex!)].sort((a, b) => a - b));
  const down = await paged(given, given.view('members', [], { column: 'frame', descending: true }), 50);
  expect(down.map((row) => row.id)).toEqual(rows.map((row) => row.id).reverse());
});

/** Filters of a table with what they ask of a row's cells. */
const asked: readonly [TableName, Filter[], (row: Row) => boolean][] = [
  ['members', [{ column: 'verdict', op: 'in', values: ['over'] }], (row) => row.cells.verdict === 'over'],
  [
    'members',
    [
      { column: 'verdict', op: 'in', values: ['over', 'near'] },
      { column: 'section', op: 'in', values: ['IPE 300', 'HE 200 A'] },
      { column: 'role', op: 'in', values: ['rafter'] },
    ],
    ({ cells }) =>
      ['over', 'near'].includes(String(cells.verdict)) && cells.section !== 'IPE 330' && cells.role === 'rafter',
  ],
  [
    'members',
    [{ column: 'ratio', op: 'range', min: 0.5, max: 0.8 }],
    ({ cells }) => cells.ratio !== null && Number(cells.ratio) >= 0.5 && Number(cells.ratio) <= 0.8,
  ],
  ['members', [{ column: 'ratio', op: 'range', min: null, max: 0.3 }], ({ cells }) => cells.ratio !== null && Number(cells.ratio) <= 0.3],
  ['members', [{ column: 'group', op: 'in', values: [''] }], ({ cells }) => cells.group === null],
  ['members', [{ column: 'frame', op: 'contains', text: '1' }], ({ cells }) => String(cells.frame).includes('1')],
  ['members', [{ column: 'frame', op: 'in', values: ['F3', 'F40'] }], ({ cells }) => ['F3', 'F40'].includes(String(cells.frame))],
  ['members', [{ column: 'p:span', op: 'range', min: 12, max: 15 }], ({ frameIndex }) => frameIndex! >= 4 && frameIndex! <= 10],
  ['members', [{ column: 'p:span', op: 'in', values: ['12', '13.5'] }], ({ frameIndex }) => [4, 7].includes(frameIndex!)],
  ['members', [{ column: 'p:base', op: 'in', values: ['fixed'] }], () => false],
  ['checks', [{ column: 'check', op: 'contains', text: 'STAB' }], ({ cells }) => cells.check === 'stability'],
  ['checks', [{ column: 'combination', op: 'in', values: ['C1'] }, { column: 'section', op: 'in', values: ['IPE 330'] }], ({ cells }) => cells.section === 'IPE 330'],
  ['checks', [{ column: 'check', op: 'contains', text: '%' }], () => false],
  ['frames', [{ column: 'status', op: 'in', values: ['stopped'] }], ({ cells }) => cells.status === 'stopped'],
  ['frames', [{ column: 'criticalLoadFactor', op: 'range', min: 10, max: null }], ({ cells }) => cells.criticalLoadFactor !== null && Number(cells.criticalLoadFactor) >= 10],
  ['reactions', [{ column: 'kind', op: 'in', values: ['case'] }, { column: 'node', op: 'in', values: ['E'] }], ({ cells }) => cells.kind === 'case' && cells.node === 'E'],
  ['movements', [{ column: 'place', op: 'in', values: ['apex'] }, { column: 'result', op: 'in', values: ['S1', 'dead'] }], ({ cells }) => cells.place === 'apex' && ['S1', 'dead'].includes(String(cells.result))],
  ['problems', [{ column: 'severity', op: 'in', values: ['error', 'note'] }, { column: 'sheet', op: 'in', values: ['Nodes'] }], ({ cells }) => cells.severity !== 'warning' && cells.sheet === 'Nodes'],
]; // prettier-ignore

it('filters to exactly the rows that fit, in each order, counted without being fetched', async () => {
  const given = await batch();
  for (const [table, filters, fits] of asked) {
    const sorts = tables[table].filter((column) => column.sort).map(({ key }) => ({ column: key, descending: true }));
    for (const sort of [null, ...sorts]) {
      const whole = (await given.page(given.view(table, [], sort))).rows;
      const expected = whole.filter(fits).map((row) => row.id);
      const name = `${table} ${JSON.stringify(filters)} by ${sort?.column}`;
      const view = given.view(table, filters, sort);
      expect(
        (await paged(given, view, 13)).map((row) => row.id),
        name,
      ).toEqual(expected);
      const { matching, total } = await given.page(view, 1);
      expect([matching, total], name).toEqual([expected.length, whole.length]);
      const exported = await collected(iterateRows(given.db, given.own.office, given.id, view));
      expect(
        exported.map((row) => row.id),
        name,
      ).toEqual(expected);
    }
  }
});

it('exports exactly the rows of a view, in its order', async () => {
  const given = await batch();
  for (const [table, filters, fits] of asked) {
    const view = given.view(table, filters, { column: table === 'problems' ? 'code' : 'frame', descending: true });
    const whole = (await given.page({ ...view, filters: [] })).rows;
    expect(await collected(iterateRows(given.db, given.own.office, given.id, view))).toEqual(whole.filter(fits));
  }
});

it('shows and sorts by a parameter of the family', async () => {
  const given = await batch();
  const view = given.view('frames', [], { column: 'p:span', descending: true }, ['frame', 'p:span', 'p:base']);
  const rows = await paged(given, view, 9);
  const spans = rows.flatMap((row) => (typeof row.cells['p:span'] === 'number' ? [row.cells['p:span']] : []));
  expect(spans).toEqual([...spans].sort((a, b) => b - a));
  expect(spans.length).toBe(38);
  expect(rows.find((row) => row.frameIndex === 5)?.cells).toMatchObject({ status: 'stopped', 'p:span': null });
});

it('totals the masses and numbers off of frames, and the largest ratio', async () => {
  const given = await batch();
  const filters: Filter[] = [{ column: 'group', op: 'in', values: ['wide'] }];
  const { rows, totals } = await given.page(given.view('frames', filters));
  expect(totals.count).toBe(rows.length * 2);
  expect(totals.mass).toBeCloseTo(
    rows.reduce((sum, row) => sum + 2 * Number(row.cells.mass), 0),
    9,
  );
  const members = await given.page(given.view('members', filters.slice(0, 0)), 1);
  const all = (await given.page(given.view('members'))).rows.map((row) => Number(row.cells.ratio));
  expect(members.totals.ratio).toBe(Math.max(...all));
});

it('offers the values of a filter with how many rows have them', async () => {
  const given = await batch();
  for (const table of Object.keys(tables) as TableName[]) {
    const { rows } = await given.page(given.view(table));
    for (const column of tables[table].filter((one) => one.filter)) {
      const facets = await listFacets(given.db, given.own.office, given.id, table, column.key);
      if (column.key === 'frame' || column.kind === 'number' || column.kind === 'ratio') {
        expect(facets, `${table} ${column.key}`).toEqual([]);
        continue;
      }
      const counts = new Map<string, number>();
      for (const row of rows) {
        const value = String(row.cells[column.key] ?? '');
        if (column.key !== 'verdict' || value !== '') counts.set(value, (counts.get(value) ?? 0) + 1);
      }
      expect(new Map(facets.map((one) => [one.value, one.count])), `${table} ${column.key}`).toEqual(counts);
    }
  }
  const spans = await listFacets(given.db, given.own.office, given.id, 'frames', 'p:span');
  expect(spans[0]).toEqual({ value: '10', count: 1 });
});

it('counts anew after more frames have been run', async () => {
  const database = await newDatabase();
  const own = await office(database.db, 'Northlight');
  const { id } = await read(database, own, intakeOf([portal('F1', 10), portal('F2', 12)]));
  const view: View = {
    table: 'frames',
    filters: [{ column: 'status', op: 'in', values: ['waiting'] }],
    sort: null,
    columns: null,
  };
  expect((await listRows(database.db, own.office, id, view, { limit: 9 }))?.matching).toBe(2);
  run(database.raw, id, own.person, seeded(1));
  expect((await listRows(database.db, own.office, id, view, { limit: 9 }))?.matching).toBe(0);
});

it('refuses a filter or a sort that a table does not offer, and begins at the start for a torn cursor', async () => {
  const given = await batch();
  await expect(given.page(given.view('members', [{ column: 'N', op: 'range', min: 0, max: 1 }]))).rejects.toThrow(RangeError);
  await expect(given.page(given.view('members', [], { column: 'N', descending: true }))).rejects.toThrow(RangeError);
  const injected = given.view('members', [], { column: 'ratio; drop table office', descending: true });
  await expect(given.page(injected)).rejects.toThrow(RangeError);
  const first = await given.page(given.view('members'), 3);
  expect((await given.page(given.view('members'), 3, { after: 'nonsense' })).rows).toEqual(first.rows);
});
