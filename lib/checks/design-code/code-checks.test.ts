import { describe, expect, it } from 'vitest';
import { beamFrame, line, settings, state } from '../hand-made';
import type { Findings } from '../check-row';
import { spansOf } from '../spans';
import type { MemberLine } from '@/lib/results/result';
import type { ClauseRow, DesignCode } from './clause-row';
import { checkByCode } from './code-checks';

/** A code whose only clause holds the greatest tension against 100 kN; above 1 MN it can't. */
const pulling: DesignCode = {
  name: 'EN 1993-1-1',
  rows: (_, demands) =>
    demands.flatMap(({ combination, tension, tensionAt }): ClauseRow[] => {
      if (tension === 0) return [];
      const refused = tension > 1e6;
      return [{
        check: '6.2.3 tension', reference: 'EN 1993-1-1 6.2.3', combination, at: tensionAt, face: null, quantity: 'force', inputs: () => ({ N: tension }),
        value: refused ? null : tension, limit: refused ? null : 100e3, ratio: refused ? null : tension / 100e3, reason: refused ? 'beyond the clause' : null,
      }]; // prettier-ignore
    }),
  working: () => null,
};

function found(tensions: readonly number[], all = false, lineOf = (N: number): MemberLine => line(10, { N: [N] })): Findings {
  const frame = beamFrame();
  const states = tensions.map((_, i) => state(`C${i + 1}`, 'strength'));
  const findings: Findings = {
    checks: [],
    all: all ? [] : null,
    assumptions: new Set(),
    notChecked: new Set(),
    noService: 'no combinations',
  };
  checkByCode(frame, settings({ strengthCheck: 'EN 1993-1-1' }), pulling, spansOf(frame), states, (c) => lineOf(tensions[c]!), findings); // prettier-ignore
  return findings;
}

describe('clauses of a member over all combinations', () => {
  it('keeps the one with the largest ratio, the first on a tie, with its inputs', () => {
    expect(found([50e3, 95e3, 95e3]).checks).toMatchObject([
      {
        subject: 'AB',
        check: '6.2.3 tension',
        combination: 'C2',
        value: 95e3,
        ratio: 0.95,
        verdict: 'near',
        inputs: { N: 95e3 },
      },
    ]);
  });

  it('over comes before not checked, which comes before all else, and is said in any case', () => {
    expect(found([50e3, 2e6]).checks).toMatchObject([{ combination: 'C2', verdict: 'not checked', ratio: null, reason: 'beyond the clause' }]); // prettier-ignore
    const over = found([2e6, 150e3]);
    expect(over.checks).toMatchObject([{ combination: 'C2', verdict: 'over', ratio: 1.5 }]);
    expect([...over.notChecked]).toEqual(['6.2.3 tension: beyond the clause']);
  });

  it('gives every combination where all are asked for', () => {
    expect(found([50e3, 95e3, 0], true).all?.map((one) => one.combination)).toEqual(['C1', 'C2']);
  });

  it('a member that carries nothing is within', () => {
    expect(found([0, 0]).checks).toMatchObject([{ check: 'EN 1993-1-1', verdict: 'within', ratio: 0, reason: null }]);
  });

  it('a member that carries what no clause took up is not checked', () => {
    const bent = found([0], false, () => line(10, { V: [1e3], M: [0, 1e3] }));
    expect(bent.checks).toMatchObject([{ check: 'EN 1993-1-1', verdict: 'not checked', ratio: null }]);
    expect([...bent.notChecked]).toHaveLength(1);
  });
});
