import type { Browser, Page } from 'playwright-core';
import { afterAll, beforeAll, describe, expect, inject, it } from 'vitest';
import { bring, run, stateBecomes } from '../setup/bring';
import { send } from '../setup/check';
import { checked, issued, passed } from '../setup/issue';
import { signedIn } from '../setup/visitor';
import { openBrowser, signInAs } from './browser';
import { judge, rules } from './judge';

const { url, people } = inject('server');

/** Pages that show, between them, every component: these are judged in the dark as well. */
const inTheDark =
  /\/(sign-in|projects|people|me|combinations|glance|checking|problems|settings|compare|size|issue|issued|members|frames\/1|numbers|sections\/new|change)(\?|$)/;

describe('every page by axe', () => {
  let browser: Browser;
  let batch = 0;
  let messy = 0;
  let frame = '';
  let issue = 0;

  beforeAll(async () => {
    const analyst = await signedIn(url, 'north', 'analyst');
    const to = `/api/projects/${people.north.project}/batches`;
    const good = await bring(analyst, to, 'samples/pipe-rack-12.xlsx');
    await run(analyst, good);
    batch = good.batch;
    const address = `/api/batches/${batch}/revisions/A/summary`;
    const { summary } = await analyst.json<{ summary: { cells: { id: string }[] } }>(address);
    frame = encodeURIComponent(summary.cells[0]!.id);
    messy = (await bring(analyst, to, 'samples/messy.xlsx')).batch;
    await analyst.send(`/api/batches/${batch}/revisions/A/size`, { groups: [{ by: 'role', name: 'column', range: 'HE B' }] });
    const next = { changes: [{ kind: 'setting', setting: 'nearLimit', value: '0.8' }], reason: 'for a look', run: true };
    await analyst.send(`/api/batches/${batch}/revisions/A/changes`, next);
    await stateBecomes(analyst, { batch, revision: 'B' }, (state) => state === 'run');
    await send(analyst, good);
    const [checker, north] = [await signedIn(url, 'north', 'checker'), await signedIn(url, 'north', 'lead')];
    await passed({ analyst, checker }, { batch, revision: 'B' });
    const handed = await checked({ url, office: people.north, analyst, checker, lead: north });
    issue = (await issued(north, handed, [people.north.people.client])).issue;
    browser = await openBrowser();
  });
  afterAll(() => browser.close());

  /** What axe finds on a page, light and then dark: a dark page differs by its colours alone, so only those are judged again. */
  async function look(page: Page, path: string): Promise<string[]> {
    await page.emulateMedia({ colorScheme: 'light' });
    await page.goto(`${url}${path}`, { waitUntil: 'networkidle' });
    const light = await judge(page, rules);
    await page.emulateMedia({ colorScheme: 'dark' });
    const dark = !inTheDark.test(path) ? { violations: [] } : await judge(page, { type: 'rule', values: ['color-contrast'] });
    return [light, dark].flatMap(({ violations }, at) =>
      violations.flatMap(({ id, nodes }) =>
        nodes.map(
          (node) => `${path} (${at === 0 ? 'light' : 'dark'}) ${id}: ${node.target.join(' ')} ${node.failureSummary ?? ''}`,
        ),
      ),
    );
  }

  const lead = [
    '/issues',
    '/projects',
    '/to-check',
    '/people',
    `/people/${people.north.people.analyst}`,
    '/letters',
    '/activity',
    '/me',
    '/limits',
    '/combinations',
  ];
  const staff = () => [
    `/projects/${people.north.project}`,
    `/projects/${people.north.project}/bring`,
    `/projects/${people.north.project}/activity`,
    `/batches/${messy}/A/read`,
    `/batches/${messy}/A/problems`,
    `/batches/${messy}/A/bring`,
    `/batches/${batch}/B/settings`,
    `/batches/${batch}/A/checking`,
    `/batches/${batch}/B/issue`,
    `/issues/${issue}`,
    `/batches/${batch}/B/compare?with=A&show=all`,
    // one frame's rows: those of the others are alike, as are the tables of reactions and of movements
    ...['members', 'checks', 'movements'].map((table) => `/batches/${batch}/A/${table}?frame=${frame}`),
    ...['glance', 'frames', 'run', 'frames/1', 'frames/1/numbers'].map((sheet) => `/batches/${batch}/A/${sheet}`),
    `/batches/${batch}/A/frames/1/try`,
    `/batches/${batch}/A/size`,
    '/sections',
    '/sections?range=UPN&section=UPN+200',
    '/sections/own',
    '/sections/own/sections/new',
    '/sections/own/grades/new',
    '/sections/own/sections/import',
    `/batches/${batch}/A/change?role=column`,
    '/no/such/page',
  ];

  it('finds nothing on any page of the office, nor in any component in the dark', { timeout: 360_000 }, async () => {
    const context = await browser.newContext({ viewport: { width: 1440, height: 900 } });
    const first = await context.newPage();
    const found = [
      ...(await look(first, '/sign-in')),
      ...(await look(first, '/password')),
      ...(await look(first, '/invitation/x')),
    ];
    await signInAs(first, url, 'north', 'lead');
    // Two tabs at once: much of a page's time is waiting.
    const waiting = [...lead, ...staff()];
    const walk = async (page: Page): Promise<void> => {
      for (let path = waiting.shift(); path !== undefined; path = waiting.shift()) found.push(...(await look(page, path)));
    };
    await Promise.all([walk(first), walk(await context.newPage())]);
    expect(found).toEqual([]);
  });

  it('finds nothing where settings are chosen on a phone', async () => {
    const page = await (await browser.newContext({ viewport: { width: 390, height: 844 } })).newPage();
    await signInAs(page, url, 'north', 'analyst');
    expect(await look(page, `/batches/${batch}/B/settings`)).toEqual([]);
  });

  it('finds nothing on a client’s page, nor on a phone', async () => {
    const page = await (await browser.newContext({ viewport: { width: 390, height: 844 } })).newPage();
    const found = await look(page, '/sign-in');
    await signInAs(page, url, 'north', 'client');
    found.push(...(await look(page, '/issued')), ...(await look(page, `/issued/${issue}`)));
    expect(found).toEqual([]);
  });
});
