/** Elastic buckling stress F_e = π² E/(L_c/r)² (AISC 360-22 E3, (E3-4)), Pa. */
export function elasticBucklingStress(E: number, slenderness: number): number {
  return (Math.PI ** 2 * E) / slenderness ** 2;
}

/** Nominal stress F_n: 0.658^(F_y/F_e) F_y up to F_y/F_e = 2.25 (E3-2), 0.877 F_e beyond (E3-3), Pa. */
export function nominalStress(Fy: number, Fe: number): number {
  return inelastic(Fy, Fe) ? 0.658 ** (Fy / Fe) * Fy : 0.877 * Fe;
}

/** Whether (E3-2) holds rather than (E3-3): F_y/F_e ≤ 2.25, the same as L_c/r ≤ 4.71√(E/F_y). */
export function inelastic(Fy: number, Fe: number): boolean {
  return Fy / Fe <= 2.25;
}
