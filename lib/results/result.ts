/**
 * What analysis and checks hand on: plain typed-array results of one frame. The database stores these,
 * screens, workbook and JSON are made from them; nothing computes a number a second time.
 */
import type { Purpose } from '@/lib/model/frame';

/**
 * What sets a state apart from the plain first-order one of Euler–Bernoulli members. The lines of its members, its
 * certificate and its drawings are recovered with it, so it is stored with the state.
 */
export interface StateMethod {
  /** Members shear as well as bend. */
  readonly shearDeformation: boolean;
  /** Which way the imperfections of this state lean (the arrow of its name), or none. */
  readonly imperfection: 'right' | 'left' | null;
  /** Forces that stand for the imperfections: Fx, Fy by node, N, global, as they act at `loadScale` times the loads; null = none. */
  readonly notional: Float64Array | null;
  /** Second order was analysed under this many times the loads and its results divided by it (AISC 360-22 C2.1(d): 1.6 for ASD). */
  readonly loadScale: number;
  /** Factors on EA and EI by member, 2 each (AISC 360-22 C2.3); null = all 1. */
  readonly stiffness: Float64Array | null;
  /** Tension-only members (index) that are slack. */
  readonly slack: readonly number[];
  /** Passes until equilibrium stood still, all sets of slack members counted; 1 where none was needed. */
  readonly iterations: number;
  /** Largest relative change of the last pass; 0 where none was needed. */
  readonly change: number;
}

/**
 * State of the frame under one load case or combination. Order: cases in frame order, then combinations.
 * Everything else (diagrams, extremes, deflected line) is recovered exactly from this and the frame.
 */
export interface ResultState {
  readonly name: string;
  readonly kind: 'case' | 'combination';
  readonly purpose: Purpose | null;
  /** Factor on each of the frame's cases, by case index (a unit vector for a case). */
  readonly factors: Float64Array;
  /** 1 = first order. */
  readonly order: 1 | 2;
  /** α_cr; null = none (no positive root) or not asked for. Set for strength combinations. */
  readonly criticalLoadFactor: number | null;
  /** Null = plain first order. */
  readonly method: StateMethod | null;
  /** ux, uy, rz by node, global, m and rad; NaN where a node has no rotation of its own. */
  readonly displacements: Float64Array;
  /** Fx, Fy, Mz by support (order of frame.supports), global, N and N·m. */
  readonly reactions: Float64Array;
  /** N, V, M at the start (before a load exactly there) and N, V, M at the end (after it), by member: 6 each. */
  readonly endForces: Float64Array;
  /**
   * Extremes of each member as they were stored with the state, 14 numbers a member (lib/analysis/member-extremes.ts);
   * undefined straight from the analysis. lib/results/extremes-of.ts gives them either way.
   */
  readonly extremes?: Float64Array;
}

/** Coefficients c₀ + c₁ s + c₂ s² …, s = x − from, of one stretch of a member between load points. */
export type Polynomial = readonly number[];
export interface Segment {
  readonly from: number;
  readonly to: number;
  readonly N: Polynomial;
  readonly V: Polynomial;
  readonly M: Polynomial;
  /** Displacements along local x and y, m. */
  readonly u: Polynomial;
  readonly v: Polynomial;
}
/** A member's exact internal forces and deflected line; point loads stand between two segments. */
export interface MemberLine {
  readonly length: number;
  readonly segments: readonly Segment[];
}

export interface Extreme {
  readonly max: number;
  readonly maxAt: number;
  readonly min: number;
  readonly minAt: number;
}
export interface MemberExtremes {
  readonly N: Extreme;
  readonly V: Extreme;
  readonly M: Extreme;
  /** Largest departure from the line between the member's moved ends, signed along local y. */
  readonly deflection: { readonly value: number; readonly at: number };
}

export interface Certificate {
  /** ‖K d − f‖ / (‖K‖‖d‖ + ‖f‖), largest of all cases. */
  readonly residual: number;
  /** Global equilibrium of loads as typed and reactions, relative. */
  readonly equilibrium: number;
  readonly condition: number;
  readonly digits: number;
  /** Largest relative difference to the second, independent analysis; null = not made. */
  readonly second: number | null;
  /** Why there is no second analysis, where there is none ("sampled", "too large"). */
  readonly secondReason: string | null;
}

/** Why a frame has no solution, in the user's names. */
export interface Failure {
  readonly code: 'mechanism' | 'not-connected' | 'not-solved';
  readonly message: string;
  readonly node: string | null;
}

export type Verdict = 'within' | 'near' | 'over' | 'not checked';

/** Subject kinds of checks; a frame's own check carries subject null and is shown under the frame's name. */
export type SubjectKind = 'member' | 'span' | 'node' | 'spread' | 'frame';

export interface Check {
  readonly subjectKind: SubjectKind;
  readonly subject: string | null;
  /** normal stress, shear stress, equivalent stress, stability, deflection, sway, displacement, spread, critical load factor … */
  readonly check: string;
  readonly combination: string | null;
  /** Distance from the subject's start, m. */
  readonly at: number | null;
  readonly face: 'top' | 'bottom' | null;
  readonly value: number | null;
  readonly limit: number | null;
  /** What value and limit are in. */
  readonly quantity: 'stress' | 'displacement' | 'number' | 'force' | 'moment';
  readonly ratio: number | null;
  readonly verdict: Verdict;
  readonly reason: string | null;
  readonly reference: string;
  /** Member (index) whose section governs, where there is one. */
  readonly member: number | null;
  /** Symbols and numbers put in, SI: what lib/checks/working.ts prints as the calculation. */
  readonly inputs: Readonly<Record<string, number | string | null>>;
}

export interface Governing {
  readonly subject: string | null;
  readonly check: string;
  readonly combination: string | null;
  readonly ratio: number | null;
}

/** Everything that was computed for one frame. */
export interface FrameEvaluation {
  readonly status: 'solved' | 'not solved';
  readonly failure: Failure | null;
  readonly verdict: Verdict;
  readonly governing: Governing | null;
  /** Every reason why something of this frame was not checked, once each. */
  readonly notChecked: readonly string[];
  /** What stands assumed (lengths taken as the span's …), once each. */
  readonly assumptions: readonly string[];
  /** Steel mass of one frame, kg; null where a density is missing. */
  readonly mass: number | null;
  readonly states: readonly ResultState[];
  /** One row for each subject × check: the governing combination. */
  readonly checks: readonly Check[];
  /** Every subject × check × combination, where asked for. */
  readonly allChecks: readonly Check[] | null;
  readonly certificate: Certificate | null;
}
