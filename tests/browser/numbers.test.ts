/** In Chromium the engine computes the same numbers as in Node, to 1e-12 of the largest of their sort. */
import { readFileSync } from 'node:fs';
import { join } from 'node:path';
import { build } from 'esbuild';
import type { Browser, Page } from 'playwright-core';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { readIntake } from '@/lib/intake/read-intake';
import { openBrowser } from './browser';
import { figuresOf } from './numbers-page';

const root = new URL('../..', import.meta.url).pathname;
const closeness = 1e-12;

let browser: Browser;
let page: Page;

beforeAll(async () => {
  const bundled = await build({
    entryPoints: [join(root, 'tests/browser/numbers-page.ts')],
    bundle: true,
    write: false,
    platform: 'browser',
    format: 'iife',
    target: 'es2022',
    tsconfig: join(root, 'tsconfig.json'),
    logLevel: 'warning',
  });
  browser = await openBrowser();
  page = await browser.newPage();
  await page.addScriptTag({ content: bundled.outputFiles[0]!.text });
});
afterAll(() => browser?.close());

describe('in Chromium', () => {
  // first order; second order with imperfections; ASD with reduced stiffness and shear; slack ties; both design codes
  it.each([
    'pipe-rack-12.xlsx',
    'slender-sheds-24.xlsx',
    'direct-analysis-us-9.xlsx',
    'braced-bents-12.xlsx',
    'code-sheds-24.xlsx',
    'code-halls-us-9.xlsx',
  ])('frames of %s have the same states, extremes and ratios as in Node', async (name) => {
    const intake = await readIntake([{ name, bytes: readFileSync(join(root, 'samples', name)) }]);
    const frames = intake.frames.flatMap(({ frame }) => (frame ? [frame] : [])).slice(0, 6);
    expect(frames).toHaveLength(6);
    for (const frame of frames) {
      const here = figuresOf(frame, intake.settings);
      const there = await page.evaluate(([f, s]) => window.figuresOf(f, s), [frame, intake.settings] as const);
      if (typeof here === 'string' || typeof there === 'string') {
        expect(there).toEqual(here);
        continue;
      }
      expect(there.map(({ what }) => what)).toEqual(here.map(({ what }) => what));
      here.forEach(({ what, values }, i) => {
        const others = there[i]!.values;
        expect(others).toHaveLength(values.length);
        const largest = values.reduce((most, value) => Math.max(most, Math.abs(value) || 0), 0);
        values.forEach((value, k) => {
          // NaN: a node without a rotation of its own
          if (Number.isNaN(value)) expect(others[k]).toBeNaN();
          else if (value !== others[k])
            expect(Math.abs(value - others[k]!) / largest, `${frame.id}, ${what}: ${value} and ${others[k]}`).toBeLessThan(
              closeness,
            );
        });
      });
    }
  });
});
