/** What a sizing is asked for and what it finds: plain data, kept and shown. Numbers in SI. */
import type { SectionTaken } from '@/lib/sizing/section-taken';

export const sizedBy = ['role', 'group', 'section'] as const;
export type SizedBy = (typeof sizedBy)[number];

/** Members that take one section together, in every frame that has them. */
export interface SizingGroup {
  readonly by: SizedBy;
  readonly name: string;
  /** The range whose sections are tried: a standard one, `officeRange` or `batchRange`. */
  readonly range: string;
  readonly minDepth_m: number | null;
  readonly maxDepth_m: number | null;
}

export interface SizingRequest {
  readonly groups: readonly SizingGroup[];
}

/** A section that a group may take. */
export interface Candidate {
  readonly name: string;
  readonly A_m2: number;
  /** Null where it cannot be had in this batch at all. */
  readonly taken: SectionTaken | null;
  /** Why it cannot be had. */
  readonly unfit: string | null;
}

/** What one frame says of one choice of sections. */
export interface FrameAnswer {
  /** In order of gravity: it fits where every check was made and none is over. */
  readonly outcome: 'fits' | 'not checked' | 'over' | 'not solved';
  /** Largest ratio of all checks; null where there is none. */
  readonly ratio: number | null;
  /** "normal stress, AB, C1", or the first reason why it was not checked or solved. */
  readonly governs: string;
}

export interface CandidateFound {
  readonly name: string;
  readonly A_m2: number;
  /** Per metre, of the group's first material; null where that has no density. */
  readonly mass_kg_m: number | null;
  /** Largest ratio of all frames looked at, of those that were solved. */
  readonly ratio: number | null;
  /** The frame and check of that ratio, or of what was not checked or solved. */
  readonly frame: string | null;
  readonly governs: string | null;
  /** Frames by what they say of it. */
  readonly over: number;
  readonly notChecked: number;
  readonly notSolved: number;
  /** Frames looked at, of those that have members of the group: where fewer than all, the counts are "at least". */
  readonly lookedAt: number;
  readonly frames: number;
  /** Why it cannot be had at all. */
  readonly unfit: string | null;
}

export interface Stubborn {
  readonly frame: string;
  /** Of the candidate with which it comes nearest. */
  readonly outcome: FrameAnswer['outcome'];
  readonly ratio: number | null;
  readonly governs: string;
  readonly candidate: string;
}

export interface GroupFound {
  readonly by: SizedBy;
  readonly name: string;
  readonly range: string;
  readonly members: number;
  readonly frames: number;
  /** The lightest that fits every frame; null where none does. */
  readonly chosen: string | null;
  readonly before: readonly string[];
  readonly candidates: readonly CandidateFound[];
  /** Frames that fit with none of the candidates, worst first, as far as they are listed; and how many there are. */
  readonly stubborn: readonly Stubborn[];
  readonly stubbornCount: number;
}

export interface Together {
  readonly frames: number;
  readonly fit: number;
  readonly ratio: number | null;
  readonly frame: string | null;
  readonly governs: string | null;
}

export interface SizingFound {
  readonly outcome: 'converged' | 'not converged' | 'none fits';
  /** How it ended, as a sentence. */
  readonly words: string;
  readonly rounds: number;
  readonly groups: readonly GroupFound[];
  /** Every frame with all that was chosen; null where nothing was chosen. */
  readonly together: Together | null;
  /** Steel of all frames with their number off; null where a density is missing. */
  readonly mass: { readonly before_kg: number; readonly after_kg: number } | null;
}

/** The office's own sections, by name. */
export const officeRange = 'the office’s own';
/** Every section that members of the batch have now. */
export const batchRange = 'sections of this batch';

/** Rounds after which it is said that choices did not come to rest. */
export const mostRounds = 8;
export const mostGroups = 6;
export const mostCandidates = 150;
export const mostStubborn = 200;
