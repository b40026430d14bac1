import { describe, expect, it } from 'vitest';
import { mayWithdraw, whyNotIssue, type IssuingCase } from './why-not-issue';

const ready: IssuingCase = {
  role: 'lead',
  checkersIssue: false,
  prepared: false,
  revisionState: 'checked',
  laterInForce: null,
  making: false,
  solved: 12,
};

describe('who may issue', () => {
  it('is the lead, and a checker only where the office says so', () => {
    expect(whyNotIssue(ready)).toEqual([]);
    expect(whyNotIssue({ ...ready, role: 'checker' })[0]).toContain('the lead issues');
    expect(whyNotIssue({ ...ready, role: 'checker', checkersIssue: true })).toEqual([]);
    for (const role of ['analyst', 'client'] as const)
      expect(whyNotIssue({ ...ready, role, checkersIssue: true })).toHaveLength(1);
  });

  it('is never one who prepared it, the lead included', () => {
    for (const role of ['lead', 'checker'] as const)
      expect(whyNotIssue({ ...ready, role, checkersIssue: true, prepared: true })).toEqual([
        'You had a part in making it, so somebody else issues it.',
      ]);
  });

  it('issues nothing but what is checked', () => {
    for (const revisionState of ['read', 'run', 'stopped', 'to check', 'returned', 'failed', 'issued', 'superseded', 'withdrawn'])
      expect(whyNotIssue({ ...ready, revisionState }), revisionState).toHaveLength(1);
    expect(whyNotIssue({ ...ready, making: true })).toEqual(['Its files are being made already.']);
  });

  it('lets no earlier revision take the place of a later one', () => {
    expect(whyNotIssue({ ...ready, laterInForce: 'C' })[0]).toContain('Revision C, which is later, is issued');
  });

  it('issues nothing where no frame has a solution', () => {
    expect(whyNotIssue({ ...ready, solved: 0 })[0]).toContain('nothing to issue');
  });

  it('gives every reason at once', () => {
    expect(whyNotIssue({ ...ready, role: 'checker', prepared: true, revisionState: 'run', solved: 0 })).toHaveLength(4);
  });

  it('lets the lead withdraw, and who issued it', () => {
    expect(mayWithdraw({ id: 1, role: 'lead' }, 2)).toBe(true);
    expect(mayWithdraw({ id: 2, role: 'checker' }, 2)).toBe(true);
    expect(mayWithdraw({ id: 3, role: 'checker' }, 2)).toBe(false);
    expect(mayWithdraw({ id: 3, role: 'analyst' }, 2)).toBe(false);
  });
});
