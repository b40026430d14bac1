import type { Frame } from '@/lib/model/frame';
import type { ResultState } from '@/lib/results/result';
import { bounds } from './bounds';
import type { FlatLines } from './flat-lines';
import { momentOfMovement } from './moved-loads';
import { typedTotals, type TypedTotals } from './typed-totals';

/**
 * Global equilibrium of one case: loads as typed and reactions, in x, y and about the middle of the frame,
 * relative to the sum of their sizes; a case without load or reaction counts 0. Certificate item 1.
 *
 * @param floor sizes below this are the rounding of bigger forces that cancel (a settlement of a determinate frame), N
 */
export function globalEquilibrium(frame: Frame, loadCase: number, reactions: Float64Array, floor: number): number {
  const middle = middleOf(frame);
  return balance(frame, middle, typedTotals(frame, loadCase, middle.x0, middle.y0), reactions, 0, floor);
}

/** Where moments are taken about, and the size of the frame. */
interface Middle {
  readonly x0: number;
  readonly y0: number;
  readonly size: number;
}

function middleOf(frame: Frame): Middle {
  const { left, right, low, high, size } = bounds(frame);
  return { x0: (left + right) / 2, y0: (low + high) / 2, size };
}

const totals = new WeakMap<Frame, readonly TypedTotals[]>();

/**
 * The same of any state: its factors × the loads as typed, the forces that stand for its imperfections, and its reactions.
 * Second order: about where loads and supports have moved to (moved-loads.ts).
 */
export function stateEquilibrium(frame: Frame, state: ResultState, floor: number, lines?: FlatLines): number {
  const middle = middleOf(frame);
  let known = totals.get(frame);
  if (!known) totals.set(frame, (known = frame.cases.map((_, c) => typedTotals(frame, c, middle.x0, middle.y0))));
  const sum = { Fx: 0, Fy: 0, Mz: 0, sizeF: 0, sizeM: 0 };
  for (let c = 0; c < known.length; c++) {
    const k = state.factors[c]!;
    if (k === 0) continue;
    const total = known[c]!;
    sum.Fx += k * total.Fx;
    sum.Fy += k * total.Fy;
    sum.Mz += k * total.Mz;
    sum.sizeF += Math.abs(k) * total.sizeF;
    sum.sizeM += Math.abs(k) * total.sizeM;
  }
  const notional = state.method?.notional;
  if (notional)
    for (let i = 0; i < frame.nodes.length; i++) {
      const { x_m, y_m } = frame.nodes[i]!;
      const Fx = notional[2 * i]! / state.method!.loadScale;
      const Fy = notional[2 * i + 1]! / state.method!.loadScale;
      sum.Fx += Fx;
      sum.Fy += Fy;
      sum.Mz += (x_m - middle.x0) * Fy - (y_m - middle.y0) * Fx;
      sum.sizeF += Math.abs(Fx) + Math.abs(Fy);
    }
  const moved = state.order === 2 ? momentOfMovement(frame, state, lines) : 0;
  return balance(frame, middle, sum, state.reactions, moved, floor);
}

function balance(
  frame: Frame,
  { x0, y0, size }: Middle,
  loads: TypedTotals,
  reactions: Float64Array,
  moved: number,
  floor: number,
): number {
  let { Fx, Fy, Mz, sizeF, sizeM } = loads;
  for (let i = 0; i < frame.supports.length; i++) {
    const node = frame.nodes[frame.supports[i]!.node]!;
    const rx = reactions[3 * i]!;
    const ry = reactions[3 * i + 1]!;
    const rm = reactions[3 * i + 2]!;
    const lever = (node.x_m - x0) * ry - (node.y_m - y0) * rx;
    Fx += rx;
    Fy += ry;
    Mz += rm + lever;
    sizeF += Math.hypot(rx, ry);
    sizeM += Math.abs((node.x_m - x0) * ry) + Math.abs((node.y_m - y0) * rx) + Math.abs(rm);
  }
  // moments without any lever of their own are judged against the forces over the frame's size, and the other way round
  const scale = Math.max(sizeF, sizeM / size, floor);
  if (!(scale > 0)) return scale === 0 ? 0 : NaN;
  return Math.max(Math.abs(Fx), Math.abs(Fy), Math.abs(Mz + moved) / size) / scale;
}
