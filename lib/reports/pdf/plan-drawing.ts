/** What the plans of lib/drawing say, on a canvas; pixels of the plan are the canvas's units where this is called. */
import { awayFrom } from '@/lib/drawing/ground-direction';
import type { PlacedLabel } from '@/lib/drawing/labels';
import { line, plus } from '@/lib/drawing/paper';
import { chainText, type Scene } from '@/lib/drawing/scene';
import { supportSymbol } from '@/lib/drawing/support-symbol';
import type { Canvas, Pen } from './canvas';
import type { Ink } from './ink';
import { pathOperators } from './path-operators';
import type { PdfFile } from './pdf-file';
import type { FaceName } from './report-fonts';

export type Faces = PdfFile['faces'];

/** Lines of a plan by the class they have on screen. */
export function strokePath(canvas: Canvas, d: string, pen: Pen, fill?: Ink): void {
  if (d !== '') canvas.shape(pathOperators(d), { pen, ...(fill ? { fill } : {}) });
}

const symbols: Readonly<Record<string, { readonly pen: Pen; readonly fill?: Ink }>> = {
  'd-ground': { pen: { width: 1.5 } },
  'd-hatch': { pen: { width: 0.8, colour: 'ink2' } },
  'd-symbol': { pen: { width: 1.2 }, fill: 'white' },
  'd-spring': { pen: { width: 1.1 } },
};

/** Supports, members and nodes; pinned ends as small open circles drawn back from the node, springs as filled ones. */
export function drawFrame(canvas: Canvas, scene: Scene, { thin = false, slack = [] as readonly number[] } = {}): void {
  const { data, paper, axes, support: size, large } = scene;
  for (const support of data.supports) {
    const node = data.nodes[support.node];
    if (!node) continue;
    for (const part of supportSymbol(support, paper.at(node.x, node.y), awayFrom(data, support), size))
      strokePath(canvas, part.d, symbols[part.className]!.pen, symbols[part.className]!.fill);
  }
  const dense = data.members.length > 120;
  const width = thin ? 0.9 : dense ? 1.8 : large ? 2.6 : 2;
  for (const axis of axes) {
    const pen: Pen = slack.includes(axis.index)
      ? { width: 1.2, dash: [1.5, 5], colour: 'ink2', round: true }
      : { width, round: true, colour: thin ? 'ink3' : 'ink' };
    strokePath(canvas, line(axis.a, axis.b), pen);
  }
  if (thin) return;
  for (const axis of axes) {
    const member = data.members[axis.index]!;
    const r = large ? 3 : 2.2;
    const back = Math.min(r * 2.6, axis.drawn * 0.2);
    for (const [joint, at] of [
      [member.startJoint, plus(axis.a, axis.t, back)],
      [member.endJoint, plus(axis.b, axis.t, -back)],
    ] as const)
      // prettier-ignore
      if (joint !== 'rigid') canvas.circle(at.x, at.y, r, { fill: joint === 'pin' ? 'white' : 'ink2', pen: { width: joint === 'pin' ? 1.4 : 1 } });
  }
  if (dense) return;
  for (const node of data.nodes) {
    const p = paper.at(node.x, node.y);
    canvas.circle(p.x, p.y, large ? 2.8 : 2, { fill: 'white', pen: { width: 1.3 } });
  }
}

/** Dimensions with oblique ticks and extension lines. */
export function drawDimensions(canvas: Canvas, scene: Scene, faces: Faces): void {
  for (const placed of scene.dimensions) {
    const { stops, from, chain } = placed;
    const lines = stops.map((stop, i) =>
      line(from[i]!, { x: stop.x * 1.5 - from[i]!.x * 0.5, y: stop.y * 1.5 - from[i]!.y * 0.5 }),
    );
    strokePath(canvas, line(stops[0]!, stops[stops.length - 1]!) + lines.join(''), { width: 0.8, colour: 'ink2' });
    strokePath(canvas, stops.map((stop) => line({ x: stop.x - 4, y: stop.y + 4 }, { x: stop.x + 4, y: stop.y - 4 })).join(''), {
      width: 1.6,
    });
    chain.texts.forEach((text, i) => {
      const { at, turn } = chainText(placed, i);
      centred(canvas, text, at.x, at.y, 12.5, turn, 'condensed', 'ink', faces);
    });
  }
}

/** Names and figures, each with a halo of the paper behind it. */
export function drawLabels(canvas: Canvas, labels: readonly PlacedLabel[], faces: Faces): void {
  for (const label of labels) if (label.leader) strokePath(canvas, line(label.leader, label.at), { width: 0.7, colour: 'ink3' });
  for (const { text, at, size, turn, className } of labels) {
    const rows = text.split('\n');
    const [s, c] = [Math.sin((turn * Math.PI) / 180), Math.cos((turn * Math.PI) / 180)];
    const { face, colour } = labelLook(className);
    rows.forEach((row, i) => {
      const off = (i - (rows.length - 1) / 2) * size * 1.05;
      centred(canvas, row, at.x - off * s, at.y + off * c, size, turn, face, colour, faces);
    });
  }
}

function labelLook(className: string): { face: FaceName; colour: Ink } {
  const has = (name: string) => className.includes(name);
  if (has('d-ratio-over')) return { face: 'condensedBold', colour: 'red' };
  if (has('d-ratio-near')) return { face: 'condensed', colour: 'amber' };
  if (has('d-governing')) return { face: 'condensedBold', colour: 'ink' };
  if (has('d-reaction')) return { face: 'condensedMedium', colour: 'ink' };
  if (has('d-node-name') || has('d-member-name') || has('d-ratio')) return { face: 'condensed', colour: 'ink2' };
  return { face: 'condensed', colour: 'ink' };
}

/** A text whose middle stands at a point. */
function centred(
  canvas: Canvas,
  text: string,
  x: number,
  y: number,
  size: number,
  turn: number,
  face: FaceName,
  colour: Ink,
  faces: Faces,
): void {
  // prettier-ignore
  const t = (turn * Math.PI) / 180;
  const down = size * 0.34;
  canvas.text(text, x - down * Math.sin(t), y + down * Math.cos(t), {
    face: faces[face],
    size,
    colour,
    anchor: 'middle',
    turn,
    halo: 1.2,
  });
}
