import { conjugate } from './conjugate';
import type { Acting } from './second-loads';
import type { Given, Setup } from './second-setup';
import { equationsOf, factored, firstOrderInverse, solveFor, type Equations } from './second-solve';
import { onNodes, rightSide, stateFrom, type SecondState } from './second-state';

/** Most passes, and the change of axial forces, relative to the largest force, that counts as none. */
const mostPasses = 100;
const still = 1e-9;

/**
 * One state in equilibrium, by solving and taking the axial forces found for the geometry of the next pass until they
 * stand still. First order (`axial` null): one pass.
 *
 * @returns null where it cannot be solved, does not stand still, or stands beyond its lowest critical load
 */
export function solveState(setup: Setup, given: Given, acting: readonly Acting[]): SecondState | null {
  let axial = given.axial;
  for (let pass = 0; pass < mostPasses; pass++) {
    const now = { ...given, axial };
    const equations = equationsOf(setup, now, acting, true);
    if (!equations) return null;
    const nodes = onNodes(setup, now, acting);
    const d = movements(setup, now, acting, equations, rightSide(setup, equations, equations.ends, nodes));
    if (!d) return null;
    const state = stateFrom(setup, now, equations, equations.ends, nodes, d.movements);
    if (axial === null) return state;
    const found = new Float64Array(setup.members.length);
    let off = 0;
    for (let i = 0; i < found.length; i++) {
      found[i] = state.endForces[6 * i]!;
      off = Math.max(off, Math.abs(found[i]! - axial[i]!));
    }
    if (!Number.isFinite(off)) return null;
    // an even number of ways in which it gives way goes unseen here: the first analysis counts them
    if (off <= still * largestForce(setup, state)) return d.past ? null : state;
    axial = found;
  }
  return null;
}

/** K d = f from the first-order inverse, which is near; else, and where that meets a direction that gives way, factored. */
function movements(
  setup: Setup,
  given: Given,
  acting: readonly Acting[],
  equations: Equations,
  side: Float64Array,
): { readonly movements: Float64Array; readonly past: boolean } | null {
  const inverse = firstOrderInverse(setup, given, acting);
  const near = inverse && conjugate(equations.K, equations.numbering, inverse, side);
  if (near) return { movements: near, past: false };
  const factors = factored(equations);
  return factors && { movements: solveFor(equations, factors, [side])[0]!, past: factors.sign < 0 };
}

/** Largest of N, V, M/L at members' ends and of reactions, N. */
function largestForce(setup: Setup, { endForces, reactions }: SecondState): number {
  let most = 0;
  endForces.forEach((force, i) => {
    most = Math.max(most, Math.abs(force) / (i % 3 === 2 ? setup.members[Math.floor(i / 6)]!.L : 1));
  });
  reactions.forEach((force, i) => {
    if (i % 3 !== 2) most = Math.max(most, Math.abs(force));
  });
  return most;
}
