import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import type { Frame } from '@/lib/model/frame';
import { solveCases } from '../first-order-cases';
import { plainCase, plainFrame, plainMember } from '../plain-frame';
import { randomFrame } from '../random-frame';
import { superpose } from '../superpose';
import { buildTopology } from '../topology';
import { bucklingSpace } from './buckling-trial';
import { criticalLoadFactor } from './critical-load-factor';
import { criticalMemory, nextCriticalLoadFactor } from './neighbour-critical';

/** Each combination from nothing, and from its neighbour. */
function both(frame: Frame): (readonly [number | null, number | null])[] {
  const t = buildTopology(frame);
  const solved = solveCases(frame, t, false);
  if ('code' in solved) return [];
  const space = bucklingSpace(t);
  const memory = criticalMemory(frame, t);
  const { angles, diagonal, cases } = solved;
  return frame.combinations.map((_, i) => {
    const state = superpose(frame, cases, i);
    const next = nextCriticalLoadFactor(frame, t, angles, diagonal, state, space, memory);
    return [criticalLoadFactor(frame, t, angles, diagonal, state, space), next];
  });
}
const combinations = (cases: number, factor: (i: number, c: number) => number): Frame['combinations'] =>
  Array.from({ length: 6 }, (_, i) => ({
    name: `C${i}`,
    purpose: 'strength',
    terms: Array.from({ length: cases }, (__, c) => ({ case: c, factor: factor(i, c) })),
  }));

describe('the critical load factor begun from the combination before', () => {
  it('is the one found from nothing, in any frame', () => {
    fc.assert(
      fc.property(randomFrame, (plain) => {
        const cases = plain.cases.length;
        for (const [cold, warm] of both({
          ...plain,
          combinations: combinations(cases, (i, c) => 1 + 0.8 * Math.sin(3 * i + 7 * c)),
        })) {
          if (cold === null || warm === null) expect(warm).toBe(cold);
          // both divide members by how near they are to buckling: 1e-5 (README §4)
          else expect(Math.abs(warm / cold - 1), `${warm} against ${cold}`).toBeLessThan(1e-5);
        }
      }),
      { seed: 11, numRuns: 60 },
    );
  });

  it('is not that of the shape before where another comes first', () => {
    // two portals of their own, one loaded by each case
    const fixed = (node: number) => ({ node, ux: 'fixed' as const, uy: 'fixed' as const, rz: 'fixed' as const, angle_rad: 0 });
    const frame = plainFrame({
      nodes: [['A', 0, 0], ['B', 0, 5], ['C', 9, 0], ['D', 9, 7]],
      members: [plainMember('AB', 0, 1), plainMember('CD', 2, 3)],
      supports: [fixed(0), fixed(2)],
      cases: [plainCase('left'), plainCase('right')],
      nodeLoads: [1, 3].map((node, i) => ({ case: i, node, Fx_N: 0, Fy_N: -1e3, Mz_Nm: 0 })),
      combinations: combinations(2, (i, c) => (i % 2 === c ? 1 : 0.2)),
    }); // prettier-ignore
    for (const [cold, warm] of both(frame)) expect(Math.abs(warm! / cold! - 1)).toBeLessThan(1e-9);
  });
});
