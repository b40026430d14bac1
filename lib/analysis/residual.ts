import type { Solved, SolvedStates } from './certificate';
import { worse } from './worse';

/** ‖K̂ d̂ − f̂‖∞ / (‖K̂‖₁‖d̂‖∞ + ‖f̂‖∞), scaled to a unit diagonal so that metres and radians may stand side by side. */
export function caseResidual({ t, diagonal, norm, loads, d, recovered }: Solved): number {
  let largest = 0;
  for (let c = 0; c < recovered.length; c++) {
    let off = 0;
    let moved = 0;
    let loaded = 0;
    for (let i = 0; i < 3 * t.size; i++) {
      const scale = Math.sqrt(diagonal[i]!);
      const node = 3 * t.nodeAt[Math.floor(i / 3)]! + (i % 3);
      off = worse(off, Math.abs(recovered[c]!.outOfBalance[node]!) / scale);
      moved = worse(moved, Math.abs(d[c * 3 * t.size + i]!) * scale);
      loaded = worse(loaded, Math.abs(loads.f[c * 3 * t.size + i]!) / scale);
    }
    const size = norm * moved + loaded;
    if (size !== 0) largest = worse(largest, off / size);
  }
  return largest;
}

const along = new Float64Array(3);

/**
 * The same of states that are no sums of cases: how far their nodes are out of balance on the final, deflected, reduced,
 * slackened frame, against ‖K̂‖₁‖d̂‖∞ alone (without ‖f̂‖: the stricter), K̂ of the frame with all its members.
 */
export function stateResidual({ t, diagonal, norm, solved }: SolvedStates, angles: Float64Array): number {
  let largest = 0;
  for (const { state, outOfBalance, handled } of solved) {
    if (!outOfBalance) continue;
    let off = 0;
    let moved = 0;
    let softest = Infinity;
    for (let p = 0; p < t.size; p++) {
      const node = t.nodeAt[p]!;
      const angle = angles[node]!;
      const x = state.displacements[3 * node]!;
      const y = state.displacements[3 * node + 1]!;
      along[0] = angle === 0 ? x : x * Math.cos(angle) + y * Math.sin(angle);
      along[1] = angle === 0 ? y : y * Math.cos(angle) - x * Math.sin(angle);
      along[2] = state.displacements[3 * node + 2]!;
      for (let r = 0; r < 3; r++) {
        if (!t.free[3 * node + r]) continue;
        const scale = Math.sqrt(diagonal[3 * p + r]!);
        softest = Math.min(softest, scale);
        off = worse(off, Math.abs(outOfBalance[3 * node + r]!) / scale);
        moved = worse(moved, Math.abs(along[r]!) * scale);
      }
    }
    // nothing moves, though forces met: the rounding of these is all there can be
    const size = norm * moved || handled / softest;
    if (off !== 0) largest = worse(largest, off / size);
  }
  return largest;
}
