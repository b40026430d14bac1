import type { Frame } from '@/lib/model/frame';
import type { ResultState } from '@/lib/results/result';
import { memberDataFor, type MemberData } from '../member-data';
import type { Topology } from '../topology';
import { axialForces, axialPieces, type AxialPiece } from './axial-pieces';
import { trial, type BucklingSpace, type Trial } from './buckling-trial';
import { enclosed, enclosedAround, middle, signed, type Enclosure, type Signed } from './enclosure';

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
