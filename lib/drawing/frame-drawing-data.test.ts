import { describe, expect, it } from 'vitest';
import type { DrawingResult } from './drawing-data';
import { createAnalyser } from '@/lib/analysis/analyser';
import { plainCase, plainFrame, plainMember, plainSection } from '@/lib/analysis/plain-frame';
import { defaultSettings } from '@/lib/model/settings';
import { cantileverFrame } from '@/lib/results/cantilever-frame';
import { evaluateFrame } from '@/lib/results/evaluate';
import { lineMemo } from '@/lib/results/line-memo';
import { memberResults } from '@/lib/results/member-results';
import { drawingData } from './frame-drawing-data';

const frame = cantileverFrame('F1');
const evaluation = evaluateFrame(createAnalyser(), frame, defaultSettings, { second: false, all: true });
const { members } = memberResults(frame, evaluation, lineMemo(frame));
const draw = (chosen: string | null) => drawingData({ frame, evaluation, members, units: 'metric', nearLimit: 0.9, chosen });

/** Of the loads drawn on a level member. */
function downwards(result: DrawingResult): number {
  return result.loads.reduce((sum, load) => {
    if (load.kind === 'distributed') return sum + ((load.q1 + load.q2) / 2) * (load.to - load.from);
    if (load.kind === 'point') return sum + load.P;
    return load.kind === 'node' ? sum + load.Fy : sum;
  }, 0);
}

const settings = { ...defaultSettings, analysis: 'second order' as const, imperfections: 'EN 1993-1-1' as const };
const tie = {
  section: 1,
  role: 'brace' as const,
  startJoint: 'pin' as const,
  endJoint: 'pin' as const,
  axialOnly: true,
  tensionOnly: true,
};
/** Two columns and a beam with crossed ties; the tops are the first two nodes. */
const braced = plainFrame({
  nodes: [
    ['B', 0, 4],
    ['C', 6, 4],
    ['A', 0, 0],
    ['D', 6, 0],
  ],
  members: [
    plainMember('AB', 2, 0, { role: 'column' }),
    plainMember('BC', 0, 1, { role: 'beam' }),
    plainMember('DC', 3, 1, { role: 'column' }),
    plainMember('AC', 2, 1, tie),
    plainMember('DB', 3, 0, tie),
  ],
  sections: [plainSection('frame', 53.81e-4, 8356e-8, 0.3), plainSection('tie', 3.14e-4, 7.85e-9, 0.02)],
  supports: [2, 3].map((node) => ({ node, ux: 'fixed', uy: 'fixed', rz: 'free', angle_rad: 0 })),
  cases: [plainCase('dead', 1), plainCase('wind')],
  memberLoads: [
    { case: 0, member: 1, kind: 'distributed', axes: 'local', direction: 'y', q1_N_m: -9000, q2_N_m: -9000, from_m: 0, to_m: 6 },
  ],
  nodeLoads: [{ case: 1, node: 0, Fx_N: 8000, Fy_N: 0, Mz_Nm: 0 }],
  combinations: [
    { name: 'C1', purpose: 'strength', terms: [{ case: 0, factor: 1.35 }, { case: 1, factor: 1.5 }] },
    { name: 'S1', purpose: 'service', terms: [{ case: 0, factor: 1 }, { case: 1, factor: 1 }] },
  ],
}); // prettier-ignore

describe('a frame as the drawing takes it', () => {
  it('offers every case and combination, and draws the governing one unless another is asked for', () => {
    const { results, chosen } = draw(null);
    expect(results.map((one) => one.name)).toEqual(evaluation.states.map((state) => state.name));
    expect(chosen?.name).toBe(evaluation.governing?.combination);
    for (const { name } of results) expect(draw(name).chosen?.name).toBe(name);
  });

  it('draws loads times their factors, self-weight among them, in balance with the reactions', () => {
    for (const { name } of draw(null).results) {
      const result = draw(name).chosen!;
      const up = result.reactions.reduce((sum, one) => sum + one.Fy, 0);
      expect(up, name).toBeGreaterThan(0);
      expect(downwards(result) / -up, name).toBeCloseTo(1, 9);
    }
  });

  it('has every extreme among the points that are drawn', () => {
    for (const { name } of draw(null).results) {
      for (const { x, N, V, M, extremes } of draw(name).chosen!.lines) {
        expect(Math.max(...M)).toBe(extremes.M.max);
        expect(Math.min(...M)).toBe(extremes.M.min);
        expect([Math.max(...N), Math.min(...V)]).toEqual([extremes.N.max, extremes.V.min]);
        expect(x).toEqual([...x].sort((a, b) => a - b));
      }
    }
  });

  it('draws the geometry alone where the frame was not solved', () => {
    const bare = drawingData({ frame, evaluation: null, members: [], units: 'metric', nearLimit: 0.9, chosen: null });
    expect([bare.nodes.length, bare.members.length, bare.chosen, bare.movement]).toEqual([2, 1, null, null]);
    expect(bare.members[0]).toMatchObject({ ratio: null, verdict: 'not checked' });
  });

  describe('where combinations are analysed both ways, with ties that only pull', () => {
    const bent = evaluateFrame(createAnalyser(), braced, settings, { second: false, all: false });
    const show = (chosen: string) =>
      drawingData({ frame: braced, evaluation: bent, members: [], units: 'metric', nearLimit: 0.9, chosen });

    it('offers each direction by its own name, and says that load cases alone are not applicable', () => {
      const { results, notApplicable } = show('C1 →');
      expect(results.map(({ name }) => name)).toEqual(['C1 →', 'C1 ←', 'S1']);
      expect(notApplicable).toEqual(['dead', 'wind']);
    });

    it('draws the very state that was asked for: its slack ties, its forces for imperfections, its α_cr', () => {
      for (const [name, way] of [
        ['C1 →', 1],
        ['C1 ←', -1],
      ] as const) {
        const { chosen } = show(name);
        const state = bent.states.find((one) => one.name === name)!;
        expect(chosen).toMatchObject({
          name,
          slack: state.method?.slack,
          method: { order: 2, iterations: state.method?.iterations },
        });
        const tops = chosen!.loads.flatMap((load) =>
          load.kind === 'node' && load.case === 'imperfection' && load.node < 2 ? [load.Fx] : [],
        );
        expect(tops.map(Math.sign)).toEqual([way, way]);
        expect(chosen!.method.criticalLoadFactor).toBe(state.criticalLoadFactor);
        expect(chosen!.method.criticalLoadFactor).toBeGreaterThan(1);
      }
    });

    it('draws no imperfection, and offers no buckled shape, of a service combination', () => {
      const { chosen } = show('S1');
      expect(chosen!.loads.filter((load) => load.case === 'imperfection')).toEqual([]);
      expect([chosen!.method.criticalLoadFactor, chosen!.method.imperfection, chosen!.method.order]).toEqual([null, null, 2]);
    });
  });
});
