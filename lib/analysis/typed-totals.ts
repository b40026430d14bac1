import type { Frame, MemberLoad } from '@/lib/model/frame';
import { gravity } from './member-data';

/** Sums of the loads of one case as typed, about a point, with the sums of their sizes. N, N·m. */
export interface TypedTotals {
  readonly Fx: number;
  readonly Fy: number;
  readonly Mz: number;
  readonly sizeF: number;
  readonly sizeM: number;
}

/**
 * Adds up the loads of one case as they were typed: straight from the sheet's rows in global axes, with none of the
 * analysis's own resolution, so that it can stand against the reactions (engine, Certificate 1).
 */
export function typedTotals(frame: Frame, loadCase: number, x0: number, y0: number): TypedTotals {
  let Fx = 0;
  let Fy = 0;
  let Mz = 0;
  let sizeF = 0;
  let sizeM = 0;
  const take = (fx: number, fy: number, x: number, y: number): void => {
    Fx += fx;
    Fy += fy;
    Mz += (x - x0) * fy - (y - y0) * fx;
    sizeF += Math.hypot(fx, fy);
    sizeM += Math.abs((x - x0) * fy) + Math.abs((y - y0) * fx);
  };
  const turn = (M: number): void => {
    Mz += M;
    sizeM += Math.abs(M);
  };
  for (const load of frame.nodeLoads) {
    if (load.case !== loadCase) continue;
    const node = frame.nodes[load.node]!;
    take(load.Fx_N, load.Fy_N, node.x_m, node.y_m);
    turn(load.Mz_Nm);
  }
  const factor = frame.cases[loadCase]!.selfWeight;
  if (factor !== 0)
    for (const member of frame.members) {
      const a = frame.nodes[member.start]!;
      const b = frame.nodes[member.end]!;
      const mass =
        Math.hypot(b.x_m - a.x_m, b.y_m - a.y_m) *
        frame.sections[member.section]!.properties.A_m2 *
        (frame.materials[member.material]!.density_kg_m3 ?? NaN);
      take(0, -factor * gravity * mass, (a.x_m + b.x_m) / 2, (a.y_m + b.y_m) / 2);
    }
  for (const load of frame.memberLoads) if (load.case === loadCase) takeMemberLoad(frame, load, take, turn);
  return { Fx, Fy, Mz, sizeF, sizeM };
}

function takeMemberLoad(
  frame: Frame,
  load: MemberLoad,
  take: (fx: number, fy: number, x: number, y: number) => void,
  turn: (M: number) => void,
): void {
  if (load.kind === 'temperature') return;
  if (load.kind === 'moment') return turn(load.M_Nm);
  const member = frame.members[load.member]!;
  const a = frame.nodes[member.start]!;
  const b = frame.nodes[member.end]!;
  const L = Math.hypot(b.x_m - a.x_m, b.y_m - a.y_m);
  const ex = (b.x_m - a.x_m) / L;
  const ey = (b.y_m - a.y_m) / L;
  const global = load.axes === 'global' || (load.kind === 'distributed' && load.axes === 'projected');
  const dx = global ? (load.direction === 'x' ? 1 : 0) : load.direction === 'x' ? ex : -ey;
  const dy = global ? (load.direction === 'x' ? 0 : 1) : load.direction === 'x' ? ey : ex;
  if (load.kind === 'point') return take(load.P_N * dx, load.P_N * dy, a.x_m + load.at_m * ex, a.y_m + load.at_m * ey);
  const length = load.to_m - load.from_m;
  if (!(length > 0)) return;
  const share = load.axes === 'projected' ? Math.abs(load.direction === 'y' ? ex : ey) : 1;
  // a trapezium as two triangles, each acting at its third point
  for (const [q, third] of [
    [load.q1_N_m, 1 / 3],
    [load.q2_N_m, 2 / 3],
  ] as const) {
    const resultant = (q * share * length) / 2;
    const s = load.from_m + third * length;
    take(resultant * dx, resultant * dy, a.x_m + s * ex, a.y_m + s * ey);
  }
}
