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
  | { readonly ok: false; readonly why: string };

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

/** Passes after which no set is looked for any longer (engine, Second order and stability). */
const mostPasses = 50;

/**
 * Which tension-only members are slack: taut ones without tension are let go, slack ones that would be stretched are taken
 * up again, from all taut, until none changes.
 *
 * All of them change at once first, which settles almost every frame in two or three passes; where a set comes up again, or
 * the frame can't stand with one, it is begun anew with only the worst changing in each pass.
 *
 * @param ties members, ascending   @param analyse one set of slack members, ascending
 */
export function settleTies<T>(ties: readonly number[], analyse: (slack: readonly number[]) => TieTrial<T>): SettledTies<T> {
  let passes = 0;
  for (const one of [false, true]) {
    const seen = new Set<string>();
    const changed = new Set<number>();
    let slack: readonly number[] = [];
    for (;;) {
      if (seen.has(slack.join())) {
        if (!one) break;
        return { ok: false, members: ascending(changed), passes, why: 'repeated' };
      }
      if (passes === mostPasses) return { ok: false, members: ascending(changed), passes, why: 'passes' };
      seen.add(slack.join());
      passes++;
      const trial = analyse(slack);
      if (!trial.ok) {
        if (!one && slack.length > 0) break;
        return { ok: false, members: slack, passes, why: { trial: trial.why } };
      }
      const turning = wrong(ties, slack, trial.forces, trial.nothing, one);
      if (turning.length === 0) return { ok: true, solution: trial.solution, slack, passes };
      for (const member of turning) changed.add(member);
      slack = ties.filter((member) => slack.includes(member) !== turning.includes(member));
    }
  }
  throw new RangeError('Expected the one-by-one search to end');
}

const ascending = (members: ReadonlySet<number>): number[] => [...members].sort((a, b) => a - b);

/** Ties that are on the wrong side; `one`: only the one most so (the first of equals). */
function wrong(
  ties: readonly number[],
  slack: readonly number[],
  forces: Float64Array,
  nothing: number,
  one: boolean,
): readonly number[] {
  const wrongly = ties.filter((member, i) => (slack.includes(member) ? forces[i]! > nothing : forces[i]! <= nothing));
  if (!one || wrongly.length < 2) return wrongly;
  const size = (member: number): number => Math.abs(forces[ties.indexOf(member)]!);
  return [wrongly.reduce((worst, member) => (size(member) > size(worst) * (1 + 1e-9) ? member : worst))];
}
