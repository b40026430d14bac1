import type { SectionProperties } from '@/lib/model/frame';

/**
 * Properties of a solid rectangular bar h (along the depth) × b, in m. It after Roark: a b³ (⅓ − 0.21 (b/a)(1 − b⁴/12a⁴)),
 * a the longer side; warping null. Shear: peak 2A/3, for deformation 5A/6, either way up.
 */
export function propertiesOfBar(h: number, b: number): SectionProperties {
  const A = h * b;
  const long = Math.max(h, b);
  const short = Math.min(h, b);
  return {
    A_m2: A,
    I_m4: (b * h ** 3) / 12,
    Wtop_m3: (b * h ** 2) / 6,
    Wbottom_m3: (b * h ** 2) / 6,
    depth_m: h,
    width_m: b,
    AvTyped_m2: null,
    AvPeak_m2: (2 * A) / 3,
    AvPeakTurned_m2: (2 * A) / 3,
    AvShear_m2: (5 * A) / 6,
    AvShearTurned_m2: (5 * A) / 6,
    Wpl_m3: (b * h ** 2) / 4,
    Iminor_m4: (h * b ** 3) / 12,
    Wminor_m3: (h * b ** 2) / 6,
    WplMinor_m3: (h * b ** 2) / 4,
    It_m4: long * short ** 3 * (1 / 3 - 0.21 * (short / long) * (1 - (short / long) ** 4 / 12)),
    Iw_m6: null,
    t_m: short,
  };
}

/** Properties of a solid round bar of diameter d, in m: exact. Shear: peak 3A/4, for deformation 0.9A. */
export function propertiesOfRound(d: number): SectionProperties {
  const A = (Math.PI * d * d) / 4;
  const I = (Math.PI * d ** 4) / 64;
  return {
    A_m2: A,
    I_m4: I,
    Wtop_m3: (2 * I) / d,
    Wbottom_m3: (2 * I) / d,
    depth_m: d,
    width_m: d,
    AvTyped_m2: null,
    AvPeak_m2: (3 * A) / 4,
    AvPeakTurned_m2: (3 * A) / 4,
    AvShear_m2: 0.9 * A,
    AvShearTurned_m2: 0.9 * A,
    Wpl_m3: d ** 3 / 6,
    Iminor_m4: I,
    Wminor_m3: (2 * I) / d,
    WplMinor_m3: d ** 3 / 6,
    It_m4: 2 * I,
    Iw_m6: null,
    t_m: d,
  };
}
