import { describe, expect, it } from 'vitest';
import { defaultSettings } from '@/lib/model/settings';
import type { Check } from '@/lib/results/result';
import type { ClauseRow } from '../design-code/clause-row';
import { workingFormat } from '../working-format';
import { printer, type WorkingPart } from '../working-parts';
import { demandOf, heb300, ipe300, memberOf, rowOf, rowsOf, shaped } from './hand-made-ec3';
import { ec3Working } from './working-ec3';

const print = printer(workingFormat('metric', 0.9));
const asCheck = (row: ClauseRow): Check => {
  const { inputs, combination, ...rest } = row;
  const verdict = row.ratio === null ? 'not checked' : row.ratio > 1 ? 'over' : 'within';
  return { ...rest, combination, verdict, subjectKind: 'member', subject: 'AB', member: 0, inputs: inputs() };
};
const flat = (parts: readonly WorkingPart[]): string =>
  parts
    .map((part) => {
      if (part.kind === 'fraction') return `(${flat(part.over)})/(${flat(part.under)})`;
      if (part.kind === 'root') return `√(${flat(part.of)})`;
      if (part.kind === 'symbol') return `${part.symbol}${part.sub ? `_${part.sub}` : ''}`;
      return part.text;
    })
    .join(' ');
const textOf = (row: ClauseRow): string =>
  ec3Working(asCheck(row), print)!
    .map((line) => `${line.what}: ${flat(line.parts)} [${line.source ?? ''}]`)
    .join('\n');

const rhs = shaped('rhs', { h: 300, b: 100, t: 12, r: 18 }, 'hot finished');
const chs = shaped('chs', { d: 168.3, t: 8 }, 'hot finished');
const welded = shaped('I', { h: 300, b: 250, tw: 12, tf: 10, r: 0 }, 'welded');

describe('working of EN 1993-1-1', () => {
  it('every row of every clause prints finite numbers from its own inputs', () => {
    const seen = new Set<string>();
    for (const interaction of ['Annex A', 'Annex B'] as const)
      for (const section of [ipe300, heb300, rhs, chs, welded])
        for (const turned of [false, true])
          for (const N of [-5e4, 5e4])
            for (const V of [0, 3e5]) {
              const member = memberOf(section, { turned, L: 12, fy: 235e6 });
              const demand = demandOf({ L: 12, N, M: (part) => 5e3 * 4 * part * (1 - part), V: () => V, loaded: true });
              for (const row of rowsOf(member, demand, { interaction, loadHeight: 'top flange' })) {
                const lines = ec3Working(asCheck(row), print)!;
                expect(lines.length > 0 || row.ratio === null).toBe(true);
                if (row.ratio !== null) seen.add(row.check);
                expect(textOf(row)).not.toMatch(/NaN|undefined|Infinity|null/);
              }
            }
    expect(seen.size).toBe(9);
  });

  it('flexural buckling: λ̄, Φ, χ and N_b,Rd in the order of the standard', () => {
    const text = textOf(rowOf(rowsOf(memberOf(heb300), demandOf({ N: -1e6 })), '6.3.1'));
    for (const symbol of ['N_cr,z =', 'λ̄ =', 'Φ =', 'χ =', 'N_b,Rd =', 'Tables 6.1, 6.2', '(6.49)', '(6.47)']) expect(text).toContain(symbol); // prettier-ignore
  });

  it('torsional buckling prints G It and E Iw', () => {
    const cross = shaped('I', { h: 150, b: 400, tw: 16, tf: 18, r: 0 }, 'welded');
    const text = textOf(rowOf(rowsOf(memberOf(cross, { L: 4, major: 2 }), demandOf({ N: -5e5 })), '6.3.1'));
    expect(text).toContain('N_cr,T');
    expect(text).toContain('I_w');
  });

  it('lateral-torsional buckling prints C1, M_cr, λ̄LT and f', () => {
    const text = textOf(rowOf(rowsOf(memberOf(ipe300), demandOf({ M: (part) => 5e4 * part })), '6.3.2'));
    for (const part of ['C_1 = 1.77', 'M_cr =', 'λ̄_LT =', 'k_c = 0.75', 'χ_LT,mod =', '(6.58)']) expect(text).toContain(part);
  });

  it('a row that was not checked, and a check of another kind, have no working of its own', () => {
    const [refused] = rowsOf(memberOf(ipe300, { fy: null }), demandOf({ N: 1 }), defaultSettings);
    expect(ec3Working({ ...asCheck(refused!), check: 'EN 1993-1-1' }, print)).toEqual([]);
    const check = asCheck(rowOf(rowsOf(memberOf(ipe300), demandOf({ N: -1e5 })), '5.5'));
    expect(ec3Working(check, print)).toEqual([]);
    expect(ec3Working({ ...check, reference: 'AISC 360-22 E3' }, print)).toBeNull();
    expect(ec3Working({ ...check, check: 'stability' }, print)).toBeNull();
    expect(ec3Working({ ...check, check: '6.2.3 tension' }, print)).toEqual([]);
  });

  it('an input that is not there is the caller’s mistake', () => {
    const check = asCheck(rowOf(rowsOf(memberOf(ipe300), demandOf({ N: 1e5 })), '6.2.3'));
    expect(() => ec3Working({ ...check, inputs: {} }, print)).toThrow(RangeError);
  });
});
