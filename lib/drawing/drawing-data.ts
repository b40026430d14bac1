import type { LoadAxes, LoadDirection, Purpose, Role } from '@/lib/model/frame';
import type { MemberExtremes, Verdict } from '@/lib/results/result';

/**
 * A frame as the drawing needs it: plain, serialisable, SI (m, N, N·m, rad), signs of lib/model/frame.ts.
 * Nodes and members are referred to by index.
 */
export interface DrawingData {
  readonly frame: string;
  readonly title: string | null;
  readonly units: 'metric' | 'us';
  readonly nearLimit: number;
  readonly nodes: readonly DrawingNode[];
  readonly members: readonly DrawingMember[];
  readonly supports: readonly DrawingSupport[];
  /** Every load case and combination that has a result, in order: what may be chosen. */
  readonly results: readonly ResultName[];
  /** Load cases without a result of their own: tension-only members make sums of cases meaningless. */
  readonly notApplicable: readonly string[];
  /** Why, in a sentence; null where every case has a result. */
  readonly noCasesAlone: string | null;
  /** Views 1 and 2: the chosen case or combination; null = not solved, geometry only. */
  readonly chosen: DrawingResult | null;
  /** View 3, deflected line: usually the governing service combination; null = take the chosen one. */
  readonly movement: DrawingResult | null;
}

export interface ResultName {
  readonly name: string;
  readonly kind: 'case' | 'combination';
  readonly purpose: Purpose | null;
  /** α_cr where the combination has one. */
  readonly criticalLoadFactor: number | null;
}

export interface DrawingNode {
  readonly id: string;
  readonly x: number;
  readonly y: number;
  readonly place: string | null;
}

export type DrawingJoint = 'rigid' | 'pin' | 'spring';

export interface DrawingMember {
  readonly id: string;
  readonly start: number;
  readonly end: number;
  readonly section: string;
  readonly role: Role | null;
  readonly startJoint: DrawingJoint;
  readonly endJoint: DrawingJoint;
  /** Governing ratio of the member (over all its checks and combinations), for the ratio view. */
  readonly ratio: number | null;
  readonly verdict: Verdict;
  /** "normal stress C1": what governs it. */
  readonly governs: string | null;
}

/** A held, free or sprung direction. */
export type DrawingRestraint = 'fixed' | 'free' | 'spring';
export interface DrawingSupport {
  readonly node: number;
  readonly ux: DrawingRestraint;
  readonly uy: DrawingRestraint;
  readonly rz: DrawingRestraint;
  readonly angle: number;
}

/** One load case or combination, its loads already multiplied by their factors. */
export interface DrawingResult {
  readonly name: string;
  readonly kind: 'case' | 'combination';
  readonly purpose: Purpose | null;
  /** "1.35 dead + 1.5 snow"; null for a case. */
  readonly description: string | null;
  readonly loads: readonly DrawingLoad[];
  /** Global, what the support does to the frame; by support. */
  readonly reactions: readonly { readonly Fx: number; readonly Fy: number; readonly Mz: number }[];
  /** Global; by node. rz null where the node has none of its own. */
  readonly displacements: readonly { readonly ux: number; readonly uy: number; readonly rz: number | null }[];
  /** By member. */
  readonly lines: readonly DrawingLine[];
  /** Members (index) that are slack: tension only, and not pulled in this result. */
  readonly slack: readonly number[];
  /** How it was analysed. */
  readonly method: DrawingMethod;
}

/** What is told of how a result was found. */
export interface DrawingMethod {
  readonly order: 1 | 2;
  /** α_cr: where there is one, the buckled shape can be asked for. */
  readonly criticalLoadFactor: number | null;
  readonly imperfection: 'right' | 'left' | null;
  readonly shearDeformation: boolean;
  readonly reducedStiffness: boolean;
  /** Analysed under this many times the loads, its results divided by it. */
  readonly loadScale: number;
  readonly iterations: number;
  /** Largest relative change of the last pass. */
  readonly change: number;
}

/** A shape without a size: movements are shares of the largest one. */
export interface DrawingBuckled {
  /** α_cr */
  readonly factor: number;
  readonly kind: 'sway' | 'member';
  /** By member: points along it, 4 numbers each: x, y of the unmoved point (m) and its movement in x and y (largest of all = 1). */
  readonly members: readonly (readonly number[])[];
}

/**
 * N, V, M and the deflected line of one member at x (m from its start, ascending; both sides of a jump as two
 * equal x). The points of extremes are among the samples, so that nothing drawn is less than what is printed.
 */
export interface DrawingLine {
  readonly x: readonly number[];
  readonly N: readonly number[];
  readonly V: readonly number[];
  readonly M: readonly number[];
  /** Displacement along local x and local y, m. */
  readonly u: readonly number[];
  readonly v: readonly number[];
  readonly extremes: MemberExtremes;
  /** Ratio along the member at each x where it is known; null = the governing ratio stands for the whole member. */
  readonly ratio: readonly number[] | null;
}

/** `case`: the load case it comes from, for its name and its place in the stack (in order of cases); `imperfection` for forces that stand for one. */
interface LoadOf {
  readonly case: string;
}
export type DrawingLoad =
  | (LoadOf & {
      readonly kind: 'distributed';
      readonly member: number;
      readonly axes: LoadAxes;
      readonly direction: LoadDirection;
      /** N/m as typed × factor (projected: per metre of projection); self-weight may be given as a global load. */
      readonly q1: number;
      readonly q2: number;
      readonly from: number;
      readonly to: number;
      readonly selfWeight?: boolean;
    })
  | (LoadOf & {
      readonly kind: 'point';
      readonly member: number;
      readonly axes: 'global' | 'local';
      readonly direction: LoadDirection;
      readonly P: number;
      readonly at: number;
    })
  | (LoadOf & { readonly kind: 'moment'; readonly member: number; readonly M: number; readonly at: number })
  | (LoadOf & { readonly kind: 'temperature'; readonly member: number; readonly dT: number; readonly dTAcross: number })
  | (LoadOf & { readonly kind: 'node'; readonly node: number; readonly Fx: number; readonly Fy: number; readonly Mz: number })
  | (LoadOf & {
      readonly kind: 'settlement';
      readonly node: number;
      readonly dx: number | null;
      readonly dy: number | null;
      readonly rz: number | null;
    });
