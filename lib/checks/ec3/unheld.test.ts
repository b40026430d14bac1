import { describe, expect, it } from 'vitest';
import { demandOf, ipe300, memberOf, rowOf, rowsOf, shaped } from './hand-made-ec3';

const even = (M: number) => (): number => M;

describe('members with an end that nothing holds', () => {
  it('6.3.3: C_mLT is 1 where a stretch has a free end, whatever its diagram (Table B.3 is for held ends)', () => {
    const member = memberOf(ipe300, { L: 3, fy: 235e6, major: 6, minor: 6, free: { start: false, end: true } });
    const falling = (part: number): number => -20e3 * (1 - part);
    const free = demandOf({ L: 3, N: -50e3, M: falling, held: { start: true, end: false } });
    expect(rowOf(rowsOf(member, free), '6.3.3').inputs()).toMatchObject({ CmLT: 1 });
    const held = rowOf(rowsOf(memberOf(ipe300, { L: 3, fy: 235e6 }), demandOf({ L: 3, N: -50e3, M: falling })), '6.3.3');
    expect(held.inputs().CmLT).toBeCloseTo(0.6, 6);
  });

  it('6.3.2: a deep tube to a free end has its λ̄LT over twice its length', () => {
    const rhs = shaped('rhs', { h: 300, b: 100, t: 8, r: 12 }, 'hot finished');
    const demand = (held: boolean) => demandOf({ L: 4, M: even(-10e3), held: { start: true, end: held } });
    const plain = rowsOf(memberOf(rhs, { L: 4 }), demand(true)).some(({ check }) => check.startsWith('6.3.2'));
    // √(W fy/M_cr) is 0.32 over 4 m and 0.45 over 8 m: about the plateau of 0.4 (6.3.2.2(4))
    expect(plain).toBe(false);
    const free = rowsOf(memberOf(rhs, { L: 4, free: { start: false, end: true } }), demand(false));
    expect(rowOf(free, '6.3.2').inputs().Lcr ?? rowOf(free, '6.3.2').inputs().L).toBeCloseTo(8, 9);
  });
});
