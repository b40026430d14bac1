import type { Frame } from '@/lib/model/frame';
import { typedTotals } from './typed-totals';

/** Applied load totals of each case, about the origin, for the workbook. */
export function appliedTotals(frame: Frame): readonly { case: string; Fx_N: number; Fy_N: number; Mz_Nm: number }[] {
  return frame.cases.map((loadCase, i) => {
    const total = typedTotals(frame, i, 0, 0);
    return { case: loadCase.name, Fx_N: total.Fx, Fy_N: total.Fy, Mz_Nm: total.Mz };
  });
}
