import { mkdtempSync, rmSync, writeFileSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import type { Browser, Page } from 'playwright-core';
import { afterAll, beforeAll, describe, expect, inject, it } from 'vitest';
import { bring, revisionAddress, run, type Brought } from '../setup/bring';
import { signedIn } from '../setup/visitor';
import { complaintsOf, openBrowser, signInAs } from './browser';

const { url, people } = inject('server');

/** A bent with crossed ties, second order, imperfections both ways: forty combinations, two results each. */
const bent: Readonly<Record<string, string>> = {
  Setup: 'setting,value\nanalysis,second order\nmaterial,S355\nimperfections,EN 1993-1-1\nsway ratio,150\ndeflection ratio,200',
  Nodes:
    'frame,node,x,y\nB1,A,0,0\nB1,B,0,4\nB1,C,6,4\nB1,D,6,0\nB2,A,0,0\nB2,B,0,4\nB2,C,5,4\nB2,D,5,0\nB3,A,0,0\nB3,B,0,4\nB3,C,4,4\nB3,D,4,0',
  Members: ['B1', 'B2', 'B3'].reduce(
    (rows, frame) =>
      `${rows}\n${frame},AB,A,B,HE 160 A,column,\n${frame},BC,B,C,IPE 270,beam,\n${frame},DC,D,C,HE 160 A,column,\n${frame},AC,A,C,tie,brace,yes\n${frame},DB,D,B,tie,brace,yes`,
    'frame,member,start,end,section,role,tension only',
  ),
  Sections:
    'section,designation,A,I,W top,W bottom,depth,Av,t\nHE 160 A,HE 160 A,,,,,,,\nIPE 270,IPE 270,,,,,,,\ntie,,3.14,0.785,0.785,0.785,20,2.8,20',
  Supports:
    'frame,node,ux,uy,rz\nB1,A,fixed,fixed,free\nB1,D,fixed,fixed,free\nB2,A,fixed,fixed,free\nB2,D,fixed,fixed,free\nB3,A,fixed,fixed,free\nB3,D,fixed,fixed,free',
  'Load cases': 'case,kind,self weight\ndead,dead,1\nwind,wind,',
  'Member loads': ['B1', 'B2', 'B3'].reduce(
    (rows, frame) => `${rows}\n${frame},dead,BC,distributed,local,y,-9\n${frame},wind,AB,distributed,local,y,-4`,
    'frame,case,member,load,axes,direction,value',
  ),
  Combinations: Array.from({ length: 40 }, (_, i) => `C${i + 1},strength,${(1 + i / 100).toFixed(2)},1.5`).reduce(
    (rows, row) => `${rows}\n${row}`,
    'combination,purpose,dead,wind\nS1,service,1,1',
  ),
};

describe('a member followed by hand', () => {
  let browser: Browser;
  let page: Page;
  let brought: Brought;
  let complaints: string[];
  const folder = mkdtempSync(join(tmpdir(), 'tallyframe-bent-'));

  beforeAll(async () => {
    const files = Object.entries(bent).map(([name, text]) => {
      const path = join(folder, `${name}.csv`);
      writeFileSync(path, text);
      return path;
    });
    const analyst = await signedIn(url, 'north', 'analyst');
    brought = await bring(analyst, `/api/projects/${people.north.project}/batches`, ...files);
    await run(analyst, brought);
    browser = await openBrowser();
    const context = await browser.newContext({ viewport: { width: 1440, height: 900 } });
    await context.grantPermissions(['clipboard-read', 'clipboard-write'], { origin: url });
    page = await context.newPage();
    page.setDefaultTimeout(30_000);
    complaints = complaintsOf(page);
    await signInAs(page, url, 'north', 'analyst');
  });
  afterAll(async () => {
    rmSync(folder, { recursive: true, force: true });
    await browser.close();
  });

  const frames = () => `${url}/batches/${brought.batch}/A/frames`;

  it('finds a result among eighty by keyboard, and the address keeps it', async () => {
    await page.goto(`${frames()}/1`, { waitUntil: 'networkidle' });
    const button = page.getByRole('button', { name: /^Load case or combination: / });
    await button.focus();
    await page.keyboard.press('ArrowDown');
    await page.getByRole('option', { name: 'dead not applicable' }).waitFor();
    await page.keyboard.type('c17 →');
    await page.keyboard.press('Enter');
    await page.getByRole('note', { name: 'How this result was found' }).getByText('C17 →', { exact: true }).waitFor();
    expect(new URL(page.url()).searchParams.get('show')).toBe('C17 →');
    await page.reload({ waitUntil: 'networkidle' });
    const told = await page.getByRole('note', { name: 'How this result was found' }).textContent();
    expect(told).toMatch(/^C17 → second order: equilibrium on the deformed shape, settled in \d+ passes/);
    expect(told).toContain('imperfection to the right →');
    // wind from the left shortens one diagonal, which is slack, dashed and named
    const slack = /slack, drawn dashed: (\w+)/.exec(told ?? '')?.[1];
    expect(slack).toBeDefined();
    const large = page.locator('.d-view-large');
    expect(await large.locator('[data-slack]').getAttribute('data-member')).toBe(slack);
    expect(await large.locator('text', { hasText: `${slack} slack` }).count()).toBe(1);
  });

  it('draws the buckled shape with its load factor', async () => {
    await page.keyboard.press('b');
    await page.getByRole('heading', { name: /^1 Buckled shape/ }).waitFor();
    await page.locator('.d-view-large .d-buckled').waitFor();
    expect(await page.locator('.d-view-large .d-alpha').textContent()).toMatch(/^αcr [\d.]+ for C17 →$/);
  });

  it('vouches for the frame in words', async () => {
    const items = await page.locator('.cert-lines > li').allTextContents();
    expect(items.map((item) => /^\d/.exec(item)?.[0])).toEqual(['1', '1', '2', '3', '4']);
    for (const item of items.slice(0, 4)) expect(item).toContain('passed');
    await page.getByRole('button', { name: 'Copy the input’s hash' }).click();
    expect(await page.evaluate(() => navigator.clipboard.readText())).toMatch(/^[0-9a-f]{64}$/);
    await page.getByRole('row', { name: /^imperfections EN 1993-1-1 / }).waitFor();
  });

  it('leads from a member to its numbers, which multiply out to the published end forces', async () => {
    await page.getByRole('link', { name: 'AB', exact: true }).click();
    await page.waitForURL(/\/frames\/1\/numbers\?of=AB&show=/);
    await page.getByRole('heading', { name: 'The numbers behind AB under C17 →' }).waitFor();
    await page.getByRole('radio', { name: 'N, m', exact: true }).click();
    await page.waitForURL(/in=si/);
    await page.getByText('Units multiply out: N, m and radians').waitFor();
    const k = await copied('k, local axes');
    const T = await copied('T, turns the axes of the nodes to local axes');
    const d = (await copied('d, axes of the nodes')).map((row) => row[0]!);
    const held = (await copied('Fixed-end forces q_F, local axes')).map((row) => row.at(-1)!);
    const q = times(k, times(T, d)).map((value, i) => value + held[i]!);
    const json = (await (await page.request.get(`${url}${revisionAddress(brought)}/json`)).json()) as Published;
    const result = json.frames[0]!.results.find(({ name }) => name === 'C17 →')!;
    const { start, end } = result.members.find(({ member }) => member === 'AB')!;
    const size = Math.max(...q.map(Math.abs));
    [[-q[0]!, start.N], [-q[2]!, start.M], [q[3]!, end.N], [q[5]!, end.M]].forEach(([got, told]) =>
      expect(Math.abs(got! - told!) / size).toBeLessThan(1e-9),
    ); // prettier-ignore
  });

  it('walks through the members by j and k and comes back to the frame by u', async () => {
    await page.keyboard.press('j');
    await page.getByRole('heading', { name: 'The numbers behind BC under C17 →' }).waitFor();
    await page.keyboard.press('k');
    await page.getByRole('heading', { name: 'The numbers behind AB under C17 →' }).waitFor();
    await page.keyboard.press('u');
    await page.waitForURL(/\/frames\/1\?show=/);
    await page.getByRole('note', { name: 'How this result was found' }).waitFor();
  });

  it('comes back to where it began when k is pressed right after j', async () => {
    await page.goto(`${frames()}/2`, { waitUntil: 'networkidle' });
    await page.keyboard.press('j');
    await page.keyboard.press('k');
    const block = page.getByRole('group', { name: 'Title block' });
    await page.waitForURL(/\/frames\/2$/);
    await block.getByText('2 of 3').waitFor();
    await page.keyboard.press('j');
    await block.getByText('3 of 3').waitFor();
    await page.keyboard.press('k');
    await page.keyboard.press('k');
    await block.getByText('1 of 3').waitFor();
  });

  it('is never wider than a phone, and finds a result there too', async () => {
    const phone = await (
      await browser.newContext({ viewport: { width: 390, height: 844 }, isMobile: true, hasTouch: true })
    ).newPage();
    await signInAs(phone, url, 'north', 'analyst');
    for (const path of ['/1', '/1/numbers?of=BC']) {
      await phone.goto(`${frames()}${path}`, { waitUntil: 'networkidle' });
      expect(await phone.evaluate(() => document.documentElement.scrollWidth), path).toBeLessThanOrEqual(390);
    }
    await phone.getByRole('button', { name: /^Load case or combination: / }).tap();
    await phone.getByRole('combobox').fill('c9 ←');
    await phone.getByRole('option', { name: /^C9 ←/ }).tap();
    await phone.getByRole('heading', { name: 'The numbers behind BC under C9 ←' }).waitFor();
  });

  it('met no complaint in the browser’s console on the way', () => {
    expect(complaints).toEqual([]);
  });

  /** The numbers of a table as they come out of the clipboard. */
  async function copied(title: string): Promise<number[][]> {
    await page.getByRole('button', { name: `Copy ${title}`, exact: true }).click();
    const text = await page.evaluate(() => navigator.clipboard.readText());
    const [, ...rows] = text.split('\n');
    return rows.map((row) => row.split('\t').slice(1).map(Number));
  }
});

interface Ends {
  readonly N: number;
  readonly M: number;
}
interface Published {
  readonly frames: readonly {
    readonly results: readonly {
      readonly name: string;
      readonly members: readonly { readonly member: string; readonly start: Ends; readonly end: Ends }[];
    }[];
  }[];
}

const times = (matrix: readonly (readonly number[])[], vector: readonly number[]): number[] =>
  matrix.map((row) => row.reduce((sum, value, i) => sum + value * vector[i]!, 0));
