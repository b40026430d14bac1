/** Lines of calculation set as formulas: fractions with a rule, roots, sub- and superscripts. */
import type { WorkingPart } from '@/lib/checks/working-parts';
import type { Canvas } from './canvas';
import type { PdfFile } from './pdf-file';
import type { Ink } from './ink';

/** Something set on a baseline. */
export interface Box {
  readonly width: number;
  readonly above: number;
  readonly below: number;
  draw(canvas: Canvas, x: number, baseline: number): void;
}
type Faces = PdfFile['faces'];

const gap = 3;
/** After these a formula may go on in the next line, which begins with them. */
const signs: ReadonlySet<string> = new Set(['=', '+', '−', '·', '≤', '≥']);

/** The parts of a line, wrapped at a width; each line is a box. */
export function workingLinesSet(
  parts: readonly WorkingPart[],
  faces: Faces,
  size: number,
  width: number,
  colour: Ink = 'ink',
): Box[] {
  const lines: Box[][] = [[]];
  let used = 0;
  let lastBox = '';
  const all = spaced(parts, faces, size, colour);
  for (const [at, { box, text, tight, apart }] of all.entries()) {
    // "N = 35 kN" stays together
    if (apart && used + 9 + [0, 1, 2].reduce((sum, k) => sum + gap + (all[at + k]?.box.width ?? 0), 0) > width) {
      lines.push([]);
      used = 0;
    }
    for (const [i, piece] of (box.width > width - used && box.pieces ? box.pieces() : [box]).entries()) {
      const before = used === 0 || (tight && i === 0) ? 0 : apart && i === 0 ? 9 : gap * (i > 0 ? 0.7 : 1);
      if (used > 0 && used + before + piece.width > width) {
        // a line begins with its sign, rather than that the one before ends with it
        const sign = signs.has(lastBox) && lines[lines.length - 1]!.length > 1 ? lines[lines.length - 1]!.pop() : undefined;
        lines.push(sign ? [sign, blank(gap)] : []);
        used = sign ? sign.width + gap : 0;
        if (sign) {
          lines[lines.length - 1]!.push(piece);
          used += piece.width;
          lastBox = '';
          continue;
        }
      }
      lastBox = text;
      const row = lines[lines.length - 1]!;
      if (row.length > 0 && before > 0) row.push(blank(before));
      row.push(piece);
      used += (used === 0 ? 0 : before) + piece.width;
    }
  }
  return lines.map((line) => fitted(beside(line), width));
}

/** Whether a line has a part that is wider than it may be. */
export function overflows(parts: readonly WorkingPart[], faces: Faces, size: number, width: number): boolean {
  return spaced(parts, faces, size, 'ink').some(({ box }) => box.width > width && !box.pieces);
}

/** Made smaller where it is too wide. */
function fitted(box: Box, width: number): Box {
  if (box.width <= width) return box;
  const k = width / box.width;
  return {
    width,
    above: box.above * k,
    below: box.below * k,
    draw: (canvas, x, baseline) => canvas.placed(x, baseline, k, () => box.draw(canvas, 0, 0)),
  };
}

interface Part extends Box {
  /** Words of a text, for one that is wider than the line. */
  readonly pieces?: () => Box[];
}

/** Boxes in order with whether they stand close to the one before. */
function spaced(
  parts: readonly WorkingPart[],
  faces: Faces,
  size: number,
  colour: Ink,
): { box: Part; text: string; tight: boolean; apart: boolean }[] {
  let before = '';
  return parts.map((part, i) => {
    // "N = 35 kN" and what is given after it
    const last = parts[i - 1]?.kind;
    const apart =
      part.kind === 'symbol' &&
      parts[i + 1]?.kind === 'text' &&
      (last === 'number' || last === 'text') &&
      (parts[i + 1] as { text: string }).text === '=' &&
      i > 0;
    const text = 'text' in part ? part.text : '';
    const tight = before === '' || before.endsWith('(') || /^[,;:)²³]/.test(text);
    before = 'text' in part ? part.text : 'x';
    return { box: boxOf(part, faces, size, colour), text: part.kind === 'text' ? part.text : '', tight, apart };
  });
}

function boxOf(part: WorkingPart, faces: Faces, size: number, colour: Ink): Part {
  switch (part.kind) {
    case 'text': {
      const set = (words: string): Box => worded(words, faces, size, colour);
      return { ...inlineWords(part.text.split(' ').map(set)), pieces: () => part.text.split(' ').map(set) };
    }
    case 'symbol':
      return symbolBox(part, faces, size, colour);
    case 'number':
    case 'result': {
      const figures = word(part.text, faces, part.kind === 'result' ? 'condensedBold' : 'condensed', size, colour);
      return part.unit ? beside([figures, blank(1.8), word(part.unit, faces, 'condensed', size * 0.92, 'ink2')]) : figures;
    }
    case 'fraction':
      return fractionBox(inline(part.over, faces, size * 0.94, colour), inline(part.under, faces, size * 0.94, colour), size);
    case 'root':
      return rootBox(inline(part.of, faces, size, colour));
  }
}

function inline(parts: readonly WorkingPart[], faces: Faces, size: number, colour: Ink): Box {
  return beside(
    spaced(parts, faces, size, colour).flatMap(({ box, tight }, i) => (i === 0 || tight ? [box] : [blank(gap * 0.8), box])),
  );
}

function word(text: string, faces: Faces, face: keyof Faces, size: number, colour: Ink): Box {
  return {
    width: faces[face].width(text, size),
    above: size * 0.74,
    below: size * 0.22,
    draw: (canvas, x, baseline) => canvas.text(text, x, baseline, { face: faces[face], size, colour }),
  };
}

/** A word in which "α_cr" has its subscript. */
function worded(text: string, faces: Faces, size: number, colour: Ink): Box {
  const [, before = '', symbol, sub, after = ''] = /^([(\[]*)([^_\s]{1,3})_([A-Za-z0-9,]*[A-Za-z0-9])(.*)$/u.exec(text) ?? [];
  if (symbol === undefined || sub === undefined) return word(text, faces, 'condensed', size, colour);
  const plain = (words: string): Box => word(words, faces, 'condensed', size, colour);
  return beside([
    plain(before),
    symbolBox({ symbol, sub }, faces, size, colour),
    after === '' ? blank(0) : worded(after, faces, size, colour),
  ]);
}

const inlineWords = (words: readonly Box[]): Box =>
  beside(words.flatMap((box, i) => (i === 0 ? [box] : [blank(gap * 0.7), box])));

/** Latin letters slope, Greek ones and words stand. */
function symbolBox(
  { symbol, sub, sup }: { symbol: string; sub?: string; sup?: string },
  faces: Faces,
  size: number,
  colour: Ink,
): Box {
  const letter = word(symbol, faces, /^[A-Za-z]['′]?$/.test(symbol) ? 'sansItalic' : 'sans', size, colour);
  const low = sub ? word(sub, faces, 'sans', size * 0.68, colour) : null;
  const high = sup ? word(sup, faces, 'sans', size * 0.68, colour) : null;
  return {
    width: letter.width + 0.6 + Math.max(low?.width ?? -0.6, high?.width ?? -0.6),
    above: high ? size * 0.95 : letter.above,
    below: low ? size * 0.36 : letter.below,
    draw(canvas, x, baseline) {
      letter.draw(canvas, x, baseline);
      low?.draw(canvas, x + letter.width + 0.5, baseline + size * 0.2);
      high?.draw(canvas, x + letter.width + 0.8, baseline - size * 0.36);
    },
  };
}

function fractionBox(over: Box, under: Box, size: number): Box {
  const width = Math.max(over.width, under.width) + 4;
  const axis = size * 0.28;
  return {
    width,
    above: axis + 1.4 + over.above + over.below,
    below: under.above + under.below + 1.6 - axis,
    draw(canvas, x, baseline) {
      const bar = baseline - axis;
      over.draw(canvas, x + (width - over.width) / 2, bar - 1.4 - over.below);
      under.draw(canvas, x + (width - under.width) / 2, bar + 1.6 + under.above);
      canvas.line(x, bar, x + width, bar, { width: 0.55 });
    },
  };
}

function rootBox(of: Box): Box {
  const lead = 6;
  return {
    width: lead + of.width + 1,
    above: of.above + 2,
    below: of.below,
    draw(canvas, x, baseline) {
      const [top, foot] = [baseline - of.above - 1.2, baseline + of.below];
      canvas.line(x, baseline - of.above * 0.4, x + 1.6, baseline - of.above * 0.5, { width: 0.5 });
      canvas.line(x + 1.6, baseline - of.above * 0.5, x + 3.2, foot, { width: 0.8 });
      canvas.line(x + 3.2, foot, x + 5.4, top, { width: 0.5 });
      canvas.line(x + 5.4, top, x + lead + of.width + 1, top, { width: 0.5 });
      of.draw(canvas, x + lead, baseline);
    },
  };
}

const blank = (width: number): Box => ({ width, above: 0, below: 0, draw: () => undefined });

function beside(boxes: readonly Box[]): Box {
  return {
    width: boxes.reduce((sum, box) => sum + box.width, 0),
    above: Math.max(0, ...boxes.map((box) => box.above)),
    below: Math.max(0, ...boxes.map((box) => box.below)),
    draw(canvas, x, baseline) {
      let at = x;
      for (const box of boxes) {
        box.draw(canvas, at, baseline);
        at += box.width;
      }
    },
  };
}
