import { createReadStream } from 'node:fs';
import ExcelJS from 'exceljs';
import type { Browser, Page } from 'playwright-core';
import { afterAll, beforeAll, describe, expect, inject, it } from 'vitest';
import { bring, revisionAddress, run, stateBecomes, type Brought } from '../setup/bring';
import { signedIn } from '../setup/visitor';
import { complaintsOf, openBrowser, signInAs } from './browser';

const { url, people } = inject('server');

describe('comparing two revisions', () => {
  let browser: Browser;
  let racks: Brought;

  beforeAll(async () => {
    const analyst = await signedIn(url, 'north', 'analyst');
    racks = await bring(analyst, `/api/projects/${people.north.project}/batches`, 'samples/pipe-rack-12.xlsx');
    await run(analyst, racks);
    const body = { changes: [{ kind: 'setting', setting: 'nearLimit', value: '0.3' }], reason: 'to look closer', run: true };
    await analyst.send(`${revisionAddress(racks)}/changes`, body);
    await stateBecomes(analyst, { ...racks, revision: 'B' }, (state) => state === 'run');
    browser = await openBrowser();
  });
  afterAll(() => browser.close());

  async function pageOf(role: 'analyst' | 'checker'): Promise<Page> {
    const page = await (await browser.newContext({ viewport: { width: 1440, height: 900 } })).newPage();
    page.setDefaultTimeout(30_000);
    await signInAs(page, url, 'north', role);
    return page;
  }

  it('goes from the head to what moved, by keyboard through the strip, to rows and to a workbook', async () => {
    const page = await pageOf('analyst');
    const complaints = complaintsOf(page);
    await page.goto(`${url}/batches/${racks.batch}/B/glance`);
    await page.getByRole('link', { name: 'Compare with A' }).click();
    await page.waitForURL(/B\/compare\?with=A/);
    await page.getByText('Setting near limit:').waitFor();
    const strip = page.getByRole('slider', { name: 'How each frame moved from revision A to B' });
    await strip.focus();
    await page.keyboard.press('Home');
    await page.keyboard.press('ArrowRight');
    expect(await strip.getAttribute('aria-valuenow')).toBe('2');
    await page.getByRole('link', { name: 'became near' }).click();
    await page.waitForURL(/show=near/);
    const table = page.getByRole('table', { name: 'Frames that moved' });
    await expect.poll(() => table.getByText('became near').count()).toBeGreaterThan(0);
    const download = page.waitForEvent('download');
    await page.getByRole('link', { name: 'Export the differences' }).click();
    const book = new ExcelJS.Workbook();
    await book.xlsx.read(createReadStream(await (await download).path()));
    expect(book.getWorksheet('Frames')!.rowCount).toBeGreaterThan(1);
    expect(complaints).toEqual([]);
    await page.context().close();
  });

  it('is read by a checker, with what counts as a movement kept in the address', async () => {
    const page = await pageOf('checker');
    await page.goto(`${url}/batches/${racks.batch}/B/compare?with=A&list=members`);
    await page.getByLabel('moved by more than').fill('0.05');
    await page.getByRole('button', { name: 'Show' }).click();
    await page.waitForURL(/list=members.*by=0\.05|by=0\.05.*list=members/);
    expect(await page.getByLabel('moved by more than').inputValue()).toBe('0.05');
    await page.getByRole('table', { name: 'Members that moved' }).waitFor();
    await page.context().close();
  });

  it('says so where there is nothing to compare with', async () => {
    const page = await pageOf('checker');
    await page.goto(`${url}/batches/${racks.batch}/A/compare`);
    await page.getByText('no earlier revision').waitFor();
    await page.context().close();
  });
});
