/**
 * Lateral-torsional buckling modification factor C_b = 12.5 M_max/(2.5 M_max + 3 M_A + 4 M_B + 3 M_C) (AISC 360-22 F1, (F1-1)),
 * every moment in its size: the largest of the unbraced segment, and those at its quarter points. 1 where there is no moment.
 */
export function momentGradient(max: number, A: number, B: number, C: number): number {
  const largest = Math.abs(max);
  const under = 2.5 * largest + 3 * Math.abs(A) + 4 * Math.abs(B) + 3 * Math.abs(C);
  return largest > 0 ? (12.5 * largest) / under : 1;
}
