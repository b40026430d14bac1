/** Which expression of EN 1993-1-1 6.2.9.1 gives M_N,Rd of a section of class 1 or 2. */
export type PlasticInteraction = 'I major' | 'I minor' | 'rhs' | 'linear';

/**
 * M_N,Rd over M_pl,Rd, the plastic moment that N leaves (EN 1993-1-1 6.2.9.1):
 * - I major: 1 while N ≤ 0.25 N_pl and N ≤ 0.5 hw tw fy/γM0 ((6.33), (6.34)), else (1 − n)/(1 − 0.5a) ≤ 1 (6.36);
 * - I minor: 1 for N ≤ hw tw fy/γM0 (6.35) or n ≤ a (6.37), else 1 − ((n − a)/(1 − a))² (6.38);
 * - rhs: (1 − n)/(1 − 0.5a) ≤ 1 ((6.39), (6.40)), a being a_w, or a_f where turned;
 * - linear: 1 − n, from (6.2).
 * @param n |N|/N_pl,Rd   @param a of the expression, ≤ 0.5 (I: (A − 2b tf)/A)   @param web hw tw/A (I only)
 */
export function momentLeft(of: PlasticInteraction, n: number, a: number, web: number): number {
  switch (of) {
    case 'I major':
      return n <= 0.25 && n <= 0.5 * web ? 1 : clamp((1 - n) / (1 - 0.5 * a));
    case 'I minor':
      return n <= web || n <= a ? 1 : clamp(1 - ((n - a) / (1 - a)) ** 2) * (n < 1 ? 1 : 0);
    case 'rhs':
      return clamp((1 - n) / (1 - 0.5 * a));
    case 'linear':
      return clamp(1 - n);
  }
}

const clamp = (part: number): number => Math.min(1, Math.max(0, part));

/** σ_x,Ed = |N|/A + |M|/W_el, Pa, against fy/γM0 in class 3 (EN 1993-1-1 6.2.9.2(1), (6.42)). */
export const longitudinalStress = (N: number, M: number, A: number, Wel: number): number => Math.abs(N) / A + Math.abs(M) / Wel;
