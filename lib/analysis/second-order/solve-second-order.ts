import type { Frame } from '@/lib/model/frame';
import type { MemberData } from '../member-data';
import type { Topology } from '../topology';
import { prepare, respond, standsWithoutForces, type Work } from './equilibrium-pass';
import type { LengtheningEstimate } from './lengthening';
import { forget, nextGuess } from './next-guess';
import { recoverSecondOrder } from './recover-second-order';
import { givingWay } from './giving-way';
import { repels } from './repels';
import type { SecondOrderSpace } from './second-order-space';

/** One combination, and how its members are taken. */
export interface SecondOrderInput {
  readonly frame: Frame;
  readonly t: Topology;
  readonly angles: Float64Array;
  /** memberDataFor(frame, method). */
  readonly data: readonly MemberData[];
  /** By member, 1 = slack: left out, its loads act on its nodes as a simple beam's; null = none. */
  readonly slack: Uint8Array | null;
  /** By case, as the combination has them. */
  readonly factors: Float64Array;
  /** Analysed under this many times the loads; results come back divided by it. */
  readonly loadScale: number;
  /** Fx, Fy by node, global, N, as they act at `loadScale` times the loads; null = none. */
  readonly notional: Float64Array | null;
  /** First-order N at each member's start under the combination as it is, to begin with; null = from nothing. */
  readonly guess: Float64Array | null;
  readonly space: SecondOrderSpace;
}

export type SecondOrderResult = SecondOrderState | SecondOrderFailure;
/** As in a `ResultState`; `outOfBalance` and `handled` as recover.ts has them. */
export interface SecondOrderState {
  readonly ok: true;
  readonly displacements: Float64Array;
  readonly reactions: Float64Array;
  readonly endForces: Float64Array;
  readonly outOfBalance: Float64Array;
  readonly handled: number;
  /** Passes until the axial forces stood still, and their last change against the largest of them. */
  readonly iterations: number;
  readonly change: number;
  /** What the lengthening of turned members would change, which is left out. */
  readonly lengthening: LengtheningEstimate;
}
export interface SecondOrderFailure {
  readonly ok: false;
  /** Share of the combination's load up to which stable equilibrium was followed, 0 to 1. */
  readonly reached: number;
  /**
   * unstable: past a critical load · too far: a member turns by more than `mostTurn` · mechanism: not held even without axial
   * forces · not settled: axial forces went on changing.
   */
  readonly why: 'unstable' | 'too far' | 'mechanism' | 'not settled';
  /** Too far: the member (index) that turns. */
  readonly member?: number;
  /** How it gives way, to the side that it leans to, 3 a node along node axes; where slack ties might catch it. */
  readonly movement?: Float64Array;
}

/** Axial forces stand still when none changes by more than this share of the largest. */
const still = 1e-10;
/** What stiffness × movement loses by rounding counts as still too. */
const rounding = 4e-15;
const mostPasses = 60;
/** … and where they go on flickering by no more than this. */
const enough = 1e-8;
/**
 * By how much the line between a member's ends may turn, rad: sin and cos are then within 0.5 % of what small displacements take
 * for them. Beyond, equations that are linear in the movements go on having a solution past a critical load, at sways of metres.
 */
export const mostTurn = 0.1;
/** Where the second pass still changes this share of what the first did, axial forces decide whether the state is held. */
const hesitant = 0.3;
/** The share of the load at which equilibrium is lost is closed in on to this. */
const closeness = 1e-3;

/**
 * Second-order elastic equilibrium of one combination (README §8): members exactly under their axial forces, P-Δ and P-δ,
 * repeated until the axial forces stand still.
 *
 * K(N) must be positive definite, members between their nodes too, at every load share taken, no member may turn too far, and
 * the axial forces must not run away from the state when disturbed, so that an equilibrium beyond a critical load is never
 * given: where the whole load can't be reached from the first-order forces at once, it is put on in steps.
 */
export function solveSecondOrder(input: SecondOrderInput): SecondOrderResult {
  const work = prepare(input, 2);
  if (input.slack && !standsWithoutForces(work)) return { ok: false, reached: 0, why: 'mechanism' };
  const { N } = input.space;
  if (input.guess) for (let i = 0; i < N.length; i++) N[i] = input.guess[i]! * input.loadScale;
  else N.fill(0);
  let straight = settle(work, 1, true);
  while (straight.how === 'still' && straight.held < hesitant && work.turn <= mostTurn) {
    const state = recoverSecondOrder(work, straight.change);
    if (!straight.foreseen || state.change <= still) return state;
    straight = settle(work, 1);
  }
  return inSteps(work);
}

/** First-order equilibrium of one combination where cases can't be summed: slack members, reduced stiffness, notional forces. */
export function firstOrderCombination(input: SecondOrderInput): SecondOrderResult {
  const work = prepare(input, 1);
  if (!standsWithoutForces(work)) return { ok: false, reached: 0, why: 'mechanism' };
  if (!respond(work)) return { ok: false, reached: 0, why: 'mechanism' };
  return recoverSecondOrder(work, 0);
}

interface Settled {
  readonly how: 'still' | 'unstable' | 'moving';
  readonly change: number;
  /** What the second pass changed of what the first did. */
  readonly held: number;
  /** The next pass would have changed nothing any more, by what the last one changed of the one before. */
  readonly foreseen?: boolean;
}

/**
 * Repeats N ← share × (answer to N) from the N at hand until it stands still, each time with what the last passes say of the
 * next, so that a slow or swinging approach is a short one.
 * @param foresee stop one pass short where that would change nothing: recovery makes up for it and says what is left
 */
function settle(work: Work, share: number, foresee = false): Settled {
  const { N, answer, loadings, passes } = work.input.space;
  let change = Infinity;
  let held = 0;
  let begun = 0;
  let before = Infinity;
  work.share = share;
  let ahead = false;
  forget(passes);
  for (let pass = 0; pass < mostPasses; pass++) {
    if (!respond(work)) {
      if (!ahead) return { how: 'unstable', change, held };
      // too far ahead: on from the answer itself
      N.set(passes.answer);
      forget(passes);
      ahead = false;
      continue;
    }
    let size = 0;
    let moved = 0;
    for (let i = 0; i < N.length; i++) {
      const next = share * answer[i]!;
      size = Math.max(size, Math.abs(next), Math.abs(next + share * loadings[i]!.endN));
      moved = Math.max(moved, Math.abs(next - N[i]!));
      answer[i] = next;
    }
    if (!Number.isFinite(moved)) return { how: 'unstable', change, held };
    change = size > 0 ? moved / size : 0;
    if (moved <= still * size + rounding * share * work.handled) {
      N.set(answer);
      return { how: 'still', change, held };
    }
    if (pass === 0) begun = moved;
    else if (pass === 1) held = moved / begun;
    if (foresee && pass > 0 && (moved / before) * moved <= 0.2 * still * size) {
      N.set(answer);
      return { how: 'still', change, held, foreseen: true };
    }
    before = moved;
    ahead = nextGuess(N, answer, passes);
  }
  N.set(answer);
  // what is left is rounding that equilibrium near a critical load makes more of
  return { how: change <= enough ? 'still' : 'moving', change, held };
}

/** The load put on in steps, each from the equilibrium before it, halved where it is too long. */
function inSteps(work: Work): SecondOrderResult {
  const { input } = work;
  const { N } = input.space;
  const kept = new Float64Array(N.length);
  let reached = 0;
  let failure: Pick<SecondOrderFailure, 'why' | 'member'> = { why: 'unstable' };
  for (let step = 0.5; step >= closeness;) {
    const share = Math.min(1, reached + step);
    for (let i = 0; i < N.length; i++) N[i] = reached > 0 ? (kept[i]! * share) / reached : 0;
    const settled = settle(work, share);
    const trouble = troubleAt(work, settled, share);
    if (trouble) {
      step /= 2;
      failure = trouble;
    } else {
      if (share === 1) return recoverSecondOrder(work, settled.change);
      kept.set(N);
      reached = share;
    }
  }
  if (reached === 0 && !standsWithoutForces(work)) return { ok: false, reached, why: 'mechanism' };
  if (!input.slack) return { ok: false, reached, ...failure };
  N.set(kept);
  return { ok: false, reached, ...failure, movement: givingWay(work, reached) };
}

/** Why the state at a load share is none; null where it is one. */
function troubleAt(work: Work, { how, change, held }: Settled, share: number): Pick<SecondOrderFailure, 'why' | 'member'> | null {
  // axial forces that find no equilibrium at all have none: the load they can carry is passed
  if (how !== 'still') return { why: how === 'unstable' || change > 1e-6 ? 'unstable' : 'not settled' };
  if (share * work.turn > mostTurn) return { why: 'too far', member: work.turned };
  return held >= hesitant && repels(work, share) ? { why: 'unstable' } : null;
}
