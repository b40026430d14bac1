import { endRatio, isStraight, type MomentDiagram } from './critical-moment';

/**
 * Equivalent uniform moment factor C_m of EN 1993-1-1 Table B.3 from the moments of a length, ≥ 0.4.
 *
 * Straight: 0.6 + 0.4ψ. Loaded, with Ms at the middle and Mh the larger end moment: α_s = Ms/Mh or α_h = Mh/Ms; of the columns
 * for a uniform load and for a force the larger. Where the largest moment is at neither, no diagram of the table: 1.
 */
export function momentFactorB(of: MomentDiagram): number {
  const M = Math.abs(of.largest);
  if (M === 0) return 1;
  const psi = endRatio(of);
  if (isStraight(of)) return Math.max(0.4, 0.6 + 0.4 * psi);
  const Mh = Math.abs(of.start) >= Math.abs(of.end) ? of.start : of.end;
  const Ms = of.middle;
  if (Math.max(Math.abs(Mh), Math.abs(Ms)) < 0.95 * M) return 1;
  return Math.abs(Ms) <= Math.abs(Mh) ? hogging(Ms / Mh, psi) : sagging(Mh / Ms, psi);
}

/** Larger at an end: 0 ≤ α_s ≤ 1: 0.2 + 0.8α_s; −1 ≤ α_s < 0: 0.1 − 0.8α_s, for ψ < 0 0.1(1 − ψ) − 0.8α_s or 0.2(−ψ) − 0.8α_s. */
function hogging(alpha: number, psi: number): number {
  if (alpha >= 0) return Math.max(0.4, 0.2 + 0.8 * alpha);
  if (psi >= 0) return Math.max(0.4, 0.1 - 0.8 * alpha, -0.8 * alpha);
  return Math.max(0.4, 0.1 * (1 - psi) - 0.8 * alpha, -0.2 * psi - 0.8 * alpha);
}

/** Larger at the middle: 0.95 + 0.05α_h or 0.90 + 0.10α_h; for α_h < 0 and ψ < 0 with (1 + 2ψ) on the second term. */
function sagging(alpha: number, psi: number): number {
  const part = alpha < 0 && psi < 0 ? 1 + 2 * psi : 1;
  return Math.max(0.4, 0.95 + 0.05 * alpha * part, 0.9 + 0.1 * alpha * part);
}

/**
 * C_m,0 of EN 1993-1-1 Table A.2: straight 0.79 + 0.21ψ + 0.36(ψ − 0.33) N/N_cr; else 1 + (π²EI δ/(L²M) − 1) N/N_cr, δ the
 * largest at the quarter points, from the diagram itself: at the middle L²(M₂ + M₃ + M₄)/(24EI) (Simpson's rule, exact for a
 * uniform load and for one at the middle).
 * @param part N_Ed/N_cr,i in the plane of the moments
 */
export function momentFactorA(of: MomentDiagram, part: number): number {
  const M = Math.abs(of.largest);
  if (M === 0) return 1;
  if (isStraight(of)) {
    const psi = endRatio(of);
    return 0.79 + 0.21 * psi + 0.36 * (psi - 0.33) * part;
  }
  const middle = Math.abs(of.quarter + of.middle + of.threeQuarter) / 24;
  const bow = (Math.PI ** 2 * Math.max(middle, quarterBow(of), quarterBow(turnedRound(of)))) / M;
  return 1 + (bow - 1) * part;
}

/**
 * |EIδ|/L² at the first quarter point: the simple beam's deflection there under the elastic loads (M₋ + 10M + M₊) h/12 of the quarter
 * points, h = L/4 (Newmark; exact where M is a cubic). A diagram that turns from one face to the other deflects most beside the middle.
 */
function quarterBow({ start, quarter, middle, threeQuarter, end }: MomentDiagram): number {
  const one = start + 10 * quarter + middle;
  const two = quarter + 10 * middle + threeQuarter;
  const three = middle + 10 * threeQuarter + end;
  return Math.abs(3 * one + 2 * two + three) / (16 * 48);
}

const turnedRound = (of: MomentDiagram): MomentDiagram => ({
  ...of,
  start: of.end,
  quarter: of.threeQuarter,
  threeQuarter: of.quarter,
  end: of.start,
});
