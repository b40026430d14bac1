import type { Check } from '@/lib/results/result';
import type { ClauseRow } from '../design-code/clause-row';
import type { Demand } from '../design-code/demand';
import type { Ec3Member } from './ec3-member';

/** What a working puts in, by name, SI. */
export type Inputs = Record<string, number | string | null>;
type MakeInputs = () => Check['inputs'];

/** The clauses as rows of checks: their names and references. */
export const clauses = {
  class: { check: '5.5 classification', reference: 'EN 1993-1-1 5.5.2, Table 5.2' },
  tension: { check: '6.2.3 tension', reference: 'EN 1993-1-1 6.2.3, (6.5), (6.6)' },
  compression: { check: '6.2.4 compression', reference: 'EN 1993-1-1 6.2.4, (6.9), (6.10)' },
  bending: { check: '6.2.5 bending', reference: 'EN 1993-1-1 6.2.5, (6.12) to (6.14)' },
  shear: { check: '6.2.6 shear', reference: 'EN 1993-1-1 6.2.6, (6.17), (6.18)' },
  bendingShear: { check: '6.2.8 bending and shear', reference: 'EN 1993-1-1 6.2.8, (6.29), (6.30)' },
  bendingAxial: { check: '6.2.9 bending and axial force', reference: 'EN 1993-1-1 6.2.9, 6.2.10' },
  flexural: { check: '6.3.1 flexural buckling', reference: 'EN 1993-1-1 6.3.1, (6.46), (6.47), (6.49)' },
  lateral: { check: '6.3.2 lateral-torsional buckling', reference: 'EN 1993-1-1 6.3.2, (6.54) to (6.58)' },
  interaction: { check: '6.3.3 bending and compression', reference: 'EN 1993-1-1 6.3.3, (6.61), (6.62)' },
} as const;
export interface Clause {
  readonly check: string;
  readonly reference: string;
}

const nothing: MakeInputs = () => ({});

/** A clause that was not checked, and why. */
export const refusedRow = (clause: Clause, demand: Demand, reason: string): ClauseRow => ({
  check: clause.check,
  reference: clause.reference,
  combination: demand.combination,
  at: null,
  face: null,
  value: null,
  limit: null,
  quantity: 'number',
  ratio: null,
  reason,
  inputs: nothing,
});

/** An action against its resistance, or an interaction's sum against 1. */
export function checkedRow(
  clause: Clause,
  demand: Demand,
  quantity: ClauseRow['quantity'],
  value: number,
  limit: number,
  at: number | null,
  face: ClauseRow['face'],
  inputs: MakeInputs,
): ClauseRow {
  const { check, reference } = clause;
  const { combination } = demand;
  return { check, reference, combination, at, face, value, limit, quantity, ratio: value / limit, reason: null, inputs };
}

/** What every working of a member puts in. */
export const basics = ({ A, fy, gammaM0, gammaM1, E }: Ec3Member): Inputs => ({
  A,
  fy,
  gammaM0,
  gammaM1,
  E,
});
