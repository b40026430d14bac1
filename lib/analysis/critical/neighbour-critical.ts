import type { Frame } from '@/lib/model/frame';
import type { ResultState } from '@/lib/results/result';
import { emptyMemberStiffness } from '../assemble';
import { endForces, toLocal } from '../load-vectors';
import { memberDataFor } from '../member-data';
import { solve } from '../solve';
import type { Topology } from '../topology';
import { axialForces, axialPieces, type AxialForces, type AxialPiece } from './axial-pieces';
import { bucklingMember } from './buckling-member';
import { trial, type Buckling, type BucklingSpace } from './buckling-trial';
import { criticalLoadFactor } from './critical-load-factor';
import { enclosed, middle, signed } from './enclosure';

/**
 * What one combination of a frame leaves for the next: its buckled shape, and how much the axial forces do along it.
 * It begins empty with each frame and goes through its combinations in their order, so that results depend on nothing else.
 */
export interface CriticalMemory {
  /** Movements of all nodes in the shape, 3 a node, node axes; not yet known where `lambda` is 0. */
  readonly shape: Float64Array;
  /** By member: ∫v′² dx in the shape, which its compression works on, m. */
  readonly stretch: Float64Array;
  /** The same by unknown, 3 a position, and what the last inverse iteration was asked for. */
  readonly z: Float64Array;
  readonly asked: Float64Array;
  lambda: number;
  /** Σ compression × stretch of the combination that it comes from. */
  work: number;
  slack: readonly number[];
}

export function criticalMemory(frame: Frame, t: Topology): CriticalMemory {
  return {
    shape: new Float64Array(3 * frame.nodes.length),
    stretch: new Float64Array(frame.members.length),
    z: new Float64Array(3 * t.size),
    asked: new Float64Array(3 * t.size),
    lambda: 0,
    work: 0,
    slack: [],
  };
}

/** How closely the estimate is first enclosed; between ends so near the determinant is a straight line to 1e-12. */
const hair = 2e-6;

/**
 * α_cr as critical-load-factor.ts finds it, begun from the buckled shape of the combination before: that shape under these
 * axial forces gives λ to first order, one factorisation there and one inverse iteration the shape, Rayleigh's quotient of
 * this λ to the square of what the shape lacks, and two factorisations a hair to both sides prove it: no critical load below
 * the lower, one below the upper (Wittrick and Williams 1971). Where they don't, it is found from nothing.
 */
export function nextCriticalLoadFactor(
  frame: Frame,
  t: Topology,
  angles: Float64Array,
  diagonal: Float64Array,
  state: ResultState,
  space: BucklingSpace,
  memory: CriticalMemory,
): number | null {
  const slack = state.method?.slack ?? [];
  const data = memberDataFor(frame, state.method);
  const frameNow: Buckling = { frame, t, angles, diagonal, data, slack };
  const work = workOf(state, memory);
  if (memory.lambda > 0 && slack.join() === memory.slack.join() && work > 0) {
    const forces = axialForces(frame, state);
    const found = polish(frameNow, state, forces, (memory.lambda * memory.work) / work, space, memory);
    if (found !== null) {
      keep(frameNow, state, memory, found);
      return found;
    }
  }
  const found = criticalLoadFactor(frame, t, angles, diagonal, state, space);
  if (found !== null) {
    memory.z.fill(1);
    const pieces = axialPieces(data, axialForces(frame, state), found);
    trial(frameNow, pieces, found * (1 - hair), space);
    for (let pass = 0; pass < 3; pass++) iterate(frameNow, space, memory);
    keep(frameNow, state, memory, found);
  }
  return found;
}

/** α_cr from a guess; null where it can't be proved to be the first. */
function polish(
  now: Buckling,
  state: ResultState,
  forces: AxialForces,
  guess: number,
  space: BucklingSpace,
  memory: CriticalMemory,
  again = false,
): number | null {
  const pieces = axialPieces(now.data, forces, guess);
  const first = trial(now, pieces, guess, space);
  if (!Number.isFinite(first.logSize)) return null;
  const h0 = iterate(now, space, memory);
  spread(now, memory);
  alongShape(now, memory);
  const estimate = rayleigh(now, pieces, guess, h0, workOf(state, memory), memory);
  if (!(estimate > 0.2 * guess && estimate < 5 * guess)) return null;
  // members are divided as finely as the λ found asks for
  if (!again && Math.abs(estimate / guess - 1) > 0.01) return polish(now, state, forces, estimate, space, memory, true);
  const f = signed((lambda) => trial(now, pieces, lambda, space), first.logSize);
  let a = estimate * (1 - hair);
  let b = estimate * (1 + hair);
  let fa = f(a);
  let fb = f(b);
  // on one side of it after all: further out there, twice
  for (let wider = 30 * hair, tries = 0; tries < 2 && fa > 0 === fb > 0; wider *= 30, tries++)
    if (fa > 0) [a, fa, b, fb] = [b, fb, estimate * (1 + wider), f(estimate * (1 + wider))];
    else [a, fa, b, fb] = [estimate * (1 - wider), f(estimate * (1 - wider)), a, fa];
  if (!(fa > 0 && fb <= 0)) return null;
  if (b - a < 3 * hair * estimate) return a + ((b - a) * fa) / (fa - fb);
  return middle(enclosed(f, { a, fa, b, fb }, 1e-11));
}

/** z ← K⁻¹ D z with K as last factored, its largest movement 1. @returns zᵀ K z */
function iterate({ t, diagonal }: Buckling, { K, inner }: BucklingSpace, { z, asked }: CriticalMemory): number {
  for (let p = 0; p < t.size; p++)
    for (let r = 0; r < 3; r++) {
      const i = 3 * p + r;
      z[i] = t.free[3 * t.nodeAt[p]! + r] ? diagonal[i]! * z[i]! : 0;
    }
  asked.set(z);
  solve(K, t, inner, z, 1);
  let largest = 0;
  for (let i = 0; i < z.length; i++) largest = Math.max(largest, Math.abs(z[i]!));
  let energy = 0;
  for (let i = 0; i < z.length; i++) {
    z[i] = z[i]! / largest;
    energy += (z[i]! * asked[i]!) / largest;
  }
  return energy;
}

/** The shape as all nodes have it. */
function spread({ t }: Buckling, { z, shape }: CriticalMemory): void {
  for (let i = 0; i < z.length; i++) shape[3 * t.nodeAt[(i / 3) | 0]! + (i % 3)] = z[i]!;
}

const u = new Float64Array(6);
const q = new Float64Array(6);
const k = emptyMemberStiffness();
const ignored = { negative: 0, logSize: 0, size: 1 };

/**
 * The λ near `guess` at which zᵀK(λ)z is nought: by what the axial forces do along z to begin with, then a secant.
 * @param h0 zᵀK(guess)z
 */
function rayleigh(
  now: Buckling,
  pieces: readonly (readonly AxialPiece[])[],
  guess: number,
  h0: number,
  work: number,
  memory: CriticalMemory,
): number {
  const l1 = guess + h0 / work;
  if (Math.abs(l1 / guess - 1) < 1e-9) return l1;
  const h1 = energy(now, pieces, l1, memory);
  const l2 = l1 - (h1 * (l1 - guess)) / (h1 - h0);
  // the secant's error is about a tenth of the product of both distances
  if (Math.abs(l2 / guess - 1) * Math.abs(l2 / l1 - 1) < 1e-6) return l2;
  const h2 = energy(now, pieces, l2, memory);
  return l2 - (h2 * (l2 - l1)) / (h2 - h1);
}

/** zᵀ K(λ) z, member by member. */
function energy(now: Buckling, pieces: readonly (readonly AxialPiece[])[], lambda: number, { shape }: CriticalMemory): number {
  const { frame, data, angles, slack } = now;
  let sum = 0;
  for (let i = 0; i < data.length; i++) {
    if (slack.length > 0 && slack.includes(i)) continue;
    const m = data[i]!;
    ignored.size = 1;
    bucklingMember(m, pieces[i]!, lambda, k, ignored);
    toLocal(m, angles, shape, 3 * m.start, 3 * m.end, u);
    endForces(k, u, q);
    for (let r = 0; r < 6; r++) sum += u[r]! * q[r]!;
  }
  for (const { node, ux, uy, rz } of frame.supports) {
    if (typeof ux === 'number') sum += ux * shape[3 * node]! ** 2;
    if (typeof uy === 'number') sum += uy * shape[3 * node + 1]! ** 2;
    if (typeof rz === 'number') sum += rz * shape[3 * node + 2]! ** 2;
  }
  return sum;
}

/** ∫v′² dx of each member in the shape. */
function alongShape({ data, angles }: Buckling, { stretch, shape }: CriticalMemory): void {
  for (let i = 0; i < data.length; i++) {
    const m = data[i]!;
    toLocal(m, angles, shape, 3 * m.start, 3 * m.end, u);
    const turn = (u[4]! - u[1]!) / m.length;
    // ends from the chord; a pin turns as the other end bends it
    let a = u[2]! - turn;
    let b = u[5]! - turn;
    if (m.startSpring === 0) a = m.endSpring === 0 ? 0 : -b / 2;
    if (m.endSpring === 0) b = m.startSpring === 0 ? 0 : -a / 2;
    stretch[i] = m.length * (turn * turn + (2 * a * a - a * b + 2 * b * b) / 15);
  }
}

/** Leaves the shape at hand for the next combination. */
function keep(now: Buckling, state: ResultState, memory: CriticalMemory, lambda: number): void {
  spread(now, memory);
  alongShape(now, memory);
  memory.slack = now.slack;
  memory.work = workOf(state, memory);
  memory.lambda = memory.work > 0 ? lambda : 0;
}

/** Σ mean compression × stretch. */
function workOf({ endForces: forces }: ResultState, { stretch }: CriticalMemory): number {
  let sum = 0;
  for (let i = 0; i < stretch.length; i++) sum -= 0.5 * (forces[6 * i]! + forces[6 * i + 3]!) * stretch[i]!;
  return sum;
}
