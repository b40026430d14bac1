/** Other sections tried on one frame: the engine of a run on a changed frame, nothing stored. Runs in a browser. */
import type { Analyser } from '@/lib/analysis/analyser';
import type { DrawingData } from '@/lib/drawing/drawing-data';
import { drawingData } from '@/lib/drawing/frame-drawing-data';
import type { Frame } from '@/lib/model/frame';
import type { Settings } from '@/lib/model/settings';
import { checkLines, type CheckLine } from '@/lib/results/check-line';
import { evaluateFrame } from '@/lib/results/evaluate';
import { lineMemo } from '@/lib/results/line-memo';
import { memberResults, type MemberGoverning } from '@/lib/results/member-results';
import type { FrameEvaluation, Governing, Verdict } from '@/lib/results/result';
import { takenBy, type TriedSection } from '@/lib/sizing/taken-by';
import { withSections } from '@/lib/sizing/with-sections';

export interface TryTold {
  readonly verdict: Verdict;
  readonly governing: Governing | null;
  /** Why it has no solution, as a sentence. */
  readonly failure: string | null;
  readonly notChecked: readonly string[];
  readonly assumptions: readonly string[];
  readonly mass_kg: number | null;
  /** Worst first. */
  readonly checks: readonly CheckLine[];
  readonly drawing: DrawingData;
}

export interface Tried {
  readonly frame: Frame;
  readonly evaluation: FrameEvaluation;
  readonly members: readonly MemberGoverning[];
}

/**
 * Evaluates the frame with the sections tried, as a run does it; of two tries for a member the later one holds.
 *
 * @param frame as it is stored
 * @returns why it cannot be tried, where a section is not to be had for a member
 */
export function trySections(
  analyser: Analyser,
  frame: Frame,
  settings: Settings,
  tried: readonly TriedSection[],
): Tried | { readonly unfit: string } {
  const takes = tried.map(({ of, taken }) => ({ taken, has: takenBy(frame, of) }));
  const changed = withSections(frame, (i) => takes.findLast(({ has }) => has(i))?.taken ?? null);
  if ('unfit' in changed) return changed;
  const lineOf = lineMemo(changed);
  const evaluation = evaluateFrame(analyser, changed, settings, { second: true, all: false, lineOf });
  const { members } = memberResults(changed, evaluation, lineOf);
  lineOf.flat.forget();
  return { frame: changed, evaluation, members };
}

/** What is shown of a try. @param chosen case or combination to draw; null = the governing one */
export function tryTold({ frame, evaluation, members }: Tried, settings: Settings, chosen: string | null): TryTold {
  const { units, nearLimit } = settings;
  return {
    verdict: evaluation.verdict,
    governing: evaluation.governing,
    failure: evaluation.failure?.message ?? null,
    notChecked: evaluation.notChecked.filter((reason) => !evaluation.failure || !reason.startsWith('not solved')),
    assumptions: evaluation.assumptions,
    mass_kg: evaluation.mass,
    checks: checkLines(frame, evaluation.checks, { settings, origins: null }),
    drawing: drawingData({ frame, evaluation, members, units, nearLimit, chosen }),
  };
}
