import { ticks, tickText } from '@/lib/drawing/axis';
import { spreadBins, stacked, type SpreadFrame } from '@/lib/drawing/spread-bins';
import type { Flow } from './flow';
import { num } from './canvas';
import { hatch, verdictCell } from './verdict-shapes';

/** How governing ratios are spread: frames in steps of 0.025, against the near limit and the limit at 1.00. */
export function spreadChart(flow: Flow, frames: readonly SpreadFrame[], nearLimit: number, height: number): void {
  flow.need(height);
  const { bins, low, high, above } = spreadBins(frames, nearLimit);
  const { canvas, x: left, width } = flow;
  const { condensed } = flow.file.faces;
  const most = Math.max(4, ...bins.map((bin) => bin.count));
  const [x0, x1] = [left + 26, left + Math.min(width, 420)];
  const [top, foot] = [flow.y + 16, flow.y + height - 16];
  const x = (ratio: number) => x0 + ((ratio - low) / (high - low)) * (x1 - x0);
  const y = (count: number) => foot - (count / most) * (foot - top);
  for (const count of ticks(0, most, 4).filter((tick) => tick > 0 && Number.isInteger(tick))) {
    canvas.line(x0, y(count), x1, y(count), { colour: 'hair', width: 0.4 });
    canvas.text(String(count), x0 - 4, y(count) + 2.5, { face: condensed, size: 7.5, colour: 'ink2', anchor: 'end' });
  }
  for (const { from, to, of } of bins) {
    let foundation = 0;
    for (const verdict of stacked) {
      const below = foundation;
      foundation += of[verdict];
      if (of[verdict] === 0) continue;
      const head = y(foundation);
      const box = { x: x(from) + 0.4, y: head, width: Math.max(x(to) - x(from) - 0.8, 0.4), height: y(below) - head };
      const operators = `${num(box.x)} ${num(box.y)} ${num(box.width)} ${num(box.height)} re`;
      if (verdict === 'not checked') {
        verdictCell(canvas, verdict, box.x, box.y, box.width, box.height);
        continue;
      }
      if (verdict === 'near') hatch(canvas, operators, box, 2.4);
      else canvas.shape(operators, { fill: verdict === 'over' ? 'red' : 'plain' });
      const colour = verdict === 'over' ? 'red' : verdict === 'near' ? 'amber' : 'plainCap';
      canvas.line(box.x, box.y + 0.5, box.x + box.width, box.y + 0.5, { colour, width: 1 });
    }
  }
  canvas.line(x(nearLimit), top - 6, x(nearLimit), foot, { colour: 'amberLine', width: 0.8, dash: [2.5, 2] });
  canvas.line(x(1), top - 6, x(1), foot, { colour: 'red', width: 0.9 });
  canvas.text(`near ${nearLimit.toFixed(2)}`, x(nearLimit) - 3, top - 4, {
    face: condensed,
    size: 7.5,
    colour: 'amber',
    anchor: 'end',
  });
  canvas.text('limit 1.00', x(1) + 3, top - 4, { face: condensed, size: 7.5, colour: 'red' });
  canvas.line(x0, foot, x1, foot, { width: 0.9 });
  const steps = ticks(low, high, 8);
  for (const tick of steps)
    canvas.text(tickText(tick, steps), x(tick), foot + 9, { face: condensed, size: 7.5, colour: 'ink2', anchor: 'middle' });
  if (above > 0)
    canvas.text(`${above} above ${high.toFixed(2)} in the last step`, x1, foot + 16, {
      face: condensed,
      size: 7.5,
      colour: 'ink2',
      anchor: 'end',
    });
  flow.y += height;
  flow.space(4);
}
