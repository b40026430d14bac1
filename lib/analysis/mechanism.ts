import type { Frame, Restraint } from '@/lib/model/frame';
import type { Failure } from '@/lib/results/result';
import { bounds } from './bounds';
import { list } from './connected';
import { emptyMemberStiffness, memberStiffness } from './assemble';
import { endForces, toLocal } from './load-vectors';
import { memberData } from './member-data';
import type { Topology } from './topology';

/**
 * The movement that costs nothing, from the factors of the rows before the one that failed: K z = 0 with z = 1
 * at that row and 0 after it (back substitution).
 *
 * @param row as `factor` returned it   @returns 3 a position
 */
export function nullVector(K: Float64Array, t: Topology, inner: Float64Array, row: number): Float64Array {
  const z = new Float64Array(3 * t.size);
  const last = Math.floor(row / 3);
  const direction = row % 3;
  z[row] = 1;
  const q = 6 * last;
  if (direction === 1) z[row - 1] = -inner[q + 1]!;
  if (direction === 2) {
    z[row - 1] = -inner[q + 4]!;
    z[row - 2] = -inner[q + 2]! - inner[q + 1]! * z[row - 1]!;
  }
  for (let i = last - 1; i >= 0; i--)
    for (let b = t.rowStart[i]! + 1; b < t.rowStart[i + 1]!; b++) {
      const j = t.columns[b]!;
      if (j > last) break;
      for (let r = 0; r < 3; r++) {
        const u = 9 * b + 3 * r;
        z[3 * i + r] = z[3 * i + r]! - (K[u]! * z[3 * j]! + K[u + 1]! * z[3 * j + 1]! + K[u + 2]! * z[3 * j + 2]!);
      }
    }
  return z;
}

/** A movement by node in global axes: x, y, rotation, 3 a node. */
function byNode(frame: Frame, t: Topology, angles: Float64Array, z: Float64Array): Float64Array {
  const moves = new Float64Array(3 * frame.nodes.length);
  for (let p = 0; p < t.size; p++) {
    const node = t.nodeAt[p]!;
    const ca = Math.cos(angles[node]!);
    const sa = Math.sin(angles[node]!);
    const at = (r: number): number => (t.free[3 * node + r] ? z[3 * p + r]! : 0);
    moves[3 * node] = at(0) * ca - at(1) * sa;
    moves[3 * node + 1] = at(0) * sa + at(1) * ca;
    moves[3 * node + 2] = at(2);
  }
  return moves;
}

/** Strain energy below this share of what a member would take if its ends moved alone is the rounding of none. */
const unstrained = 1e-11;

/** Whether a movement bends or stretches some member: energy taken member by member, where no other's stiffness drowns it. */
export function strains(frame: Frame, t: Topology, angles: Float64Array, z: Float64Array): boolean {
  const moved = new Float64Array(3 * frame.nodes.length);
  let most = 0;
  for (let p = 0; p < t.size; p++)
    for (let r = 0; r < 3; r++) {
      const node = t.nodeAt[p]!;
      moved[3 * node + r] = t.free[3 * node + r] ? z[3 * p + r]! : 0;
      most = Math.max(most, Math.abs(moved[3 * node + r]!));
    }
  const k = emptyMemberStiffness();
  const u = new Float64Array(6);
  const q = new Float64Array(6);
  return memberData(frame).some((m) => {
    memberStiffness(m, k);
    toLocal(m, angles, moved, 3 * m.start, 3 * m.end, u);
    // a pinned end turns for nothing; what hardly moves beside the rest is rounding itself
    if (k.S11 === 0) u[2] = 0;
    if (k.S22 === 0) u[5] = 0;
    if (u.every((value) => Math.abs(value) <= 1e-6 * most)) return false;
    endForces(k, u, q);
    // the size of what cancels where a member only rides along: as if its ends moved that far apart
    const apart = u[0]! ** 2 + u[1]! ** 2 + u[3]! ** 2 + u[4]! ** 2;
    const each = (k.ka + k.kvv) * apart + k.S11 * u[2]! ** 2 + k.S22 * u[5]! ** 2;
    const energy = u.reduce((sum, value, i) => sum + value * q[i]!, 0);
    return energy > unstrained * each;
  });
}

/** What moves most in a movement, and the words for it: which node, which way, and what would hold it. */
export interface Movement {
  readonly node: string;
  /** "slide horizontally" … */
  readonly how: string;
  readonly remedy: string;
}

export function describeMovement(frame: Frame, t: Topology, angles: Float64Array, z: Float64Array): Movement {
  const moves = byNode(frame, t, angles, z);
  const { size } = bounds(frame);
  const slide = (i: number): number => Math.hypot(moves[3 * i]!, moves[3 * i + 1]!);
  const turn = (i: number): number => Math.abs(moves[3 * i + 2]!) * size;
  let mostSlide = 0;
  let mostTurn = 0;
  for (let i = 0; i < frame.nodes.length; i++) {
    mostSlide = Math.max(mostSlide, slide(i));
    mostTurn = Math.max(mostTurn, turn(i));
  }
  if (mostSlide <= 1e-6 * mostTurn) {
    const i = frame.nodes.findIndex((_, k) => turn(k) >= mostTurn * (1 - 1e-6));
    const node = frame.nodes[i]!.id;
    const pins = pinsAt(frame, [i]);
    return { node, how: 'turn', remedy: remedy(`Hold ${node} against turning (rz)`, pins) };
  }
  const movers = frame.nodes.map((_, k) => k).filter((k) => slide(k) >= mostSlide * (1 - 1e-6));
  const i = movers[0]!;
  const node = frame.nodes[i]!.id;
  const dx = moves[3 * i]!;
  const dy = moves[3 * i + 1]!;
  const { how, hold } = wayOf(frame, i, dx, dy);
  const centre = rigidTurn(frame, moves, size);
  const together =
    movers.length > 1
      ? ` together with ${list(
          'node',
          movers.slice(1).map((k) => frame.nodes[k]!.id),
        )}`
      : '';
  const pins = pinsAt(frame, neighbourhood(frame, i));
  if (centre !== null) return { node, how: `${how} as the whole frame turns about ${centre}`, remedy: remedy(hold, pins) };
  return { node, how: how + together, remedy: remedy(hold, pins) };
}

/** The failure for a frame that can move without resistance. */
export function freeToMove(frame: Frame, t: Topology, angles: Float64Array, z: Float64Array): Failure {
  const { node, how, remedy } = describeMovement(frame, t, angles, z);
  return { code: 'mechanism', node, message: `Node ${node} can freely ${how}, so the frame has no solution. ${remedy}.` };
}

function remedy(hold: string, pins: readonly string[]): string {
  if (pins.length === 0) return hold;
  const more = pins.length > 3 ? ' …' : '';
  return `${hold}, or make a pinned joint next to it rigid (${pins.slice(0, 3).join(', ')}${more}), or brace it`;
}

function wayOf(frame: Frame, i: number, dx: number, dy: number): { how: string; hold: string } {
  const node = frame.nodes[i]!.id;
  const support = frame.supports.find((s) => s.node === i);
  const degrees = (Math.atan2(dy, dx) * 180) / Math.PI;
  const line = ((degrees % 180) + 180) % 180;
  if (support && support.angle_rad !== 0) {
    const own = (((degrees - (support.angle_rad * 180) / Math.PI) % 180) + 180) % 180;
    const axis = own < 1 || own > 179 ? 'ux' : Math.abs(own - 90) < 1 ? 'uy' : null;
    const turned = `${number((support.angle_rad * 180) / Math.PI)}°`;
    if (axis && loose(support[axis]))
      return { how: `slide along ${axis} of its support turned ${turned}`, hold: `Hold ${node} in ${axis} of that support` };
  }
  if (line < 1 || line > 179) return { how: 'slide horizontally', hold: `Hold ${node} in x` };
  if (Math.abs(line - 90) < 1) return { how: 'move vertically', hold: `Hold ${node} in y` };
  const axis = Math.abs(dx) >= Math.abs(dy) ? 'x' : 'y';
  return { how: `move along a line at ${number(line)}° to the horizontal`, hold: `Hold ${node} in ${axis}` };
}

function loose(restraint: Restraint): boolean {
  return restraint === 'free' || restraint === 0;
}

function number(value: number): string {
  return String(Math.round(value * 10) / 10);
}

function neighbourhood(frame: Frame, i: number): number[] {
  const near = new Set([i]);
  for (const member of frame.members) {
    if (member.start === i) near.add(member.end);
    if (member.end === i) near.add(member.start);
  }
  return [...near];
}

/** Pinned ends at these nodes: "AB at B". */
function pinsAt(frame: Frame, nodes: readonly number[]): string[] {
  const near = new Set(nodes);
  const data = memberData(frame);
  return frame.members.flatMap((member, k) => {
    const at = (node: number, spring: number): string[] =>
      near.has(node) && spring === 0 ? [`${member.id} at ${frame.nodes[node]!.id}`] : [];
    return [...at(member.start, data[k]!.startSpring), ...at(member.end, data[k]!.endSpring)];
  });
}

/** Name of the point about which all nodes turn as one rigid body, else null. */
function rigidTurn(frame: Frame, moves: Float64Array, size: number): string | null {
  // least-squares-free: the two nodes furthest apart along the frame fix the motion, the others must agree
  const a = 0;
  let b = 0;
  const apart = (k: number): number =>
    Math.hypot(frame.nodes[k]!.x_m - frame.nodes[a]!.x_m, frame.nodes[k]!.y_m - frame.nodes[a]!.y_m);
  frame.nodes.forEach((_, k) => {
    if (apart(k) > apart(b)) b = k;
  });
  const L = apart(b);
  if (!(L > 0)) return null;
  const ex = (frame.nodes[b]!.x_m - frame.nodes[a]!.x_m) / L;
  const ey = (frame.nodes[b]!.y_m - frame.nodes[a]!.y_m) / L;
  const turn = (-(moves[3 * b]! - moves[3 * a]!) * ey + (moves[3 * b + 1]! - moves[3 * a + 1]!) * ex) / L;
  if (Math.abs(turn) * size <= 1e-6) return null;
  let most = 0;
  let off = 0;
  let still = -1;
  frame.nodes.forEach((node, k) => {
    const x = moves[3 * a]! - turn * (node.y_m - frame.nodes[a]!.y_m);
    const y = moves[3 * a + 1]! + turn * (node.x_m - frame.nodes[a]!.x_m);
    off = Math.max(off, Math.hypot(moves[3 * k]! - x, moves[3 * k + 1]! - y));
    most = Math.max(most, Math.hypot(x, y));
  });
  if (off > 1e-6 * most) return null;
  frame.nodes.forEach((_, k) => {
    if (still < 0 && Math.hypot(moves[3 * k]!, moves[3 * k + 1]!) <= 1e-6 * most) still = k;
  });
  return still >= 0 ? `node ${frame.nodes[still]!.id}` : 'a point outside its nodes';
}
