import type { StateLines } from '@/lib/analysis/flat-lines';
import { degreeM, degreeN, degreeV, headNumbers, ofM, ofN, ofV, segmentNumbers } from '@/lib/analysis/flat-line';
import { bound, valueIn } from './line-bounds';
import { SAME } from './peak';

// by state: what normal, shear and equivalent stress stay within
let above = new Float64Array(3 * 64);
const floors = new Float64Array(3);

/**
 * Bounds of the stresses of one member in every state: from above as `lineBounds`, from below by what stands at the ends of its
 * segments. What stays below the largest of these in some state governs nothing, so that only the others are looked at closely.
 */
export class StressBounds {
  constructor(lines: readonly StateLines[], member: number, perA: number, perTop: number, perBottom: number, perAv: number) {
    if (above.length < 3 * lines.length) above = new Float64Array(6 * lines.length);
    floors.fill(0);
    const perW = Math.max(perTop, perBottom);
    for (let c = 0; c < lines.length; c++) {
      const at = lines[c]!.at(member);
      const numbers = lines[c]!.numbers;
      let N = 0;
      let V = 0;
      let M = 0;
      for (let i = numbers[at]!, o = at + headNumbers; i > 0; i--, o += segmentNumbers) {
        const h = numbers[o + 1]! - numbers[o]!;
        const axial = numbers[o + degreeN]!;
        const shear = numbers[o + degreeV]!;
        const bent = numbers[o + degreeM]!;
        N = Math.max(N, bound(numbers, o + ofN, axial, h));
        V = Math.max(V, bound(numbers, o + ofV, shear, h));
        M = Math.max(M, bound(numbers, o + ofM, bent, h));
        below(numbers[o + ofN]! * perA, numbers[o + ofV]! * perAv, numbers[o + ofM]!, perTop, perBottom);
        below(
          valueIn(numbers, o + ofN, axial, h) * perA,
          valueIn(numbers, o + ofV, shear, h) * perAv,
          valueIn(numbers, o + ofM, bent, h),
          perTop,
          perBottom,
        );
      }
      const normal = N * perA + M * perW;
      const tau = V * perAv;
      above[3 * c] = normal;
      above[3 * c + 1] = tau;
      above[3 * c + 2] = Math.sqrt(normal * normal + 3 * tau * tau);
    }
  }

  /** Whether a state may govern a check (by position in stressNames): never no where it does, or is equal to what does. */
  mayGovern(check: number, state: number): boolean {
    // a bound that is no number rules nothing out
    return !(above[3 * state + check]! < floors[check]! * (1 - 4 * SAME));
  }
}

function below(axial: number, tau: number, M: number, perTop: number, perBottom: number): void {
  const normal = Math.max(Math.abs(axial - M * perTop), Math.abs(axial + M * perBottom));
  const shear = Math.abs(tau);
  if (normal > floors[0]!) floors[0] = normal;
  if (shear > floors[1]!) floors[1] = shear;
  const both = normal * normal + 3 * shear * shear;
  if (both > floors[2]! * floors[2]!) floors[2] = Math.sqrt(both);
}
