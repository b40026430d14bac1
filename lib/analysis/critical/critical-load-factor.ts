import type { Frame } from '@/lib/model/frame';
import type { ResultState } from '@/lib/results/result';
import { addMember, addSupports, emptyMemberStiffness } from '../assemble';
import { factor } from '../factor';
import { memberData } from '../member-data';
import type { Topology } from '../topology';
import { axialPieces, type AxialPiece } from './axial-pieces';
import { bucklingMember, type InnerCount } from './buckling-member';

/** Room for K(λ), kept for one topology. */
export interface BucklingSpace {
  readonly K: Float64Array;
  readonly inner: Float64Array;
  readonly pivots: Float64Array;
}

export function bucklingSpace(t: Topology): BucklingSpace {
  return {
    K: new Float64Array(9 * t.blocks),
    inner: new Float64Array(6 * t.size),
    pivots: new Float64Array(3 * t.size),
  };
}

/** The load factor is found to this relative width. */
const closeness = 1e-12;

/**
 * α_cr: the smallest positive λ at which the frame, under λ times the axial forces of the first-order analysis, has an
 * adjacent position of equilibrium in its plane; null where nothing is compressed (README §4).
 *
 * The number of critical loads below a λ is counted exactly (Wittrick and Williams 1971), so none is passed over; the
 * first is then enclosed and closed in upon by the determinant, f(λ) = det K(λ)/det K(0).
 *
 * @param diagonal K's own diagonal without load, 3 a position
 */
export function criticalLoadFactor(
  frame: Frame,
  t: Topology,
  angles: Float64Array,
  diagonal: Float64Array,
  state: ResultState,
  space: BucklingSpace,
): number | null {
  const pieces = axialPieces(frame, state);
  const { cap, guess } = startingPoint(frame, pieces);
  if (cap === Infinity) return null;
  const at = (lambda: number): Trial => trial(frame, t, angles, diagonal, pieces, lambda, space);
  const reference = at(0).logSize;
  const signed = (lambda: number): number => {
    const { count, logSize } = at(lambda);
    // exactly on a pole of some piece: a hair beside it says as much
    if (!Number.isFinite(logSize)) return signed(lambda * (1 + 1e-13));
    const f = Math.exp(Math.min(700, logSize - reference));
    return count === 0 ? f : -Math.max(Number.MIN_VALUE, f ** (1 / count));
  };
  // enclose the first: below it the count is 0
  let low = 0;
  let fLow = 1;
  let high = guess;
  let fHigh = signed(high);
  while (fHigh > 0) {
    const straight = low + ((high - low) * fLow) / (fLow - fHigh);
    low = high;
    fLow = fHigh;
    if (high > 2 * cap) return null;
    high = straight > low && straight < 3 * low ? Math.max(1.02 * straight, 1.05 * low) : 3 * low;
    fHigh = signed(high);
  }
  return enclosed(signed, low, fLow, high, fHigh);
}

/** λ above which some piece has buckled between held ends, and a first guess from the members' Euler loads. */
function startingPoint(frame: Frame, pieces: readonly (readonly AxialPiece[])[]): { cap: number; guess: number } {
  let cap = Infinity;
  let euler = Infinity;
  memberData(frame).forEach((m, i) => {
    for (const piece of pieces[i]!) {
      if (!(piece.N < 0)) continue;
      cap = Math.min(cap, (4 * Math.PI ** 2 * m.EI) / (-piece.N * piece.length ** 2));
      euler = Math.min(euler, (Math.PI ** 2 * m.EI) / (-piece.N * m.length ** 2));
    }
  });
  return { cap, guess: Math.min(cap, 0.25 * euler) };
}

interface Trial {
  readonly count: number;
  readonly logSize: number;
}

/** Number of critical loads below λ, and ln|det K(λ)| with the unknowns inside members. */
function trial(
  frame: Frame,
  t: Topology,
  angles: Float64Array,
  diagonal: Float64Array,
  pieces: readonly (readonly AxialPiece[])[],
  lambda: number,
  space: BucklingSpace,
): Trial {
  const { K, inner, pivots } = space;
  const data = memberData(frame);
  const count: InnerCount = { negative: 0, logSize: 0 };
  const k = emptyMemberStiffness();
  K.fill(0);
  for (let i = 0; i < data.length; i++) {
    bucklingMember(data[i]!, pieces[i]!, lambda, k, count);
    addMember(K, t, data[i]!, k, angles);
  }
  addSupports(K, t, frame);
  factor(K, t, diagonal, inner, pivots, 0);
  for (let i = 0; i < 3 * t.size; i++) {
    const pivot = pivots[i]!;
    if (pivot < 0) count.negative++;
    count.logSize += Math.log(Math.abs(pivot));
  }
  return { count: count.negative, logSize: count.logSize };
}

/** Root of f in (a, b) where it changes sign: inverse quadratic where that is safe, else halving (Chandrupatla 1997). */
function enclosed(f: (x: number) => number, a: number, fa: number, b: number, fb: number): number {
  let x1 = b;
  let f1 = fb;
  let x2 = a;
  let f2 = fa;
  let x3 = a;
  let f3 = fa;
  let t = fa / (fa - fb);
  t = 1 - t;
  for (let pass = 0; pass < 120; pass++) {
    const x = x1 + t * (x2 - x1);
    const fx = f(x);
    if (fx > 0 === f1 > 0) {
      x3 = x1;
      f3 = f1;
    } else {
      x3 = x2;
      f3 = f2;
      x2 = x1;
      f2 = f1;
    }
    x1 = x;
    f1 = fx;
    const best = Math.abs(f1) < Math.abs(f2) ? x1 : x2;
    const width = Math.abs(x2 - x1);
    const tolerance = (0.5 * closeness * Math.abs(best)) / width;
    if (tolerance > 0.5 || f1 === 0) return best;
    const xi = (x1 - x2) / (x3 - x2);
    const phi = (f1 - f2) / (f3 - f2);
    if (phi * phi < xi && (1 - phi) * (1 - phi) < 1 - xi)
      t = (f1 / (f2 - f1)) * (f3 / (f2 - f3)) + ((x3 - x1) / (x2 - x1)) * (f1 / (f3 - f1)) * (f2 / (f3 - f2));
    else t = 0.5;
    t = Math.min(Math.max(t, tolerance), 1 - tolerance);
  }
  return (x1 + x2) / 2;
}
