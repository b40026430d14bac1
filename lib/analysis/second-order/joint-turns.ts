import type { MemberData } from '../member-data';
import type { Piece } from './piece';

/** Rotations of a member's own ends, within its joints. */
export interface Turns {
  start: number;
  end: number;
}

/**
 * Rotations ψ of a member's ends from its nodes' movements: k(φ − ψ) = m at a joint of stiffness k, ψ = φ at a rigid one.
 * @param piece the member with its ends clamped, loads included   @param u u, v, φ of both nodes, local axes
 */
export function clampedTurns(m: MemberData, piece: Piece, u: Float64Array, out: Turns): void {
  const k1 = m.startSpring;
  const k2 = m.endSpring;
  out.start = u[2]!;
  out.end = u[5]!;
  if (k1 === Infinity && k2 === Infinity) return;
  const v = u[1]! - u[4]!;
  const b1 = (k1 === 0 ? 0 : k1 * u[2]!) - piece.kv1 * v - piece.m1;
  const b2 = (k2 === 0 ? 0 : k2 * u[5]!) - piece.kv2 * v - piece.m2;
  if (k1 === Infinity) out.end = (b2 - piece.S12 * u[2]!) / (piece.S22 + k2);
  else if (k2 === Infinity) out.start = (b1 - piece.S12 * u[5]!) / (piece.S11 + k1);
  else {
    const D = (piece.S11 + k1) * (piece.S22 + k2) - piece.S12 * piece.S12;
    out.start = (b1 * (piece.S22 + k2) - b2 * piece.S12) / D;
    out.end = (b2 * (piece.S11 + k1) - b1 * piece.S12) / D;
  }
}
