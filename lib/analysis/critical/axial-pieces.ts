import type { Frame } from '@/lib/model/frame';
import type { Polynomial, ResultState } from '@/lib/results/result';
import { memberDataFor, type MemberData } from '../member-data';
import { stretchesOf } from '../member-stretches';
import { evaluate } from '../polynomial';

/** A length of a member over which the axial force is N + slope × (x − middle), tension positive, first order. */
export interface AxialPiece {
  readonly length: number;
  readonly N: number;
  readonly slope: number;
}

/** Forces below this share of the frame's largest are rounding, not an axial force. */
const nothing = 1e-8;
/** And so are forces below this share of axial stiffness × movement. */
const rounding = 1e-11;

/** The axial forces of one combination, before members are divided. */
export interface AxialForces {
  /** By member, one after the other, between places where loads of the combination begin, end or stand. */
  readonly stretches: readonly (readonly Stretch[])[];
  /** Forces below it are rounding, N. */
  readonly floor: number;
}
interface Stretch {
  readonly length: number;
  readonly N: Polynomial;
}

/** Axial forces along the members of a state, exactly; slack members have none. */
export function axialForces(frame: Frame, state: ResultState): AxialForces {
  const data = memberDataFor(frame, state.method);
  const slack = state.method?.slack ?? [];
  let largest = 0;
  let stiffest = 0;
  for (let i = 0; i < data.length; i++) {
    const { EA, length } = data[i]!;
    stiffest = Math.max(stiffest, EA / length);
    for (let r = 0; r < 6; r++) largest = Math.max(largest, Math.abs(state.endForces[6 * i + r]!) / (r % 3 === 2 ? length : 1));
  }
  let moved = 0;
  for (let i = 0; i < state.displacements.length; i++)
    if (i % 3 !== 2) moved = Math.max(moved, Math.abs(state.displacements[i]!));
  const stretches = data.map((m, i) => {
    if (slack.length > 0 && slack.includes(i)) return [{ length: m.length, N: [0] }];
    // pulled by the imperfections alone, a taut tie is pressed here: it never buckles, it would let go
    if (frame.members[i]!.tensionOnly) return [{ length: m.length, N: [Math.max(0, meanOf(state, i))] }];
    return stretchesAlong(frame, state, i, m.length);
  });
  return { stretches, floor: Math.max(nothing * largest, rounding * stiffest * moved) };
}

function meanOf({ endForces }: ResultState, member: number): number {
  return (endForces[6 * member]! + endForces[6 * member + 3]!) / 2;
}

function stretchesAlong(frame: Frame, state: ResultState, member: number, length: number): Stretch[] {
  const { places, cases } = stretchesOf(frame, member);
  let N = state.endForces[6 * member]!;
  if (cases.every((acting, c) => !acting?.axial || state.factors[c] === 0)) return [{ length, N: [N] }];
  const stretches: Stretch[] = [];
  for (let i = 0; i + 1 < places.length; i++) {
    let n1 = 0;
    let n2 = 0;
    for (let c = 0; c < cases.length; c++) {
      const k = state.factors[c]!;
      const acting = k === 0 ? undefined : cases[c];
      if (!acting) continue;
      if (acting.jumps) N -= k * acting.Px[i]!;
      n1 -= k * acting.lines[4 * i]!;
      n2 -= (k * acting.lines[4 * i + 1]!) / 2;
    }
    const l = places[i + 1]! - places[i]!;
    stretches.push({ length: l, N: [N, n1, n2] });
    N += l * (n1 + l * n2);
  }
  return stretches;
}

/**
 * Pieces of each member for the buckling analysis of one combination (README §4): a compressed member is at least two,
 * so that its own buckling between its nodes is among the unknowns; where the axial force varies, more, by how much it
 * varies against the member's largest and how near this is to buckling the member. An uncompressed member with a constant
 * force is one.
 *
 * @param lambda about what the critical load factor is; 0 = not known yet: as few pieces as may be
 */
export function axialPieces(data: readonly MemberData[], { stretches, floor }: AxialForces, lambda: number): AxialPiece[][] {
  return stretches.map((along, i) => {
    const { length, EI } = data[i]!;
    const [first] = along;
    if (along.length === 1 && first!.N.length === 1) {
      const N = Math.abs(first!.N[0]!) > floor ? first!.N[0]! : 0;
      if (N >= 0) return [{ length, N, slope: 0 }];
      const half = { length: length / 2, N, slope: 0 };
      return [half, half];
    }
    let most = 0;
    for (const { N, length: l } of along) most = Math.max(most, Math.abs(N[0]!), Math.abs(evaluate(N, l)));
    // the error grows with the square of the force against Euler’s: far from it, fewer pieces are as good
    const nearness = Math.min(1, (Math.sqrt((lambda * most) / EI) * length) / Math.PI);
    const pieces: AxialPiece[] = [];
    for (const { N, length: l } of along) even(length, N, l, floor, most, nearness, pieces);
    return pieces;
  });
}

/** One stretch without jumps, cut evenly. @param nearness √(λ N / Euler's load), at most 1 */
function even(
  member: number,
  N: Polynomial,
  length: number,
  floor: number,
  most: number,
  nearness: number,
  pieces: AxialPiece[],
): void {
  if (!(length > 0)) return;
  const first = N[0]!;
  const last = evaluate(N, length);
  const compressed = Math.min(first, last) < -floor;
  const varies = Math.abs(last - first) > floor;
  const whole = piecesOf(compressed, varies ? Math.abs(last - first) / most : 0);
  cut(
    length,
    N,
    Math.max(1, Math.ceil((Math.max(Math.min(2, whole), Math.ceil(whole * nearness)) * length) / member)),
    floor,
    pieces,
  );
}

/** Pieces of one length with the mean and the slope of N in each. */
function cut(length: number, N: Polynomial, count: number, floor: number, pieces: AxialPiece[]): void {
  const varies = Math.abs(evaluate(N, length) - N[0]!) > floor;
  const l = length / count;
  let a = N[0]!;
  for (let i = 0; i < count; i++) {
    const s = i * l;
    const b = evaluate(N, s + l);
    const mean = (a + 4 * evaluate(N, s + l / 2) + b) / 6;
    pieces.push({ length: l, N: Math.abs(mean) > floor ? mean : 0, slope: varies ? (b - a) / l : 0 });
    a = b;
  }
}

/** Pieces to a whole member's length; the error falls with their fourth power (README §4 gives it measured). */
function piecesOf(compressed: boolean, variation: number): number {
  if (variation === 0) return compressed ? 2 : 1;
  if (variation < 0.02) return 2;
  return variation < 0.15 ? 4 : 12;
}

/** A member in about `count` even pieces, one at least between places where its axial force jumps. */
export function evenPieces({ stretches, floor }: AxialForces, member: number, count: number): AxialPiece[] {
  const along = stretches[member]!;
  const L = along.reduce((sum, stretch) => sum + stretch.length, 0);
  const pieces: AxialPiece[] = [];
  for (const { N, length } of along) if (length > 0) cut(length, N, Math.max(1, Math.round((count * length) / L)), floor, pieces);
  return pieces;
}
