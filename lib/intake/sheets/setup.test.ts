import { describe, expect, it, test } from 'vitest';
import { lines, readSheets, sound, type TestCell } from '@/lib/intake/sheets-of';
import { defaultSettings } from '@/lib/model/settings';

const withSetup = (...rows: TestCell[][]): ReturnType<typeof sound> => ({
  ...sound(),
  Setup: [['setting', 'value'], ['material', 'S275'], ...rows],
});

describe('Setup', () => {
  it('silent: metric, first order, elastic stress and the defaults, each known as such', () => {
    const { settings, origins } = readSheets(withSetup());
    expect(settings).toEqual({ ...defaultSettings, material: 'S275' });
    expect(origins.stressFactor).toEqual({ source: 'default', cell: null });
    expect(origins.material).toEqual({ source: 'sheet', cell: 'Setup B2' });
  });

  it('wins over the office, and the office over the default', () => {
    const { settings, origins } = readSheets(withSetup(['near limit', 0.95]), {
      office: { nearLimit: 0.8, deflectionRatio: 300 },
    });
    expect(settings).toMatchObject({ nearLimit: 0.95, deflectionRatio: 300 });
    expect([origins.nearLimit.source, origins.deflectionRatio.source, origins.swayRatio.source]).toEqual([
      'sheet',
      'office',
      'default',
    ]);
  });

  it('reads every setting', () => {
    const { settings, problems } = readSheets(
      withSetup(
        ['Title', 'Sheds'],
        ['STRESS-FACTOR', '0.66'],
        ['deflection ratio', 'L/250'],
        ['sway ratio', 'none'],
        ['stability', 'By Others'],
      ),
    );
    expect(settings).toMatchObject({
      title: 'Sheds',
      stressFactor: 0.66,
      deflectionRatio: 250,
      swayRatio: 'none',
      stability: 'by others',
    });
    expect(problems.filter((p) => p.severity === 'error')).toEqual([]);
  });

  test.each([
    'analysis|first order',
    'strength check|elastic stress',
    'imperfections|none',
    'stiffness reduction|none',
    'shear deformation|no',
    'combination set|none',
    'imperfections|No',
    'stiffness reduction|no',
    'shear deformation|none',
    'combination set|no',
    'combination set|As listed',
    'sway ratio|no',
    'deflection ratio|none',
  ])('%s means off and is never refused', (text) => {
    expect(lines(readSheets(withSetup(text.split('|'))))).toEqual([]);
  });

  it('none in the sheet is the sheet’s word, and wins over the office', () => {
    const { settings, origins } = readSheets(withSetup(['combination set', 'none'], ['sway ratio', 'no']), {
      office: { combinationSet: 'EN 1990', swayRatio: 150 },
    });
    expect(settings).toMatchObject({ combinationSet: null, swayRatio: 'none' });
    expect([origins.combinationSet.source, origins.swayRatio.source]).toEqual(['sheet', 'sheet']);
  });

  test.each([
    ['L/250', 250],
    ['1/300', 300],
    ['h / 150', 150],
  ])('the ratio %s is %d', (typed, n) => {
    expect(readSheets(withSetup(['deflection ratio', typed])).settings.deflectionRatio).toBe(n);
  });

  test.each([
    ['strength check|AISC 360-22 LRFD', { strengthCheck: 'AISC 360-22 LRFD' }],
    ['strength check|aisc 360-22 asd', { strengthCheck: 'AISC 360-22 ASD' }],
    ['strength check|EN 1993-1-1', { strengthCheck: 'EN 1993-1-1' }],
    ['gamma M0|1.05', { gammaM0: 1.05 }],
    ['Gamma_M1|1,1', { gammaM1: 1.1 }],
    ['national annex|DIN EN 1993-1-1/NA', { nationalAnnex: 'DIN EN 1993-1-1/NA' }],
    ['interaction|annex a', { interaction: 'Annex A' }],
    ['load height|Top flange', { loadHeight: 'top flange' }],
  ])('%s is read as a setting of design codes', (text, expected) => {
    const intake = readSheets(withSetup(text.split('|')));
    expect(intake.settings).toMatchObject(expected);
    expect(intake.frames.every((f) => f.frame !== null)).toBe(true);
  });

  test.each([
    ['strength check|EN 1993-1-3', 'unknown-word'],
    ['gamma M0|0', 'not-positive'],
    ['gamma M1|-1', 'not-positive'],
    ['interaction|Annex C', 'unknown-word'],
    ['load height|on top', 'unknown-word'],
  ])('%s is refused at its cell and stops every frame', (text, code) => {
    const intake = readSheets(withSetup(text.split('|')));
    expect(lines(intake).filter((each) => each.startsWith('error'))).toEqual([`error ${code} Setup!B3 –`]);
    expect(intake.frames.map((f) => f.frame)).toEqual([null, null]);
  });

  test.each([
    ['analysis|Second-order', { analysis: 'second order' }],
    ['imperfections|EN 1993-1-1', { imperfections: 'EN 1993-1-1' }],
    ['imperfections|aisc 360', { imperfections: 'AISC 360' }],
    ['stiffness reduction|AISC 360', { stiffnessReduction: 'AISC 360' }],
    ['shear deformation|Yes', { shearDeformation: true }],
    ['shear deformation|1', { shearDeformation: true }],
  ])('%s is read, and every frame runs', (text, expected) => {
    const analysis = text.startsWith('analysis') ? [] : [['analysis', 'second order']];
    const intake = readSheets(withSetup(...analysis, text.split('|')));
    expect(intake.settings).toMatchObject(expected);
    expect(lines(intake)).toEqual([]);
    expect(intake.frames.every((f) => f.frame !== null)).toBe(true);
  });

  it('says so where imperfections or a reduction meet an analysis that nobody chose', () => {
    const chosen = [['imperfections', 'EN 1993-1-1'], ['stiffness reduction', 'AISC 360']]; // prettier-ignore
    const intake = readSheets(withSetup(...chosen));
    expect(lines(intake)).toEqual(['note default-used Setup!B3 –', 'note default-used Setup!B4 –']);
    expect(intake.problems[0]?.message).toContain('imperfections act in a first-order analysis');
    expect(lines(readSheets(withSetup(...chosen, ['analysis', 'second order'])))).toEqual([]);
  });

  test.each([
    ['EN 1990 6.10', 'EN 1990 6.10'],
    ['en 1990', 'EN 1990 6.10'],
    ['EN-1990 6.10a/b, LIVE b, snow to 1000 m', 'EN 1990 6.10a/b, live B, snow to 1000 m'],
    ['ASCE 7-22 LRFD', 'ASCE 7-22 LRFD'],
    ['asce 7-16 asd; kinds together', 'ASCE 7-16 ASD, kinds together'],
  ])('the combination set %s is read as %s', (typed, name) => {
    expect(readSheets(withSetup(['combination set', typed])).settings.combinationSet).toBe(name);
  });

  test.each<[string, TestCell[][], string[]]>([
    ['a combination set that nobody published', [['combination set', 'EN 1991']], ['error unknown-word Setup!B3 –']],
    ['a set with a word that it does not know', [['combination set', 'EN 1990 6.10, live Z']], ['error unknown-word Setup!B3 –']],
    ['a value that is none', [['analysis', 'third order']], ['error unknown-word Setup!B3 –']],
    ['a stress factor of zero', [['stress factor', 0]], ['error not-positive Setup!B3 –']],
    ['a stress factor above 1', [['stress factor', 1.5]], ['error out-of-range Setup!B3 –']],
    ['a near limit that is a word', [['near limit', 'high']], ['error not-a-number Setup!B3 –']],
    ['an error value', [['near limit', { error: '#N/A' }]], ['error error-value Setup!B3 –']],
    [
      'a setting twice with one value',
      [
        ['near limit', 0.9],
        ['Near-limit', 0.9],
      ],
      ['warning repeated-row Setup!B4 –'],
    ],
    [
      'a setting twice with two values',
      [
        ['near limit', 0.9],
        ['near limit', 0.8],
      ],
      ['error conflicting-row Setup!B4 –'],
    ],
    ['a setting nobody knows', [['colour', 'red']], ['warning near-miss-column Setup!A3 –']],
  ])('%s', (_, rows, problems) => {
    const intake = readSheets(withSetup(...rows));
    expect(lines(intake)).toEqual(problems);
    const stopped = problems.some((p) => p.startsWith('error'));
    expect(intake.frames.every((f) => (f.frame === null) === stopped)).toBe(true);
  });

  it('a blank value is silence', () => {
    expect(readSheets(withSetup(['near limit', null])).origins.nearLimit.source).toBe('default');
  });

  it('a material that is nowhere is told at Setup, for the frames that lean on it', () => {
    const sheets = {
      ...sound(),
      Setup: [
        ['setting', 'value'],
        ['material', 'S27S'],
      ],
    };
    expect(lines(readSheets(sheets))).toEqual(['error unknown-material Setup!B2 F1,F2']);
  });
});
