import { describe, expect, it } from 'vitest';
import { createAnalyser } from '@/lib/analysis/analyser';
import { defaultSettings } from '@/lib/model/settings';
import { cantileverFrame } from '@/lib/results/cantilever-frame';
import { evaluateFrame } from '@/lib/results/evaluate';
import type { FrameEvaluation } from '@/lib/results/result';
import { alteredFrame } from './altered-frame';

const evaluate = (): FrameEvaluation =>
  evaluateFrame(createAnalyser(), cantileverFrame('K1'), defaultSettings, { second: false, all: false });
const stored = evaluate();
const of = { number: 1, frame: 'K1' };

describe('whether an engine gives what was issued', () => {
  it('finds nothing where it is the same engine', () => {
    expect(alteredFrame(of, stored, evaluate())).toBeNull();
  });

  it('finds a force that is another by a millionth, though no ratio moved', () => {
    const [first, ...rest] = stored.states;
    const endForces = first!.endForces.map((force) => force * (1 + 1e-6));
    const found = alteredFrame(of, stored, { ...stored, states: [{ ...first!, endForces }, ...rest] });
    expect(found?.what).toBe(`forces of ${first!.name}`);
    expect(found?.forceBy).toBeCloseTo(1e-6, 9);
    expect(found?.ratioBy).toBe(0);
  });

  it('leaves the noise of additions alone', () => {
    const states = stored.states.map((state) => ({ ...state, reactions: state.reactions.map((force) => force * (1 + 1e-12)) }));
    expect(alteredFrame(of, stored, { ...stored, states })).toBeNull();
  });

  it('finds a ratio that moved, and says where', () => {
    const at = stored.checks.findIndex(({ ratio }) => ratio !== null);
    const checks = stored.checks.map((check, i) => (i === at ? { ...check, ratio: check.ratio! + 0.02 } : check));
    const found = alteredFrame(of, stored, { ...stored, checks });
    expect(found?.ratioBy).toBeCloseTo(0.02, 9);
    expect(found?.what).toContain(`ratio of ${checks[at]!.check}`);
  });

  it('finds a check, a combination or a solution that is gone or new', () => {
    const gone = alteredFrame(of, stored, { ...stored, checks: stored.checks.slice(1) });
    expect(gone?.what).toContain('is gone');
    const fresh = alteredFrame(of, { ...stored, states: stored.states.slice(1) }, stored);
    expect(fresh?.what).toContain('is new');
    const failed = alteredFrame(of, stored, { ...stored, status: 'not solved', verdict: 'not checked', states: [], checks: [] });
    expect(failed?.what).toContain('it has no solution now');
  });
});
