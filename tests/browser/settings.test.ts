import type { Browser, Page } from 'playwright-core';
import { afterAll, beforeAll, describe, expect, inject, it } from 'vitest';
import { bring, run, type Brought } from '../setup/bring';
import { signedIn } from '../setup/visitor';
import { complaintsOf, openBrowser, signInAs } from './browser';

const { url, people } = inject('server');

describe('settings on a revision’s page', () => {
  let browser: Browser;
  let page: Page;
  let racks: Brought;

  beforeAll(async () => {
    const analyst = await signedIn(url, 'north', 'analyst');
    racks = await bring(analyst, `/api/projects/${people.north.project}/batches`, 'samples/pipe-rack-12.xlsx');
    await run(analyst, racks);
    browser = await openBrowser();
    page = await (await browser.newContext({ viewport: { width: 1440, height: 900 } })).newPage();
    page.setDefaultTimeout(30_000);
    await signInAs(page, url, 'north', 'analyst');
  });
  afterAll(() => browser.close());

  const make = () => page.getByRole('button', { name: /^Make revision [A-Z]$/ });

  it('show where each comes from, and make the next revision by keyboard, run at once', async () => {
    const complaints = complaintsOf(page);
    await page.goto(`${url}/batches/${racks.batch}/A/glance`);
    await page.getByRole('link', { name: 'Settings' }).click();
    const given = page.getByRole('table', { name: 'Settings of this revision' });
    await expect.poll(() => given.getByRole('row', { name: /^near limit/ }).innerText()).toMatch(/0\.90/);
    expect(await make().isDisabled()).toBe(true);
    const stability = page.getByRole('radiogroup', { name: 'stability' });
    await stability.getByRole('radio', { checked: true }).focus();
    await page.keyboard.press('ArrowRight');
    await page.getByLabel('near limit').fill('0.8');
    await page.getByText('All 12 frames that can run are analysed and checked again').waitFor();
    await page.getByLabel('Why it is changed').fill('Stability is checked by the fabricator');
    await page.getByRole('button', { name: 'Make revision B and run 12 frames' }).press('Enter');
    await page.waitForURL(new RegExp(`/batches/${racks.batch}/B/run`));
    const head = page.getByRole('region', { name: 'How revision B was made' });
    const words = (await head.innerText()).replaceAll(/\s+/g, ' ');
    expect(words).toContain('made from revision A by analyst of north');
    expect(words).toMatch(/near limit: 0\.90 → .*0\.80/);
    expect(words).toMatch(/stability: screened → .*by others/);
    expect(words).toContain('Why: Stability is checked by the fabricator');
    await page.getByRole('link', { name: 'See the results' }).click();
    await page.waitForURL(/glance/);
    await page.getByRole('link', { name: 'Settings' }).click();
    await page.waitForURL(/B\/settings/);
    expect(await given.getByRole('row', { name: /^near limit/ }).innerText()).toMatch(
      /0\.80\s+changed on screen by analyst of north/,
    );
    expect(complaints).toEqual([]);
  });

  it('say at the very field what cannot be taken, and keep what was typed', async () => {
    await page.goto(`${url}/batches/${racks.batch}/A/settings`);
    await page.getByLabel('stress factor').fill('7');
    await page.getByLabel('Why it is changed').fill('a slip');
    await make().click();
    const field = page.getByLabel('stress factor');
    await expect.poll(() => field.getAttribute('aria-invalid')).toBe('true');
    expect(await field.inputValue()).toBe('7');
    await page.getByRole('button', { name: 'Leave stress factor as it is' }).click();
    await page.getByText('Nothing is chosen that differs from revision A').waitFor();
    expect(await make().isDisabled()).toBe(true);
  });

  it('are only read by a checker', async () => {
    const checker = await (await browser.newContext()).newPage();
    await signInAs(checker, url, 'north', 'checker');
    await checker.goto(`${url}/batches/${racks.batch}/A/settings`);
    await checker.getByRole('table', { name: 'Settings of this revision' }).waitFor();
    expect(await checker.getByRole('button', { name: /Make revision/ }).count()).toBe(0);
    await checker.context().close();
  });
});
