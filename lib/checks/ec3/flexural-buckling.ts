import type { Section } from '@/lib/model/frame';
import type { CoveredShape } from './classification';
import { reductionFactor, type Curve, type Reduction } from './reduction-factor';

/**
 * Buckling curve of a section about one of its axes (EN 1993-1-1 Table 6.2). `made` not said: the lower of the two.
 * Rolled I of h/b > 1.2 thicker than 100 mm are not in the table: curve d, as for h/b ≤ 1.2.
 * @param s460 grade S460: the table's last column
 */
export function bucklingCurve(
  shape: CoveredShape,
  made: Section['made'],
  axis: 'major' | 'minor',
  h: number,
  b: number,
  tf: number,
  s460: boolean,
): Curve {
  const major = axis === 'major';
  if (shape === 'rhs' || shape === 'chs') return made === 'hot finished' ? (s460 ? 'a0' : 'a') : 'c';
  if (shape === 'channel') return 'c';
  if (made !== 'rolled') {
    if (made === null && tf > 0.1) return 'd';
    return tf <= 0.04 ? (major ? 'b' : 'c') : major ? 'c' : 'd';
  }
  if (tf > 0.1) return s460 ? 'c' : 'd';
  if (h / b > 1.2) {
    if (tf <= 0.04) return s460 ? 'a0' : major ? 'a' : 'b';
    return s460 ? 'a' : major ? 'b' : 'c';
  }
  return s460 ? 'a' : major ? 'b' : 'c';
}

/** N_cr = π²EI/L_cr², N (EN 1993-1-1 6.3.1.2, elastic critical force). */
export const criticalForce = (E: number, I: number, Lcr: number): number => (Math.PI ** 2 * E * I) / (Lcr * Lcr);

/**
 * N_cr,T = (G I_t + π²E I_w/L_T²)/i0², i0² = (I_y + I_z)/A, N: torsional buckling of a doubly symmetric open section
 * (EN 1993-1-1 6.3.1.4; EN 1993-1-3 (6.33a)).
 */
export const torsionalForce = (E: number, G: number, It: number, Iw: number, i0squared: number, LT: number): number =>
  (G * It + (Math.PI ** 2 * E * Iw) / (LT * LT)) / i0squared;

export interface Buckling extends Reduction {
  readonly lambda: number;
  readonly NbRd: number;
}

/** λ̄ = √(A fy/N_cr), χ, N_b,Rd = χ A fy/γM1 for class 1, 2 and 3 (EN 1993-1-1 6.3.1.1 (6.47), 6.3.1.2 (6.49)). */
export function bucklingResistance(A: number, fy: number, Ncr: number, curve: Curve, gammaM1: number): Buckling {
  const lambda = Math.sqrt((A * fy) / Ncr);
  const { phi, chi } = reductionFactor(lambda, curve);
  return { lambda, phi, chi, NbRd: (chi * A * fy) / gammaM1 };
}
