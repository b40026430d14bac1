import type { Frame } from '@/lib/model/frame';
import type { ResultState } from '@/lib/results/result';
import { addMember, addSupports, emptyMemberStiffness } from '../assemble';
import { factor } from '../factor';
import { memberDataFor, type MemberData } from '../member-data';
import type { Topology } from '../topology';
import { axialForces, axialPieces, type AxialPiece } from './axial-pieces';
import { bucklingMember, pass, type InnerCount } from './buckling-member';

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

/** The load factor is found to this relative width; roughly, where it only decides how finely members are divided. */
const closeness = 1e-12;
const roughly = 1e-3;

/**
 * α_cr: the smallest positive λ at which the frame, under λ times the axial forces of the first-order analysis, has an
 * adjacent position of equilibrium in its plane; null where nothing is compressed (README §4).
 *
 * The number of critical loads below a λ is counted exactly (Wittrick and Williams 1971), so none is passed over; the
 * first is then enclosed and closed in upon by the determinant, f(λ) = det K(λ)/det K(0).
 *
 * @param diagonal K's own diagonal without load, 3 a position
 * @param state of the combination to first order; its slack members are left out, its members shear if they do there
 */
export function criticalLoadFactor(
  frame: Frame,
  t: Topology,
  angles: Float64Array,
  diagonal: Float64Array,
  state: ResultState,
  space: BucklingSpace,
): number | null {
  const forces = axialForces(frame, state);
  const data = memberDataFor(frame, state.method);
  const few = axialPieces(data, forces, 0);
  const { cap, guess } = startingPoint(data, few);
  if (cap === Infinity) return null;
  const slack = state.method?.slack ?? [];
  const at = (lambda: number, pieces: readonly (readonly AxialPiece[])[]): Trial =>
    trial({ frame, t, angles, diagonal, data, slack }, pieces, lambda, space);
  const coarse = signed((lambda) => at(lambda, few), at(0, few).logSize);
  const rough = firstEnclosed(coarse, guess, cap);
  if (rough === null) return null;
  const near = enclosed(coarse, rough, roughly);
  const pieces = axialPieces(data, forces, (near.a + near.b) / 2);
  if (pieces.every((one, i) => one.length === few[i]!.length)) return middle(enclosed(coarse, near, closeness));
  const fine = signed((lambda) => at(lambda, pieces), at((near.a + near.b) / 2, pieces).logSize);
  const around = enclosedAround(fine, (near.a + near.b) / 2, cap);
  return around && middle(enclosed(fine, around, closeness));
}

/** λ either side of a change of sign, and f there. */
interface Enclosure {
  readonly a: number;
  readonly fa: number;
  readonly b: number;
  readonly fb: number;
}
type Signed = (lambda: number) => number;

/** f(λ) above zero below the first critical load, below zero beyond it; many critical loads passed weigh by their root. */
function signed(at: (lambda: number) => Trial, reference: number): Signed {
  return function f(lambda: number): number {
    const { count, logSize } = at(lambda);
    // exactly on a pole of some piece: a hair beside it says as much
    if (!Number.isFinite(logSize)) return f(lambda * (1 + 1e-13));
    const size = Math.exp(Math.min(700, logSize - reference));
    return count === 0 ? size : -Math.max(Number.MIN_VALUE, size ** (1 / count));
  };
}

/** The first critical load from nothing: below `a` the count is 0. Null where there is none to be found. */
function firstEnclosed(f: Signed, guess: number, cap: number): Enclosure | null {
  let a = 0;
  let fa = 1;
  let b = guess;
  let fb = f(b);
  while (fb > 0) {
    const straight = a + ((b - a) * fa) / (fa - fb);
    a = b;
    fa = fb;
    if (b > 2 * cap) return null;
    b = straight > a && straight < 3 * a ? Math.max(1.02 * straight, 1.05 * a) : 3 * a;
    fb = f(b);
  }
  return { a, fa, b, fb };
}

/** The first critical load from a λ that is near it. */
function enclosedAround(f: Signed, near: number, cap: number): Enclosure | null {
  let [a, b] = [near, near];
  let fa = f(near);
  let fb = fa;
  for (let step = 0.002; fb > 0; step *= 3) {
    if (b > 2 * cap) return null;
    [a, fa] = [b, fb];
    b = near * (1 + step);
    fb = f(b);
  }
  for (let step = 0.002; fa <= 0; step *= 3) {
    [b, fb] = [a, fa];
    a = Math.max(0, near * (1 - step));
    fa = f(a);
  }
  return { a, fa, b, fb };
}

const middle = ({ a, b, fa, fb }: Enclosure): number => (Math.abs(fa) < Math.abs(fb) ? a : b);

/** λ above which some piece has buckled between held ends, and a first guess from the members' Euler loads. */
function startingPoint(data: readonly MemberData[], pieces: readonly (readonly AxialPiece[])[]): { cap: number; guess: number } {
  let cap = Infinity;
  let euler = Infinity;
  data.forEach((m, i) => {
    for (const piece of pieces[i]!) {
      if (!(piece.N < 0)) continue;
      // shear takes a critical load P to P/(1 + P/GAv)
      const sheared = (P: number): number => (m.GAv === Infinity ? P : P / (1 - (P * piece.N) / m.GAv));
      cap = Math.min(cap, sheared((4 * Math.PI ** 2 * m.EI) / (-piece.N * piece.length ** 2)));
      euler = Math.min(euler, sheared((Math.PI ** 2 * m.EI) / (-piece.N * m.length ** 2)));
    }
  });
  return { cap, guess: Math.min(cap, 0.25 * euler) };
}

/** The frame without load. */
interface Buckling {
  readonly frame: Frame;
  readonly t: Topology;
  readonly angles: Float64Array;
  readonly diagonal: Float64Array;
  readonly data: readonly MemberData[];
  readonly slack: readonly number[];
}

interface Trial {
  readonly count: number;
  readonly logSize: number;
}

/** Number of critical loads below λ, and ln|det K(λ)| with the unknowns inside members. */
function trial(
  { frame, t, angles, diagonal, data, slack }: Buckling,
  pieces: readonly (readonly AxialPiece[])[],
  lambda: number,
  space: BucklingSpace,
): Trial {
  const { K, inner, pivots } = space;
  const count: InnerCount = { negative: 0, logSize: 0, size: 1 };
  const k = emptyMemberStiffness();
  K.fill(0);
  for (let i = 0; i < data.length; i++) {
    if (slack.includes(i)) continue;
    bucklingMember(data[i]!, pieces[i]!, lambda, k, count);
    addMember(K, t, data[i]!, k, angles);
  }
  addSupports(K, t, frame);
  factor(K, t, diagonal, inner, pivots, 0);
  for (let i = 0; i < 3 * t.size; i++) pass(pivots[i]!, count);
  return { count: count.negative, logSize: count.logSize + Math.log(count.size) };
}

/** Closes in on the root of f, where it changes sign: inverse quadratic where that is safe, else halving (Chandrupatla 1997). */
function enclosed(f: Signed, { a, fa, b, fb }: Enclosure, within: number): Enclosure {
  let x1 = b;
  let f1 = fb;
  let x2 = a;
  let f2 = fa;
  let x3 = a;
  let f3 = fa;
  let t = fb / (fb - fa);
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
    const tolerance = (0.5 * within * Math.abs(best)) / Math.abs(x2 - x1);
    if (tolerance > 0.5 || f1 === 0) break;
    const xi = (x1 - x2) / (x3 - x2);
    const phi = (f1 - f2) / (f3 - f2);
    if (phi * phi < xi && (1 - phi) * (1 - phi) < 1 - xi)
      t = (f1 / (f2 - f1)) * (f3 / (f2 - f3)) + ((x3 - x1) / (x2 - x1)) * (f1 / (f3 - f1)) * (f2 / (f3 - f2));
    else t = 0.5;
    t = Math.min(Math.max(t, tolerance), 1 - tolerance);
  }
  return f1 > 0 ? { a: x1, fa: f1, b: x2, fb: f2 } : { a: x2, fa: f2, b: x1, fb: f1 };
}
