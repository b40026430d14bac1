import { readFileSync } from 'node:fs';
import { describe, expect, it } from 'vitest';
import { createAnalyser } from '@/lib/analysis/analyser';
import { stabilityFunctions } from '@/lib/analysis/critical/stability-functions';
import { defaultSettings } from '@/lib/model/settings';
import type { Frame } from '@/lib/model/frame';
import type { ResultState } from '@/lib/results/result';
import { answer } from './answer';
import { publishedFrame, type Expected, type PublishedCase } from './published-frame';

// The second-order group, each figure at its own tolerance; buckling loads of the same group are in buckling-loads.json.
const analyser = createAnalyser();
const { cases } = JSON.parse(readFileSync(new URL('./second-order.json', import.meta.url), 'utf8')) as { cases: PublishedCase[] };

function solved(frame: Frame, shearDeformation: boolean): ResultState {
  const analysis = analyser.analyse(frame, { settings: { ...defaultSettings, analysis: 'second order', shearDeformation } });
  if (!analysis.ok) throw new Error(analysis.failure.message);
  const state = analysis.states[1]!;
  expect(state.order).toBe(2);
  return state;
}

/** s, and c = sc/s, at x times Euler's load. */
function stability(of: string, x: number): number {
  const { s, sc } = stabilityFunctions(Math.PI ** 2 * x, { s: 0, sc: 0 });
  return of === 's' ? s : sc / s;
}

// the formulas as printed (x tan x = 6G: sway of a portal on pins, G = I₂h/I₁L), written out once more
const swayRoot = (G: number): number => {
  let [low, high] = [1e-6, Math.PI / 2 - 1e-9];
  for (let i = 0; i < 100; i++) {
    const x = (low + high) / 2;
    if (x * Math.sin(x) < 6 * G * Math.cos(x)) low = x;
    else high = x;
  }
  return low;
};
const portal = { H: 10, h: 5, L: 8, E: 210e6, I1: 2e-4, I2: 3e-4, V: 400 };
const alpha = (swayRoot((portal.I2 * portal.h) / (portal.I1 * portal.L)) ** 2 * portal.E * portal.I1) / portal.h ** 2 / portal.V;
const printed: Readonly<Record<string, number>> = {
  'H*h/2': (portal.H * portal.h) / 2,
  '1/(1-V/(root(lambda x: x*sin(x)-6*(I2*h/(I1*L))*cos(x), 1e-6, pi/2)**2*E*I1/h**2))': 1 / (1 - 1 / alpha),
  '6000.0/(200*1.6)': 6000 / (200 * 1.6),
  '0.8*(1-130/772)*6000.0/(200*1.6)': (0.8 * (1 - 130 / 772) * 6000) / (200 * 1.6),
  '5275.0/(200*1.6)': 5275 / (200 * 1.6),
  '0.8*(1-130/772)*5275.0/(200*1.6)': (0.8 * (1 - 130 / 772) * 5275) / (200 * 1.6),
  '1/(1-1/10)': 1 / (1 - 1 / 10),
  '1/(1-1/5)': 1 / (1 - 1 / 5),
  '1/(1-1/3)': 1 / (1 - 1 / 3),
};

describe('second order', () => {
  for (const published of cases) {
    const memory = published.fromMemory ? ' (from memory)' : '';
    it(`${published.id} ${published.title}: ${published.source}${memory}`, () => {
      const { formulas = [] } = published;
      const expected: readonly Expected[] = published.expected ?? [];
      expect(expected.length + formulas.length).toBeGreaterThan(0);
      for (const { what, formula, value, relative } of formulas)
        expect(Math.abs(printed[formula]! / value - 1), `${what}: ${printed[formula]}`).toBeLessThanOrEqual(relative);
      for (const item of expected) {
        const { ask } = item;
        const frame = publishedFrame(published);
        const found =
          ask.of === 's' || ask.of === 'c'
            ? stability(ask.of, ask.x!)
            : answer(frame, solved(frame, ask.shear ?? false), published, ask);
        const allowed = Math.max((item.relative ?? 0) * Math.abs(item.value), item.absolute ?? 0);
        expect(allowed).toBeGreaterThan(0);
        const off = Math.abs(found - item.value);
        expect(off, `${item.what}: ${found} ${item.unit}, printed ${item.value}`).toBeLessThanOrEqual(allowed);
      }
    });
  }
});

describe('the two benchmarks of the AISC 360 commentary over their whole load range, against the closed forms', () => {
  // W14x48, 28 ft; with shear EI → EI μ in the sway and bow of a column, μ = 1 − P/GAv (Engesser; derived from M″ = −PM/EIμ + …)
  const [E, I, L, G, Av, w, H] = [29000, 484, 336, 11200, 13.8 * 0.34, 0.2 / 12, 1];
  const frameOf = (id: string, P: number): { frame: Frame; published: PublishedCase } => {
    const kept = cases.find((one) => one.id === id)!;
    const loads = kept.loads.map((load) => (load.node === 'B' ? { ...load, Fy: -P } : load));
    const published = { ...kept, loads };
    return { frame: publishedFrame(published), published };
  };
  for (const shear of [false, true])
    it(shear ? 'with shear deformation' : 'without shear deformation', () => {
      for (let P = 25; P <= 450; P += 25) {
        const mu = shear ? 1 - P / (G * Av) : 1;
        const k = Math.sqrt(P / (E * I * mu));
        const one = frameOf('SO-A1-450', P);
        const bow = ((w * E * I) / P) * (1 / Math.cos((k * L) / 2) - 1);
        const state = solved(one.frame, shear);
        expect(answer(one.frame, state, one.published, { of: 'M', member: 'AB', x: L / 2 }) / bow).toBeCloseTo(1, 8);
        expect(answer(one.frame, state, one.published, { of: 'ux', member: 'AB', x: L / 2 }) / ((bow - (w * L * L) / 8) / P)).toBeCloseTo(1, 7); // prettier-ignore
        if (P > 200) continue;
        const two = frameOf('SO-A2-200', P);
        const base = (H * Math.tan(k * L)) / (mu * k);
        const swayed = solved(two.frame, shear);
        expect(answer(two.frame, swayed, two.published, { of: 'reaction', node: 'A', along: 'turn' }) / base).toBeCloseTo(1, 7);
        expect(answer(two.frame, swayed, two.published, { of: 'movement', node: 'B', along: 'x' }) / ((base - H * L) / P)).toBeCloseTo(1, 7); // prettier-ignore
      }
    });
});
