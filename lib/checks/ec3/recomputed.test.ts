/**
 * Members worked by hand from the clauses' formulas, properties included (sharp corners and fillets integrated; It of a
 * welded I Σbt³/3, of a tube by EN 10210-2 annex A), apart from the code under test. S355, E = 210 GPa, G = 81 GPa, γ = 1.
 */
import { describe, expect, it } from 'vitest';
import { demandOf, ipe300, memberOf, rowOf, rowsOf, shaped } from './hand-made-ec3';

const even = (M: number) => (): number => M;
const kN = 1e3;
const close = (found: number | null | undefined, value: number, relative = 1e-3): void =>
  expect(Math.abs(found! / value - 1), `${found} against ${value}`).toBeLessThan(relative);

describe('members worked by hand', () => {
  it.each([
    [0.6, 221.11],
    [0.8, 205.459],
    [0.95, 183.45],
  ])('6.2.8: IPE 300 sheared to %s of V_pl = 526.37 kN carries %s kN·m (6.29), (6.30)', (part, MV) => {
    const V = part * 526.3708 * kN;
    const row = rowOf(rowsOf(memberOf(ipe300), demandOf({ M: even(50e3), V: even(V) })), '6.2.8');
    close(row.limit, MV * kN);
    close(row.ratio, 50 / MV);
  });

  it('6.2.8: RHS 200×100×8 at 0.75 V_pl = 454.41 kN: ρ = 0.25, 0.75 × 98.78 = 74.08 kN·m; Av = Ah/(b + h)', () => {
    const rhs = shaped('rhs', { h: 200, b: 100, t: 8, r: 12 }, 'hot finished');
    const rows = rowsOf(memberOf(rhs), demandOf({ M: even(20e3), V: even(0.75 * 605.8767 * kN) }));
    close(rowOf(rows, '6.2.6').limit, 605.877 * kN);
    close(rowOf(rows, '6.2.8').limit, 74.083 * kN);
  });

  it('a channel 200×90×7×14, r 12: 1344.0 kN, 314.0 kN, 103.40 kN·m; in compression and sideways it is not checked', () => {
    const pfc = shaped('channel', { h: 200, b: 90, tw: 7, tf: 14, r: 12 });
    const rows = rowsOf(memberOf(pfc), demandOf({ N: 1e5, M: even(10e3), V: even(10e3) }));
    close(rowOf(rows, '6.2.3').limit, 1343.961 * kN);
    close(rowOf(rows, '6.2.5').limit, 103.405 * kN);
    close(rowOf(rows, '6.2.6').limit, 313.958 * kN);
    expect(rowOf(rows, '6.3.2').ratio).toBeNull();
    expect(rowOf(rowsOf(memberOf(pfc), demandOf({ N: -1e5 })), '6.3.1').ratio).toBeNull();
  });

  it.each([
    ['hot finished', 928.761, 1.44987, 1.07535],
    ['cold formed', 759.409, 1.5502, 1.24913],
  ] as const)('6.3.3: SHS 150×6.3 %s, 4 m, 600 kN and 20 kN·m even: N_b %s kN, k_yy %s, (6.61) %s', (made, Nb, k, ratio) => {
    const shs = shaped('rhs', { h: 150, b: 150, t: 6.3, r: 9.45 }, made);
    const rows = rowsOf(memberOf(shs, { L: 4 }), demandOf({ L: 4, N: -600e3, M: even(20e3) }));
    close(rowOf(rows, '6.3.1').limit, Nb * kN);
    const row = rowOf(rows, '6.3.3');
    close(row.inputs().k61 as number, k);
    close(row.ratio, ratio);
  });

  it.each([
    ['hot finished', 1028.236, 1.35135, 0.7638],
    ['cold formed', 838.17, 1.43102, 0.89043],
  ] as const)('6.3.3: CHS 168.3×8 %s, 4 m, 500 kN and 15 kN·m even: N_b %s kN, k_yy %s, (6.61) %s', (made, Nb, k, ratio) => {
    const chs = shaped('chs', { d: 168.3, t: 8 }, made);
    const rows = rowsOf(memberOf(chs, { L: 4 }), demandOf({ L: 4, N: -500e3, M: even(15e3) }));
    close(rowOf(rows, '6.3.1').limit, Nb * kN);
    const row = rowOf(rows, '6.3.3');
    close(row.inputs().k61 as number, k);
    close(row.ratio, ratio);
  });

  it('6.3.2.2: RHS 300×100×8 over 40 m, even moment: λ̄LT 1.0163, curve d, 87.95 kN·m', () => {
    const rhs = shaped('rhs', { h: 300, b: 100, t: 8, r: 12 }, 'hot finished');
    const row = rowOf(rowsOf(memberOf(rhs, { L: 40 }), demandOf({ L: 40, M: even(10e3) })), '6.3.2');
    close(row.limit, 87.953 * kN, 2e-3);
  });

  it('a welded I 300×250×10×16, 5 m, 800 kN and 60 kN·m even: curves b, c, c; 6.3.1, 6.3.2.3, (6.61), (6.62)', () => {
    const welded = shaped('I', { h: 300, b: 250, tw: 10, tf: 16, r: 0 }, 'welded');
    const rows = rowsOf(memberOf(welded, { L: 5 }), demandOf({ L: 5, N: -800e3, M: even(60e3), V: even(20e3) }));
    close(rowOf(rows, '6.2.6').limit, 549.291 * kN);
    const flexural = rowOf(rows, '6.3.1');
    close(flexural.limit, 1944.816 * kN);
    expect(flexural.inputs()).toMatchObject({ axis: 'z', curve: 'c' });
    close(rowOf(rows, '6.3.2').limit, 347.509 * kN, 2e-3);
    const row = rowOf(rows, '6.3.3');
    close(row.inputs().k61 as number, 1.07367);
    close(row.inputs().k62 as number, 0.945153);
    close(row.ratio, 0.574538);
  });
});
