/** Tensile yielding in the gross section: P_n = F_y A_g (AISC 360-22 D2(a), (D2-1)), N. Rupture needs the net area: not covered. */
export function tensileYielding(Fy: number, Ag: number): number {
  return Fy * Ag;
}
