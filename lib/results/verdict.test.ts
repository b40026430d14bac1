import { describe, expect, it } from 'vitest';
import type { Check, Verdict } from '@/lib/results/result';
import { frameVerdict, governingIndex, governingOf, worse } from '@/lib/results/verdict';

const check = (verdict: Verdict, ratio: number | null, name = 'normal stress'): Check => ({
  subjectKind: 'member', subject: 'AB', check: name, combination: 'C1', at: 0, face: null, value: ratio, limit: 1,
  quantity: 'stress', ratio, verdict, reason: ratio === null ? 'needs Av' : null, reference: '', member: 0, inputs: {},
}); // prettier-ignore

describe('verdicts', () => {
  it('stand in the order over, not checked, near, within', () => {
    const order: Verdict[] = ['over', 'not checked', 'near', 'within'];
    for (let i = 0; i < order.length; i++)
      for (let j = 0; j < order.length; j++) expect(worse(order[i]!, order[j]!)).toBe(order[Math.min(i, j)]);
  });

  it('of a frame are the worst of all its checks', () => {
    expect(frameVerdict([check('within', 0.2), check('near', 0.95)], [])).toBe('near');
    expect(frameVerdict([check('near', 0.95), check('not checked', null), check('within', 0.2)], [])).toBe('not checked');
    expect(frameVerdict([check('not checked', null), check('over', 1.02)], [])).toBe('over');
  });

  it('are never a pass where the sheets left something unchecked', () => {
    expect(frameVerdict([check('within', 0.2)], ['a case of combination C9 is unknown'])).toBe('not checked');
    expect(frameVerdict([check('over', 1.2)], ['a case of combination C9 is unknown'])).toBe('over');
    expect(frameVerdict([], [])).toBe('not checked');
  });
});

describe('the governing check', () => {
  it('is chosen by verdict first, then by ratio, the first on a tie', () => {
    const checks = [check('within', 0.89), check('not checked', null), check('near', 0.97), check('near', 0.97)];
    expect(governingIndex(checks)).toBe(1);
    expect(governingIndex([checks[0]!, checks[2]!, checks[3]!])).toBe(1);
    expect(governingIndex([check('over', 1.01), ...checks, check('over', 1.3)])).toBe(5);
  });

  it('is not chosen by rounding', () => {
    expect(governingIndex([check('near', 0.97), check('near', 0.97 * (1 + 1e-12)), check('within', 0.3)])).toBe(0);
    expect(governingIndex([check('near', 0.97), check('near', 0.97 * (1 + 1e-6))])).toBe(1);
  });

  it('is none where there is no check', () => {
    expect(governingOf([])).toBeNull();
    expect(governingOf([check('over', 1.1, 'shear stress')])).toEqual({
      subject: 'AB', check: 'shear stress', combination: 'C1', ratio: 1.1,
    }); // prettier-ignore
  });
});
