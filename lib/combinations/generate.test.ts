import { describe, expect, it, test } from 'vitest';
import { alternativeOf } from '@/lib/combinations/acting';
import { generateCombinations, mostGenerated, sameTerms } from '@/lib/combinations/generate';
import { readRuleSet, ruleSetNames } from '@/lib/combinations/read-rule-set';
import type { RuleSet } from '@/lib/combinations/rule-set';
import { type CaseKind, caseKinds, type LoadCase } from '@/lib/model/frame';

const of = (name: string, kind: CaseKind, more: Partial<LoadCase> = {}): LoadCase => ({
  name, kind, selfWeight: 0, alternative: null, reversible: false, note: null, ...more,
}); // prettier-ignore

function set(text: string): RuleSet {
  const read = readRuleSet(text);
  if (!read.set) throw new Error(read.wrong);
  return read.set;
}

const names = (text: string, cases: readonly LoadCase[], purpose = 'strength') =>
  generateCombinations(cases, set(text)).list.flatMap((each) => (each.purpose === purpose ? [each.name] : []));

/** Seeded: the same cases in every run. */
function* randomCases(count: number): Generator<LoadCase[]> {
  let state = 12345;
  const below = (n: number) => {
    state = (1103515245 * state + 12345) % 2 ** 31;
    return Math.floor((state / 2 ** 31) * n);
  };
  for (let i = 0; i < count; i++)
    yield Array.from({ length: 1 + below(6) }, (_, k) =>
      of(`case ${k}`, caseKinds[below(caseKinds.length)]!, {
        alternative: below(3) === 0 ? `w${below(2)}` : null,
        reversible: below(4) === 0,
      }),
    );
}

describe('a portal under EN 1990 (6.10)', () => {
  const portal = [of('dead', 'dead'), of('snow', 'snow'), of('wind', 'wind')];

  it('has every leading and accompanying action, dead high and low, and nothing twice (worked by hand)', () => {
    expect(names('EN 1990 6.10, snow to 1000 m', portal)).toEqual([
      '1.35 dead',
      '1.35 dead + 1.5 snow',
      '1.35 dead + 1.5 snow + 0.9 wind',
      '1.35 dead + 1.5 wind',
      '1.35 dead + 1.5 wind + 0.75 snow',
      '1.0 dead + 1.5 snow',
      '1.0 dead + 1.5 snow + 0.9 wind',
      '1.0 dead + 1.5 wind',
      '1.0 dead + 1.5 wind + 0.75 snow',
    ]);
  });

  it('has characteristic, frequent and quasi-permanent service combinations (worked by hand)', () => {
    expect(names('EN 1990 6.10, snow to 1000 m', portal, 'service')).toEqual([
      '1.0 dead (characteristic)',
      '1.0 dead + 1.0 snow (characteristic)',
      '1.0 dead + 1.0 snow + 0.6 wind (characteristic)',
      '1.0 dead + 1.0 wind (characteristic)',
      '1.0 dead + 1.0 wind + 0.5 snow (characteristic)',
      '1.0 dead + 0.2 snow (frequent)',
      '1.0 dead + 0.2 wind (frequent)',
    ]);
  });

  it('takes γ, ψ and ξ that are given in place of the recommended ones', () => {
    const own =
      'EN 1990 6.10a/b, gamma G 1.2/0.9, gamma Q 1.6, psi snow 0.8/0.5/0.2, psi wind 0.5/0.2/0, xi 0.9, service quasi-permanent';
    expect(names(own, portal)).toContain('1.08 dead + 1.6 snow + 0.8 wind');
    expect(names(own, portal)).toContain('1.2 dead + 1.28 snow + 0.8 wind');
    expect(names(own, portal)).toContain('0.9 dead + 1.6 wind');
    expect(names(own, portal, 'service')).toEqual(['1.0 dead (quasi-permanent)', '1.0 dead + 0.2 snow (quasi-permanent)']);
  });

  it('takes the largest ψ where nobody gives the category or the site, and says so', () => {
    const { said } = generateCombinations([...portal, of('live', 'live')], set('EN 1990 6.10'));
    expect(said.map((words) => words.split(',')[0])).toEqual([
      'live loads are taken as category E',
      'snow is taken as above 1000 m',
    ]);
    expect(names('EN 1990 6.10', portal)).toContain('1.35 dead + 1.5 wind + 1.05 snow');
    expect(generateCombinations([...portal, of('live', 'live')], set('EN 1990 6.10, live B, snow to 1000 m')).said).toEqual([]);
  });

  it('lets a roof’s imposed load act with neither snow nor wind', () => {
    for (const name of [...names('EN 1990 6.10', [...portal, of('men', 'roof live')]), ...names('EN 1990 6.10a/b, psi roof live 0.7/0/0', [...portal, of('men', 'roof live')])])
      if (name.includes('men')) expect(name).not.toMatch(/snow|wind/);
  }); // prettier-ignore
});

describe('ASCE 7', () => {
  const all = [of('D', 'dead'), of('L', 'live'), of('Lr', 'roof live'), of('S', 'snow'), of('W', 'wind'), of('E', 'seismic')];

  test.each([
    ['ASCE 7-22 LRFD', ['1.4 D', '1.2 D + 1.6 L + 0.3 S', '1.2 D + 1.6 Lr + 0.5 W', '0.9 D + 1.0 W', '1.2 D + 1.0 E + 1.0 L + 0.15 S', '0.9 D + 1.0 E']],
    ['ASCE 7-16 LRFD', ['1.4 D', '1.2 D + 1.6 L + 0.5 S', '1.2 D + 1.6 S + 1.0 L', '0.9 D + 1.0 W', '1.2 D + 1.0 E + 1.0 L + 0.2 S']],
    ['ASCE 7-22 ASD', ['1.0 D', '1.0 D + 0.7 S', '1.0 D + 0.45 W + 0.75 L + 0.525 S', '0.6 D + 0.6 W', '0.6 D + 0.7 E']],
    ['ASCE 7-16 ASD', ['1.0 D', '1.0 D + 1.0 S', '1.0 D + 0.45 W + 0.75 L + 0.75 S', '0.6 D + 0.6 W', '1.0 D + 0.525 E + 0.75 L + 0.75 S']],
  ])('%s holds the standard’s combinations', (text, some) => {
    expect(names(text, all)).toEqual(expect.arrayContaining(some));
  }); // prettier-ignore

  it('takes a crane for a live load, and has no rule for temperature and for other', () => {
    const cases = [of('D', 'dead'), of('crane', 'crane'), of('heat', 'temperature'), of('odd', 'other')];
    expect(names('ASCE 7-22 LRFD', cases)).toContain('1.2 D + 1.6 crane');
    expect(generateCombinations(cases, set('ASCE 7-22 LRFD')).noRule.map(({ name }) => name)).toEqual(['heat', 'odd']);
  });

  it('never has roof live and snow at once', () => {
    for (const name of names('ASCE 7-16 LRFD', all)) expect(/Lr/.test(name) && / S/.test(name)).toBe(false);
  });
});

describe.each(ruleSetNames)('%s', (text) => {
  it('keeps alternatives apart, turns what is reversible, and holds dead high and low, whatever the cases', () => {
    for (const cases of randomCases(150)) {
      const { list, noRule, tooMany } = generateCombinations(cases, set(text));
      if (tooMany !== null) continue;
      expect(list.length).toBeLessThanOrEqual(mostGenerated);
      const strength = list.filter(({ purpose }) => purpose === 'strength');
      expect(new Set(list.map(({ purpose, terms }) => sameTerms(purpose, terms))).size).toBe(list.length);
      expect(new Set(list.map(({ name }) => name)).size).toBe(list.length);
      for (const { terms } of list) {
        const words = terms.map((term) => alternativeOf(cases[term.case]!)).filter((word) => word !== '');
        expect(new Set(words).size).toBe(words.length);
        for (const term of terms) expect(term.factor > 0 || cases[term.case]!.reversible).toBe(true);
      }
      for (const [i, one] of cases.entries()) {
        const factors = strength.flatMap(({ terms }) => terms.flatMap((term) => (term.case === i ? [term.factor] : [])));
        expect(
          factors.length > 0,
          `${one.name} of ${JSON.stringify(cases.map((c) => [c.kind, c.alternative, c.reversible]))}`,
        ).toBe(!noRule.includes(one));
        if (one.reversible) expect(factors.some((f) => f < 0)).toBe(factors.some((f) => f > 0));
      }
      // beside each wind, dead acts high and low, or is not there at all where it is the wind’s alternative
      const dead = cases.flatMap(({ kind }, i) => (kind === 'dead' ? [i] : []));
      for (const wind of cases.flatMap(({ kind }, i) => (kind === 'wind' ? [i] : []))) {
        const beside = strength.filter(({ terms }) => terms.some((term) => term.case === wind && term.factor > 0));
        const sizes = new Set(beside.flatMap(({ terms }) => terms.flatMap((t) => (dead.includes(t.case) ? [Math.abs(t.factor)] : [])))); // prettier-ignore
        if (sizes.size > 0) expect(sizes.size).toBeGreaterThanOrEqual(2);
      }
    }
  });

  it('gives the same list in the same order every time, each with its clause', () => {
    const [cases = []] = randomCases(1);
    const once = generateCombinations(cases, set(text)).list;
    expect(generateCombinations(cases, set(text)).list).toEqual(once);
    expect(once.every(({ clause }) => /^(ASCE 7-(16|22)|EN 1990) /.test(clause))).toBe(true);
  });
});

describe('many cases', () => {
  const winds = Array.from({ length: 12 }, (_, i) => of(`wind ${i}`, 'wind'));

  it('make none rather than some, with how many there would be', () => {
    const made = generateCombinations([of('dead', 'dead'), ...winds], set('EN 1990 6.10'));
    expect(made.list).toEqual([]);
    expect(made.tooMany).toBeGreaterThan(mostGenerated);
  });

  it('are few where they are alternatives, or where a kind acts together', () => {
    const apart = winds.map((each) => ({ ...each, alternative: 'wind' }));
    expect(generateCombinations([of('dead', 'dead'), ...apart], set('ASCE 7-22 LRFD')).tooMany).toBeNull();
    const together = names('ASCE 7-22 LRFD, kinds together', [of('dead', 'dead'), ...winds.slice(0, 2)]);
    expect(together).toEqual(['1.4 dead', '1.2 dead + 1.0 wind 0 + 1.0 wind 1', '0.9 dead + 1.0 wind 0 + 1.0 wind 1']);
  });
});

describe('names', () => {
  it('are never those of a case', () => {
    const list = names('ASCE 7-22 ASD', [of('dead', 'dead'), of('1.0 dead', 'live')]);
    expect(list).toContain('1.0 dead #2');
    expect(list).not.toContain('1.0 dead');
  });
});

test.each([
  ['EN 1990 6.10, live H', /live H/],
  ['EN 1990 6.10, psi wind 2/0/0', /from 0 to 1/],
  ['EN 1990 6.10, psi rain 0.5/0/0', /not of “rain”/],
  ['EN 1990 6.10, gamma G 1.0/1.35', /high\/low/],
  ['EN 1990 6.10, gamma Q 15', /at most 3/],
  ['EN 1990 6.10, xi 0.85', /6\.10a\/b/],
  ['EN 1990 6.10, live A, live B', /twice/],
  ['EN 1990 6.10, service daily', /characteristic/],
  ['ASCE 7-22 LRFD, gamma Q 1.5', /takes no/],
  ['ASCE 7', /no combination set\. Known are ASCE 7-22 LRFD/],
  ['', /no combination set/],
])('the set “%s” is refused with a reason', (text, why) => {
  const read = readRuleSet(text);
  expect(read.set).toBeNull();
  expect(read.wrong).toMatch(why);
});
