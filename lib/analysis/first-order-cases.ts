import type { Frame } from '@/lib/model/frame';
import type { Failure, ResultState, StateMethod } from '@/lib/results/result';
import { assemble, diagonalOf, nodeAngles } from './assemble';
import { digitsOf, leastDigits } from './certificate';
import { conditionEstimate, scaledNorm } from './condition';
import { factor } from './factor';
import { freeOrHardlyHeld, lowDigits } from './failures';
import { loadVectors, type LoadVectors } from './load-vectors';
import { nullVector } from './mechanism';
import { memberDataFor, type MemberData } from './member-data';
import { numbers } from './numbers';
import { recover, type Recovered } from './recover';
import { solve } from './solve';
import type { Topology } from './topology';

/** A frame's load cases, solved to first order with all of its members, and what they were solved with. */
export interface SolvedCases {
  readonly angles: Float64Array;
  readonly data: readonly MemberData[];
  /** K's own diagonal, 3 a position, and its norm and condition, scaled to a unit diagonal. */
  readonly diagonal: Float64Array;
  readonly norm: number;
  readonly condition: number;
  /** K as factored. */
  readonly K: Float64Array;
  readonly inner: Float64Array;
  readonly loads: LoadVectors;
  readonly d: Float64Array;
  readonly recovered: readonly Recovered[];
  readonly cases: readonly ResultState[];
}

/** What is set apart in a state whose members shear, and nothing else. */
const shears: StateMethod = {
  shearDeformation: true, imperfection: null, notional: null, loadScale: 1, stiffness: null, slack: [], iterations: 1, change: 0,
}; // prettier-ignore

/** A pivot below this share of its own original diagonal is a mechanism. */
export const pivotTolerance = 1e-12;

/** K d = f for all cases at once (README §1), or why the frame has no solution. */
export function solveCases(frame: Frame, t: Topology, shearDeformation: boolean): SolvedCases | Failure {
  const method = shearDeformation ? shears : null;
  const data = memberDataFor(frame, method);
  const angles = nodeAngles(frame);
  const K = new Float64Array(9 * t.blocks);
  assemble(K, t, frame, data, angles); // K = Σ Tᵀ k T
  const diagonal = diagonalOf(K, t, new Float64Array(3 * t.size));
  const norm = scaledNorm(K, t, diagonal);
  const inner = new Float64Array(6 * t.size);
  const unheld = factor(K, t, diagonal, inner, new Float64Array(3 * t.size), pivotTolerance); // K = Uᵀ D U
  if (unheld >= 0) return freeOrHardlyHeld(frame, t, angles, nullVector(K, t, inner, unheld));
  const condition = conditionEstimate(K, t, inner, diagonal, norm);
  const digits = digitsOf(condition.condition);
  if (!(digits >= leastDigits)) return lowDigits(frame, t, angles, condition, digits);
  const loads = loadVectors(frame, t, angles, data); // a column a case
  const d = loads.f.slice();
  solve(K, t, inner, d, frame.cases.length); // K d = f
  const recovered = frame.cases.map((_, c) => recover(frame, t, angles, loads, d, c, data)); // q = k T d + q_F, R = K d − f
  const cases = recovered.map((r, c) => caseState(frame, r, c, method));
  return { angles, data, diagonal, norm, condition: condition.condition, K, inner, loads, d, recovered, cases };
}

function caseState(frame: Frame, recovered: Recovered, index: number, method: StateMethod | null): ResultState {
  const factors = numbers(frame.cases.length);
  factors[index] = 1;
  const { displacements, reactions, endForces } = recovered;
  return {
    name: frame.cases[index]!.name,
    kind: 'case',
    purpose: null,
    factors,
    order: 1,
    criticalLoadFactor: null,
    method,
    displacements,
    reactions,
    endForces,
  };
}
