/** Moments at the ends and the quarter points of a length, with their signs, and the largest in size. */
export interface MomentDiagram {
  readonly start: number;
  readonly quarter: number;
  readonly middle: number;
  readonly threeQuarter: number;
  readonly end: number;
  readonly largest: number;
  readonly loaded: boolean;
}

/** ψ of a diagram: the smaller end moment over the larger, −1…1; 1 where there is none. */
export function endRatio(of: Pick<MomentDiagram, 'start' | 'end'>): number {
  const [a, b] = Math.abs(of.start) >= Math.abs(of.end) ? [of.start, of.end] : [of.end, of.start];
  return a === 0 ? 1 : b / a;
}

/** Whether a diagram is a straight line: no load between the ends, and no bow of second order to speak of. */
export function isStraight(of: MomentDiagram): boolean {
  const slack = 0.02 * Math.abs(of.largest);
  const off = (value: number, part: number): boolean => Math.abs(value - of.start - part * (of.end - of.start)) > slack;
  return !of.loaded && !off(of.quarter, 0.25) && !off(of.middle, 0.5) && !off(of.threeQuarter, 0.75);
}

/**
 * C1 from the moment diagram of a length, for ends free to turn sideways and to warp.
 * - Straight: 1.77 − 1.04ψ + 0.27ψ² ≤ 2.60 (the values of ECCS publication 119, table 5.1, from memory), and not above the next;
 * - any: √(35 M² / (M² + 9M₂² + 16M₃² + 9M₄²)) (Serna, López, Puente, Yong: Equivalent uniform moment factors for
 *   lateral–torsional buckling of steel members, Journal of Constructional Steel Research 62, 2006, with k = 1), M the largest.
 */
export function momentFactor(of: MomentDiagram): number {
  const M = Math.abs(of.largest);
  if (M === 0) return 1;
  const { quarter, middle, threeQuarter } = of;
  const any = Math.sqrt((35 * M * M) / (M * M + 9 * quarter * quarter + 16 * middle * middle + 9 * threeQuarter * threeQuarter));
  if (!isStraight(of)) return Math.max(1, Math.min(any, 2.6));
  const psi = endRatio(of);
  return Math.max(1, Math.min(any, 1.77 - 1.04 * psi + 0.27 * psi * psi, 2.6));
}

/** What loads a length between its ends, by its diagram: nothing, one force at the middle, or anything else. */
export function loadBetween(of: MomentDiagram): 'none' | 'middle' | 'other' {
  if (!of.loaded) return 'none';
  const sag = of.middle - (of.start + of.end) / 2;
  const part = (value: number, share: number): number => (value - of.start - share * (of.end - of.start)) / sag;
  const atMiddle = Math.abs(part(of.quarter, 0.25) - 0.5) < 0.03 && Math.abs(part(of.threeQuarter, 0.75) - 0.5) < 0.03;
  return atMiddle ? 'middle' : 'other';
}

/**
 * C2 for loads at the height of a flange, where the diagram is that of a uniform load, or of one force at the middle, or stands
 * between the two, added to any end moments; null for any other. With s what the load adds at the middle to the straight line between the ends:
 * C2 = C1 · k · |s|/M, k = 0.454/1.127 (uniform), 0.49 (force at the middle): the values of SN003 for pinned and fixed ends
 * (0.454, 1.554; 0.630, 1.645) are met within 1 % or are on the safe side.
 */
export function loadHeightFactor(of: MomentDiagram, C1: number): number | null {
  const sag = of.middle - (of.start + of.end) / 2;
  const left = of.quarter - (3 * of.start + of.end) / 4;
  const right = of.threeQuarter - (of.start + 3 * of.end) / 4;
  const M = Math.abs(of.largest);
  if (M === 0 || Math.abs(sag) < 1e-9 * M) return null;
  const [l, r] = [left / sag, right / sag];
  // 0.75 at both quarters for a uniform load, 0.5 for a force at the middle; second-order effects bend either a little
  if (Math.abs(l - r) > 0.05 || Math.min(l, r) < 0.47 || Math.max(l, r) > 0.78) return null;
  return (C1 * (Math.min(l, r) >= 0.72 ? 0.454 / 1.127 : 0.49) * Math.abs(sag)) / M;
}

/**
 * Elastic critical moment of a doubly symmetric section, N·m (EN 1993-1-1 6.3.2.2(2) leaves it open; the three-factor formula of
 * ENV 1993-1-1 Annex F, (F.2), k = kw = 1):
 * M_cr = C1 (π²EI_z/L²) {√[I_w/I_z + L²GI_t/(π²EI_z) + (C2 z_g)²] − C2 z_g}.
 * @param zg height of the load above the shear centre, acting towards it, m
 */
export function criticalMoment(
  E: number,
  G: number,
  Iz: number,
  It: number,
  Iw: number,
  L: number,
  C1: number,
  C2 = 0,
  zg = 0,
): number {
  const P = (Math.PI ** 2 * E * Iz) / (L * L);
  const height = C2 * zg;
  return C1 * P * (Math.sqrt(Iw / Iz + (G * It) / P + height * height) - height);
}
