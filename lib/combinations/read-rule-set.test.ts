import { describe, expect, it } from 'vitest';
import { readRuleSet } from '@/lib/combinations/read-rule-set';

describe('a combination set as written in Setup', () => {
  it.each([
    ['EN 1990', 'EN 1990 6.10'],
    ['en1990 (6.10a/b), ξ 0.9', 'EN 1990 6.10a/b, xi 0.9'],
    ['EN 1990 6.10; live category b; snow below 1000 m', 'EN 1990 6.10, live B, snow to 1000 m'],
    ['EN 1990 6.10, snow above 1 000 m', 'EN 1990 6.10, snow above 1000 m'],
    ['EN 1990 6.10, ψ wind 0.5/0.2/0', 'EN 1990 6.10, psi wind 0.5/0.2/0'],
    ['EN 1990 6.10, γ G 1.2/0.9, gamma wind 1.4, γQ 1.5', 'EN 1990 6.10, gamma G 1.2/0.9, gamma wind 1.4, gamma Q 1.5'],
    ['EN 1990 6.10, service quasi-permanent and characteristic', 'EN 1990 6.10, service characteristic + quasi-permanent'],
    ['ASCE/SEI 7-22 2.3.1, kinds together', 'ASCE 7-22 LRFD, kinds together'],
    ['EN 1990 6.10,', 'EN 1990 6.10'],
  ])('%s is %s', (typed, name) => {
    const { set, wrong } = readRuleSet(typed);
    expect(wrong).toBeNull();
    expect(set?.name).toBe(name);
    expect(readRuleSet(name).set?.name).toBe(name);
  });

  it.each([
    ['Sheds of the office', 'is no combination set'],
    ['', 'is no combination set'],
    ['ASCE 7-22 LRFD, live B', 'takes no “live B”'],
    ['EN 1990 6.10, wind B', 'says nothing to a set of EN 1990'],
    ['EN 1990 6.10, psi rain 0.5/0.2/0', 'ψ is of live'],
    ['EN 1990 6.10, psi wind 0.5/0.2', 'ψ0, ψ1 and ψ2 are written like'],
    ['EN 1990 6.10, psi wind 0.5//0.2', 'ψ0, ψ1 and ψ2 are written like'],
    ['EN 1990 6.10, psi wind 1.5/0.2/0', 'each from 0 to 1'],
    ['EN 1990 6.10, gamma G 1.35', 'high/low'],
    ['EN 1990 6.10, gamma G 1.0/1.35', 'high/low'],
    ['EN 1990 6.10, gamma Q 4', 'above 0 and at most 3'],
    ['EN 1990 6.10, gamma Q 1.5/1.2', 'one figure'],
    ['EN 1990 6.10, gamma rain 1.5', 'γ is of G, Q'],
    ['EN 1990 6.10a/b, xi 1.2', 'xi is above 0 and at most 1'],
    ['EN 1990 6.10, xi 0.85', 'xi belongs to EN 1990 6.10a/b'],
    ['EN 1990 6.10, service rare', 'service combinations are'],
    ['EN 1990 6.10, live A, live B', 'given twice'],
  ])('“%s” is refused: %s', (typed, sentence) => {
    expect(readRuleSet(typed).wrong).toContain(sentence);
  });

  it('is read the same however many were read before', () => {
    for (let i = 0; i < 250; i += 1) readRuleSet(`no set ${i}`);
    expect(readRuleSet('EN 1990 6.10').set?.name).toBe('EN 1990 6.10');
  });
});
