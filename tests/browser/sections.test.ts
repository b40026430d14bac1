import type { Browser, Page } from 'playwright-core';
import { afterAll, beforeAll, describe, expect, inject, it } from 'vitest';
import { bring, run, type Brought } from '../setup/bring';
import { signedIn } from '../setup/visitor';
import { complaintsOf, openBrowser, signInAs } from './browser';

const { url, people } = inject('server');

describe('sections on screen', () => {
  let browser: Browser;
  let page: Page;
  let sheds: Brought;

  beforeAll(async () => {
    const analyst = await signedIn(url, 'north', 'analyst');
    sheds = await bring(analyst, `/api/projects/${people.north.project}/batches`, 'samples/slender-sheds-24.xlsx');
    await run(analyst, sheds);
    browser = await openBrowser();
    page = await (await browser.newContext({ viewport: { width: 1440, height: 900 } })).newPage();
    page.setDefaultTimeout(30_000);
    await signInAs(page, url, 'north', 'analyst');
  });
  afterAll(() => browser.close());

  it('are found in the library however typed, shown to scale, and suggested for a near miss', async () => {
    const complaints = complaintsOf(page);
    await page.goto(`${url}/projects`);
    await page.getByRole('link', { name: 'Sections', exact: true }).click();
    await page.getByLabel('Designation').fill('305 x 165 x 40 UB');
    await page.keyboard.press('Enter');
    await page.getByRole('img', { name: /UB 305x165x40 to scale/ }).waitFor();
    const facts = page.getByRole('table', { name: 'Properties of UB 305x165x40' });
    expect(await facts.getByRole('row', { name: /^area/ }).innerText()).toMatch(/51\.\d.*cm².*derived/s);
    await page.getByLabel('Designation').fill('IPE 310');
    await page.keyboard.press('Enter');
    await page.getByRole('link', { name: 'IPE 300', exact: true }).click();
    await page.getByRole('img', { name: /IPE 300 to scale/ }).waitFor();
    expect(complaints).toEqual([]);
  });

  it('are changed from the members table: what it touches is shown, and those frames alone run again', async () => {
    const complaints = complaintsOf(page);
    await page.goto(`${url}/batches/${sheds.batch}/A/members?role=rafter`);
    await page.getByRole('link', { name: 'Change the section of these members' }).click();
    await page.waitForURL(/A\/change\?role=rafter/);
    const frame = await page.evaluate(async (batch) => {
      const answer = await fetch(`/api/batches/${batch}/revisions/A/tables/members?role=rafter&size=1`);
      return ((await answer.json()) as { rows: { cells: { frame: string } }[] }).rows[0]?.cells.frame ?? '';
    }, sheds.batch);
    await page.getByLabel('Frame').fill(frame);
    await page.getByRole('button', { name: 'Choose these members' }).click();
    await page.waitForURL(/frame=/);
    await page.getByLabel('Section', { exact: true }).last().fill('IPE 600');
    await page.getByRole('button', { name: 'IPE 600', exact: true }).click();
    await page.getByText('23 other frames keep their results, carried over from A').waitFor();
    await page.getByLabel('Why it is changed').fill('Stiffer rafters for the crane');
    await page.getByRole('button', { name: 'Make revision B and run its frame' }).click();
    await page.waitForURL(new RegExp(`/batches/${sheds.batch}/B/`));
    const head = page.getByRole('region', { name: 'How revision B was made' });
    await head.waitFor();
    expect((await head.innerText()).replaceAll(/\s+/g, ' ')).toMatch(/section of role rafter.*IPE 600.*Stiffer rafters/);
    expect(complaints).toEqual([]);
  });
});
