import { readFileSync } from 'node:fs';
import { describe, expect, it } from 'vitest';
import { allowance } from '@/lib/checks/limits';
import type { Limit } from '@/lib/model/frame';
import { limitPresets } from '@/lib/model/limit-presets';

interface Published {
  readonly id: string;
  readonly title: string;
  readonly source: { readonly author: string; readonly title: string; readonly edition: string; readonly locator: string };
  readonly table: readonly { readonly id: string; readonly ratio: number | null }[];
  readonly expected: readonly { readonly id: string; readonly what: string; readonly value: number; readonly tol_rel: number }[];
}

const { cases } = JSON.parse(readFileSync(new URL('./limits.json', import.meta.url), 'utf8')) as { cases: Published[] };

/** Rows that no preset holds, with the reason: they limit what is not measured. */
const leftOut: Readonly<Record<string, string>> = {
  'LM-FR-H portal_diff': 'the difference between two frames is not measured',
  'LM-FR-H other_diff': 'the difference between two frames is not measured',
  'LM-FR-H rail': 'a rail’s span is not in the plane of the frame',
};

const any: Omit<Limit, 'ratio' | 'measure'> = {
  target: 'all', name: '*', direction: null, toNode: null, absolute_m: null, combination: null, namedFrame: false, source: 'office',
}; // prettier-ignore

describe('limits on movement', () => {
  for (const { id, title, source, table, expected } of cases)
    it(`${id} ${title}: ${source.author}, ${source.title} (${source.edition}), ${source.locator}`, () => {
      const printed = table.filter(({ ratio, id: row }) => ratio !== null && leftOut[`${id} ${row}`] === undefined);
      expect(limitPresets.filter((preset) => preset.id.startsWith(`${id} `)).map((preset) => preset.id.slice(id.length + 1)).sort()).toEqual(printed.map(({ id: row }) => row).sort()); // prettier-ignore
      for (const { id: row, ratio } of printed) {
        const preset = limitPresets.find((one) => one.id === `${id} ${row}`)!;
        expect(preset.ratio).toBe(ratio);
        const { value, what, tol_rel } = expected.find((one) => one.id === row)!;
        const allowed = 1000 * (allowance({ ...any, measure: preset.measure, ratio: preset.ratio }, 6) ?? Number.NaN);
        expect(Math.abs(allowed - value), what).toBeLessThanOrEqual(tol_rel * value);
      }
    });
});
