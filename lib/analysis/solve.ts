import type { Topology } from './topology';

/**
 * Solves Uᵀ D U x = b in place for several columns (load cases) at once.
 *
 * @param K, inner as `factor` left them   @param b columns one after another, 3 × size each, overwritten by x
 */
export function solve(K: Float64Array, t: Topology, inner: Float64Array, b: Float64Array, columns: number): void {
  const { size, firstRow, columnStart } = t;
  const n = 3 * size;
  const end = columns * n;
  for (let j = 0; j < size; j++) {
    // y_j = b_j − Σ U_ijᵀ y_i
    let u = 9 * columnStart[j]!;
    for (let i = firstRow[j]!; i < j; i++, u += 9) {
      const u0 = K[u]!, u1 = K[u + 1]!, u2 = K[u + 2]!, u3 = K[u + 3]!, u4 = K[u + 4]!; // prettier-ignore
      const u5 = K[u + 5]!, u6 = K[u + 6]!, u7 = K[u + 7]!, u8 = K[u + 8]!; // prettier-ignore
      for (let from = 3 * i, to = 3 * j; to < end; from += n, to += n) {
        const y0 = b[from]!;
        const y1 = b[from + 1]!;
        const y2 = b[from + 2]!;
        b[to] = b[to]! - (u0 * y0 + u3 * y1 + u6 * y2);
        b[to + 1] = b[to + 1]! - (u1 * y0 + u4 * y1 + u7 * y2);
        b[to + 2] = b[to + 2]! - (u2 * y0 + u5 * y1 + u8 * y2);
      }
    }
  }
  for (let j = 0, q = 0; j < size; j++, q += 6) {
    // z_j = D_j⁻¹ y_j
    const p0 = inner[q]!, l10 = inner[q + 1]!, l20 = inner[q + 2]!, p1 = inner[q + 3]!, l21 = inner[q + 4]!, p2 = inner[q + 5]!; // prettier-ignore
    for (let o = 3 * j; o < end; o += n) {
      const y0 = b[o]!;
      const y1 = b[o + 1]! - l10 * y0;
      const x2 = p2 * (b[o + 2]! - l20 * y0 - l21 * y1);
      const x1 = p1 * y1 - l21 * x2;
      b[o] = p0 * y0 - l10 * x1 - l20 * x2;
      b[o + 1] = x1;
      b[o + 2] = x2;
    }
  }
  for (let j = size - 1; j >= 0; j--) {
    // x_i = z_i − U_ij x_j
    let u = 9 * columnStart[j]!;
    for (let i = firstRow[j]!; i < j; i++, u += 9) {
      const u0 = K[u]!, u1 = K[u + 1]!, u2 = K[u + 2]!, u3 = K[u + 3]!, u4 = K[u + 4]!; // prettier-ignore
      const u5 = K[u + 5]!, u6 = K[u + 6]!, u7 = K[u + 7]!, u8 = K[u + 8]!; // prettier-ignore
      for (let to = 3 * i, from = 3 * j; from < end; to += n, from += n) {
        const x0 = b[from]!;
        const x1 = b[from + 1]!;
        const x2 = b[from + 2]!;
        b[to] = b[to]! - (u0 * x0 + u1 * x1 + u2 * x2);
        b[to + 1] = b[to + 1]! - (u3 * x0 + u4 * x1 + u5 * x2);
        b[to + 2] = b[to + 2]! - (u6 * x0 + u7 * x1 + u8 * x2);
      }
    }
  }
}
