import type { CaseKind, Frame } from '@/lib/model/frame';
import { memberData, gravity } from '../member-data';

/** Kinds of load that are no gravity, though some act vertically. */
const notGravity: ReadonlySet<CaseKind> = new Set<CaseKind>(['wind', 'seismic', 'temperature']);

/**
 * Gravity load that each case introduces at each node, downwards positive, N: node loads, and members' loads and
 * self-weight shared between the member's ends by the lever rule. Cases of kind wind, seismic and temperature give none.
 * @returns by case, by node
 */
export function gravityByNode(frame: Frame): readonly Float64Array[] {
  const data = memberData(frame);
  return frame.cases.map((loadCase, c) => {
    const down = new Float64Array(frame.nodes.length);
    if (notGravity.has(loadCase.kind)) return down;
    const put = (member: number, Fy: number, at: number): void => {
      const m = data[member]!;
      const share = at / m.length;
      down[m.start] = down[m.start]! - Fy * (1 - share);
      down[m.end] = down[m.end]! - Fy * share;
    };
    for (const load of frame.nodeLoads) if (load.case === c) down[load.node] = down[load.node]! - load.Fy_N;
    if (loadCase.selfWeight !== 0)
      frame.members.forEach((member, i) => {
        const { density_kg_m3 } = frame.materials[member.material]!;
        const A = frame.sections[member.section]!.properties.A_m2;
        const W = loadCase.selfWeight * (density_kg_m3 ?? NaN) * A * gravity * data[i]!.length;
        put(i, -W, data[i]!.length / 2);
      });
    for (const load of frame.memberLoads) {
      if (load.case !== c || load.kind === 'temperature' || load.kind === 'moment') continue;
      const { cos, sin } = data[load.member]!;
      const vertical = load.axes === 'local' ? (load.direction === 'x' ? sin : cos) : load.direction === 'y' ? 1 : 0;
      if (load.kind === 'point') {
        put(load.member, load.P_N * vertical, load.at_m);
        continue;
      }
      const length = (load.to_m - load.from_m) * (load.axes === 'projected' ? Math.abs(cos) : 1);
      const span = load.to_m - load.from_m;
      // a trapezium as two triangles
      put(load.member, (load.q1_N_m * vertical * length) / 2, load.from_m + span / 3);
      put(load.member, (load.q2_N_m * vertical * length) / 2, load.from_m + (2 * span) / 3);
    }
    return down;
  });
}
