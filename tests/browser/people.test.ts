import type { Browser, Page } from 'playwright-core';
import { afterAll, beforeAll, expect, inject, it } from 'vitest';
import { complaintsOf, openBrowser, signInAs } from './browser';

const { url } = inject('server');
let browser: Browser;
const complaints: string[][] = [];

beforeAll(async () => {
  browser = await openBrowser();
});
afterAll(() => browser.close());

async function pageOf(): Promise<Page> {
  const page = await (await browser.newContext({ viewport: { width: 1440, height: 900 } })).newPage();
  page.setDefaultTimeout(30_000);
  complaints.push(complaintsOf(page));
  return page;
}

it('an invitation leads from the lead’s page through the kept letter to a desk, which closes at once when they are disabled', async () => {
  const lead = await pageOf();
  await signInAs(lead, url, 'north', 'lead');
  await lead.getByRole('link', { name: 'People' }).click();
  await lead.waitForURL('**/people');
  const form = lead.locator('form', { has: lead.getByRole('button', { name: 'Send the invitation' }) });
  await form.getByLabel('E-mail').fill('not an address');
  await form.getByRole('button', { name: 'Send the invitation' }).click();
  await form.getByText('Enter an e-mail address, like').waitFor();
  complaints[0]!.length = 0; // the browser itself notes the refusal
  const email = 'journey.heron@north.example';
  await form.getByLabel('E-mail').fill(email);
  await form.getByRole('radio', { name: 'analyst' }).click();
  await form.getByRole('button', { name: 'Send the invitation' }).click();
  await lead.getByText(`An invitation is on its way to ${email}`).waitFor();
  await lead
    .getByRole('table', { name: 'Open invitations' })
    .getByRole('row', { name: new RegExp(email) })
    .waitFor();

  // The letter, as the page for letters that reach nobody shows it: its plain text and its HTML lead to one address.
  await lead.locator('a[href="/letters"]').click();
  await lead.waitForURL('**/letters');
  const kept = lead.locator('li', { hasText: email }).getByRole('link');
  for (let tries = 0; tries < 50 && (await kept.count()) === 0; tries++) {
    await lead.waitForTimeout(200);
    await lead.reload();
  }
  await kept.click();
  await lead.waitForURL('**/letters/*');
  const link = (await lead.locator('pre a').getAttribute('href'))!;
  const inside = lead.frameLocator('iframe').getByRole('link', { name: 'Accept the invitation' });
  expect(await inside.getAttribute('href')).toBe(link);
  expect(new URL(link).pathname).toMatch(/^\/invitation\/[\w-]{43}$/);

  const heron = await pageOf();
  await heron.goto(link);
  await heron.getByText('invites you to').waitFor();
  await heron.getByLabel('Your name').fill('Heron Tarn');
  await heron.getByLabel('Password').fill('a password for a journey');
  await heron.getByRole('button', { name: 'Begin' }).click();
  await heron.waitForURL('**/projects');
  await heron.getByText('Heron Tarn').waitFor();

  // Their own page: a letter declined, a token made and shown once.
  await heron.getByRole('link', { name: 'Your page' }).click();
  await heron.waitForURL('**/me');
  await heron.getByRole('checkbox', { name: 'a run that you started has ended' }).uncheck();
  await heron.getByRole('button', { name: 'Save' }).click();
  await heron.getByText('Saved.').waitFor();
  await heron.getByLabel('What it is for').fill('nightly runs');
  await heron.getByRole('button', { name: 'Make a token' }).click();
  await heron.getByText(/tally_[\w-]{43}/).waitFor();
  await heron.reload();
  expect(await heron.getByRole('checkbox', { name: 'a run that you started has ended' }).isChecked()).toBe(false);
  await heron.getByRole('row', { name: /nightly runs/ }).waitFor();
  expect(await heron.getByText(/tally_[\w-]{43}/).count()).toBe(0);

  await lead.goto(`${url}/people`);
  await lead.getByRole('link', { name: 'Heron Tarn' }).click();
  await lead.getByRole('button', { name: 'Disable Heron Tarn' }).click();
  await lead.getByText('signed out at once').waitFor();
  await lead.getByRole('button', { name: 'Disable Heron Tarn' }).click();
  await lead.getByText('Disabled since').waitFor();

  await heron.goto(`${url}/projects`);
  await heron.waitForURL('**/sign-in?next=*');
  await heron.getByLabel('E-mail').fill(email);
  await heron.getByLabel('Password').fill('a password for a journey');
  expect(complaints.flat()).toEqual([]);
  await heron.getByRole('button', { name: 'Sign in' }).click();
  await heron.getByText('don’t belong together').waitFor();
  await heron.goto(link);
  await heron.getByText('was used, revoked or has expired').waitFor();
});
