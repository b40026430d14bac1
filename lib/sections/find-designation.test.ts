import { describe, expect, it } from 'vitest';
import { findDesignation } from './find-designation';
import { designationsOf, rangeNames } from './library';

const found = (text: string): string | null => {
  const result = findDesignation(text);
  return 'section' in result ? result.section.designation : null;
};
const suggested = (text: string): string | null => {
  const result = findDesignation(text);
  return 'section' in result ? 'found' : result.suggestion;
};

describe('an ASTM shape is found by its metric label', () => {
  // AISC Shapes Database v15.0, its column of metric labels
  it.each([
    ['W310X38.7', 'W12X26'], ['W310x39', 'W12X26'], ['310 x 38.7 W', 'W12X26'], ['W 200x46.1', 'W8X31'], ['W200X46', 'W8X31'],
    ['HP310X79', 'HP12X53'], ['S310X47.3', 'S12X31.8'], ['C310x31', 'C12X20.7'], ['MC460X63.5', 'MC18X42.7'],
  ])('%s is %s', (text, designation) => expect(found(text)).toBe(designation)); // prettier-ignore

  it('and says so; a whole mass that two shapes share is none', () => {
    expect(findDesignation('W310x39')).toMatchObject({ note: 'W12X26, whose metric label is W310X38.7' });
    expect(findDesignation('W12x26')).toMatchObject({ note: null });
    expect(found('W310X40')).toBeNull();
  });
});

describe('a library designation is found however it is typed', () => {
  it.each([
    ['IPE300', 'IPE 300'], ['ipe 300', 'IPE 300'], [' IPE-300 ', 'IPE 300'], ['IPE A 300', 'IPE A 300'], ['IPEA300', 'IPE A 300'],
    ['IPE 300 A', 'IPE A 300'], ['IPE AA 180', 'IPE AA 180'], ['IPE O 330', 'IPE O 330'],
    ['HEA 300', 'HE 300 A'], ['HE 300 A', 'HE 300 A'], ['HE300A', 'HE 300 A'], ['he a 300', 'HE 300 A'], ['HE-B 240', 'HE 240 B'],
    ['UB 305x165x40', 'UB 305x165x40'], ['305 x 165 x 40 UB', 'UB 305x165x40'], ['305×165×40UB', 'UB 305x165x40'], ['UB305X165X40', 'UB 305x165x40'],
    ['W12X26', 'W12X26'], ['w 12 x 26', 'W12X26'], ['W6×8.5', 'W6X8.5'],
    ['HEM 300', 'HE 300 M'], ['HE 300 M', 'HE 300 M'], ['HEAA 200', 'HE 200 AA'], ['HE200AA', 'HE 200 AA'],
    ['UC 305x305x97', 'UC 305x305x97'], ['305x305x97 UC', 'UC 305x305x97'], ['UKC 305x305x97', 'UC 305x305x97'], ['457x191x67 UKB', 'UB 457x191x67'],
    ['upn200', 'UPN 200'], ['UNP 200', 'UPN 200'], ['UPE-200', 'UPE 200'], ['PFC 200x75x23', 'PFC 200x75x23'], ['200 x 75 x 23 PFC', 'PFC 200x75x23'],
    ['HFRHS 200x100x6.3', 'HFRHS 200x100x6.3'], ['rhs 200 x 100 x 6,3 hf', 'HFRHS 200x100x6.3'], ['CF SHS 100x100x5', 'CFSHS 100x100x5'],
    ['HFCHS 273.0x10', 'HFCHS 273x10'], ['C15X50', 'C15X50'], ['mc 18 x 42.7', 'MC18X42.7'], ['S24x121', 'S24X121'], ['HP14X117', 'HP14X117'],
    ['HSS 8 x 4 x 1/4', 'HSS8X4X1/4'], ['HSS8X4X.25', 'HSS8X4X1/4'], ['HSS8x4x0.250', 'HSS8X4X1/4'], ['HSS 3 1/2 x 2-1/2 x 3/16', 'HSS3-1/2X2-1/2X3/16'],
    ['HSS 3½ X 2½ X ⅜', 'HSS3-1/2X2-1/2X3/8'], ['HSS6X6X5/16', 'HSS6X6X5/16'], ['HSS6X6X.313', 'HSS6X6X5/16'], ['HSS6X6X0.312', 'HSS6X6X5/16'],
    ['HSS 10 x 0.312', 'HSS10.000X0.312'], ['HSS10X5/16', 'HSS10.000X0.312'], ['HSS10.000X0.188', 'HSS10.000X0.188'], ['pipe 3 1/2 std', 'Pipe3-1/2STD'], ['Pipe8XXS', 'Pipe8XXS'],
  ])('%s is %s', (typed, designation) => expect(found(typed)).toBe(designation)); // prettier-ignore

  it('no designation of any range hides another', () => {
    for (const range of rangeNames) for (const designation of designationsOf(range)) expect(found(designation)).toBe(designation);
  });

  it('says that its properties come from the library and that it is rolled', () => {
    const result = findDesignation('IPE 300');
    if (!('section' in result)) throw new Error('IPE 300 is not found');
    expect(result.section).toMatchObject({ name: 'IPE 300', shape: 'I', made: 'rolled', sources: { I_m4: 'library' } });
    expect(result.section.sources.AvTyped_m2).toBeUndefined();
  });
});

describe('a hollow section typed without how it is made', () => {
  const note = (text: string): string | null => {
    const result = findDesignation(text);
    return 'section' in result ? result.note : 'not found';
  };

  it('is the cold formed one, whose properties are the smaller, and says which the other is', () => {
    for (const typed of ['RHS 200x100x8', 'rhs 200 x 100 x 8']) {
      expect(found(typed)).toBe('CFRHS 200x100x8');
      expect(note(typed)).toContain('HFRHS 200x100x8 is the hot finished one');
    }
    expect(found('SHS 100x5')).toBe('CFSHS 100x100x5');
    expect(found('RHS 100x100x5')).toBe('CFSHS 100x100x5');
    expect(found('CHS 114.3x5')).toBe('CFCHS 114.3x5');
  });

  it('is the hot finished one where no other is held', () => {
    for (const wall of ['6.3', '7.1']) expect(found(`RHS 200x100x${wall}`)).toBe(`HFRHS 200x100x${wall}`);
    expect(note('RHS 200x100x7.1')).toBe('HFRHS 200x100x7.1, hot finished (EN 10210-2)');
  });

  it('has nothing to be said of where it is typed in full', () => expect(note('HFRHS 200x100x6.3')).toBeNull());
});

describe('a near miss suggests, and nothing is guessed', () => {
  it.each([
    ['IPE 310', 'IPE 300'], ['HEA 310', 'HE 320 A'], ['W12X27', 'W12X26'], ['UB 305x165x41', 'UB 305x165x40'],
    ['305x165x40', 'UB 305x165x40'], ['IPR 300', 'IPE 300'], ['UC 305x305x98', 'UC 305x305x97'], ['HEM 310', 'HE 320 M'], ['UPN 210', 'UPN 220'], ['IPN 200', null], ['WT5X6', null],
    ['RHS 200x100x6.4', 'HFRHS 200x100x6.3'], ['HSS8X4X9/32', 'HSS8X4X5/16'],
    ['IPE 24O', 'IPE 240'], ['IPE 3OO', 'IPE 300'], ['HEA 2OO', 'HE 200 A'], ['lPE 300', 'IPE 300'], ['W12X2G', 'W12X26'],
    ['beam', null], ['', null], ['300', null],
  ])('%s suggests %s', (typed, suggestion) => expect(suggested(typed)).toBe(suggestion)); // prettier-ignore
});

/**
 * Published values, as printed. EN 10365 rows: A cm², Iy Iz cm⁴, Wel,y Wel,z Wpl,y Wpl,z cm³, It cm⁴, Iw cm⁶.
 * IPE and HE: mill catalogue of EN 10365 sections; UB: national section tables to EN 10365.
 * W: AISC Shapes Database v15.0, in inches (A Ix Iy Sx Sy Zx Zy J Cw).
 */
type Row = readonly [string, number, number, number, number, number, number, number, number, number];
const european: readonly Row[] = [
  ['IPE 80', 7.64, 80.14, 8.49, 20.03, 3.69, 23.2, 5.82, 0.7, 120],
  ['IPE A 160', 16.18, 689.3, 54.43, 87.81, 13.27, 99.09, 20.7, 1.96, 3090],
  ['IPE 200', 28.48, 1943, 142.4, 194.3, 28.47, 220.6, 44.61, 6.98, 13000],
  ['IPE 300', 53.81, 8356, 603.8, 557.1, 80.5, 628.4, 125.2, 20.12, 126000],
  ['IPE O 330', 72.62, 13910, 960.4, 833, 118.6, 942.8, 185, 42.15, 246000],
  ['IPE 450', 98.82, 33740, 1676, 1500, 176.4, 1702, 276.4, 66.87, 791000],
  ['IPE A 500', 101.1, 42930, 1939, 1728, 193.9, 1946, 301.6, 62.78, 1125000],
  ['IPE 600', 156, 92080, 3387, 3069, 307.9, 3512, 485.6, 165.4, 2846000],
  ['HE 100 A', 21.2, 349.2, 133.8, 72.76, 26.76, 83.01, 41.14, 5.24, 2580],
  ['HE 200 A', 53.8, 3692, 1336, 388.6, 133.6, 429.5, 203.8, 20.98, 108000],
  ['HE 300 A', 112.5, 18260, 6310, 1260, 420.6, 1383, 641.2, 85.17, 1200000],
  ['HE 450 A', 178, 63720, 9465, 2896, 631, 3216, 965.5, 243.8, 4148000],
  ['HE 650 A', 241.6, 175200, 11720, 5474, 781.6, 6136, 1205, 448.3, 11030000],
  ['HE 1000 A', 346.8, 553800, 14000, 11190, 933.6, 12820, 1470, 822.4, 32070000],
  ['HE 100 B', 26, 449.5, 167.3, 89.91, 33.45, 104.2, 51.42, 9.25, 3380],
  ['HE 200 B', 78.1, 5696, 2003, 569.6, 200.3, 642.5, 305.8, 59.28, 171100],
  ['HE 300 B', 149.1, 25170, 8563, 1678, 570.9, 1869, 870.1, 185, 1688000],
  ['HE 450 B', 218, 79890, 11720, 3551, 781.4, 3982, 1198, 440.5, 5258000],
  ['HE 650 B', 286.3, 210600, 13980, 6480, 932.3, 7320, 1441, 739.2, 13360000],
  ['HE 1000 B', 400, 644700, 16280, 12890, 1085, 14860, 1716, 1254, 37640000],
  ['UB 127x76x13', 16.5, 473, 55.7, 74.6, 14.7, 84.2, 22.6, 2.85, 2000],
  ['UB 203x133x25', 32, 2340, 308, 230, 46.2, 258, 70.9, 5.96, 29400],
  ['UB 305x165x40', 51.3, 8500, 764, 560, 92.6, 623, 142, 14.7, 164000],
  ['UB 457x191x67', 85.5, 29400, 1450, 1300, 153, 1470, 237, 37.1, 705000],
  ['UB 610x229x113', 144, 87300, 3430, 2870, 301, 3280, 469, 111, 2990000],
  ['UB 914x305x289', 368, 504000, 15600, 10900, 1010, 12600, 1600, 926, 31200000],
];
const american: readonly Row[] = [
  ['W4X13', 3.83, 11.3, 3.86, 5.46, 1.9, 6.28, 2.92, 0.151, 14],
  ['W8X31', 9.13, 110, 37.1, 27.5, 9.27, 30.4, 14.1, 0.536, 530],
  ['W12X26', 7.65, 204, 17.3, 33.4, 5.34, 37.2, 8.17, 0.3, 607],
  ['W14X90', 26.5, 999, 362, 143, 49.9, 157, 75.6, 4.06, 16000],
  ['W18X50', 14.7, 800, 40.1, 88.9, 10.7, 101, 16.6, 1.24, 3040],
  ['W21X44', 13, 843, 20.7, 81.6, 6.37, 95.4, 10.2, 0.77, 2110],
  ['W24X76', 22.4, 2100, 82.5, 176, 18.4, 200, 28.6, 2.68, 11100],
  ['W36X150', 44.3, 9040, 270, 504, 45.1, 581, 70.9, 10.1, 82200],
];
const keys = ['A_m2', 'I_m4', 'Iminor_m4', 'Wtop_m3', 'Wminor_m3', 'Wpl_m3', 'WplMinor_m3', 'It_m4', 'Iw_m6'] as const;
const powers = [2, 4, 4, 3, 3, 3, 3, 4, 6];

/** A 0.5 %; I, W 1 %; It, Iw 5 %; IPE 80's Iw and It are printed with two figures only. */
const tolerances = [0.005, 0.01, 0.01, 0.01, 0.01, 0.01, 0.01, 0.05, 0.05];

describe.each([
  ['cm', 0.01, european],
  ['in', 0.0254, american],
] as const)('derived properties agree with the published tables (%s)', (_, unit, rows) => {
  it.each(rows)('%s', (designation, ...published) => {
    const result = findDesignation(designation);
    if (!('section' in result)) throw new Error(`${designation} is not found`);
    keys.forEach((key, i) => {
      const expected = (published[i] ?? NaN) * unit ** (powers[i] ?? NaN);
      const ratio = (result.section.properties[key] ?? NaN) / expected;
      expect(Math.abs(ratio - 1), `${designation} ${key}: ${ratio} of the published value`).toBeLessThanOrEqual(
        tolerances[i] ?? 0,
      );
    });
  });
});
