import type { SolvedCases } from '../first-order-cases';
import { toLocal } from '../load-vectors';
import { solve } from '../solve';
import type { Topology } from '../topology';

const u = new Float64Array(6);
let d = new Float64Array(0);
let all = new Float64Array(0);

/**
 * First-order axial forces of forces at nodes, N by member, with all members at their full stiffness: what a second-order state
 * may begin from.
 * @param forces Fx, Fy by node, global, N   @param N overwritten
 */
export function axialForcesOf({ K, inner, angles, data }: SolvedCases, t: Topology, forces: Float64Array, N: Float64Array): void {
  if (d.length !== 3 * t.size) d = new Float64Array(3 * t.size);
  if (all.length !== 3 * t.positionOf.length) all = new Float64Array(3 * t.positionOf.length);
  d.fill(0);
  all.fill(0);
  for (let p = 0; p < t.size; p++) {
    const node = t.nodeAt[p]!;
    const Fx = forces[2 * node]!;
    const Fy = forces[2 * node + 1]!;
    const angle = angles[node]!;
    const ca = angle === 0 ? 1 : Math.cos(angle);
    const sa = angle === 0 ? 0 : Math.sin(angle);
    if (t.free[3 * node]) d[3 * p] = Fx * ca + Fy * sa;
    if (t.free[3 * node + 1]) d[3 * p + 1] = Fy * ca - Fx * sa;
  }
  solve(K, t, inner, d, 1);
  for (let p = 0; p < t.size; p++)
    for (let r = 0; r < 3; r++) if (t.free[3 * t.nodeAt[p]! + r]) all[3 * t.nodeAt[p]! + r] = d[3 * p + r]!;
  for (let i = 0; i < data.length; i++) {
    const m = data[i]!;
    toLocal(m, angles, all, 3 * m.start, 3 * m.end, u);
    N[i] = (m.EA / m.length) * (u[3]! - u[0]!);
  }
}
