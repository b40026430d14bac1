import type { Limits } from './width-limits';

/**
 * Compression flange local buckling of an I with a compact web, bent about its major axis (AISC 360-22 F3.2), N·m:
 * M_p − (M_p − 0.7 F_y S_x)(λ − λ_pf)/(λ_rf − λ_pf) where noncompact (F3-1), 0.9 E k_c S_x/λ² where slender (F3-2);
 * M_p where compact (F3 does not apply).
 */
export function flangeLocalBucklingMoment(
  of: { readonly E: number; readonly Fy: number; readonly Mp: number; readonly Sx: number; readonly kc: number },
  lambda: number,
  limits: Limits,
): number {
  if (lambda <= limits.p) return of.Mp;
  if (lambda <= limits.r) return betweenLimits(of.Mp, 0.7 * of.Fy * of.Sx, lambda, limits);
  return (0.9 * of.E * of.kc * of.Sx) / lambda ** 2;
}

/** The straight line from M_p at λ_p to M_r at λ_r ((F3-1), (F6-2)). */
export function betweenLimits(Mp: number, Mr: number, lambda: number, limits: Limits): number {
  return Mp - ((Mp - Mr) * (lambda - limits.p)) / (limits.r - limits.p);
}
