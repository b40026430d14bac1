import type { Topology } from './topology';

/**
 * Solves Uᵀ D U x = b in place for several columns (load cases) at once.
 *
 * @param K, inner as `factor` left them   @param b columns one after another, 3 × size each, overwritten by x
 */
export function solve(K: Float64Array, t: Topology, inner: Float64Array, b: Float64Array, columns: number): void {
  const { size, rowStart, columns: columnOf } = t;
  const n = 3 * size;
  const end = columns * n;
  for (let i = 0, q = 0; i < size; i++, q += 6) {
    // y_j −= U_ijᵀ y_i for all but the last block of the row …
    const last = rowStart[i + 1]! - 1;
    const before = rowStart[i]! + 1;
    for (let k = before; k < last; k++) {
      const u = 9 * k;
      const u0 = K[u]!, u1 = K[u + 1]!, u2 = K[u + 2]!, u3 = K[u + 3]!, u4 = K[u + 4]!; // prettier-ignore
      const u5 = K[u + 5]!, u6 = K[u + 6]!, u7 = K[u + 7]!, u8 = K[u + 8]!; // prettier-ignore
      for (let from = 3 * i, to = 3 * columnOf[k]!; to < end; from += n, to += n) {
        const y0 = b[from]!;
        const y1 = b[from + 1]!;
        const y2 = b[from + 2]!;
        b[to] = b[to]! - (u0 * y0 + u3 * y1 + u6 * y2);
        b[to + 1] = b[to + 1]! - (u1 * y0 + u4 * y1 + u7 * y2);
        b[to + 2] = b[to + 2]! - (u2 * y0 + u5 * y1 + u8 * y2);
      }
    }
    // … and for the last together with z_i = D_i⁻¹ y_i
    const p0 = inner[q]!, l10 = inner[q + 1]!, l20 = inner[q + 2]!, p1 = inner[q + 3]!, l21 = inner[q + 4]!, p2 = inner[q + 5]!; // prettier-ignore
    if (last < before) {
      for (let from = 3 * i; from < end; from += n) {
        const y0 = b[from]!;
        const w1 = b[from + 1]! - l10 * y0;
        const z2 = p2 * (b[from + 2]! - l20 * y0 - l21 * w1);
        const z1 = p1 * w1 - l21 * z2;
        b[from] = p0 * y0 - l10 * z1 - l20 * z2;
        b[from + 1] = z1;
        b[from + 2] = z2;
      }
      continue;
    }
    const u = 9 * last;
    const u0 = K[u]!, u1 = K[u + 1]!, u2 = K[u + 2]!, u3 = K[u + 3]!, u4 = K[u + 4]!; // prettier-ignore
    const u5 = K[u + 5]!, u6 = K[u + 6]!, u7 = K[u + 7]!, u8 = K[u + 8]!; // prettier-ignore
    for (let from = 3 * i, to = 3 * columnOf[last]!; to < end; from += n, to += n) {
      const y0 = b[from]!;
      const y1 = b[from + 1]!;
      const y2 = b[from + 2]!;
      b[to] = b[to]! - (u0 * y0 + u3 * y1 + u6 * y2);
      b[to + 1] = b[to + 1]! - (u1 * y0 + u4 * y1 + u7 * y2);
      b[to + 2] = b[to + 2]! - (u2 * y0 + u5 * y1 + u8 * y2);
      const w1 = y1 - l10 * y0;
      const z2 = p2 * (y2 - l20 * y0 - l21 * w1);
      const z1 = p1 * w1 - l21 * z2;
      b[from] = p0 * y0 - l10 * z1 - l20 * z2;
      b[from + 1] = z1;
      b[from + 2] = z2;
    }
  }
  for (let i = size - 1; i >= 0; i--) {
    // x_i = z_i − Σ U_ij x_j
    for (let k = rowStart[i]! + 1; k < rowStart[i + 1]!; k++) {
      const u = 9 * k;
      const u0 = K[u]!, u1 = K[u + 1]!, u2 = K[u + 2]!, u3 = K[u + 3]!, u4 = K[u + 4]!; // prettier-ignore
      const u5 = K[u + 5]!, u6 = K[u + 6]!, u7 = K[u + 7]!, u8 = K[u + 8]!; // prettier-ignore
      for (let to = 3 * i, from = 3 * columnOf[k]!; from < end; to += n, from += n) {
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
