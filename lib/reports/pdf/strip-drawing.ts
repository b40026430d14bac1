/** The strip on paper: a cell a frame in sheet order, filled to its ratio and shaped by its verdict, in rows of fifty. */
import { cellHeight, stripTop } from '@/lib/drawing/strip-data';
import { columnX, layOutStrip } from '@/lib/drawing/strip-layout';
import type { Verdict } from '@/lib/results/result';
import type { Canvas } from './canvas';
import type { Flow } from './flow';
import type { FrameLine } from './report-facts';
import { verdictCell, verdictMark } from './verdict-shapes';
import { cut } from './wrap';

/** Pixels of the layout a point. */
const scale = 0.75;
const tallied: readonly Exclude<Verdict, 'within'>[] = ['over', 'near', 'not checked'];

export function strip(flow: Flow, frames: readonly FrameLine[]): void {
  const { faces } = flow.file;
  const layout = layOutStrip(frames.length, flow.width / scale);
  const [cell, full, pitch] = [layout.cell * scale, layout.height * scale, layout.rowPitch * scale];
  const left = (column: number) => flow.x + columnX(layout, column) * scale;
  const end = left(layout.columns - 1) + cell;
  const tally = (i: number) => end + 12 + 15 * i;
  const ruler = (): void => {
    flow.need(14 + pitch);
    const { canvas } = flow;
    for (let column = 0; column < layout.columns; column++) {
      const at = left(column) + cell / 2;
      const ten = (column + 1) % 10 === 0;
      if ((column + 1) % 5 !== 0) continue;
      canvas.line(at, flow.y + (ten ? 9 : 11), at, flow.y + 13, { colour: 'rule', width: 0.5 });
      if (ten)
        canvas.text(String(column + 1), at, flow.y + 7, { face: faces.condensed, size: 7, colour: 'ink2', anchor: 'middle' });
    }
    tallied.forEach((verdict, i) => verdictMark(canvas, verdict, tally(i) - 5, flow.y + 8, 6));
    flow.y += 15;
  };
  ruler();
  for (let from = 0; from < frames.length; from += layout.columns) {
    if (flow.need(pitch)) ruler();
    const row = frames.slice(from, from + layout.columns);
    const foot = flow.y + pitch - 1.5;
    const one = foot - full / stripTop;
    const last = left(row.length - 1) + cell;
    row.forEach(({ verdict, ratio }, column) => {
      const tall = cellHeight(verdict === 'not checked' ? null : ratio, full);
      verdictCell(flow.canvas, verdict, left(column), foot - tall, cell, tall);
    });
    flow.canvas.line(left(0) - 1, foot, last + 1, foot, { width: 0.8 });
    flow.canvas.line(left(0) - 1, one, last + 1, one, { colour: 'ink3', width: 0.5, dash: [1, 1.6] });
    flow.canvas.text(String(from + 1), left(0) - 5, foot - 0.5, {
      face: faces.condensed,
      size: 7,
      colour: 'ink2',
      anchor: 'end',
    });
    if (layout.groups)
      groupNames(
        flow.canvas,
        row,
        (column) => left(column),
        foot - full - 2.5,
        frames[from - 1]?.group ?? null,
        end,
        faces.condensed,
      );
    tallied.forEach((verdict, i) => {
      const count = row.filter((frame) => frame.verdict === verdict).length;
      if (count > 0)
        flow.canvas.text(String(count), tally(i) + 1, foot - 0.5, { face: verdict === 'over' ? faces.condensedBold : faces.condensed, size: 7.5, colour: verdict === 'over' ? 'red' : verdict === 'near' ? 'amber' : 'ink2', anchor: 'end' }); // prettier-ignore
    });
    flow.y += pitch;
  }
  flow.space(4);
  legend(flow);
}

/** A group's name over its first cell. */
function groupNames(
  canvas: Canvas,
  row: readonly FrameLine[],
  left: (column: number) => number,
  y: number,
  before: string | null,
  end: number,
  face: Flow['file']['faces']['sans'],
): void {
  // prettier-ignore
  const starts = row.flatMap(({ group }, column) => (group !== null && group !== (row[column - 1]?.group ?? (column === 0 ? before : null)) ? [column] : [])); // prettier-ignore
  const shown = starts.includes(0) || row[0]?.group === null || row[0]?.group === undefined ? starts : [0, ...starts];
  shown.forEach((column, i) => {
    const next = shown[i + 1];
    const room = (next === undefined ? end : left(next)) - left(column) - 3;
    if (room > 10)
      canvas.text(cut(row[column]!.group ?? '', face, 6.8, room), left(column), y, { face, size: 6.8, colour: 'ink2' });
  });
}

function legend(flow: Flow): void {
  const { faces } = flow.file;
  let x = flow.x;
  const words = {
    within: 'within',
    near: 'near its limit',
    over: 'over: not to be built from',
    'not checked': 'not checked: not a pass',
  };
  for (const verdict of ['within', 'near', 'over', 'not checked'] as const) {
    verdictMark(flow.canvas, verdict, x, flow.y + 8, 7);
    flow.canvas.text(words[verdict], x + 10, flow.y + 8, { face: faces.condensed, size: 8, colour: 'ink2' });
    x += 10 + faces.condensed.width(words[verdict], 8) + 14;
  }
  flow.canvas.text('filled to the governing ratio; dotted: 1.00; cut at 1.25', x, flow.y + 8, {
    face: faces.condensed,
    size: 8,
    colour: 'ink2',
  });
  flow.y += 13;
}
