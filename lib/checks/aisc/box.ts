import { inelasticMoment } from './lateral-torsional';
import type { Limits } from './width-limits';

/** A rectangular hollow section, about the axis it is bent about, SI. */
export interface Box {
  readonly E: number;
  readonly Fy: number;
  readonly Z: number;
  readonly S: number;
  readonly I: number;
  /** Outside, along the depth (square to the axis). */
  readonly depth: number;
  readonly t: number;
}

/**
 * Flange local buckling (AISC 360-22 F7.2), N·m: M_p where compact; M_p − (M_p − F_y S)(3.57 (b/t_f)√(F_y/E) − 4.0) ≤ M_p where
 * noncompact (F7-2); F_y S_e where slender (F7-3).
 */
export function boxFlangeMoment(of: Box, bt: number, limits: Limits): number {
  const Mp = of.Fy * of.Z;
  if (bt <= limits.p) return Mp;
  if (bt > limits.r) return of.Fy * boxEffectiveModulus(of, bt).Se;
  return Math.min(Mp, Mp - (Mp - of.Fy * of.S) * (3.57 * bt * Math.sqrt(of.Fy / of.E) - 4));
}

/**
 * Effective width of a slender flange, b_e = 1.92 t_f √(E/F_y)(1 − (0.38/(b/t_f))√(E/F_y)) ≤ b (F7-4), and the modulus with both
 * flanges reduced to it, on the safe side: the axis stays where it is.
 */
export function boxEffectiveModulus(of: Box, bt: number): { readonly be: number; readonly Se: number } {
  const root = Math.sqrt(of.E / of.Fy);
  const be = Math.min(bt * of.t, 1.92 * of.t * root * (1 - (0.38 / bt) * root));
  const lost = bt * of.t - be;
  const Ie = of.I - 2 * (lost * of.t * ((of.depth - of.t) / 2) ** 2 + (lost * of.t ** 3) / 12);
  return { be, Se: (2 * Ie) / of.depth };
}

/**
 * Web local buckling (F7.3), N·m: M_p where compact, M_p − (M_p − F_y S)(0.305 (h/t_w)√(F_y/E) − 0.738) ≤ M_p where
 * noncompact (F7-6); null where slender: F7.3(c) is not covered.
 */
export function boxWebMoment(of: Box, ht: number, limits: Limits): number | null {
  const Mp = of.Fy * of.Z;
  if (ht <= limits.p) return Mp;
  if (ht > limits.r) return null;
  return Math.min(Mp, Mp - (Mp - of.Fy * of.S) * (0.305 * ht * Math.sqrt(of.Fy / of.E) - 0.738));
}

/** A box bent about its major axis, for lateral-torsional buckling. */
export interface BoxTorsion {
  readonly E: number;
  readonly Fy: number;
  readonly Z: number;
  readonly S: number;
  readonly ry: number;
  readonly J: number;
  readonly Ag: number;
}

/** L_p = 0.13 E r_y √(J A_g)/M_p (F7-12), L_r = 2 E r_y √(J A_g)/(0.7 F_y S_x) (F7-13), m. */
export function boxLimitingLengths(of: BoxTorsion): { readonly Lp: number; readonly Lr: number } {
  const stiffness = of.E * of.ry * Math.sqrt(of.J * of.Ag);
  return { Lp: (0.13 * stiffness) / (of.Fy * of.Z), Lr: (2 * stiffness) / (0.7 * of.Fy * of.S) };
}

/** Lateral-torsional buckling of a box (F7.4), N·m: M_p up to L_p; (F7-10) up to L_r; 2 E C_b √(J A_g)/(L_b/r_y) ≤ M_p beyond (F7-11). */
export function boxLateralTorsionalMoment(of: BoxTorsion, Lp: number, Lr: number, Lb: number, Cb: number): number {
  const Mp = of.Fy * of.Z;
  if (Lb <= Lp) return Mp;
  if (Lb <= Lr) return inelasticMoment(Mp, 0.7 * of.Fy * of.S, Lp, Lr, Lb, Cb);
  return Math.min(Mp, (2 * of.E * Cb * of.ry * Math.sqrt(of.J * of.Ag)) / Lb);
}
