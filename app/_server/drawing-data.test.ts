import { describe, expect, it } from 'vitest';
import type { DrawingResult } from '@/components/drawing/drawing-data';
import { createAnalyser } from '@/lib/analysis/analyser';
import { defaultSettings } from '@/lib/model/settings';
import { cantileverFrame } from '@/lib/results/cantilever-frame';
import { evaluateFrame } from '@/lib/results/evaluate';
import { lineMemo } from '@/lib/results/line-memo';
import { memberResults } from '@/lib/results/member-results';
import { drawingData } from './drawing-data';

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
});
