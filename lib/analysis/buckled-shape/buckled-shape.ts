import type { Frame } from '@/lib/model/frame';
import type { ResultState } from '@/lib/results/result';
import { assemble, addMember, addSupports, diagonalOf, emptyMemberStiffness, nodeAngles } from '../assemble';
import { axialForces } from '../critical/axial-pieces';
import { bucklingMember } from '../critical/buckling-member';
import { factor } from '../factor';
import { memberDataFor } from '../member-data';
import { solve } from '../solve';
import { firstOrderOf } from '../first-order-of';
import { buildTopology } from '../topology';
import { splitFrame, type SplitFrame } from './split-frame';

/** How the frame would move when it buckles under α_cr times the loads of a state. */
export interface BuckledShape {
  /** α_cr, as the state carries it. */
  readonly factor: number;
  /**
   * By member, in the frame's order: points along it, 4 numbers each: x, y of the unmoved point (global, m), then its
   * movement in x and y (global), scaled so that the largest of the frame is 1.
   */
  readonly members: readonly Float64Array[];
  /** 'sway': nodes move with it; 'member': a member buckles between nodes that hardly move. */
  readonly kind: 'sway' | 'member';
}

const piecesOfMember = 16;
/** Share of the largest movement up to which nodes hardly move. */
const hardly = 0.05;

/**
 * The buckled shape of a state: K(α_cr) z = 0, by inverse iteration with K a hair below α_cr, every member in pieces so that
 * one that buckles between its nodes is found too. README §4. Of several shapes at one load, one in which they all share.
 *
 * @returns null where the state has no critical load factor
 */
export function buckledShape(frame: Frame, state: ResultState): BuckledShape | null {
  const alpha = state.criticalLoadFactor;
  const first = alpha === null ? null : firstOrderOf(frame, state);
  if (alpha === null || !first) return null;
  const slack = first.method?.slack ?? [];
  const split = splitFrame(frame, slack, axialForces(frame, first), piecesOfMember);
  return shapeOf(frame, split, mode(split, state.method?.shearDeformation ?? false, alpha), alpha);
}

/** Movements of the split frame's nodes, dx, dy, global, 2 a node. */
function mode(split: SplitFrame, shearDeformation: boolean, alpha: number): Float64Array {
  const { frame, pieces } = split;
  const t = buildTopology(frame);
  const angles = nodeAngles(frame);
  const data = memberDataFor(frame, { shearDeformation, stiffness: null });
  const K = new Float64Array(9 * t.blocks);
  assemble(K, t, frame, data, angles);
  const diagonal = diagonalOf(K, t, new Float64Array(3 * t.size));
  const k = emptyMemberStiffness();
  const count = { negative: 0, logSize: 0, size: 1 };
  K.fill(0);
  for (let i = 0; i < data.length; i++) {
    bucklingMember(data[i]!, [pieces[i]!], alpha * (1 - 1e-7), k, count);
    addMember(K, t, data[i]!, k, angles);
  }
  addSupports(K, t, frame);
  const inner = new Float64Array(6 * t.size);
  factor(K, t, diagonal, inner, new Float64Array(3 * t.size), 0);
  // pushed to the right and up, unevenly, so that no shape is left unasked
  const z = Float64Array.from({ length: 3 * t.size }, (_, i) => [1, 0.6, 0.3][i % 3]! + 0.2 * Math.sin(1.7 * i));
  for (let pass = 0; pass < 6; pass++) {
    let largest = 0;
    for (let i = 0; i < z.length; i++) {
      z[i] = t.free[3 * t.nodeAt[Math.floor(i / 3)]! + (i % 3)] ? diagonal[i]! * z[i]! : 0;
    }
    solve(K, t, inner, z, 1);
    for (const value of z) largest = Math.max(largest, Math.abs(value));
    for (let i = 0; i < z.length; i++) z[i] = z[i]! / largest;
  }
  const moved = new Float64Array(2 * frame.nodes.length);
  for (let p = 0; p < t.size; p++) {
    const node = t.nodeAt[p]!;
    const c = Math.cos(angles[node]!);
    const s = Math.sin(angles[node]!);
    moved[2 * node] = z[3 * p]! * c - z[3 * p + 1]! * s;
    moved[2 * node + 1] = z[3 * p]! * s + z[3 * p + 1]! * c;
  }
  return moved;
}

/** Scaled to 1 and turned so that the largest movement is to the right, or up where it is vertical. */
function shapeOf(frame: Frame, split: SplitFrame, moved: Float64Array, factor: number): BuckledShape {
  let most = 0;
  let at = 0;
  let nodes = 0;
  for (let i = 0; i < moved.length; i += 2) {
    const size = Math.hypot(moved[i]!, moved[i + 1]!);
    if (i < 2 * frame.nodes.length) nodes = Math.max(nodes, size);
    if (size > most * (1 + 1e-9)) [most, at] = [size, i];
  }
  const [dx, dy] = [moved[at]!, moved[at + 1]!];
  const scale = ((Math.abs(dx) >= 0.01 * most ? dx : dy) < 0 ? -1 : 1) / most;
  const members = split.nodesAlong.map((along) =>
    Float64Array.from(
      along.flatMap((node) => {
        const { x_m, y_m } = split.frame.nodes[node]!;
        return [x_m, y_m, scale * moved[2 * node]! + 0, scale * moved[2 * node + 1]! + 0];
      }),
    ),
  );
  return { factor, members, kind: nodes > hardly * most ? 'sway' : 'member' };
}
