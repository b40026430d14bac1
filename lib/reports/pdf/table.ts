/** A table down the sheets: its head is drawn again on each, rows are never parted. */
import type { Verdict } from '@/lib/results/result';
import type { Ink } from './ink';
import type { Face } from './face';
import type { Flow } from './flow';
import type { FaceName } from './report-fonts';
import { verdictMark } from './verdict-shapes';
import { wrap } from './wrap';

export interface Column {
  readonly head: string;
  /** Under the head. */
  readonly unit?: string;
  readonly align?: 'left' | 'right';
  /** Broken into lines before others are: sentences, names. */
  readonly soft?: boolean;
  readonly face?: FaceName;
  /** Left out where every cell of it is empty or a dash. */
  readonly ifAny?: boolean;
}
export interface CellLook {
  readonly text: string;
  readonly colour?: Ink;
  readonly face?: FaceName;
  /** The mark of a verdict before the text. */
  readonly mark?: Verdict;
}
export type Cell = string | null | CellLook;
export interface Row {
  readonly cells: readonly Cell[];
  /** Across the whole table, under the cells. */
  readonly note?: { readonly text: string; readonly colour?: Ink };
}

const size = 8.4;
const leading = 10.4;
const gap = 9;
const markWidth = 11;
const rowPad = 3.6;

const lookOf = (cell: Cell | undefined): CellLook =>
  cell === null || cell === undefined ? { text: '' } : typeof cell === 'string' ? { text: cell } : cell;

/** A heading before it stays with its first rows; nothing else is drawn of a table without rows. */
export function table(flow: Flow, all: readonly Column[], rows: readonly Row[]): void {
  if (rows.length === 0) return;
  const { columns, kept } = filled(all, rows);
  const { faces } = flow.file;
  const faceOf = (column: Column, cell: CellLook): Face => faces[cell.face ?? column.face ?? 'condensed'];
  const widths = columnWidths(
    flow,
    columns,
    rows.map(({ cells }) => kept.map((i) => cells[i])),
    faceOf,
  );
  const lefts = widths.map((_, i) => flow.x + widths.slice(0, i).reduce((sum, width) => sum + width + gap, 0));
  const units = columns.some((column) => column.unit);

  const head = (): void => {
    const { canvas } = flow;
    const baseline = flow.y + leading - 1.5;
    columns.forEach(({ head: text, unit, align }, i) => {
      const [x, anchor] = align === 'right' ? ([lefts[i]! + widths[i]!, 'end'] as const) : ([lefts[i]!, 'start'] as const);
      canvas.text(text, x, baseline, { face: faces.condensedBold, size, anchor });
      if (unit) canvas.text(unit, x, baseline + 8.6, { face: faces.condensed, size: 7.2, colour: 'ink2', anchor });
    });
    flow.y += leading + (units ? 8.6 : 0) + 2;
    canvas.line(flow.x, flow.y, flow.x + flow.width, flow.y, { width: 0.9 });
  };

  const laid = (row: Row) => {
    const cells = columns.map((column, i) => {
      const look = lookOf(row.cells[kept[i]!]);
      const face = faceOf(column, look);
      return { look, face, lines: wrap(look.text, face, size, widths[i]! - (look.mark ? markWidth : 0)) };
    });
    const notes = row.note ? wrap(row.note.text, faces.condensed, size, flow.width - 10) : [];
    const lines = Math.max(1, ...cells.map((cell) => cell.lines.length));
    return { cells, notes, lines, height: (lines + notes.length) * leading + rowPad };
  };

  const headHeight = leading + (units ? 8.6 : 0) + 2;
  const first = laid(rows[0]!).height + (rows[1] ? laid(rows[1]).height : 0);
  flow.need(Math.min(headHeight + first, flow.whole - 60));
  head();
  let since = 0;
  for (const row of rows) {
    const { cells, notes, lines, height } = laid(row);
    if (flow.need(Math.min(height, flow.whole - headHeight))) {
      head();
      since = 0;
    }
    let top = flow.y + 1.2;
    // a row taller than a sheet goes on line by line
    const most = Math.max(lines, 0);
    for (let k = 0; k < most; k++) {
      if (flow.room < leading) {
        flow.nextSheet();
        head();
        top = flow.y + 1.2 - k * leading;
      }
      const baseline = top + (k + 1) * leading - 2;
      cells.forEach(({ look, face, lines: texts }, i) => {
        const text = texts[k];
        if (text === undefined) return;
        const right = columns[i]!.align === 'right';
        if (k === 0 && look.mark) verdictMark(flow.canvas, look.mark, lefts[i]!, baseline, 7);
        flow.canvas.text(text, right ? lefts[i]! + widths[i]! : lefts[i]! + (look.mark ? markWidth : 0), baseline, {
          face,
          size,
          colour: look.colour ?? 'ink',
          anchor: right ? 'end' : 'start',
        });
      });
      flow.y = top + (k + 1) * leading - 1.2;
    }
    for (const line of notes) {
      flow.need(leading);
      flow.canvas.text(line, flow.x + 10, flow.y + leading - 1, {
        face: faces.condensed,
        size,
        colour: row.note?.colour ?? 'ink2',
      });
      flow.y += leading;
    }
    flow.y += rowPad;
    since += 1;
    flow.canvas.line(flow.x, flow.y, flow.x + flow.width, flow.y, { colour: since % 5 === 0 ? 'rule' : 'hair', width: 0.5 });
  }
  flow.space(3);
}

/** As wide as what stands in them; what is left over goes between them, what is missing is taken from the soft ones first. */
function columnWidths(
  flow: Flow,
  columns: readonly Column[],
  rows: readonly (readonly (Cell | undefined)[])[],
  faceOf: (column: Column, cell: CellLook) => Face,
): number[] {
  const { condensedBold, condensed } = flow.file.faces;
  const room = flow.width - gap * (columns.length - 1);
  const heads = columns.map(
    ({ head, unit }) => Math.max(condensedBold.width(head, size), unit ? condensed.width(unit, 7.2) : 0) + 0.5,
  );
  const natural = columns.map((column, i) =>
    rows.reduce((most, row) => {
      const look = lookOf(row[i]);
      if (look.text === '' && !look.mark) return most;
      return Math.max(most, faceOf(column, look).width(look.text, size) + (look.mark ? markWidth : 0) + 0.5);
    }, heads[i]!),
  );
  const sum = (widths: readonly number[]) => widths.reduce((total, width) => total + width, 0);
  const wanted = sum(natural);
  if (wanted <= room) {
    // each gap a little wider, then soft columns take what is left over; without them it is shared
    const soft = columns.filter((column) => column.soft).length;
    const air = Math.min((room - wanted) / columns.length, soft > 0 ? 14 : Infinity);
    const spare = room - wanted - air * columns.length;
    return natural.map((width, i) => width + air + (columns[i]!.soft ? spare / soft : 0));
  }
  const least = columns.map((column, i) => (column.soft ? Math.max(heads[i]!, Math.min(natural[i]!, 60)) : natural[i]!));
  if (sum(least) <= room) return shrunk(natural, least, room);
  const bare = columns.map((_, i) => Math.max(heads[i]!, Math.min(natural[i]!, 34)));
  if (sum(bare) <= room) return shrunk(least, bare, room);
  return bare.map((width) => (width * room) / sum(bare));
}

/** Between two sets of widths, of which the first is too wide together and the second is not. */
function shrunk(wide: readonly number[], least: readonly number[], room: number): number[] {
  const [from, to] = [wide, least].map((widths) => widths.reduce((total, width) => total + width, 0)) as [number, number];
  const share = (room - to) / Math.max(from - to, 1e-9);
  return wide.map((width, i) => least[i]! + (width - least[i]!) * share);
}

/** Columns but those that may be left out and hold nothing, and which they are. */
function filled(all: readonly Column[], rows: readonly Row[]): { columns: readonly Column[]; kept: readonly number[] } {
  const kept = all.flatMap(({ ifAny }, i) =>
    ifAny && rows.every(({ cells }) => ['', '–'].includes(lookOf(cells[i]).text)) ? [] : [i],
  );
  return { columns: kept.map((i) => all[i]!), kept };
}
