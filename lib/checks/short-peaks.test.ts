import { describe, expect, it } from 'vitest';
import { flattened } from '@/lib/analysis/flat-line';
import { FlatLines } from '@/lib/analysis/flat-lines';
import { extremeNumbers, writeExtremes } from '@/lib/analysis/member-extremes';
import { plainFrame, plainMember } from '@/lib/analysis/plain-frame';
import type { MemberLine, ResultState } from '@/lib/results/result';
import { peakEquivalentStress } from './equivalent-stress';
import { peakNormalStress } from './normal-stress';
import { isShort } from './peak';
import { peakShearStress } from './shear-stress';
import { equivalentWithin, shortPeaks } from './short-peaks';

const perA = 1 / 53.8e-4;
const perTop = 1 / 557e-6;
const perBottom = 1 / 480e-6;
const perAv = 1 / 25.7e-4;

function seeded(seed: number): () => number {
  let state = seed;
  return () => (state = (state * 16807) % 2147483647) / 2147483647;
}

/** A member of 6 m under even loads, or the same line with a term of degree 4 that is nought, for which the general rules look. */
function lineOf(random: () => number, longer: boolean): MemberLine {
  const any = (size: number): number => size * (2 * random() - 1);
  const [N, n, V, w, M] = [any(4e5), any(2e3), any(9e4), any(4e4), any(2e5)];
  const v = [any(0.01), any(0.01), any(4e-3), any(1e-3), any(1e-4), 0];
  const segment = {
    from: 0,
    to: 6,
    N: [N, n, 0],
    V: [V, w, 0],
    M: longer ? [M, V, w / 2, 0, 0] : [M, V, w / 2, 0],
    u: [0],
    v: longer ? [...v, 0] : v,
  };
  return { length: 6, segments: [segment] };
}

const seeds = Array.from({ length: 300 }, (_, i) => 17 + 101 * i);

describe('a member under even loads', () => {
  it('has the stresses that the general rules find, to the last digit', () => {
    for (const seed of seeds) {
      const short = flattened(lineOf(seeded(seed), false));
      const general = flattened(lineOf(seeded(seed), true));
      expect([isShort(short, 0), isShort(general, 0)]).toEqual([true, false]);
      const normal = { ...peakNormalStress(short, 0, perA, perTop, perBottom) };
      expect(normal, `seed ${seed}`).toEqual(peakNormalStress(general, 0, perA, perTop, perBottom));
      const shear = { ...peakShearStress(short, 0, perAv) };
      expect(shear, `seed ${seed}`).toEqual(peakShearStress(general, 0, perAv));
      const bound = Math.hypot(normal.value, Math.sqrt(3) * shear.value);
      for (const within of [0, bound]) {
        const both = { ...peakEquivalentStress(short, 0, perA, perTop, perBottom, perAv, within, -1) };
        expect(both, `seed ${seed}`).toEqual(peakEquivalentStress(general, 0, perA, perTop, perBottom, perAv, within, -1));
      }
    }
  });

  it('has the extremes that the general rules find, to the last digit', () => {
    for (const seed of seeds) {
      const short = writeExtremes(flattened(lineOf(seeded(seed), false)), 0, new Float64Array(extremeNumbers), 0);
      const general = writeExtremes(flattened(lineOf(seeded(seed), true)), 0, new Float64Array(extremeNumbers), 0);
      expect(short, `seed ${seed}`).toEqual(general);
    }
  });

  it('is governed by the states in which its stresses are largest', () => {
    const frame = plainFrame({ nodes: [['A', 0, 0], ['B', 6, 0]], members: [plainMember('M1', 0, 1)] }); // prettier-ignore
    for (const seed of seeds.slice(0, 60)) {
      const random = seeded(seed);
      const made = Array.from({ length: 9 }, () => lineOf(random, false));
      const states = made.map((_, c) => ({ name: `C${c}` }) as ResultState);
      const flat = new FlatLines(frame, (state) => made[states.indexOf(state)]!);
      const lines = states.map((state) => flat.of(state));
      const found = shortPeaks(lines, 0, perA, perTop, perBottom, perAv);
      const rows = made.map((line) => flattened(line));
      const normal = rows.map((row) => peakNormalStress(row, 0, perA, perTop, perBottom).value);
      const shear = rows.map((row) => peakShearStress(row, 0, perAv).value);
      const both = rows.map((row) => peakEquivalentStress(row, 0, perA, perTop, perBottom, perAv, Infinity, -1).value);
      const first = (values: readonly number[]): number => values.indexOf(Math.max(...values));
      expect(found, `seed ${seed}`).toEqual({ normal: first(normal), shear: first(shear) });
      both.forEach((value, c) => {
        const bound = equivalentWithin(c);
        if (bound < 0) expect(value, `seed ${seed}`).toBeLessThan(Math.max(...both));
        else expect(value, `seed ${seed}`).toBeLessThanOrEqual(bound * (1 + 1e-12));
      });
    }
  });
});
