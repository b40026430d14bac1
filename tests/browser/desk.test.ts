import type { Browser, Page } from 'playwright-core';
import { afterAll, beforeAll, describe, expect, inject, it } from 'vitest';
import { bring, run, type Brought } from '../setup/bring';
import { signedIn } from '../setup/visitor';
import { openBrowser, signInAs } from './browser';

const { url, people } = inject('server');

interface Cell {
  readonly id: string;
  readonly ratio: number | null;
  readonly verdict: string;
}

describe('a desk with a large batch', () => {
  let browser: Browser;
  let page: Page;
  let sheds: Brought;

  beforeAll(async () => {
    const analyst = await signedIn(url, 'north', 'analyst');
    sheds = await bring(analyst, `/api/projects/${people.north.project}/batches`, 'samples/portal-sheds-1000.xlsx');
    await run(analyst, sheds);
    browser = await openBrowser();
    page = await (await browser.newContext({ viewport: { width: 1440, height: 900 } })).newPage();
    page.setDefaultTimeout(30_000);
    await signInAs(page, url, 'north', 'analyst');
  });
  afterAll(() => browser.close());

  const at = (sheet: string) => `${url}/batches/${sheds.batch}/A/${sheet}`;

  it('shows a thousand frames at 1440 × 900 without scrolling, each cell as high as the API’s ratio', async () => {
    await page.goto(at('glance'));
    const { summary } = (await (await page.request.get(`${url}/api/batches/${sheds.batch}/revisions/A/summary`)).json()) as {
      summary: { cells: Cell[] };
    };
    expect(summary.cells).toHaveLength(1000);
    const strip = page.getByRole('listbox', { name: '1,000 frames in sheet order' });
    await strip.waitFor();
    const cells = await strip.getByRole('option').evaluateAll((all) =>
      all.map((cell) => {
        const body = cell.querySelector<SVGGraphicsElement>('.cell-body')!;
        const { top, bottom } = body.getBoundingClientRect();
        return { label: cell.getAttribute('aria-label') ?? '', height: body.getBBox().height, full: Number(cell.getAttribute('data-full')), top, bottom }; // prettier-ignore
      }),
    );
    expect(cells).toHaveLength(1000);
    summary.cells.forEach(({ id, ratio, verdict }, index) => {
      const cell = cells[index]!;
      expect(cell.label).toContain(id);
      expect(cell.top, id).toBeGreaterThanOrEqual(0);
      expect(cell.bottom, id).toBeLessThanOrEqual(900);
      // A cell's whole height is 1.25.
      if (ratio !== null && verdict !== 'not checked')
        expect((1.25 * cell.height) / cell.full, id).toBeCloseTo(Math.min(ratio, 1.25), 3);
    });
    expect(await strip.evaluate((box) => box.scrollHeight - box.clientHeight)).toBeLessThanOrEqual(1);
    const readout = await page.locator('.readout').first().boundingBox();
    expect(readout!.y + readout!.height).toBeLessThanOrEqual(900);
  });

  it('walks from a frame through the members’ list it was opened from', async () => {
    await page.goto(`${at('members')}?verdict=over&sort=-ratio`);
    await page.locator('.result-table tbody tr a').first().click();
    await page.waitForURL(/\/frames\/\d+\?list=members&verdict=over&sort=-ratio$/);
    const walk = page.getByRole('navigation', { name: 'Frames of this list' });
    expect(await walk.textContent()).toContain('1 of 11 frames of members where verdict is over');
    const next = walk.getByRole('link', { name: /^Next frame/ });
    const id = (await next.getAttribute('aria-label'))!.replace('Next frame, ', '');
    await page.keyboard.press('j');
    await page.getByRole('group', { name: 'Title block' }).getByText(id).waitFor();
    await walk.getByText('2 of 11').waitFor();
    await page.keyboard.press('u');
    await page.waitForURL(/\/members\?verdict=over&sort=-ratio$/);
  });

  it('vouches for the run by its worst figures', async () => {
    await page.goto(at('run'));
    const facts = page.locator('dl.facts');
    await facts.waitFor();
    const { certificate } = (await (await page.request.get(`${url}/api/batches/${sheds.batch}/revisions/A/summary`)).json()) as {
      certificate: { solved: number; seconds: number; digits: number };
    };
    expect(await facts.textContent()).toContain(`${certificate.seconds} of ${certificate.solved}`);
    expect(await facts.textContent()).toContain(certificate.digits.toFixed(1));
  });

  it('says that a file is too large, and that a file is none that it reads, where they were dropped', async () => {
    await page.goto(`${url}/projects/${people.north.project}/bring`);
    const input = page.locator('input[type=file]');
    await input.setInputFiles({ name: 'huge.csv', mimeType: 'text/csv', buffer: Buffer.alloc(26 * 1024 * 1024, 'a') });
    await page.getByRole('alert').getByText('larger than 25 MB').waitFor();
    await input.setInputFiles({ name: 'holiday.xlsx', mimeType: 'image/png', buffer: Buffer.from('\x89PNG, no workbook') });
    await page.waitForURL(/\/A\/read$/, { timeout: 60_000 });
    await page.getByText('holiday.xlsx is not a workbook').waitFor({ timeout: 60_000 });
    await page.getByRole('heading', { name: 'No frame can run yet' }).waitFor();
    expect(await page.getByRole('button', { name: /^Run/ }).count()).toBe(0);
    // of a file that could not be opened there is nothing to mark
    expect(await page.getByRole('link', { name: 'Download the marked copy' }).count()).toBe(0);
  });

  it('is never wider than a phone', async () => {
    const phone = await (await browser.newContext({ viewport: { width: 390, height: 844 }, isMobile: true })).newPage();
    await signInAs(phone, url, 'north', 'lead');
    const wide: string[] = [];
    const sheets = [
      'read',
      'run',
      'glance',
      'frames',
      'members',
      'checks',
      'reactions',
      'movements',
      'problems',
      'frames/1',
      'frames/1/numbers',
    ];
    const paths = [
      '/projects',
      '/people',
      `/projects/${people.north.project}`,
      ...sheets.map((one) => at(one).slice(url.length)),
    ];
    for (const path of paths) {
      await phone.goto(`${url}${path}`, { waitUntil: 'networkidle' });
      const width = await phone.evaluate(() => document.documentElement.scrollWidth);
      if (width > 390) wide.push(`${path}: ${width} px`);
    }
    expect(wide).toEqual([]);
  }, 60_000);
});
