import type { Frame } from '@/lib/model/frame';
import type { ResultState } from '@/lib/results/result';
import { numbers } from './numbers';

/** Factor on each case, by case: a case named twice counts twice. */
export function factorsOf(frame: Frame, index: number): Float64Array {
  const factors = numbers(frame.cases.length);
  for (const term of frame.combinations[index]!.terms) factors[term.case] = factors[term.case]! + term.factor;
  return factors;
}

/** A combination as the sum of its cases times their factors (first order: everything is linear in the loads). */
export function superpose(frame: Frame, cases: readonly ResultState[], index: number): ResultState {
  const combination = frame.combinations[index]!;
  const factors = factorsOf(frame, index);
  const displacements = numbers(3 * frame.nodes.length);
  const reactions = numbers(3 * frame.supports.length);
  const endForces = numbers(6 * frame.members.length);
  for (let c = 0; c < cases.length; c++) {
    const factor = factors[c]!;
    if (factor === 0) continue;
    const state = cases[c]!;
    addTimes(displacements, factor, state.displacements);
    addTimes(reactions, factor, state.reactions);
    addTimes(endForces, factor, state.endForces);
  }
  // a node without rotation has none here either, whatever the factors
  const first = cases[0];
  if (first)
    for (let i = 2; i < displacements.length; i += 3) {
      const turn = first.displacements[i]!;
      if (turn !== turn) displacements[i] = NaN;
    }
  return {
    name: combination.name,
    kind: 'combination',
    purpose: combination.purpose,
    factors,
    order: 1,
    criticalLoadFactor: null,
    // a combination of cases whose members shear has its own shear
    method: first?.method ?? null,
    displacements,
    reactions,
    endForces,
  };
}

function addTimes(total: Float64Array, factor: number, values: Float64Array): void {
  for (let i = 0; i < total.length; i++) total[i] = total[i]! + factor * values[i]!;
}
