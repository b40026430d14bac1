import { describe, expect, it } from 'vitest';
import { generateCombinations, sameTerms } from '@/lib/combinations/generate';
import { type OfficeSet, officeRuleSet, rulesOf } from '@/lib/combinations/office-set';
import { readRuleSet, ruleSetNames } from '@/lib/combinations/read-rule-set';
import { caseKinds, type LoadCase } from '@/lib/model/frame';

const cases: LoadCase[] = caseKinds.map((kind) => ({
  name: kind, kind, selfWeight: kind === 'dead' ? 1 : 0, alternative: null, reversible: kind === 'wind', note: null,
})); // prettier-ignore

const set = (more: Partial<OfficeSet> = {}): OfficeSet => ({
  name: 'Sheds', basedOn: null, level: 'factored', together: false, rules: [], provenance: 'the office’s handbook', ...more,
}); // prettier-ignore

const of = (rules: OfficeSet['rules'], some = cases) => {
  const read = officeRuleSet(set({ rules }));
  if (read.set === null) throw new Error(read.wrong.map(({ sentence }) => sentence).join());
  return generateCombinations(some, read.set).list;
};

describe('an office’s own set', () => {
  it.each(ruleSetNames)('begun from %s makes the very same combinations as that', (name) => {
    const published = readRuleSet(name).set;
    if (published === null) throw new Error('no set');
    const terms = (list: readonly { purpose: string; terms: Parameters<typeof sameTerms>[1] }[]) =>
      list.map((each) => sameTerms(each.purpose, each.terms)).sort();
    expect(terms(of(rulesOf(name)))).toEqual(terms(generateCombinations(cases, published).list));
  });

  it('tells γ and ψ apart where EN 1990 does', () => {
    expect(rulesOf('EN 1990 6.10, live B, snow to 1000 m').map(({ rule }) => rule)).toContain(
      '1.35/1.0 dead + 1.5 live + [1.5×0.5 snow] + [1.5×0.6 wind] + [1.35 crane] + [1.5×0.6 temperature]',
    );
  });

  it('makes what its rule says: high and low, the accompanying action there or not, the suffix in the name', () => {
    const names = of([
      { from: 'handbook 2', purpose: 'strength', suffix: '', rule: '1.35/1.0 dead + 1.5 snow + [1.5×0.6 wind]' },
      { from: 'handbook 3', purpose: 'service', suffix: 'imposed alone', rule: '1.0 live' },
    ]).map(({ name, clause }) => `${name}; ${clause}`);
    expect(names).toEqual([
      '1.35 dead + 1.5 snow; handbook 2',
      '1.35 dead + 1.5 snow + 0.9 wind; handbook 2',
      '1.35 dead + 1.5 snow − 0.9 wind; handbook 2',
      '1.0 dead + 1.5 snow; handbook 2',
      '1.0 dead + 1.5 snow + 0.9 wind; handbook 2',
      '1.0 dead + 1.5 snow − 0.9 wind; handbook 2',
      '1.0 live (imposed alone); handbook 3',
    ]);
  });

  it('tells every rule that cannot be read', () => {
    const bad = { from: 'x', purpose: 'strength', suffix: '', rule: '1.5 storm' } as const;
    const { wrong } = officeRuleSet(set({ rules: [bad, { ...bad, rule: '1.0 dead' }, { ...bad, rule: 'dead' }] }));
    expect(wrong.map(({ rule }) => rule)).toEqual([0, 2]);
    expect(() => rulesOf('no set')).toThrow(RangeError);
  });
});

describe('sets of very many cases', () => {
  it('are counted and not made, before memory would run out', () => {
    const many: LoadCase[] = Array.from({ length: 20 }, (_, i) => ({
      name: `L${i}`, kind: 'live', selfWeight: 0, alternative: null, reversible: false, note: null,
    })); // prettier-ignore
    const { set: rules } = officeRuleSet(set({ rules: [{ from: 'x', purpose: 'strength', suffix: '', rule: '1.5 live' }] }));
    if (!rules) throw new Error('no rules');
    expect(generateCombinations(many, rules)).toMatchObject({ list: [], tooMany: 2 ** 20 - 1 });
  });
});
