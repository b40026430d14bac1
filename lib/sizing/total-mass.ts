import { asItIs, type Choice } from '@/lib/sizing/known-answers';
import type { FrameToSize, SizingProblem } from '@/lib/sizing/problem';

/** Steel of all frames that are sized, with their number off, kg; null where a density is missing. */
export function totalMass(problem: SizingProblem, choice: Choice): number | null {
  let total = 0;
  for (const frame of problem.frames) {
    if (frame.mask === 0) continue;
    const one = choice.every((c) => c === asItIs) ? frame.mass_kg : massOf(problem, frame, choice);
    if (one === null) return null;
    total += one * frame.off;
  }
  return total;
}

function massOf({ groups }: SizingProblem, frame: FrameToSize, choice: Choice): number | null {
  let mass = frame.rest_kg;
  if (mass === null) return null;
  for (const [g, { candidates }] of groups.entries()) {
    const taken = candidates[choice[g] ?? asItIs]?.taken;
    for (const { material, length_m } of frame.steel[g] ?? []) {
      const density = taken?.materials[material]?.density_kg_m3 ?? null;
      if (!taken || density === null) return null;
      mass += density * taken.section.properties.A_m2 * length_m;
    }
  }
  return mass;
}
