import type { Topology } from './topology';

/**
 * K = Uᵀ D U in place, by 3 × 3 node blocks on a skyline (active columns, after Jennings 1977).
 *
 * U is block unit upper triangular and takes K's place above the diagonal; the diagonal blocks are factored
 * LDLᵀ one by one into `inner`: [1/p₀, l₁₀, l₂₀, 1/p₁, l₂₁, 1/p₂] a position, their pivots into `pivots`.
 *
 * @param K blocks of topology.ts, overwritten   @param diagonal K's own diagonal before, 3 a position
 * @param tolerance a pivot not above tolerance × its own original diagonal stops the work; 0 = never
 *   (for an indefinite K: the number of negative pivots is then the number of negative eigenvalues)
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
  const { size, firstRow, columnStart } = t;
  for (let j = 0; j < size; j++) {
    const hj = firstRow[j]!;
    const baseJ = columnStart[j]! - hj;
    for (let i = hj; i < j; i++) {
      const hi = firstRow[i]!;
      const baseI = columnStart[i]! - hi;
      let at = 9 * (baseJ + i);
      let g0 = K[at]!, g1 = K[at + 1]!, g2 = K[at + 2]!; // prettier-ignore
      let g3 = K[at + 3]!, g4 = K[at + 4]!, g5 = K[at + 5]!; // prettier-ignore
      let g6 = K[at + 6]!, g7 = K[at + 7]!, g8 = K[at + 8]!; // prettier-ignore
      // G_ij = K_ij − Σ U_kiᵀ G_kj
      let u = 9 * (baseI + (hi > hj ? hi : hj));
      let g = 9 * (baseJ + (hi > hj ? hi : hj));
      for (; g < at; g += 9, u += 9) {
        const u0 = K[u]!, u1 = K[u + 1]!, u2 = K[u + 2]!; // prettier-ignore
        const u3 = K[u + 3]!, u4 = K[u + 4]!, u5 = K[u + 5]!; // prettier-ignore
        const u6 = K[u + 6]!, u7 = K[u + 7]!, u8 = K[u + 8]!; // prettier-ignore
        const a0 = K[g]!, a1 = K[g + 1]!, a2 = K[g + 2]!; // prettier-ignore
        const a3 = K[g + 3]!, a4 = K[g + 4]!, a5 = K[g + 5]!; // prettier-ignore
        const a6 = K[g + 6]!, a7 = K[g + 7]!, a8 = K[g + 8]!; // prettier-ignore
        g0 -= u0 * a0 + u3 * a3 + u6 * a6;
        g1 -= u0 * a1 + u3 * a4 + u6 * a7;
        g2 -= u0 * a2 + u3 * a5 + u6 * a8;
        g3 -= u1 * a0 + u4 * a3 + u7 * a6;
        g4 -= u1 * a1 + u4 * a4 + u7 * a7;
        g5 -= u1 * a2 + u4 * a5 + u7 * a8;
        g6 -= u2 * a0 + u5 * a3 + u8 * a6;
        g7 -= u2 * a1 + u5 * a4 + u8 * a7;
        g8 -= u2 * a2 + u5 * a5 + u8 * a8;
      }
      K[at] = g0;
      K[++at] = g1;
      K[++at] = g2;
      K[++at] = g3;
      K[++at] = g4;
      K[++at] = g5;
      K[++at] = g6;
      K[++at] = g7;
      K[++at] = g8;
    }
    const d = 9 * (baseJ + j);
    let d00 = K[d]!, d01 = K[d + 1]!, d02 = K[d + 2]!, d11 = K[d + 4]!, d12 = K[d + 5]!, d22 = K[d + 8]!; // prettier-ignore
    for (let i = hj; i < j; i++) {
      const at = 9 * (baseJ + i);
      const q = 6 * i;
      const p0 = inner[q]!, l10 = inner[q + 1]!, l20 = inner[q + 2]!, p1 = inner[q + 3]!, l21 = inner[q + 4]!, p2 = inner[q + 5]!; // prettier-ignore
      // U_ij = D_i⁻¹ G_ij, column by column; D_j −= G_ijᵀ U_ij
      const a0 = K[at]!, a1 = K[at + 1]!, a2 = K[at + 2]!, a3 = K[at + 3]!, a4 = K[at + 4]!; // prettier-ignore
      const a5 = K[at + 5]!, a6 = K[at + 6]!, a7 = K[at + 7]!, a8 = K[at + 8]!; // prettier-ignore
      let y = a3 - l10 * a0;
      let x2 = p2 * (a6 - l20 * a0 - l21 * y);
      let x1 = p1 * y - l21 * x2;
      let x0 = p0 * a0 - l10 * x1 - l20 * x2;
      d00 -= a0 * x0 + a3 * x1 + a6 * x2;
      d01 -= a1 * x0 + a4 * x1 + a7 * x2;
      d02 -= a2 * x0 + a5 * x1 + a8 * x2;
      K[at] = x0;
      K[at + 3] = x1;
      K[at + 6] = x2;
      y = a4 - l10 * a1;
      x2 = p2 * (a7 - l20 * a1 - l21 * y);
      x1 = p1 * y - l21 * x2;
      x0 = p0 * a1 - l10 * x1 - l20 * x2;
      d11 -= a1 * x0 + a4 * x1 + a7 * x2;
      d12 -= a2 * x0 + a5 * x1 + a8 * x2;
      K[at + 1] = x0;
      K[at + 4] = x1;
      K[at + 7] = x2;
      y = a5 - l10 * a2;
      x2 = p2 * (a8 - l20 * a2 - l21 * y);
      x1 = p1 * y - l21 * x2;
      x0 = p0 * a2 - l10 * x1 - l20 * x2;
      d22 -= a2 * x0 + a5 * x1 + a8 * x2;
      K[at + 2] = x0;
      K[at + 5] = x1;
      K[at + 8] = x2;
    }
    const r = 3 * j;
    const q = 6 * j;
    const p0 = pivot(d00, diagonal[r]!, tolerance);
    if (p0 !== p0) return r;
    const i0 = 1 / p0;
    const l10 = d01 * i0;
    const l20 = d02 * i0;
    inner[q] = i0;
    inner[q + 1] = l10;
    inner[q + 2] = l20;
    pivots[r] = p0;
    const p1 = pivot(d11 - l10 * d01, diagonal[r + 1]!, tolerance);
    if (p1 !== p1) return r + 1;
    const i1 = 1 / p1;
    const e = d12 - l10 * d02;
    const l21 = e * i1;
    inner[q + 3] = i1;
    inner[q + 4] = l21;
    pivots[r + 1] = p1;
    const p2 = pivot(d22 - l20 * d02 - l21 * e, diagonal[r + 2]!, tolerance);
    if (p2 !== p2) return r + 2;
    inner[q + 5] = 1 / p2;
    pivots[r + 2] = p2;
  }
  return -1;
}

/** NaN = the frame can move here. With tolerance 0 a pivot of nothing becomes the smallest negative one that still counts. */
function pivot(p: number, original: number, tolerance: number): number {
  if (tolerance > 0) return p > tolerance * original ? p : NaN;
  return Math.abs(p) > 1e-15 * Math.abs(original) ? p : -1e-15 * (Math.abs(original) || 1);
}
