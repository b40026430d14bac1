import { addMemberAt, addSupports, diagonalOf, emptyMemberStiffness, memberStiffness } from '../assemble';
import { scaledNorm } from '../condition';
import { factor } from '../factor';
import type { MemberData } from '../member-data';
import { solve } from '../solve';
import { memberChain, type Buckled } from './member-chain';
import { combineLoading } from './member-loading';
import { emptyPiece } from './piece';
import { slackReactions } from './slack-reactions';
import type { SecondOrderInput } from './solve-second-order';

/** One combination at work. */
export interface Work {
  readonly input: SecondOrderInput;
  /** 2 = axial forces bend; 1 = they don't. */
  readonly order: 1 | 2;
  /** By member, whether it is tension only; null where none is. */
  readonly ties: readonly boolean[] | null;
  /** Supports are moved. */
  readonly settled: boolean;
  passes: number;
  /** Share of the loads whose axial forces are at work; movements are those of the whole loads under them. */
  share: number;
  /** ‖K̂(N)‖₁ of the last pass, K̂ scaled to a unit diagonal; null = not wanted. */
  norm: number | null;
  /** Largest axial force taken in the last pass, N; kept where there are ties. */
  largest: number;
  /** Largest axial stiffness × movement of the last pass, N. */
  handled: number;
  /** Largest turn of a member's chord in the last pass, rad, and whose (index). */
  turn: number;
  turned: number;
}

/** A pivot below this share of its own diagonal is none. */
const pivotTolerance = 1e-12;
const ends = new Float64Array(6);

/** Loads of the combination, by member and by node. */
export function prepare(input: SecondOrderInput, order: 1 | 2): Work {
  const { frame, angles, data, slack, factors, loadScale, notional, space } = input;
  const { nodeForces, all, loadings, held } = space;
  nodeForces.fill(0);
  all.fill(0);
  const push = (node: number, Fx: number, Fy: number, Mz: number): void => {
    const ca = Math.cos(angles[node]!);
    const sa = Math.sin(angles[node]!);
    const o = 3 * node;
    nodeForces[o] = nodeForces[o]! + Fx * ca + Fy * sa;
    nodeForces[o + 1] = nodeForces[o + 1]! - Fx * sa + Fy * ca;
    nodeForces[o + 2] = nodeForces[o + 2]! + Mz;
  };
  for (const load of frame.nodeLoads) {
    const k = factors[load.case]! * loadScale;
    if (k !== 0) push(load.node, k * load.Fx_N, k * load.Fy_N, k * load.Mz_Nm);
  }
  if (notional) for (let i = 0; i < frame.nodes.length; i++) push(i, notional[2 * i]!, notional[2 * i + 1]!, 0);
  let settled = false;
  for (const s of frame.settlements) {
    const k = factors[s.case]! * loadScale;
    if (k === 0) continue;
    const o = 3 * s.node;
    all[o] = all[o]! + k * (s.dx_m ?? 0);
    all[o + 1] = all[o + 1]! + k * (s.dy_m ?? 0);
    all[o + 2] = all[o + 2]! + k * (s.rz_rad ?? 0);
    settled = true;
  }
  const { made } = space;
  const again = !slack && made.factors === factors && made.data === data && made.loadScale === loadScale;
  made.factors = slack ? null : factors;
  made.data = data;
  made.loadScale = loadScale;
  for (let i = 0; i < data.length && !again; i++) {
    const loading = loadings[i]!;
    combineLoading(frame, i, factors, loadScale, loading);
    const m = data[i]!;
    held[i] = -slackReactions(m, loading, ends)[0]! - m.EA * loading.strain;
    if (slack?.[i]) {
      push(m.start, ends[1]! * m.sin - ends[0]! * m.cos, -ends[0]! * m.sin - ends[1]! * m.cos, 0);
      push(m.end, ends[4]! * m.sin - ends[3]! * m.cos, -ends[3]! * m.sin - ends[4]! * m.cos, 0);
      held[i] = 0;
    }
  }
  const ties = frame.members.some(({ tensionOnly }) => tensionOnly) ? frame.members.map(({ tensionOnly }) => tensionOnly) : null;
  return { input, order, ties, settled, passes: 0, share: 1, largest: 0, norm: null, handled: 0, turn: 0, turned: 0 };
}

/** Whether first-order stiffness alone holds the frame. */
export function standsWithoutForces({ input }: Work): boolean {
  const { frame, t, angles, data, slack, space } = input;
  const k = emptyMemberStiffness();
  space.K.fill(0);
  for (let i = 0; i < data.length; i++)
    if (!slack?.[i]) addMemberAt(space.K, t, i, data[i]!, memberStiffness(data[i]!, k), angles);
  addSupports(space.K, t, frame);
  return factored(input);
}

function factored({ t, space }: SecondOrderInput): boolean {
  diagonalOf(space.K, t, space.diagonal);
  return factor(space.K, t, space.diagonal, space.inner, space.pivots, pivotTolerance) < 0;
}

/** Mean compression below this share of the frame's largest axial force is none. */
const nothing = 1e-7;

/**
 * Axial force that bends a member, at its start; null = none does. A taut tie that is pressed on the way to the right set never
 * buckles as a strut: it will be let go. (One that is kept without force is far below `nothing`.)
 */
export function bendingForce({ input, order, ties, share, largest }: Work, i: number): number | null {
  if (order === 1) return null;
  const { N, loadings } = input.space;
  if (!ties?.[i]) return N[i]!;
  return N[i]! + 0.5 * share * loadings[i]!.endN < -nothing * largest ? null : N[i]!;
}

const piece = emptyPiece();
const buckled: Buckled = { yes: false };
const u = new Float64Array(6);

/**
 * One pass: K(N) d = f(N) for the axial forces in `space.N`; movements into `space.all`, axial forces into `space.answer`.
 * @returns false where K(N) is not positive definite, members between their nodes included
 */
export function respond(work: Work): boolean {
  const { input, settled } = work;
  const { frame, t, angles, data, slack, space } = input;
  const { K, d, N, nodeForces, all, loadings, answer, held, inner } = space;
  work.passes++;
  if (work.ties) {
    work.largest = 0;
    for (let i = 0; i < N.length; i++) work.largest = Math.max(work.largest, Math.abs(N[i]!));
  }
  K.fill(0);
  for (let p = 0; p < t.size; p++) {
    const o = 3 * t.nodeAt[p]!;
    d[3 * p] = nodeForces[o]!;
    d[3 * p + 1] = nodeForces[o + 1]!;
    d[3 * p + 2] = nodeForces[o + 2]!;
  }
  buckled.yes = false;
  for (let i = 0; i < data.length; i++) {
    if (slack?.[i]) continue;
    const m = data[i]!;
    const loading = loadings[i]!;
    memberChain(m, loading, bendingForce(work, i), true, piece, buckled, work.share);
    if (buckled.yes) return false;
    addMemberAt(K, t, i, m, piece, angles);
    let X1 = -held[i]!;
    let { Y1, m1, Y2, m2 } = piece;
    let X2 = held[i]! + loading.endN;
    if (settled) {
      localMovement(m, angles, t.free, all);
      const axial = piece.ka * (u[0]! - u[3]!);
      const v = u[1]! - u[4]!;
      const shear = piece.kvv * v + piece.kv1 * u[2]! + piece.kv2 * u[5]!;
      X1 += axial;
      X2 -= axial;
      Y1 += shear;
      Y2 -= shear;
      m1 += piece.kv1 * v + piece.S11 * u[2]! + piece.S12 * u[5]!;
      m2 += piece.kv2 * v + piece.S12 * u[2]! + piece.S22 * u[5]!;
    }
    ends[0] = X1;
    ends[1] = Y1;
    ends[2] = m1;
    ends[3] = X2;
    ends[4] = Y2;
    ends[5] = m2;
    take(d, t.positionOf[m.start]!, angles, m, 0);
    take(d, t.positionOf[m.end]!, angles, m, 3);
  }
  addSupports(K, t, frame);
  for (let p = 0; p < t.size; p++) for (let r = 0; r < 3; r++) if (!t.free[3 * t.nodeAt[p]! + r]) d[3 * p + r] = 0;
  if (work.norm !== null) {
    diagonalOf(K, t, space.diagonal);
    work.norm = scaledNorm(K, t, space.diagonal);
  }
  if (!factored(input)) return false;
  solve(K, t, inner, d, 1);
  for (let p = 0; p < t.size; p++) {
    const o = 3 * t.nodeAt[p]!;
    for (let r = 0; r < 3; r++) if (t.free[o + r]) all[o + r] = d[3 * p + r]!;
  }
  work.handled = 0;
  work.turn = 0;
  for (let i = 0; i < data.length; i++) {
    const m = data[i]!;
    if (slack?.[i]) answer[i] = 0;
    else {
      localMovement(m, angles, null, all);
      const ka = m.EA / m.length;
      answer[i] = ka * (u[3]! - u[0]!) + held[i]!;
      work.handled = Math.max(work.handled, ka * Math.abs(u[3]!), ka * Math.abs(u[0]!));
      const turn = Math.abs(u[4]! - u[1]!) / m.length;
      if (turn > work.turn) {
        work.turn = turn;
        work.turned = i;
      }
    }
  }
  return true;
}

/** Movements of a member's ends in local axes into `u`; with `held`, of what is not among the unknowns only. */
function localMovement(m: MemberData, angles: Float64Array, free: Uint8Array | null, all: Float64Array): void {
  for (let end = 0; end < 2; end++) {
    const node = end === 0 ? m.start : m.end;
    const o = 3 * node;
    let x = free?.[o] ? 0 : all[o]!;
    let y = free?.[o + 1] ? 0 : all[o + 1]!;
    const angle = angles[node]!;
    if (angle !== 0) {
      const ca = Math.cos(angle);
      const sa = Math.sin(angle);
      const turned = x * ca - y * sa;
      y = x * sa + y * ca;
      x = turned;
    }
    u[3 * end] = x * m.cos + y * m.sin;
    u[3 * end + 1] = y * m.cos - x * m.sin;
    u[3 * end + 2] = free?.[o + 2] ? 0 : all[o + 2]!;
  }
}

/** d −= Tᵀ q at one end, q in `ends` from `e`. */
function take(d: Float64Array, p: number, angles: Float64Array, m: MemberData, e: number): void {
  if (p < 0) return;
  const X = ends[e]!;
  const Y = ends[e + 1]!;
  let x = X * m.cos - Y * m.sin;
  let y = X * m.sin + Y * m.cos;
  const angle = angles[e === 0 ? m.start : m.end]!;
  if (angle !== 0) {
    const ca = Math.cos(angle);
    const sa = Math.sin(angle);
    const turned = x * ca + y * sa;
    y = y * ca - x * sa;
    x = turned;
  }
  const o = 3 * p;
  d[o] = d[o]! - x;
  d[o + 1] = d[o + 1]! - y;
  d[o + 2] = d[o + 2]! - ends[e + 2]!;
}
