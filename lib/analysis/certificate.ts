import type { Frame } from '@/lib/model/frame';
import type { Certificate, ResultState } from '@/lib/results/result';
import { globalEquilibrium } from './equilibrium';
import type { LoadVectors } from './load-vectors';
import type { Recovered } from './recover';
import { largestDifference } from './second/compare-states';
import { secondAnalysis } from './second/second-analysis';
import type { Topology } from './topology';

export const residualTolerance = 1e-10;
export const equilibriumTolerance = 1e-8;
export const leastDigits = 6;
export const secondTolerance = 1e-6;
/** The second analysis is dense: above this number of unknowns it would cost more than all the rest. */
export const secondUnknowns = 300;
/** Share of the forces met on the way below which a result is taken for their rounding. */
const rounding = 1e-4;

/** Everything about a solved frame that its certificate is made from. */
export interface Solved {
  readonly frame: Frame;
  readonly t: Topology;
  readonly diagonal: Float64Array;
  readonly norm: number;
  readonly condition: number;
  readonly loads: LoadVectors;
  readonly d: Float64Array;
  readonly recovered: readonly Recovered[];
  readonly cases: readonly ResultState[];
}

/** Certificate of a frame (engine, Certificate; README §5). @param second whether to make the second analysis */
export function certify(solved: Solved, second: boolean): Certificate {
  const { frame, recovered } = solved;
  const floors = recovered.map((r) => rounding * r.handled);
  return {
    residual: largestResidual(solved),
    equilibrium: recovered.reduce((most, r, c) => worse(most, globalEquilibrium(frame, c, r.reactions, floors[c]!)), 0),
    condition: solved.condition,
    digits: digitsOf(solved.condition),
    ...compareWithSecond(solved, floors, second),
  };
}

/** Decimal digits that a condition leaves. */
export function digitsOf(condition: number): number {
  return -Math.log10(Number.EPSILON * condition);
}

/** NaN is worst of all. */
function worse(a: number, b: number): number {
  return a >= b ? a : b > a ? b : NaN;
}

/** ‖K̂ d̂ − f̂‖∞ / (‖K̂‖₁‖d̂‖∞ + ‖f̂‖∞), scaled to a unit diagonal so that metres and radians may stand side by side. */
function largestResidual({ t, diagonal, norm, loads, d, recovered }: Solved): number {
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

/** Certificate item 3. */
function compareWithSecond(
  { frame, t, cases }: Solved,
  floors: readonly number[],
  wanted: boolean,
): Pick<Certificate, 'second' | 'secondReason'> {
  if (!wanted) return { second: null, secondReason: 'sampled' };
  if (t.free.reduce((sum, free) => sum + free, 0) > secondUnknowns) return { second: null, secondReason: 'too large' };
  const states = secondAnalysis(frame);
  if (!states) return { second: Infinity, secondReason: null };
  const second = states.reduce((most, state, c) => worse(most, largestDifference(frame, cases[c]!, state, floors[c]!)), 0);
  return { second, secondReason: null };
}

/** What in a certificate is outside its tolerance, in words; null = nothing. */
export function outsideTolerance(c: Certificate): string | null {
  if (!Number.isFinite(c.residual + c.equilibrium))
    return 'Its loads or stiffnesses are too large or too small for numbers to hold.';
  if (!(c.residual <= residualTolerance))
    return `The equations are not met closely enough: residual ${c.residual.toExponential(1)}, at most 1e-10 is asked for.`;
  if (!(c.equilibrium <= equilibriumTolerance))
    return `Loads and reactions are not in balance: ${c.equilibrium.toExponential(1)} of their size, at most 1e-8 is asked for.`;
  if (c.secondReason === null && !((c.second ?? NaN) <= secondTolerance))
    return `Two independent analyses differ by ${(c.second ?? NaN).toExponential(1)} of the largest value, at most 1e-6 is allowed.`;
  return null;
}
