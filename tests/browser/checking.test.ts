/** A checker goes through the list by keyboard, asks, accepts and passes; the analyst sends and answers. */
import type { Browser, Page } from 'playwright-core';
import { afterAll, beforeAll, describe, expect, inject, it } from 'vitest';
import { bring, run, type Brought } from '../setup/bring';
import { checkingOf } from '../setup/check';
import { signedIn, type Visitor } from '../setup/visitor';
import { complaintsOf, openBrowser, signInAs } from './browser';

const { url, people } = inject('server');

describe('the checker’s desk', () => {
  let browser: Browser;
  let analyst: Visitor;
  let brought: Brought;
  let desk = '';

  beforeAll(async () => {
    analyst = await signedIn(url, 'north', 'analyst');
    brought = await bring(analyst, `/api/projects/${people.north.project}/batches`, 'samples/code-sheds-24.xlsx');
    await run(analyst, brought);
    desk = `${url}/batches/${brought.batch}/${brought.revision}/checking`;
    browser = await openBrowser();
  });
  afterAll(() => browser.close());

  async function pageOf(role: 'analyst' | 'checker'): Promise<{ page: Page; complaints: string[] }> {
    const page = await (await browser.newContext({ viewport: { width: 1440, height: 900 } })).newPage();
    const complaints = complaintsOf(page);
    await signInAs(page, url, 'north', role);
    return { page, complaints };
  }

  it('is gone through by keyboard, from sending to passing', async () => {
    const { page: sender, complaints: ofSender } = await pageOf('analyst');
    await sender.goto(desk.replace('/checking', '/glance'), { waitUntil: 'networkidle' });
    await sender.getByRole('link', { name: 'Send to check' }).click();
    await sender.getByLabel('Note to the checker').fill('The east line first.');
    await sender.getByRole('button', { name: /Send revision A to check/ }).click();
    await sender.getByText('You may not pass or return this revision.').waitFor();

    const { page, complaints } = await pageOf('checker');
    await page.getByRole('link', { name: /To check/ }).click();
    await page.getByRole('row').filter({ hasText: 'you may check it' }).filter({ hasText: 'The east line first.' }).getByRole('link').first().click(); // prettier-ignore
    await page.waitForURL(/\/checking/);
    const list = page.getByRole('region', { name: 'Frames to see' });
    const current = list.locator('[aria-current="true"]');
    const { list: rows } = await checkingOf(analyst, brought);
    await current.filter({ hasText: rows[0]!.id }).waitFor();
    await page.getByRole('heading', { name: `Marks on ${rows[0]!.id}` }).waitFor();

    // to and fro
    await page.keyboard.press('j');
    await current.filter({ hasText: rows[1]!.id }).waitFor();
    await page.keyboard.press('k');
    await current.filter({ hasText: rows[0]!.id }).waitFor();

    // a query without the mouse, and its key typed as a letter while words are written
    await page.getByRole('heading', { name: `Marks on ${rows[0]!.id}` }).waitFor();
    await page.keyboard.press('q');
    await page.keyboard.type('Is this quite as asked?');
    await page.keyboard.press('Control+Enter');
    await page
      .getByRole('article', { name: /Query of checker/ })
      .getByText('Is this quite as asked?')
      .waitFor();
    await page.keyboard.press('Escape');
    expect(await page.getByRole('button', { name: 'Pass revision A' }).isDisabled()).toBe(true);

    // the preparer answers on the frame's own page
    await sender.goto(desk.replace('/checking', `/frames/${rows[0]!.number}`), { waitUntil: 'networkidle' });
    await sender.getByText('1 open query').waitFor();
    await sender.getByLabel('Your answer').fill('As asked on 12 November.');
    await sender.getByRole('button', { name: 'Answer' }).click();
    await sender.getByRole('article').getByText('As asked on 12 November.').waitFor();

    // every frame of the list seen, at reading speed
    await page.reload({ waitUntil: 'networkidle' });
    await page.getByRole('article').getByText('As asked on 12 November.').waitFor();
    expect(rows.some(({ toAccept }) => toAccept > 0)).toBe(true);
    await page.getByRole('button', { name: 'Close the query' }).click();
    await page.getByText('Closed by checker of north').waitFor();
    for (let i = 0; i < rows.length; i++) await page.keyboard.press(i % 2 === 0 ? 's' : ' ');
    await expect.poll(async () => (await checkingOf(analyst, brought)).progress.seen).toBe(rows.length);

    // what is over or not checked is accepted, each with its reason
    for (const row of rows.filter(({ toAccept }) => toAccept > 0)) {
      await list.getByRole('button', { name: row.id }).click();
      await page.getByRole('heading', { name: `Marks on ${row.id}` }).waitFor();
      await page.getByLabel('Reason, printed beside it').waitFor();
      // what is over is ticked by hand, each by itself
      const boxes = page.getByRole('group', { name: 'Checks to accept' }).locator('.ck-check');
      for (let box = 0; box < (await boxes.count()); box++) {
        const tick = boxes.nth(box).getByRole('checkbox');
        const over = (await boxes.nth(box).getByText('over', { exact: true }).count()) > 0;
        expect(await tick.isChecked(), `${row.id}, check ${box}`).toBe(!over);
        await tick.check();
      }
      await page.keyboard.press('a');
      await page.keyboard.type('Held by hand.');
      await page.keyboard.press('Control+Enter');
      await page.getByText('all accepted').waitFor();
      await page.keyboard.press('Escape');
    }
    await page.getByRole('button', { name: 'Pass revision A' }).click();
    await page.getByText('Passed. As long as it is not issued').waitFor();
    // the head is read anew after the act
    await page
      .getByRole('group', { name: 'Title block' })
      .getByText(/^checker of north/)
      .waitFor();
    await page.goto(desk.replace('/checking', '/glance'), { waitUntil: 'networkidle' });
    expect(await page.locator('[data-mark]').count()).toBe(rows.length);
    expect([...complaints, ...ofSender]).toEqual([]);
  });
});
