import { solve } from './solve';
import type { Topology } from './topology';

/** ‖K̂‖₁ of K scaled to a unit diagonal, K̂ = S K S, S = diag(K)^−½; from the blocks before factoring. */
export function scaledNorm(K: Float64Array, t: Topology, diagonal: Float64Array): number {
  const scale = Float64Array.from(diagonal, (d) => 1 / Math.sqrt(d));
  const sums = new Float64Array(3 * t.size);
  for (let i = 0; i < t.size; i++)
    for (let b = t.rowStart[i]!; b < t.rowStart[i + 1]!; b++) {
      const j = t.columns[b]!;
      const at = 9 * b;
      for (let r = 0; r < 3; r++)
        for (let c = 0; c < 3; c++) {
          // of a block on the diagonal only the upper half need be there
          const entry = i === j && r > c ? 3 * c + r : 3 * r + c;
          const size = Math.abs(K[at + entry]!) * scale[3 * i + r]! * scale[3 * j + c]!;
          sums[3 * j + c] = sums[3 * j + c]! + size;
          if (i !== j) sums[3 * i + r] = sums[3 * i + r]! + size;
        }
    }
  return sums.reduce((most, sum) => Math.max(most, sum), 0);
}

/** The estimate, and the direction in which K̂ is weakest (unscaled displacements, 3 a position). */
export interface Condition {
  readonly condition: number;
  readonly weakest: Float64Array;
}

/**
 * 1-norm condition estimate of K̂ from its factors: Hager's method with Higham's alternative vector
 * (Higham 2002, Accuracy and Stability, alg. 15.1). K is symmetric, so one solve serves both directions.
 */
export function conditionEstimate(
  K: Float64Array,
  t: Topology,
  inner: Float64Array,
  diagonal: Float64Array,
  norm: number,
): Condition {
  const n = 3 * t.size;
  const root = Float64Array.from(diagonal, Math.sqrt);
  const apply = (x: Float64Array): Float64Array => {
    // K̂⁻¹ x = S⁻¹ K⁻¹ S⁻¹ x
    for (let i = 0; i < n; i++) x[i] = x[i]! * root[i]!;
    solve(K, t, inner, x, 1);
    for (let i = 0; i < n; i++) x[i] = x[i]! * root[i]!;
    return x;
  };
  const size = (x: Float64Array): number => x.reduce((sum, v) => sum + Math.abs(v), 0);
  if (n === 0) return { condition: 1, weakest: new Float64Array(0) };
  let best = apply(new Float64Array(n).fill(1 / n));
  let estimate = size(best);
  let before = -1;
  for (let pass = 0; pass < 5; pass++) {
    const z = apply(best.map((v) => (v < 0 ? -1 : 1)));
    let most = 0;
    for (let i = 1; i < n; i++) if (Math.abs(z[i]!) > Math.abs(z[most]!)) most = i;
    if (most === before) break;
    before = most;
    const unit = new Float64Array(n);
    unit[most] = 1;
    const next = apply(unit);
    const found = size(next);
    if (found <= estimate) break;
    estimate = found;
    best = next;
  }
  const alternative = apply(Float64Array.from({ length: n }, (_, i) => (i % 2 ? -1 : 1) * (1 + i / Math.max(1, n - 1))));
  estimate = Math.max(estimate, (2 * size(alternative)) / (3 * n));
  return { condition: norm * estimate, weakest: best.map((v, i) => v / root[i]!) };
}
