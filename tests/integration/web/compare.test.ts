/** Two revisions compared through the API: mended sheets against the first ones, as JSON and as a workbook; and who may. */
import ExcelJS from 'exceljs';
import { beforeAll, describe, expect, inject, it } from 'vitest';
import { errorShape } from '@/lib/api/error';
import { bring, revisionAddress, run, stateBecomes, type Brought } from '../../setup/bring';
import { signedIn, type Visitor } from '../../setup/visitor';

const { url, people } = inject('server');

interface Told {
  readonly before: string;
  readonly after: string;
  readonly settings: readonly unknown[];
  readonly recorded: readonly { readonly letter: string; readonly what: string }[];
  readonly inputs: { readonly changes: number; readonly cells: number };
  readonly totals: {
    readonly frames: Readonly<Record<'before' | 'after' | 'carried' | 'onlyBefore' | 'onlyAfter', number>>;
    readonly became: Readonly<Record<string, number>>;
    readonly verdicts: readonly (readonly number[])[];
  };
  readonly rows: readonly Readonly<Record<string, unknown>>[];
  readonly matching: number;
}

describe('two revisions compared', () => {
  let analyst: Visitor;
  let mended: Brought;
  let racks: Brought;

  beforeAll(async () => {
    analyst = await signedIn(url, 'north', 'analyst');
    const to = `/api/projects/${people.north.project}/batches`;
    const first = await bring(analyst, to, 'samples/messy.xlsx');
    await run(analyst, first);
    mended = await bring(analyst, `/api/batches/${first.batch}/revisions`, 'samples/messy-mended.xlsx');
    await run(analyst, mended);
    racks = await bring(analyst, to, 'samples/pipe-rack-12.xlsx');
    await run(analyst, racks);
    const body = { changes: [{ kind: 'setting', setting: 'nearLimit', value: '0.3' }], reason: 'to look closer', run: true };
    await analyst.send(`${revisionAddress(racks)}/changes`, body);
    racks = { ...racks, revision: 'B' };
    await stateBecomes(analyst, racks, (state) => state === 'run');
  });

  const compare = (of: Brought, query = '') => analyst.json<Told>(`${revisionAddress(of)}/compare${query}`);

  it('say which cells were mended, and which frames were stopped before and are checked now', async () => {
    const told = await compare(mended, '?show=all');
    expect([told.before, told.after]).toEqual(['A', 'B']);
    expect(told.inputs.cells).toBeGreaterThan(0);
    const { frames, verdicts } = told.totals;
    expect(told.matching).toBe(frames.after + frames.onlyBefore);
    expect(verdicts.flat().reduce((sum, n) => sum + n, 0)).toBe(frames.after - frames.onlyAfter);
    const cells = await compare(mended, '?list=cells&size=500');
    expect(cells.matching).toBe(told.inputs.cells);
    for (const row of cells.rows) expect(row.before).not.toBe(row.after);
    const moved = await compare(mended, '?show=moved');
    expect(moved.matching).toBeGreaterThan(0);
    for (const row of moved.rows) expect(row.carried).toBe(false);
  });

  it('say that a setting changed on screen made more frames near, with no row of the sheets but its own', async () => {
    const told = await compare(racks, '?with=A&show=near');
    expect(told.settings).toEqual([{ setting: 'near limit', before: '0.90', after: '0.30' }]);
    expect(told.recorded).toMatchObject([{ letter: 'B', what: 'near limit' }]);
    expect(told.inputs).toMatchObject({ changes: 0, cells: 0 });
    expect(told.totals.became.near).toBe(told.matching);
    expect(told.matching).toBeGreaterThan(0);
    for (const row of told.rows) expect(row).toMatchObject({ became: 'near', carried: false, after: { verdict: 'near' } });
    expect((await compare(racks, '?list=reactions')).matching).toBe(0);
    expect((await compare(racks, '?list=members&show=near')).matching).toBeGreaterThan(0);
  });

  it('show nothing that moved where a revision is compared with itself', async () => {
    const told = await compare(racks, '?with=B');
    expect([told.matching, told.totals.frames.carried]).toEqual([0, told.totals.frames.after]);
  });

  it('give their rows by pages', async () => {
    const all = await compare(racks, '?show=all&size=500');
    const second = await compare(racks, '?show=all&size=5&page=2');
    expect(second.rows).toEqual(all.rows.slice(5, 10));
  });

  it('are taken away as a workbook with the same figures', async () => {
    const answer = await analyst.fetch(`${revisionAddress(racks)}/compare/export?with=A`);
    expect(answer.headers.get('content-disposition')).toContain('pipe-rack-12 A to B.xlsx');
    const book = new ExcelJS.Workbook();
    await book.xlsx.load(await answer.arrayBuffer());
    expect(book.worksheets.map(({ name }) => name)).toEqual([
      'Comparison', 'Settings and changes', 'Inputs that differ', 'Frames', 'Members that moved', 'Reactions that moved', 'Steel',
    ]); // prettier-ignore
    const { totals } = await compare(racks, '?with=A');
    const frames = book.getWorksheet('Frames')!;
    expect(frames.rowCount - 1).toBe(totals.frames.after);
    let near = 0;
    frames.eachRow((row) => (near += row.getCell(7).value === 'became near' ? 1 : 0));
    expect(near).toBe(totals.became.near);
    expect(book.getWorksheet('Settings and changes')!.getRow(2).getCell(4).value).toBe('0.30');
  });

  it.each([
    ['a revision that the batch does not have', '?with=Z', 404],
    ['what is no letter', '?with=../A', 400],
    ['a list there is none of', '?list=secrets', 400],
    ['a movement that is no number', '?by=much', 400],
    ['a page before the first', '?page=0', 400],
  ])('are refused with a sentence: %s', async (_, query, status) => {
    for (const part of ['compare', 'compare/export']) {
      const answer = await analyst.fetch(`${revisionAddress(racks)}/${part}${query}`);
      expect(answer.status).toBe(status);
      expect(errorShape.safeParse(await answer.json()).success).toBe(true);
    }
  });

  it('are nobody’s of another office and no client’s, and need another revision', async () => {
    const status = async (office: 'north' | 'south', role: 'lead' | 'checker' | 'client') =>
      (await (await signedIn(url, office, role)).fetch(`${revisionAddress(racks)}/compare?with=A`)).status;
    expect(await status('north', 'checker')).toBe(200);
    expect(await status('north', 'client')).toBe(404);
    expect(await status('south', 'lead')).toBe(404);
    expect((await analyst.fetch(`${revisionAddress({ ...racks, revision: 'A' })}/compare`)).status).toBe(409);
  });
});
