import type { SectionProperties } from '@/lib/model/frame';
import { overProfile, type FlangeProfile } from './flange-profile';

/** A rolled I or channel with tapered flanges, m: radii at root and toe, slope of the inner face, where tf is measured. */
export interface TaperedDimensions {
  readonly h: number;
  readonly b: number;
  readonly tw: number;
  readonly tf: number;
  readonly r: number;
  readonly toe: number;
  readonly slope: number;
  readonly at: number;
}

const profileOf = (d: TaperedDimensions, from: number, to: number): FlangeProfile => ({
  from,
  to,
  tf: d.tf,
  at: d.at,
  slope: d.slope,
  root: d.r,
  toe: d.toe,
});

/** Second and first (plastic) moment about the major axis: web, and `halves` half flanges. */
function aboutMajor(d: TaperedDimensions, profile: FlangeProfile, halves: number): { I: number; Wpl: number } {
  const half = d.h / 2;
  const flanges = overProfile(profile, (y) => (half ** 3 - (half - y) ** 3) / 3);
  const first = overProfile(profile, (y) => (half ** 2 - (half - y) ** 2) / 2);
  return { I: (d.tw * d.h ** 3) / 12 + halves * flanges, Wpl: (d.tw * d.h ** 2) / 4 + halves * first };
}

/**
 * A, I, W and Wpl exactly for the outline of an I section with tapered flanges. Torsion and warping are not given: no closed
 * form for such flanges comes near enough. Shear areas as for parallel flanges, with the mean thickness tf.
 */
export function propertiesOfTaperedI(d: TaperedDimensions): SectionProperties {
  const profile = profileOf(d, d.tw / 2, d.b / 2);
  const area = overProfile(profile, (y) => y);
  const { I, Wpl } = aboutMajor(d, profile, 4);
  const Iminor = (d.h * d.tw ** 3) / 12 + 4 * overProfile(profile, (y, x) => y * x * x);
  const WplMinor = (d.h * d.tw ** 2) / 4 + 4 * overProfile(profile, (y, x) => y * x);
  return { ...shared(d, d.h * d.tw + 4 * area, I, Wpl), Iminor_m4: Iminor, Wminor_m3: (2 * Iminor) / d.b, WplMinor_m3: WplMinor };
}

/** The same for a channel; x from the back of its web, W minor the smaller, at the toes or at the back. */
export function propertiesOfTaperedChannel(d: TaperedDimensions): SectionProperties {
  const profile = profileOf(d, d.tw, d.b);
  const A = d.h * d.tw + 2 * overProfile(profile, (y) => y);
  const { I, Wpl } = aboutMajor(d, profile, 2);
  const first = (d.h * d.tw ** 2) / 2 + 2 * overProfile(profile, (y, x) => y * x);
  const centroid = first / A;
  const Iminor = (d.h * d.tw ** 3) / 3 + 2 * overProfile(profile, (y, x) => y * x * x) - A * centroid ** 2;
  const back = halvingLine(d, profile, A);
  const toBack = back <= d.tw ? (d.h * back ** 2) / 2 : (d.h * d.tw ** 2) / 2 + 2 * overProfile(profile, (y, x) => y * x, back);
  return {
    ...shared(d, A, I, Wpl),
    Iminor_m4: Iminor,
    Wminor_m3: Iminor / Math.max(centroid, d.b - centroid),
    // Σ |distance| dA = moment of all about the back − 2 × moment of the back half, since the two areas are equal
    WplMinor_m3: first - 2 * toBack,
  };
}

/** Distance from the back of the line that halves the area, by bisection. */
function halvingLine(d: TaperedDimensions, profile: FlangeProfile, A: number): number {
  let low = 0;
  let high = d.b;
  for (let i = 0; i < 60; i++) {
    const x = (low + high) / 2;
    const area = x <= d.tw ? d.h * x : d.h * d.tw + 2 * overProfile(profile, (y) => y, x);
    if (area < A / 2) low = x;
    else high = x;
  }
  return (low + high) / 2;
}

type Minor = 'Iminor_m4' | 'Wminor_m3' | 'WplMinor_m3';
function shared(d: TaperedDimensions, A: number, I: number, Wpl: number): Omit<SectionProperties, Minor> {
  const flanges = 2 * d.b * d.tf;
  return {
    A_m2: A,
    I_m4: I,
    Wtop_m3: (2 * I) / d.h,
    Wbottom_m3: (2 * I) / d.h,
    depth_m: d.h,
    width_m: d.b,
    AvTyped_m2: null,
    AvPeak_m2: (I * d.tw) / (Wpl / 2),
    AvPeakTurned_m2: (2 / 3) * flanges,
    AvShear_m2: d.h * d.tw,
    AvShearTurned_m2: (5 / 6) * flanges,
    Wpl_m3: Wpl,
    It_m4: null,
    Iw_m6: null,
    t_m: Math.max(d.tf, d.tw),
  };
}
