import { describe, expect, it } from 'vitest';
import { createAnalyser } from '@/lib/analysis/analyser';
import { plainFrame, plainMember } from '@/lib/analysis/plain-frame';
import { frameVerdict } from '@/lib/results/verdict';
import type { FrameEvaluation } from '@/lib/results/result';
import { figureOfOurs, figureSchema, type Figure } from './figure';

/** 6 m, 20 kN/m: reactions 60 kN, 90 kN·m at the middle (wL²/8). */
const frame = plainFrame({
  nodes: [['A', 0, 0], ['B', 6, 0]],
  members: [plainMember('AB', 0, 1)],
  supports: [
    { node: 0, ux: 'fixed', uy: 'fixed', rz: 'free', angle_rad: 0 },
    { node: 1, ux: 'free', uy: 'fixed', rz: 'free', angle_rad: 0 },
  ],
  memberLoads: [
    { case: 0, member: 0, kind: 'distributed', axes: 'global', direction: 'y', q1_N_m: -20e3, q2_N_m: -20e3, from_m: 0, to_m: 6 },
  ],
}); // prettier-ignore
const analysis = createAnalyser().analyse(frame);
if (!analysis.ok) throw new Error(analysis.failure.message);
const evaluation: FrameEvaluation = {
  status: 'solved', failure: null, verdict: frameVerdict([], []), governing: null, notChecked: [], assumptions: [], mass: null,
  states: analysis.states, checks: [], allChecks: null, certificate: null,
}; // prettier-ignore
const of = (figure: Figure) => figureOfOurs(frame, evaluation, figure);

describe('a figure of ours', () => {
  it('is found by its place, with what it is in', () => {
    const reaction = of({ kind: 'reaction', node: 'A', part: 'Fy', result: 'loads' });
    expect(reaction).toMatchObject({ label: 'reaction Fy at A, loads', quantity: 'force' });
    expect('value' in reaction && reaction.value).toBeCloseTo(60e3, 3);
    const moment = of({ kind: 'force', member: 'AB', part: 'M', at_m: 3, result: 'loads' });
    expect('value' in moment && moment.value).toBeCloseTo(90e3, 3);
    const shear = of({ kind: 'force', member: 'AB', part: 'V', at_m: 6, result: 'loads' });
    expect('value' in shear && shear.value).toBeCloseTo(-60e3, 3);
    // 5wL⁴/384EI
    const deflection = of({ kind: 'deflection', member: 'AB', result: 'loads' });
    expect('value' in deflection && deflection.value).toBeCloseTo((-5 * 20e3 * 6 ** 4) / (384 * 210e9 * 8356e-8), 8);
    expect(of({ kind: 'movement', node: 'B', part: 'rz', result: 'loads' })).toMatchObject({ quantity: 'rotation' });
  });

  it.each<[Figure, RegExp]>([
    [{ kind: 'reaction', node: 'Z', part: 'Fy', result: 'loads' }, /no node Z/],
    [{ kind: 'reaction', node: 'A', part: 'Fy', result: 'wind' }, /no result wind/],
    [{ kind: 'force', member: 'AB', part: 'M', at_m: 9, result: 'loads' }, /not that long/],
    [{ kind: 'force', member: 'XY', part: 'M', at_m: 0, result: 'loads' }, /no member XY/],
    [{ kind: 'ratio', check: 0 }, /no ratio/],
  ])('is refused with a sentence where there is none: %j', (figure, words) => {
    const found = of(figure);
    expect('none' in found && found.none).toMatch(words);
  });

  it('is read strictly', () => {
    expect(figureSchema.safeParse({ kind: 'ratio', check: 1.5 }).success).toBe(false);
    expect(figureSchema.safeParse({ kind: 'reaction', node: 'A', part: 'F', result: 'x' }).success).toBe(false);
    expect(figureSchema.safeParse({ kind: 'ratio', check: 1 }).success).toBe(true);
  });
});
