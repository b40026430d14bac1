import type { SectionProperties } from '@/lib/model/frame';
import { filletArea, filletCentroid, filletInertia } from './fillet';

/**
 * Properties of a rectangular hollow section from its dimensions in m: h × b outside, wall t, outer corner radius r,
 * inner ri (r − t, not below 0, unless a product standard calculates with another). Formulas of EN 10210-2, annex A. Closed: warping is negligible, Iw is left null.
 * Shear: peak I·2t/S, for deformation 2·h·t (2·b·t turned).
 */
export function propertiesOfRhs(h: number, b: number, t: number, r: number, ri = Math.max(0, r - t)): SectionProperties {
  const major = aboutAxis(h, b, t, r, ri);
  const minor = aboutAxis(b, h, t, r, ri);
  const A = 2 * t * (h + b - 2 * t) - 4 * filletArea(r) + 4 * filletArea(ri);
  const Rc = (r + ri) / 2;
  const round = Rc * (4 - Math.PI);
  const perimeter = 2 * (h - t + b - t) - 2 * round;
  const enclosed = (h - t) * (b - t) - Rc * round;
  return {
    A_m2: A,
    I_m4: major.I,
    Wtop_m3: (2 * major.I) / h,
    Wbottom_m3: (2 * major.I) / h,
    depth_m: h,
    width_m: b,
    AvTyped_m2: null,
    AvPeak_m2: (major.I * 2 * t) / (major.Wpl / 2),
    AvPeakTurned_m2: (minor.I * 2 * t) / (minor.Wpl / 2),
    AvShear_m2: 2 * h * t,
    AvShearTurned_m2: 2 * b * t,
    Wpl_m3: major.Wpl,
    Iminor_m4: minor.I,
    Wminor_m3: (2 * minor.I) / b,
    WplMinor_m3: minor.Wpl,
    It_m4: (t ** 3 * perimeter) / 3 + (4 * enclosed ** 2 * t) / perimeter,
    Iw_m6: null,
    t_m: t,
  };
}

/** I and Wpl about the axis square to `depth`: outer rectangle less inner, outer corners cut, inner corners filled. */
function aboutAxis(depth: number, width: number, t: number, ro: number, ri: number): { I: number; Wpl: number } {
  const di = depth - 2 * t;
  const wi = width - 2 * t;
  const outer = depth / 2 - filletCentroid(ro);
  const inner = di / 2 - filletCentroid(ri);
  const I =
    (width * depth ** 3 - wi * di ** 3) / 12 -
    4 * (filletInertia(ro) + filletArea(ro) * outer ** 2) +
    4 * (filletInertia(ri) + filletArea(ri) * inner ** 2);
  const Wpl = (width * depth ** 2 - wi * di ** 2) / 4 - 4 * filletArea(ro) * outer + 4 * filletArea(ri) * inner;
  return { I, Wpl };
}

/** Properties of a circular hollow section from its outer diameter d and wall t in m: exact. Iw null (closed). */
export function propertiesOfChs(d: number, t: number): SectionProperties {
  const di = d - 2 * t;
  const A = (Math.PI * (d * d - di * di)) / 4;
  const I = (Math.PI * (d ** 4 - di ** 4)) / 64;
  const W = (2 * I) / d;
  const Wpl = (d ** 3 - di ** 3) / 6;
  const AvPeak = (I * 2 * t) / (Wpl / 2);
  return {
    A_m2: A,
    I_m4: I,
    Wtop_m3: W,
    Wbottom_m3: W,
    depth_m: d,
    width_m: d,
    AvTyped_m2: null,
    AvPeak_m2: AvPeak,
    AvPeakTurned_m2: AvPeak,
    AvShear_m2: A / 2,
    AvShearTurned_m2: A / 2,
    Wpl_m3: Wpl,
    Iminor_m4: I,
    Wminor_m3: W,
    WplMinor_m3: Wpl,
    It_m4: 2 * I,
    Iw_m6: null,
    t_m: t,
  };
}
