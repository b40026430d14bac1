import { LuDecomposition, Matrix } from 'ml-matrix';
import type { Acting } from './second-loads';
import { restraintOf, type Given, type Setup } from './second-setup';
import { transferOf } from './transfer';
import { twoEnds, type TwoEnds } from './two-ends';

/** The equations of one stiffness, factored, with the numbers of its unknowns. */
export interface Equations {
  /** By node and direction: its unknown, or −1 where held or without a stiffness. */
  readonly number: Int32Array;
  /** Undefined for slack members. */
  readonly ends: readonly (TwoEnds | undefined)[];
  readonly K: readonly Float64Array[];
  readonly scale: Float64Array;
  readonly lu: LuDecomposition;
  /** Sign of the determinant; 0 where it is too small to tell. */
  readonly sign: number;
}

/** A member's length, EA, EI and joints as they are in a state. */
function memberAs(setup: Setup, given: Given, i: number): { L: number; EA: number; EI: number; slip: number; give: number } {
  const m = setup.members[i]!;
  const a = given.stiffness ? given.stiffness[2 * i]! : 1;
  const b = given.stiffness ? given.stiffness[2 * i + 1]! : 1;
  return { L: m.L, EA: m.EA * a, EI: m.EI * b, slip: m.slip / a, give: 1 / a };
}

/** A member between its nodes under one state's loads. */
export function endsOf(setup: Setup, given: Given, i: number, acting: Acting): TwoEnds | null {
  const m = setup.members[i]!;
  const as = memberAs(setup, given, i);
  const t = transferOf(as, acting, given.axial ? given.axial[i]! : null);
  return t && twoEnds(t, as.L, as.EA, as.EI, { start: m.startGive * as.give, end: m.endGive * as.give });
}

/**
 * Sums up and factors K (dense, LU with row exchanges, scaled to a unit diagonal), unknowns along the supports' axes.
 * @returns null where it is singular
 */
export function equationsOf(setup: Setup, given: Given, acting: readonly Acting[]): Equations | null {
  const { frame, members, supportAt } = setup;
  const all = 3 * frame.nodes.length;
  const whole = Array.from({ length: all }, () => new Float64Array(all));
  const ends: (TwoEnds | undefined)[] = [];
  for (let i = 0; i < members.length; i++) {
    if (given.slack.has(i)) {
      ends.push(undefined);
      continue;
    }
    const two = endsOf(setup, given, i, acting[i]!);
    if (!two) return null;
    ends.push(two);
    addTurned(setup, whole, i, two.k);
  }
  const number = new Int32Array(all).fill(-1);
  let n = 0;
  for (let u = 0; u < all; u++) {
    const restraint = restraintOf(supportAt[Math.floor(u / 3)], u % 3);
    if (typeof restraint === 'number') whole[u]![u]! += restraint;
    // nothing turns a node whose members are all pinned there
    if (restraint !== 'fixed' && !(u % 3 === 2 && whole[u]!.every((k) => k === 0))) number[u] = n++;
  }
  const kept = Array.from(number.keys()).filter((u) => number[u]! >= 0);
  const K = kept.map((u) => Float64Array.from(kept, (w) => whole[u]![w]!));
  const scale = Float64Array.from(K, (row, i) => 1 / Math.sqrt(Math.abs(row[i]!)));
  if (!scale.every(Number.isFinite)) return null;
  if (n === 0) return { number, ends, K, scale, lu: new LuDecomposition([[1]]), sign: 1 };
  const lu = new LuDecomposition(K.map((row, i) => row.map((k, j) => k * scale[i]! * scale[j]!)));
  if (lu.isSingular()) return null;
  return { number, ends, K, scale, lu, sign: Math.sign(lu.determinant) };
}

/** d for some right-hand sides, each by number; with one step of refinement, for forces are differences of large products. */
export function solveFor({ K, scale, lu }: Equations, rightSides: readonly Float64Array[]): Float64Array[] {
  const n = K.length;
  if (n === 0) return rightSides.map(() => new Float64Array(0));
  const solve = (sides: readonly Float64Array[]): Float64Array[] => {
    const B = Matrix.zeros(n, sides.length);
    sides.forEach((side, c) => side.forEach((value, i) => B.set(i, c, value * scale[i]!)));
    const X = lu.solve(B);
    return sides.map((_, c) => Float64Array.from({ length: n }, (_, i) => X.get(i, c) * scale[i]!));
  };
  const d = solve(rightSides);
  const left = rightSides.map((side, c) =>
    side.map((value, i) => {
      const row = K[i]!;
      let sum = value;
      for (let j = 0; j < n; j++) sum -= row[j]! * d[c]![j]!;
      return sum;
    }),
  );
  const more = solve(left);
  return d.map((x, c) => x.map((value, i) => value + more[c]![i]!));
}

/** The 6 × 6 matrix that turns a member's end movements from its nodes' axes into its own. */
export function turningOf(setup: Setup, i: number): readonly (readonly [number, number])[] {
  const { start, end, ex, ey } = setup.members[i]!;
  return [start, end].map((node) => {
    const c = setup.axes[2 * node]!;
    const s = setup.axes[2 * node + 1]!;
    return [ex * c + ey * s, ey * c - ex * s] as const;
  });
}

/** K += Tᵀ k T. */
function addTurned(setup: Setup, K: readonly Float64Array[], i: number, k: Float64Array): void {
  const T = turning6(turningOf(setup, i));
  const kT = product(k, T);
  const { start, end } = setup.members[i]!;
  const at = (r: number): number => 3 * (r < 3 ? start : end) + (r % 3);
  for (let r = 0; r < 6; r++)
    for (let c = 0; c < 6; c++) {
      let sum = 0;
      for (let m = 0; m < 6; m++) sum += T[6 * m + r]! * kT[6 * m + c]!;
      K[at(r)]![at(c)]! += sum;
    }
}

function turning6(turns: readonly (readonly [number, number])[]): Float64Array {
  const T = new Float64Array(36);
  turns.forEach(([c, s], half) => {
    const o = 21 * half;
    T[o] = c;
    T[o + 1] = s;
    T[o + 6] = -s;
    T[o + 7] = c;
    T[o + 14] = 1;
  });
  return T;
}

function product(a: Float64Array, b: Float64Array): Float64Array {
  const out = new Float64Array(36);
  for (let r = 0; r < 6; r++)
    for (let c = 0; c < 6; c++) {
      let sum = 0;
      for (let m = 0; m < 6; m++) sum += a[6 * r + m]! * b[6 * m + c]!;
      out[6 * r + c] = sum;
    }
  return out;
}
