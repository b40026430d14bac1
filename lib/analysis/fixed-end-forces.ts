import type { MemberData } from './member-data';
import type { LocalLoads } from './member-loads';
import type { JointStiffness } from './joint-stiffness';

/** Abscissae and weights of the three-point Gauss rule on (0, 1): exact to degree 5, and shape × load has degree 4. */
const gaussAt = [0.5 - Math.sqrt(0.15), 0.5, 0.5 + Math.sqrt(0.15)] as const;
const gaussWeight = [5 / 18, 8 / 18, 5 / 18] as const;

/**
 * End forces q_F of a member whose nodes do not move, in local axes: [X₁ Y₁ M₁ X₂ Y₂ M₂], what the nodes do to the member.
 *
 * Rigid ends: q_F = −∫ N(x)ᵀ q dx with the exact shape functions of a prismatic member, v from φ₁ = x(1 − x)(1 − x + ½Φ)L/(1 + Φ)
 * and so on, Φ = 12EI/(G Av L²) or 0 (a moment works on the section's turn); free strain and curvature give X₁ = EA ε₀,
 * M₁ = EI κ₀ and their opposites at the end. The joints are then condensed: m₁ = f₁(m₁ᶠ − c(1 − f₂) m₂ᶠ)/D, and the shears
 * follow from equilibrium. README (2.4), (2.5).
 *
 * @param out 6 numbers from `at` on, overwritten
 */
export function fixedEndForces(m: MemberData, loads: LocalLoads, joints: JointStiffness, out: Float64Array, at: number): void {
  const L = m.length;
  const shear = joints.shear;
  const half = 0.5 * shear;
  const whole = 1 + shear;
  // X₁, X₂; simple-beam Y₁, Y₂ (without the couple of the end moments); rigid-end m₁, m₂
  let X1 = m.EA * loads.strain;
  let X2 = -X1;
  let Y1 = 0;
  let Y2 = 0;
  let m1 = m.EI * loads.curvature;
  let m2 = -m1;
  for (const line of loads.lines) {
    const span = line.b - line.a;
    for (let g = 0; g < 3; g++) {
      const t = gaussAt[g]!;
      const x = (line.a + span * t) / L;
      const w = span * gaussWeight[g]!;
      const px = w * (line.qx1 + (line.qx2 - line.qx1) * t);
      const py = w * (line.qy1 + (line.qy2 - line.qy1) * t);
      X1 -= px * (1 - x);
      X2 -= px * x;
      Y1 -= py * (1 - x);
      Y2 -= py * x;
      m1 -= (py * L * x * (1 - x) * (1 - x + half)) / whole;
      m2 += (py * L * x * (x + half) * (1 - x)) / whole;
    }
  }
  for (const place of loads.places) {
    const x = place.x / L;
    X1 -= place.Px * (1 - x);
    X2 -= place.Px * x;
    Y1 -= place.Py * (1 - x) - place.M / L;
    Y2 -= place.Py * x + place.M / L;
    m1 -= (place.Py * L * x * (1 - x) * (1 - x + half) + place.M * (1 - x) * (1 - 3 * x + shear)) / whole;
    m2 += (place.Py * L * x * (x + half) * (1 - x) + place.M * x * (2 - 3 * x - shear)) / whole;
  }
  const c1 = (joints.f1 * (m1 - joints.carry * (1 - joints.f2) * m2)) / joints.D;
  const c2 = (joints.f2 * (m2 - joints.carry * (1 - joints.f1) * m1)) / joints.D;
  out[at] = X1;
  out[at + 1] = Y1 + (c1 + c2) / L;
  out[at + 2] = c1;
  out[at + 3] = X2;
  out[at + 4] = Y2 - (c1 + c2) / L;
  out[at + 5] = c2;
}
