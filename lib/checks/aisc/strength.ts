/** The two ways of AISC 360-22 B3: load and resistance factor design (B3.1), allowable strength design (B3.2). */
export type Method = 'LRFD' | 'ASD';

/** A resistance factor φ and a safety factor Ω of one clause. */
export interface Factors {
  readonly phi: number;
  readonly omega: number;
}

/** D2, E1, F1(a), G1: φ = 0.90, Ω = 1.67. */
export const USUAL: Factors = { phi: 0.9, omega: 1.67 };
/** G2.1(a), webs of rolled I shapes: φ = 1.00, Ω = 1.50. */
export const ROLLED_WEB: Factors = { phi: 1, omega: 1.5 };

/** Available strength of a nominal one: φ R_n (B3-1) or R_n/Ω (B3-2). */
export function available(method: Method, nominal: number, factors: Factors): number {
  return method === 'LRFD' ? factors.phi * nominal : nominal / factors.omega;
}
