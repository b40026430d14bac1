/** What is sized, as the search takes it: groups with their candidates, and frames that differ. */
import type { Candidate, SizingGroup } from '@/lib/sizing/sizing';

export interface GroupToSize extends SizingGroup {
  readonly candidates: readonly Candidate[];
  /** Members in all frames of the sheets. */
  readonly members: number;
  /** Sections that they have now, each once. */
  readonly before: readonly string[];
  /** Of its first member: by what name its material goes. */
  readonly material: string;
}

/** Steel of one group in a frame. */
export interface GroupSteel {
  readonly material: string;
  readonly length_m: number;
}

/** A frame of the sheets, or several that are the same. */
export interface FrameToSize {
  /** Name of the first of them. */
  readonly id: string;
  /** How many frames of the sheets they are, and their number off, added up. */
  readonly frames: number;
  readonly off: number;
  /** Bit g is set where it has members of group g. */
  readonly mask: number;
  /** Present ratio where it was run: those worst now are tried first. */
  readonly ratio: number | null;
  /** Steel as it is; null where a density is missing. */
  readonly mass_kg: number | null;
  /** Steel of members of no group; null where a density is missing. */
  readonly rest_kg: number | null;
  /** By group. */
  readonly steel: readonly (readonly GroupSteel[])[];
}

export interface SizingProblem {
  readonly groups: readonly GroupToSize[];
  readonly frames: readonly FrameToSize[];
}
