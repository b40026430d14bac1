import type { Section } from '@/lib/model/frame';
import { reductionFactor, type Curve } from './reduction-factor';

/** Curve of the general case, doubly symmetric I (EN 1993-1-1 Table 6.4); `made` not said: as welded. */
export const generalCurve = (made: Section['made'], h: number, b: number): Curve =>
  made === 'rolled' ? (h / b <= 2 ? 'a' : 'b') : h / b <= 2 ? 'c' : 'd';

/** Curve of rolled and equivalent welded I (EN 1993-1-1 Table 6.5). */
export const rolledCurve = (made: Section['made'], h: number, b: number): Curve =>
  made === 'rolled' ? (h / b <= 2 ? 'b' : 'c') : h / b <= 2 ? 'c' : 'd';

/** Recommended λ̄LT,0 and β of 6.3.2.3(1). */
export const plateauLT = 0.4;
const betaLT = 0.75;

export interface LateralResistance {
  readonly lambda: number;
  readonly phi: number;
  /** χ_LT before f. */
  readonly chi: number;
  readonly kc: number;
  readonly f: number;
  /** χ_LT, or χ_LT,mod in the rolled case. */
  readonly chiMod: number;
  readonly MbRd: number;
}

/** General case: λ̄LT = √(W fy/M_cr), χ_LT, M_b,Rd = χ_LT W fy/γM1 (EN 1993-1-1 6.3.2.1 (6.55), 6.3.2.2 (6.56)). */
export function generalCase(W: number, fy: number, Mcr: number, curve: Curve, gammaM1: number): LateralResistance {
  const lambda = Math.sqrt((W * fy) / Mcr);
  const { phi, chi } = reductionFactor(lambda, curve);
  return { lambda, phi, chi, kc: 1, f: 1, chiMod: chi, MbRd: (chi * W * fy) / gammaM1 };
}

/**
 * Rolled and equivalent welded sections: χ_LT by (6.57), f = 1 − 0.5(1 − kc)[1 − 2(λ̄LT − 0.8)²] ≤ 1, χ_LT,mod = χ_LT/f ≤ 1 and
 * ≤ 1/λ̄LT² (EN 1993-1-1 6.3.2.3 (6.57), (6.58)).
 */
export function rolledCase(W: number, fy: number, Mcr: number, curve: Curve, kc: number, gammaM1: number): LateralResistance {
  const lambda = Math.sqrt((W * fy) / Mcr);
  const { phi, chi } = reductionFactor(lambda, curve, plateauLT, betaLT);
  const f = Math.min(1, 1 - 0.5 * (1 - kc) * (1 - 2 * (lambda - 0.8) ** 2));
  const chiMod = Math.min(1, 1 / (lambda * lambda), chi / f);
  return { lambda, phi, chi, kc, f, chiMod, MbRd: (chiMod * W * fy) / gammaM1 };
}

/**
 * kc of 6.3.2.3(2): Table 6.6 for a straight diagram, 1/(1.33 − 0.33ψ); else 1/√C1. Beside end moments the table has for a uniform
 * load 0.90 and 0.91, far above 1/√C1: under any load but a force at the middle kc is not below 0.90.
 * @param load what bends the length between its ends: 'none' of it (a bow of second order only), 'middle' a force there, or 'other'
 */
export function correctionFactor(straight: boolean, psi: number, C1: number, load: 'none' | 'middle' | 'other'): number {
  if (straight) return 1 / (1.33 - 0.33 * psi);
  return Math.min(1, Math.max(load === 'other' ? 0.9 : 0, 1 / Math.sqrt(C1)));
}
