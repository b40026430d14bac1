import type { Basis } from './basis';
import { roundShearStress } from './round-shear';
import { KV_BOX, KV_FLANGE, shearBucklingCoefficient } from './shear-buckling-coefficient';
import { available, USUAL, type Factors } from './strength';
import { KV_WEB, shearStrength as nominal, webShearCoefficient } from './web-shear';

/** Shear strength of a member in the plane of the frame. */
export interface ShearStrength {
  readonly check: string;
  readonly reference: string;
  readonly clause: 'G2' | 'G4' | 'G5' | 'G6';
  readonly factors: Factors;
  readonly Vn: number;
  readonly Vc: number;
  /** What the clause names: A_w, C_v, k_v, h/t_w; of a round section F_cr, A_g, D/t, L_v. */
  readonly details: Readonly<Record<string, number>>;
}

/**
 * Shear by G2 (webs), G4 (boxes), G5 (round), G6 (flanges of an I or channel turned), no stiffeners, no tension field action.
 * @param length_m of the member: L_v of G5 is not known better than that
 */
export function shearStrength(of: Basis, length_m: number): ShearStrength {
  const { plates, dimensions: d, turned, Fy, EperFy } = of;
  const strength = (
    clause: ShearStrength['clause'],
    reference: string,
    Vn: number,
    factors: Factors,
    details: Readonly<Record<string, number>>,
  ): ShearStrength => ({
    check: `${clause} shear`,
    reference,
    clause,
    factors,
    Vn,
    Vc: available(of.method, Vn, factors),
    details,
  });
  if (plates.shape === 'chs') {
    const D = d.d ?? NaN;
    const Fcr = roundShearStress(of.E, Fy, D, d.t ?? NaN, length_m);
    return strength('G5', 'AISC 360-22 G5, (G5-1), (G5-2a), (G5-2b)', (Fcr * of.Ag) / 2, USUAL, {
      Fcr,
      Ag: of.Ag,
      D,
      t: d.t ?? NaN,
      Dt: plates.flange,
      Lv: length_m,
    });
  }
  if (plates.shape === 'rhs') {
    const ht = turned ? plates.flange : plates.web;
    const t = d.t ?? NaN;
    const Aw = 2 * ht * t * t;
    const Cv = shearBucklingCoefficient(EperFy, ht, KV_BOX);
    return strength('G4', 'AISC 360-22 G4, (G4-1), (G2-9) to (G2-11)', nominal(Fy, Aw, Cv), USUAL, {
      Aw,
      Cv,
      kv: KV_BOX,
      ht,
      width: ht * t,
      t,
    });
  }
  if (turned) {
    const Aw = 2 * (d.b ?? NaN) * (d.tf ?? NaN);
    const Cv = shearBucklingCoefficient(EperFy, plates.flange, KV_FLANGE);
    const details = { Aw, Cv, kv: KV_FLANGE, ht: plates.flange, width: d.b ?? NaN, t: d.tf ?? NaN };
    return strength('G6', 'AISC 360-22 G6, (G6-1), (G2-9) to (G2-11)', nominal(Fy, Aw, Cv), USUAL, details);
  }
  const { Cv1, factors } = webShearCoefficient(EperFy, plates.web, of.rolledI);
  const Aw = (d.h ?? NaN) * (d.tw ?? NaN);
  const details = { Aw, Cv: Cv1, kv: KV_WEB, ht: plates.web, width: d.h ?? NaN, t: d.tw ?? NaN };
  return strength('G2', 'AISC 360-22 G2.1, (G2-1) to (G2-4)', nominal(Fy, Aw, Cv1), factors, details);
}
