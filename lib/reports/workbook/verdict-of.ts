import type { ReportFrame } from '@/lib/reports/workbook/report-source';
import type { Verdict } from '@/lib/results/result';

/** A frame that was not run, or could not be, is not checked. */
export function verdictOf(each: ReportFrame): Verdict {
  return each.evaluation?.verdict ?? 'not checked';
}
