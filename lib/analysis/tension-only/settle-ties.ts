/** How one set of slack members turned out. */
export type TieTrial<T> =
  | {
      readonly ok: true;
      readonly solution: T;
      /** Force by tie, N, in the order of `ties`: of a taut one its mean axial force, of a slack one what it would take up. */
      readonly forces: Float64Array;
      /** Forces up to this size are none: a tie without force is slack. */
      readonly nothing: number;
    }
  | {
      readonly ok: false;
      readonly why: string;
      /** The frame moves freely, and whichever way it does, some tie is stretched. */
      readonly caught: boolean;
      /** How far each tie is stretched as it does, in the order of `ties`, up to a common factor of any sign. */
      readonly stretches?: readonly number[];
      /** Unstable: how far each tie is stretched as the frame gives way, to the side that it leans to. */
      readonly pulls?: readonly number[];
    };

export type SettledTies<T> =
  | { readonly ok: true; readonly solution: T; readonly slack: readonly number[]; readonly passes: number }
  | {
      readonly ok: false;
      /** Members (index) that kept changing, or that are slack where the frame can't stand without them. */
      readonly members: readonly number[];
      readonly passes: number;
      /** What stopped it: a set met before, the number of passes, or why a set could not be analysed. */
      readonly why: 'repeated' | 'passes' | { readonly trial: string };
    };

/** Passes after which no set is looked for any longer (engine, Second order and stability) … */
const mostPasses = 50;
/** … and for each tie where they change one by one: a tall bent has more of them than that. */
const mostOfEach = 3;

/**
 * Which tension-only members are slack: taut ones without tension are let go, slack ones that would be stretched are taken
 * up again, from a first set, until none changes.
 *
 * All of them change at once first, which settles almost every frame in two or three passes; where a set comes up again, or
 * the frame can't stand with one, it is begun anew with only the worst changing in each pass. There a tie without any force
 * stays taut if the frame could move freely without it and yet some tie would catch it either way: a braced bay under
 * gravity alone. One that is pressed there gives way to the slack one that would be stretched the most as it shortens: a
 * storey that leans one way under its own weight.
 *
 * @param ties members, ascending   @param analyse one set of slack members, ascending   @param start slack at first
 */
export function settleTies<T>(
  ties: readonly number[],
  analyse: (slack: readonly number[]) => TieTrial<T>,
  start: readonly number[] = [],
): SettledTies<T> {
  let passes = 0;
  const trial = (slack: readonly number[]): TieTrial<T> => {
    passes++;
    return analyse(slack);
  };
  return allAtOnce(ties, start, trial, () => passes) ?? oneByOne(ties, start, trial, () => passes);
}

const ascending = (members: Iterable<number>): number[] => [...members].sort((a, b) => a - b);

type Analyse<T> = (slack: readonly number[]) => TieTrial<T>;

/** Null where one by one must be tried. */
function allAtOnce<T>(
  ties: readonly number[],
  start: readonly number[],
  analyse: Analyse<T>,
  passes: () => number,
): SettledTies<T> | null {
  const seen = new Set<string>();
  const changed = new Set<number>();
  let slack = start;
  while (!seen.has(slack.join())) {
    if (passes() >= mostPasses) return { ok: false, members: ascending(changed), passes: passes(), why: 'passes' };
    seen.add(slack.join());
    const trial = analyse(slack);
    if (!trial.ok && (slack !== start || trial.pulls)) return null;
    if (!trial.ok) return { ok: false, members: slack, passes: passes(), why: { trial: trial.why } };
    const turning = wrong(ties, slack, trial.forces, trial.nothing);
    if (turning.length === 0) return { ok: true, solution: trial.solution, slack, passes: passes() };
    for (const member of turning) changed.add(member);
    slack = turned(ties, slack, turning);
  }
  return null;
}

function oneByOne<T>(
  ties: readonly number[],
  start: readonly number[],
  analyse: Analyse<T>,
  passes: () => number,
): SettledTies<T> {
  const last = Math.max(mostPasses, mostOfEach * ties.length);
  const seen = new Set<string>([start.join()]);
  const changed = new Set<number>();
  const kept = new Set<number>();
  let slack = start;
  let trial = analyse(slack);
  const stopped = (why: 'repeated' | 'passes' | { trial: string }, members: Iterable<number>): SettledTies<T> => ({
    ok: false,
    members: ascending(members),
    passes: passes(),
    why,
  });
  for (;;) {
    if (!trial.ok) {
      const back = trial.pulls ? mostPulled(ties, slack, trial.pulls) : null;
      const next = back === null ? slack : turned(ties, slack, [back]);
      if (back === null || seen.has(next.join()) || passes() >= last) return stopped({ trial: trial.why }, slack);
      changed.add(back);
      seen.add(next.join());
      slack = next;
      trial = analyse(slack);
      continue;
    }
    const { forces, nothing } = trial;
    const force = (member: number): number => Math.abs(forces[ties.indexOf(member)]!);
    const turning = wrong(ties, slack, forces, nothing).filter((member) => !(kept.has(member) && force(member) <= nothing));
    if (turning.length === 0) return { ok: true, solution: trial.solution, slack, passes: passes() };
    if (passes() >= last) return stopped('passes', changed);
    // the worst, the first of equals
    const worst = turning.reduce((most, member) => (force(member) > force(most) * (1 + 1e-9) ? member : most));
    const next = turned(ties, slack, [worst]);
    changed.add(worst);
    if (seen.has(next.join())) return stopped('repeated', changed);
    seen.add(next.join());
    const without = analyse(next);
    if (!without.ok && without.caught && force(worst) <= nothing) {
      kept.add(worst);
      continue;
    }
    slack = next;
    trial = without;
    const catcher = without.ok ? null : catching(ties, next, worst, without.stretches);
    if (catcher === null) continue;
    const swapped = turned(ties, next, [catcher]);
    if (seen.has(swapped.join())) return stopped('repeated', changed);
    seen.add(swapped.join());
    changed.add(catcher);
    slack = swapped;
    trial = analyse(swapped);
  }
}

/** The slack tie that is stretched the most where the frame moves so that `pressed`, just let go, shortens; null if none is. */
function catching(
  ties: readonly number[],
  slack: readonly number[],
  pressed: number,
  stretches: readonly number[] | undefined,
): number | null {
  const own = stretches?.[ties.indexOf(pressed)] ?? 0;
  if (!stretches || own === 0) return null;
  let found: number | null = null;
  let most = 1e-6 * Math.abs(own);
  ties.forEach((member, i) => {
    const stretched = stretches[i]! * (own > 0 ? -1 : 1);
    if (!slack.includes(member) || !(stretched > most)) return;
    found = member;
    most = stretched;
  });
  return found;
}

/** The slack tie that is stretched the most as the frame gives way; null if none is. */
function mostPulled(ties: readonly number[], slack: readonly number[], pulls: readonly number[]): number | null {
  let found: number | null = null;
  let most = 1e-6 * Math.max(...pulls.map(Math.abs));
  ties.forEach((member, i) => {
    if (!slack.includes(member) || !(pulls[i]! > most)) return;
    found = member;
    most = pulls[i]!;
  });
  return found;
}

/** Ties that are on the wrong side. */
function wrong(ties: readonly number[], slack: readonly number[], forces: Float64Array, nothing: number): readonly number[] {
  return ties.filter((member, i) => (slack.includes(member) ? forces[i]! > nothing : forces[i]! <= nothing));
}

function turned(ties: readonly number[], slack: readonly number[], turning: readonly number[]): readonly number[] {
  return ties.filter((member) => slack.includes(member) !== turning.includes(member));
}
