import type { Frame, Limit, Measure } from '@/lib/model/frame';
import type { Settings } from '@/lib/model/settings';
import type { Check, ResultState } from '@/lib/results/result';
import { keepGoverning, notCheckedRow, type Findings, type Subject } from './check-row';
import { allowance, limitIn, limitsOf } from './limits';
import { SAME } from './peak';
import { verdictOf } from './verdict';

/** What a movement of one subject in one combination came to. */
export interface Movement {
  /** In size, m. */
  readonly value: number;
  readonly at: number | null;
}

/** Setup's ratio as the `*` row that it is, where the frame's limits do not hold it already. */
export function limitsWithSetup(frame: Frame, settings: Settings, measure: 'deflection' | 'sway'): readonly Limit[] {
  const given = limitsOf(frame, measure);
  const ratio = measure === 'deflection' ? settings.deflectionRatio : settings.swayRatio;
  if (typeof ratio !== 'number' || given.some((limit) => limit.target === 'all' && limit.combination === null)) return given;
  const setup: Limit = {
    target: 'all',
    name: '*',
    measure,
    direction: null,
    toNode: null,
    ratio,
    absolute_m: null,
    combination: null,
    namedFrame: false,
    source: 'Setup',
  };
  return [...given, setup];
}

/** Why a movement has no limit at all, or null where Setup declares that it needs none. */
export function withoutLimit(settings: Settings, measure: 'deflection' | 'sway', findings: Findings): string | null {
  const declared = measure === 'deflection' ? settings.deflectionRatio : settings.swayRatio;
  if (declared !== 'none') return `no ${measure} limit`;
  findings.assumptions.add(`${measure === 'deflection' ? 'Deflection' : 'Sway'}: declared to have no limit`);
  return null;
}

/**
 * A subject's movement against the limits that name it, in every service combination.
 * @param limits most specific first; in a combination that none of them is for, the movement is not limited
 * @param length_m what a limit's ratio divides
 * @param measured the movement in a state, by its index; one that is not above `floor` (m) governs nothing and need not be exact
 * @param inputsOf what it was made of, for the working
 */
export function checkMovement(
  subject: Subject,
  measure: Measure,
  limits: readonly Limit[],
  length_m: number,
  settings: Settings,
  states: readonly ResultState[],
  measured: (state: number, floor: number) => Movement,
  inputsOf: (state: number) => Check['inputs'],
  findings: Findings,
): void {
  const rows: Check[] = [];
  const row = (c: number, limit: Limit, allowed: number, { value, at }: Movement): Check => {
    const ratio = value / allowed;
    const put = { n: limit.ratio, absolute: limit.absolute_m, length: length_m, x: at, value, limit: allowed, ratio };
    return {
      subjectKind: subject.subjectKind,
      subject: subject.subject,
      check: subject.check,
      combination: states[c]!.name,
      at,
      face: null,
      value,
      limit: allowed,
      quantity: subject.quantity,
      ratio,
      verdict: verdictOf(ratio, settings.nearLimit),
      reason: null,
      reference: limit.source,
      member: subject.member,
      inputs: Object.assign(put, inputsOf(c)),
    };
  };
  // what governs so far, where not every row is wanted
  let best: { readonly c: number; readonly limit: Limit; readonly allowed: number; readonly movement: Movement } | null = null;
  for (let c = 0; c < states.length; c++) {
    const combination = states[c]!.name;
    const limit = limitIn(limits, combination);
    if (!limit) {
      findings.assumptions.add(
        `${subject.subject ?? subject.check}: ${measure} has no limit in ${combination}, since limits name other combinations`,
      );
      continue;
    }
    const allowed = allowance(limit, length_m);
    if (allowed === null || !(allowed > 0)) {
      const needs = measure === 'displacement' ? 'absolute' : 'ratio or absolute';
      rows.push(notCheckedRow(subject, combination, `needs ${needs} in ${limit.source}`));
      continue;
    }
    const movement = measured(c, best ? (best.movement.value / best.allowed) * allowed : 0);
    if (findings.all) rows.push(row(c, limit, allowed, movement));
    else if (!best || movement.value / allowed > (best.movement.value / best.allowed) * (1 + SAME))
      best = { c, limit, allowed, movement };
  }
  if (best) rows.push(row(best.c, best.limit, best.allowed, best.movement));
  if (rows.length === 0)
    rows.push(notCheckedRow(subject, null, states.length === 0 ? findings.noService : whyNone(measure, limits)));
  keepGoverning(findings, rows);
}

function whyNone(measure: Measure, limits: readonly Limit[]): string {
  return `no ${measure} limit for any service combination of the frame (${limits.map((limit) => limit.source).join(', ')})`;
}
