/**
 * Axial force and bending about one axis (AISC 360-22 H1.1 and, with tension, H1.2; moments about the other axis are nil in a plane
 * frame): P_r/P_c + (8/9) M_r/M_c from P_r/P_c = 0.2 (H1-1a), P_r/(2P_c) + M_r/M_c below (H1-1b).
 */
export function interaction(axial: number, bending: number): number {
  return axial >= 0.2 ? axial + (8 / 9) * bending : axial / 2 + bending;
}
