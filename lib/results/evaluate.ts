/** Analysis, checks, mass and verdict of one frame: what a run does with each frame, wherever it runs. */
import { analysisAssumptions } from '@/lib/analysis/analysis-assumptions';
import type { Analyser } from '@/lib/analysis/analyser';
import { largeTurns } from '@/lib/analysis/large-turns';
import { checkFrame } from '@/lib/checks/check-frame';
import type { Frame } from '@/lib/model/frame';
import type { Settings } from '@/lib/model/settings';
import { lineMemo, type LineOf } from '@/lib/results/line-memo';
import { frameMass } from '@/lib/results/mass';
import type { Failure, FrameEvaluation, ResultState } from '@/lib/results/result';
import { methodAssumptions } from '@/lib/results/method-assumptions';
import { slackAssumptions } from '@/lib/results/state-facts';
import { frameVerdict, governingOf } from '@/lib/results/verdict';

export interface EvaluateOptions {
  /** Make the second, independent analysis too (lib/results/second-sample.ts chooses). */
  readonly second: boolean;
  /** Keep every subject × check × combination, not only the governing ones. */
  readonly all: boolean;
  /** Exact lines of the frame's members, where the caller goes on to use them (lib/results/line-memo.ts). */
  readonly lineOf?: LineOf;
}

/**
 * Everything that is computed for one frame.
 *
 * @param analyser keeps orderings and buffers from frame to frame of one shape; one per thread
 * @returns status "not solved" with its failure where the frame moves freely, hangs apart or fails its certificate
 */
export function evaluateFrame(analyser: Analyser, frame: Frame, settings: Settings, options: EvaluateOptions): FrameEvaluation {
  try {
    return evaluate(analyser, frame, settings, options);
  } catch (fault) {
    // a fault met with one frame stops that frame, never the thousands beside it
    const message = `The analysis met a fault with this frame: ${fault instanceof Error ? fault.message : String(fault)}`;
    return unsolved(frame, { code: 'not-solved', message, node: null });
  }
}

function evaluate(analyser: Analyser, frame: Frame, settings: Settings, options: EvaluateOptions): FrameEvaluation {
  if (options.lineOf) return withLines(analyser, frame, settings, options, options.lineOf);
  const lineOf = lineMemo(frame);
  const evaluation = withLines(analyser, frame, settings, options, lineOf);
  lineOf.flat.forget();
  return evaluation;
}

function withLines(
  analyser: Analyser,
  frame: Frame,
  settings: Settings,
  options: EvaluateOptions,
  lineOf: LineOf,
): FrameEvaluation {
  const analysis = analyser.analyse(frame, { second: options.second, settings, lines: lineOf.flat });
  if (!analysis.ok) return unsolved(frame, analysis.failure);
  const bad = analysis.states.find((state) => !finite(state));
  if (bad) {
    const message = `the results of ${bad.name} are not finite numbers: the frame's stiffness or loads are out of all proportion`;
    return unsolved(frame, { code: 'not-solved', message, node: null });
  }
  const { checks, allChecks, ...found } = checkFrame(frame, settings, analysis.states, lineOf, { all: options.all });
  const assumptions = [
    ...methodAssumptions(settings),
    ...analysisAssumptions(frame, settings),
    ...slackAssumptions(frame, analysis.states),
    ...largeTurns(frame, analysis.states),
    ...found.assumptions,
  ];
  const notChecked = checks.length === 0 && found.notChecked.length === 0 ? ['nothing to check'] : found.notChecked;
  return {
    status: 'solved',
    failure: null,
    verdict: frameVerdict(checks, notChecked),
    governing: governingOf(checks),
    notChecked,
    assumptions,
    mass: frameMass(frame),
    states: analysis.states,
    checks,
    allChecks,
    certificate: analysis.certificate,
  };
}

function unsolved(frame: Frame, failure: Failure): FrameEvaluation {
  return {
    status: 'not solved',
    failure,
    verdict: 'not checked',
    governing: null,
    notChecked: [...new Set([`not solved: ${failure.message}`, ...frame.notChecked])],
    assumptions: [],
    mass: frameMass(frame),
    states: [],
    checks: [],
    allChecks: null,
    certificate: null,
  };
}

/** A node without a rotation of its own has rz NaN by agreement; nothing else may be. */
function finite(state: ResultState): boolean {
  const { displacements, reactions, endForces, criticalLoadFactor } = state;
  for (let i = 0; i < displacements.length; i++) {
    const d = displacements[i]!;
    if (!Number.isFinite(d) && !(i % 3 === 2 && Number.isNaN(d))) return false;
  }
  for (let i = 0; i < reactions.length; i++) if (!Number.isFinite(reactions[i]!)) return false;
  for (let i = 0; i < endForces.length; i++) if (!Number.isFinite(endForces[i]!)) return false;
  return criticalLoadFactor === null || Number.isFinite(criticalLoadFactor);
}
