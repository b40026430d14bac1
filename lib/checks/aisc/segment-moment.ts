import type { Stretch } from '../design-code/demand';
import type { BendingStrength } from './bending-strength';
import { momentGradient } from './moment-gradient';

/** The unbraced segment of a member that governs its bending in one state, and its nominal moment. N·m, m. */
export interface GoverningSegment {
  /** Required moment, ≥ 0, and where. */
  readonly Mr: number;
  readonly at: number;
  readonly face: 'top' | 'bottom';
  readonly segment: Stretch;
  readonly Lb: number;
  readonly Cb: number;
  /** Why C_b is 1, where it is not by (F1-1). */
  readonly CbWhy: string | null;
  readonly Mn: number;
}

/**
 * C_b of a segment: by (F1-1) where both its ends are held and its largest moment compresses the face that its restraints hold;
 * else 1, on the safe side: at a free end (F1(b)), and where a larger moment compresses the other face (whose own segments
 * are checked with it).
 */
export function gradientOf(segment: Stretch): { readonly Cb: number; readonly why: string | null } {
  if (!segment.heldAtStart || !segment.heldAtEnd) return { Cb: 1, why: 'an end is free' };
  if (Math.abs(segment.largest) > segment.compressing * (1 + 1e-9))
    return { Cb: 1, why: 'the largest moment compresses the other face' };
  return { Cb: momentGradient(segment.largest, segment.quarter, segment.middle, segment.threeQuarter), why: null };
}

/** The segment between restraints of the compressed face, of either face, with the largest M_r/M_n; null where nothing bends. */
export function governingSegment(
  of: BendingStrength,
  top: readonly Stretch[],
  bottom: readonly Stretch[],
): GoverningSegment | null {
  let best: GoverningSegment | null = null;
  for (const face of ['top', 'bottom'] as const)
    for (const segment of face === 'top' ? top : bottom) {
      const Mr = segment.compressing;
      if (!(Mr > 0)) continue;
      const { Cb, why } = gradientOf(segment);
      const Lb = segment.length_m;
      const Mn = of.lateral ? Math.min(of.local, of.lateral.moment(Lb, Cb)) : of.local;
      if (best === null || Mr * best.Mn > best.Mr * Mn * (1 + 1e-9))
        best = { Mr, at: segment.compressingAt, face, segment, Lb, Cb, CbWhy: why, Mn };
    }
  return best;
}
