/** What the answers of frames come to: for people, plain data. */
import type { Choice, KnownAnswers } from '@/lib/sizing/known-answers';
import type { GroupToSize, SizingProblem } from '@/lib/sizing/problem';
import {
  mostRounds,
  mostStubborn,
  type Candidate,
  type CandidateFound,
  type FrameAnswer,
  type GroupFound,
  type SizingFound,
  type Stubborn,
  type Together,
} from '@/lib/sizing/sizing';
import { totalMass } from '@/lib/sizing/total-mass';

interface Ended {
  readonly outcome: SizingFound['outcome'];
  readonly choice: Choice;
  /** By group: no candidate fits. */
  readonly none: readonly boolean[];
  readonly rounds: number;
  /** Choices that follow one another without end. */
  readonly cycle: readonly Choice[];
}

export function findings(problem: SizingProblem, known: KnownAnswers, ended: Ended): SizingFound {
  const { choice, none, outcome, rounds } = ended;
  const complete = !none.some(Boolean);
  const before = totalMass(
    problem,
    choice.map(() => -1),
  );
  const after = complete ? totalMass(problem, choice) : null;
  return {
    outcome,
    words: wordsOf(problem, ended),
    rounds,
    groups: problem.groups.map((group, g) => groupFound(problem, known, group, g, choice, none[g] ?? true)),
    together: complete ? together(problem, known, choice) : null,
    mass: before === null || after === null ? null : { before_kg: before, after_kg: after },
  };
}

function wordsOf({ groups }: SizingProblem, { outcome, rounds, none, cycle }: Ended): string {
  const named = (c: Choice): string => groups.map(({ candidates, name }, g) => `${name} ${candidates[c[g] ?? -1]?.name ?? 'as it is'}`).join(', '); // prettier-ignore
  if (outcome === 'none fits') {
    const without = groups.filter((_, g) => none[g]).map(({ name }) => name);
    return `No candidate fits every frame for ${without.join(' and ')}.`;
  }
  if (outcome === 'converged') {
    if (groups.length === 1) return 'The lightest that fits every frame.';
    return `Came to rest in round ${rounds}: with the others as chosen, each is the lightest that fits every frame.`;
  }
  const turns =
    cycle.length > 0
      ? `The choices come back without rest: ${cycle.map(named).join('; then ')}.`
      : `The choices did not come to rest in ${mostRounds} rounds.`;
  const shown = none.some(Boolean)
    ? 'None of them fits every frame together.'
    : 'Shown is the lightest of them that fits every frame together.';
  return `Not converged. ${turns} ${shown}`;
}

function groupFound(
  problem: SizingProblem,
  known: KnownAnswers,
  group: GroupToSize,
  g: number,
  choice: Choice,
  none: boolean,
): GroupFound {
  const places = [...problem.frames.keys()].filter((f) => ((problem.frames[f]?.mask ?? 0) & (1 << g)) !== 0);
  const count = (some: readonly number[]): number => some.reduce((sum, f) => sum + (problem.frames[f]?.frames ?? 0), 0);
  const candidates = group.candidates.map((candidate, c): CandidateFound => {
    const density = candidate.taken?.materials[group.material]?.density_kg_m3 ?? null;
    const told = {
      name: candidate.name,
      A_m2: candidate.A_m2,
      mass_kg_m: density === null ? null : density * candidate.A_m2,
      frames: count(places),
      unfit: candidate.unfit,
    };
    const withIt = choice.with(g, c);
    const answers = places.flatMap((f) => {
      const answer = candidate.taken ? known.get(withIt, f) : null;
      return answer ? [{ f, answer }] : [];
    });
    const of = (outcome: FrameAnswer['outcome']): number =>
      count(answers.filter(({ answer }) => answer.outcome === outcome).map(({ f }) => f));
    const worst = answers.reduce<(typeof answers)[number] | null>(
      (best, one) => (best === null || graver(one.answer, best.answer) ? one : best),
      null,
    );
    return {
      ...told,
      ratio: answers.reduce<number | null>(
        (most, { answer: { ratio } }) => (ratio !== null && !(ratio <= (most ?? -Infinity)) ? ratio : most),
        null,
      ),
      frame: worst === null ? null : (problem.frames[worst.f]?.id ?? null),
      governs: worst?.answer.governs ?? null,
      over: of('over'),
      notChecked: of('not checked'),
      notSolved: of('not solved'),
      lookedAt: count(answers.map(({ f }) => f)),
    };
  });
  const stubborn = none ? stubbornOf(problem, known, group.candidates, g, choice, places) : [];
  return {
    by: group.by,
    name: group.name,
    range: group.range,
    members: group.members,
    frames: count(places),
    chosen: none ? null : (group.candidates[choice[g] ?? -1]?.name ?? null),
    before: group.before,
    candidates,
    stubborn: stubborn.slice(0, mostStubborn),
    stubbornCount: stubborn.length,
  };
}

const gravity = { fits: 0, 'not checked': 1, over: 2, 'not solved': 3 } as const;

/** Worse: not solved, over, not checked, fits; then the larger ratio. */
function graver(a: FrameAnswer, b: FrameAnswer): boolean {
  if (gravity[a.outcome] !== gravity[b.outcome]) return gravity[a.outcome] > gravity[b.outcome];
  return (a.ratio ?? -Infinity) > (b.ratio ?? -Infinity);
}

/** Frames that fit with none of a group's candidates, each with the one that it comes nearest with; worst first. */
function stubbornOf(
  problem: SizingProblem,
  known: KnownAnswers,
  candidates: readonly Candidate[],
  g: number,
  choice: Choice,
  places: readonly number[],
): Stubborn[] {
  const found: Stubborn[] = [];
  const choices = candidates.map((_, c) => choice.with(g, c));
  for (const f of places) {
    let nearest: { readonly answer: FrameAnswer; readonly candidate: string } | null = null;
    let fits = false;
    for (const [c, candidate] of candidates.entries()) {
      const answer = candidate.taken ? known.get(choices[c] ?? choice, f) : null;
      if (!answer) continue;
      if (answer.outcome === 'fits') fits = true;
      if (nearest === null || graver(nearest.answer, answer)) nearest = { answer, candidate: candidate.name };
    }
    if (fits || nearest === null) continue;
    found.push({ frame: problem.frames[f]?.id ?? '', candidate: nearest.candidate, ...nearest.answer });
  }
  return found.sort((a, b) => (b.ratio ?? Infinity) - (a.ratio ?? Infinity));
}

function together({ frames }: SizingProblem, known: KnownAnswers, choice: Choice): Together {
  let [of, fit] = [0, 0];
  let worst: { readonly f: number; readonly answer: FrameAnswer } | null = null;
  for (const [f, frame] of frames.entries()) {
    if (frame.mask === 0) continue;
    const answer = known.get(choice, f);
    if (!answer) throw new RangeError(`Expected an answer of frame ${frame.id}`);
    of += frame.frames;
    if (answer.outcome === 'fits') fit += frame.frames;
    if (worst === null || graver(answer, worst.answer)) worst = { f, answer };
  }
  return {
    frames: of,
    fit,
    ratio: worst?.answer.ratio ?? null,
    frame: worst === null ? null : (frames[worst.f]?.id ?? null),
    governs: worst?.answer.governs ?? null,
  };
}
