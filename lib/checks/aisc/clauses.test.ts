import { describe, expect, it } from 'vitest';
import { boxEffectiveModulus, boxFlangeMoment, boxLateralTorsionalMoment, boxLimitingLengths, boxWebMoment } from './box';
import { interaction } from './combined';
import { flangeLocalBucklingMoment } from './flange-local-buckling';
import { elasticBucklingStress, inelastic, nominalStress } from './flexural-buckling';
import { sectionOfLibrary } from './hand-made-aisc';
import { channelFactor, effectiveRadius, lateralTorsionalMoment, limitingLengths, type OpenSection } from './lateral-torsional';
import { minorAxisMoment, minorAxisPlasticMoment } from './minor-axis';
import { momentGradient } from './moment-gradient';
import { roundMoment } from './round';
import { roundShearStress } from './round-shear';
import { shearBucklingCoefficient } from './shear-buckling-coefficient';
import { c2, effectiveAreaRatioOfRound, effectiveWidthRatio } from './slender-elements';
import { available, ROLLED_WEB, USUAL } from './strength';
import { tensileYielding } from './tension';
import { torsionalBucklingStress } from './torsional-buckling';
import { shearStrength, webShearCoefficient } from './web-shear';
import { compressionLimits, flexureLimits, kc, plateClass, platesOf } from './width-limits';

// Worked by hand from the equations named, in kip and inch, but where a source is given.
const E = 29000;
const Fy = 50;
const near = (found: number | null, value: number, relative = 1e-6): void => {
  expect(found).not.toBeNull();
  expect(Math.abs(found! - value)).toBeLessThanOrEqual(relative * Math.abs(value));
};

describe('B3, D2: factors and yielding', () => {
  it('φ 0.90 and Ω 1.67, of rolled webs 1.00 and 1.50', () => {
    near(available('LRFD', 100, USUAL), 90);
    near(available('ASD', 167, USUAL), 100);
    near(available('LRFD', 100, ROLLED_WEB), 100);
    near(available('ASD', 150, ROLLED_WEB), 100);
  });
  it('yields in the gross section', () => near(tensileYielding(50, 14.7), 735));
});

describe('B4.1: width-to-thickness ratios', () => {
  const W = (): NonNullable<ReturnType<typeof platesOf>> => platesOf(sectionOfLibrary('W18X50'))!;
  it('a rolled web is clear of its fillets: W18x50 has b/2t 6.57 and h/t 45.2 (AISC Manual Table 1-1, from memory)', () => {
    near(W().flange, 6.57, 0.005);
    near(W().web, 45.2, 0.01);
    expect(W().builtUp).toBe(false);
  });
  it('of a built-up I the web is clear between its flanges', () => {
    const section = sectionOfLibrary('W18X50');
    const { h, tf, tw } = section.dimensions!;
    const welded = platesOf({ ...section, made: 'welded' })!;
    near(welded.web, (h! - 2 * tf!) / tw!);
    expect(welded.builtUp).toBe(true);
    expect(platesOf({ ...section, made: null })!.builtUp).toBe(true);
  });
  it('a wall is flat over its outside less three thicknesses, or more where its corners are sharper', () => {
    const box = sectionOfLibrary('HSS8X6X3/8');
    near(platesOf(box)!.web, 8 / 0.349 - 3, 1e-3);
    near(platesOf(box)!.flange, 6 / 0.349 - 3, 1e-3);
    const sharp = platesOf({ ...box, dimensions: { ...box.dimensions!, r: box.dimensions!.t! } })!;
    near(sharp.web, 8 / 0.349 - 2, 1e-3);
    near(platesOf({ ...box, dimensions: { ...box.dimensions!, r: null } })!.web, 8 / 0.349 - 3, 1e-3);
  });
  it('knows no plates of a bar, of a shape not said and of missing dimensions', () => {
    const section = sectionOfLibrary('W18X50');
    expect(platesOf({ ...section, shape: 'bar' })).toBeNull();
    expect(platesOf({ ...section, shape: null })).toBeNull();
    expect(platesOf({ ...section, dimensions: null })).toBeNull();
    expect(platesOf({ ...section, dimensions: { ...section.dimensions!, tw: null } })).toBeNull();
  });
  it('limits in compression: 13.5, 35.9 rolled; k_c for built up; 33.7 walls; 63.8 round', () => {
    const I = { shape: 'I', flange: 8, web: 64, builtUp: false, kc: 0.5 } as const;
    near(compressionLimits(I, 580).flange, 13.4867, 1e-5);
    near(compressionLimits(I, 580).web, 35.88395, 1e-6);
    near(compressionLimits({ ...I, builtUp: true }, 580).flange, 0.64 * Math.sqrt(0.5 * 580));
    near(compressionLimits({ ...I, shape: 'channel' }, 580).flange, 13.4867, 1e-5);
    near(compressionLimits({ ...I, shape: 'rhs' }, 580).web, 33.7165, 1e-5);
    near(compressionLimits({ ...I, shape: 'chs' }, 580).flange, 63.8);
  });
  it('limits in flexure: 9.15 and 24.1, webs 90.6 and 137; boxes 27.0, 33.7, 58.3, 137; round 40.6 and 180', () => {
    const I = { shape: 'I', flange: 8, web: 64, builtUp: false, kc: 0.5 } as const;
    const major = flexureLimits(I, 580, false);
    near(major.flange.p, 9.1516, 1e-4);
    near(major.flange.r, 24.0832, 1e-5);
    near(major.web!.p, 90.553, 1e-4);
    near(major.web!.r, 137.274, 1e-5);
    near(flexureLimits({ ...I, builtUp: true }, 580, false).flange.r, 0.95 * Math.sqrt((0.5 * 580) / 0.7));
    near(flexureLimits({ ...I, builtUp: true }, 580, true).flange.r, 24.0832, 1e-5);
    expect(flexureLimits(I, 580, true).web).toBeNull();
    const box = flexureLimits({ ...I, shape: 'rhs' }, 580, false);
    near(box.flange.p, 26.973, 1e-4);
    near(box.flange.r, 33.7165, 1e-5);
    near(box.web!.p, 58.2814, 1e-5);
    near(flexureLimits({ ...I, shape: 'chs' }, 580, false).flange.p, 40.6);
    near(flexureLimits({ ...I, shape: 'chs' }, 580, false).flange.r, 179.8);
  });
  it('k_c stays within 0.35 and 0.76', () => {
    near(kc(64), 0.5);
    near(kc(16), 0.76);
    near(kc(400), 0.35);
  });
  it('a plate is compact up to λp, noncompact up to λr', () => {
    const limits = { p: 9, r: 24 };
    expect([9, 9.01, 24, 24.01].map((lambda) => plateClass(lambda, limits))).toEqual([
      'compact',
      'noncompact',
      'noncompact',
      'slender',
    ]);
  });
});

describe('E3, E4, E7: compression', () => {
  it('the two branches of E3 meet at Fy/Fe = 2.25, there within 0.3 %', () => {
    expect(inelastic(50, 50 / 2.25)).toBe(true);
    expect(inelastic(50, 50 / 2.26)).toBe(false);
    near(nominalStress(50, 50 / 2.2501), nominalStress(50, 50 / 2.2499), 0.003);
  });
  it('E3-4 at L/r = 4.71√(E/Fy) is Fy/2.25', () => near(elasticBucklingStress(E, 4.71 * Math.sqrt(E / Fy)), Fy / 2.25, 0.002));
  it('E4-2: W14x132 (C_w 25 500, J 12.3, I 1530 and 548) twists at 93.40 ksi over 30 ft, 73.07 over 60 ft', () => {
    const of = { E, G: 11200, J: 12.3, Cw: 25500, Ix: 1530, Iy: 548 };
    near(torsionalBucklingStress(of, 360), 93.3956426);
    near(torsionalBucklingStress(of, 720), 73.0697961);
  });
  it('Table E7.1 prints c₂ = 1.31, 1.38, 1.49', () => {
    near(c2(0.18), 1.31, 0.002);
    near(c2(0.2), 1.38, 0.002);
    near(c2(0.22), 1.49, 0.004);
  });
  it('E7-2: a plate is effective in full up to λr √(Fy/Fn), E7-3 beyond', () => {
    const r = Math.sqrt(580);
    expect(effectiveWidthRatio(0.18, 40, 1.49 * r, 50, 40)).toBe(1);
    near(effectiveWidthRatio(0.18, 56.8, 1.49 * r, 50, 40), 0.7701993488);
    near(effectiveWidthRatio(0.2, 50, 1.4 * r, 50, 45), 0.7893228225);
    near(effectiveWidthRatio(0.22, 20, 0.56 * r, 50, 48), 0.7923924096);
  });
  it('E7-6, E7-7: round, 1 up to 0.11 E/Fy, 0.958 at D/t = 90 of 42 ksi, not covered from 0.45 E/Fy', () => {
    expect(effectiveAreaRatioOfRound(E / 42, 75.9)).toBe(1);
    near(effectiveAreaRatioOfRound(E / 42, 90), 0.9582010582);
    expect(effectiveAreaRatioOfRound(E / 42, 310.8)).toBeNull();
  });
});

describe('F1, F2, F3: an I or channel about its major axis', () => {
  const w18x50: OpenSection = { E, Fy, Zx: 101, Sx: 88.9, ry: 1.65, rts: 1.98, ho: 17.4, J: 1.24, c: 1 };
  it('F1-1: uniform 1, nothing 1, reversed in sign 2.27', () => {
    near(momentGradient(10, 10, 10, 10), 1);
    expect(momentGradient(0, 0, 0, 0)).toBe(1);
    near(momentGradient(-10, -5, 0, 5), 12.5 / 5.5);
  });
  it('F2-5, F2-6: W18x50 has L_p 5.83 ft and L_r 16.9 ft (AISC Manual Table 3-2, from memory)', () => {
    const { Lp, Lr } = limitingLengths(w18x50);
    near(Lp / 12, 5.83, 0.001);
    near(Lr / 12, 16.9, 0.004);
  });
  it('its three branches: M_p up to L_p, 4323 at 10 ft, F_cr S beyond L_r; never above M_p', () => {
    const { Lp, Lr } = limitingLengths(w18x50);
    const M = (Lb: number, Cb: number): number => lateralTorsionalMoment(w18x50, Lp, Lr, Lb, Cb);
    near(M(60, 1), 5050);
    near(M(120, 1), 4322.571041);
    expect(M(120, 2)).toBe(5050);
    near(M(Lr * 1.000001, 1), M(Lr, 1), 2e-3);
    near(M(Lr, 1), 0.7 * Fy * 88.9, 1e-9);
    expect(M(240, 5)).toBe(5050);
  });
  it('F2-7 and F2-8b', () => {
    near(effectiveRadius(40.1, 3040, 88.9), Math.sqrt(Math.sqrt(40.1 * 3040) / 88.9));
    near(channelFactor(17, 11, 151), 2.29417633);
  });
  it('F3: M_p where compact, F3-1 where noncompact, 0.9 E k_c S/λ² where slender', () => {
    const of = { E, Fy, Mp: 5350, Sx: 100, kc: 0.5 };
    const limits = { p: 9.15, r: 24.1 };
    expect(flangeLocalBucklingMoment(of, 9, limits)).toBe(5350);
    near(flangeLocalBucklingMoment(of, 24.1, limits), 3500);
    near(flangeLocalBucklingMoment(of, 30, limits), 1450);
  });
});

describe('F6, F7, F8: the minor axis, boxes, round sections', () => {
  const limits = { p: 9.15, r: 24.1 };
  it('F6-1 stops at 1.6 Fy Sy', () => {
    near(minorAxisPlasticMoment(50, 14, 9.2), 700);
    near(minorAxisPlasticMoment(50, 16, 9.2), 736);
  });
  it('F6: compact 960 of 1.6 Fy Sy, noncompact, slender 0.69 E/λ²', () => {
    const of = { E, Fy, Zy: 20, Sy: 12 };
    near(minorAxisMoment(of, 9, limits), 960);
    near(minorAxisMoment({ ...of, Zy: 19 }, 12, limits), 950 - ((950 - 420) * (12 - 9.15)) / (24.1 - 9.15));
    near(minorAxisMoment(of, 30, limits), 266.8);
  });
  const box = { E, Fy, Z: 30, S: 24, I: 96, depth: 8, t: 0.2 };
  it('F7: a flange just beyond its limit keeps M_p at most; slender walls have an effective width', () => {
    const plain = { p: 26.97, r: 33.72 };
    near(boxFlangeMoment(box, 26, plain), 1500);
    expect(boxFlangeMoment(box, 26.98, plain)).toBeLessThanOrEqual(1500);
    const { be, Se } = boxEffectiveModulus(box, 37);
    const r = Math.sqrt(580);
    near(be, 1.92 * 0.2 * r * (1 - (0.38 / 37) * r));
    expect(be).toBeLessThan(37 * 0.2);
    expect(Se).toBeLessThan(24);
    near(boxFlangeMoment(box, 37, plain), 50 * Se);
  });
  it('F7-6: a noncompact web; a slender one is not covered', () => {
    const web = { p: 58.28, r: 137.27 };
    near(boxWebMoment(box, 58, web), 1500);
    near(boxWebMoment(box, 80, web), 1417.453544);
    expect(boxWebMoment(box, 138, web)).toBeNull();
  });
  it('F7-10 to F7-13: L_p 47.7, L_r 1310; three branches, never above M_p', () => {
    const of = { E, Fy, Z: 30, S: 24, ry: 1.5, J: 20, Ag: 8 };
    const { Lp, Lr } = boxLimitingLengths(of);
    near(Lp, 47.68714712);
    near(Lr, 1310.086459);
    const M = (Lb: number, Cb: number): number => boxLateralTorsionalMoment(of, Lp, Lr, Lb, Cb);
    expect(M(40, 1)).toBe(1500);
    near(M(400, 1), 1315.805918);
    near(M(2000, 1), 550.2363129);
    expect(M(400, 2)).toBe(1500);
    expect(M(2000, 4)).toBe(1500);
  });
  it('F8: compact, F8-2, F8-3; M_p is never passed; not covered from D/t = 0.45 E/Fy', () => {
    const of = { E, Fy: 42, Z: 64, S: 50 };
    const round = { p: 48.33, r: 214 };
    near(roundMoment(of, 40, round), 2688);
    near(roundMoment(of, 60, round), 2607.5);
    near(roundMoment(of, 250, round), 1914);
    expect(roundMoment({ ...of, Z: 55 }, 49, round)).toBe(2310);
    expect(roundMoment(of, 310.8, round)).toBeNull();
  });
});

describe('G: shear', () => {
  it('G2.1: φ 1.00 for rolled webs up to 53.9, else 0.90; C_v1 falls from 61.2', () => {
    expect(webShearCoefficient(580, 53.9, true)).toEqual({ Cv1: 1, factors: ROLLED_WEB });
    expect(webShearCoefficient(580, 54, true)).toEqual({ Cv1: 1, factors: USUAL });
    expect(webShearCoefficient(580, 40, false)).toEqual({ Cv1: 1, factors: USUAL });
    near(webShearCoefficient(580, 80, true).Cv1, 0.7652217816);
    near(shearStrength(50, 6.39, 1), 191.7);
  });
  it('G2-9 to G2-11: C_v2 with k_v = 5', () => {
    expect(shearBucklingCoefficient(580, 59, 5)).toBe(1);
    near(shearBucklingCoefficient(580, 65, 5), 0.9113355827);
    near(shearBucklingCoefficient(580, 90, 5), 0.540617284);
  });
  it('G5-2: the larger of two stresses, not above 0.6 Fy', () => {
    expect(roundShearStress(E, 50, 20, 0.25, 240)).toBe(30);
    near(roundShearStress(E, 100, 20, 0.25, 240), 55.98412229);
    near(roundShearStress(E, 100, 20, 0.25, 24000), 31.6124110319);
  });
});

describe('H1.1: together', () => {
  it('H1-1a from 0.2, H1-1b below; both give the same there', () => {
    near(interaction(0.4, 0.45), 0.8);
    near(interaction(0.1, 0.5), 0.55);
    near(interaction(0.2, 0.9), interaction(0.2 - 1e-12, 0.9), 1e-9);
  });
});
