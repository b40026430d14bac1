import { headNumbers, ofM, ofN, ofV } from '@/lib/analysis/flat-line';
import type { StateLines } from '@/lib/analysis/flat-lines';
import { isShort, peakOfShort, SAME } from './peak';

/** What `ShortPeaks` found of one member over all states. */
export interface Governing {
  /** The states in which normal and shear stress are largest: of equal ones the first. */
  readonly normal: number;
  readonly shear: number;
}

// by state: what equivalent stress stays within
let within = new Float64Array(64);
// largest equivalent stress at an end of the member in any state
const floor = new Float64Array(1);

/**
 * Looks through a member whose line is short in every state (peak.ts): normal and shear stress are then quicker had than bounded.
 * @returns null where some line is another one, or some stress no number
 */
export function shortPeaks(
  lines: readonly StateLines[],
  member: number,
  perA: number,
  perTop: number,
  perBottom: number,
  perAv: number,
): Governing | null {
  if (within.length < lines.length) within = new Float64Array(2 * lines.length);
  let [normalIn, largestNormal, shearIn, largestShear, ends] = [0, -1, 0, -1, 0];
  for (let c = 0; c < lines.length; c++) {
    const line = lines[c]!.at(member);
    const numbers = lines[c]!.numbers;
    if (!isShort(numbers, line)) return null;
    const o = line + headNumbers;
    const h = numbers[o + 1]!;
    // σ = N/A − M/W at the top, N/A + M/W at the bottom
    const N0 = numbers[o + ofN]! * perA;
    const N1 = numbers[o + ofN + 1]! * perA;
    const N2 = numbers[o + ofN + 2]! * perA;
    const M0 = numbers[o + ofM]!;
    const M1 = numbers[o + ofM + 1]!;
    const M2 = numbers[o + ofM + 2]!;
    const t0 = N0 - M0 * perTop;
    const t1 = N1 - M1 * perTop;
    const t2 = N2 - M2 * perTop;
    const b0 = N0 + M0 * perBottom;
    const b1 = N1 + M1 * perBottom;
    const b2 = N2 + M2 * perBottom;
    const V0 = numbers[o + ofV]!;
    const V1 = numbers[o + ofV + 1]!;
    const V2 = numbers[o + ofV + 2]!;
    const atTop = peakOfShort(t0, t1, t2, h);
    const atBottom = peakOfShort(b0, b1, b2, h);
    const atShear = peakOfShort(V0, V1, V2, h);
    const top = Math.abs((t2 * atTop + t1) * atTop + t0);
    const bottom = Math.abs((b2 * atBottom + b1) * atBottom + b0);
    // as `largerFace`
    const takesBottom = bottom > top * (1 + SAME) || (!(top > bottom * (1 + SAME)) && atBottom < atTop - SAME * (1 + atTop));
    const normal = takesBottom ? bottom : top;
    const shear = Math.abs((V2 * atShear + V1) * atShear + V0) * perAv;
    const squared = 3 * shear * shear;
    const bound = Math.sqrt(normal * normal + squared);
    if (!(bound < Infinity)) return null;
    within[c] = bound;
    if (normal > largestNormal * (1 + SAME) || largestNormal < 0) {
      largestNormal = normal;
      normalIn = c;
    }
    if (shear > largestShear * (1 + SAME) || largestShear < 0) {
      largestShear = shear;
      shearIn = c;
    }
    if (bound <= ends) continue;
    const start = Math.max(Math.abs(t0), Math.abs(b0));
    const end = Math.max(Math.abs((t2 * h + t1) * h + t0), Math.abs((b2 * h + b1) * h + b0));
    const shear0 = V0 * perAv;
    const shear1 = ((V2 * h + V1) * h + V0) * perAv;
    ends = Math.max(ends, Math.sqrt(start * start + 3 * shear0 * shear0), Math.sqrt(end * end + 3 * shear1 * shear1));
  }
  floor[0] = ends;
  return { normal: normalIn, shear: shearIn };
}

/** After `shortPeaks`, of a state: what equivalent stress stays within, Pa; −1 where another state governs it for certain. */
export function equivalentWithin(state: number): number {
  return within[state]! < floor[0]! * (1 - 4 * SAME) ? -1 : within[state]!;
}
