/** Class of a cross-section or of one of its plates. */
export type SectionClass = 1 | 2 | 3 | 4;

/** c/t (or d/t) up to which a plate is of class 1, 2, 3. */
export type Limits = readonly [number, number, number];

/** ε = √(235 N/mm² / fy) (EN 1993-1-1 Table 5.2); fy in Pa. */
export const epsilonOf = (fy: number): number => Math.sqrt(235e6 / fy);

export function classWithin(slenderness: number, limits: Limits): SectionClass {
  if (slenderness <= limits[0]) return 1;
  if (slenderness <= limits[1]) return 2;
  return slenderness <= limits[2] ? 3 : 4;
}

/** Internal part in uniform compression: 33ε, 38ε, 42ε (Table 5.2, sheet 1). */
export const internalPressed = (epsilon: number): Limits => [33 * epsilon, 38 * epsilon, 42 * epsilon];

/**
 * Internal part in bending and compression (Table 5.2, sheet 1): class 1 396ε/(13α − 1), 36ε/α; class 2 456ε/(13α − 1), 41.5ε/α;
 * class 3 42ε/(0.67 + 0.33ψ) for ψ > −1, 62ε(1 − ψ)√−ψ for ψ ≤ −1. α = 0.5, ψ = −1 gives 72ε, 83ε, 124ε.
 * @param alpha part of the plate in compression, plastic   @param psi stress ratio of its edges, elastic
 */
export function internalBent(epsilon: number, alpha: number, psi: number): Limits {
  const plastic = (whole: number, part: number): number =>
    alpha > 0.5 ? (whole * epsilon) / (13 * alpha - 1) : (part * epsilon) / alpha;
  const elastic = psi > -1 ? (42 * epsilon) / (0.67 + 0.33 * psi) : 62 * epsilon * (1 - psi) * Math.sqrt(-psi);
  return [plastic(396, 36), plastic(456, 41.5), elastic];
}

/** Outstand flange in uniform compression: 9ε, 10ε, 14ε (Table 5.2, sheet 2). */
export const outstandPressed = (epsilon: number): Limits => [9 * epsilon, 10 * epsilon, 14 * epsilon];

/** Tube in bending and/or compression: d/t up to 50ε², 70ε², 90ε² (Table 5.2, sheet 3). */
export const tube = (epsilon: number): Limits => [50 * epsilon ** 2, 70 * epsilon ** 2, 90 * epsilon ** 2];
