import { describe, expect, it } from 'vitest';
import { lines, readSheets, sound, type TestCell, type TestSheets } from '@/lib/intake/sheets-of';

/** The sound sheets with a rule set, these load cases and these combinations. */
function withSet(set: string, cases: TestCell[][], combinations: TestCell[][] = []): TestSheets {
  const sheets: TestSheets = sound();
  sheets['Setup']?.push(['combination set', set], ['stress factor', 1]);
  sheets['Load cases'] = [['case', 'kind', 'self weight', 'alternative', 'reversible', 'frame'], ...cases];
  if (combinations.length === 0) delete sheets['Combinations'];
  else sheets['Combinations'] = [['combination', 'purpose', 'dead', 'wind'], ...combinations];
  return sheets;
}

const usual: TestCell[][] = [
  ['dead', 'dead', 1, null, null, null],
  ['wind', 'wind', null, null, 'yes', null],
];

const names = (sheets: TestSheets, frame = 0) => readSheets(sheets).frames[frame]?.frame?.combinations.map(({ name }) => name);

describe('a combination set chosen in Setup', () => {
  it('makes each frame’s combinations where none is listed', () => {
    const intake = readSheets(withSet('ASCE 7-22 LRFD', usual));
    expect(intake.frames[0]?.frame?.combinations.map(({ name, purpose }) => `${purpose}: ${name}`)).toEqual([
      'strength: 1.4 dead',
      'strength: 1.2 dead + 1.0 wind',
      'strength: 1.2 dead − 1.0 wind',
      'strength: 0.9 dead + 1.0 wind',
      'strength: 0.9 dead − 1.0 wind',
      'service: 1.0 dead (service)',
      'service: 1.0 dead + 1.0 wind (service)',
      'service: 1.0 dead − 1.0 wind (service)',
    ]);
    expect(intake.frames[0]?.frame?.notChecked).toEqual([]);
    expect(lines(intake)).toEqual(['note default-used Setup!B5 –']);
    expect(intake.problems[0]?.message).toBe('ASCE 7-22 LRFD: service combinations hold snow and wind in full');
  });

  it('stands after the listed ones, and adds none that is listed already by its factors', () => {
    const listed: TestCell[][] = [['mine', 'strength', 1.4, null], ['other', 'strength', 2, 1]]; // prettier-ignore
    expect(names(withSet('ASCE 7-22 LRFD', usual, listed))?.slice(0, 4)).toEqual([
      'mine',
      'other',
      '1.2 dead + 1.0 wind',
      '1.2 dead − 1.0 wind',
    ]);
  });

  it('gives way to a listed combination of the same name, and says so at its cell', () => {
    const intake = readSheets(withSet('ASCE 7-22 LRFD', usual, [['1.4 dead', 'strength', 1.5, null]]));
    const own = intake.frames[0]?.frame?.combinations.filter(({ name }) => name === '1.4 dead');
    expect(own).toEqual([{ name: '1.4 dead', purpose: 'strength', terms: [{ case: 0, factor: 1.5 }] }]);
    expect(lines(intake)).toContain('note default-used Combinations!A2 F1,F2');
  });

  it('makes of each frame only what its own cases give', () => {
    const own = withSet('ASCE 7-22 LRFD', [['dead', 'dead', 1, null, null, null], ['wind', 'wind', null, null, null, 'F2']]); // prettier-ignore
    expect(names(own, 0)).toEqual(['1.4 dead', '1.0 dead (service)']);
    expect(names(own, 1)).toContain('0.9 dead + 1.0 wind');
  });

  it('never passes a frame whose case has a kind without a rule', () => {
    const { frames } = readSheets(withSet('EN 1990 6.10', [...usual, ['odd', 'other', null, null, null, null]]));
    expect(frames[0]?.frame?.notChecked).toEqual([
      'case odd is in no generated combination: EN 1990 6.10 has no rule for kind other',
    ]);
    expect(frames[0]?.frame?.combinations.some(({ terms }) => terms.some((term) => term.case === 2))).toBe(false);
  });

  it('is told at its cell where it would make too many, and stops those frames', () => {
    const many = Array.from({ length: 9 }, (_, i): TestCell[] => [`wind ${i}`, 'wind', null, null, 'yes', null]);
    const sheets = withSet('EN 1990 6.10', [...usual, ...many]);
    const intake = readSheets(sheets);
    expect(lines(intake)).toEqual(['error out-of-range Setup!B5 F1,F2']);
    expect(intake.frames.map(({ frame }) => frame)).toEqual([null, null]);
    const apart = readSheets(withSet('EN 1990 6.10', [['dead', 'dead', 1], ['wind', 'wind', null, 'w'], ...many.map((row) => [row[0]!, 'wind', null, 'W ', 'yes', null])])); // prettier-ignore
    expect(apart.frames.every(({ frame }) => frame !== null)).toBe(true);
  });

  it('a limit may name a generated service combination', () => {
    const sheets = withSet('ASCE 7-22 LRFD', usual);
    sheets['Limits'] = [['applies to', 'measure', 'ratio', 'combination'], ['AB', 'deflection', 360, '1.0 dead (service)']]; // prettier-ignore
    const { frames } = readSheets(sheets);
    expect(frames[0]?.frame?.limits.map(({ combination }) => combination)).toContain('1.0 dead (service)');
  });

  it('keeps unfactored loads away from a check against factored ones', () => {
    const { strengthCheck } = readSheets(withSet('ASCE 7-22 ASD', usual)).settings;
    expect(strengthCheck).toBe('elastic stress');
    const office = { strengthCheck: 'AISC 360-22 LRFD' } as const;
    const sheets = withSet('ASCE 7-22 ASD', usual);
    const intake = readSheets(sheets, { office });
    expect(lines(intake)).toContain('error conflicting-row Setup!B5 –');
    expect(intake.frames.every(({ frame }) => frame === null)).toBe(true);
    const twice = readSheets(withSet('EN 1990', usual), { office: { strengthCheck: 'AISC 360-22 ASD' } });
    expect(lines(twice)).toContain('warning stress-factor Setup!B5 –');
  });

  it('without any combination is not checked', () => {
    const { frames } = readSheets(withSet('EN 1990 6.10', [['dead', 'other', 1], ['wind', 'other', null]])); // prettier-ignore
    expect(frames[0]?.frame?.notChecked).toContain('no combinations');
  });
});
