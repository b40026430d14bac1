import type { Frame } from '@/lib/model/frame';
import { numbers } from '../numbers';
import type { Column } from './columns';

/** Basic value of the initial sway, φ₀ (EN 1993-1-1 5.3.2(3)a). */
const phi0 = 1 / 200;

/** What EN 1993-1-1 5.3.2 makes of a frame's columns under one combination. */
export interface SwayImperfection {
  /** φ = φ₀ α_h α_m, rad. */
  readonly phi: number;
  readonly alphaH: number;
  readonly alphaM: number;
  /** Height of the structure: from the lowest column's foot to the highest column's top, m. */
  readonly height: number;
  /** Columns of the row that carry at least half of its mean. */
  readonly m: number;
}

/** φ = φ₀ α_h α_m, α_h = 2/√h within 2/3 … 1, α_m = √(0.5(1 + 1/m)). EN 1993-1-1 (5.5). @param height m */
export function initialSway(height: number, m: number): SwayImperfection {
  const alphaH = Math.min(1, Math.max(2 / 3, 2 / Math.sqrt(height)));
  const alphaM = Math.sqrt(0.5 * (1 + 1 / m));
  return { phi: phi0 * alphaH * alphaM, alphaH, alphaM, height, m };
}

/**
 * Compression of a piece of a column, N: the larger of its ends; 0 where neither is compressed.
 * @param endForces N, V, M at start and end by member, 6 each (first order)
 */
function compression(endForces: Float64Array, member: number): number {
  return Math.max(0, -endForces[6 * member]!, -endForces[6 * member + 3]!);
}

/**
 * The initial sway of a frame under one combination.
 *
 * m counts the row of columns that stand lowest, on a support, or on no other column where none has one: those
 * compressed to at least half of the mean of the compressed ones. h is of the whole structure.
 *
 * @param endForces of the first-order analysis of the combination, 6 a member
 */
export function swayImperfection(frame: Frame, columns: readonly Column[], endForces: Float64Array): SwayImperfection {
  let low = Infinity;
  let high = -Infinity;
  for (const { foot, top } of columns) {
    low = Math.min(low, frame.nodes[foot]!.y_m);
    high = Math.max(high, frame.nodes[top]!.y_m);
  }
  const carried = lowestRow(frame, columns).map(({ pieces, foot }) => {
    const lowest = pieces.find((piece) => piece.foot === foot) ?? pieces[0]!;
    return compression(endForces, lowest.member);
  });
  // what rounding leaves on a column that carries nothing is no compression
  const compressed = carried.filter((N) => N > 1e-6 * Math.max(...carried));
  const mean = compressed.reduce((sum, N) => sum + N, 0) / compressed.length;
  const m = compressed.filter((N) => N >= 0.5 * mean * (1 - 1e-9)).length;
  return initialSway(high - low, Math.max(1, m));
}

function lowestRow(frame: Frame, columns: readonly Column[]): readonly Column[] {
  const held = new Set(frame.supports.map((support) => support.node));
  const founded = columns.filter((column) => held.has(column.foot));
  if (founded.length > 0) return founded;
  const tops = new Set(columns.flatMap((column) => column.pieces.map((piece) => piece.top)));
  return columns.filter((column) => !tops.has(column.foot));
}

/**
 * Horizontal forces of the initial sway towards +X, by node: φ N at the top of each piece of a column, the opposite at
 * its foot (EN 1993-1-1 5.3.2(7), Fig. 5.4); a piece in tension gives nothing. Fx, Fy by node, 2 each, N.
 */
export function swayForces(frame: Frame, columns: readonly Column[], endForces: Float64Array): Float64Array {
  const forces = numbers(2 * frame.nodes.length);
  if (columns.length === 0) return forces;
  const { phi } = swayImperfection(frame, columns, endForces);
  for (const column of columns)
    for (const { member, foot, top } of column.pieces) {
      const H = phi * compression(endForces, member);
      forces[2 * top] = forces[2 * top]! + H;
      forces[2 * foot] = forces[2 * foot]! - H;
    }
  return forces;
}
