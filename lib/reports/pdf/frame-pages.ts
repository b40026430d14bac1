/** Everything of one frame: drawing, loads, what they do, checks with their working, reactions, certificate. */
import { describeState } from '@/lib/results/describe-state';
import { drawingData } from '@/lib/drawing/frame-drawing-data';
import { resultMethodWords } from '@/lib/drawing/result-method-words';
import type { DrawingData } from '@/lib/drawing/drawing-data';
import type { Frame } from '@/lib/model/frame';
import type { Problem } from '@/lib/problems/problem';
import type { Acceptance } from '@/lib/reports/issue-cover';
import type { ReportFrame, ReportSource } from '@/lib/reports/workbook/report-source';
import { lineMemo } from '@/lib/results/line-memo';
import { memberResults, type MemberResults } from '@/lib/results/member-results';
import type { FrameEvaluation, ResultState } from '@/lib/results/result';
import { worstFirst } from '@/lib/results/worst-first';
import { unitLabel } from '@/lib/units/batch-unit';
import { formatQuantity, formatRatio } from '@/lib/units/format';
import type { Bookmark } from './pdf-file';
import type { Flow } from './flow';
import { certificatePart } from './frame-certificate';
import { checksPart, workingPart } from './frame-checks';
import { loadsPart } from './frame-loads';
import { membersTable, nodesTable } from './frame-model';
import { forcesTable, reactionsTable } from './frame-results';
import type { FrameLine } from './report-facts';
import { acceptedWords } from './summary-pages';
import { table } from './table';
import { deflectedView, diagramView, geometryView, ratioView, viewHeight, viewRow } from './views';

export interface FrameAsked {
  readonly source: ReportSource;
  readonly each: ReportFrame;
  readonly line: FrameLine;
  readonly of: number;
  readonly acceptances: readonly Acceptance[];
  /** Assumptions that hold for every frame, said once. */
  readonly shared: ReadonlySet<string>;
  readonly under: Bookmark;
}

export function framePages(flow: Flow, asked: FrameAsked): void {
  const { source, each, line, under } = asked;
  const { nearLimit } = source.settings;
  const words =
    line.ratio === null || line.verdict === 'not checked'
      ? line.verdict
      : `${line.verdict} ${formatRatio(line.ratio, nearLimit)}`;
  flow.part({ title: line.id, note: line.title, frame: line.id, verdict: { verdict: line.verdict, words } });
  flow.bookmark(line.id, under);
  facts(flow, asked);
  const { frame, evaluation } = each;
  if (frame === null) {
    stoppedBy(flow, source.problems, line.id);
    return;
  }
  const solved = evaluation !== null && evaluation.status === 'solved' ? evaluation : null;
  const results = solved ? memberResults(frame, solved, lineMemo(frame)) : { members: [], extremes: [] };
  const strength = strengthState(solved);
  const data = drawingData({ frame, evaluation: solved, members: results.members, units: source.settings.units, nearLimit, chosen: strength?.name ?? null }); // prettier-ignore
  flow.heading('Model', 'geometry, supports, sections');
  const note = [dimensionNote(frame), 'dimensions between supports and levels; coordinates below'].join(' ');
  viewRow(flow, [{ title: 'Geometry', note, draw: geometryView(data) }], viewHeight(data, flow.width, 120, 250));
  membersTable(flow, frame, data);
  nodesTable(flow, frame, data.units);
  loadsPart(flow, frame, data);
  if (solved) solvedParts(flow, asked, frame, solved, data, results, strength);
}

function solvedParts(
  flow: Flow,
  { source, acceptances, line }: FrameAsked,
  frame: Frame,
  evaluation: FrameEvaluation,
  data: DrawingData,
  results: MemberResults,
  strength: ResultState | null,
): void {
  const own = acceptances.filter((one) => one.frame === line.id);
  const checks = worstFirst(evaluation.checks);
  diagrams(flow, frame, data, strength);
  forcesTable(flow, frame, evaluation, results, data.units);
  checksPart(flow, frame, checks, source.settings, own);
  workingPart(flow, frame, checks, source);
  reactionsTable(flow, frame, evaluation.states, data.units);
  certificatePart(flow, evaluation.certificate, source);
}

/** The strength combination whose check is nearest its limit, else the first, else what there is. */
function strengthState(evaluation: FrameEvaluation | null): ResultState | null {
  if (evaluation === null) return null;
  const named = (name: string | null) => evaluation.states.find((state) => state.kind === 'combination' && state.purpose === 'strength' && state.name === name); // prettier-ignore
  for (const check of worstFirst(evaluation.checks.filter((one) => one.ratio !== null && one.quantity !== 'displacement'))) {
    const state = named(check.combination);
    if (state) return state;
  }
  return evaluation.states.find((state) => state.purpose === 'strength') ?? evaluation.states[0] ?? null;
}

function facts(flow: Flow, { source, each, line, of, acceptances, shared }: FrameAsked): void {
  const { evaluation, group, count, note } = each;
  const { units } = source.settings;
  const mass = evaluation?.mass ?? null;
  const words = [
    `frame ${line.number} of ${of}`,
    group === null ? null : `group ${group}`,
    `${count} off`,
    mass === null ? null : `steel ${formatQuantity(mass, 'mass', units)} ${unitLabel('mass', units)} each`,
    line.check === null
      ? null
      : `governed by ${line.check}${line.place === null ? '' : `, ${line.place}`}${line.combination === null ? '' : `, ${line.combination}`}`,
  ].filter((one) => one !== null);
  flow.paragraph(`${words.join(' · ')}.`, { colour: 'ink2', size: 8.8 });
  if (note !== null && note !== '') flow.paragraph(`Note: ${note}`, { size: 8.8 });
  if (line.unsolved !== null) flow.paragraph(`Not solved: ${line.unsolved.replace(/\.$/, '')}. Nothing of it is checked, and it is not issued.`, { face: 'sansBold', colour: 'red' });
  else if (line.verdict === 'over') flow.paragraph('Over: not to be built from, unless each check that is over is accepted below with its reason.', { face: 'sansBold', colour: 'red', size: 8.8 }); // prettier-ignore
  const reasons = line.unsolved === null ? (evaluation?.notChecked ?? []) : [];
  for (const reason of reasons) flow.paragraph(`Not checked: ${reason}`, { size: 8.8 });
  for (const one of acceptances.filter((each) => each.frame === line.id && each.subject === null))
    flow.paragraph(acceptedWords(one), { size: 8.8, colour: 'green' });
  const assumed = (evaluation?.assumptions ?? []).filter((one) => !shared.has(one));
  if (assumed.length > 0)
    flow.paragraph(`Assumed, besides what holds for every frame (Basis): ${assumed.join('; ')}.`, { size: 8.4, colour: 'ink2' });
}

function diagrams(flow: Flow, frame: Frame, data: DrawingData, strength: ResultState | null): void {
  const result = data.chosen;
  if (result === null || strength === null) return;
  const moving = data.movement ?? result;
  const method = resultMethodWords({ members: frame.members, noCasesAlone: data.noCasesAlone }, result).join('; ');
  flow.heading('Internal forces', `${told(result.name, describeState(frame, strength))}; ${method}`);
  const tall = viewHeight(data, flow.width, 120, 250);
  const low = viewHeight(data, flow.width / 2, 96, 150);
  const force = unitLabel('force', data.units);
  viewRow(flow, [{ title: 'Bending moment', note: `${result.name}, ${unitLabel('moment', data.units)}, drawn on the tension side; extremes dotted`, draw: diagramView(data, result, 'M', true) }], tall); // prettier-ignore
  viewRow(
    flow,
    [
      { title: 'Axial force', note: `${result.name}, ${force}, tension positive`, draw: diagramView(data, result, 'N', false) },
      { title: 'Shear force', note: `${result.name}, ${force}`, draw: diagramView(data, result, 'V', false) },
    ],
    low,
  );
  const moved = told(moving.name, moving.description);
  viewRow(
    flow,
    [
      { title: 'Deflected line', note: moved, draw: deflectedView(data, moving) },
      { title: 'Ratio', note: 'filled to the governing ratio; two lines: the limit', draw: ratioView(data) },
    ],
    low,
  );
}

const dimensionNote = ({ nodes, members, supports }: Frame): string =>
  `${counted(members.length, 'member')}, ${counted(nodes.length, 'node')}, ${counted(supports.length, 'support')};`;

const counted = (count: number, what: string): string => `${count} ${what}${count === 1 ? '' : 's'}`;

/** A result with its loads, unless its name says them already. */
const told = (name: string, terms: string | null): string =>
  terms === null || name.startsWith(terms) ? name : `${name}, ${terms}`;

/** The errors in the sheets that keep a frame from being read, each at its cell. */
function stoppedBy(flow: Flow, problems: readonly Problem[], id: string): void {
  const errors = problems.filter(({ severity, stopsAll, frames }) => severity === 'error' && (stopsAll || frames.includes(id)));
  flow.heading('What stops it', errors.length === 0 ? null : 'there is no frame to draw until this is mended');
  if (errors.length === 0) flow.paragraph('There is no frame to draw.');
  table(
    flow,
    [{ head: 'Sheet' }, { head: 'Cell' }, { head: 'What and what to do', soft: true }],
    errors.map(({ sheet, cell, row, message }) => ({
      cells: [sheet ?? '–', cell ?? (row === null ? '–' : `row ${row}`), message],
    })),
  );
}
