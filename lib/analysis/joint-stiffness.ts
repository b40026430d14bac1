/**
 * Moment–rotation stiffness of a member between its nodes, with its joints condensed.
 *
 * m = S (φ − ψ), S = [S11 S12; S12 S22], φ the nodes' rotations, ψ the chord's. Rigid ends: a = 4EI/L, b = 2EI/L.
 * A joint of stiffness k stands for φ_end = φ_node − m/k; with fixity f = k/(k + a) (1 rigid, 0 pinned) and
 * D = 1 − ¼(1 − f₁)(1 − f₂):   S11 = a f₁(1 − ¼(1 − f₂))/D,  S12 = ½ a f₁f₂/D,  S22 = a f₂(1 − ¼(1 − f₁))/D.
 */
export interface JointStiffness {
  S11: number;
  S12: number;
  S22: number;
  f1: number;
  f2: number;
  D: number;
}

/** @param EI N·m²  @param L m  @param k1 start joint, N·m/rad, Infinity = rigid, 0 = pin  @param k2 end joint. README (2.3). */
export function jointStiffness(EI: number, L: number, k1: number, k2: number, out: JointStiffness): JointStiffness {
  const a = (4 * EI) / L;
  const f1 = k1 === Infinity ? 1 : k1 / (k1 + a);
  const f2 = k2 === Infinity ? 1 : k2 / (k2 + a);
  const D = 1 - 0.25 * (1 - f1) * (1 - f2);
  out.S11 = (a * f1 * (1 - 0.25 * (1 - f2))) / D;
  out.S12 = (0.5 * a * f1 * f2) / D;
  out.S22 = (a * f2 * (1 - 0.25 * (1 - f1))) / D;
  out.f1 = f1;
  out.f2 = f2;
  out.D = D;
  return out;
}

export function emptyJointStiffness(): JointStiffness {
  return { S11: 0, S12: 0, S22: 0, f1: 0, f2: 0, D: 0 };
}
