import { readFileSync } from 'node:fs';
import { describe, expect, it } from 'vitest';
import { createAnalyser } from '@/lib/analysis/analyser';
import { answer } from './answer';
import { publishedFrame, type PublishedCase } from './published-frame';

// What a case prints but the solution is not asked for stands in its `leftOut` with the reason. The second-order cases
// stand in second-order.test.ts.
const files = ['beams', 'rigid-frames', 'textbook-frames', 'buckling-loads'];
const analyser = createAnalyser();

for (const file of files) {
  const { group, cases } = read(file);
  describe(group, () => {
    for (const published of cases) {
      const memory = published.fromMemory ? ' (from memory)' : '';
      it(`${published.id} ${published.title}: ${published.source}${memory}`, () => {
        const frame = publishedFrame(published);
        const analysis = analyser.analyse(frame);
        if (!analysis.ok) throw new Error(analysis.failure.message);
        const state = analysis.states[1]!;
        expect(published.expected.length).toBeGreaterThan(0);
        for (const item of published.expected) {
          const found = answer(frame, state, published, item.ask);
          const allowed = Math.max((item.relative ?? 0) * Math.abs(item.value), item.absolute ?? 0);
          expect(allowed).toBeGreaterThan(0);
          const off = Math.abs(found - item.value);
          expect(off, `${item.what}: ${found} ${item.unit}, printed ${item.value}`).toBeLessThanOrEqual(allowed);
        }
      });
    }
  });
}

function read(file: string): { group: string; cases: PublishedCase[] } {
  return JSON.parse(readFileSync(new URL(`./${file}.json`, import.meta.url), 'utf8')) as {
    group: string;
    cases: PublishedCase[];
  };
}
