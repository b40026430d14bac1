import type { Frame } from '@/lib/model/frame';
import { memberData } from './member-data';
import { memberLoads, type LocalLoads } from './member-loads';

/** Loads of a frame, ready to be taken case by case: in one row of numbers where they are of the common kind. */
export interface PackedLoads {
  readonly members: number;
  /**
   * By member: how many even loads it has over its whole length, its length, cos and sin; then those loads, as case, q_x, q_y along
   * local axes (rigid-jointed members whose nodes have global axes). Then the loads on nodes: node, case, forces and moment in
   * the node's axes.
   */
  readonly stream: Float64Array;
  /** Where in the stream the loads on nodes begin. */
  readonly nodesFrom: number;
  /** There are loads on nodes, other loads on members, or settlements. */
  readonly rest: boolean;
  /** All that else acts on members, by member, then case. */
  readonly others: readonly { readonly member: number; readonly loadCase: number; readonly acting: LocalLoads }[];
  /** Movements prescribed by settlements, by case: 3 a node, in node axes; whether there are any. */
  readonly prescribed: Float64Array;
  readonly settled: boolean;
}

const known = new WeakMap<Frame, PackedLoads>();

/** A frame's loads, worked out once a frame. @param angles of the nodes' axes */
export function packedLoads(frame: Frame, angles: Float64Array): PackedLoads {
  const before = known.get(frame);
  if (before) return before;
  const packed = pack(frame, angles);
  known.set(frame, packed);
  return packed;
}

function pack(frame: Frame, angles: Float64Array): PackedLoads {
  const data = memberData(frame);
  const loads = memberLoads(frame);
  const cases = frame.cases.length;
  const stream: number[] = [];
  const others: { member: number; loadCase: number; acting: LocalLoads }[] = [];
  data.forEach((m, i) => {
    const rigid = m.startSpring === Infinity && m.endSpring === Infinity && angles[m.start] === 0 && angles[m.end] === 0;
    const head = stream.push(0, m.length, m.cos, m.sin) - 4;
    for (let c = 0; c < cases; c++) {
      const acting = loads[i * cases + c];
      if (!acting) continue;
      if (!rigid || !isEven(acting, m.length)) {
        others.push({ member: i, loadCase: c, acting });
        continue;
      }
      stream[head] = stream[head]! + 1;
      stream.push(
        c,
        acting.lines.reduce((sum, line) => sum + line.qx1, 0),
        acting.lines.reduce((sum, line) => sum + line.qy1, 0),
      );
    }
  });
  const nodesFrom = stream.length;
  for (const load of frame.nodeLoads) {
    const ca = Math.cos(angles[load.node]!);
    const sa = Math.sin(angles[load.node]!);
    stream.push(load.node, load.case, load.Fx_N * ca + load.Fy_N * sa, load.Fy_N * ca - load.Fx_N * sa, load.Mz_Nm);
  }
  const rest = frame.nodeLoads.length + others.length + frame.settlements.length > 0;
  return { members: data.length, stream: Float64Array.from(stream), nodesFrom, rest, others, ...prescribedBy(frame) };
}

function isEven(acting: LocalLoads, length: number): boolean {
  return (
    acting.places.length === 0 &&
    acting.strain === 0 &&
    acting.curvature === 0 &&
    acting.lines.every((line) => line.a === 0 && line.b === length && line.qx1 === line.qx2 && line.qy1 === line.qy2)
  );
}

function prescribedBy(frame: Frame): Pick<PackedLoads, 'prescribed' | 'settled'> {
  const nodes = frame.nodes.length;
  const prescribed = new Float64Array(frame.cases.length * nodes * 3);
  for (const s of frame.settlements) {
    const o = (s.case * nodes + s.node) * 3;
    prescribed[o] = prescribed[o]! + (s.dx_m ?? 0);
    prescribed[o + 1] = prescribed[o + 1]! + (s.dy_m ?? 0);
    prescribed[o + 2] = prescribed[o + 2]! + (s.rz_rad ?? 0);
  }
  return { prescribed, settled: frame.settlements.length > 0 };
}
