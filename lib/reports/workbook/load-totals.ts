import { appliedTotals } from '@/lib/analysis/applied-totals';
import type { Frame } from '@/lib/model/frame';
import { cellOf, type ReportRow } from '@/lib/reports/workbook/report-sheet';
import type { System } from '@/lib/units/quantity';

/** Sum of the loads of each case, about the origin: what a checker compares with a take-off by hand. */
export function loadTotals(id: string, frame: Frame, system: System): ReportRow[] {
  const totals = appliedTotals(frame);
  return frame.cases.map((loadCase, index): ReportRow => {
    const sum = totals[index];
    const force = (value: number | undefined): number | null => cellOf(value, 'force', system);
    return [id, loadCase.name, force(sum?.Fx_N), force(sum?.Fy_N), cellOf(sum?.Mz_Nm, 'moment', system)];
  });
}
