import type { Frame } from '@/lib/model/frame';
import type { ResultState } from '@/lib/results/result';
import { headNumbers, ofDeflection, ofM, ofN, ofU, ofV, segmentNumbers, writeDegrees } from '../flat-line';
import type { MemberData } from '../member-data';
import type { LineRoom } from '../member-line';
import { economise } from './economise';
import { cut, emptyPieces, givenStride, series, terms, type LinePieces, type PieceEnd } from './line-pieces';
import { combineLoading, emptyLoading, type MemberLoading } from './member-loading';
import { tieStarts } from './tie-line';

/** The lines' error against their largest value: a tenth of what is promised (1e-9). */
const close = 1e-10;
/** Degrees that are not gone beyond: N, V, M and v. */
const mostForces = 6;
const mostDeflection = 8;
/** A tie that damps what comes in at its ends by more than e to this is not followed from one end to the other. */
const dampest = 6;

/** Loads of the members in the last combination asked for: both of its directions have the same. */
const known = {
  frame: null as Frame | null,
  factors: null as Float64Array | null,
  loadings: [] as MemberLoading[],
  made: new Uint8Array(0),
};
let loading: MemberLoading = emptyLoading();
let pieces: LinePieces = emptyPieces(16);
let turned: LinePieces = emptyPieces(16);
const at: PieceEnd = { v: 0, psi: 0, M: 0, Q: 0 };
/** Of the line at hand: one object, for a new one for each line costs more than what is in it. */
const ends = { v1: 0, v2: 0, phi1: 0, phi2: 0, V: 0, M: 0 };

/**
 * Internal forces and deflected line of a member of a second-order state, as polynomials between load points (more where
 * the axial force is large): power series of EI ψ′ = M + EI κ₀, M′ = V = Q + N v′, Q′ = q, v′ = ψ − V/GAv, their degree
 * lowered within 1e-9 of their largest value, both ends exactly. README §8. As a row of numbers (../flat-line.ts).
 */
export function secondOrderLine(frame: Frame, state: ResultState, member: number, m: MemberData, into: LineRoom): void {
  const scale = state.method?.loadScale ?? 1;
  const e = 6 * member;
  const N0 = state.endForces[e]!;
  loading = loadingOf(frame, state.factors, member);
  const d = state.displacements;
  const [a, b] = [3 * m.start, 3 * m.end];
  const v1 = d[a + 1]! * m.cos - d[a]! * m.sin;
  const v2 = d[b + 1]! * m.cos - d[b]! * m.sin;
  ends.v1 = v1;
  ends.v2 = v2;
  ends.phi1 = d[a + 2]!;
  ends.phi2 = d[b + 2]!;
  ends.V = state.endForces[e + 1]!;
  ends.M = state.endForces[e + 2]!;
  const u1 = d[a]! * m.cos + d[a + 1]! * m.sin;
  // where an axial force that varies brings in higher powers than are gone to, pieces are halved until they don't matter
  for (let finer = 1; ; finer *= 2) {
    pieces = cut(m, loading, scale * N0, scale, finer, pieces);
    if (damping(m) > dampest) along(m, tieStarts(m, loading, pieces, ends));
    else follow(m, scale * N0);
    if (written(m, state.endForces, e, u1, v2, scale, finer < 16, into)) return;
  }
}

function loadingOf(frame: Frame, factors: Float64Array, member: number): MemberLoading {
  if (known.frame !== frame) {
    while (known.loadings.length < frame.members.length) known.loadings.push(emptyLoading());
    if (known.made.length < frame.members.length) known.made = new Uint8Array(frame.members.length);
  }
  if (known.frame !== frame || known.factors !== factors) known.made.fill(0);
  known.frame = frame;
  known.factors = factors;
  const found = known.loadings[member]!;
  if (!known.made[member]) combineLoading(frame, member, factors, 1, found);
  known.made[member] = 1;
  return found;
}

export interface LineEnds {
  readonly v1: number;
  readonly v2: number;
  /** The nodes' rotations, NaN where there is none. */
  readonly phi1: number;
  readonly phi2: number;
  /** At the start, before a load exactly there. */
  readonly V: number;
  readonly M: number;
}

function damping(m: MemberData): number {
  let sum = 0;
  for (let k = 0; k < pieces.count; k++) {
    const N = pieces.given[givenStride * k + 2]!;
    if (N > 0) sum += Math.sqrt(N / m.EI) * pieces.given[givenStride * k + 1]!;
  }
  return sum;
}

/** From piece to piece, from the forces and the rotation at the start. */
function follow(m: MemberData, N: number): void {
  const slip = m.GAv === Infinity ? 0 : 1 / m.GAv;
  const known = m.startSpring > 0;
  const psi = !known
    ? (ends.v2 - ends.v1) / m.length
    : m.startSpring === Infinity
      ? ends.phi1
      : ends.phi1 + ends.M / m.startSpring;
  at.v = ends.v1;
  at.psi = psi;
  at.M = ends.M;
  at.Q = ends.V - N * (psi - ends.V * slip);
  run(m, slip, pieces, 1);
  let off = ends.v2 - at.v;
  if (!known && varies()) {
    // the start's rotation from where its line must end
    turned = turned.given.length < pieces.given.length ? emptyPieces(pieces.given.length / givenStride) : turned;
    turned.count = pieces.count;
    turned.given.set(pieces.given.subarray(0, givenStride * pieces.count));
    at.v = at.M = 0;
    at.psi = 1;
    at.Q = -N;
    run(m, slip, turned, 0);
    const share = off / at.v;
    for (let k = 0; k < pieces.count; k++)
      for (let i = terms * k, last = i + pieces.degrees[k]! + 1; i <= last; i++) {
        if (i < last) {
          pieces.M[i] = pieces.M[i]! + share * turned.M[i]!;
          pieces.V[i] = pieces.V[i]! + share * turned.V[i]!;
        }
        pieces.v[i] = pieces.v[i]! + share * turned.v[i]!;
      }
    off = 0;
  }
  for (let k = 0; k < pieces.count; k++) {
    const o = terms * k;
    const [from, l] = [pieces.given[givenStride * k]!, pieces.given[givenStride * k + 1]!];
    pieces.v[o] = pieces.v[o]! + (off * from) / m.length;
    pieces.v[o + 1] = pieces.v[o + 1]! + (off * l) / m.length;
  }
}

function varies(): boolean {
  const first = pieces.given[2]!;
  for (let k = 0; k < pieces.count; k++) {
    const g = givenStride * k;
    if (pieces.given[g + 2] !== first || pieces.given[g + 3] !== 0 || pieces.given[g + 4] !== 0) return true;
  }
  return false;
}

function run(m: MemberData, slip: number, into: LinePieces, loaded: number): void {
  for (let k = 0; k < into.count; k++) {
    const g = givenStride * k;
    at.Q += loaded * into.given[g + 7]!;
    at.M -= loaded * into.given[g + 8]!;
    series(m, slip, loading.curvature, into, k, at, loaded);
  }
}

/** Each piece from its own start: v, ψ, M, Q one after another. */
function along(m: MemberData, starts: Float64Array): void {
  const slip = m.GAv === Infinity ? 0 : 1 / m.GAv;
  for (let k = 0; k < pieces.count; k++) {
    at.v = starts[4 * k]!;
    at.psi = starts[4 * k + 1]!;
    at.M = starts[4 * k + 2]!;
    at.Q = starts[4 * k + 3]!;
    series(m, slip, loading.curvature, pieces, k, at, 1);
  }
}

/** Largest of some coefficients of all pieces. */
function largest(c: Float64Array, first: number): number {
  let most = 0;
  for (let k = 0; k < pieces.count; k++) for (let i = first; i < 4; i++) most = Math.max(most, Math.abs(c[terms * k + i]!));
  return most;
}

/** Coefficients in powers of s, of as low a degree as may be, to `at`; returns the degree, −1 where it is above `cap`. */
function lowered(
  c: Float64Array,
  k: number,
  highest: number,
  allowed: number,
  beyond: number,
  cap: number,
  out: Float64Array,
  at: number,
): number {
  const o = terms * k;
  const degree = economise(c, o, highest, allowed, cap, beyond === Infinity ? beyond : beyond * allowed);
  const per = 1 / pieces.given[givenStride * k + 1]!;
  let power = 1;
  for (let i = 0; i <= degree; i++) {
    out[at + i] = c[o + i]! * power;
    power *= per;
  }
  return degree;
}

/** The segments; false where a piece asks for a higher degree than may be, if `strict`. */
function written(
  m: MemberData,
  forces: Float64Array,
  e: number,
  u1: number,
  v2: number,
  scale: number,
  strict: boolean,
  into: LineRoom,
): boolean {
  const beyond = strict ? 4 : Infinity;
  const ofShear = close * largest(pieces.V, 0);
  const ofMoment = close * largest(pieces.M, 0);
  const ofMovement = close * largest(pieces.v, 2);
  const at = into.room(pieces.count + 2);
  const out = into.numbers;
  let s = at + headNumbers;
  let u = u1;
  if (loading.startJump) {
    flat(0, forces, e, u, pieces.v[0]!, out, s);
    s += segmentNumbers;
  }
  for (let k = 0; k < pieces.count; k++) {
    const g = givenStride * k;
    const l = pieces.given[g + 1]!;
    const n0 = pieces.given[g + 2]! / scale;
    const n1 = pieces.given[g + 3]! / scale;
    const n2 = pieces.given[g + 4]! / scale;
    const highest = pieces.degrees[k]!;
    const V = lowered(pieces.V, k, highest, ofShear, beyond, mostForces, out, s + ofV);
    if (V < 0) return false;
    const M = lowered(pieces.M, k, highest, ofMoment, beyond, mostForces, out, s + ofM);
    if (M < 0) return false;
    const v = lowered(pieces.v, k, highest + 1, ofMovement, beyond, mostDeflection, out, s + ofDeflection);
    if (v < 0) return false;
    out[s] = pieces.given[g]!;
    out[s + 1] = k + 1 < pieces.count ? pieces.given[g + givenStride]! : m.length;
    writeDegrees(out, s, 2, V, M, 3, v);
    out[s + ofN] = n0;
    out[s + ofN + 1] = n1;
    out[s + ofN + 2] = n2;
    const strain = n0 / m.EA + loading.strain;
    const strain1 = n1 / m.EA / 2;
    const strain2 = n2 / m.EA / 3;
    out[s + ofU] = u;
    out[s + ofU + 1] = strain;
    out[s + ofU + 2] = strain1;
    out[s + ofU + 3] = strain2;
    u += l * (strain + l * (strain1 + l * strain2));
    s += segmentNumbers;
  }
  if (loading.endJump) {
    flat(m.length, forces, e + 3, u, v2, out, s);
    s += segmentNumbers;
  }
  out[at] = (s - at - headNumbers) / segmentNumbers;
  out[at + 1] = m.length;
  return true;
}

/** A segment of no length. */
function flat(x: number, forces: Float64Array, e: number, u: number, v: number, out: Float64Array, s: number): void {
  out[s] = out[s + 1] = x;
  writeDegrees(out, s, 0, 0, 0, 0, 0);
  out[s + ofN] = forces[e]!;
  out[s + ofV] = forces[e + 1]!;
  out[s + ofM] = forces[e + 2]!;
  out[s + ofU] = u;
  out[s + ofDeflection] = v;
}
