import type { Settings } from '@/lib/model/settings';
import type { Check, ResultState } from '@/lib/results/result';
import { keepGoverning, notCheckedRow, type Findings, type Subject } from './check-row';
import { figure } from './figure';
import { SAME } from './peak';
import { verdictOf } from './verdict';

/** By order of the analysis. */
const references = {
  1: 'EN 1993-1-1 5.2.1(3): α_cr ≥ 10 for first-order analysis',
  2: 'EN 1993-1-1 5.2.1: second-order analysis, α_cr ≥ 1',
} as const;

/**
 * Critical load factor of the frame in every strength combination, times the stress factor: below 1 over; below 10 with a
 * first-order analysis not checked (EN 1993-1-1 5.2.1(3)). No positive root: the loads cannot buckle it.
 */
export function checkCriticalLoadFactor(settings: Settings, states: readonly ResultState[], findings: Findings): void {
  const subject: Subject = {
    subjectKind: 'frame',
    subject: null,
    check: 'critical load factor',
    quantity: 'number',
    reference: references[1],
    member: null,
  };
  const of = (state: ResultState): Subject => ({ ...subject, reference: references[state.order] });
  const f = settings.stressFactor;
  const rows: Check[] = [];
  const refuse = (state: ResultState, value: number): Check => {
    const reason = `second-order effects not negligible (α_cr ${figure(value, 'down')}${f === 1 ? '' : ', stress factor included'})`;
    return notCheckedRow(of(state), state.name, reason, { alpha: state.criticalLoadFactor, f, value });
  };
  const row = (state: ResultState, value: number | null): Check => {
    const ratio = value === null ? 0 : 1 / value;
    return {
      ...of(state),
      combination: state.name,
      at: null,
      face: null,
      value,
      limit: 1,
      ratio,
      verdict: verdictOf(ratio, settings.nearLimit),
      reason: null,
      inputs: { alpha: state.criticalLoadFactor, f, value, limit: 1, ratio },
    };
  };
  // lowest factor so far of those that are checked, and the first that is not: the others can't govern them
  let lowest: { readonly state: ResultState; readonly value: number | null } | null = null;
  let refused = false;
  for (const state of states) {
    const alpha = state.criticalLoadFactor;
    const value = alpha === null ? null : alpha * f;
    if (value !== null && value >= 1 && value < 10 && state.order === 1) {
      if (findings.all || !refused) rows.push(refuse(state, value));
      refused = true;
    } else if (findings.all || Number.isNaN(value)) rows.push(row(state, value));
    else if (!lowest || (value ?? Infinity) < (lowest.value ?? Infinity) * (1 - SAME)) lowest = { state, value };
  }
  if (lowest) rows.push(row(lowest.state, lowest.value));
  keepGoverning(findings, rows);
}
