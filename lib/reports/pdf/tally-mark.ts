import type { Canvas } from './canvas';

/** The tally of five, which is also a braced frame; its brace passes in front. Always ink. */
export function tallyMark(canvas: Canvas, x: number, y: number, size: number): void {
  canvas.placed(x, y, size / 32, () => {
    for (const at of [5.5, 12.5, 19.5, 26.5]) canvas.line(at, 3, at, 29, { width: 3 });
    canvas.line(-0.5, 25.53, 32.5, 6.47, { colour: 'white', width: 6 });
    canvas.line(1, 24.66, 31, 7.34, { width: 3 });
  });
}
