/** Table E7.1: c₁ of stiffened elements (webs), of walls of square and rectangular HSS, and of all other elements (flanges). */
export const C1 = { web: 0.18, wall: 0.2, flange: 0.22 } as const;

/** c₂ = (1 − √(1 − 4c₁))/(2c₁) (AISC 360-22 (E7-4)); Table E7.1 prints 1.31, 1.38, 1.49. */
export function c2(c1: number): number {
  return (1 - Math.sqrt(1 - 4 * c1)) / (2 * c1);
}

/** Elastic local buckling stress F_el = (c₂ λ_r/λ)² F_y (E7-5), Pa. */
export function localBucklingStress(c1: number, lambda: number, lambdaR: number, Fy: number): number {
  return ((c2(c1) * lambdaR) / lambda) ** 2 * Fy;
}

/**
 * Effective width over width: 1 up to λ = λ_r √(F_y/F_n) (E7-2), then (1 − c₁√(F_el/F_n)) √(F_el/F_n) (E7-3).
 * @param Fn nominal stress of the whole member by E3 or E4, Pa
 */
export function effectiveWidthRatio(c1: number, lambda: number, lambdaR: number, Fy: number, Fn: number): number {
  if (lambda <= lambdaR * Math.sqrt(Fy / Fn)) return 1;
  const root = Math.sqrt(localBucklingStress(c1, lambda, lambdaR, Fy) / Fn);
  return (1 - c1 * root) * root;
}

/**
 * Effective area of a round section over its gross area: 1 up to D/t = 0.11 E/F_y (E7-6), then 0.038 E/(F_y D/t) + 2/3 (E7-7);
 * null from D/t = 0.45 E/F_y, which the clause does not cover.
 */
export function effectiveAreaRatioOfRound(EperFy: number, Dt: number): number | null {
  if (Dt >= 0.45 * EperFy) return null;
  return Dt <= 0.11 * EperFy ? 1 : (0.038 * EperFy) / Dt + 2 / 3;
}
