import type { Limits } from './width-limits';

/**
 * Round hollow sections in bending (AISC 360-22 F8), N·m, the smaller of M_p = F_y Z (F8-1) and, where noncompact,
 * (0.021 E/(D/t) + F_y) S (F8-2), where slender F_cr S (F8-3), F_cr = 0.33 E/(D/t) (F8-4); null from D/t = 0.45 E/F_y, which F8 does
 * not cover.
 */
export function roundMoment(
  of: { readonly E: number; readonly Fy: number; readonly Z: number; readonly S: number },
  Dt: number,
  limits: Limits,
): number | null {
  const Mp = of.Fy * of.Z;
  if (Dt >= (0.45 * of.E) / of.Fy) return null;
  if (Dt <= limits.p) return Mp;
  if (Dt <= limits.r) return Math.min(Mp, ((0.021 * of.E) / Dt + of.Fy) * of.S);
  return Math.min(Mp, ((0.33 * of.E) / Dt) * of.S);
}
