/** The search for the lightest sections: which frames must be asked what, and what follows from their answers. */
import { findings } from '@/lib/sizing/findings';
import { asItIs, type Choice, type KnownAnswers } from '@/lib/sizing/known-answers';
import type { SizingProblem } from '@/lib/sizing/problem';
import { mostRounds, type SizingFound } from '@/lib/sizing/sizing';
import { totalMass } from '@/lib/sizing/total-mass';

/** Frames that are to be asked about a choice; their answers are put among what is known before the search goes on. */
export interface Wanted {
  readonly choice: Choice;
  /** Places among the problem's frames, those first that matter first. */
  readonly frames: readonly number[];
}

/** Masses closer than this are equal; so are ratios. */
const same = 1e-9;

/** Frames asked before the next look: a candidate that fails does so in the frames that failed before. */
const firstStep = 2;

/**
 * For each group the lightest candidate with which every frame that has members of it fits, the other groups as they are chosen
 * by then: group after group, round after round, until a round changes nothing. It begins with what members have now; where no
 * candidate fits, the heaviest stands in for the group so that the others can be judged, and it is tried again the next round.
 * Equal masses: the smaller ratio, then the order of the range. Choices that come back without rest, or after `mostRounds`
 * rounds, are "not converged": of what was chosen after each round the lightest that fits together is taken.
 *
 * (Once every group has a candidate that fits, what was chosen before still fits, so that masses only fall and rest is certain;
 * without rest are only groups for which now and then none fits.)
 *
 * At the end every candidate is looked at in every frame, the other groups as chosen, so that counts are true.
 *
 * What it yields depends on answers alone, in an order of its own: begun anew with the same answers known it comes to the same
 * place, so that a search can be taken up again.
 *
 * @throws {RangeError} where an answer that was asked for is not known when it goes on
 */
export function* chooseSections(problem: SizingProblem, known: KnownAnswers): Generator<readonly Wanted[], SizingFound> {
  const search = new Search(problem, known);
  let choice: Choice = problem.groups.map(() => asItIs);
  const visited: Choice[] = [];
  let outcome: SizingFound['outcome'] = 'not converged';
  let none: readonly boolean[] = [];
  let rounds = 0;
  let cycle: readonly Choice[] = [];
  while (rounds < mostRounds) {
    rounds += 1;
    const next = [...choice];
    const without = problem.groups.map(() => false);
    for (const g of problem.groups.keys()) {
      const picked = yield* search.pick(g, next);
      without[g] = picked === null;
      next[g] = picked ?? search.heaviest(g);
    }
    none = without;
    const still = next.every((c, g) => c === choice[g]);
    choice = next;
    if (still) {
      outcome = none.some(Boolean) ? 'none fits' : 'converged';
      break;
    }
    const before = visited.findIndex((one) => one.every((c, g) => c === next[g]));
    if (before >= 0) {
      cycle = visited.slice(before);
      break;
    }
    visited.push(choice);
  }
  if (outcome === 'not converged') {
    const best = yield* search.lightestTogether(visited);
    if (best) choice = best;
    none = problem.groups.map(() => best === null);
  }
  const chosen = choice;
  yield* search.ask([{ choice: chosen, frames: search.inOrder(null) }]);
  for (const [g, { candidates }] of problem.groups.entries()) {
    const rest = candidates.flatMap(({ taken }, c) => (taken ? [{ choice: chosen.with(g, c), frames: search.inOrder(g) }] : []));
    yield* search.ask(rest);
  }
  return findings(problem, known, { outcome, choice: chosen, none, rounds, cycle });
}

type Asking<T> = Generator<readonly Wanted[], T>;

class Search {
  /** By group: candidates that can be had, the lightest first, those of equal mass in the order of the range. */
  private readonly byMass: readonly (readonly number[])[];
  /** By group: frames that have members of it, those first that failed last. */
  private readonly queues: number[][];

  constructor(
    private readonly problem: SizingProblem,
    private readonly known: KnownAnswers,
  ) {
    const { groups, frames } = problem;
    this.byMass = groups.map(
      ({ candidates }) =>
      [...candidates.keys()].filter((c) => candidates[c]?.taken).sort((a, b) => this.area(candidates[a]) - this.area(candidates[b]) || a - b), // prettier-ignore
    );
    const worst = [...frames.keys()].sort((a, b) => (frames[b]?.ratio ?? 0) - (frames[a]?.ratio ?? 0) || a - b);
    this.queues = groups.map((_, g) => worst.filter((f) => ((frames[f]?.mask ?? 0) & (1 << g)) !== 0));
  }

  private area(candidate: { readonly A_m2: number } | undefined): number {
    return candidate?.A_m2 ?? 0;
  }

  heaviest(g: number): number {
    return this.byMass[g]?.at(-1) ?? asItIs;
  }

  /** Frames with members of a group, or of any. */
  inOrder(g: number | null): readonly number[] {
    if (g !== null) return [...(this.queues[g] ?? [])].sort((a, b) => a - b);
    return [...this.problem.frames.keys()].filter((f) => (this.problem.frames[f]?.mask ?? 0) !== 0);
  }

  /** Asks for what is not known yet of all these. */
  *ask(all: readonly Wanted[]): Asking<void> {
    const wanted = all
      .map(({ choice, frames }) => ({ choice, frames: frames.filter((f) => this.known.get(choice, f) === null) }))
      .filter(({ frames }) => frames.length > 0);
    if (wanted.length === 0) return;
    yield wanted;
    for (const { choice, frames } of wanted)
      for (const f of frames) if (this.known.get(choice, f) === null) throw new RangeError(`Expected an answer of frame ${f}`);
  }

  /** The lightest candidate of a group that fits; null where none does. */
  *pick(g: number, others: Choice): Asking<number | null> {
    const order = this.byMass[g] ?? [];
    for (let from = 0; from < order.length;) {
      const first = this.area(this.problem.groups[g]?.candidates[order[from] ?? -1]);
      let to = from + 1;
      while (to < order.length && this.area(this.problem.groups[g]?.candidates[order[to] ?? -1]) - first <= same * first) to += 1;
      let best: { readonly c: number; readonly ratio: number } | null = null;
      for (const c of order.slice(from, to)) {
        const ratio: number | null = yield* this.fits(g, others.with(g, c));
        if (ratio !== null && (best === null || ratio < best.ratio - same)) best = { c, ratio };
      }
      if (best) return best.c;
      from = to;
    }
    return null;
  }

  /** The largest ratio where every frame of the group fits; null where one does not, after which no other is asked. */
  private *fits(g: number, choice: Choice): Asking<number | null> {
    const queue = this.queues[g] ?? [];
    let largest = 0;
    for (let from = 0, step = firstStep; from < queue.length; from += step, step *= 4) {
      const some = queue.slice(from, from + step);
      yield* this.ask([{ choice, frames: some }]);
      for (const [i, f] of some.entries()) {
        const answer = this.known.get(choice, f);
        if (answer?.outcome === 'fits') {
          largest = Math.max(largest, answer.ratio ?? 0);
          continue;
        }
        queue.splice(from + i, 1);
        queue.unshift(f);
        return null;
      }
    }
    return queue.length === 0 ? null : largest;
  }

  /** Of several choices the lightest with which every frame fits; null where there is none. */
  *lightestTogether(choices: readonly Choice[]): Asking<Choice | null> {
    let best: { readonly choice: Choice; readonly mass: number } | null = null;
    for (const choice of choices) {
      const frames = this.inOrder(null);
      yield* this.ask([{ choice, frames }]);
      if (!frames.every((f) => this.known.get(choice, f)?.outcome === 'fits')) continue;
      const mass = totalMass(this.problem, choice) ?? Infinity;
      if (best === null || mass < best.mass) best = { choice, mass };
    }
    return best?.choice ?? null;
  }
}
