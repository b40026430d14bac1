import type { MemberData } from '../member-data';
import { givenStride, type LinePieces } from './line-pieces';
import type { MemberLoading } from './member-loading';
import { closed, emptyPiece, emptyTransfer, type Piece } from './piece';
import { transferAlong } from './transfer';
import type { LineEnds } from './second-order-line';

/**
 * v, ψ, M, Q just after the start of each piece of a long tie, 4 a piece: from its ends' movements, by elimination from
 * piece to piece, since a line followed from one end would grow with e^√(N L²/EI).
 */
export function tieStarts(m: MemberData, loading: MemberLoading, pieces: LinePieces, ends: LineEnds): Float64Array {
  const { count, given } = pieces;
  const slip = m.GAv === Infinity ? 0 : 1 / m.GAv;
  const all: Piece[] = [];
  const transfer = emptyTransfer();
  for (let k = 0; k < count; k++) {
    const [l, N, n1, n2, q0, q1] = [1, 2, 3, 4, 5, 6].map((r) => given[givenStride * k + r]!) as [number, number, number, number, number, number]; // prettier-ignore
    const piece = emptyPiece();
    transferAlong(m.EI, slip, l, N, n1, n2, q0, q1, loading.curvature, transfer);
    closed(transfer, piece);
    all.push(piece);
  }
  // rows of v and ψ where piece k begins; C carries the next place's, solved from the far end back
  const C = new Float64Array(4 * (count + 1));
  const r = new Float64Array(2 * (count + 1));
  for (let k = 0; k <= count; k++) {
    const before = k > 0 ? all[k - 1]! : null;
    const after = k < count ? all[k]! : null;
    let a = (before?.kvv ?? 0) + (after?.kvv ?? 0);
    let b = (after?.kv1 ?? 0) - (before?.kv2 ?? 0);
    let c = (before?.S22 ?? 0) + (after?.S11 ?? 0);
    let f = -(before?.Y2 ?? 0) - (after?.Y1 ?? 0) + (after ? given[givenStride * k + 7]! : loading.endPy);
    let g = -(before?.m2 ?? 0) - (after?.m1 ?? 0) + (after ? given[givenStride * k + 8]! : loading.endM);
    if (before) {
      // what is known of the place before: x = r − C x_next
      const [v0, t0] = [r[2 * k - 2]!, r[2 * k - 1]!];
      const o = 4 * k - 4;
      const [c0, c1, c2, c3] = [C[o]!, C[o + 1]!, C[o + 2]!, C[o + 3]!];
      const [vv, vt, tv, tt] = [-before.kvv, -before.kv1, before.kv2, before.S12];
      f -= vv * v0 + vt * t0;
      g -= tv * v0 + tt * t0;
      a -= vv * c0 + vt * c2;
      b -= vv * c1 + vt * c3;
      c -= tv * c1 + tt * c3;
    }
    const [U, W, X, Y] = after ? [-after.kvv, after.kv2, -after.kv1, after.S12] : [0, 0, 0, 0];
    const spring = k === 0 ? m.startSpring : k === count ? m.endSpring : 0;
    const v = k === 0 ? ends.v1 : k === count ? ends.v2 : NaN;
    const phi = k === 0 ? ends.phi1 : ends.phi2;
    const o = 4 * k;
    if (k === 0 || k === count) {
      // v is given, and ψ too at a rigid joint
      r[2 * k] = v;
      if (spring === Infinity) {
        r[2 * k + 1] = phi;
        continue;
      }
      const p = c + spring;
      r[2 * k + 1] = (g - b * v + (spring === 0 ? 0 : spring * phi)) / p;
      C[o + 2] = X / p;
      C[o + 3] = Y / p;
      continue;
    }
    const D = a * c - b * b;
    r[2 * k] = (c * f - b * g) / D;
    r[2 * k + 1] = (a * g - b * f) / D;
    C[o] = (c * U - b * X) / D;
    C[o + 1] = (c * W - b * Y) / D;
    C[o + 2] = (a * X - b * U) / D;
    C[o + 3] = (a * Y - b * W) / D;
  }
  for (let k = count - 1; k >= 0; k--) {
    const o = 4 * k;
    const [v, t] = [r[2 * k + 2]!, r[2 * k + 3]!];
    r[2 * k] = r[2 * k]! - C[o]! * v - C[o + 1]! * t;
    r[2 * k + 1] = r[2 * k + 1]! - C[o + 2]! * v - C[o + 3]! * t;
  }
  const starts = new Float64Array(4 * count);
  for (let k = 0; k < count; k++) {
    const piece = all[k]!;
    const [v, t, dv, t2] = [r[2 * k]!, r[2 * k + 1]!, r[2 * k]! - r[2 * k + 2]!, r[2 * k + 3]!];
    starts.set([v, t, -(piece.kv1 * dv + piece.S11 * t + piece.S12 * t2 + piece.m1), piece.kvv * dv + piece.kv1 * t + piece.kv2 * t2 + piece.Y1], 4 * k); // prettier-ignore
  }
  return starts;
}
