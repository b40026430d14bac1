import { actingUnder, type Acting } from './second-loads';
import type { Given, Setup } from './second-setup';
import { endsOf, equationsOf, factored, solveFor } from './second-solve';
import { onNodes, rightSide, stateFrom, type SecondState } from './second-state';

/**
 * First-order states of several loads on one and the same structure: one factorisation for all.
 * @param factors factors on the frame's cases, a list a state   @returns null where the equations are singular
 */
export function firstOrderStates(
  setup: Setup,
  factors: readonly ArrayLike<number>[],
  as: Pick<Given, 'slack' | 'stiffness'> = { slack: new Set(), stiffness: null },
): SecondState[] | null {
  const first = factors[0];
  if (!first) return [];
  const given = (f: ArrayLike<number>): Given => ({ ...as, factors: f, notional: null, axial: null });
  const acting = factors.map((f): Acting[] => setup.along.map((along) => actingUnder(along, f)));
  const equations = equationsOf(setup, given(first), acting[0]!);
  const solver = equations && factored(equations);
  if (!equations || !solver) return null;
  const ends = factors.map((f, s) =>
    setup.members.map((_, i) => (as.slack.has(i) ? undefined : (endsOf(setup, given(f), i, acting[s]![i]!) ?? undefined))),
  );
  const nodes = factors.map((f, s) => onNodes(setup, given(f), acting[s]!));
  const d = solveFor(
    equations,
    solver,
    nodes.map((on, s) => rightSide(setup, equations, ends[s]!, on)),
  );
  return factors.map((f, s) => stateFrom(setup, given(f), equations, ends[s]!, nodes[s]!, d[s]!));
}
