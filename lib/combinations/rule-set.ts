/** How a published rule set is written down: forms of combinations, each with its clause, over kinds of load cases. */
import type { CaseKind, Purpose } from '@/lib/model/frame';

/** Cases of these kinds act with this factor. */
export interface Slot {
  readonly kinds: readonly CaseKind[];
  readonly factor: number;
  /** False: they act or not, whichever is worse, so both are made. */
  readonly required: boolean;
  /** γ and ψ whose product the factor is, where the standard has them apart. */
  readonly parts?: { readonly gamma: number; readonly psi: number };
}

/** One combination of a standard: a factor on everything dead, and variable actions. */
export interface Form {
  /** "ASCE 7-22 2.3.1 (3a)", "EN 1990 (6.10)" */
  readonly clause: string;
  readonly purpose: Purpose;
  readonly dead: number;
  readonly slots: readonly Slot[];
  /** What sets a service combination's name apart: "characteristic", "service". */
  readonly suffix: string | null;
}

export interface RuleSet {
  /** As it is written in Setup: "EN 1990 6.10, live B". */
  readonly name: string;
  /** Whether strength combinations hold factored loads or those of allowable stress. */
  readonly level: 'factored' | 'allowable';
  readonly forms: readonly Form[];
  /** Cases of one kind act all together (those with one word in `alternative` excepted), not also one without the other. */
  readonly together: boolean;
  /** What was taken for a kind, said wherever the frame has such a case. */
  readonly said: readonly { readonly kinds: readonly CaseKind[]; readonly words: string }[];
}

export const required = (factor: number, ...kinds: CaseKind[]): Slot => ({ kinds, factor, required: true });
export const optional = (factor: number, ...kinds: CaseKind[]): Slot => ({ kinds, factor, required: false });

/** The kinds that a set has a rule for. */
export function kindsOf(set: RuleSet): ReadonlySet<CaseKind> {
  return new Set<CaseKind>(['dead', ...set.forms.flatMap(({ slots }) => slots.flatMap(({ kinds }) => kinds))]);
}
