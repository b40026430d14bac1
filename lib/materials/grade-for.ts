import type { Material, Shape } from '@/lib/model/frame';
import { editDistance } from '@/lib/sections/edit-distance';
import { gradeNames, gradeNamed, KSI, type Steps } from './grades';

/** What a grade's strength depends on: the thickest part of the section, and for A500 whether it is a box or a tube. */
export type GradeShape = Shape | null;

/** What a grade fixes; typed values override one by one. */
export interface GradeProperties {
  readonly grade: string;
  readonly standard: NonNullable<Material['standard']>;
  readonly E_Pa: number;
  readonly G_Pa: number;
  /** Null where the product standard gives none for this thickness, or the thickness is not known and it matters. */
  readonly fy_Pa: number | null;
  readonly fu_Pa: number | null;
  readonly density_kg_m3: number;
  readonly expansion_perK: number;
}

/**
 * Strength and constants of a steel grade for a section whose thickest part is `thickness_m` (EN 10025-2 steps by thickness;
 * E, G, density and expansion as the sheets' contract states). A sub-grade (`S355J2`, `S275 JR`, `S355J2H`) is its grade;
 * grades of one ASTM standard are told apart by their number or letter (`A572 Gr. 50`, `A500 C`).
 *
 * A500 yields higher in a box than in a tube: the tube's value unless the shape is known to be `rhs`.
 *
 * Thickness null: fy and fu are null for a grade whose strength depends on it, since the thinnest step would be a guess.
 * Unknown name: the nearest grade as a suggestion, null if none is near.
 */
export function gradeFor(
  name: string,
  thickness_m: number | null,
  shape: GradeShape = null,
): { readonly properties: GradeProperties } | { readonly suggestion: string | null } {
  const grade = gradeNamed(name);
  if (typeof grade === 'string') return { suggestion: suggest(grade) };
  const box = shape === 'rhs' ? grade.box : undefined;
  const en = grade.standard === 'EN';
  return {
    properties: {
      grade: grade.name,
      standard: grade.standard,
      E_Pa: en ? 210e9 : 29000e6 * KSI,
      G_Pa: en ? 81e9 : 11200e6 * KSI,
      fy_Pa: strength(box ?? grade.steps, thickness_m),
      fu_Pa: strength(grade.fu, thickness_m),
      density_kg_m3: en ? 7850 : 490 * POUND_PER_CUBIC_FOOT,
      expansion_perK: 12e-6,
    },
  };
}

/** 0.45359237 kg ÷ (0.3048 m)³. */
const POUND_PER_CUBIC_FOOT = 0.45359237 / 0.3048 ** 3;

/**
 * Strength in Pa of a part of this thickness in m; null above the last step, and where the thickness is not known and matters.
 */
export function strength(steps: Steps, thickness_m: number | null): number | null {
  if (thickness_m === null) return steps.length === 1 ? (steps[0]?.[1] ?? 0) * 1e6 : null;
  // A thickness that was read in mm and kept in m comes back a rounding away from its step.
  const t = thickness_m * 1000 * (1 - 1e-12);
  const step = steps.find(([upTo]) => t <= upTo);
  return step ? step[1] * 1e6 : null;
}

/** Grades of other standards: never taken for a near miss of one that is held. */
const notHeld = /^S(420|460|500|550|620|690)/;

function suggest(key: string): string | null {
  if (notHeld.test(key)) return null;
  let best: string | null = null;
  let least = 3;
  for (const [candidate, name] of gradeNames) {
    const apart = editDistance(candidate, key);
    if (apart < least) [best, least] = [name, apart];
  }
  return best;
}
