/** N_t,Rd = N_pl,Rd = A fy/γM0, N (EN 1993-1-1 6.2.3(2)a, (6.6)). Holes (N_u,Rd of (6.7)) are not known and not checked. */
export const tensionResistance = (A: number, fy: number, gammaM0: number): number => (A * fy) / gammaM0;
