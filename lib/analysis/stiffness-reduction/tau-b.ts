/** Factor on every stiffness that contributes to stability (AISC 360-22 C2.3(a)). */
export const generalReduction = 0.8;

/**
 * τ_b of a member: 1 up to α P_r/P_ns = 0.5, then 4 (α P_r/P_ns)(1 − α P_r/P_ns); 0 from the squash load on.
 * AISC 360-22 (C2-2a), (C2-2b).
 * @param share α P_r/P_ns, compression positive
 */
export function tauB(share: number): number {
  if (!(share > 0.5)) return 1;
  return share < 1 ? 4 * share * (1 - share) : 0;
}
