import { betweenLimits } from './flange-local-buckling';
import type { Limits } from './width-limits';

/** M_p = F_y Z_y ≤ 1.6 F_y S_y (AISC 360-22 F6.1, (F6-1)), N·m. */
export function minorAxisPlasticMoment(Fy: number, Zy: number, Sy: number): number {
  return Math.min(Fy * Zy, 1.6 * Fy * Sy);
}

/**
 * I shapes and channels bent about their minor axis (F6), N·m: M_p where the flanges are compact; (F6-2) where noncompact,
 * M_r = 0.7 F_y S_y; F_cr S_y where slender (F6-3), F_cr = 0.69 E/(b/t_f)² (F6-4): editions print 0.69 or 0.70, the smaller is taken.
 */
export function minorAxisMoment(
  of: { readonly E: number; readonly Fy: number; readonly Zy: number; readonly Sy: number },
  lambda: number,
  limits: Limits,
): number {
  const Mp = minorAxisPlasticMoment(of.Fy, of.Zy, of.Sy);
  if (lambda <= limits.p) return Mp;
  if (lambda <= limits.r) return betweenLimits(Mp, 0.7 * of.Fy * of.Sy, lambda, limits);
  return minorAxisCriticalStress(of.E, lambda) * of.Sy;
}

/** F_cr of a slender flange (F6-4), Pa. */
function minorAxisCriticalStress(E: number, lambda: number): number {
  return (0.69 * E) / lambda ** 2;
}
