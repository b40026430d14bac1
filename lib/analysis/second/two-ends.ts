import type { Transfer } from './transfer';

/**
 * A member between its two nodes: end forces (what the nodes do to it, local axes of the unmoved member)
 * q = k d + q₀, d = [u₁ v₁ φ₁ u₂ v₂ φ₂] of the nodes.
 */
export interface TwoEnds {
  /** 6 × 6, row by row. */
  readonly k: Float64Array;
  readonly q0: Float64Array;
  /** Rotations of the member's own ends, rad: by columns v₁ φ₁ v₂ φ₂ 1. */
  readonly phiStart: Float64Array;
  readonly phiEnd: Float64Array;
}

/** Flexibilities of the joints, rad/(N·m): 0 rigid, Infinity pinned. */
export interface Joints {
  readonly start: number;
  readonly end: number;
}

/**
 * Meets both nodes: what is unknown at the start (φ, T, M of the member's own end) follows from
 *   the start's joint φₛ − give M = φ₁ (pinned: M = 0), v(L) = v₂ and the end's joint φₑ + give M = φ₂ (pinned: M = 0).
 *
 * @returns null where these cannot be met: the member buckles between its nodes under this very force
 */
export function twoEnds(t: Transfer, L: number, EA: number, EI: number, joints: Joints): TwoEnds | null {
  const B = t.bending;
  // unknowns φₛ, T L²/EI, M L/EI; right-hand sides v₁ φ₁ v₂ φ₂ 1
  const [sT, sM] = [EI / L ** 2, EI / L];
  const row = (phi: number, T: number, M: number, right: readonly number[]): number[] => [phi, T * sT, M * sM, ...right];
  const a = joints.start;
  const b = joints.end;
  const phiEnd = [B[4]!, B[5]!, B[6]!, B[7]!] as const;
  const MEnd = [B[8]!, B[9]!, B[10]!, B[11]!] as const;
  // a joint’s equation divided by what is larger of 1 and its flexibility against the member’s
  const [wa, wb] = [1 / Math.max(1, a * sM), 1 / Math.max(1, b * sM)];
  const equations = [
    a === Infinity ? row(0, 0, 1 / sM, [0, 0, 0, 0, 0]) : row(wa, 0, -a * wa, [0, wa, 0, 0, 0]),
    row(B[0]! / L, B[1]! / L, B[2]! / L, [-1 / L, 0, 1 / L, 0, -B[3]! / L]),
    b === Infinity
      ? row(MEnd[0] / sM, MEnd[1] / sM, MEnd[2] / sM, [0, 0, 0, 0, -MEnd[3] / sM])
      : row(wb * (phiEnd[0] + b * MEnd[0]), wb * (phiEnd[1] + b * MEnd[1]), wb * (phiEnd[2] + b * MEnd[2]), [
          0,
          0,
          0,
          wb,
          -wb * (phiEnd[3] + b * MEnd[3]),
        ]),
  ];
  if (!eliminate(equations)) return null;
  const k = new Float64Array(36);
  const q0 = new Float64Array(6);
  const [phiS, phiE] = [new Float64Array(5), new Float64Array(5)];
  const axial = EA / L;
  k[0] = k[21] = axial;
  k[3] = k[18] = -axial;
  q0[0] = axial * t.gainU; // N₀ = (EA/L)(u₂ − u₁ − gain), X₁ = −N₀
  q0[3] = t.gainN - axial * t.gainU;
  const places = [1, 2, 4, 5, -1];
  places.forEach((place, c) => {
    const phi = equations[0]![3 + c]!;
    const T = equations[1]![3 + c]! * sT;
    const M = equations[2]![3 + c]! * sM;
    const one = place < 0 ? 1 : 0;
    const out = [T, -M, -(T + one * t.gainT), MEnd[0] * phi + MEnd[1] * T + MEnd[2] * M + one * MEnd[3]];
    phiS[c] = phi;
    phiE[c] = phiEnd[0] * phi + phiEnd[1] * T + phiEnd[2] * M + one * phiEnd[3];
    // a pinned end’s moment is none, not the rounding of what cancels
    if (a === Infinity) out[1] = 0;
    if (b === Infinity) out[3] = 0;
    [1, 2, 4, 5].forEach((r, i) => {
      if (place < 0) q0[r] = out[i]!;
      else k[6 * r + place] = out[i]!;
    });
  });
  return { k, q0, phiStart: phiS, phiEnd: phiE };
}

/** Gauss and Jordan with row exchanges: three equations, solved in place. */
function eliminate(rows: number[][]): boolean {
  for (let c = 0; c < 3; c++) {
    let p = c;
    for (let r = c + 1; r < 3; r++) if (Math.abs(rows[r]![c]!) > Math.abs(rows[p]![c]!)) p = r;
    [rows[c], rows[p]] = [rows[p]!, rows[c]!];
    const pivot = rows[c]!;
    const value = pivot[c]!;
    if (!(Math.abs(value) > 1e-13)) return false;
    for (let j = c; j < pivot.length; j++) pivot[j]! /= value;
    rows.forEach((row, r) => {
      const factor = row[c]!;
      if (r !== c && factor !== 0) for (let j = c; j < row.length; j++) row[j]! -= factor * pivot[j]!;
    });
  }
  return true;
}
