import { describe, expect, it } from 'vitest';
import { createAnalyser } from '@/lib/analysis/analyser';
import { defaultSettings } from '@/lib/model/settings';
import { cantileverFrame } from '@/lib/results/cantilever-frame';
import { evaluateFrame } from '@/lib/results/evaluate';
import { extremesOf } from '@/lib/results/extremes-of';
import { lineMemo } from '@/lib/results/line-memo';
import { memberResults } from '@/lib/results/member-results';

const settings = {
  ...defaultSettings,
  deflectionRatio: 'none' as const,
  swayRatio: 'none' as const,
  stability: 'by others' as const,
};

function results(change: Parameters<typeof cantileverFrame>[1]) {
  const frame = cantileverFrame('K', change);
  const lineOf = lineMemo(frame);
  const evaluation = evaluateFrame(createAnalyser(), frame, settings, { second: false, all: false, lineOf });
  return { frame, evaluation, ...memberResults(frame, evaluation, lineOf) };
}

describe('a member in the members table', () => {
  it('shows its forces where its governing check stands: PL and P at the root of a cantilever', () => {
    const { members } = results({ combinations: [{ name: 'C1', purpose: 'strength', terms: [{ case: 1, factor: 1.5 }] }] });
    expect(members[0]).toMatchObject({ combination: 'C1', at: 0 });
    expect(members[0]!.M).toBeCloseTo(-1.5 * 2000 * 3, 6);
    expect(members[0]!.V).toBeCloseTo(1.5 * 2000, 6);
    expect(members[0]!.deflection).toBeNull();
  });

  it('has its extremes kept under every case and combination, as they are recovered from its line', () => {
    const strength = (name: string, factor: number) => ({ name, purpose: 'strength' as const, terms: [{ case: 1, factor }] });
    const { evaluation, extremes, frame } = results({ combinations: [strength('C1', 1), strength('C2', 2)] });
    expect(evaluation.states.map((state) => state.name)).toEqual(['dead', 'tip', 'C1', 'C2']);
    const kept = evaluation.states.map((state, i) => extremesOf(frame, { ...state, extremes: extremes[i]! }, 0));
    expect(kept).toEqual(evaluation.states.map((state) => extremesOf(frame, state, 0)));
    expect(kept[3]!.M.min / kept[2]!.M.min).toBeCloseTo(2, 12);
    expect(kept[2]!.M.minAt).toBe(0);
  });

  it('that is a piece of a span takes the span’s check where that stands', () => {
    const base = cantileverFrame('K');
    const [whole] = base.members;
    const { members } = results({
      nodes: [base.nodes[0]!, { id: 'H', x_m: 1, y_m: 0, place: null }, base.nodes[1]!],
      members: [
        { ...whole!, id: 'AH', end: 1, span: 'arm', role: 'cantilever' },
        { ...whole!, id: 'BH', start: 2, end: 1, span: 'arm', role: 'cantilever' },
      ],
      nodeLoads: [{ case: 1, node: 2, Fx_N: 0, Fy_N: -20_000, Mz_Nm: 0 }],
      combinations: [{ name: 'S1', purpose: 'service', terms: [{ case: 1, factor: 1 }] }],
    });
    expect(members.map((member) => member.check)).toEqual([members[0]!.check, members[0]!.check]);
    expect(members.every((member) => member.verdict === members[0]!.verdict)).toBe(true);
  });
});
