import { describe, expect, it } from 'vitest';
import { gradeFor } from './grade-for';

const fy = (name: string, t_mm: number | null): number | null => {
  const result = gradeFor(name, t_mm === null ? null : t_mm / 1000);
  if ('suggestion' in result) throw new Error(`no grade ${name}`);
  return result.properties.fy_Pa === null ? null : result.properties.fy_Pa / 1e6;
};

describe('yield by thickness', () => {
  // EN 10025-2:2019, table of mechanical properties: minimum yield strength by nominal thickness in mm.
  it.each([
    ['S235', 16, 235], ['S235', 16.1, 225], ['S235', 40, 225], ['S235', 63, 215], ['S235', 100, 215], ['S235', 150, 195], ['S235', 200, 185], ['S235', 250, 175],
    ['S275', 16, 275], ['S275', 40, 265], ['S275', 63, 255], ['S275', 80, 245], ['S275', 100, 235], ['S275', 150, 225], ['S275', 200, 215], ['S275', 250, 205],
    ['S355', 16, 355], ['S355', 40, 345], ['S355', 63, 335], ['S355', 80, 325], ['S355', 100, 315], ['S355', 150, 295], ['S355', 200, 285], ['S355', 250, 275],
  ])('%s at %d mm yields at %d MPa', (name, t, expected) => expect(fy(name, t)).toBe(expected)); // prettier-ignore

  it('A36 and A992 yield at 36 and 50 ksi whatever the thickness (ASTM A36, A992)', () => {
    expect(fy('A36', null)).toBeCloseTo(248.211, 3);
    expect(fy('A992', 60)).toBeCloseTo(344.738, 3);
  });

  it('is not known beyond the standard, nor without a thickness where it matters', () => {
    expect(fy('S355', 251)).toBeNull();
    expect(fy('S355', null)).toBeNull();
  });
});

describe('grades of hollow sections and of ASTM standards', () => {
  // EN 10025-2:2004 table 7 for S450; EN 10210-1 from memory
  it.each([['S450', 16, 450], ['S450', 40, 430], ['S450', 63, 410], ['S450', 80, 390], ['S450', 150, 380], ['S355J2H', 16, 355], ['S355J0H', 40, 345], ['S275J0H', 63, 255], ['S235JRH', 120, 195]])(
    '%s at %d mm yields at %d MPa', (name, t, expected) => expect(fy(name, t)).toBe(expected)); // prettier-ignore

  it('S355J2H is held up to 120 mm, S450 up to 150 mm', () => {
    expect(fy('S355J2H', 121)).toBeNull();
    expect(fy('S450', 151)).toBeNull();
  });

  // Materials for Civil and Construction Engineers (Mamlouk, Zaniewski), Table 3.2; A572 42, 55, 60, 65 from memory
  it.each([
    ['A572 Gr. 50', null, 50, 65], ['ASTM A572-50', null, 50, 65], ['A572 Grade 42', null, 42, 60], ['A572 55', null, 55, 70], ['A572 60', null, 60, 75], ['A572 65', null, 65, 80],
    ['A500 B', 'chs', 42, 58], ['A500 Gr. B', 'rhs', 46, 58], ['A500 Grade C', 'chs', 46, 62], ['A500C', 'rhs', 50, 62], ['A53', 'chs', 35, 60], ['A53 Gr. B', 'chs', 35, 60],
  ] as const)('%s (%s) yields at %d ksi and breaks at %d ksi', (name, shape, yields, breaks) => {
    const result = gradeFor(name, 0.01, shape);
    if ('suggestion' in result) throw new Error(`no grade ${name}`);
    expect((result.properties.fy_Pa ?? NaN) / 6.894757293168361e6).toBeCloseTo(yields, 9);
    expect((result.properties.fu_Pa ?? NaN) / 6.894757293168361e6).toBeCloseTo(breaks, 9);
    expect(result.properties.standard).toBe('ASTM');
  }); // prettier-ignore

  it('A500 of a section whose shape is not known yields as in a tube, the lower', () =>
    expect(gradeFor('A500 B', null, null)).toMatchObject({ properties: { fy_Pa: 42 * 6.894757293168361e6 } }));

  it('A572 60 and 65 are not known for flanges above 2 in', () => expect(fy('A572 65', 51)).toBeNull());
});

describe('a grade', () => {
  it('fixes E, G, density and expansion', () => {
    expect(gradeFor('S355', 0.01)).toMatchObject({
      properties: { standard: 'EN', E_Pa: 210e9, G_Pa: 81e9, fu_Pa: 470e6, density_kg_m3: 7850, expansion_perK: 12e-6 },
    });
    const result = gradeFor('A992', 0.01);
    if ('suggestion' in result) throw new Error('no A992');
    expect(result.properties.E_Pa / 1e6).toBeCloseTo(199947.96, 2);
    expect(result.properties.G_Pa / 1e6).toBeCloseTo(77221.28, 2);
    expect(result.properties.density_kg_m3).toBeCloseTo(7849.05, 2);
  });

  it.each([['s355', 'S355'], ['S 355 J2', 'S355'], ['S275JR', 'S275'], ['ASTM A36', 'A36'], ['a992', 'A992'], ['S355K2H', 'S355H']])(
    '%s is %s', (typed, grade) => expect(gradeFor(typed, 0.01)).toMatchObject({ properties: { grade } }),
  ); // prettier-ignore

  it.each([['S365', 'S355'], ['A993', 'A992'], ['A572', 'A572 Gr. 50'], ['A500', 'A500 Gr. B'], ['S460', null], ['steel', null], ['', null]])('%s suggests %s', (typed, suggestion) =>
    expect(gradeFor(typed, 0.01)).toEqual({ suggestion }),
  ); // prettier-ignore
});
