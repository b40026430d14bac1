import type { Verdict } from '@/lib/results/result';
import { num, type Canvas } from './canvas';

/** Hatches at 45° within path operators; the box is where they may fall. */
export function hatch(
  canvas: Canvas,
  operators: string,
  box: { x: number; y: number; width: number; height: number },
  pitch: number,
): void {
  canvas.shape(operators, { fill: 'amberWash' });
  canvas.clipped(operators, () => {
    const { x, y, width, height } = box;
    let lines = '';
    for (let off = Math.floor(x / pitch) * pitch - height - pitch; off < x + width; off += pitch)
      lines += `${num(off)} ${num(y + height)} m ${num(off + height)} ${num(y)} l `;
    canvas.shape(lines.trimEnd(), { pen: { colour: 'amberLine', width: pitch * 0.32 } });
  });
}

/** A filled rectangle with a V cut in its head. */
function notched(x: number, y: number, width: number, height: number): string {
  const depth = Math.min(height, Math.max(1.6, height * 0.2));
  const points = [[x, y], [x + width * 0.27, y], [x + width / 2, y + depth], [x + width * 0.73, y], [x + width, y], [x + width, y + height], [x, y + height]]; // prettier-ignore
  return `${points.map(([px, py], i) => `${num(px!)} ${num(py!)} ${i === 0 ? 'm' : 'l'}`).join(' ')} h`;
}

/** A cell of the strip, or the mark beside a word: within plain with its level, near hatched, over solid with a notch, not checked hollow. */
export function verdictCell(canvas: Canvas, verdict: Verdict, x: number, y: number, width: number, height: number): void {
  const operators = `${num(x)} ${num(y)} ${num(width)} ${num(height)} re`;
  if (verdict === 'over') canvas.shape(notched(x, y, width, height), { fill: 'red' });
  else if (verdict === 'not checked')
    canvas.rect(x + 0.3, y + 0.3, Math.max(width - 0.6, 0.2), Math.max(height - 0.6, 0.2), {
      pen: { colour: 'ink3', width: 0.6, dash: [1.6, 1.2] },
    });
  else if (verdict === 'near') hatch(canvas, operators, { x, y, width, height }, 2.2);
  else canvas.shape(operators, { fill: 'plain' });
  if (verdict === 'near' || verdict === 'within')
    canvas.line(x, y + 0.5, x + width, y + 0.5, { colour: verdict === 'near' ? 'amber' : 'plainCap', width: 1 });
}

/** The mark of a verdict, as tall as small letters' heads; within a box as tables have it. */
export function verdictMark(canvas: Canvas, verdict: Verdict, x: number, baseline: number, size = 7): void {
  verdictCell(canvas, verdict, x, baseline - size + 0.6, size, size);
  if (verdict === 'within' || verdict === 'near')
    canvas.rect(x + 0.3, baseline - size + 0.9, size - 0.6, size - 0.6, {
      pen: { colour: verdict === 'near' ? 'amber' : 'plainCap', width: 0.6 },
    });
}
