import { describe, expect, it } from 'vitest';
import { readRule, ruleText } from '@/lib/combinations/rule-text';

const again = (text: string): string => {
  const { parts } = readRule(text);
  return parts ? ruleText(parts) : '';
};

describe('a rule of an office’s own set', () => {
  it('has factors high and low on what is dead, a leading action, and one that accompanies', () => {
    expect(readRule('1.35/1.0 dead + 1.5 live + [1.5×0.6 wind]').parts).toEqual({
      dead: { high: 1.35, low: 1 },
      terms: [
        { kinds: ['live'], gamma: 1.5, psi: 1, leading: true },
        { kinds: ['wind'], gamma: 1.5, psi: 0.6, leading: false },
      ],
    });
  });

  it.each([
    ['1.2 Dead + 1.6 live and crane +[0.5 roof  live]', '1.2 dead + 1.6 live and crane + [0.5 roof live]'],
    ['1,35 / 1 dead + 1,5 * 0,5 snow', '1.35/1.0 dead + 1.5×0.5 snow'],
    ['1 live', '1.0 live'],
    ['0.9 dead + 1.5 · 0.7 other', '0.9 dead + 1.5×0.7 other'],
  ])('%s is written %s', (typed, written) => {
    expect(again(typed)).toBe(written);
    expect(again(written)).toBe(written);
  });

  it.each([
    ['', 'Write the rule'],
    ['1.35 gravity', '“gravity” is no kind of load case'],
    ['dead + live', '“dead” is no term'],
    ['[1.0 dead] + 1.5 live', 'What is dead always acts'],
    ['1.0 dead + 1.2 dead', 'What is dead stands once'],
    ['1.0/1.35 dead', 'high/low'],
    ['1.0/1.0 dead', 'high/low'],
    ['1.35/0 dead', 'above 0'],
    ['1.35 dead + 1.5 live + [1.0 live]', 'live stands twice'],
    ['1.5 live and live', 'A kind stands once'],
    ['1.5×11 live', 'above 0 and at most 10'],
    ['1.35 dead +', '“” is no term'],
    ['1.35 dead - 1.5 wind', 'is no term'],
  ])('“%s” is refused: %s', (text, sentence) => {
    expect(readRule(text).wrong).toContain(sentence);
  });
});
