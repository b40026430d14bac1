import { appliedTotals } from '@/lib/analysis/applied-totals';
import type { Frame } from '@/lib/model/frame';
import { cellOf, type ReportRow } from '@/lib/reports/workbook/report-sheet';
import type { ResultState } from '@/lib/results/result';
import { imperfectionForces, type ImperfectionForce } from '@/lib/results/state-facts';
import type { System } from '@/lib/units/quantity';

/** Sum of the forces that stand for the imperfections of each state that has any, about the origin. */
export function imperfectionTotals(id: string, frame: Frame, states: readonly ResultState[], system: System): ReportRow[] {
  return states.flatMap((state): ReportRow[] => {
    const forces = imperfectionForces(frame, state);
    if (forces.length === 0) return [];
    const sum = (of: (force: ImperfectionForce) => number): number => forces.reduce((total, force) => total + of(force), 0);
    const [Fx, Fy] = [sum((force) => force.Fx_N), sum((force) => force.Fy_N)];
    const Mz = sum((force) => force.x_m * force.Fy_N - force.y_m * force.Fx_N);
    const name = `imperfections of ${state.name}`;
    return [[id, name, cellOf(Fx, 'force', system), cellOf(Fy, 'force', system), cellOf(Mz, 'moment', system)]];
  });
}

/** Sum of the loads of each case, about the origin: what a checker compares with a take-off by hand. */
export function loadTotals(id: string, frame: Frame, system: System): ReportRow[] {
  const totals = appliedTotals(frame);
  return frame.cases.map((loadCase, index): ReportRow => {
    const sum = totals[index];
    const force = (value: number | undefined): number | null => cellOf(value, 'force', system);
    return [id, loadCase.name, force(sum?.Fx_N), force(sum?.Fy_N), cellOf(sum?.Mz_Nm, 'moment', system)];
  });
}
