/** A clause's calculation on the frame page: typeset, read aloud, within its sheet, and without a complaint of the browser. */
import type { Browser, BrowserContext, Page } from 'playwright-core';
import { afterAll, beforeAll, describe, expect, inject, it } from 'vitest';
import { bring, run } from '../setup/bring';
import { signedIn } from '../setup/visitor';
import { openBrowser, signInAs } from './browser';
import { judge, rules } from './judge';

const { url, people } = inject('server');

describe('the working of a clause', () => {
  let browser: Browser;
  let signedInState: Awaited<ReturnType<BrowserContext['storageState']>>;
  const address: Record<string, string> = {};

  beforeAll(async () => {
    const analyst = await signedIn(url, 'north', 'analyst');
    for (const name of ['code-sheds-24', 'code-halls-us-9']) {
      const brought = await bring(analyst, `/api/projects/${people.north.project}/batches`, `samples/${name}.xlsx`);
      await run(analyst, brought);
      address[name] = `${url}/batches/${brought.batch}/A/frames/1`;
    }
    browser = await openBrowser();
    const page = await browser.newPage();
    await signInAs(page, url, 'north', 'analyst');
    signedInState = await page.context().storageState();
    await page.context().close();
  });
  afterAll(() => browser?.close());

  async function open(name: string, colorScheme: 'light' | 'dark', width: number): Promise<{ page: Page; complaints: string[] }> {
    const page = await (
      await browser.newContext({ viewport: { width, height: 900 }, colorScheme, storageState: signedInState })
    ).newPage();
    const complaints: string[] = [];
    page.on('console', (message) => message.type() === 'error' && complaints.push(message.text()));
    // pages fetched ahead are given up when another one opens; fonts, styles and scripts are not
    page.on(
      'requestfailed',
      (request) => /\.(woff2?|ttf|css|js)(\?|$)/.test(request.url()) && complaints.push(`failed: ${request.url()}`),
    );
    page.on('request', (request) => {
      if (!request.url().startsWith(url) && !/^(data|blob):/.test(request.url())) complaints.push(`outside: ${request.url()}`);
    });
    await page.goto(address[name]!, { waitUntil: 'networkidle' });
    return { page, complaints };
  }

  it.each([
    ['code-sheds-24', '6.3.1 flexural buckling', 'light', 1440],
    ['code-sheds-24', '6.3.3 bending and compression', 'dark', 1440],
    ['code-halls-us-9', 'E3 flexural buckling', 'light', 390],
    ['code-halls-us-9', 'H1.1 combined', 'dark', 390],
  ] as const)('of %s, %s is typeset (%s, %d px)', async (name, check, colorScheme, width) => {
    const { page, complaints } = await open(name, colorScheme, width);
    await page.getByRole('button', { name: new RegExp(`^Working of .*, ${check.replace(/\./g, '\\.')}$`) }).first().click(); // prettier-ignore
    const working = page.locator('section.working');
    await working.locator('.katex').first().waitFor();
    expect(await working.locator('.katex-error').count()).toBe(0);
    // MathML for those who listen, the picture of it hidden from them
    expect(await working.locator('.katex-mathml math').count()).toBeGreaterThan(2);
    expect(await working.locator('.katex-html[aria-hidden="true"]').count()).toBe(await working.locator('.katex').count());
    const fonts = await page.evaluate(async () => {
      await document.fonts.ready;
      return [...document.fonts].filter((font) => font.family.includes('KaTeX') && font.status === 'loaded').length;
    });
    expect(fonts).toBeGreaterThan(0);
    const over = await page.evaluate(() => document.documentElement.scrollWidth - document.documentElement.clientWidth);
    expect(over).toBeLessThanOrEqual(0);
    // the rest of the page is looked at with every other page
    const { violations } = await judge(page, rules, 'section.working');
    expect(violations.map(({ id, nodes }) => `${id}: ${nodes.map((node) => node.target.join(' ')).join(', ')}`)).toEqual([]);
    expect(complaints).toEqual([]);
    await page.context().close();
  });
});
