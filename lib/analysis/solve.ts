import type { Topology } from './topology';

/**
 * Solves Uᵀ D U x = b in place for several columns (load cases) at once.
 *
 * @param K, inner as `factor` left them   @param b columns one after another, 3 × size each, overwritten by x
 */
export function solve(K: Float64Array, t: Topology, inner: Float64Array, b: Float64Array, columns: number): void {
  const { size, firstRow, columnStart } = t;
  const n = 3 * size;
  for (let j = 0; j < size; j++) {
    // y_j = b_j − Σ U_ijᵀ y_i
    const hj = firstRow[j]!;
    const base = columnStart[j]! - hj;
    for (let i = hj; i < j; i++) {
      const u = 9 * (base + i);
      const u0 = K[u]!, u1 = K[u + 1]!, u2 = K[u + 2]!, u3 = K[u + 3]!, u4 = K[u + 4]!; // prettier-ignore
      const u5 = K[u + 5]!, u6 = K[u + 6]!, u7 = K[u + 7]!, u8 = K[u + 8]!; // prettier-ignore
      for (let c = 0, o = 0; c < columns; c++, o += n) {
        const y0 = b[o + 3 * i]!;
        const y1 = b[o + 3 * i + 1]!;
        const y2 = b[o + 3 * i + 2]!;
        const to = o + 3 * j;
        b[to] = b[to]! - (u0 * y0 + u3 * y1 + u6 * y2);
        b[to + 1] = b[to + 1]! - (u1 * y0 + u4 * y1 + u7 * y2);
        b[to + 2] = b[to + 2]! - (u2 * y0 + u5 * y1 + u8 * y2);
      }
    }
  }
  for (let j = 0; j < size; j++) {
    // z_j = D_j⁻¹ y_j
    const q = 6 * j;
    const p0 = inner[q]!, l10 = inner[q + 1]!, l20 = inner[q + 2]!, p1 = inner[q + 3]!, l21 = inner[q + 4]!, p2 = inner[q + 5]!; // prettier-ignore
    for (let c = 0, o = 3 * j; c < columns; c++, o += n) {
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
    const hj = firstRow[j]!;
    const base = columnStart[j]! - hj;
    for (let i = hj; i < j; i++) {
      const u = 9 * (base + i);
      const u0 = K[u]!, u1 = K[u + 1]!, u2 = K[u + 2]!, u3 = K[u + 3]!, u4 = K[u + 4]!; // prettier-ignore
      const u5 = K[u + 5]!, u6 = K[u + 6]!, u7 = K[u + 7]!, u8 = K[u + 8]!; // prettier-ignore
      for (let c = 0, o = 0; c < columns; c++, o += n) {
        const x0 = b[o + 3 * j]!;
        const x1 = b[o + 3 * j + 1]!;
        const x2 = b[o + 3 * j + 2]!;
        const to = o + 3 * i;
        b[to] = b[to]! - (u0 * x0 + u1 * x1 + u2 * x2);
        b[to + 1] = b[to + 1]! - (u3 * x0 + u4 * x1 + u5 * x2);
        b[to + 2] = b[to + 2]! - (u6 * x0 + u7 * x1 + u8 * x2);
      }
    }
  }
}
