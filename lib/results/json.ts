/** The published results file (lib/results/schema.ts), written frame by frame: the same input gives the same bytes. */
import { extremesOf } from '@/lib/results/extremes-of';
import type { Frame } from '@/lib/model/frame';
import { settingWords, statedSettings, type SettingOrigins, type Settings } from '@/lib/model/settings';
import type { Problem } from '@/lib/problems/problem';
import { checkedWords } from '@/lib/reports/cautions';
import type { ReportFrame, ReportSource } from '@/lib/reports/workbook/report-source';
import { imperfectionForces, noCasesAlone, slackMembers } from '@/lib/results/state-facts';
import type { Check, Extreme, FrameEvaluation, ResultState, StateMethod } from '@/lib/results/result';
import { resultsFormat, type FrameResult, type ProblemJson, type ResultsJson } from '@/lib/results/schema';

/** Reason given for a frame that its sheets do not let run. */
const notRead = 'not analysed: errors in its sheets';

/** A frame that errors in its sheets stopped, or that has not been analysed yet, as published. */
function unsolvedFrameJson(id: string, reason: string): FrameResult {
  return {
    frame: id,
    status: 'not solved',
    verdict: 'not checked',
    governing: null,
    notChecked: [reason],
    mass: null,
    results: [],
    checks: [],
    certificate: null,
  };
}

/** One frame as published. With `all`, checks are those of every combination where the evaluation holds them. */
export function frameResultJson(
  frame: Frame,
  evaluation: FrameEvaluation,
  options: { readonly all: boolean } = { all: false },
): FrameResult {
  const solved = evaluation.status === 'solved';
  const checks = solved ? ((options.all ? evaluation.allChecks : null) ?? evaluation.checks) : [];
  const { governing, certificate } = evaluation;
  const noCases = solved ? noCasesAlone(frame) : null;
  return {
    frame: frame.id,
    status: evaluation.status,
    verdict: evaluation.verdict,
    governing: governing && {
      subject: governing.subject ?? frame.id,
      check: governing.check,
      combination: governing.combination,
      ratio: maybe(governing.ratio),
    },
    notChecked: [...evaluation.notChecked],
    ...(noCases === null ? {} : { notApplicable: [noCases] }),
    mass: maybe(evaluation.mass),
    results: solved ? evaluation.states.map((state) => stateJson(frame, state)) : [],
    checks: checks.map((check) => checkJson(frame.id, check)),
    certificate:
      solved && certificate
        ? {
            residual: plain(certificate.residual),
            equilibrium: plain(certificate.equilibrium),
            condition: plain(certificate.condition),
            digits: plain(certificate.digits),
            second: maybe(certificate.second),
            secondReason: certificate.secondReason,
          }
        : null,
  };
}

function stateJson(frame: Frame, state: ResultState): FrameResult['results'][number] {
  return {
    name: state.name,
    kind: state.kind,
    purpose: state.purpose,
    order: state.order,
    criticalLoadFactor: maybe(state.criticalLoadFactor),
    ...(state.method === null ? {} : { method: methodJson(frame, state, state.method) }),
    displacements: frame.nodes.map((node, i) => ({
      node: node.id,
      ux: plain(state.displacements[3 * i]!),
      uy: plain(state.displacements[3 * i + 1]!),
      rz: maybe(state.displacements[3 * i + 2]!),
    })),
    reactions: frame.supports.map((support, i) => ({
      node: frame.nodes[support.node]!.id,
      fx: plain(state.reactions[3 * i]!),
      fy: plain(state.reactions[3 * i + 1]!),
      mz: plain(state.reactions[3 * i + 2]!),
    })),
    members: frame.members.map((member, i) => {
      const [N0, V0, M0, N1, V1, M1] = state.endForces.subarray(6 * i, 6 * i + 6);
      const extremes = extremesOf(frame, state, i);
      return {
        member: member.id,
        start: { N: plain(N0!), V: plain(V0!), M: plain(M0!) },
        end: { N: plain(N1!), V: plain(V1!), M: plain(M1!) },
        extremes: { N: extremeJson(extremes.N), V: extremeJson(extremes.V), M: extremeJson(extremes.M) },
        deflection: { value: plain(extremes.deflection.value), at: plain(extremes.deflection.at) },
      };
    }),
  };
}

function methodJson(frame: Frame, state: ResultState, of: StateMethod): NonNullable<FrameResult['results'][number]['method']> {
  const stiffness = frame.members.flatMap((member, i) => {
    const [EA, EI] = [of.stiffness?.[2 * i] ?? 1, of.stiffness?.[2 * i + 1] ?? 1];
    return EA === 1 && EI === 1 ? [] : [{ member: member.id, EA: plain(EA), EI: plain(EI) }];
  });
  return {
    imperfection: of.imperfection,
    shearDeformation: of.shearDeformation,
    loadScale: of.loadScale,
    iterations: of.iterations,
    change: plain(of.change),
    slack: slackMembers(frame, state),
    notional: imperfectionForces(frame, state).map(({ node, Fx_N, Fy_N }) => ({ node, fx: plain(Fx_N), fy: plain(Fy_N) })),
    stiffness,
  };
}

function extremeJson(extreme: Extreme): Extreme {
  return {
    max: plain(extreme.max),
    maxAt: plain(extreme.maxAt),
    min: plain(extreme.min),
    minAt: plain(extreme.minAt),
  };
}

function checkJson(frameId: string, check: Check): FrameResult['checks'][number] {
  const checked = check.verdict !== 'not checked';
  return {
    subject: check.subject ?? frameId,
    check: check.check,
    combination: check.combination,
    at: maybe(check.at),
    face: check.face,
    value: checked ? maybe(check.value) : null,
    limit: checked ? maybe(check.limit) : null,
    ratio: checked ? maybe(check.ratio) : null,
    verdict: check.verdict,
    reason: check.reason,
    reference: check.reference,
  };
}

/** Every setting in the words of the Setup sheet, with where it came from. */
function settingsJson(settings: Settings, origins: SettingOrigins): ResultsJson['settings'] {
  return Object.fromEntries(
    statedSettings(settings, origins).map((name) => {
      const value = settings[name];
      const { source } = origins[name];
      const word = typeof value === 'boolean' ? (value ? 'yes' : 'no') : value;
      return [settingWords[name], { value: word, defaulted: source === 'default', source }];
    }),
  );
}

function problemJson(problem: Problem): ProblemJson {
  return {
    severity: problem.severity,
    code: problem.code,
    file: problem.file,
    sheet: problem.sheet,
    row: problem.row,
    column: problem.column,
    cell: problem.cell,
    frame: problem.frames[0] ?? null,
    frames: [...problem.frames],
    found: problem.found,
    message: problem.message,
  };
}

/** The file as pieces of text in order, one frame a line; never holds more than a frame. */
export async function* resultsJson(source: ReportSource, options: { readonly all: boolean }): AsyncGenerator<string> {
  const { input } = source;
  const files = input.files.map(({ name, sha256, size }) => ({ name, sha256, size }));
  yield `{"format":${JSON.stringify(resultsFormat)},"engine":${JSON.stringify(source.engine)},\n`;
  yield `"input":${JSON.stringify({ name: input.name, sha256: input.sha256, files })},\n`;
  yield `"settings":${JSON.stringify(settingsJson(source.settings, source.origins))},\n`;
  const { checked, notChecked } = checkedWords(source.settings);
  yield `"checked":${JSON.stringify(checked)},\n"notChecked":${JSON.stringify(notChecked)},\n"problems":[`;
  let comma = '\n';
  for (const problem of source.problems) {
    yield comma + JSON.stringify(problemJson(problem));
    comma = ',\n';
  }
  yield '],\n"frames":[';
  comma = '\n';
  for await (const each of source.frames({ states: true })) {
    yield comma + JSON.stringify(outcomeJson(each, options));
    comma = ',\n';
  }
  yield ']}\n';
}

function outcomeJson({ id, frame, evaluation }: ReportFrame, options: { readonly all: boolean }): FrameResult {
  if (!frame) return unsolvedFrameJson(id, notRead);
  return evaluation ? frameResultJson(frame, evaluation, options) : unsolvedFrameJson(id, 'not analysed yet');
}

/** A figure fit for JSON: −0 is 0. Anything not finite has no place in a solved frame. */
function plain(value: number): number {
  if (!Number.isFinite(value)) throw new RangeError(`Expected a finite figure in the results, got ${value}`);
  return value === 0 ? 0 : value;
}

function maybe(value: number | null): number | null {
  return value === null || !Number.isFinite(value) ? null : plain(value);
}
