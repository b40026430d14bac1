import type { Frame } from '@/lib/model/frame';
import type { Settings } from '@/lib/model/settings';
import type { Check, MemberLine, ResultState } from '@/lib/results/result';
import { worse } from '@/lib/results/verdict';
import type { Findings } from '../check-row';
import { SAME } from '../peak';
import type { Span } from '../spans';
import { verdictOf } from '../verdict';
import type { ClauseRow, DesignCode } from './clause-row';
import type { Demand } from './demand';
import { codeMemberOf, lengthAssumptions, notOneMember } from './code-member-of';
import { demandOf, demandSource } from './demand-of';
import { inPlaneRules } from './in-plane-rule';

/**
 * The clauses of a design code for every physical member, in every strength combination: one row for each clause of a member,
 * the combination that governs; all of them where asked for.
 * @param lines for each of `states`, by member, the exact line
 */
export function checkByCode(
  frame: Frame,
  settings: Settings,
  code: DesignCode,
  spans: readonly Span[],
  states: readonly ResultState[],
  lines: (state: number, member: number) => MemberLine,
  findings: Findings,
): void {
  const rules = states.map((state) => inPlaneRules(settings, state));
  const note = (said: string): void => void findings.assumptions.add(said);
  for (const span of spans) {
    const broken = notOneMember(frame, span);
    if (broken) {
      refuseMember(span, code.name, states, broken, findings);
      continue;
    }
    const member = codeMemberOf(frame, span);
    for (const said of lengthAssumptions(member)) note(said);
    const source = demandSource(frame, member);
    const demands = states.map((state, c) => {
      const own = span.pieces.map((piece) => lines(c, piece.member));
      return demandOf(source, state, own, rules[c]!);
    });
    const rows = code.rows(member, demands, settings, note);
    if (rows.length > 0) keepRows(span, member.member, rows, settings.nearLimit, findings);
    else if (demands.every((demand) => idle(demand, member.tensionOnly))) {
      const none = demands.map((demand) => idleRow(code.name, demand));
      keepRows(span, member.member, none, settings.nearLimit, findings);
    }
    // nothing found of a member that carries something is never a pass
    else refuseMember(span, code.name, states, 'no clause that its forces could be held against', findings);
  }
}

/** No force in it but what rounding leaves, or what a tension-only member is not pressed by. */
const idle = ({ tension, compression, shear, moment }: Demand, tensionOnly: boolean): boolean =>
  tension === 0 && shear === 0 && moment === 0 && (compression === 0 || tensionOnly);

/** A member that carries nothing in a state is within, whatever it is. */
const idleRow = (name: string, { combination }: Demand): ClauseRow => ({
  check: name,
  reference: 'carries no force',
  combination,
  at: null,
  face: null,
  value: 0,
  limit: 1,
  quantity: 'number',
  ratio: 0,
  reason: null,
  inputs: () => ({}),
});

/** One row, under the code's own name, that says why a member was not checked. */
export function refuseMember(span: Span, name: string, states: readonly ResultState[], reason: string, findings: Findings): void {
  const row = (state: ResultState | undefined): Check => ({
    subjectKind: span.kind,
    subject: span.name,
    member: span.pieces[0]!.member,
    check: name,
    combination: state?.name ?? null,
    at: null,
    face: null,
    value: null,
    limit: null,
    quantity: 'number',
    ratio: null,
    verdict: 'not checked',
    reason,
    reference: name,
    inputs: {},
  });
  findings.checks.push(row(states[0]));
  findings.all?.push(...(states.length > 0 ? states.map(row) : [row(undefined)]));
  findings.notChecked.add(`${name}: ${reason}`);
}

/** The governing row of each clause, in the order in which the code first names them. */
function keepRows(span: Span, member: number, rows: readonly ClauseRow[], nearLimit: number, findings: Findings): void {
  const best = new Map<string, ClauseRow>();
  const refused = new Map<string, ClauseRow>();
  for (const row of rows) {
    const before = best.get(row.check);
    if (before === undefined || outranks(row, before)) best.set(row.check, row);
    if (row.ratio === null && !refused.has(row.check)) refused.set(row.check, row);
  }
  const made = (row: ClauseRow): Check => checkOf(span, member, row, nearLimit);
  for (const row of best.values()) findings.checks.push(made(row));
  if (findings.all) for (const row of rows) findings.all.push(made(row));
  // also where another combination is over: what was not checked there must not go unsaid
  for (const row of refused.values()) findings.notChecked.add(`${row.check}: ${row.reason ?? 'not a number'}`);
}

/** Over first, then not checked, then by ratio; the first on a tie. */
function outranks(row: ClauseRow, best: ClauseRow): boolean {
  const [a, b] = [rank(row), rank(best)];
  if (a !== b) return worse(b, a) === a;
  return (row.ratio ?? 0) > (best.ratio ?? 0) * (1 + SAME);
}

const rank = ({ ratio }: ClauseRow): 'over' | 'not checked' | 'within' =>
  ratio === null || Number.isNaN(ratio) ? 'not checked' : ratio > 1 ? 'over' : 'within';

function checkOf(span: Span, member: number, row: ClauseRow, nearLimit: number): Check {
  const verdict = row.ratio === null ? 'not checked' : verdictOf(row.ratio, nearLimit);
  const open = verdict === 'not checked';
  return {
    subjectKind: span.kind,
    subject: span.name,
    member,
    check: row.check,
    combination: row.combination,
    at: row.at,
    face: row.face,
    value: open ? null : row.value,
    limit: open ? null : row.limit,
    quantity: row.quantity,
    ratio: open ? null : row.ratio,
    verdict,
    reason: open ? (row.reason ?? 'not a number') : null,
    reference: row.reference,
    inputs: row.inputs(),
  };
}
