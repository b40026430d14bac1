/** A frame's row on the Frames sheet, and what of it is flagged. */
import type { AcceptedRow } from '@/lib/reports/accepted-words';
import { cellOf, verdictOrder, type ReportRow } from '@/lib/reports/workbook/report-sheet';
import type { ReportFrame } from '@/lib/reports/workbook/report-source';
import { verdictOf } from '@/lib/reports/workbook/verdict-of';
import type { Verdict } from '@/lib/results/result';
import type { System } from '@/lib/units/quantity';

/** More reasons than this are not put into one cell. */
const mostReasons = 40;

function whyNot(each: ReportFrame): string {
  if (each.frame === null) return 'not analysed: errors in its sheets (see Problems)';
  if (each.evaluation === null) return 'not run';
  const reasons = each.evaluation.failure ? [each.evaluation.failure.message] : each.evaluation.notChecked;
  const shown = reasons.slice(0, mostReasons);
  if (reasons.length > shown.length) shown.push(`and ${reasons.length - shown.length} more, see Flags`);
  return shown.join('; ');
}

/** Smallest α_cr of a frame's strength combinations; null where nothing can buckle it. */
function smallestCriticalFactor(each: ReportFrame): number | null {
  const value = each.evaluation?.checks.find((row) => row.check === 'critical load factor')?.inputs['alpha'];
  return typeof value === 'number' ? value : null;
}

/** Cells in the order of the Frames sheet's columns. */
export function frameRow(each: ReportFrame, system: System): ReportRow {
  const { evaluation } = each;
  const governing = evaluation?.governing ?? null;
  const certificate = evaluation?.certificate ?? null;
  const mass = cellOf(evaluation?.mass, 'mass', system);
  return [
    each.number,
    each.id,
    each.title,
    each.group,
    each.count,
    evaluation?.status ?? 'not solved',
    verdictOf(each),
    governing?.ratio ?? null,
    governing?.check ?? null,
    governing ? (governing.subject ?? each.id) : null,
    governing?.combination ?? null,
    smallestCriticalFactor(each),
    mass,
    mass === null ? null : mass * each.count,
    whyNot(each),
    each.note,
    certificate?.residual ?? null,
    certificate?.equilibrium ?? null,
    certificate?.condition ?? null,
    certificate?.digits ?? null,
    certificate?.second ?? certificate?.secondReason ?? null,
  ];
}

export interface Flag {
  /** Place of its verdict, worst first. */
  readonly order: number;
  readonly ratio: number;
  readonly number: number;
  readonly row: ReportRow;
}

/**
 * Every check of a frame that is over, near or not checked; the frame itself where nothing of it was checked.
 *
 * @param accepted the reason that a checker gave for a row, where one accepted it; null in a draft
 */
export function flagsOf(each: ReportFrame, accepted: ((row: AcceptedRow) => string | null) | null): Flag[] {
  const reason = (verdict: Verdict, [subject, check]: readonly [string, string, ...unknown[]]): (string | null)[] =>
    accepted ? [accepted({ frame: each.id, subject, check, verdict })] : [];
  const flag = (
    verdict: Verdict,
    ratio: number | null,
    cells: readonly [string, string, string | null, string | null],
  ): Flag => ({
    order: verdictOrder[verdict],
    ratio: ratio ?? 0,
    number: each.number,
    row: [verdict, ratio, each.id, ...cells, ...reason(verdict, cells)],
  });
  const checks = each.evaluation?.checks ?? [];
  if (checks.length === 0)
    return verdictOf(each) === 'within' ? [] : [flag(verdictOf(each), null, [each.id, '', '', whyNot(each)])];
  const flagged = checks
    .filter((check) => check.verdict !== 'within')
    .map((check) => flag(check.verdict, check.ratio, [check.subject ?? each.id, check.check, check.combination, check.reason]));
  const known = (each.frame?.notChecked ?? []).map((reason) => flag('not checked', null, [each.id, '', '', reason]));
  return [...flagged, ...known];
}
