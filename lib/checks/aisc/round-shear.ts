/**
 * F_cr of a round section in shear (AISC 360-22 G5), Pa: the larger of 1.60 E/(√(L_v/D) (D/t)^(5/4)) (G5-2a) and
 * 0.78 E/(D/t)^(3/2) (G5-2b), not above 0.6 F_y. V_n = F_cr A_g/2 (G5-1).
 * @param Lv from the greatest shear to none, m; the longer, the smaller F_cr
 */
export function roundShearStress(E: number, Fy: number, D: number, t: number, Lv: number): number {
  const Dt = D / t;
  const long = (1.6 * E) / (Math.sqrt(Lv / D) * Dt ** 1.25);
  const short = (0.78 * E) / Dt ** 1.5;
  return Math.min(0.6 * Fy, Math.max(long, short));
}
