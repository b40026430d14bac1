import type { Numbering } from './numbering';

/** Rounds after which the equations are better factored. */
const mostRounds = 40;
/** Energy of what is left against that of the first guess's error at which the solution stands: 1e-13 of the movements, before refinement. */
const nothing = 1e-26;

/**
 * K d = f by conjugate gradients, K not far from a matrix whose inverse is known (Hestenes and Stiefel 1952, preconditioned):
 * the frame under axial forces, from the frame without. A step of refinement at the end.
 *
 * @param K, inverse n × n, row by row
 * @returns null where K is met to be indefinite, so past a critical load, or the rounds do not do
 */
export function conjugate(K: Float64Array, numbering: Numbering, inverse: Float64Array, f: Float64Array): Float64Array | null {
  const n = f.length;
  const d = new Float64Array(n);
  const r = f.slice();
  const z = new Float64Array(n);
  const q = new Float64Array(n);
  let left = times(inverse, r, z);
  const start = left;
  const p = z.slice();
  for (let round = 0; left > nothing * start; round++) {
    const work = joinedTimes(K, numbering, p, q);
    if (!(work > 0) || round === mostRounds) return null;
    const step = left / work;
    for (let i = 0; i < n; i++) {
      d[i]! += step * p[i]!;
      r[i]! -= step * q[i]!;
    }
    const next = times(inverse, r, z);
    const turn = next / left;
    for (let i = 0; i < n; i++) p[i] = z[i]! + turn * p[i]!;
    left = next;
  }
  if (!(left <= nothing * start)) return null;
  joinedTimes(K, numbering, d, q);
  for (let i = 0; i < n; i++) r[i] = f[i]! - q[i]!;
  times(inverse, r, z);
  for (let i = 0; i < n; i++) d[i]! += z[i]!;
  return d;
}

/** out = A x; returns x · A x. */
function times(A: Float64Array, x: Float64Array, out: Float64Array): number {
  const n = x.length;
  let work = 0;
  for (let i = 0, at = 0; i < n; i++, at += n) {
    let sum = 0;
    for (let j = 0; j < n; j++) sum += A[at + j]! * x[j]!;
    out[i] = sum;
    work += sum * x[i]!;
  }
  return work;
}

/** The same of K, which is nothing but where members join unknowns. */
function joinedTimes(K: Float64Array, { joined, starts }: Numbering, x: Float64Array, out: Float64Array): number {
  const n = x.length;
  let work = 0;
  for (let i = 0; i < n; i++) {
    let sum = 0;
    for (let k = starts[i]!; k < starts[i + 1]!; k++) {
      const j = joined[k]!;
      sum += K[i * n + j]! * x[j]!;
    }
    out[i] = sum;
    work += sum * x[i]!;
  }
  return work;
}
