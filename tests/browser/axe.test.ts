import AxeBuilder from '@axe-core/playwright';
import type { Browser, Page } from 'playwright-core';
import { afterAll, beforeAll, describe, expect, inject, it } from 'vitest';
import { bring, run, stateBecomes } from '../setup/bring';
import { signedIn } from '../setup/visitor';
import { openBrowser, signInAs } from './browser';

const { url, people } = inject('server');

/** WCAG 2.2 A and AA, as far as a machine can see. */
const rules = ['wcag2a', 'wcag2aa', 'wcag21a', 'wcag21aa', 'wcag22aa'];

describe('every page by axe', () => {
  let browser: Browser;
  let batch = 0;
  let messy = 0;

  beforeAll(async () => {
    const analyst = await signedIn(url, 'north', 'analyst');
    const to = `/api/projects/${people.north.project}/batches`;
    const good = await bring(analyst, to, 'samples/pipe-rack-12.xlsx');
    await run(analyst, good);
    batch = good.batch;
    messy = (await bring(analyst, to, 'samples/messy.xlsx')).batch;
    const next = { changes: [{ kind: 'setting', setting: 'nearLimit', value: '0.8' }], reason: 'for a look', run: true };
    await analyst.send(`/api/batches/${batch}/revisions/A/changes`, next);
    await stateBecomes(analyst, { batch, revision: 'B' }, (state) => state === 'run');
    browser = await openBrowser();
  });
  afterAll(() => browser.close());

  async function look(page: Page, path: string): Promise<string[]> {
    await page.goto(`${url}${path}`, { waitUntil: 'networkidle' });
    const { violations } = await new AxeBuilder({ page }).withTags(rules).analyze();
    return violations.flatMap(({ id, nodes }) =>
      nodes.map((node) => `${path} ${id}: ${node.target.join(' ')} ${node.failureSummary ?? ''}`),
    );
  }

  const lead = ['/projects', '/people', '/limits'];
  const staff = () => [
    `/projects/${people.north.project}`,
    `/projects/${people.north.project}/bring`,
    `/batches/${messy}/A/read`,
    `/batches/${messy}/A/problems`,
    `/batches/${messy}/A/bring`,
    `/batches/${batch}/B/settings`,
    `/batches/${batch}/B/compare?with=A&show=all`,
    ...['glance', 'frames', 'members', 'checks', 'reactions', 'movements', 'run', 'frames/1', 'frames/1/numbers'].map(
      (sheet) => `/batches/${batch}/A/${sheet}`,
    ),
    '/no/such/page',
  ];

  for (const colorScheme of ['light', 'dark'] as const) {
    it(`finds nothing on any page of the office, ${colorScheme}`, async () => {
      const page = await (await browser.newContext({ viewport: { width: 1440, height: 900 }, colorScheme })).newPage();
      const found = await look(page, '/sign-in');
      await signInAs(page, url, 'north', 'lead');
      for (const path of [...lead, ...staff()]) found.push(...(await look(page, path)));
      expect(found).toEqual([]);
    });
  }

  it('finds nothing where settings are chosen on a phone', async () => {
    const page = await (await browser.newContext({ viewport: { width: 390, height: 844 } })).newPage();
    await signInAs(page, url, 'north', 'analyst');
    expect(await look(page, `/batches/${batch}/B/settings`)).toEqual([]);
  });

  it('finds nothing on a client’s page, nor on a phone', async () => {
    const page = await (await browser.newContext({ viewport: { width: 390, height: 844 } })).newPage();
    const found = await look(page, '/sign-in');
    await signInAs(page, url, 'north', 'client');
    found.push(...(await look(page, '/issued')));
    expect(found).toEqual([]);
  });
});
