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
  // lowest factor so far of those that are checked and not over: the others can't govern them
  let lowest = Infinity;
  let refused = false;
  for (const state of states) {
    const alpha = state.criticalLoadFactor;
    const value = alpha === null ? null : alpha * f;
    const tooLow = value !== null && value >= 1 && value < 10 && state.order === 1;
    if (!findings.all && rows.length > 0 && (tooLow ? refused : (value ?? Infinity) >= lowest * (1 - SAME))) continue;
    if (tooLow) {
      refused = true;
      const reason = `second-order effects not negligible (α_cr ${figure(value, 'down')}${f === 1 ? '' : ', stress factor included'})`;
      rows.push(notCheckedRow(of(state), state.name, reason, { alpha, f, value }));
      continue;
    }
    lowest = Math.min(lowest, value ?? Infinity);
    const ratio = value === null ? 0 : 1 / value;
    rows.push({
      ...of(state),
      combination: state.name,
      at: null,
      face: null,
      value,
      limit: 1,
      ratio,
      verdict: verdictOf(ratio, settings.nearLimit),
      reason: null,
      inputs: { alpha, f, value, limit: 1, ratio },
    });
  }
  keepGoverning(findings, rows);
}
