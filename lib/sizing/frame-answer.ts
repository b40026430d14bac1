import type { FrameEvaluation } from '@/lib/results/result';
import type { FrameAnswer } from '@/lib/sizing/sizing';

/** What a frame's evaluation says of the sections it was evaluated with. "Not checked" never fits. */
export function frameAnswer(evaluation: FrameEvaluation): FrameAnswer {
  if (evaluation.status === 'not solved')
    return { outcome: 'not solved', ratio: null, governs: evaluation.failure?.message ?? 'not solved' };
  let ratio: number | null = null;
  for (const check of evaluation.checks) if (check.ratio !== null && !(check.ratio <= (ratio ?? -Infinity))) ratio = check.ratio;
  const { governing, verdict, notChecked, checks } = evaluation;
  if (verdict === 'not checked') {
    const open = checks.find((check) => check.verdict === 'not checked');
    const of = open ? [open.check, open.subject, open.reason].filter((word) => word !== null).join(', ') : null;
    return { outcome: 'not checked', ratio, governs: of ?? notChecked[0] ?? 'nothing to check' };
  }
  const governs = [governing?.check, governing?.subject, governing?.combination]
    .filter((word) => word !== null && word !== undefined)
    .join(', ');
  return { outcome: verdict === 'over' ? 'over' : 'fits', ratio, governs };
}
