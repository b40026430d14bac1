import type { MemberData } from './member-data';

/**
 * Moment–rotation stiffness of a member between its nodes, with its joints condensed.
 *
 * m = S (φ − ψ), S = [S11 S12; S12 S22], φ the nodes' rotations, ψ the chord's. Rigid ends: a = 4EI/L, b = 2EI/L.
 * Shear makes that a = (4 + Φ)/(1 + Φ) EI/L, b = (2 − Φ)/(1 + Φ) EI/L, Φ = 12EI/(G Av L²) (Przemieniecki 1968, ch. 5).
 * A joint of stiffness k stands for φ_end = φ_node − m/k; with fixity f = k/(k + a) (1 rigid, 0 pinned), carry-over c = b/a and
 * D = 1 − c²(1 − f₁)(1 − f₂):   S11 = a f₁(1 − c²(1 − f₂))/D,  S12 = c a f₁f₂/D,  S22 = a f₂(1 − c²(1 − f₁))/D.
 */
export interface JointStiffness {
  S11: number;
  S12: number;
  S22: number;
  f1: number;
  f2: number;
  D: number;
  /** Φ and the carry-over c of the rigid-ended member: 0 and ½ where it does not shear. */
  shear: number;
  carry: number;
}

/** @param m its joints: N·m/rad, Infinity = rigid, 0 = pin. README (2.3). */
export function jointStiffness(m: MemberData, out: JointStiffness): JointStiffness {
  const { EI, length: L, startSpring: k1, endSpring: k2 } = m;
  const shear = m.GAv === Infinity ? 0 : (12 * EI) / (m.GAv * L * L);
  const a = shear === 0 ? (4 * EI) / L : (((4 + shear) / (1 + shear)) * EI) / L;
  const c = shear === 0 ? 0.5 : (2 - shear) / (4 + shear);
  const cc = c * c;
  const f1 = k1 === Infinity ? 1 : k1 / (k1 + a);
  const f2 = k2 === Infinity ? 1 : k2 / (k2 + a);
  const D = 1 - cc * (1 - f1) * (1 - f2);
  out.S11 = (a * f1 * (1 - cc * (1 - f2))) / D;
  out.S12 = (c * a * f1 * f2) / D;
  out.S22 = (a * f2 * (1 - cc * (1 - f1))) / D;
  out.f1 = f1;
  out.f2 = f2;
  out.D = D;
  out.shear = shear;
  out.carry = c;
  return out;
}

export function emptyJointStiffness(): JointStiffness {
  return { S11: 0, S12: 0, S22: 0, f1: 0, f2: 0, D: 0, shear: 0, carry: 0.5 };
}
