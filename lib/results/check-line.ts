/** A check as the page of a frame lists it, with its calculation. */
import { workingLines } from '@/lib/checks/working-lines';
import type { WorkingLine } from '@/lib/checks/working-parts';
import type { Frame } from '@/lib/model/frame';
import { checkPlace } from '@/lib/results/check-place';
import type { Check } from '@/lib/results/result';
import { worstFirst } from '@/lib/results/worst-first';

export interface CheckLine extends Pick<
  Check,
  'check' | 'combination' | 'at' | 'face' | 'value' | 'limit' | 'quantity' | 'ratio' | 'verdict' | 'reason' | 'reference'
> {
  readonly id: string;
  /** "rafter BC", "node C" */
  readonly where: string;
  readonly working: readonly WorkingLine[];
}

/** The checks of a frame, worst first. @param under settings of its revision, and where they were given */
export function checkLines(frame: Frame, checks: readonly Check[], under: Parameters<typeof workingLines>[1]): CheckLine[] {
  return worstFirst(checks).map((check, i) => ({
    id: String(i),
    where: checkPlace(frame, check),
    check: check.check,
    combination: check.combination,
    at: check.at,
    face: check.face,
    value: check.value,
    limit: check.limit,
    quantity: check.quantity,
    ratio: check.ratio,
    verdict: check.verdict,
    reason: check.reason,
    reference: check.reference,
    working: workingLines(check, under),
  }));
}
