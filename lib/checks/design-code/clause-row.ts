import type { Settings } from '@/lib/model/settings';
import type { Check } from '@/lib/results/result';
import type { Printer, WorkingLine } from '../working-parts';
import type { CodeMember } from './code-member';
import type { Demand } from './demand';

/**
 * One clause of a design code for a physical member in one state. Verdict, subject and which row governs are the framework's
 * (lib/checks/design-code/code-checks.ts). `inputs` is only called for rows that are kept: every number that the working
 * prints, SI, named by the standard's symbol.
 */
export interface ClauseRow {
  /** Clause and a word: "6.3.1 flexural buckling", "E3 flexural buckling". One name a clause for every member. */
  readonly check: string;
  /** The clause in full: "EN 1993-1-1 6.3.1.1, (6.46), (6.47)". */
  readonly reference: string;
  readonly combination: string;
  readonly at: number | null;
  readonly face: 'top' | 'bottom' | null;
  /** Action and resistance (force, moment), or an interaction's sum and 1 (number); null where not checked. */
  readonly value: number | null;
  readonly limit: number | null;
  readonly quantity: 'force' | 'moment' | 'stress' | 'number';
  readonly ratio: number | null;
  /** Why it was not checked; then value, limit and ratio are null. */
  readonly reason: string | null;
  readonly inputs: () => Check['inputs'];
}

/** What a code says about a member besides its rows: assumptions, once each. */
export type Note = (assumption: string) => void;

/** A design code as the framework runs it. */
export interface DesignCode {
  /** The check's name of a member that the code can't be applied to at all (unlike pieces, slender plates …). */
  readonly name: Settings['strengthCheck'];
  /**
   * Every clause that has something to check, for every demand, in the order of `demands`; within one, in the standard's order.
   * What can't be checked is a row with its reason, never left out. Must not keep `demands`.
   */
  rows(member: CodeMember, demands: readonly Demand[], settings: Settings, note: Note): readonly ClauseRow[];
  /** The calculation of one of its rows from `check.inputs` only; null where the check is none of this code's. */
  working(check: Check, print: Printer): readonly WorkingLine[] | null;
}
