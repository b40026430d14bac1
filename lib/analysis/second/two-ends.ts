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
  const sT = EI / L ** 2;
  const sM = EI / L;
  const a = joints.start;
  const b = joints.end;
  const rows = equations;
  rows.fill(0);
  // a joint’s equation divided by the larger of 1 and its flexibility against the member’s
  if (a === Infinity) rows[2] = 1;
  else {
    const w = 1 / Math.max(1, a * sM);
    rows[0] = w;
    rows[2] = -a * w * sM;
    rows[4] = w;
  }
  rows[8] = B[0]! / L;
  rows[9] = (B[1]! * sT) / L;
  rows[10] = (B[2]! * sM) / L;
  rows[11] = -1 / L;
  rows[13] = 1 / L;
  rows[15] = -B[3]! / L;
  const pinned = b === Infinity;
  const w = pinned ? 1 / sM : 1 / Math.max(1, b * sM);
  for (let c = 0; c < 4; c++) {
    const by = c === 1 ? sT : c === 2 ? sM : 1;
    const value = w * by * (pinned ? B[8 + c]! : B[4 + c]! + b * B[8 + c]!);
    if (c < 3) rows[16 + c] = value;
    else rows[23] = -value;
  }
  if (!pinned) rows[22] = w;
  if (!eliminate(rows)) return null;
  const k = new Float64Array(36);
  const q0 = new Float64Array(6);
  const phiStart = new Float64Array(5);
  const phiEnd = new Float64Array(5);
  const axial = EA / L;
  k[0] = k[21] = axial;
  k[3] = k[18] = -axial;
  q0[0] = axial * t.gainU; // N₀ = (EA/L)(u₂ − u₁ − gain), X₁ = −N₀
  q0[3] = t.gainN - axial * t.gainU;
  for (let c = 0; c < 5; c++) {
    const phi = rows[3 + c]!;
    const T = rows[11 + c]! * sT;
    const M = rows[19 + c]! * sM;
    const loads = c === 4 ? 1 : 0;
    phiStart[c] = phi;
    phiEnd[c] = B[4]! * phi + B[5]! * T + B[6]! * M + loads * B[7]!;
    // a pinned end’s moment is none, not the rounding of what cancels
    const m1 = a === Infinity ? 0 : -M;
    const m2 = pinned ? 0 : B[8]! * phi + B[9]! * T + B[10]! * M + loads * B[11]!;
    const into = c === 4 ? q0 : k;
    const step = c === 4 ? 1 : 6;
    const o = c === 4 ? 0 : outer[c]!;
    into[step + o] = T;
    into[2 * step + o] = m1;
    into[4 * step + o] = -(T + loads * t.gainT);
    into[5 * step + o] = m2;
  }
  return { k, q0, phiStart, phiEnd };
}

/** v₁ φ₁ v₂ φ₂ among the six movements of a member’s ends. */
const outer = [1, 2, 4, 5] as const;
/** Three equations, 8 numbers each. */
const equations = new Float64Array(24);

/** Gauss and Jordan with row exchanges: three equations, solved in place. */
function eliminate(rows: Float64Array): boolean {
  for (let c = 0; c < 3; c++) {
    let p = c;
    for (let r = c + 1; r < 3; r++) if (Math.abs(rows[8 * r + c]!) > Math.abs(rows[8 * p + c]!)) p = r;
    if (p !== c)
      for (let j = 0; j < 8; j++) {
        const kept = rows[8 * c + j]!;
        rows[8 * c + j] = rows[8 * p + j]!;
        rows[8 * p + j] = kept;
      }
    const value = rows[8 * c + c]!;
    if (!(Math.abs(value) > 1e-13)) return false;
    for (let j = c; j < 8; j++) rows[8 * c + j]! /= value;
    for (let r = 0; r < 3; r++) {
      const factor = rows[8 * r + c]!;
      if (r !== c && factor !== 0) for (let j = c; j < 8; j++) rows[8 * r + j]! -= factor * rows[8 * c + j]!;
    }
  }
  return true;
}
