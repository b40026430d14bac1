import type { Browser, Page } from 'playwright-core';
import { afterAll, beforeAll, describe, expect, inject, it } from 'vitest';
import { bring, run, stateBecomes, type Brought } from '../setup/bring';
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

  it('of the office’s own are drawn as they are typed, saved as a version, edited, and given to members by a sheet', async () => {
    const lead = await (await browser.newContext({ viewport: { width: 1440, height: 900 } })).newPage();
    lead.setDefaultTimeout(30_000);
    const complaints = complaintsOf(lead);
    await signInAs(lead, url, 'north', 'lead');
    await lead.goto(`${url}/sections`);
    await lead.getByRole('link', { name: 'The office’s own' }).click();
    await lead.getByRole('link', { name: 'New section' }).click();
    await lead.getByLabel('Name', { exact: true }).fill('ipe 300');
    for (const [label, text] of [
      ['depth, h', '620'],
      ['width, b', '240'],
      ['web, tw', '8'],
      ['flange, tf', '14'],
    ] as const)
      // prettier-ignore
      await lead.getByLabel(label).fill(text);
    await lead.getByText('IPE 300 is a standard one').waitFor();
    await lead.getByLabel('Name', { exact: true }).fill('Girder 620');
    await lead.getByRole('img', { name: /Girder 620 to scale: depth 620 mm, width 240 mm/ }).waitFor();
    // 2·24·1.4 + 59.2·0.8 cm²
    const facts = lead.getByRole('table', { name: 'Properties of Girder 620' });
    expect(await facts.getByRole('row', { name: /^area/ }).innerText()).toMatch(/114\.6.*cm².*derived/s);
    await lead.getByLabel('Source').fill('drawing 21');
    await lead.getByRole('button', { name: 'Save as version 1' }).click();
    await lead.getByText('No revision is made of it yet.').waitFor();

    await lead.goto(`${url}/batches/${sheds.batch}/A/change`);
    const rows = 'role,section\nrafter,Girder 620\n';
    const chooser = lead.getByLabel('Choose a Changes sheet');
    await chooser.setInputFiles({ name: 'Changes.csv', mimeType: 'text/csv', buffer: Buffer.from(rows.replace('620', '62O')) });
    await lead.getByRole('table', { name: 'Problems by cell' }).getByText('B2').waitFor();
    await chooser.setInputFiles({ name: 'Changes.csv', mimeType: 'text/csv', buffer: Buffer.from(rows) });
    await lead.getByText('Changes.csv touches 24 frames').waitFor();
    await lead.getByLabel('Why it is changed by this sheet').fill('Welded rafters');
    await lead.getByRole('button', { name: /by the sheet and run 24 frames/ }).click();
    await lead.waitForURL(/\/C\/read/);
    // what a revision is made of is known once its rows are read
    await stateBecomes(await signedIn(url, 'north', 'lead'), { batch: sheds.batch, revision: 'C' }, (state) => state === 'run');
    await lead.goto(`${url}/sections/own`);
    await lead.getByRole('link', { name: 'Girder 620' }).click();
    await lead.getByRole('link', { name: /^Revision C of/ }).waitFor();
    await lead.getByLabel('flange, tf').fill('16');
    await lead.getByRole('button', { name: 'Save as version 2' }).click();
    await lead.getByRole('button', { name: 'Save as version 3' }).waitFor();
    const uses = lead.getByRole('table', { name: 'Revisions made of Girder 620' });
    expect(await uses.getByRole('row').nth(1).innerText()).toMatch(/C.*v1.*24/s);
    expect(complaints).toEqual([]);
  });
});
