/**
 * C_v2 (AISC 360-22 G2.2(b)): 1 up to h/t_w = 1.10√(k_v E/F_y) (G2-9); 1.10√(k_v E/F_y)/(h/t_w) up to 1.37√(k_v E/F_y) (G2-10);
 * 1.51 k_v E/((h/t_w)² F_y) beyond (G2-11). Used by G4 with k_v = 5 (walls of boxes) and by G6 with k_v = 1.2 (flanges).
 */
export function shearBucklingCoefficient(EperFy: number, ht: number, kv: number): number {
  const root = Math.sqrt(kv * EperFy);
  if (ht <= 1.1 * root) return 1;
  return ht <= 1.37 * root ? (1.1 * root) / ht : (1.51 * kv * EperFy) / ht ** 2;
}

/** k_v of G4 (two walls of a box) and of G6 (flanges sheared along their width). */
export const KV_BOX = 5;
export const KV_FLANGE = 1.2;
