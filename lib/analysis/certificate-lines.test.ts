import { describe, expect, it } from 'vitest';
import type { Certificate } from '@/lib/results/result';
import { certificateLines } from './certificate-lines';

const sound: Certificate = {
  residual: 3e-16,
  equilibrium: 2e-14,
  condition: 4e4,
  digits: 11.05,
  second: 5e-12,
  secondReason: null,
};
const outcomes = (certificate: Partial<Certificate>) =>
  certificateLines({ ...sound, ...certificate }).map(({ outcome }) => outcome);

describe('a certificate in words', () => {
  it('passes what is within its tolerance (engine, Certificate: 1e-10, 1e-8, 6 digits, 1e-6)', () => {
    expect(certificateLines(sound).map(({ item, bound, tolerance }) => [item, bound, tolerance])).toEqual([
      [1, 'at most', 1e-10],
      [1, 'at most', 1e-8],
      [2, 'at least', 6],
      [3, 'at most', 1e-6],
    ]);
    expect(outcomes({})).toEqual(['passed', 'passed', 'passed', 'passed']);
  });

  it('says which figure is outside, and takes no number for no pass', () => {
    expect(outcomes({ residual: 2e-10 })[0]).toBe('outside');
    expect(outcomes({ equilibrium: 2e-8 })[1]).toBe('outside');
    expect(outcomes({ digits: 5.9 })[2]).toBe('outside');
    expect(outcomes({ second: 2e-6 })[3]).toBe('outside');
    expect(outcomes({ residual: NaN, equilibrium: NaN, digits: NaN, second: NaN })).toEqual(Array(4).fill('outside'));
  });

  it('of a frame without results is not applicable, but for its stiffness', () => {
    const lines = certificateLines({ ...sound, residual: 0, equilibrium: 0, second: null, secondReason: 'no results' });
    expect(lines.map(({ outcome }) => outcome)).toEqual(['not made', 'not made', 'passed', 'not made']);
    for (const at of [0, 1, 3])
      expect(lines[at]).toMatchObject({ figure: null, reason: expect.stringMatching(/^not applicable/) });
  });

  it('says why there is no second analysis', () => {
    const last = (secondReason: string | null) => certificateLines({ ...sound, second: null, secondReason })[3]!;
    expect(last('sampled')).toMatchObject({ outcome: 'not made', figure: null });
    expect(last('sampled').reason).toContain('5 % are analysed twice');
    expect(last('too large').reason).toContain('above 300 unknowns');
    expect(last('switched off').reason).toBe('switched off');
  });
});
