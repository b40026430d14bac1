import { describe, expect, it } from 'vitest';
import type { Section } from '@/lib/model/frame';
import { FT, KIP, KIPFT, sectionOfLibrary, memberOf, ofFy, rowNamed, rowsOf, stretchOf } from './hand-made-aisc';
import { gradientOf } from './segment-moment';

const checks = (found: ReturnType<typeof rowsOf>): string[] => found.rows.map((row) => row.check);
const within = (found: number | null, value: number, relative: number): void => {
  expect(Math.abs(found! / value - 1), `${found} against ${value}`).toBeLessThan(relative);
};
const changed = (name: string, change: Partial<Section['dimensions'] & object>, made?: Section['made']): Section => {
  const section = sectionOfLibrary(name);
  return { ...section, dimensions: { ...section.dimensions!, ...change }, made: made === undefined ? section.made : made };
};
const withProperties = (name: string, change: Partial<Section['properties']>): Section => {
  const section = sectionOfLibrary(name);
  return { ...section, properties: { ...section.properties, ...change } };
};

describe('a member by AISC 360-22', () => {
  it('W14x132, 30 ft: 893 kip by LRFD, 594 by ASD (Companion, Example E.1A, from memory)', () => {
    const lrfd = rowNamed(rowsOf(memberOf('W14X132', 30), [{ compression: 500 }]), 'E3 flexural buckling');
    within(lrfd.limit! / KIP, 893, 0.01);
    expect(lrfd.ratio).toBeCloseTo((500 * KIP) / lrfd.limit!, 12);
    expect(lrfd.inputs()).toMatchObject({ axis: 'minor', method: 'LRFD', factor: 0.9 });
    const asd = rowNamed(rowsOf(memberOf('W14X132', 30), [{ compression: 500 }], 'ASD'), 'E3 flexural buckling');
    within(asd.limit! / KIP, 594, 0.01);
    expect(asd.inputs()).toMatchObject({ method: 'ASD', factor: 1.67 });
  });

  it('the axis with the larger L_c/r governs: W14x90 with 30 ft and 15 ft, 927 kip (Companion, Example E.1D, from memory)', () => {
    const lengths = { major: { length_m: 30 * FT, from: 'typed' }, minor: { length_m: 15 * FT, from: 'typed' } } as const;
    const row = rowNamed(rowsOf(memberOf('W14X90', 30, lengths), [{ compression: 500 }]), 'E3 flexural buckling');
    within(row.limit! / KIP, 927, 0.01);
    expect(row.inputs()).toMatchObject({ axis: 'major' });
  });

  it('W18x50, held every 17.5 ft under a uniform load: 288 kip·ft (Companion, Example F.1-3B, from memory)', () => {
    const M = 100 * KIPFT;
    const half = { quarter: (7 / 16) * M, middle: (3 / 4) * M, threeQuarter: (15 / 16) * M, largest: M, compressing: M };
    const row = rowNamed(rowsOf(memberOf('W18X50', 35), [{ moment: 100, Lb: 17.5, stretch: half }]), 'F2 bending');
    within(row.limit! / KIPFT, 288, 0.015);
    expect(row.face).toBe('top');
    expect(row.inputs().Cb).toBeCloseTo(1.299, 3);
    expect(row.quantity).toBe('moment');
  });

  it('W21x48 held all along: F3 for its noncompact flange, 398 kip·ft (Companion, Example F.3B, from memory)', () => {
    const row = rowNamed(rowsOf(memberOf('W21X48', 10), [{ moment: 100, Lb: 1 }]), 'F3 bending');
    within(row.limit! / KIPFT, 398, 0.01);
    expect(row.inputs().flangeClass).toBe('noncompact');
  });

  it('shear: W18x50 192 kip and 128, W24x55 252 and 167 (AISC Manual Table 3-2, from memory)', () => {
    const limit = (name: string, method: 'LRFD' | 'ASD'): number =>
      rowNamed(rowsOf(memberOf(name, 20), [{ shear: 50 }], method), 'G2 shear').limit! / KIP;
    within(limit('W18X50', 'LRFD'), 192, 0.006);
    within(limit('W18X50', 'ASD'), 128, 0.006);
    within(limit('W24X55', 'LRFD'), 252, 0.006);
    within(limit('W24X55', 'ASD'), 167, 0.006);
  });

  it('tension: yielding of the gross section, and what is not checked is said', () => {
    const found = rowsOf(memberOf('W14X132', 10), [{ tension: 873 }]);
    within(rowNamed(found, 'D2 tension').ratio, 0.5, 0.01);
    expect(found.notes).toContain('AISC 360-22 D2: gross yielding only; rupture of net sections and connections are not checked');
    expect(found.notes).toContain('AISC 360-22: direct analysis method (C2), K = 1');
  });

  it('an I held closer out of the plane than against twisting buckles by twisting (E4)', () => {
    const held = { minor: { length_m: 2, from: 'typed' }, major: { length_m: 2, from: 'typed' }, outOfPlane: { length_m: 2, from: 'typed' } } as const; // prettier-ignore
    const found = rowsOf(memberOf('W14X132', 60, held), [{ compression: 500, moment: 10 }]);
    const [e3, e4] = [rowNamed(found, 'E3 flexural buckling'), rowNamed(found, 'E4 torsional buckling')];
    expect(e4.limit).toBeLessThan(e3.limit!);
    // 60 ft: F_e = 73.07 ksi (worked in clauses.test.ts), F_n = 0.658^(50/73.07) 50
    within(Number(e4.inputs().Fe) / 6894757.293, 73.07, 0.03);
    expect(rowNamed(found, 'H1.1 combined').inputs()).toMatchObject({ axialClause: 'E4', Pc: e4.limit });
  });

  it('both together by H1.1 pressed and by H1.2 pulled; a member only pressed has none', () => {
    const pressed = rowsOf(memberOf('W14X132', 20), [{ compression: 400, moment: 200 }]);
    const parts = rowNamed(pressed, 'H1.1 combined').inputs();
    expect(rowNamed(pressed, 'H1.1 combined').ratio).toBeCloseTo(Number(parts.axial) + (8 / 9) * Number(parts.bending), 12);
    expect(checks(rowsOf(memberOf('W14X132', 20), [{ tension: 40, moment: 200 }]))).toEqual([
      'D2 tension',
      'F2 bending',
      'H1.2 combined',
    ]);
    expect(checks(rowsOf(memberOf('W14X132', 20), [{ compression: 40 }]))).toEqual(['E3 flexural buckling']);
  });

  it('a row a clause for every combination, in their order', () => {
    const found = rowsOf(memberOf('W14X132', 20), [{ compression: 40 }, { tension: 40 }, {}]);
    expect(checks(found)).toEqual(['E3 flexural buckling', 'D2 tension']);
  });
});

describe('other shapes', () => {
  it('a slender web in compression has the effective area of E7', () => {
    const found = rowsOf(memberOf('W16X26', 8), [{ compression: 100, moment: 20 }]);
    const row = rowNamed(found, 'E7 slender elements');
    const inputs = row.inputs();
    expect(inputs.Ae).toBeLessThan(Number(inputs.Ag));
    expect(inputs).toMatchObject({ from: 'E3' });
    expect(inputs.flangeRatio).toBeUndefined();
    expect(checks(found)).not.toContain('E3 flexural buckling');
    expect(rowNamed(found, 'H1.1 combined').inputs().axialClause).toBe('E7');
  });

  it('slender by twisting: the stress of E7 is that of E4', () => {
    const held = { minor: { length_m: 0.5, from: 'typed' }, major: { length_m: 0.5, from: 'typed' }, outOfPlane: { length_m: 0.5, from: 'typed' } } as const; // prettier-ignore
    const row = rowNamed(rowsOf(memberOf('W16X26', 20, held), [{ compression: 100 }]), 'E7 slender elements');
    expect(row.inputs()).toMatchObject({ from: 'E4', slenderness: null });
  });

  it('a slender flange, a slender wall and a slender round wall are reduced too', () => {
    const flange = rowNamed(rowsOf(memberOf(changed('W14X90', { tf: 0.008 }), 8), [{ compression: 10 }]), 'E7 slender elements');
    expect(flange.inputs().flangeRatio).toBeLessThan(1);
    const wall = rowNamed(rowsOf(memberOf('HSS12X12X3/16', 8), [{ compression: 10 }]), 'E7 slender elements');
    expect(wall.inputs().webRatio).toBeLessThan(1);
    const round = changed('HSS10.000X0.188', { t: 0.0025 });
    const tube = rowNamed(rowsOf(memberOf(round, 8), [{ compression: 10 }]), 'E7 slender elements');
    within(Number(tube.inputs().flangeRatio), (0.038 * 580) / (0.254 / 0.0025) + 2 / 3, 1e-6);
  });

  it('a wall of D/t from 0.45 E/Fy is not checked', () => {
    const thin = changed('HSS10.000X0.188', { t: 0.0008 });
    const found = rowsOf(memberOf(thin, 8), [{ compression: 10, moment: 1 }]);
    const refused = found.rows.filter((row) => row.check === 'B4.1 slender elements');
    expect(refused.map((row) => row.ratio)).toEqual([null, null]);
    expect(refused[0]!.reason).toMatch(/slender wall/);
    expect(checks(found)).not.toContain('H1.1 combined');
  });

  it('about the minor axis by F6 and G6, no buckling sideways', () => {
    const found = rowsOf(memberOf('W10X33', 14, { turned: true }), [{ moment: 12, shear: 5 }]);
    within(rowNamed(found, 'F6 bending').limit! / KIPFT, 52.5, 0.01);
    const G6 = rowNamed(found, 'G6 shear');
    within(G6.limit! / KIP, 0.9 * 0.6 * 50 * 2 * 7.96 * 0.435, 0.01);
    expect(rowNamed(found, 'F6 bending').inputs()).toMatchObject({ Lb: null, Cb: null });
  });

  it('an I turned onto its stiffer axis is not checked in bending', () => {
    const found = rowsOf(memberOf(withProperties('W10X33', { Iminor_m4: 1e-3 }), 14, { turned: true }), [{ moment: 12 }]);
    expect(rowNamed(found, 'F6 bending').reason).toMatch(/stiffer axis/);
  });

  it('boxes by F7 and G4, about either axis; a deep one on edge may buckle sideways, a square one may not', () => {
    const deep = rowsOf(memberOf('HSS8X4X1/4', 40), [{ moment: 20, Lb: 40, shear: 10 }]);
    expect(rowNamed(deep, 'F7 bending').inputs().Lp).not.toBeNull();
    within(rowNamed(deep, 'G4 shear').limit! / KIP, 0.9 * 0.6 * 50 * 2 * (8 - 3 * 0.233) * 0.233, 0.005);
    const turned = rowsOf(memberOf('HSS8X4X1/4', 40, { turned: true }), [{ moment: 20, shear: 10 }]);
    expect(rowNamed(turned, 'F7 bending').inputs().Lp).toBeNull();
    within(rowNamed(turned, 'G4 shear').limit! / KIP, 0.9 * 0.6 * 50 * 2 * (4 - 3 * 0.233) * 0.233, 0.005);
    expect(rowNamed(rowsOf(memberOf('HSS8X8X3/8', 40), [{ moment: 20 }]), 'F7 bending').inputs().Lp).toBeNull();
    const slender = rowNamed(rowsOf(memberOf('HSS8X8X3/16', 20, { material: ofFy(46) }), [{ moment: 20 }]), 'F7 bending');
    within(slender.limit! / KIPFT, 42.5, 0.01);
    // typed with I minor the larger: turned, it is the deep one
    const wide = withProperties('HSS8X4X1/4', { Iminor_m4: 1e-4 });
    expect(rowNamed(rowsOf(memberOf(wide, 9, { turned: true }), [{ moment: 5 }]), 'F7 bending').inputs().Lr).not.toBeNull();
  });

  it('a box with a slender web is not checked in bending', () => {
    const thin = changed('HSS12X4X1/4', { t: 0.0018 });
    const row = rowNamed(rowsOf(memberOf(thin, 8), [{ moment: 1 }]), 'B4.1 slender elements');
    expect(row.reason).toMatch(/^slender web \(h\/t .*F7\.3\(c\) is not covered$/);
  });

  it('round sections by F8 and G5', () => {
    const found = rowsOf(memberOf('HSS10.000X0.188', 20, { material: ofFy(46) }), [{ moment: 20, shear: 10 }]);
    expect(rowNamed(found, 'F8 bending').inputs().flangeClass).toBe('noncompact');
    // 0.6 Fy governs: V_n = 0.6 · 46 · 5.37/2
    within(rowNamed(found, 'G5 shear').limit! / KIP, (0.9 * 0.6 * 46 * 5.37) / 2, 0.01);
    expect(found.notes).toContain('AISC 360-22 G5: L_v taken as the length of the member');
  });

  it('a compact channel bends by F2 with its own c; pressed, it is not checked', () => {
    const found = rowsOf(memberOf('UPE 300', 20), [{ moment: 10, compression: 10 }]);
    expect(rowNamed(found, 'F2 bending').inputs().c).toBeGreaterThan(1);
    expect(rowNamed(found, 'E4 torsional buckling').reason).toMatch(/flexural-torsional/);
    expect(rowNamed(found, 'E3 flexural buckling').ratio).not.toBeNull();
    expect(checks(found)).not.toContain('H1.1 combined');
    expect(found.notes).toContain('AISC 360-22 F2, F6: loads act through the shear centre of a channel and do not twist it');
  });
});

describe('what can not be checked is said, never passed', () => {
  const only = (member: ReturnType<typeof memberOf>): string => {
    const { rows } = rowsOf(member, [{ compression: 10, moment: 10, shear: 1 }]);
    expect(rows.map(({ check, ratio, value, limit }) => [check, ratio, value, limit])).toEqual([
      ['AISC 360-22 LRFD', null, null, null],
    ]);
    expect(rows[0]!.inputs()).toEqual({});
    return rows[0]!.reason!;
  };
  it('no shape, a bar, tapered flanges, J missing, no yield strength', () => {
    expect(only(memberOf({ ...sectionOfLibrary('W14X90'), shape: null }, 10))).toMatch(/shape not covered/);
    expect(only(memberOf({ ...sectionOfLibrary('W14X90'), shape: 'bar' }, 10))).toMatch(/shape not covered/);
    expect(only(memberOf('C15X50', 10))).toBe('needs J, C_w, not available for tapered flanges');
    expect(only(memberOf('S24X121', 10))).toBe('needs J, C_w, not available for tapered flanges');
    expect(only(memberOf({ ...withProperties('W14X90', { It_m4: null }), designation: null }, 10))).toBe('needs J');
    expect(only(memberOf(withProperties('W14X90', { Wpl_m3: null, Wtop_m3: null }), 10))).toBe('needs Z major, S top');
    expect(only(memberOf('W14X90', 10, { material: { ...ofFy(50), fy_Pa: null } }))).toBe(
      'needs the yield strength of the material',
    );
  });

  it('a state that was not analysed as the code asks', () => {
    const why = 'needs a second-order analysis';
    const found = rowsOf(memberOf('W14X90', 10), [{ tension: 1, change: { inPlane: { allowed: false, why } } }, { tension: 1 }]);
    expect(found.rows.map(({ check, reason }) => [check, reason])).toEqual([['AISC 360-22 LRFD', why], ['D2 tension', null]]); // prettier-ignore
  });

  it('E4 without G', () => {
    const found = rowsOf(memberOf('W14X90', 10, { material: { ...ofFy(50), G_Pa: null } }), [{ compression: 1, moment: 1 }]);
    expect(rowNamed(found, 'E4 torsional buckling').reason).toBe('needs G');
    expect(checks(found)).not.toContain('H1.1 combined');
  });

  it('noncompact and slender webs (F4, F5), a channel with a flange that is not compact', () => {
    const noncompact = rowNamed(rowsOf(memberOf(changed('W24X55', { tw: 0.005 }), 10), [{ moment: 1 }]), 'F2 bending');
    expect(noncompact.reason).toMatch(/^noncompact web .*F4 is not covered$/);
    const slender = rowsOf(memberOf(changed('W24X55', { tw: 0.003 }), 10), [{ moment: 1, compression: 1 }]);
    expect(rowNamed(slender, 'B4.1 slender elements').reason).toMatch(/^slender web .*F5 is not covered$/);
    expect(rowNamed(slender, 'E7 slender elements').ratio).not.toBeNull();
    const toe = rowNamed(rowsOf(memberOf(changed('UPE 300', { tf: 0.01 }), 10), [{ moment: 1 }]), 'F2 bending');
    expect(toe.reason).toMatch(/^noncompact flange of a channel/);
  });

  it('loads off the shear centre, where the segment is long enough to matter', () => {
    const loaded = { loaded: true };
    const top = { loadHeight: 'top flange' } as const;
    const long = rowsOf(memberOf('W18X50', 20), [{ moment: 10, stretch: loaded }], 'LRFD', top);
    expect(rowNamed(long, 'F2 bending').reason).toMatch(/top flange/);
    const short = rowsOf(memberOf('W18X50', 20), [{ moment: 10, Lb: 4, stretch: loaded }], 'LRFD', top);
    expect(rowNamed(short, 'F2 bending').ratio).not.toBeNull();
    expect(rowNamed(rowsOf(memberOf('W18X50', 20), [{ moment: 10 }], 'LRFD', top), 'F2 bending').ratio).not.toBeNull();
    expect(
      rowNamed(rowsOf(memberOf('HSS8X4X1/4', 20), [{ moment: 10, stretch: loaded }], 'LRFD', top), 'F7 bending').ratio,
    ).not.toBeNull();
  });

  it('moments that no segment has', () => {
    const found = rowsOf(memberOf('W18X50', 20), [{ moment: 10, compression: 5, stretch: { compressing: NaN } }]);
    expect(rowNamed(found, 'F2 bending').reason).toMatch(/not known/);
    expect(checks(found)).not.toContain('H1.1 combined');
  });

  it('a tension-only member is not pressed, and that is said', () => {
    const found = rowsOf(memberOf('W14X132', 10, { tensionOnly: true }), [{ compression: 5, moment: 5 }]);
    expect(checks(found)).toEqual(['F2 bending']);
    expect(found.notes).toContain('Tension-only members: not pressed, so no buckling of theirs is checked');
  });

  it('an I not said how made is taken as built up, and that is said', () => {
    const found = rowsOf(memberOf({ ...sectionOfLibrary('W18X50'), made: null }, 10), [{ shear: 5 }]);
    expect(found.notes.some((said) => said.includes('taken as built up'))).toBe(true);
    expect(rowNamed(found, 'G2 shear').inputs()).toMatchObject({ factor: 0.9, rolled: null });
  });
});

describe('segments between restraints', () => {
  it('the segment with the largest M/M_n governs, of either face', () => {
    const stretches = (face: 'top' | 'bottom') =>
      face === 'top'
        ? [stretchOf(100, 5, 'top'), stretchOf(90, 30, 'top'), stretchOf(20, 5, 'top')]
        : [stretchOf(-10, 30, 'bottom')];
    const row = rowNamed(rowsOf(memberOf('W18X50', 40), [{ moment: 100, change: { stretches } }]), 'F2 bending');
    expect(row.value! / KIPFT).toBeCloseTo(90, 9);
    expect(row.face).toBe('top');
    const other = (face: 'top' | 'bottom') => (face === 'top' ? [stretchOf(60, 5, 'top')] : [stretchOf(-60, 30, 'bottom')]);
    expect(rowNamed(rowsOf(memberOf('W18X50', 40), [{ moment: 60, change: { stretches: other } }]), 'F2 bending').face).toBe(
      'bottom',
    );
  });

  it('C_b is 1 at a free end, and where the larger moment compresses the other face', () => {
    const uneven = { quarter: 0, middle: 0, threeQuarter: 0 };
    expect(gradientOf(stretchOf(10, 5, 'top', uneven))).toEqual({ Cb: 5, why: null });
    expect(gradientOf(stretchOf(10, 5, 'top', { ...uneven, heldAtEnd: false }))).toEqual({ Cb: 1, why: 'an end is free' });
    expect(gradientOf(stretchOf(10, 5, 'top', { ...uneven, heldAtStart: false })).Cb).toBe(1);
    expect(gradientOf(stretchOf(10, 5, 'top', { ...uneven, largest: -20 * KIPFT })).why).toMatch(/other face/);
  });
});
