/** One sheet of the report: border, head, title block at the foot, and the words under it. */
import { verdictInk, type Ink } from './ink';
import type { Canvas } from './canvas';
import type { PdfFile } from './pdf-file';
import { tallyMark } from './tally-mark';
import { verdictMark } from './verdict-shapes';
import { cut, wrap } from './wrap';
import type { Verdict } from '@/lib/results/result';

export const papers = { A4: [595.28, 841.89], Letter: [612, 792] } as const;
export type Paper = keyof typeof papers;

/** Border of the sheet, points from the paper's edges: room to bind at the left. */
const edge = { left: 45, right: 28, top: 26, bottom: 40 };
const blockHeight = 30;
const headHeight = 25;
const pad = 10;

/** Where things stand on a paper. */
export function zonesOf(paper: Paper) {
  const [width, height] = papers[paper];
  const border = { x: edge.left, y: edge.top, right: width - edge.right, bottom: height - edge.bottom };
  return {
    border,
    /** What a sheet says stands in here. */
    x: border.x + pad,
    y: border.y + headHeight + 8,
    width: border.right - border.x - 2 * pad,
    bottom: border.bottom - blockHeight - 8,
  };
}
export type Zones = ReturnType<typeof zonesOf>;

export interface SheetHead {
  readonly title: string;
  readonly note: string | null;
  /** A frame's verdict, at the right. */
  readonly verdict: { readonly verdict: Verdict; readonly words: string } | null;
  /** What the title block names instead of the state: the frame. */
  readonly frame: string | null;
}

/** What every title block says. */
export interface BlockFacts {
  readonly project: string;
  readonly batch: string;
  readonly revision: string;
  readonly state: string;
  readonly prepared: string | null;
  readonly checked: string | null;
  readonly issued: string | null;
  readonly input: string;
  readonly engine: string;
  /** Under the border, at the right: the number, or in red that it is none. */
  readonly standing: { readonly text: string; readonly colour: Ink };
}

/** Draws all of a sheet but its content. @param number the page's, from 1 */
export function drawSheet(file: PdfFile, canvas: Canvas, zones: Zones, facts: BlockFacts, head: SheetHead, number: number): void {
  const { border } = zones;
  const { sansBold, sans } = file.faces;
  const width = border.right - border.x;
  const under = border.y + headHeight;
  const end = border.right - pad;
  const verdictWidth = head.verdict ? sansBold.width(head.verdict.words, 11) : 0;
  const right = head.verdict ? end - verdictWidth - 21 : end;
  const title = cut(head.title, sansBold, 12, right - border.x - pad);
  canvas.text(title, border.x + pad, under - 8, { face: sansBold, size: 12 });
  const after = border.x + pad + sansBold.width(title, 12) + 7;
  if (head.note && right - after > 20)
    canvas.text(cut(head.note, sans, 9.5, right - after), after, under - 8, { face: sans, size: 9.5, colour: 'ink2' });
  if (head.verdict) {
    const { verdict, words } = head.verdict;
    verdictMark(canvas, verdict, end - verdictWidth - 13, under - 8, 9);
    canvas.text(words, end - verdictWidth, under - 8, {
      face: sansBold,
      size: 11,
      colour: verdict === 'not checked' ? 'ink' : verdictInk[verdict],
    });
  }
  canvas.line(border.x, under, border.right, under, { width: 0.75 });
  titleBlock(file, canvas, zones, facts, head, number);
  canvas.rect(border.x, border.y, width, border.bottom - border.y, { pen: { width: 1.2 } });
  foot(file, canvas, zones, facts);
}

function titleBlock(file: PdfFile, canvas: Canvas, { border }: Zones, facts: BlockFacts, head: SheetHead, number: number): void {
  const { condensed, condensedMedium, mono } = file.faces;
  const top = border.bottom - blockHeight;
  const width = border.right - border.x;
  canvas.line(border.x, top, border.right, top, { width: 0.75 });
  const cells: readonly { label: string; value: string | null; share: number; kind?: 'mono' | 'revision' | 'number' }[] = [
    { label: 'Project', value: facts.project, share: 20 },
    { label: 'Batch', value: facts.batch, share: 19 },
    head.frame === null ? { label: 'State', value: facts.state, share: 14 } : { label: 'Frame', value: head.frame, share: 14 },
    { label: 'Revision', value: facts.revision, share: 8, kind: 'revision' },
    { label: 'Prepared', value: facts.prepared, share: 15 },
    { label: 'Checked', value: facts.checked, share: 15 },
    { label: 'Issued', value: facts.issued, share: 12 },
    { label: 'Input', value: facts.input, share: 12, kind: 'mono' },
    { label: 'Page', value: String(number), share: 11, kind: 'number' },
  ];
  const all = cells.reduce((sum, cell) => sum + cell.share, 0);
  let x = border.x;
  for (const [i, { label, value, share, kind }] of cells.entries()) {
    const wide = (width * share) / all;
    if (i > 0) canvas.line(x, top, x, border.bottom, { colour: 'rule', width: 0.5 });
    canvas.text(label, x + 5, top + 8.5, { face: condensed, size: 6.8, colour: 'ink2' });
    const baseline = border.bottom - 7;
    if (kind === 'revision') {
      canvas.shape(`${x + 5} ${baseline + 2} m ${x + 21} ${baseline + 2} l ${x + 13} ${baseline - 12} l h`, { fill: 'ink' });
      canvas.text(value ?? '', x + 13, baseline, { face: condensedMedium, size: 8, colour: 'white', anchor: 'middle' });
    } else if (kind === 'number') {
      const text = `${value ?? ''} of`;
      canvas.text(text, x + 5, baseline, { face: condensedMedium, size: 9 });
      file.drawTotal(canvas, x + 5 + condensedMedium.width(text, 9), baseline);
    } else if (value === null) canvas.text('not yet', x + 5, baseline, { face: condensed, size: 8.5, colour: 'ink3' });
    else fitted(canvas, value, kind === 'mono' ? mono : condensedMedium, x + 5, wide - 8, baseline);
    x += wide;
  }
}

/** A value in one line, or in two smaller ones; of a longer one the cover has the rest. */
function fitted(canvas: Canvas, value: string, face: PdfFile['faces']['sans'], x: number, width: number, baseline: number): void {
  for (const size of [9, 8.2]) {
    if (face.width(value, size) > width) continue;
    canvas.text(value, x, baseline, { face, size });
    return;
  }
  const size = 7;
  const [first = '', ...rest] = wrap(value, face, size, width);
  if (rest.length === 0) {
    canvas.text(first, x, baseline, { face, size });
    return;
  }
  canvas.text(first, x, baseline - 6, { face, size });
  canvas.text(cut(rest.join(' '), face, size, width), x, baseline + 1.5, { face, size });
}

function foot(file: PdfFile, canvas: Canvas, { border }: Zones, { engine, standing }: BlockFacts): void {
  const { condensed, sansBold } = file.faces;
  const baseline = border.bottom + 15;
  tallyMark(canvas, border.x, baseline - 8.5, 11);
  canvas.text(`Tallyframe ${engine}`, border.x + 17, baseline, { face: condensed, size: 8, colour: 'ink2' });
  canvas.text(standing.text, border.right, baseline, { face: sansBold, size: 8.5, colour: standing.colour, anchor: 'end' });
}
