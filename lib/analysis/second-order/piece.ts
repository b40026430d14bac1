import type { MemberStiffness } from '../assemble';

/**
 * A member under axial force between its ends: its stiffness across and the end forces of its loads with both ends clamped,
 * what the nodes do to it: across Y₁, Y₂ (square to the original axis) and moments m₁, m₂.
 */
export interface Piece extends MemberStiffness {
  Y1: number;
  m1: number;
  Y2: number;
  m2: number;
}

export function emptyPiece(): Piece {
  return { ka: 0, kvv: 0, kv1: 0, kv2: 0, S11: 0, S12: 0, S22: 0, Y1: 0, m1: 0, Y2: 0, m2: 0 };
}

/** What the start of a piece does at its end: v, ψ, M there of ψ, M, Q at its start and of what acts along it (p). */
export interface Transfer {
  v_psi: number;
  v_M: number;
  v_Q: number;
  v_p: number;
  psi_psi: number;
  psi_M: number;
  psi_Q: number;
  psi_p: number;
  M_psi: number;
  M_M: number;
  M_Q: number;
  M_p: number;
  Q_p: number;
}

export function emptyTransfer(): Transfer {
  return {
    v_psi: 0, v_M: 0, v_Q: 0, v_p: 0, psi_psi: 0, psi_M: 0, psi_Q: 0, psi_p: 0, M_psi: 0, M_M: 0, M_Q: 0, M_p: 0, Q_p: 0,
  }; // prettier-ignore
}

/** T followed by `next`; the result stands in T. */
export function follow(T: Transfer, next: Transfer): void {
  const { psi_psi, psi_M, psi_Q, psi_p, M_psi, M_M, M_Q, M_p, Q_p } = T;
  T.v_psi += next.v_psi * psi_psi + next.v_M * M_psi;
  T.v_M += next.v_psi * psi_M + next.v_M * M_M;
  T.v_Q += next.v_psi * psi_Q + next.v_M * M_Q + next.v_Q;
  T.v_p += next.v_psi * psi_p + next.v_M * M_p + next.v_Q * Q_p + next.v_p;
  T.psi_psi = next.psi_psi * psi_psi + next.psi_M * M_psi;
  T.psi_M = next.psi_psi * psi_M + next.psi_M * M_M;
  T.psi_Q = next.psi_psi * psi_Q + next.psi_M * M_Q + next.psi_Q;
  T.psi_p = next.psi_psi * psi_p + next.psi_M * M_p + next.psi_Q * Q_p + next.psi_p;
  T.M_psi = next.M_psi * psi_psi + next.M_M * M_psi;
  T.M_M = next.M_psi * psi_M + next.M_M * M_M;
  T.M_Q = next.M_psi * psi_Q + next.M_M * M_Q + next.M_Q;
  T.M_p = next.M_psi * psi_p + next.M_M * M_p + next.M_Q * Q_p + next.M_p;
  T.Q_p = Q_p + next.Q_p;
}

/** A force and a moment where a piece begins. */
export function jump(T: Transfer, Py: number, M0: number): void {
  if (Py === 0 && M0 === 0) return;
  T.v_p += T.v_Q * Py - T.v_M * M0;
  T.psi_p += T.psi_Q * Py - T.psi_M * M0;
  T.M_p += T.M_Q * Py - T.M_M * M0;
  T.Q_p += Py;
}

/** Turns what the start does at the end into what both ends ask for; all but the axial stiffness. */
export function closed(T: Transfer, out: Piece): void {
  const { v_psi, v_M, v_Q, v_p, psi_psi, psi_M, psi_Q, psi_p } = T;
  const D = 1 / (v_M * psi_Q - v_Q * psi_M);
  out.kvv = psi_M * D;
  out.kv1 = psi_Q * D;
  out.kv2 = v_M * D;
  out.S11 = (v_psi * psi_Q - psi_psi * v_Q) * D;
  out.S12 = v_Q * D;
  out.S22 = (T.M_Q * v_M - T.M_M * v_Q) * D;
  const M = (psi_p * v_Q - v_p * psi_Q) * D;
  const Q = (psi_M * v_p - v_M * psi_p) * D;
  out.m1 = -M;
  out.Y1 = Q;
  out.m2 = T.M_M * M + T.M_Q * Q + T.M_p;
  out.Y2 = -(Q + T.Q_p);
}
