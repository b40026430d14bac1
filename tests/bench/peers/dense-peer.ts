/** The peer of solve.P.dense and solve.R.dense: ml-matrix's Cholesky decomposition of the dense K, all load cases at once. */
import { CholeskyDecomposition, Matrix } from 'ml-matrix';
import { memberData, type MemberData } from '@/lib/analysis/member-data';
import { memberLoads } from '@/lib/analysis/member-loads';
import type { Frame } from '@/lib/model/frame';

/** Numbers of the unknowns, 3 a node, −1 where held: once for all frames of one shape. */
export function denseUnknowns(free: Uint8Array): Int32Array {
  let count = 0;
  return Int32Array.from(free, (one) => (one ? count++ : -1));
}

const k = new Float64Array(36);
const q = new Float64Array(6);
const dof = new Int32Array(6);

/** Displacements by unknown (rows) and case. @param size number of unknowns */
export function denseSolve(frame: Frame, unknownOf: Int32Array, size: number): Matrix {
  const cases = frame.cases.length;
  const loads = memberLoads(frame);
  const K = Matrix.zeros(size, size);
  const f = Matrix.zeros(size, cases);
  memberData(frame).forEach((m, i) => {
    for (let r = 0; r < 6; r += 1) dof[r] = unknownOf[3 * (r < 3 ? m.start : m.end) + (r % 3)] ?? -1;
    stiffness(m);
    for (let r = 0; r < 6; r += 1) {
      const row = dof[r] ?? -1;
      if (row < 0) continue;
      for (let b = 0; b < 6; b += 1) {
        const column = dof[b] ?? -1;
        if (column >= 0) K.set(row, column, K.get(row, column) + (k[6 * r + b] ?? NaN));
      }
    }
    for (let index = 0; index < cases; index += 1)
      for (const line of loads[i * cases + index]?.lines ?? []) {
        if (line.qx1 !== line.qx2 || line.qy1 !== line.qy2 || line.b - line.a !== m.length)
          throw new Error('Expected even loads');
        const X = (-line.qx1 * m.length) / 2;
        const Y = (-line.qy1 * m.length) / 2;
        q[0] = q[3] = X * m.cos - Y * m.sin;
        q[1] = q[4] = X * m.sin + Y * m.cos;
        q[2] = (Y * m.length) / 6;
        q[5] = -q[2];
        for (let r = 0; r < 6; r += 1) {
          const row = dof[r] ?? -1;
          if (row >= 0) f.set(row, index, f.get(row, index) - (q[r] ?? NaN));
        }
      }
  });
  for (const load of frame.nodeLoads)
    [load.Fx_N, load.Fy_N, load.Mz_Nm].forEach((force, r) => {
      const row = unknownOf[3 * load.node + r] ?? -1;
      if (row >= 0) f.set(row, load.case, f.get(row, load.case) + force);
    });
  return new CholeskyDecomposition(K).solve(f);
}

/** k of a rigid-jointed member in global axes. */
function stiffness({ length: L, cos: c, sin: s, EA, EI }: MemberData): void {
  const ka = EA / L;
  const kb = (2 * EI) / L;
  const kt = (3 * kb) / L;
  const kv = (2 * kt) / L;
  const xx = c * c * ka + s * s * kv;
  const xy = c * s * (ka - kv);
  const yy = s * s * ka + c * c * kv;
  k.set([xx, xy, -s * kt, -xx, -xy, -s * kt], 0);
  k.set([xy, yy, c * kt, -xy, -yy, c * kt], 6);
  k.set([-s * kt, c * kt, 2 * kb, s * kt, -c * kt, kb], 12);
  k.set([-xx, -xy, s * kt, xx, xy, s * kt], 18);
  k.set([-xy, -yy, -c * kt, xy, yy, -c * kt], 24);
  k.set([-s * kt, c * kt, kb, s * kt, -c * kt, 2 * kb], 30);
}
