import type { Frame } from '@/lib/model/frame';
import type { ResultState } from '@/lib/results/result';
import { nodeAngles, type MemberStiffness } from '../assemble';
import { toLocal } from '../load-vectors';
import type { MemberData } from '../member-data';
import { clampedTurns } from '../second-order/joint-turns';
import { memberChain, piecesAlong } from '../second-order/member-chain';
import { combineLoading, emptyLoading, type MemberLoading } from '../second-order/member-loading';
import { emptyPiece } from '../second-order/piece';
import { slackReactions } from '../second-order/slack-reactions';
import { nodeDisplacements } from './node-displacements';

/** A member in second-order equilibrium: stiffness and fixed-end forces under its axial force (README §8). */
export interface BentMember {
  readonly k: MemberStiffness;
  /** q_F as results have it (the analysis ÷ its load scale), X and Y along and square to the original axis. */
  readonly fixedEnd: Float64Array;
  /** Axial force at start and end with which it was bent: that of the result × the load scale. */
  readonly N: readonly [number, number];
  /** L √(|N|/EI) at the larger of them, and whether it is a compression. */
  readonly phi: number;
  /** s = S₁₁L/EI and s c = S₁₂L/EI with rigid ends: 4 and 2 without axial force. */
  readonly s: number;
  readonly sc: number;
  /** Pieces that it is condensed from. */
  readonly pieces: number;
  readonly loadScale: number;
  /** Rotations of its own ends, within its joints, as results have them. */
  readonly turns: readonly [number, number];
}

/** @param m the member's data in that state */
export function bentMember(frame: Frame, state: ResultState, member: number, m: MemberData): BentMember {
  const loadScale = state.method?.loadScale ?? 1;
  const loading = emptyLoading();
  combineLoading(frame, member, state.factors, loadScale, loading);
  const N = state.endForces[6 * member]! * loadScale;
  const buckled = { yes: false };
  const clamped = emptyPiece();
  memberChain(m, loading, N, false, clamped, buckled);
  const u = new Float64Array(6);
  toLocal(m, nodeAngles(frame), nodeDisplacements(frame, state), 3 * m.start, 3 * m.end, u);
  for (let r = 0; r < 6; r++) u[r] = u[r]! * loadScale;
  const turns = { start: 0, end: 0 };
  clampedTurns(m, clamped, u, turns);
  const { Y1, m1, Y2, m2, ...k } = released(m, loading, N);
  const held = -slackReactions(m, loading, new Float64Array(6))[0]! - m.EA * loading.strain;
  const endN = N + loading.endN;
  const most = Math.max(Math.abs(N), Math.abs(endN));
  return {
    k,
    fixedEnd: Float64Array.of(-held, Y1, m1, held + loading.endN, Y2, m2).map((value) => value / loadScale),
    N: [N, endN],
    phi: m.length * Math.sqrt(most / m.EI),
    s: (clamped.S11 * m.length) / m.EI,
    sc: (clamped.S12 * m.length) / m.EI,
    pieces: piecesAlong(m, loading, N),
    loadScale,
    turns: [turns.start / loadScale, turns.end / loadScale],
  };
}

function released(m: MemberData, loading: MemberLoading, N: number) {
  const piece = emptyPiece();
  memberChain(m, loading, N, true, piece, { yes: false });
  return piece;
}

/** Force square to the original axis at the start and end, from V square to the deflected one: Q = V (1 + N/GAv) − N ψ. */
export function squareToAxis({ N, turns }: BentMember, m: MemberData, V: readonly [number, number]): [number, number] {
  const slip = m.GAv === Infinity ? 0 : 1 / m.GAv;
  return [V[0] * (1 + N[0] * slip) - N[0] * turns[0], V[1] * (1 + N[1] * slip) - N[1] * turns[1]];
}
