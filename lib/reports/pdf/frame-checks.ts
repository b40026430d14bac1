/** Checks of a frame, worst first, and the working of those that govern. */
import { workingLines } from '@/lib/checks/working-lines';
import type { WorkingLine } from '@/lib/checks/working-parts';
import type { Frame } from '@/lib/model/frame';
import type { Settings } from '@/lib/model/settings';
import type { Acceptance } from '@/lib/reports/issue-cover';
import type { ReportSource } from '@/lib/reports/workbook/report-source';
import { checkPlace } from '@/lib/results/check-place';
import type { Check, Verdict } from '@/lib/results/result';
import { unitLabel } from '@/lib/units/batch-unit';
import { formatQuantity, formatRatio } from '@/lib/units/format';
import type { Flow } from './flow';
import { verdictInk } from './ink';
import { acceptedWords } from './summary-pages';
import { table, type Row } from './table';
import { verdictMark } from './verdict-shapes';
import { overflows, workingLinesSet, type Box } from './working-boxes';
import { wrap } from './wrap';

/** Checks listed in full; of more only those that are flagged, and the worst of each subject and of each kind. */
const mostListed = 36;
/** Workings of checks that are over, beside the worst of each kind. */
const mostOver = 10;

export function checksPart(
  flow: Flow,
  frame: Frame,
  checks: readonly Check[],
  settings: Settings,
  accepted: readonly Acceptance[],
): void {
  const { units, nearLimit } = settings;
  const shown = checks.length <= mostListed ? checks : telling(checks);
  const left = checks.length - shown.length;
  flow.heading('Checks', left === 0 ? `all ${checks.length}, worst first` : `${shown.length} of ${checks.length}, worst first: all that are over, near or not checked, the worst of each member and node, the worst of each kind; the rest is in the result workbook`); // prettier-ignore
  table(
    flow,
    [
      { head: 'Where', face: 'condensedMedium', soft: true },
      { head: 'Check', soft: true },
      { head: 'Comb.' },
      { head: 'At', unit: unitLabel('length', units), align: 'right' },
      { head: 'Value', align: 'right' },
      { head: 'Limit', align: 'right' },
      { head: '' },
      { head: 'Ratio', align: 'right' },
      { head: 'Verdict' },
    ],
    shown.map((check): Row => {
      const notes = [check.verdict === 'within' || check.verdict === 'near' ? null : check.reason];
      const own = accepted.filter(
        (one) => one.check === check.check && one.subject === check.subject && one.verdict === check.verdict,
      );
      const text = [...notes, ...own.map(acceptedWords)].filter((one) => one !== null && one !== '').join(' ');
      return {
        cells: [
          checkPlace(frame, check),
          check.check,
          check.combination,
          check.at === null ? '' : formatQuantity(check.at, 'length', units, { decimals: 2 }),
          formatQuantity(check.value, check.quantity, units),
          formatQuantity(check.limit, check.quantity, units),
          { text: unitLabel(check.quantity, units), colour: 'ink2' },
          { text: formatRatio(check.ratio, nearLimit), face: 'condensedBold', colour: verdictInk[check.verdict] },
          { text: check.verdict, mark: check.verdict, colour: verdictInk[check.verdict] },
        ],
        ...(text === '' ? {} : { note: { text, ...(own.length > 0 ? { colour: 'green' as const } : {}) } }),
      };
    }),
  );
}

/** Of checks in order of their gravity: what a reader must see. */
function telling(checks: readonly Check[]): readonly Check[] {
  const seen = new Set<string>();
  const first = (key: string): boolean => !seen.has(key) && seen.add(key) !== undefined;
  return checks.filter((check) => {
    const [subject, kind] = [first(`of ${check.subjectKind} ${check.subject ?? ''}`), first(`kind ${check.check}`)];
    return check.verdict !== 'within' || subject || kind;
  });
}

/** The worst of each kind of check, then others that are over, as calculations. */
export function workingPart(flow: Flow, frame: Frame, checks: readonly Check[], source: ReportSource): void {
  const kinds = new Set<string>();
  const worst = checks.filter(({ check }) => !kinds.has(check) && kinds.add(check) !== undefined);
  const others = checks.filter((check) => check.verdict === 'over' && !worst.includes(check)).slice(0, mostOver);
  const blocks = [...worst, ...others].flatMap((check): Block[] => {
    const lines = workingLines(check, source);
    return check.verdict === 'not checked' || lines.length === 0
      ? []
      : [blockOf(flow, frame, check, lines, source.settings.nearLimit)];
  });
  if (blocks.length === 0) return;
  const over = checks.filter((check) => check.verdict === 'over').length;
  const shown = worst.filter((check) => check.verdict === 'over').length + others.length;
  const more = over > shown ? `; ${over - shown} more that are over are worked out in the workbook` : '';
  flow.heading('Working', `the worst of each kind of check${others.length > 0 ? ', and others that are over' : ''}${more}`);
  flow.need(Math.min(heightOfLines(blocks[0]!), 160));
  // each in the column that is shorter so far, carried on in the next where it is taller than what is left
  let ends = [flow.y, flow.y];
  for (const block of blocks) {
    let rest: Block | null = block;
    while (rest) {
      const [left = 0, right = 0] = ends;
      if (rest.wide) ends = [Math.max(left, right), Math.max(left, right)];
      let k: number = left <= right || rest.wide ? 0 : 1;
      let fits = linesThatFit(rest, flow.zones.bottom - ends[k]!);
      if (fits === 0) {
        flow.nextSheet();
        ends = [flow.y, flow.y];
        k = 0;
        fits = Math.max(1, linesThatFit(rest, flow.room));
      }
      const now: Block = { ...rest, lines: rest.lines.slice(0, fits) };
      drawBlock(flow, now, flow.x + k * (columnWidth(flow) + between), ends[k]!);
      ends[k] = ends[k]! + heightOfLines(now) + 9;
      if (rest.wide) ends = [ends[k]!, ends[k]!];
      const more = rest.lines.slice(fits);
      // read on to the right, then on the next sheet
      if (more.length > 0) ends = k === 0 && !rest.wide ? [flow.zones.bottom, ends[1]!] : [flow.zones.bottom, flow.zones.bottom];
      rest = more.length > 0 ? { ...rest, title: block.carried, lines: more } : null;
    }
  }
  flow.y = Math.min(Math.max(...ends), flow.zones.bottom);
}

const between = 18;
const labelWidth = 72;
const size = 8.6;
const columnWidth = (flow: Flow): number => (flow.width - between) / 2;

interface LineSet {
  readonly what: readonly string[];
  readonly boxes: readonly Box[];
  readonly source: readonly string[];
  readonly height: number;
}
/** A check's calculation. */
interface Block {
  readonly title: readonly string[];
  /** Over the part of it that stands elsewhere. */
  readonly carried: readonly string[];
  readonly ratio: string;
  readonly verdict: Verdict;
  readonly lines: readonly LineSet[];
  /** Across both columns: one of its formulas needs the room. */
  readonly wide: boolean;
}

const headOf = ({ title }: Block): number => title.length * 11 + 5;
const heightOfLines = (block: Block): number => headOf(block) + block.lines.reduce((sum, line) => sum + line.height, 0) + 2;

/** Lines of a block that fit into a height: all, or so many that neither part is a scrap; 0 = it begins elsewhere. */
function linesThatFit(block: Block, room: number): number {
  if (heightOfLines(block) <= room) return block.lines.length;
  let tall = headOf(block) + 2;
  let count = 0;
  while (count < block.lines.length && tall + block.lines[count]!.height <= room) tall += block.lines[count++]!.height;
  const kept = Math.min(count, block.lines.length - 2);
  return kept >= 3 ? kept : 0;
}

function blockOf(flow: Flow, frame: Frame, check: Check, lines: readonly WorkingLine[], nearLimit: number): Block {
  const { faces } = flow.file;
  const wide = lines.some(({ parts }) => overflows(parts, faces, size, columnWidth(flow) - labelWidth));
  const width = widthOf(flow, wide);
  const set = lines.map((line): LineSet => {
    const what = wrap(plainly(line.what), faces.condensed, 8, labelWidth - 6);
    const boxes = workingLinesSet(line.parts, faces, size, width - labelWidth);
    const source = line.source ? wrap(plainly(line.source), faces.condensed, 7.6, width - labelWidth) : [];
    const calculated = boxes.reduce((sum, box) => sum + heightOf(box), 0) + source.length * 9.4;
    return { what, boxes, source, height: Math.max(what.length * 9.6, calculated) + 4 };
  });
  const name = `${checkPlace(frame, check)}, ${check.check}`;
  const title = (words: string): string[] => wrap(words, faces.condensedBold, 9, width - 52);
  const ratio = formatRatio(check.ratio, nearLimit);
  return { title: title(name), carried: title(`${name}, continued`), ratio, verdict: check.verdict, lines: set, wide };
}

const widthOf = (flow: Flow, wide: boolean): number => (wide ? flow.width : columnWidth(flow));

function drawBlock(flow: Flow, { title, ratio, verdict, lines, wide }: Block, x: number, y: number): void {
  const { faces } = flow.file;
  const { canvas } = flow;
  const right = x + widthOf(flow, wide);
  title.forEach((line, i) => canvas.text(line, x, y + 8.5 + 11 * i, { face: faces.condensedBold, size: 9 }));
  canvas.text(ratio, right, y + 8.5, { face: faces.condensedBold, size: 9, colour: verdictInk[verdict], anchor: 'end' });
  verdictMark(canvas, verdict, right - faces.condensedBold.width(ratio, 9) - 11, y + 8.5, 7);
  let at = y + title.length * 11 + 4;
  canvas.line(x, at, right, at, { width: 0.75 });
  for (const { what, boxes, source, height } of lines) {
    what.forEach((words, i) => canvas.text(words, x, at + 9 + 9.6 * i, { face: faces.condensed, size: 8, colour: 'ink2' }));
    let down = at + 2;
    for (const box of boxes) {
      box.draw(canvas, x + labelWidth, down + Math.max(box.above, 6.4) + 0.6);
      down += heightOf(box);
    }
    source.forEach((words, i) =>
      canvas.text(words, x + labelWidth, down + 7 + 9.4 * i, { face: faces.condensed, size: 7.6, colour: 'ink2' }),
    );
    at += height;
    canvas.line(x, at, right, at, { colour: 'hair', width: 0.5 });
  }
}

/** "α_cr" without its sign for a subscript, where it is set in one size. */
const plainly = (words: string): string => words.replace(/([A-Za-zΑ-ωλχ])_([A-Za-z0-9])/gu, '$1$2');

const heightOf = (box: Box): number => Math.max(box.above, 6.4) + Math.max(box.below, 1.9) + 2.2;
