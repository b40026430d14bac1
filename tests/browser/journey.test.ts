import { readFileSync } from 'node:fs';
import ExcelJS from 'exceljs';
import type { Browser, Page } from 'playwright-core';
import { afterAll, beforeAll, describe, expect, inject, it } from 'vitest';
import { complaintsOf, openBrowser, signInAs } from './browser';

const { url } = inject('server');

/** Of the published JSON, what the workbook is compared with. */
interface Results {
  readonly frames: readonly {
    readonly frame: string;
    readonly verdict: string;
    readonly governing: { readonly ratio: number | null; readonly check: string; readonly combination: string | null } | null;
    readonly mass: number | null;
    readonly results: readonly {
      readonly name: string;
      readonly reactions: readonly { readonly node: string; readonly fx: number; readonly fy: number; readonly mz: number }[];
    }[];
  }[];
}

describe('an analyst’s way through, from messy sheets to a result workbook', () => {
  let browser: Browser;
  let page: Page;
  let complaints: string[];
  let batch = '';

  beforeAll(async () => {
    browser = await openBrowser();
    page = await (await browser.newContext({ viewport: { width: 1440, height: 900 }, acceptDownloads: true })).newPage();
    page.setDefaultTimeout(30_000);
    complaints = complaintsOf(page);
  });
  afterAll(() => browser.close());

  it('signs in and comes to the office’s projects', async () => {
    await signInAs(page, url, 'north', 'analyst');
    await page.getByRole('link', { name: 'Sheds north' }).click();
    await page.getByRole('link', { name: 'Bring sheets in' }).click();
    await page.getByRole('heading', { name: 'Drop workbooks or CSV files here' }).waitFor();
  });

  it('drops the messy sheets and sees each problem at its cell', async () => {
    await dropFile(page, 'samples/messy.xlsx');
    await page.waitForURL(/\/batches\/\d+\/A\/read$/, { timeout: 60_000 });
    batch = /\/batches\/(\d+)\//.exec(page.url())?.[1] ?? '';
    await page.getByRole('heading', { name: 'Problems by cell' }).waitFor({ timeout: 60_000 });
    const row = page.getByRole('row').filter({ hasText: 'IPE 24O' });
    expect(await row.getByRole('cell').allTextContents()).toEqual(expect.arrayContaining(['E3', 'IPE 24O']));
    await row.click();
    const fragment = page.getByRole('table', { name: 'Members, around E3' });
    await fragment.waitFor();
    expect(await fragment.locator('.fragment-ring').textContent()).toBe('IPE 24O');
    expect(await page.locator('.pencil').textContent()).toContain('E3:');
  });

  it('takes the marked copy, in which the same cell is filled and noted', async () => {
    const [download] = await Promise.all([
      page.waitForEvent('download'),
      page.getByRole('link', { name: 'Download the marked copy' }).click(),
    ]);
    const book = new ExcelJS.Workbook();
    await book.xlsx.readFile((await download.path())!);
    const cell = book.getWorksheet('Members')!.getCell('E3');
    expect(cell.value).toBe('IPE 24O');
    expect(JSON.stringify(cell.fill)).toContain('FFFFC7C2');
    expect(JSON.stringify(cell.note)).toContain('IPE 24O');
  });

  it('drops the mended sheets, which become revision B, and runs them', async () => {
    await page.getByRole('link', { name: 'Bring mended sheets in' }).click();
    await page.getByRole('heading', { name: 'Drop workbooks or CSV files here' }).waitFor();
    await dropFile(page, 'samples/messy-mended.xlsx');
    await page.waitForURL(/\/B\/read$/, { timeout: 60_000 });
    const button = page.getByRole('button', { name: /^Run [\d,]+ frames$/ });
    await button.waitFor({ timeout: 60_000 });
    await button.click();
    await page.waitForURL(/\/B\/run$/);
    await page.getByRole('link', { name: 'See the results' }).waitFor({ timeout: 120_000 });
  });

  it('shows the whole batch on one strip, each cell as high as the API’s ratio', async () => {
    await page.getByRole('link', { name: 'See the results' }).click();
    await page.waitForURL(/\/B\/glance$/);
    const { summary } = (await (await page.request.get(`${url}/api/batches/${batch}/revisions/B/summary`)).json()) as {
      summary: { cells: { id: string; ratio: number | null; verdict: string }[] };
    };
    const strip = page.getByRole('listbox', { name: `${summary.cells.length} frames in sheet order` });
    await strip.waitFor();
    const drawn = await strip.getByRole('option').evaluateAll((cells) =>
      cells.map((cell) => ({
        label: cell.getAttribute('aria-label') ?? '',
        height: cell.querySelector<SVGGraphicsElement>('.cell-body')?.getBBox().height ?? NaN,
        full: Number(cell.getAttribute('data-full')),
      })),
    );
    expect(drawn.length).toBe(summary.cells.length);
    summary.cells.forEach(({ id, verdict, ratio }, index) => {
      const { label, height, full } = drawn[index]!;
      expect(label).toContain(id);
      expect(label).toContain(verdict);
      // A cell's whole height is 1.25.
      if (ratio !== null && verdict !== 'not checked') expect((1.25 * height) / full, id).toBeCloseTo(Math.min(ratio, 1.25), 3);
    });
  });

  it('filters the members over their limits in a sentence that the address keeps', async () => {
    await page
      .getByRole('link', { name: /Members/ })
      .first()
      .click();
    await page.waitForURL(/\/B\/members/);
    await page.goto(`${page.url()}?verdict=over&sort=-ratio`);
    const rows = page.locator('.result-table tbody tr');
    await rows.first().waitFor();
    const asked = await page.request.get(`${url}/api/batches/${batch}/revisions/B/tables/members?verdict=over&sort=-ratio`);
    const { matching } = (await asked.json()) as { matching: number };
    expect(matching).toBeGreaterThan(0);
    expect(await rows.count()).toBe(Math.min(matching, 100));
    for (const text of await rows.allTextContents()) expect(text).toContain('over');
  });

  it('opens the worst frame, reads a working, and walks on by keyboard', async () => {
    await page.goto(`${url}/batches/${batch}/B/frames?sort=-ratio`);
    const first = page.locator('.result-table tbody tr a').first();
    const id = await first.textContent();
    await first.click();
    await page.waitForURL(/\/B\/frames\/\d+\?sort=-ratio/);
    await page.getByRole('group', { name: 'Title block' }).getByText(id!).waitFor();
    await page.getByRole('region', { name: /^Working:/ }).waitFor();
    expect(await page.locator('svg[data-view="diagram"]').count()).toBe(1);
    const here = page.url();
    await page.keyboard.press('j');
    await page.waitForURL((to) => to.href !== here && /\/B\/frames\/\d+$/.test(to.pathname));
    await page.getByRole('link', { name: `Previous frame, ${id}` }).waitFor();
    await page.keyboard.press('k');
    await page.waitForURL(here);
  });

  it('downloads the result workbook, whose cells are the API’s figures', async () => {
    await page.goto(`${url}/batches/${batch}/B/glance`);
    const [download] = await Promise.all([
      page.waitForEvent('download'),
      page.getByRole('link', { name: 'Result workbook' }).click(),
    ]);
    expect(download.suggestedFilename()).toMatch(/ B results\.xlsx$/);
    const book = new ExcelJS.Workbook();
    await book.xlsx.load(readFileSync((await download.path())!).buffer as ArrayBuffer);
    const json = (await (await page.request.get(`${url}/api/batches/${batch}/revisions/B/json`)).json()) as Results;
    const frames = tableOf(book, 'Frames');
    expect(frames.length).toBe(json.frames.length);
    json.frames.forEach((frame, index) => {
      const row = frames[index]!;
      expect(row.get('frame')).toBe(frame.frame);
      expect(row.get('verdict')).toBe(frame.verdict);
      const ratio = row.get('ratio');
      if (frame.governing === null || frame.governing.ratio === null) expect(ratio ?? null).toBeNull();
      else expect(Number(ratio)).toBeCloseTo(frame.governing.ratio, 9);
    });
    const reactions = tableOf(book, 'Reactions');
    const solved = json.frames.find((frame) => frame.results.length > 0)!;
    for (const { name, reactions: own } of solved.results) {
      for (const { node, fx, fy, mz } of own) {
        const row = reactions.find(
          (one) => one.get('frame') === solved.frame && one.get('support') === node && one.get('case or combination') === name,
        );
        expect(row, `${solved.frame} ${name} ${node}`).toBeDefined();
        expect(Number(row!.get('Fx on the frame [kN]'))).toBeCloseTo(fx / 1000, 6);
        expect(Number(row!.get('Fy on the frame [kN]'))).toBeCloseTo(fy / 1000, 6);
        expect(Number(row!.get('Mz on the frame [kN·m]'))).toBeCloseTo(mz / 1000, 6);
      }
    }
  });

  it('met no complaint in the browser’s console on the way', () => {
    expect(complaints).toEqual([]);
  });
});

/** Drops a file on the page as a person would, from outside the browser. */
async function dropFile(page: Page, path: string): Promise<void> {
  const data = await page.evaluateHandle(
    ({ base64, name }) => {
      const bytes = Uint8Array.from(atob(base64), (letter) => letter.charCodeAt(0));
      const transfer = new DataTransfer();
      transfer.items.add(new File([bytes], name));
      return transfer;
    },
    { base64: readFileSync(path).toString('base64'), name: path.split('/').at(-1)! },
  );
  await page.locator('.drop-zone').dispatchEvent('drop', { dataTransfer: data });
}

/** A sheet's rows by heading. */
function tableOf(book: ExcelJS.Workbook, name: string): Map<string, ExcelJS.CellValue>[] {
  const sheet = book.getWorksheet(name);
  if (!sheet) throw new Error(`The workbook has no sheet ${name}`);
  const headings = Array.from({ length: sheet.columnCount }, (_, index) =>
    String(sheet.getRow(1).getCell(index + 1).value ?? ''),
  );
  const rows: Map<string, ExcelJS.CellValue>[] = [];
  for (let at = 2; at <= sheet.rowCount; at++) {
    const row = sheet.getRow(at);
    rows.push(new Map(headings.map((heading, index) => [heading, row.getCell(index + 1).value])));
  }
  return rows;
}
