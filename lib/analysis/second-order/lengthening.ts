import type { MemberData } from '../member-data';
import { solve } from '../solve';
import type { Work } from './equilibrium-pass';
import { clampedTurns, type Turns } from './joint-turns';
import { emptyPiece, type Piece } from './piece';

/** What the lengthening of members as they turn would change, to first order, as shares of what there is. */
export interface LengtheningEstimate {
  /** Of a member's outermost strain, the most of all members. */
  readonly forces: number;
  /** Of the largest movement of a node. */
  readonly movements: number;
}

export const noLengthening: LengtheningEstimate = { forces: 0, movements: 0 };

/** A member strained less than this share of the frame's largest has as much to spare: it is measured against that share. */
export const leastShare = 0.5;
/** Forces below this share of stiffness × movement are rounding. */
const rounding = 1e-6;

const turned = new Float64Array(6);
const turns: Turns = { start: 0, end: 0 };
const bare = emptyPiece();
let room = 16;
let pulls = new Float64Array(room);
let strains = new Float64Array(room);

/**
 * What second order here leaves out: a member that turns is longer than its ends moved apart along it. Nodes that are free to
 * follow take it up; where they are not, as in flat arches, it changes forces and stiffness. It is an axial strain: one more
 * right-hand side with the stiffness as factored says which states need a closer look (lengthened-state.ts). README §8.
 *
 * @param all movements, 3 a node, node axes   @param forces X, Y, m at members' ends under them, local axes
 */
export function lengtheningEstimate(work: Work, all: Float64Array, forces: Float64Array, handled: number): LengtheningEstimate {
  const { t, angles, data, slack, space } = work.input;
  const { d } = space;
  const largest = pullNodes(work, forces);
  solve(space.K, t, space.inner, d, 1);
  let share = 0;
  for (let i = 0; i < data.length; i++) {
    if (slack?.[i]) continue;
    const m = data[i]!;
    const piece = space.pieces[i]!;
    fromUnknowns(d, t.positionOf[m.start]!, angles[m.start]!, m, 0);
    fromUnknowns(d, t.positionOf[m.end]!, angles[m.end]!, m, 3);
    const change = Math.abs(piece.ka * (turned[3]! - turned[0]!) + pulls[i]!) / m.EA + (momentOf(m, piece) * outermost(m)) / m.EI;
    share = Math.max(share, change / Math.max(strains[i]!, leastShare * largest, (rounding * handled) / m.EA));
  }
  return { forces: share, movements: furtherOf(work, all) };
}

/** What each member's lengthening asks of its nodes into `d`. @returns the largest outermost strain of all members */
function pullNodes({ input, ties }: Work, forces: Float64Array): number {
  const { t, angles, data, slack, space } = input;
  const { d, pieces, loadings, chords, turns: own } = space;
  if (data.length > room) {
    room = 2 * data.length;
    pulls = new Float64Array(room);
    strains = new Float64Array(room);
  }
  d.fill(0);
  let largest = 0;
  for (let i = 0; i < data.length; i++) {
    if (slack?.[i]) continue;
    const m = data[i]!;
    const piece = pieces[i]!;
    const o = 6 * i;
    const chord = chords[i]!;
    pulls[i] = m.EA * (ties?.[i] ? meanLengthening(chord, chord, chord) : meanLengthening(chord, own[2 * i]!, own[2 * i + 1]!));
    // hogging of the clamped member under what acts along it, and what is left of it between ends that turn
    const clamped = 0.5 * (piece.m2 - piece.m1) + m.EI * loadings[i]!.curvature;
    const between = Math.abs(0.5 * (forces[o + 5]! - forces[o + 2]!) - 1.5 * clamped);
    const N = Math.max(Math.abs(forces[o]!), Math.abs(forces[o + 3]!));
    const M = Math.max(Math.abs(forces[o + 2]!), Math.abs(forces[o + 5]!), between);
    strains[i] = N / m.EA + (M * outermost(m)) / m.EI;
    largest = Math.max(largest, strains[i]!);
    pull(d, t.positionOf[m.start]!, angles[m.start]!, m, pulls[i]!);
    pull(d, t.positionOf[m.end]!, angles[m.end]!, m, -pulls[i]!);
  }
  for (let p = 0; p < t.size; p++) for (let r = 0; r < 3; r++) if (!t.free[3 * t.nodeAt[p]! + r]) d[3 * p + r] = 0;
  return largest;
}

/**
 * By how much of its length a member is longer than its ends moved apart: φ²/2 of a chord turned by φ, and a²/10 where its ends
 * turn another a the same way, bent into an S (½∫v′² dx/L of a cubic). What it bows between its ends is left out, as everywhere:
 * a beam's sag draws columns together by tenths of a millimetre. A tie (its ends' turns its chord's) hangs straight: what its
 * weight does to it is taken out as it is fitted.
 */
export function meanLengthening(chord: number, start: number, end: number): number {
  const a = 0.5 * (start + end) - chord;
  return 0.5 * chord * chord + 0.1 * a * a;
}

/** Half the depth, m; where it is not known an I section's, 1.2 √(I/A). */
export function outermost({ EA, EI, depth }: MemberData): number {
  return depth > 0 ? 0.5 * depth : 1.2 * Math.sqrt(EI / EA);
}

/** The larger end moment of a member whose ends move as `turned` says, without loads. */
function momentOf(m: MemberData, piece: Piece): number {
  const [k1, k2] = [m.startSpring, m.endSpring];
  if (k1 === 0 && k2 === 0) return 0;
  if (k1 !== Infinity || k2 !== Infinity) {
    Object.assign(bare, piece);
    bare.m1 = bare.m2 = 0;
    clampedTurns(m, bare, turned, turns);
    turned[2] = turns.start;
    turned[5] = turns.end;
  }
  const v = turned[1]! - turned[4]!;
  const start = k1 === 0 ? 0 : piece.kv1 * v + piece.S11 * turned[2]! + piece.S12 * turned[5]!;
  const end = k2 === 0 ? 0 : piece.kv2 * v + piece.S12 * turned[2]! + piece.S22 * turned[5]!;
  return Math.max(Math.abs(start), Math.abs(end));
}

/** By how much `d` adds to the length of a node's movement, the most, against the largest movement. */
function furtherOf({ input: { t, space } }: Work, all: Float64Array): number {
  let furthest = 0;
  let further = 0;
  for (let o = 0; o < all.length; o += 3) {
    const [x, y] = [all[o]!, all[o + 1]!];
    const before = Math.sqrt(x * x + y * y);
    furthest = Math.max(furthest, before);
    const p = t.positionOf[o / 3]!;
    if (p < 0) continue;
    const [dx, dy] = [x + space.d[3 * p]!, y + space.d[3 * p + 1]!];
    further = Math.max(further, Math.abs(Math.sqrt(dx * dx + dy * dy) - before));
  }
  return furthest > 0 ? further / furthest : 0;
}

/** Movements of one end that are unknowns, in local axes, into `turned`. */
function fromUnknowns(d: Float64Array, p: number, angle: number, m: MemberData, to: number): void {
  let x = p < 0 ? 0 : d[3 * p]!;
  let y = p < 0 ? 0 : d[3 * p + 1]!;
  if (angle !== 0) {
    const ca = Math.cos(angle);
    const sa = Math.sin(angle);
    const across = x * sa + y * ca;
    x = x * ca - y * sa;
    y = across;
  }
  turned[to] = x * m.cos + y * m.sin;
  turned[to + 1] = y * m.cos - x * m.sin;
  turned[to + 2] = p < 0 ? 0 : d[3 * p + 2]!;
}

/** A pull along a member on its node. */
function pull(d: Float64Array, p: number, angle: number, m: MemberData, force: number): void {
  if (p < 0) return;
  let x = force * m.cos;
  let y = force * m.sin;
  if (angle !== 0) {
    const ca = Math.cos(angle);
    const sa = Math.sin(angle);
    const along = x * ca + y * sa;
    y = y * ca - x * sa;
    x = along;
  }
  d[3 * p] = d[3 * p]! + x;
  d[3 * p + 1] = d[3 * p + 1]! + y;
}
