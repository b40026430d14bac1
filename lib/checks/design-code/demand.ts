import type { MemberLine } from '@/lib/results/result';

/** Internal forces at one place of a physical member; where one of them jumps there are two places of the same x. */
export interface Place {
  readonly x: number;
  readonly N: number;
  readonly V: number;
  readonly M: number;
}

/**
 * Moments between two restraints of one face (or along the whole member). Every moment here is as M of the frame (positive
 * compresses the top face), N·m; positions are m from the span's start.
 */
export interface Stretch {
  readonly from_m: number;
  readonly to_m: number;
  readonly length_m: number;
  /** The face whose restraints bound it; null = the whole member. */
  readonly face: 'top' | 'bottom' | null;
  /** False at a free end (a cantilever's tip): nothing holds the face there. */
  readonly heldAtStart: boolean;
  readonly heldAtEnd: boolean;
  /** At the two ends (inside the stretch, after a jump at its start and before one at its end), and at the quarter points. */
  readonly start: number;
  readonly quarter: number;
  readonly middle: number;
  readonly threeQuarter: number;
  readonly end: number;
  /** Largest in size, either sign, with its sign, and where. */
  readonly largest: number;
  readonly largestAt: number;
  /** Largest moment that compresses the stretch's face, ≥ 0 in size (whole member: largest in size), and where. */
  readonly compressing: number;
  readonly compressingAt: number;
  /** Load across the member between the two ends. */
  readonly loaded: boolean;
  /** Greatest compression within, ≥ 0, N. */
  readonly compression: number;
}

/** Whether the effective length in the plane of the frame stands for the state, by the code's own rules of analysis. */
export type InPlaneRule = { readonly allowed: true; readonly how: string } | { readonly allowed: false; readonly why: string };

/**
 * What one state asks of a physical member: forces along the whole of it, from the span's start to its end. Signs as for a
 * member drawn that way. What is not always needed is found when first asked for, once.
 */
export interface Demand {
  /** Name of the state (`C1`, `C1 →`). */
  readonly combination: string;
  /** α_cr of the state; null = none. */
  readonly criticalLoadFactor: number | null;
  readonly order: 1 | 2;
  readonly line: MemberLine;
  /**
   * Ends, load points (both sides of jumps), joints of pieces, extremes of N, V and M, restraints of both faces, in order.
   * A check of a cross-section is made at all of them.
   */
  readonly places: readonly Place[];
  /** Greatest tension and compression, both ≥ 0, N; what rounding leaves of zero is 0. */
  readonly tension: number;
  readonly tensionAt: number;
  readonly compression: number;
  readonly compressionAt: number;
  /** Greatest |V| and |M| (0 where only rounding is left), and where. */
  readonly shear: number;
  readonly shearAt: number;
  readonly moment: number;
  readonly momentAt: number;
  /** Greatest moment that compresses the top and the bottom face, both ≥ 0. */
  readonly sagging: number;
  readonly saggingAt: number;
  readonly hogging: number;
  readonly hoggingAt: number;
  /** Stretches between restraints of the face; made when first asked for. */
  stretches(face: 'top' | 'bottom'): readonly Stretch[];
  /** The member from end to end (C_my, B1 …). */
  whole(): Stretch;
  /** A design code may not check a pressed member in this state without it; `why` is the reason of the "not checked" row. */
  readonly inPlane: InPlaneRule;
}
