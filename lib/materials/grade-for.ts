import type { Material } from '@/lib/model/frame';
import { editDistance } from '@/lib/sections/edit-distance';

/** Yield up to and including each thickness in mm. */
type Steps = readonly (readonly [upTo_mm: number, fy_MPa: number])[];

interface Grade {
  readonly standard: 'EN' | 'ASTM';
  readonly steps: Steps;
  /** Least tensile strength by thickness, MPa. */
  readonly fu: Steps;
}

const KSI = 6.894757293168361;

/** EN 10025-2:2019 tables 7: least yield strength by nominal thickness; ASTM A36 and A992 for shapes. */
const grades: Readonly<Record<string, Grade>> = {
  S235: {
    standard: 'EN',
    steps: [[16, 235], [40, 225], [100, 215], [150, 195], [200, 185], [250, 175]],
    fu: [[100, 360], [150, 350], [250, 340]],
  },
  S275: {
    standard: 'EN',
    steps: [[16, 275], [40, 265], [63, 255], [80, 245], [100, 235], [150, 225], [200, 215], [250, 205]],
    fu: [[2.999, 430], [100, 410], [150, 400], [250, 380]],
  },
  S355: {
    standard: 'EN',
    steps: [[16, 355], [40, 345], [63, 335], [80, 325], [100, 315], [150, 295], [200, 285], [250, 275]],
    fu: [[2.999, 510], [100, 470], [250, 450]],
  },
  A36: { standard: 'ASTM', steps: [[Infinity, 36 * KSI]], fu: [[Infinity, 58 * KSI]] },
  A992: { standard: 'ASTM', steps: [[Infinity, 50 * KSI]], fu: [[Infinity, 65 * KSI]] },
}; // prettier-ignore

const gradeNames: readonly string[] = Object.keys(grades);

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
 * E, G, density and expansion as the sheets' contract states). A sub-grade (`S355J2`, `S275 JR`) is its grade.
 *
 * Thickness null: fy and fu are null for a grade whose strength depends on it, since the thinnest step would be a guess.
 * Unknown name: the nearest grade as a suggestion, null if none is near.
 */
export function gradeFor(
  name: string,
  thickness_m: number | null,
): { readonly properties: GradeProperties } | { readonly suggestion: string | null } {
  const key = name
    .normalize('NFKC')
    .toUpperCase()
    .replace(/[\s_-]/g, '')
    .replace(/^ASTM/, '');
  const plain = /^(S\d{3})(JR|J0|J2|K2)(\+(N|AR|M))?$/.exec(key)?.[1] ?? key;
  const grade = grades[plain];
  if (!grade) return { suggestion: suggest(key) };
  const en = grade.standard === 'EN';
  return {
    properties: {
      grade: plain,
      standard: grade.standard,
      E_Pa: en ? 210e9 : 29000e6 * KSI,
      G_Pa: en ? 81e9 : 11200e6 * KSI,
      fy_Pa: strength(grade.steps, thickness_m),
      fu_Pa: strength(grade.fu, thickness_m),
      density_kg_m3: en ? 7850 : 490 * POUND_PER_CUBIC_FOOT,
      expansion_perK: 12e-6,
    },
  };
}

/** 0.45359237 kg ÷ (0.3048 m)³. */
const POUND_PER_CUBIC_FOOT = 0.45359237 / 0.3048 ** 3;

function strength(steps: Steps, thickness_m: number | null): number | null {
  if (thickness_m === null) return steps.length === 1 ? (steps[0]?.[1] ?? 0) * 1e6 : null;
  // A thickness that was read in mm and kept in m comes back a rounding away from its step.
  const t = thickness_m * 1000 * (1 - 1e-12);
  const step = steps.find(([upTo]) => t <= upTo);
  return step ? step[1] * 1e6 : null;
}

function suggest(key: string): string | null {
  let best: string | null = null;
  let least = 3;
  for (const name of gradeNames) {
    const apart = editDistance(name, key);
    if (apart < least) [best, least] = [name, apart];
  }
  return best;
}
