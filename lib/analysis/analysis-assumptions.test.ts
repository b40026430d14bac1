import { describe, expect, it } from 'vitest';
import { defaultSettings, type Settings } from '@/lib/model/settings';
import { analysisAssumptions } from './analysis-assumptions';
import { plainFrame, plainMember } from './plain-frame';

const combinations = [{ name: 'C1', purpose: 'strength' as const, terms: [{ case: 0, factor: 1 }] }];
const column = plainFrame({ nodes: [['A', 0, 0], ['B', 0, 4]], members: [plainMember('AB', 0, 1)], combinations }); // prettier-ignore
const arm = { ...column, members: [plainMember('AB', 0, 1, { role: 'arm' })] };
const said = (frame: typeof column, settings: Partial<Settings>): string =>
  analysisAssumptions(frame, { ...defaultSettings, ...settings }).join('\n');

describe('what the analysis takes for granted', () => {
  it('is nothing in a plain frame, nor of strength where only service is asked for', () => {
    expect(said(column, {})).toBe('');
    const service = { ...column, combinations: [{ ...combinations[0]!, purpose: 'service' as const }] };
    expect(said(service, { imperfections: 'AISC 360', stiffnessReduction: 'AISC 360' })).toBe('');
  });

  it('says which imperfections there are, and that a frame without columns has none', () => {
    expect(said(column, { imperfections: 'EN 1993-1-1' })).toContain('initial sway only');
    expect(said(column, { imperfections: 'AISC 360' })).toContain('α = 1.0');
    expect(said(column, { imperfections: 'AISC 360', strengthCheck: 'AISC 360-22 ASD' })).toContain('α = 1.6');
    expect(said(arm, { imperfections: 'EN 1993-1-1' })).toContain('no columns');
  });

  it('says what is reduced, and by which loads', () => {
    expect(said(column, { stiffnessReduction: 'AISC 360' })).toContain('α = 1, combinations with elastic stress');
    expect(said(column, { analysis: 'second order', strengthCheck: 'AISC 360-22 ASD' })).toContain('under 1.6 times their loads');
    const first = said(column, { analysis: 'first order', strengthCheck: 'AISC 360-22 ASD' });
    expect(first).not.toContain('under 1.6 times');
    expect(first).toContain('critical load factor: of the loads as the ASD combinations give them');
  });

  it('says that ties are pinned and may be slack', () => {
    const tied = { ...column, members: [plainMember('AB', 0, 1, { tensionOnly: true, axialOnly: true })] };
    expect(said(tied, {})).toContain('tension-only members: pinned at both ends');
  });
});
