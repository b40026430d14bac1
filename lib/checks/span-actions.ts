import { degreeM, degreeN, headNumbers, ofM, ofN, segmentNumbers } from '@/lib/analysis/flat-line';
import type { StateLines } from '@/lib/analysis/flat-lines';
import { lineBounds } from './line-bounds';
import { turningPoints } from './peak';
import { valueAt } from './polynomial';
import type { Span } from './spans';

const points = new Float64Array(32);
const force = new Float64Array(16);
// in an array, for numbers kept by a module cost memory
export const actions = new Float64Array(3);

/** Largest compression and moments of either sign along the pieces, N and N·m, into `actions`. */
export function actionsOf(span: Span, of: StateLines): void {
  let compression = 0;
  let sagging = 0;
  let hogging = 0;
  for (let p = 0; p < span.pieces.length; p++) {
    const line = of.at(span.pieces[p]!.member);
    const lines = of.numbers;
    for (let i = lines[line]!, o = line + headNumbers; i > 0; i--, o += segmentNumbers) {
      const h = lines[o + 1]! - lines[o]!;
      const axial = lines[o + degreeN]!;
      for (let k = 0; k <= axial; k++) force[k] = lines[o + ofN + k]!;
      let count = turningPoints(force, axial, h, points);
      for (let j = 0; j < count; j++) compression = Math.max(compression, -valueAt(force, axial, points[j]!));
      const bent = lines[o + degreeM]!;
      for (let k = 0; k <= bent; k++) force[k] = lines[o + ofM + k]!;
      count = turningPoints(force, bent, h, points);
      for (let j = 0; j < count; j++) {
        const moment = valueAt(force, bent, points[j]!);
        if (moment > sagging) sagging = moment;
        if (-moment > hogging) hogging = -moment;
      }
    }
  }
  actions[0] = compression;
  actions[1] = sagging;
  actions[2] = hogging;
}

/** Bounds of the axial force (either sign) and of the moment in size along the pieces, which cost less, into `actions`. */
export function actionBounds(span: Span, of: StateLines): void {
  let force = 0;
  let moment = 0;
  for (let p = 0; p < span.pieces.length; p++) {
    const line = of.at(span.pieces[p]!.member);
    const { N, M } = lineBounds(of.numbers, line);
    force = Math.max(force, N);
    moment = Math.max(moment, M);
  }
  actions[0] = force;
  actions[1] = actions[2] = moment;
}
