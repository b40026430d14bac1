import type { Topology } from './topology';

/**
 * K = Uᵀ D U in place, by 3 × 3 node blocks, row after row: each row is divided by its block on the diagonal, and its products
 * are taken from the rows to come (George and Liu 1981, ch. 5). Where they go is looked up in the topology.
 *
 * U is block unit upper triangular and takes K's place beyond the diagonal; the diagonal blocks are factored
 * LDLᵀ one by one into `inner`: [1/p₀, l₁₀, l₂₀, 1/p₁, l₂₁, 1/p₂] a position, their pivots into `pivots`.
 *
 * @param K blocks of topology.ts, overwritten; of those on the diagonal the upper half is read
 * @param diagonal K's own diagonal before, 3 a position
 * @param tolerance a pivot not above tolerance × its own original diagonal stops the work; 0 = never
 *   (for an indefinite K: the number of negative pivots is then the number of negative eigenvalues)
 *   and a pivot of nothing becomes the smallest negative one that still counts
 * @returns −1, or the row (3 × position + direction) whose pivot is not positive: the frame can move
 */
export function factor(
  K: Float64Array,
  t: Topology,
  diagonal: Float64Array,
  inner: Float64Array,
  pivots: Float64Array,
  tolerance: number,
): number {
  const { size, rowStart, targets } = t;
  let update = 0;
  for (let i = 0; i < size; i++) {
    const first = 9 * rowStart[i]!;
    const end = 9 * rowStart[i + 1]!;
    const r = 3 * i;
    const q = 6 * i;
    const d01 = K[first + 1]!;
    const d02 = K[first + 2]!;
    let p0 = K[first]!;
    const own0 = diagonal[r]!;
    if (tolerance > 0) {
      if (!(p0 > tolerance * own0)) return r;
    } else if (!(Math.abs(p0) > 1e-15 * Math.abs(own0))) p0 = -1e-15 * (Math.abs(own0) || 1);
    const i0 = 1 / p0;
    const l10 = d01 * i0;
    const l20 = d02 * i0;
    inner[q] = i0;
    inner[q + 1] = l10;
    inner[q + 2] = l20;
    pivots[r] = p0;
    let p1 = K[first + 4]! - l10 * d01;
    const own1 = diagonal[r + 1]!;
    if (tolerance > 0) {
      if (!(p1 > tolerance * own1)) return r + 1;
    } else if (!(Math.abs(p1) > 1e-15 * Math.abs(own1))) p1 = -1e-15 * (Math.abs(own1) || 1);
    const i1 = 1 / p1;
    const e = K[first + 5]! - l10 * d02;
    const l21 = e * i1;
    inner[q + 3] = i1;
    inner[q + 4] = l21;
    pivots[r + 1] = p1;
    let p2 = K[first + 8]! - l20 * d02 - l21 * e;
    const own2 = diagonal[r + 2]!;
    if (tolerance > 0) {
      if (!(p2 > tolerance * own2)) return r + 2;
    } else if (!(Math.abs(p2) > 1e-15 * Math.abs(own2))) p2 = -1e-15 * (Math.abs(own2) || 1);
    const i2 = 1 / p2;
    inner[q + 5] = i2;
    pivots[r + 2] = p2;
    const begin = first + 9;
    for (let at = begin; at < end; at += 9) {
      // U_ij = D_i⁻¹ G_ij, column by column
      const a0 = K[at]!, a1 = K[at + 1]!, a2 = K[at + 2]!, a3 = K[at + 3]!, a4 = K[at + 4]!; // prettier-ignore
      const a5 = K[at + 5]!, a6 = K[at + 6]!, a7 = K[at + 7]!, a8 = K[at + 8]!; // prettier-ignore
      const y0 = a3 - l10 * a0;
      const y1 = a4 - l10 * a1;
      const y2 = a5 - l10 * a2;
      const u6 = i2 * (a6 - l20 * a0 - l21 * y0);
      const u7 = i2 * (a7 - l20 * a1 - l21 * y1);
      const u8 = i2 * (a8 - l20 * a2 - l21 * y2);
      const u3 = i1 * y0 - l21 * u6;
      const u4 = i1 * y1 - l21 * u7;
      const u5 = i1 * y2 - l21 * u8;
      const u0 = i0 * a0 - l10 * u3 - l20 * u6;
      const u1 = i0 * a1 - l10 * u4 - l20 * u7;
      const u2 = i0 * a2 - l10 * u5 - l20 * u8;
      K[at] = u0;
      K[at + 1] = u1;
      K[at + 2] = u2;
      K[at + 3] = u3;
      K[at + 4] = u4;
      K[at + 5] = u5;
      K[at + 6] = u6;
      K[at + 7] = u7;
      K[at + 8] = u8;
      // K_ab −= U_iaᵀ G_ib for the row's blocks a before b
      for (let u = begin; u < at; u += 9) {
        const to = targets[update++]!;
        const v0 = K[u]!, v1 = K[u + 1]!, v2 = K[u + 2]!, v3 = K[u + 3]!, v4 = K[u + 4]!; // prettier-ignore
        const v5 = K[u + 5]!, v6 = K[u + 6]!, v7 = K[u + 7]!, v8 = K[u + 8]!; // prettier-ignore
        K[to] = K[to]! - (v0 * a0 + v3 * a3 + v6 * a6);
        K[to + 1] = K[to + 1]! - (v0 * a1 + v3 * a4 + v6 * a7);
        K[to + 2] = K[to + 2]! - (v0 * a2 + v3 * a5 + v6 * a8);
        K[to + 3] = K[to + 3]! - (v1 * a0 + v4 * a3 + v7 * a6);
        K[to + 4] = K[to + 4]! - (v1 * a1 + v4 * a4 + v7 * a7);
        K[to + 5] = K[to + 5]! - (v1 * a2 + v4 * a5 + v7 * a8);
        K[to + 6] = K[to + 6]! - (v2 * a0 + v5 * a3 + v8 * a6);
        K[to + 7] = K[to + 7]! - (v2 * a1 + v5 * a4 + v8 * a7);
        K[to + 8] = K[to + 8]! - (v2 * a2 + v5 * a5 + v8 * a8);
      }
      // … and for b itself, of which the upper half is enough
      const to = targets[update++]!;
      K[to] = K[to]! - (u0 * a0 + u3 * a3 + u6 * a6);
      K[to + 1] = K[to + 1]! - (u0 * a1 + u3 * a4 + u6 * a7);
      K[to + 2] = K[to + 2]! - (u0 * a2 + u3 * a5 + u6 * a8);
      K[to + 4] = K[to + 4]! - (u1 * a1 + u4 * a4 + u7 * a7);
      K[to + 5] = K[to + 5]! - (u1 * a2 + u4 * a5 + u7 * a8);
      K[to + 8] = K[to + 8]! - (u2 * a2 + u5 * a5 + u8 * a8);
    }
  }
  return -1;
}
