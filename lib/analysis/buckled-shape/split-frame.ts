import type { Frame, FrameNode, Member } from '@/lib/model/frame';
import type { AxialForces, AxialPiece } from '../critical/axial-pieces';
import { evenPieces } from '../critical/axial-pieces';

/** A frame with nodes along its members, so that what bends between their ends is among the unknowns. */
export interface SplitFrame {
  readonly frame: Frame;
  /** By member of the split frame: its axial force at load factor 1. */
  readonly pieces: readonly AxialPiece[];
  /** By member of the whole frame: nodes of the split one along it, from start to end. */
  readonly nodesAlong: readonly (readonly number[])[];
}

/**
 * Every member in `count` pieces or more (one at least between places where its axial force jumps); slack members are left
 * out, taut tension-only members stay whole.
 */
export function splitFrame(frame: Frame, slack: readonly number[], forces: AxialForces, count: number): SplitFrame {
  const nodes: FrameNode[] = [...frame.nodes];
  const members: Member[] = [];
  const pieces: AxialPiece[] = [];
  const nodesAlong = frame.members.map((member, i) => {
    if (slack.includes(i)) return [member.start, member.end];
    const a = frame.nodes[member.start]!;
    const b = frame.nodes[member.end]!;
    const along = evenPieces(forces, i, member.tensionOnly ? 1 : count);
    const L = along.reduce((sum, piece) => sum + piece.length, 0);
    const met = [member.start];
    let at = 0;
    along.forEach((piece, k) => {
      at += piece.length;
      const last = k === along.length - 1;
      const share = at / L;
      const x_m = a.x_m + share * (b.x_m - a.x_m);
      const y_m = a.y_m + share * (b.y_m - a.y_m);
      const end = last ? member.end : nodes.push({ id: `${member.id}/${k + 1}`, x_m, y_m, place: null }) - 1;
      members.push({
        ...member,
        start: met[k]!,
        end,
        startJoint: k === 0 ? member.startJoint : 'rigid',
        endJoint: last ? member.endJoint : 'rigid',
        axialOnly: along.length === 1 && member.axialOnly,
      });
      pieces.push(piece);
      met.push(end);
    });
    return met;
  });
  return { frame: { ...frame, nodes, members, memberLoads: [], nodeLoads: [] }, pieces, nodesAlong };
}
