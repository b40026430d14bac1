import { mkdtempSync, writeFileSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import type { Browser, Page } from 'playwright-core';
import { afterAll, beforeAll, describe, expect, inject, it } from 'vitest';
import { bring, type Brought } from '../setup/bring';
import { signedIn } from '../setup/visitor';
import { complaintsOf, openBrowser, signInAs } from './browser';

const { url, people } = inject('server');

/** A cantilever with dead and wind, to be combined by a rule set. */
const sheets: Readonly<Record<string, string>> = {
  Setup: 'setting,value\nmaterial,S275\ncombination set,ASCE 7-22 LRFD\nstress factor,1\nstability,by others',
  Nodes: 'frame,node,x,y\nK1,A,0,0\nK1,B,2,0',
  Members: 'frame,member,start,end,section,role\nK1,AB,A,B,IPE 200,beam',
  Supports: 'frame,node,ux,uy,rz\nK1,A,fixed,fixed,fixed',
  'Load cases': 'case,kind,self weight,reversible\ndead,dead,1,\nwind,wind,,yes',
  'Node loads': 'frame,case,node,Fy\nK1,wind,B,2',
};

describe('combinations and the office’s limits', () => {
  let browser: Browser;
  let page: Page;
  let brought: Brought;

  beforeAll(async () => {
    const folder = mkdtempSync(join(tmpdir(), 'combined-'));
    const files = Object.entries(sheets).map(([name, text]) => {
      const path = join(folder, `${name}.csv`);
      writeFileSync(path, text);
      return path;
    });
    const analyst = await signedIn(url, 'north', 'analyst');
    brought = await bring(analyst, `/api/projects/${people.north.project}/batches`, ...files);
    browser = await openBrowser();
    page = await (await browser.newContext({ viewport: { width: 1440, height: 900 } })).newPage();
    page.setDefaultTimeout(30_000);
  });
  afterAll(() => browser.close());

  it('are shown with their clauses before the run, changed, and written into the next revision’s sheet', async () => {
    const complaints = complaintsOf(page);
    await signInAs(page, url, 'north', 'analyst');
    await page.goto(`${url}/batches/${brought.batch}/A/read`);
    const table = page.getByRole('table', { name: /^Combinations/ });
    const uplift = table.getByRole('row', { name: /^0\.9 dead − 1\.0 wind/ });
    expect((await uplift.innerText()).replaceAll(/\s+/g, ' ')).toContain('strength 0.9 −1 ASCE 7-22 2.3.1 (5a)');
    await page.getByRole('button', { name: 'Change them, or write them into the sheet' }).click();
    await page.getByLabel('Keep 1.0 dead (service)').uncheck();
    await page.getByLabel('Factor on wind in 0.9 dead − 1.0 wind').fill('lots');
    await page.getByText('The factor on wind in 0.9 dead − 1.0 wind is no number.').waitFor();
    await page.getByLabel('Factor on wind in 0.9 dead − 1.0 wind').fill('−1,1');
    await page.getByText('1 is left out, 1 factor is changed.').waitFor();
    await page.getByLabel('Why they are written').fill('Uplift as the client asks');
    await page.getByRole('button', { name: 'Make revision B' }).click();
    await page.waitForURL(new RegExp(`/batches/${brought.batch}/B/read`));
    await expect.poll(() => uplift.innerText()).toMatch(/0\.9\s+−1\.1\s+listed/);
    expect(await table.getByRole('row', { name: /^1\.0 dead \(service\)/ }).count()).toBe(0);
    const head = page.getByRole('region', { name: 'How revision B was made' });
    expect((await head.innerText()).replaceAll(/\s+/g, ' ')).toContain(
      'written into Combinations, 1 combination left out, 1 factor changed',
    );
    expect(complaints).toEqual([]);
  });

  it('are added to and changed where they are listed, by whoever may change a revision', async () => {
    await page.goto(`${url}/batches/${brought.batch}/B/read`);
    await page.getByRole('button', { name: 'Change them', exact: true }).click();
    await page.getByLabel('Factor on dead in 1.4 dead').fill('1.3');
    await page.getByLabel('Its name').fill('Storm');
    await page.getByLabel('wind', { exact: true }).fill('1,9');
    await page.getByRole('button', { name: 'Add the row' }).click();
    await page.getByText('1 factor is changed, 1 is added.').waitFor();
    await page.getByLabel('Why they are written').fill('A storm of the past winter');
    await page.getByRole('button', { name: 'Make revision C' }).click();
    await page.waitForURL(new RegExp(`/batches/${brought.batch}/C/read`));
    const table = page.getByRole('table', { name: /^Combinations/ });
    await expect.poll(() => table.getByRole('row', { name: /^Storm/ }).innerText()).toMatch(/strength\s+1\.9\s+listed/);
    expect(await table.getByRole('row', { name: /^1\.4 dead / }).innerText()).toMatch(/1\.3\s+listed/);
  });

  it('come from a set that the lead kept, chosen on the settings page, and the set says where it is used', async () => {
    const lead = await (await browser.newContext({ viewport: { width: 1440, height: 900 } })).newPage();
    const complaints = complaintsOf(lead);
    await signInAs(lead, url, 'north', 'lead');
    await lead.goto(`${url}/combinations`);
    await lead.getByLabel('Name', { exact: true }).fill('Cantilevers');
    await lead.getByLabel('Begun from').selectOption('ASCE 7-22 LRFD');
    await lead.getByLabel('Factors of rule 1', { exact: true }).fill('1.4 dead + 1.5 storm');
    await lead.getByText('“storm” is no kind of load case.').waitFor();
    expect(await lead.getByRole('button', { name: 'Keep the set' }).isDisabled()).toBe(true);
    await lead.getByLabel('Factors of rule 1', { exact: true }).fill('1.45 dead');
    await lead.getByLabel('Where the figures are from, and who agreed to them').fill('The office’s own rule');
    await lead.getByRole('button', { name: 'Keep the set' }).click();
    await lead.getByRole('heading', { name: 'Cantilevers' }).waitFor();
    await lead.getByText('No revision was made by it yet.').waitFor();

    await page.goto(`${url}/batches/${brought.batch}/A/settings`);
    await page.getByLabel('Combination set of the office').selectOption({ label: 'Cantilevers, version 1' });
    await page.getByLabel('Why it is chosen').fill('As the office does');
    await page.getByRole('button', { name: 'Make revision D with this set' }).click();
    await page.waitForURL(new RegExp(`/batches/${brought.batch}/D/read`));
    const table = page.getByRole('table', { name: /^Combinations/ });
    await expect.poll(() => table.getByRole('row', { name: /^1\.45 dead/ }).innerText()).toMatch(/strength\s+1\.45/);

    await lead.reload();
    const used = lead.getByRole('table', { name: 'Revisions made by the set' });
    expect(await used.getByRole('row').last().innerText()).toMatch(/D/);
    await lead.getByLabel('Factors of rule 1', { exact: true }).fill('1.5 dead');
    await lead.getByRole('button', { name: 'Keep it as version 2' }).click();
    await lead.getByText(/^version 2, kept/).waitFor();
    await page.reload();
    expect(await table.getByRole('row', { name: /^1\.45 dead/ }).count()).toBe(1);
    expect(complaints).toEqual([]);
  });

  it('are taken from the lead’s page where the sheets give none', async () => {
    const lead = await (await browser.newContext({ viewport: { width: 1440, height: 900 } })).newPage();
    const complaints = complaintsOf(lead);
    await signInAs(lead, url, 'north', 'lead');
    await lead.goto(`${url}/limits`);
    await lead.getByLabel('Copied from').selectOption({ label: 'IBC Table 1604.3: floor member, live, L/360' });
    expect(await lead.getByLabel('n of L/n').inputValue()).toBe('360');
    await lead.getByRole('button', { name: 'Add the limit' }).click();
    const row = lead.getByRole('row', { name: /^role beam deflection L\/360/ });
    await row.waitFor();
    expect(await row.innerText()).toContain('IBC Table 1604.3: floor member, live');
    await lead.getByRole('button', { name: 'Take away deflection of role beam' }).click();
    await lead.getByText('The office has no limits of its own yet.').waitFor();
    expect(complaints).toEqual([]);
    await page.goto(`${url}/limits`);
    await page.getByText('The office has no limits of its own yet.').waitFor();
    expect(await page.getByRole('button', { name: 'Add the limit' }).count()).toBe(0);
  });
});
