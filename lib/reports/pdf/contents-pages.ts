/** The contents: laid out before the first page, so that its pages can be counted; drawn last, when every page is known. */
import type { Verdict } from '@/lib/results/result';
import type { Canvas } from './canvas';
import type { Bookmark, PdfFile, PdfPage } from './pdf-file';
import type { Flow } from './flow';
import { verdictInk } from './ink';
import type { Zones } from './sheet';
import { verdictMark } from './verdict-shapes';
import { wrap } from './wrap';

export interface Entry {
  readonly key: string;
  readonly text: string;
  readonly note: string | null;
  /** Of a frame; null = a part of the report. */
  readonly verdict: Verdict | null;
}
/** A page, and its number. */
export interface Place {
  readonly page: Pick<PdfPage, 'place'>;
  readonly number: number;
}
export type Places = ReadonlyMap<string, Place>;

interface Placed {
  readonly entry: Entry;
  readonly lines: readonly string[];
  readonly sheet: number;
  readonly x: number;
  readonly y: number;
}
export interface ContentsLayout {
  readonly sheets: number;
  readonly width: number;
  readonly placed: readonly Placed[];
}

const size = 9;
const leading = 11.5;
const between = 18;

/** Parts across the sheet, then frames in two columns. */
export function layOutContents(file: PdfFile, zones: Zones, entries: readonly Entry[]): ContentsLayout {
  const width = (zones.width - between) / 2;
  const placed: Placed[] = [];
  let [sheet, column, y, top] = [0, 0, zones.y + 4, zones.y + 4];
  let frames = false;
  for (const entry of entries) {
    if (entry.verdict !== null && !frames) {
      frames = true;
      top = y = y + 26;
    }
    const wide = entry.verdict === null ? zones.width : width;
    const lines = linesOf(file, entry, wide - 34 - (entry.verdict === null ? 0 : 12));
    const height = lines.length * leading + 3;
    if (y + height > zones.bottom) {
      if (frames && column === 0) [column, y] = [1, top];
      else [sheet, column, y, top] = [sheet + 1, 0, zones.y + 4, zones.y + 4];
    }
    placed.push({ entry, lines, sheet, x: zones.x + column * (width + between), y });
    y += height;
  }
  return { sheets: sheet + 1, width, placed };
}

const linesOf = (file: PdfFile, { text, note, verdict }: Entry, width: number): string[] =>
  wrap(note === null ? text : `${text}  ${note}`, verdict === null ? file.faces.sansBold : file.faces.condensed, size, width);

export function drawContents(flow: Flow, { sheets, width, placed }: ContentsLayout, places: Places, bookmark: Bookmark): void {
  const { file, zones } = flow;
  const { sansBold } = file.faces;
  for (let sheet = 0; sheet < sheets; sheet++) {
    flow.part({ title: 'Contents', note: sheet === 0 ? null : 'continued' }, 2 + sheet);
    if (sheet === 0) file.aim(bookmark);
    const here = placed.filter((one) => one.sheet === sheet);
    const first = here.find(({ entry }) => entry.verdict !== null);
    if (first && (sheet === 0 || here[0] !== first))
      flow.canvas.text('Calculations by frame', zones.x, first.y - 6, { face: sansBold, size: 10.5 });
    for (const one of here) {
      const place = places.get(one.entry.key);
      if (place) drawEntry(flow, flow.canvas, one, one.entry.verdict === null ? zones.width : width, place);
    }
  }
  file.moveBehindFirst(sheets);
}

function drawEntry(flow: Flow, canvas: Canvas, { entry, lines, x, y }: Placed, width: number, { page, number }: Place): void {
  // prettier-ignore
  const { faces } = flow.file;
  const face = entry.verdict === null ? faces.sansBold : faces.condensed;
  const left = entry.verdict === null ? x : x + 12;
  if (entry.verdict !== null) verdictMark(canvas, entry.verdict, x, y + size, 7);
  lines.forEach((line, i) => {
    canvas.text(line, left, y + size + i * leading, {
      face,
      size,
      colour: entry.verdict === null ? 'ink' : entry.verdict === 'over' ? verdictInk.over : 'ink',
    });
  });
  const baseline = y + size + (lines.length - 1) * leading;
  const end = left + face.width(lines[lines.length - 1] ?? '', size) + 4;
  const text = String(number);
  const start = x + width - faces.condensedMedium.width(text, size) - 4;
  if (start > end) canvas.line(end, baseline, start, baseline, { colour: 'rule', width: 0.5, dash: [0.6, 2.2], round: true });
  canvas.text(text, x + width, baseline, { face: faces.condensedMedium, size, anchor: 'end' });
  flow.file.link(x, y, width, lines.length * leading + 2, page);
}
