import type { Frame } from '@/lib/model/frame';
import type { ResultState } from '@/lib/results/result';

/** Factor on each case, by case: a case named twice counts twice. */
export function factorsOf(frame: Frame, index: number): Float64Array {
  const factors = new Float64Array(frame.cases.length);
  for (const term of frame.combinations[index]!.terms) factors[term.case] = factors[term.case]! + term.factor;
  return factors;
}

/** A combination as the sum of its cases times their factors (first order: everything is linear in the loads). */
export function superpose(frame: Frame, cases: readonly ResultState[], index: number): ResultState {
  const combination = frame.combinations[index]!;
  const factors = factorsOf(frame, index);
  const sum = (pick: (state: ResultState) => Float64Array, length: number): Float64Array => {
    const total = new Float64Array(length);
    cases.forEach((state, c) => {
      const factor = factors[c]!;
      if (factor === 0) return;
      const values = pick(state);
      for (let i = 0; i < length; i++) total[i] = total[i]! + factor * values[i]!;
    });
    return total;
  };
  const displacements = sum((state) => state.displacements, 3 * frame.nodes.length);
  // a node without rotation has none here either, whatever the factors
  const first = cases[0];
  if (first) for (let i = 2; i < displacements.length; i += 3) if (Number.isNaN(first.displacements[i]!)) displacements[i] = NaN;
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
    reactions: sum((state) => state.reactions, 3 * frame.supports.length),
    endForces: sum((state) => state.endForces, 6 * frame.members.length),
  };
}
