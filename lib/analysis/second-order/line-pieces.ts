import type { MemberData } from '../member-data';
import { stride, type MemberLoading } from './member-loading';

/** Terms kept of each series before its degree is lowered. */
export const terms = 18;
/** A piece of a line is at most this √(|N| l²/EI) long: then polynomials of a low degree are close enough. */
const longest = 0.55;

/** What the line of one member is built from, piece by piece; kept and used again. */
export interface LinePieces {
  count: number;
  /** By piece: [from, length, N, n1, n2, q0, q1, P_y, M₀]: N as it bends, force and moment where the piece begins. */
  readonly given: Float64Array;
  /** By piece, `terms` each, in powers of s/length: v′, M, V and v. */
  readonly w: Float64Array;
  readonly M: Float64Array;
  readonly V: Float64Array;
  readonly v: Float64Array;
  /** By piece: the degree that v′, M and V go to; v goes to one more. Beyond it coefficients mean nothing. */
  readonly degrees: Uint8Array;
}

export const givenStride = 9;

export function emptyPieces(room: number): LinePieces {
  const row = (n: number): Float64Array => new Float64Array(room * n);
  return {
    count: 0, given: row(givenStride), w: row(terms), M: row(terms), V: row(terms), v: row(terms), degrees: new Uint8Array(room),
  }; // prettier-ignore
}

/** Pieces of a stretch of this length, N at most `size` in size and `low` at its lowest. */
function piecesIn(m: MemberData, length: number, size: number, low: number): number {
  const per = m.GAv === Infinity || low >= 0 ? 1 : Math.max(1e-3, 1 + low / m.GAv);
  return Math.max(1, Math.ceil((Math.sqrt(size / (m.EI * per)) * length) / longest));
}

/**
 * Cuts a member's stretches into pieces.
 *
 * @param N axial force at its start, as it bends   @param scale of the loading's n to it   @param finer times as many pieces
 */
export function cut(
  m: MemberData,
  loading: MemberLoading,
  N: number,
  scale: number,
  finer: number,
  into: LinePieces,
): LinePieces {
  const { stretches, count } = loading;
  let total = 0;
  for (let i = 0; i < count; i++) total += finer * numberOf(m, loading, i, N, scale);
  const out = total * givenStride <= into.given.length ? into : emptyPieces(2 * total);
  let from = 0;
  let k = 0;
  for (let i = 0; i < count; i++) {
    const o = stride * i;
    const l = stretches[o]!;
    const n1 = scale * stretches[o + 2]!;
    const n2 = scale * stretches[o + 3]!;
    const pieces = finer * numberOf(m, loading, i, N, scale);
    const h = l / pieces;
    for (let j = 0; j < pieces; j++) {
      const s = j * h;
      const g = givenStride * k++;
      out.given[g] = from + s;
      out.given[g + 1] = h;
      out.given[g + 2] = N + scale * stretches[o + 1]! + s * (n1 + s * n2);
      out.given[g + 3] = n1 + 2 * s * n2;
      out.given[g + 4] = n2;
      out.given[g + 5] = stretches[o + 4]! + s * stretches[o + 5]!;
      out.given[g + 6] = stretches[o + 5]!;
      out.given[g + 7] = j === 0 ? stretches[o + 6]! : 0;
      out.given[g + 8] = j === 0 ? stretches[o + 7]! : 0;
    }
    from += l;
  }
  out.count = total;
  return out;
}

function numberOf(m: MemberData, { stretches }: MemberLoading, i: number, N: number, scale: number): number {
  const o = stride * i;
  const l = stretches[o]!;
  const a = N + scale * stretches[o + 1]!;
  const b = a + scale * l * (stretches[o + 2]! + l * stretches[o + 3]!);
  const bulge = 0.25 * Math.abs(scale * stretches[o + 3]!) * l * l;
  return piecesIn(m, l, Math.max(Math.abs(a), Math.abs(b)) + bulge, Math.min(a, b) - bulge);
}

/** Where a piece ends. */
export interface PieceEnd {
  v: number;
  psi: number;
  M: number;
  Q: number;
}

/**
 * Power series of one piece from what stands just after its start; `from` becomes its end. README §8.
 * @param slip 1/GAv   @param kappa free curvature   @param loaded 0: as if nothing acted along it
 */
export function series(
  m: MemberData,
  slip: number,
  kappa: number,
  pieces: LinePieces,
  k: number,
  at: PieceEnd,
  loaded: number,
): void {
  const g = givenStride * k;
  const { given, w, M, V, v } = pieces;
  const l = given[g + 1]!;
  const N = given[g + 2]!;
  const a1 = given[g + 3]! * l;
  const a2 = given[g + 4]! * l * l;
  const q = loaded * given[g + 5]! * l;
  const half = (loaded * given[g + 6]! * l * l) / 2;
  const per = 1 / (1 + N * slip);
  const b = l / m.EI;
  const o = terms * k;
  let wi = (at.psi - at.Q * slip) * per;
  let before = 0;
  let Mi = at.M;
  let Vi = at.Q + N * wi;
  let psi = at.psi;
  let Msum = Mi;
  let vsum = at.v;
  v[o] = at.v;
  const z = ((Math.abs(N) + Math.abs(a1) + Math.abs(a2)) * per * l * l) / m.EI;
  const last = z < 1e-4 ? 9 : z < 0.03 ? 12 : 15;
  for (let i = 0; i <= last; i++) {
    w[o + i] = wi;
    M[o + i] = Mi;
    V[o + i] = Vi;
    const part = 1 / (i + 1);
    let B = b * part * Mi;
    let Qi = 0;
    if (i === 0) {
      B += loaded * kappa * l;
      Qi = q;
    } else if (i === 1) Qi = half;
    const vi = l * part * wi;
    const next = l * part * Vi;
    v[o + i + 1] = vi;
    vsum += vi;
    psi += B;
    const Vnext = per * (Qi + N * B + a1 * wi + a2 * before);
    before = wi;
    wi = B - Vnext * slip;
    Mi = next;
    Vi = Vnext;
    if (i < last) Msum += next;
  }
  pieces.degrees[k] = last;
  at.v = vsum;
  at.psi = psi;
  at.M = Msum;
  at.Q += q + half;
}
