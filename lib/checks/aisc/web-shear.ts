import { ROLLED_WEB, USUAL, type Factors } from './strength';

/** Web shear buckling coefficient of webs without transverse stiffeners (AISC 360-22 G2.1(b)). */
export const KV_WEB = 5.34;

/**
 * C_v1 and the factors of a web without stiffeners: 1 and φ = 1.00, Ω = 1.50 for rolled I shapes up to h/t_w = 2.24√(E/F_y) (G2-2);
 * for all others 1 up to 1.10√(k_v E/F_y) (G2-3), then 1.10√(k_v E/F_y)/(h/t_w) (G2-4), φ = 0.90, Ω = 1.67.
 */
export function webShearCoefficient(
  EperFy: number,
  ht: number,
  rolledI: boolean,
): { readonly Cv1: number; readonly factors: Factors } {
  if (rolledI && ht <= 2.24 * Math.sqrt(EperFy)) return { Cv1: 1, factors: ROLLED_WEB };
  const limit = 1.1 * Math.sqrt(KV_WEB * EperFy);
  return { Cv1: ht <= limit ? 1 : limit / ht, factors: USUAL };
}

/** V_n = 0.6 F_y A_w C_v (G2-1, G4-1, G6-1), N. */
export function shearStrength(Fy: number, Aw: number, Cv: number): number {
  return 0.6 * Fy * Aw * Cv;
}
