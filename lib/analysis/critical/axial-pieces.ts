import type { Frame } from '@/lib/model/frame';
import type { ResultState } from '@/lib/results/result';
import { memberData } from '../member-data';
import { memberLine } from '../member-line';
import { memberLoads } from '../member-loads';
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

/**
 * Pieces of each member for the buckling analysis of one combination (README §4): a compressed member is at least two,
 * so that its own buckling between its nodes is among the unknowns; where the axial force varies, more, by how much it
 * varies against the member's largest. An uncompressed member with a constant force is one.
 */
export function axialPieces(frame: Frame, state: ResultState): AxialPiece[][] {
  const data = memberData(frame);
  const loads = memberLoads(frame);
  const cases = frame.cases.length;
  let largest = 0;
  data.forEach((m, i) => {
    for (let r = 0; r < 6; r++) largest = Math.max(largest, Math.abs(state.endForces[6 * i + r]!) / (r % 3 === 2 ? m.length : 1));
  });
  let moved = 0;
  for (let i = 0; i < state.displacements.length; i++)
    if (i % 3 !== 2) moved = Math.max(moved, Math.abs(state.displacements[i]!));
  const stiffest = data.reduce((most, m) => Math.max(most, m.EA / m.length), 0);
  const floor = Math.max(nothing * largest, rounding * stiffest * moved);
  return data.map((m, i) => {
    let constant = true;
    for (let c = 0; c < cases && constant; c++) {
      const acting = state.factors[c] === 0 ? undefined : loads[i * cases + c];
      if (acting) constant = acting.lines.every((q) => q.qx1 === 0 && q.qx2 === 0) && acting.places.every((p) => p.Px === 0);
    }
    const start = state.endForces[6 * i]!;
    if (constant) return even(m.length, () => start, floor, Math.abs(start), 0, m.length);
    const line = memberLine(frame, state, i);
    const most = line.segments.reduce(
      (size, segment) =>
        Math.max(size, Math.abs(evaluate(segment.N, 0)), Math.abs(evaluate(segment.N, segment.to - segment.from))),
      0,
    );
    return line.segments.flatMap((segment) =>
      even(m.length, (s) => evaluate(segment.N, s), floor, most, 0, segment.to - segment.from),
    );
  });
}

/** One stretch without jumps, cut evenly. */
function even(member: number, N: (s: number) => number, floor: number, most: number, from: number, to: number): AxialPiece[] {
  const length = to - from;
  if (!(length > 0)) return [];
  const first = N(from);
  const last = N(to);
  const compressed = Math.min(first, last) < -floor;
  const varies = Math.abs(last - first) > floor;
  const count = Math.max(1, Math.ceil((piecesOf(compressed, varies ? Math.abs(last - first) / most : 0) * length) / member));
  const l = length / count;
  return Array.from({ length: count }, (_, i) => {
    const s = from + i * l;
    const a = N(s);
    const b = N(s + l);
    const mean = (a + 4 * N(s + l / 2) + b) / 6;
    return { length: l, N: Math.abs(mean) > floor ? mean : 0, slope: varies ? (b - a) / l : 0 };
  });
}

/** Pieces to a whole member's length; the error falls with their fourth power (README §4 gives it measured). */
function piecesOf(compressed: boolean, variation: number): number {
  if (variation === 0) return compressed ? 2 : 1;
  if (variation < 0.02) return 2;
  return variation < 0.15 ? 4 : 12;
}
