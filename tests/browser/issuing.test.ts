/**
 * Three people and an issue: the analyst sends, the checker returns, the analyst mends, the checker passes and issues, the
 * client gets the letter, follows it, downloads and asks; the next issue supersedes; a withdrawal reaches them.
 */
import { readFileSync } from 'node:fs';
import type { Browser, Download, Page } from 'playwright-core';
import { afterAll, beforeAll, describe, expect, inject, it } from 'vitest';
import { bring, run, stateBecomes, type Brought } from '../setup/bring';
import { seeAndAccept, send } from '../setup/check';
import { linkIn } from '../setup/letters';
import { issued, passed } from '../setup/issue';
import { emailOf } from '../setup/people';
import { signedIn, type Visitor } from '../setup/visitor';
import { sha256 } from '../integration/sha256';
import { keptFolder, listKeptLetters, type KeptLetter } from '@/worker/mail/kept-letters';
import { complaintsOf, openBrowser, signInAs } from './browser';

const { url, people, dataDir } = inject('server');
const { office, project, people: ids } = people.north;

describe('an issue from desk to client', () => {
  let browser: Browser;
  let [analyst, checker, lead] = [] as unknown as [Visitor, Visitor, Visitor];
  let a: Brought;
  /** Number of the first issue. */
  let first = '';
  const complaints: string[][] = [];

  beforeAll(async () => {
    [analyst, checker, lead] = [await signedIn(url, 'north', 'analyst'), await signedIn(url, 'north', 'checker'), await signedIn(url, 'north', 'lead')]; // prettier-ignore
    await lead.send('/api/issues/who', { checkersIssue: true }, 'PUT');
    a = await bring(analyst, `/api/projects/${project}/batches`, 'samples/pipe-rack-12.xlsx');
    await run(analyst, a);
    browser = await openBrowser();
  });
  afterAll(async () => {
    await browser.close();
    await lead.send('/api/issues/who', { checkersIssue: false }, 'PUT');
  });

  async function pageOf(role: 'analyst' | 'checker' | 'client' | 'lead', phone = false): Promise<Page> {
    const viewport = phone ? { width: 390, height: 844 } : { width: 1440, height: 900 };
    const page = await (await browser.newContext({ viewport, acceptDownloads: true })).newPage();
    page.setDefaultTimeout(60_000);
    complaints.push(complaintsOf(page));
    await signInAs(page, url, 'north', role);
    return page;
  }

  const client = emailOf('north', 'client');
  /** The letter of a kind to an address that names this, once it has come. */
  async function letterTo(to: string, kind: string, naming: string): Promise<KeptLetter> {
    for (let tries = 0; tries < 100; tries++) {
      const found = listKeptLetters(keptFolder(dataDir), office).find(
        (one) => one.to === to && one.kind === kind && `${one.subject} ${one.text}`.includes(naming),
      );
      if (found) return found;
      await new Promise((resolve) => setTimeout(resolve, 100));
    }
    throw new Error(`No letter of kind “${kind}” that names ${naming} came to ${to} within ten seconds`);
  }

  async function downloaded(page: Page, name: string): Promise<{ download: Download; hash: string }> {
    const [download] = await Promise.all([page.waitForEvent('download'), page.getByRole('link', { name }).click()]);
    return { download, hash: sha256(readFileSync(await download.path())) };
  }

  it('is returned, mended, passed, issued, followed from the letter, downloaded and asked about', async () => {
    await send(analyst, a, 'The east line first.');
    const checking = await pageOf('checker');
    await checking.goto(`${url}/batches/${a.batch}/A/checking`, { waitUntil: 'networkidle' });
    await checking.getByLabel(/^Note: needed to return it/).fill('The near limit of this client is 0.8.');
    await checking.getByRole('button', { name: /Return/ }).click();
    await stateBecomes(analyst, a, (state) => state === 'returned');
    await letterTo(emailOf('north', 'analyst'), 'returned', 'The near limit of this client');

    const mended = { changes: [{ kind: 'setting', setting: 'nearLimit', value: '0.8' }], reason: 'as returned', run: true };
    await analyst.send(`/api/batches/${a.batch}/revisions/A/changes`, mended);
    const b = { batch: a.batch, revision: 'B' };
    await stateBecomes(analyst, b, (state) => state === 'run');
    await send(analyst, b);
    await seeAndAccept(checker, b, 'Held by hand.');
    await checking.goto(`${url}/batches/${b.batch}/B/checking`, { waitUntil: 'networkidle' });
    await checking.getByRole('button', { name: /Pass/ }).click();
    await stateBecomes(analyst, b, (state) => state === 'checked');

    await checking.goto(`${url}/batches/${b.batch}/B/glance`, { waitUntil: 'networkidle' });
    await checking.getByRole('link', { name: 'Issue it' }).click();
    await checking.getByRole('heading', { name: /Issue revision B as 2614-\d\d/ }).waitFor();
    await checking.getByLabel('Note, printed on the covers').fill('For the shop.');
    await checking.getByLabel(/those over or not checked/).check();
    await checking.getByRole('button', { name: 'Issue to 1 client' }).click();
    await checking.waitForURL(/\/issues\/\d+$/);
    const number = (await checking.getByRole('heading', { level: 1 }).textContent())!.split(':')[0]!;
    expect(number).toMatch(/^2614-\d\d$/);
    first = number;

    // from the letter, signed out, through the sign-in page to the issue
    const letter = await letterTo(client, 'issued', number);
    const page = await (await browser.newContext({ viewport: { width: 390, height: 844 }, acceptDownloads: true })).newPage();
    page.setDefaultTimeout(60_000);
    complaints.push(complaintsOf(page));
    await page.goto(`${url}${linkIn(letter)}`);
    await page.waitForURL(/\/sign-in/);
    await page.getByLabel('E-mail').fill(client);
    await page.getByLabel('Password').fill('for tests and nothing else');
    await page.getByRole('button', { name: 'Sign in' }).click();
    await page.waitForURL(/\/issued\/\d+/);
    await page.getByRole('heading', { level: 1, name: /^12 frames/ }).waitFor();
    expect(await page.evaluate(() => document.documentElement.scrollWidth <= window.innerWidth), 'fits a phone').toBe(true);
    for (const [name, ending] of [
      ['Download Calculation report', '.pdf'],
      ['Download Result workbook', '.xlsx'],
    ] as const) {
      const { download, hash } = await downloaded(page, name);
      expect(download.suggestedFilename()).toMatch(new RegExp(`^${number} .*\\${ending}$`));
      await page.getByText(hash).waitFor();
    }
    await page.getByRole('button', { name: `Acknowledge receipt of ${number}` }).click();
    await page.getByText('You acknowledged receipt on').waitFor();

    await page.getByRole('region', { name: 'Frames of this issue' }).getByRole('link').first().click();
    await page.waitForURL(/frame=/);
    const frame = await page.getByLabel('Frame', { exact: true }).inputValue();
    expect(frame).not.toBe('');
    await page.getByLabel('Question').fill('May the splice sit 2.4 m from the knee?');
    await page.getByRole('button', { name: 'Send to the office' }).click();
    await page
      .getByRole('article', { name: `Question on Frame ${frame}` })
      .getByText('May the splice')
      .waitFor();

    const atDesk = await pageOf('analyst');
    await atDesk.goto(`${url}/issues`, { waitUntil: 'networkidle' });
    await atDesk.getByRole('region', { name: 'Issues' }).getByRole('link', { name: number }).click();
    await atDesk.getByLabel('Answer to client of north').fill('Yes, with six bolts.');
    await atDesk.getByRole('button', { name: 'Send the answer' }).click();
    await atDesk.getByText('Yes, with six bolts.').waitFor();
    await letterTo(client, 'answer', 'Yes, with six bolts.');
    await page.reload();
    await page.getByText('Yes, with six bolts.').waitFor();
  });

  it('is superseded by the next, and a withdrawal reaches who has it', async () => {
    const before = await letterTo(client, 'issued', first);
    const change = { changes: [{ kind: 'setting', setting: 'nearLimit', value: '0.75' }], reason: 'asked for', run: true };
    await analyst.send(`/api/batches/${a.batch}/revisions/B/changes`, change);
    const c = { batch: a.batch, revision: 'C' };
    await stateBecomes(analyst, c, (state) => state === 'run');
    await passed({ analyst, checker }, c);
    const next = await issued(checker, c, [ids.client]);
    await letterTo(client, 'issued', next.number);

    const page = await pageOf('client', true);
    await page.goto(`${url}${linkIn(before)}`, { waitUntil: 'networkidle' });
    await page.getByText(/is superseded\. Don’t build from it\./).waitFor();
    await page.getByRole('alert').getByRole('link', { name: next.number }).click();
    await page.getByText('This issue is in force').waitFor();
    await page.getByRole('heading', { name: /What changed since/ }).waitFor();

    const desk = await pageOf('lead');
    await desk.goto(`${url}/issues/${next.issue}`, { waitUntil: 'networkidle' });
    await desk.getByLabel(/What is wrong/).fill('A crane load was forgotten.');
    await desk.getByRole('button', { name: `Withdraw ${next.number}` }).click();
    await desk.getByText(/is withdrawn\. Don’t build from it\./).waitFor();
    const told = await letterTo(client, 'withdrawn', 'A crane load was forgotten.');
    await page.goto(`${url}${linkIn(told)}`, { waitUntil: 'networkidle' });
    await page
      .getByRole('alert')
      .getByText(/is withdrawn\. Don’t build from it\./)
      .waitFor();
    const { download } = await downloaded(page, 'Download Result workbook');
    expect(download.suggestedFilename()).toMatch(/^WITHDRAWN /);
    expect(complaints.flat()).toEqual([]);
  });
});
