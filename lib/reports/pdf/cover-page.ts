/** The first sheet: what this is, of what, and who answers for it. */
import type { IssueCover, Signature } from '@/lib/reports/issue-cover';
import type { ReportSource } from '@/lib/reports/workbook/report-source';
import { longDate } from './dates';
import type { Flow } from './flow';
import type { ReportFacts } from './report-facts';
import { tallyMark } from './tally-mark';
import { verdictMark } from './verdict-shapes';
import { wrap } from './wrap';

export interface CoverAsked {
  readonly source: ReportSource;
  readonly cover: IssueCover;
  readonly facts: ReportFacts;
  /** What of the frames is in the report, in words. */
  readonly chosen: string;
}

export function coverPage(flow: Flow, { source, cover, facts, chosen }: CoverAsked): void {
  const { faces } = flow.file;
  flow.part({ title: 'Calculation report', note: cover.office === '' ? null : cover.office });
  flow.bookmark('Cover');
  flow.space(16);
  tallyMark(flow.canvas, flow.x, flow.y, 40);
  const [text, size] = [flow.x + 56, 21];
  const room = flow.width - 56;
  const name = source.settings.title ?? (cover.batch || source.input.name);
  let y = flow.y + 16;
  for (const line of wrap(name, faces.sansBold, size, room)) {
    flow.canvas.text(line, text, y, { face: faces.sansBold, size });
    y += size * 1.25;
  }
  const project = [cover.projectNumber, cover.project].filter(Boolean).join('  ');
  for (const line of wrap(project, faces.sans, 12, room)) {
    flow.canvas.text(line, text, y - 3, { face: faces.sans, size: 12, colour: 'ink2' });
    y += 16;
  }
  flow.y = Math.max(y, flow.y + 44);
  flow.space(10);
  if (cover.number === null) draftBox(flow);
  identity(flow, { source, cover, facts, chosen });
  flow.heading('Who answers for it', 'a name here is no signature: sign and seal in the spaces');
  signatures(flow, cover);
  if (cover.note !== null && cover.note !== '') {
    flow.heading('Note');
    flow.paragraph(cover.note);
  }
}

function draftBox(flow: Flow): void {
  const { canvas, x, y, width } = flow;
  const { sansBold, sans } = flow.file.faces;
  canvas.rect(x, y, width, 34, { pen: { colour: 'red', width: 1.2 } });
  canvas.text('Draft, not issued', x + 10, y + 15, { face: sansBold, size: 11, colour: 'red' });
  canvas.text('For review only. Nothing here is to be built from until it has been checked, approved and issued under a number.', x + 10, y + 27, { face: sans, size: 8.5, colour: 'red' }); // prettier-ignore
  flow.y += 34;
  flow.space(8);
}

/** Label and value, ruled; values are broken into as many lines as they need. */
function pairs(flow: Flow, rows: readonly (readonly [label: string, value: string])[], label = 92): void {
  const { condensed, sans } = flow.file.faces;
  for (const [name, value] of rows) {
    const lines = wrap(value, sans, 9, flow.width - label);
    flow.need(lines.length * 12 + 4);
    flow.canvas.text(name, flow.x, flow.y + 9.5, { face: condensed, size: 8.5, colour: 'ink2' });
    for (const line of lines) {
      flow.canvas.text(line, flow.x + label, flow.y + 9.5, { face: sans, size: 9 });
      flow.y += 12;
    }
    flow.y += 3;
    flow.canvas.line(flow.x, flow.y, flow.x + flow.width, flow.y, { colour: 'hair', width: 0.5 });
  }
}

function identity(flow: Flow, { source, cover, facts, chosen }: CoverAsked): void {
  const { input, settings, title } = source;
  const { counts } = facts;
  const top = flow.y;
  flow.canvas.line(flow.x, top, flow.x + flow.width, top, { width: 0.9 });
  pairs(flow, [
    ['Issue', cover.number ?? 'none: this is a draft'],
    ...(cover.issued
      ? ([
          ['Issued', `${longDate(cover.issued.at)}${cover.issued.to.length > 0 ? ` to ${cover.issued.to.join(', ')}` : ''}`],
        ] as const)
      : []),
    ...(cover.supersedes === null
      ? []
      : ([['Takes the place of', `issue ${cover.supersedes}, which is not to be used any more`]] as const)),
    ['Batch', cover.batch || input.name],
    ['Revision', [cover.revision || 'none', title.state].filter(Boolean).join(', ')],
    ...(title.madeBy ?? []).map((line, i) => [i === 0 ? 'Made by a change' : '', line] as const),
    ['Input', [input.name, ...(input.files.length > 1 ? input.files.map((file) => file.name) : [])].join(', ')],
    ['Input SHA-256', input.sha256],
    ['Analysed by', `Tallyframe, ${source.engine}`],
    ['Units', settings.units === 'metric' ? 'metric: m, mm, kN, kN·m, MPa, kg' : 'US customary: ft, in, kip, kip·ft, ksi, lb'],
    ['In this report', chosen],
  ]);
  const { faces } = flow.file;
  flow.need(18);
  flow.canvas.text('Verdicts', flow.x, flow.y + 11, { face: faces.condensed, size: 8.5, colour: 'ink2' });
  let x = flow.x + 92;
  for (const verdict of ['over', 'near', 'within', 'not checked'] as const) {
    verdictMark(flow.canvas, verdict, x, flow.y + 11, 8);
    const words = `${counts[verdict]} ${verdict}`;
    flow.canvas.text(words, x + 12, flow.y + 11, {
      face: faces.sansBold,
      size: 9.5,
      colour: verdict === 'over' && counts.over > 0 ? 'red' : 'ink',
    });
    x += 12 + faces.sansBold.width(words, 9.5) + 16;
  }
  flow.canvas.text(`of ${facts.frames.length} frames`, x - 4, flow.y + 11, { face: faces.sans, size: 9, colour: 'ink2' });
  flow.y += 18;
  flow.canvas.line(flow.x, flow.y, flow.x + flow.width, flow.y, { colour: 'hair', width: 0.5 });
  flow.space(4);
}

/** Three spaces to sign in, and one for a seal. */
function signatures(flow: Flow, cover: IssueCover): void {
  const { faces } = flow.file;
  const height = 112;
  flow.need(height);
  const { canvas, x, y, width } = flow;
  const seal = 112;
  const each = (width - seal) / 3;
  const people: readonly (readonly [string, Signature | null])[] = [
    ['Prepared', cover.prepared],
    ['Checked', cover.checked],
    ['Approved', cover.approved],
  ];
  canvas.rect(x, y, width, height, { pen: { width: 0.75 } });
  people.forEach(([act, by], i) => {
    const left = x + each * i;
    canvas.line(left + each, y, left + each, y + height, { colour: 'rule', width: 0.5 });
    canvas.text(act, left + 7, y + 12, { face: faces.condensed, size: 8.5, colour: 'ink2' });
    const lines = by ? wrap(by.name, faces.sansBold, 9.5, each - 14) : ['not yet'];
    lines.slice(0, 3).forEach((line, k) => {
      canvas.text(line, left + 7, y + 26 + 12 * k, {
        face: by ? faces.sansBold : faces.sans,
        size: 9.5,
        colour: by ? 'ink' : 'ink3',
      });
    });
    if (by)
      canvas.text(longDate(by.at), left + 7, y + 26 + 12 * Math.min(lines.length, 3), {
        face: faces.sans,
        size: 8.5,
        colour: 'ink2',
      });
    canvas.line(left + 7, y + height - 18, left + each - 7, y + height - 18, { colour: 'rule', width: 0.5, dash: [2, 2] });
    canvas.text('signature', left + 7, y + height - 8, { face: faces.condensed, size: 7.5, colour: 'ink3' });
  });
  canvas.text('seal', x + width - seal + 7, y + height - 8, { face: faces.condensed, size: 7.5, colour: 'ink3' });
  flow.y += height;
  flow.space(6);
}
