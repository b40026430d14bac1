import type { Browser, Page } from 'playwright-core';
import { afterAll, beforeAll, describe, expect, inject, it } from 'vitest';
import { bring, revisionAddress, run, stateBecomes, type Brought } from '../setup/bring';
import { signedIn, type Visitor } from '../setup/visitor';
import { complaintsOf, openBrowser, signInAs } from './browser';

const { url, people } = inject('server');

interface Told {
  readonly checks: readonly { readonly where: string; readonly check: string; readonly ratio: number | null; readonly verdict: string }[];
  readonly mass?: number | null;
  readonly drawing: {
    readonly chosen: { readonly name: string; readonly lines: readonly { readonly extremes: Readonly<Record<'N' | 'V' | 'M', { readonly max: number; readonly min: number }>> }[] } | null;
  };
} // prettier-ignore

interface Listening {
  answers?: { readonly told?: Told }[];
}

/** Keeps what workers of the page answer, so that the numbers behind what is shown can be looked at. */
const listen = (page: Page) =>
  page.addInitScript(() => {
    const answers: { told?: Told }[] = [];
    (window as unknown as Listening).answers = answers;
    window.Worker = class extends Worker {
      constructor(address: string | URL, options?: WorkerOptions) {
        super(address, options);
        this.addEventListener('message', ({ data }: MessageEvent<{ told?: Told }>) => answers.push(data));
      }
    };
  });
const answersOf = (page: Page) => page.evaluate(() => (window as unknown as Listening).answers ?? []);

const tokensOf = (text: string): string => text.replaceAll(/\s+/g, ' ').trim();
const checksOf = async (page: Page): Promise<string> =>
  tokensOf(await page.getByRole('table', { name: 'Checks, the worst first' }).innerText());

describe('trying and sizing', () => {
  let browser: Browser;
  let page: Page;
  let analyst: Visitor;
  let sheds: Brought;

  beforeAll(async () => {
    analyst = await signedIn(url, 'north', 'analyst');
    sheds = await bring(analyst, `/api/projects/${people.north.project}/batches`, 'samples/slender-sheds-24.xlsx');
    await run(analyst, sheds);
    browser = await openBrowser();
    page = await (await browser.newContext({ viewport: { width: 1440, height: 900 } })).newPage();
    page.setDefaultTimeout(30_000);
    await listen(page);
    await signInAs(page, url, 'north', 'analyst');
  });
  afterAll(() => browser.close());

  it('a section tried on a frame shows at once what the server finds after the change, to the last figure', async () => {
    const complaints = complaintsOf(page);
    await page.goto(`${url}/batches/${sheds.batch}/A/frames/1`);
    const stored = await checksOf(page);
    // nothing of the engine is brought before it is wanted
    expect(await answersOf(page)).toEqual([]);
    await page.getByRole('link', { name: 'Try a section' }).click();
    await page.waitForURL(/frames\/1\/try/);
    await page.getByText('a try: nothing is stored').waitFor();
    await page.getByText('As stored.').waitFor();
    expect(await checksOf(page)).toBe(stored);
    await page.getByRole('button', { name: /^Members:/ }).click();
    await page.getByRole('option', { name: /^role rafter/ }).click();
    // the only one that fits is taken by Enter
    await page.getByLabel('Section', { exact: true }).fill('ipe450');
    await page.getByRole('button', { name: 'IPE 450', exact: true }).waitFor();
    await page.getByLabel('Section', { exact: true }).press('Enter');
    await page.getByText('role rafter → IPE 450').first().waitFor();
    await page.getByLabel('Section', { exact: true }).fill('IPE 5');
    // the second is asked for before the first has come: the first never shows
    await page.getByRole('button', { name: 'IPE 500', exact: true }).click();
    await page.getByRole('button', { name: 'IPE 550', exact: true }).click();
    const kept = page.getByRole('table', { name: 'Tries side by side' });
    await kept.getByRole('button', { name: 'role rafter → IPE 550' }).waitFor();
    await page.getByText('role rafter → IPE 550').first().waitFor();
    const shown = await checksOf(page);
    expect(shown).not.toBe(stored);
    await kept.getByRole('button', { name: 'as stored' }).click();
    await page.getByText('As stored.').waitFor();
    await expect.poll(() => checksOf(page)).toBe(stored);
    await kept.getByRole('button', { name: 'role rafter → IPE 550' }).click();
    await expect.poll(() => checksOf(page)).toBe(shown);
    const tried = (await answersOf(page)).at(-1)?.told as Told;

    await page.getByLabel(/in frame .* only/).check();
    await page.getByRole('link', { name: 'Turn it into a change' }).click();
    await page.waitForURL(/\/change\?/);
    // both rafters of the frame, and no other
    await page.getByText('2 members in 1 frame').waitFor();
    await page.getByText('23 other frames keep their results, carried over from A').waitFor();
    await page.getByLabel('Why it is changed').fill('As tried');
    await page.getByRole('button', { name: 'Make revision B and run its frame' }).click();
    await page.waitForURL(new RegExp(`/batches/${sheds.batch}/B/`));
    const b = { ...sheds, revision: 'B' };
    await stateBecomes(analyst, b, (state) => state === 'run');
    await page.goto(`${url}/batches/${sheds.batch}/B/frames/1`);
    expect(await checksOf(page)).toBe(shown);

    const show = encodeURIComponent(tried.drawing.chosen?.name ?? '');
    const { frame: run } = await analyst.json<{ frame: Told }>(`${revisionAddress(b)}/frames/1?result=${show}`);
    expect(tried.checks.map(({ where, check, verdict }) => [where, check, verdict])).toEqual(run.checks.map(({ where, check, verdict }) => [where, check, verdict])); // prettier-ignore
    const near = (one: number | null | undefined, other: number | null | undefined, size: number): void => {
      if (typeof one !== 'number' || typeof other !== 'number') expect(one).toBe(other);
      else expect(Math.abs(one - other) / size).toBeLessThan(1e-12);
    };
    for (const [i, { ratio }] of tried.checks.entries()) near(ratio, run.checks[i]?.ratio, 1);
    for (const of of ['N', 'V', 'M'] as const) {
      const both = [tried, run].map(({ drawing }) => (drawing.chosen?.lines ?? []).flatMap(({ extremes }) => [extremes[of].max, extremes[of].min])); // prettier-ignore
      const size = Math.max(...(both[0] ?? []).map(Math.abs));
      expect(both[0]?.length).toBeGreaterThan(4);
      for (const [i, value] of (both[0] ?? []).entries()) near(value, both[1]?.[i], size);
    }
    expect(complaints).toEqual([]);
  });

  it('the lightest sections are found while one looks, shown with what was out, and made the next revision', async () => {
    const complaints = complaintsOf(page);
    await page.goto(`${url}/batches/${sheds.batch}/A/glance`);
    await page.getByRole('link', { name: 'Size sections' }).click();
    const first = page.getByRole('group', { name: 'Group 1' });
    await first.getByLabel('Members').selectOption({ label: await optionOf(first, 'role rafter') });
    await first.getByLabel('Range').selectOption('IPE');
    await first.getByLabel('Depth from').fill('300');
    await page.getByRole('button', { name: 'Another group' }).click();
    const second = page.getByRole('group', { name: 'Group 2' });
    await second.getByLabel('Members').selectOption({ label: await optionOf(second, 'role column') });
    await second.getByLabel('Range').selectOption('HE B');
    await page.getByRole('button', { name: 'Find the lightest' }).click();
    await page.getByText(/Looked at together: 24 of 24 frames fit in every check/).waitFor({ timeout: 60_000 });
    const table = page.getByRole('table', { name: 'Candidates for rafter, the lightest first' });
    const lightest = tokensOf(await table.getByRole('row', { name: /chosen/ }).innerText());
    expect(lightest).toMatch(/^IPE .* chosen .* none /);
    await page.getByLabel('Candidates').first().selectOption('out');
    expect(await table.getByRole('row', { name: /chosen/ }).count()).toBe(0);
    expect(tokensOf(await table.innerText())).toMatch(/\d+ over/);
    await page.getByRole('button', { name: /^Make revision [BC]$/ }).click();
    await page.waitForURL(/\/[BC]\/read/);
    const head = page.getByRole('region', { name: /How revision [BC] was made/ });
    expect(tokensOf(await head.innerText())).toMatch(/section of role rafter.*section of role column/);
    expect(complaints).toEqual([]);
  });
});

async function optionOf(group: ReturnType<Page['getByRole']>, words: string): Promise<string> {
  await group.getByLabel('Members').waitFor();
  const labels = await group.getByLabel('Members').locator('option').allTextContents();
  const found = labels.find((label) => label.startsWith(words));
  if (found === undefined) throw new Error(`Expected ${words} among ${labels.join(', ')}`);
  return found;
}
