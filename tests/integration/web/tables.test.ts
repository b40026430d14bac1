import ExcelJS from 'exceljs';
import { beforeAll, describe, expect, inject, it } from 'vitest';
import { errorShape } from '@/lib/api/error';
import type { RowPage } from '@/lib/tables/view';
import { bring, revisionAddress, run } from '../../setup/bring';
import { signedIn, type Visitor } from '../../setup/visitor';

const { url, people } = inject('server');

describe('a revision’s tables', () => {
  let analyst: Visitor;
  let at: string;

  beforeAll(async () => {
    analyst = await signedIn(url, 'north', 'analyst');
    const brought = await bring(analyst, `/api/projects/${people.north.project}/batches`, 'samples/canopies-us-36.xlsx');
    await run(analyst, brought);
    at = revisionAddress(brought);
  });

  /** Every row of a view, a page at a time. */
  async function walk(table: string, query: string, size: number): Promise<RowPage['rows'][number][]> {
    const rows: RowPage['rows'][number][] = [];
    let after: string | null = null;
    do {
      const cursor: string = after === null ? '' : `&after=${encodeURIComponent(after)}`;
      const page = await analyst.json<RowPage>(`${at}/tables/${table}?${query}&size=${size}${cursor}`);
      rows.push(...page.rows);
      after = page.next;
    } while (after !== null);
    return rows;
  }

  it('give every row once, whatever the size of a page', async () => {
    for (const sort of ['', '&sort=-ratio', '&sort=section']) {
      const small = await walk('members', `role=beam&role=rafter&role=column${sort}`, 7);
      const large = await walk('members', `role=beam&role=rafter&role=column${sort}`, 500);
      expect(new Set(small.map((row) => row.id)).size).toBe(small.length);
      expect(small.map((row) => row.id)).toEqual(large.map((row) => row.id));
    }
  });

  it('are exported as CSV and XLSX with exactly the rows, columns and order of the view', async () => {
    const query = 'ratio=0.1..&sort=-ratio&columns=frame,member,ratio,verdict';
    const rows = await walk('members', query, 100);
    expect(rows.length).toBeGreaterThan(5);
    const csv = await (await analyst.fetch(`${at}/tables/members/export?${query}&format=csv`)).text();
    const lines = csv.replace('\ufeff', '').trim().split('\r\n');
    expect(lines[0]).toBe('Frame,Member,Ratio,Verdict');
    expect(lines.slice(1)).toEqual(rows.map(({ cells }) => [cells.frame, cells.member, cells.ratio, cells.verdict].join(',')));

    const answer = await analyst.fetch(`${at}/tables/members/export?${query}&format=xlsx`);
    expect(answer.headers.get('content-disposition')).toMatch(/^attachment; filename="[^"]+ A members\.xlsx"/);
    const book = new ExcelJS.Workbook();
    await book.xlsx.load(await answer.arrayBuffer());
    const sheet = book.getWorksheet('members')!;
    expect(sheet.rowCount).toBe(rows.length + 1);
    rows.forEach(({ cells }, index) => {
      const row = sheet.getRow(index + 2);
      expect([1, 2, 3, 4].map((column) => row.getCell(column).value)).toEqual([
        cells.frame,
        cells.member,
        cells.ratio,
        cells.verdict,
      ]);
    });
  });

  it('are exported in the batch’s own units', async () => {
    const csv = await (await analyst.fetch(`${at}/tables/reactions/export?columns=frame,fx,mz&format=csv`)).text();
    expect(csv.replace('\ufeff', '').split('\r\n')[0]).toBe('Frame,Fx [kip],Mz [kip·ft]');
  });

  it('count the values that a column can be filtered by', async () => {
    const { values } = await analyst.json<{ values: Record<string, { value: string; count: number }[]> }>(
      `${at}/tables/members/facets`,
    );
    const { total } = await analyst.json<RowPage>(`${at}/tables/members?size=1`);
    expect(values.role!.reduce((sum, one) => sum + one.count, 0)).toBe(total);
    for (const { value, count } of values.section!) {
      const { matching } = await analyst.json<RowPage>(`${at}/tables/members?size=1&section=${encodeURIComponent(value)}`);
      expect([value, matching]).toEqual([value, count]);
    }
  });

  it('tell a script what it asked wrongly, instead of leaving a filter out', async () => {
    for (const query of ['colour=red', 'sort=length', 'columns=frame,colour', 'size=0', 'size=9999', 'length=1..2']) {
      const answer = await analyst.fetch(`${at}/tables/members?${query}`);
      expect([query, answer.status]).toEqual([query, 400]);
      const { code, fields } = errorShape.strict().parse(await answer.json()).error;
      expect([code, Object.keys(fields ?? {})]).toEqual(['bad-request', [query.split('=')[0]]]);
    }
    expect((await analyst.fetch(`${at}/tables/columns`)).status).toBe(404);
    expect((await analyst.fetch(`${at}/tables/members/export?format=pdf`)).status).toBe(400);
  });

  it('show one frame with the forces of the combination asked for, and no other', async () => {
    interface Frame {
      readonly frame: {
        readonly drawing: { readonly chosen: { readonly name: string }; readonly results: readonly { readonly name: string }[] };
      };
    }
    const { frame } = await analyst.json<Frame>(`${at}/frames/1`);
    const last = frame.drawing.results.at(-1)!.name;
    const asked = await analyst.json<Frame>(`${at}/frames/1?result=${encodeURIComponent(last)}`);
    expect(asked.frame.drawing.chosen.name).toBe(last);
    expect((await analyst.fetch(`${at}/frames/1?result=none`)).status).toBe(404);
    for (const number of ['0', '37', '1.5', 'x'])
      expect([number, (await analyst.fetch(`${at}/frames/${number}`)).status]).toEqual([number, 404]);
  });
});
