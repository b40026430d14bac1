import { isColumn } from '@/lib/analysis/imperfections/columns';
import type { Frame, Limit } from '@/lib/model/frame';
import type { Settings } from '@/lib/model/settings';
import type { ResultState } from '@/lib/results/result';
import { keepGoverning, notCheckedRow, type Findings, type Subject } from './check-row';
import { namesSpan } from './limits';
import { checkMovement, withoutLimit } from './movement';
import type { Span } from './spans';

/**
 * Sway of a column in every service combination: |ux(top) − ux(bottom)| against its height |Δy|.
 * @param given the frame's limits of sway, Setup's among them
 */
export function checkSway(
  frame: Frame,
  settings: Settings,
  given: readonly Limit[],
  span: Span,
  states: readonly ResultState[],
  findings: Findings,
): void {
  const subject: Subject = {
    subjectKind: span.kind,
    subject: span.name,
    check: 'sway',
    quantity: 'displacement',
    reference: 'Limits',
    member: span.pieces[0]!.member,
  };
  const limits = given.filter((limit) => namesSpan(limit, span, frame));
  if (!isColumn(frame, span)) {
    // a limit that names this very member is not passed over in silence
    if (limits.some((limit) => limit.target === 'member' || limit.target === 'span'))
      keepGoverning(findings, [notCheckedRow(subject, null, 'sway is measured on columns only (role column)')]);
    return;
  }
  if (limits.length === 0) {
    const why = withoutLimit(settings, 'sway', findings);
    if (why) keepGoverning(findings, [notCheckedRow(subject, null, why)]);
    return;
  }
  if (!span.whole) return keepGoverning(findings, [notCheckedRow(subject, null, 'pieces of the span do not form one line')]);
  const rise = frame.nodes[span.endNode]!.y_m - frame.nodes[span.startNode]!.y_m;
  const height = Math.abs(rise);
  if (height < 1e-3) return keepGoverning(findings, [notCheckedRow(subject, null, 'a column without height has no sway')]);
  const [top, bottom] = rise > 0 ? [span.endNode, span.startNode] : [span.startNode, span.endNode];
  const ux = (c: number, node: number): number => states[c]!.displacements[3 * node]!;
  const measured = (c: number) => ({ value: Math.abs(ux(c, top) - ux(c, bottom)), at: null });
  const inputs = (c: number) => ({ uxTop: ux(c, top), uxBottom: ux(c, bottom) });
  checkMovement(subject, 'sway', limits, height, settings, states, measured, inputs, findings);
}
