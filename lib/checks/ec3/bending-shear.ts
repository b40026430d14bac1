/** ρ = (2V_Ed/V_pl,Rd − 1)² where V_Ed is above half of V_pl,Rd, else 0 (EN 1993-1-1 6.2.8(2), (3), (6.29)). */
export function shearReduction(V: number, VplRd: number): number {
  const part = Math.abs(V) / VplRd;
  return part > 0.5 ? (2 * part - 1) ** 2 : 0;
}

/**
 * M_y,V,Rd = (W_pl − ρ Aw²/(4tw)) fy/γM0 ≤ M_c,Rd of an I with equal flanges bent about its major axis, N·m (EN 1993-1-1 (6.30)).
 * Other sections: the reduced yield strength (1 − ρ) fy of 6.2.8(3) for the whole section, on the safe side.
 * @param Aw hw tw
 */
export const reducedByWeb = (
  Wpl: number,
  rho: number,
  Aw: number,
  tw: number,
  fy: number,
  gammaM0: number,
  McRd: number,
): number => Math.min(McRd, ((Wpl - (rho * Aw * Aw) / (4 * tw)) * fy) / gammaM0);
