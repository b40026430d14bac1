import type { Frame } from '@/lib/model/frame';
import type { ResultState } from '@/lib/results/result';
import { memberLine } from '../member-line';
import { evaluate } from '../polynomial';
import { prepare, respond } from './equilibrium-pass';
import { leastShare, meanLengthening, outermost } from './lengthening';
import { emptyPasses, forget, nextGuess } from './next-guess';
import { recoverSecondOrder } from './recover-second-order';
import type { SecondOrderInput } from './solve-second-order';

/** What a state comes to where members lengthen as they turn, against what it is without: shares, Infinity = no equilibrium. */
export interface Lengthened {
  /** By how much the outermost strain of a member grows, the most of all. */
  readonly growth: number;
  /** By how much a member's axial strain or its bending strain changes, either way, against its outermost. */
  readonly change: number;
  /** The member (index) that changes the most. */
  readonly member: number;
  /** By how much the largest movement of a node grows. */
  readonly movements: number;
}

const mostPasses = 60;
/** Strains stand still when none changes by more than this share of the largest: a hundredth of what is asked. */
const still = 5e-4;
/** Strains below this are none: 0.02 MPa in steel. */
const nothing = 1e-7;
/** Places along a stretch of a line at which it is looked at. */
const places = [0, 0.25, 0.5, 0.75, 1];

/**
 * The same equilibrium with N = EA(e + lengthening), from the state itself on: exact for moderate turns but for what members
 * bow. For states that `lengtheningEstimate` finds suspect: it costs some ten times a state. README §8.
 *
 * @param input of the state: loads, notional forces, slack members and stiffness as it has them
 */
export function lengthenedState(input: SecondOrderInput, state: ResultState): Lengthened {
  const { frame, data, loadScale, space, slack } = input;
  const { N, answer, held } = space;
  const n = data.length;
  const work = prepare(input, 2);
  const clamped = held.slice();
  const passes = emptyPasses(2 * n);
  const own = strainsOf(frame, state, data, slack);
  const most = Math.max(nothing, loadScale * Math.max(...own.outermost));
  // N, then the pull of the lengthening
  const x = new Float64Array(2 * n);
  const next = new Float64Array(2 * n);
  for (let i = 0; i < n; i++) x[i] = state.endForces[6 * i]! * loadScale;
  let found: ResultState | null = null;
  let ahead = false;
  for (let pass = 0; pass < mostPasses && !found; pass++) {
    for (let i = 0; i < n; i++) {
      // a tie bends as in the state: one that is hardly pulled would be now pressed, now not
      N[i] = frame.members[i]!.tensionOnly ? state.endForces[6 * i]! * loadScale : x[i]!;
      held[i] = clamped[i]! + x[n + i]!;
    }
    if (!respond(work)) {
      if (!ahead) break;
      // too far ahead: on from the answer itself
      x.set(passes.answer);
      forget(passes);
      ahead = false;
      continue;
    }
    for (let i = 0; i < n; i++) if (!frame.members[i]!.tensionOnly) N[i] = answer[i]!;
    const { displacements, reactions, endForces } = recoverSecondOrder(work, 0);
    next.set(answer);
    pullsOf(input, next);
    let change = 0;
    for (let i = 0; i < 2 * n; i++) change = Math.max(change, Math.abs(next[i]! - x[i]!) / data[i % n]!.EA);
    if (!Number.isFinite(change)) break;
    if (change <= still * most) found = { ...state, displacements, reactions, endForces };
    else ahead = nextGuess(x, next, passes);
  }
  held.set(clamped);
  if (!found) return { growth: Infinity, change: Infinity, member: 0, movements: Infinity };
  return { ...differences(own, strainsOf(frame, found, data, slack)), movements: growthOfMovements(state, found) };
}

/** EA × lengthening by member into the second half of `to`; turns as recovery left them. */
function pullsOf({ frame, data, slack, space: { chords, turns } }: SecondOrderInput, to: Float64Array): void {
  data.forEach(({ EA }, i) => {
    if (slack?.[i]) return;
    const chord = chords[i]!;
    const tie = frame.members[i]!.tensionOnly;
    to[data.length + i] = EA * meanLengthening(chord, tie ? chord : turns[2 * i]!, tie ? chord : turns[2 * i + 1]!);
  });
}

/** By member, of results (÷ the load scale): the largest |N|/EA, |M| c/EI and their sum along it. */
interface Strains {
  readonly axial: number[];
  readonly bending: number[];
  readonly outermost: number[];
}

function strainsOf(frame: Frame, state: ResultState, data: SecondOrderInput['data'], slack: Uint8Array | null): Strains {
  const row = (): number[] => data.map(() => 0);
  const strains = { axial: row(), bending: row(), outermost: row() };
  data.forEach((m, i) => {
    if (slack?.[i]) return;
    const tie = frame.members[i]!.tensionOnly;
    for (const { from, to, N, M } of memberLine(frame, state, i).segments)
      for (const place of places) {
        const force = evaluate(N, place * (to - from));
        // a tie that is pressed goes slack, and how far it sags is nothing to its strength
        const pulled = (tie ? Math.max(0, force) : Math.abs(force)) / m.EA;
        const bent = tie ? 0 : (Math.abs(evaluate(M, place * (to - from))) * outermost(m)) / m.EI;
        strains.axial[i] = Math.max(strains.axial[i]!, pulled);
        strains.bending[i] = Math.max(strains.bending[i]!, bent);
        strains.outermost[i] = Math.max(strains.outermost[i]!, pulled + bent);
      }
  });
  return strains;
}

function differences(before: Strains, after: Strains): Omit<Lengthened, 'movements'> {
  const least = Math.max(nothing, leastShare * Math.max(...before.outermost));
  let [growth, change, worst, member] = [0, 0, 0, 0];
  before.outermost.forEach((own, i) => {
    const size = Math.max(own, least);
    const grows = (after.outermost[i]! - own) / size;
    const parts = [after.axial[i]! - before.axial[i]!, after.bending[i]! - before.bending[i]!].map((by) => Math.abs(by) / size);
    growth = Math.max(growth, grows);
    change = Math.max(change, ...parts);
    if (Math.max(grows, ...parts) > worst) [worst, member] = [Math.max(grows, ...parts), i];
  });
  return { growth, change, member };
}

function growthOfMovements({ displacements: a }: ResultState, { displacements: b }: ResultState): number {
  let most = 0;
  let growth = 0;
  for (let o = 0; o < a.length; o += 3) {
    const before = Math.hypot(a[o]!, a[o + 1]!);
    most = Math.max(most, before);
    growth = Math.max(growth, Math.hypot(b[o]!, b[o + 1]!) - before);
  }
  return most > 0 ? growth / most : 0;
}
