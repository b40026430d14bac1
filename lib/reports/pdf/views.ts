/** A frame's views, as the frame page has them, each in a box of the sheet with its caption under it. */
import { planDeflected } from '@/lib/drawing/deflected-plan';
import { planDiagram, type Force } from '@/lib/drawing/diagram-plan';
import type { DrawingData, DrawingResult } from '@/lib/drawing/drawing-data';
import { planGeometry } from '@/lib/drawing/geometry-plan';
import { planLoads } from '@/lib/drawing/loads-plan';
import { boundsOf } from '@/lib/drawing/paper';
import { planRatio } from '@/lib/drawing/ratio-plan';
import type { Canvas } from './canvas';
import type { Flow } from './flow';
import { pathOperators } from './path-operators';
import { drawDimensions, drawFrame, drawLabels, strokePath, type Faces } from './plan-drawing';
import { hatch } from './verdict-shapes';
import { wrap } from './wrap';

/** Draws into a box of so many pixels. */
type Draw = (canvas: Canvas, width: number, height: number, faces: Faces) => void;
export interface View {
  readonly title: string;
  readonly note: string;
  readonly draw: Draw;
}

/** Points a pixel of a plan. */
const scale = 0.66;
const grid = (5 * 72) / 25.4;

/** Views beside each other, all of one height; they stay on one sheet. @param height of the drawings, points */
export function viewRow(flow: Flow, views: readonly View[], height: number, across = views.length): void {
  const { faces } = flow.file;
  const width = flow.width / across;
  const captions = views.map(({ title, note }, i) => wrap(`${title}  ${note}`, faces.sans, 8, width - (i > 0 ? 16 : 8)));
  const deep = 8 + 10.4 * Math.max(...captions.map((lines) => lines.length));
  flow.need(height + deep);
  const { canvas, x, y } = flow;
  views.forEach(({ title, draw }, i) => {
    const left = x + i * width;
    canvas.clipped(`${left} ${y} ${width} ${height} re`, () => {
      for (let at = left + grid / 2; at < left + width; at += grid)
        canvas.line(at, y, at, y + height, { colour: 'grid', width: 0.4 });
      for (let at = y + grid / 2; at < y + height; at += grid)
        canvas.line(left, at, left + width, at, { colour: 'grid', width: 0.4 });
      canvas.placed(left, y, scale, () => draw(canvas, width / scale, height / scale, faces));
    });
    canvas.line(left, y + height, left + width, y + height, { colour: 'hair', width: 0.5 });
    if (i > 0) canvas.line(left, y, left, y + height + deep, { colour: 'hair', width: 0.5 });
    const text = left + (i > 0 ? 8 : 0);
    captions[i]!.forEach((line, k) => {
      const baseline = y + height + 11 + 10.4 * k;
      const bold = k === 0 && line.startsWith(title) ? title : '';
      canvas.text(bold, text, baseline, { face: faces.sansBold, size: 8 });
      const after = bold === '' ? 0 : faces.sansBold.width(bold, 8) + 5;
      canvas.text(line.slice(bold.length).trim(), text + after, baseline, { face: faces.sans, size: 8, colour: 'ink2' });
    });
  });
  flow.y += height + deep;
  flow.canvas.line(x, flow.y, x + flow.width, flow.y, { colour: 'hair', width: 0.5 });
  flow.space(4);
}

/** Height that a view wants across the whole sheet: flat frames are not given a tall box. */
export function viewHeight(data: DrawingData, width: number, least: number, most: number): number {
  const { minX, maxX, minY, maxY } = boundsOf(data.nodes);
  const shape = maxX > minX ? (maxY - minY) / (maxX - minX) : 2;
  return Math.min(most, Math.max(least, width * 0.8 * shape + 75));
}

export const geometryView =
  (data: DrawingData): Draw =>
  (canvas, width, height, faces) => {
    const { scene, labels } = planGeometry(data, width, height);
    drawFrame(canvas, scene);
    drawDimensions(canvas, scene, faces);
    drawLabels(canvas, labels, faces);
  };

export const loadsView =
  (data: DrawingData, result: DrawingResult, large = false): Draw =>
  (canvas, width, height, faces) => {
    const plan = planLoads(data, result, width, height, large);
    for (const { d, className } of plan.arrows)
      strokePath(canvas, d, className.includes('d-load-point') ? { width: 1.4 } : { width: 0.9, colour: 'ink2' });
    drawFrame(canvas, plan.scene, { slack: result.slack });
    drawLabels(canvas, plan.labels, faces);
  };

/** What a view of loads does not draw but say. */
export const loadsBesides = (data: DrawingData, result: DrawingResult): readonly string[] =>
  planLoads(data, result, 300, 200, false).besides;

export const diagramView =
  (data: DrawingData, result: DrawingResult, force: Force, large: boolean): Draw =>
  (canvas, width, height, faces) => {
    const plan = planDiagram(data, result, force, width, height, large);
    for (const shape of plan.shapes) {
      canvas.shape(pathOperators(shape.fill), { fill: 'tint' });
      strokePath(canvas, shape.ordinates, { width: 0.7, colour: 'ink2' });
      strokePath(canvas, shape.outline, { width: large ? 1.4 : 1.2, round: true });
    }
    drawFrame(canvas, plan.scene, { slack: result.slack });
    for (const dot of plan.dots) canvas.circle(dot.x, dot.y, large ? 2.2 : 1.6, { fill: 'ink' });
    drawDimensions(canvas, plan.scene, faces);
    drawLabels(canvas, plan.labels, faces);
    if (plan.bar && large) {
      const [x, y] = [width - 20, height - 34];
      strokePath(canvas, `M${x} ${y}V${y - plan.bar.length}M${x - 4} ${y}H${x + 4}M${x - 4} ${y - plan.bar.length}H${x + 4}`, {
        width: 1.3,
      });
      canvas.text(plan.bar.text, x + 8, y + 17, { face: faces.condensed, size: 12, colour: 'ink2', anchor: 'end', halo: 1.2 });
    }
    if (!plan.bar) said(canvas, `${force} is zero everywhere`, width, faces);
  };

/** How far the movements of a view are enlarged. */
export const deflectedView =
  (data: DrawingData, result: DrawingResult, large = false): Draw =>
  (canvas, width, height, faces) => {
    const plan = planDeflected(data, result, width, height, large);
    drawFrame(canvas, plan.scene, { thin: true, slack: result.slack });
    const lines = plan.lines(1);
    const of = (loose: boolean) => lines.filter((_, i) => result.slack.includes(i) === loose).join('');
    strokePath(canvas, of(false), { width: 1.8, dash: [9, 3, 2.5, 3] });
    strokePath(canvas, of(true), { width: 1.2, dash: [1.5, 5], colour: 'ink2', round: true });
    drawDimensions(canvas, plan.scene, faces);
    drawLabels(canvas, plan.labels, faces);
    const words = plan.times === null ? 'nothing moves' : `movements × ${Number(plan.times.toPrecision(3))}`;
    canvas.text(words, width - 8, height - 7, { face: faces.condensed, size: 11.5, colour: 'ink2', anchor: 'end', halo: 1.2 });
  };

export const ratioView =
  (data: DrawingData): Draw =>
  (canvas, width, height, faces) => {
    const plan = planRatio(data, width, height, false);
    for (const { verdict, d } of plan.fills) {
      const operators = pathOperators(d);
      if (verdict === 'near') hatch(canvas, operators, { x: 0, y: 0, width, height }, 4);
      else if (verdict === 'not checked') canvas.shape(operators, { pen: { colour: 'ink3', width: 0.9, dash: [3, 2.4] } });
      else canvas.shape(operators, { fill: verdict === 'over' ? 'red' : 'plain' });
    }
    for (const { verdict, d } of plan.levels)
      strokePath(canvas, d, { width: 1.3, colour: verdict === 'over' ? 'red' : verdict === 'near' ? 'amber' : 'plainCap' });
    strokePath(canvas, plan.limits, { width: 0.8, colour: 'ink3' });
    drawFrame(canvas, plan.scene, { thin: true });
    drawLabels(canvas, plan.labels, faces);
  };

function said(canvas: Canvas, words: string, width: number, faces: Faces): void {
  canvas.text(words, width / 2, 16, { face: faces.condensed, size: 12, colour: 'ink2', anchor: 'middle', halo: 1.2 });
}
