/** Checks of a frame, worst first, and the working of those that govern. */
import { workingLines } from '@/lib/checks/working-lines';
import type { Frame } from '@/lib/model/frame';
import type { Settings } from '@/lib/model/settings';
import type { Acceptance } from '@/lib/reports/issue-cover';
import type { ReportSource } from '@/lib/reports/workbook/report-source';
import { checkPlace } from '@/lib/results/check-place';
import type { Check } from '@/lib/results/result';
import { unitLabel } from '@/lib/units/batch-unit';
import { formatQuantity, formatRatio } from '@/lib/units/format';
import type { Flow } from './flow';
import { verdictInk } from './ink';
import { acceptedWords } from './summary-pages';
import { table, type Row } from './table';
import { verdictMark } from './verdict-shapes';
import { workingLinesSet, type Box } from './working-boxes';
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
  flow.need(Math.min(blocks[0]!.height, flow.whole - 40));
  // each in the column that is shorter so far
  let ends = [flow.y, flow.y];
  for (const block of blocks) {
    const k = ends[0]! <= ends[1]! ? 0 : 1;
    if (ends[k]! + block.height > flow.zones.bottom && ends[k]! > flow.zones.y) {
      flow.nextSheet();
      ends = [flow.y, flow.y];
      block.draw(flow.x, flow.y);
      ends[0] = flow.y + block.height + 9;
      continue;
    }
    block.draw(flow.x + k * (columnWidth(flow) + between), ends[k]!);
    ends[k] = ends[k]! + block.height + 9;
  }
  flow.y = Math.min(Math.max(...ends), flow.zones.bottom);
}

const between = 18;
const labelWidth = 72;
const size = 8.6;
const columnWidth = (flow: Flow): number => (flow.width - between) / 2;

interface Block {
  readonly height: number;
  draw(x: number, y: number): void;
}

function blockOf(flow: Flow, frame: Frame, check: Check, lines: ReturnType<typeof workingLines>, nearLimit: number): Block {
  const { faces } = flow.file;
  const width = columnWidth(flow);
  const set = lines.map((line) => {
    const what = wrap(line.what, faces.condensed, 8, labelWidth - 6);
    const boxes = workingLinesSet(line.parts, faces, size, width - labelWidth);
    const source = line.source ? wrap(line.source, faces.condensed, 7.6, width - labelWidth) : [];
    const calculated = boxes.reduce((sum, box) => sum + heightOf(box), 0) + source.length * 9.4;
    return { what, boxes, source, height: Math.max(what.length * 9.6, calculated) + 4 };
  });
  const name = `${checkPlace(frame, check)}, ${check.check}`;
  const ratio = formatRatio(check.ratio, nearLimit);
  const title = wrap(name, faces.condensedBold, 9, width - 52);
  const head = title.length * 11 + 5;
  return {
    height: head + set.reduce((sum, line) => sum + line.height, 0) + 2,
    draw(x, y) {
      const { canvas } = flow;
      title.forEach((line, i) => canvas.text(line, x, y + 8.5 + 11 * i, { face: faces.condensedBold, size: 9 }));
      const right = x + width;
      canvas.text(ratio, right, y + 8.5, {
        face: faces.condensedBold,
        size: 9,
        colour: verdictInk[check.verdict],
        anchor: 'end',
      });
      verdictMark(canvas, check.verdict, right - faces.condensedBold.width(ratio, 9) - 11, y + 8.5, 7);
      let at = y + head - 1;
      canvas.line(x, at, right, at, { width: 0.75 });
      for (const line of set) {
        line.what.forEach((words, i) =>
          canvas.text(words, x, at + 9 + 9.6 * i, { face: faces.condensed, size: 8, colour: 'ink2' }),
        );
        let down = at + 2;
        for (const box of line.boxes) {
          box.draw(canvas, x + labelWidth, down + Math.max(box.above, 6.4) + 0.6);
          down += heightOf(box);
        }
        line.source.forEach((words, i) =>
          canvas.text(words, x + labelWidth, down + 7 + 9.4 * i, { face: faces.condensed, size: 7.6, colour: 'ink2' }),
        );
        at += line.height;
        canvas.line(x, at, right, at, { colour: 'hair', width: 0.5 });
      }
    },
  };
}

const heightOf = (box: Box): number => Math.max(box.above, 6.4) + Math.max(box.below, 1.9) + 2.2;
