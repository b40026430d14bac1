'use client';
import { useRouter } from 'next/navigation';
import { useMemo, useState, type KeyboardEvent, type PointerEvent } from 'react';
import { formatRatio } from '@/lib/units/format';
import type { Verdict } from '@/lib/results/result';
import { columnAt, columnX, layOutStrip, type StripLayout } from '@/lib/drawing/strip-layout';
import { stripTop } from '@/lib/drawing/strip-data';
import { useWidth } from '../ui/use-width';
import { VerdictMark } from '../ui/verdict-mark';

export interface ChangeCell {
  readonly id: string;
  readonly before: { readonly verdict: Verdict; readonly ratio: number | null } | null;
  readonly after: { readonly verdict: Verdict; readonly ratio: number | null } | null;
  readonly carried: boolean;
}

interface ChangeStripProps {
  /** In the later revision's sheet order. */
  readonly cells: readonly ChangeCell[];
  readonly letters: { readonly before: string; readonly after: string };
  readonly nearLimit: number;
  /** A ratio that moves by no more than this stands as it was. */
  readonly by: number;
  /** Address of a frame of the later revision; `{n}` its number in sheet order from 1. */
  readonly hrefPattern: string;
}

/** What a cell is drawn as: shape first, colour after. */
type Look = 'same' | 'up' | 'down' | 'over' | 'within' | 'near' | 'unchecked' | 'added' | 'gone';

function lookOf({ before, after, carried }: ChangeCell, by: number): Look {
  if (before === null) return 'added';
  if (after === null) return 'gone';
  if (carried) return 'same';
  if (before.verdict !== after.verdict) return after.verdict === 'not checked' ? 'unchecked' : after.verdict;
  if (before.ratio === null || after.ratio === null || Math.abs(after.ratio - before.ratio) <= by) return 'same';
  return after.ratio > before.ratio ? 'up' : 'down';
}

/**
 * How each frame moved: a bar at the ratio it had, and an arrow that points at the one it has; solid up, hollow down, notched
 * where it became over, hatched where near, doubled where it came within, broken where it is not checked any more. One tab stop:
 * arrows read cell by cell, Page Down and Page Up those that moved, Enter opens.
 */
export function ChangeStrip({ cells, letters, nearLimit, by, hrefPattern }: ChangeStripProps) {
  const router = useRouter();
  const [box, width] = useWidth<HTMLDivElement>(884);
  const layout = useMemo(() => layOutStrip(cells.length, width), [cells.length, width]);
  const looks = useMemo(() => cells.map((cell) => lookOf(cell, by)), [cells, by]);
  const [read, setRead] = useState(() => firstToRead(looks));
  const rows = Array.from({ length: Math.ceil(cells.length / layout.columns) }, (_, row) => row * layout.columns);
  const cell = cells[read];
  const open = () => {
    if (cell?.after) router.push(hrefPattern.replace('{n}', String(read + 1)));
  };
  const seek = (step: number): number => {
    for (let i = read + step; i >= 0 && i < cells.length; i += step) if (looks[i] !== 'same') return i;
    return read;
  };
  const last = cells.length - 1;
  const onKeyDown = (event: KeyboardEvent) => {
    const to: Record<string, () => number> = {
      ArrowRight: () => Math.min(read + 1, last),
      ArrowLeft: () => Math.max(read - 1, 0),
      ArrowDown: () => Math.min(read + layout.columns, last),
      ArrowUp: () => Math.max(read - layout.columns, 0),
      Home: () => 0,
      End: () => last,
      PageDown: () => seek(1),
      PageUp: () => seek(-1),
    };
    const move = to[event.key];
    if (move) setRead(move());
    else if (event.key === 'Enter') open();
    else return;
    event.preventDefault();
  };
  const under = (event: PointerEvent | React.MouseEvent): number | null => {
    const row = event.target instanceof Element ? event.target.closest('.strip-row') : null;
    if (!row) return null;
    const bounds = row.getBoundingClientRect();
    const x = ((event.clientX - bounds.left) * layout.width) / (bounds.width || layout.width);
    const index = Number(row.getAttribute('data-from')) + columnAt(layout, x);
    return index < cells.length && x > layout.left - 3 && x < layout.width - layout.right + 3 ? index : null;
  };
  const said = cell ? sayCell(cell, looks[read] ?? 'same', letters, nearLimit) : 'no frames';
  return (
    <div className="change-strip" ref={box}>
      <div
        className={`strip-cells ${cells.length > 1000 ? 'strip-scroll' : ''}`}
        role="slider"
        tabIndex={0}
        aria-label={`How each frame moved from revision ${letters.before} to ${letters.after}`}
        aria-valuemin={1}
        aria-valuemax={cells.length}
        aria-valuenow={read + 1}
        aria-valuetext={`${cell?.id ?? ''}, ${said}`}
        onKeyDown={onKeyDown}
        onPointerMove={(event) => {
          const index = under(event);
          if (index !== null && index !== read) setRead(index);
        }}
        onClick={(event) => {
          if (under(event) === read) open();
        }}
      >
        {rows.map((from) => (
          <Row
            key={from}
            cells={cells.slice(from, from + layout.columns)}
            looks={looks.slice(from, from + layout.columns)}
            from={from}
            read={read >= from && read < from + layout.columns ? read - from : -1}
            layout={layout}
          />
        ))}
      </div>
      <div className="readout" data-testid="change-readout">
        <span className="mono readout-soft">
          {read + 1} of {cells.length}
        </span>
        <b>{cell?.id}</b>
        {cell?.after && <VerdictMark verdict={cell.after.verdict} />}
        <span>{said}</span>
        <span className="readout-key">
          <kbd>Page Down</kbd> next that moved, <kbd>Enter</kbd> opens
        </span>
      </div>
    </div>
  );
}

const firstToRead = (looks: readonly Look[]): number => {
  const over = looks.indexOf('over');
  return Math.max(over >= 0 ? over : looks.findIndex((look) => look !== 'same'), 0);
};

function sayCell(
  { before, after, carried }: ChangeCell,
  look: Look,
  letters: ChangeStripProps['letters'],
  nearLimit: number,
): string {
  if (before === null) return `only in ${letters.after}`;
  if (after === null) return `only in ${letters.before}`;
  if (carried) return `carried over, ${after.verdict}${after.ratio === null ? '' : ` ${formatRatio(after.ratio, nearLimit)}`}`;
  const ratios = `${formatRatio(before.ratio, nearLimit)} → ${formatRatio(after.ratio, nearLimit)}`;
  const words: Readonly<Record<Look, string>> = {
    same: `${after.verdict} in both`, up: 'moved up', down: 'moved down', over: 'became over', near: 'became near',
    within: 'became within', unchecked: 'became not checked', added: '', gone: '',
  }; // prettier-ignore
  return `${ratios}, ${words[look]}`;
}

interface RowProps {
  readonly cells: readonly ChangeCell[];
  readonly looks: readonly Look[];
  readonly from: number;
  readonly read: number;
  readonly layout: StripLayout;
}

/** One path a look and row, so that five thousand frames are a few hundred elements. */
function Row({ cells, looks, from, read, layout }: RowProps) {
  const foot = layout.gap + layout.height;
  const y = (ratio: number | null): number => foot - (layout.height * Math.min(Math.max(ratio ?? 0, 0), stripTop)) / stripTop;
  const paths = new Map<string, string>();
  const add = (look: string, path: string) => paths.set(look, (paths.get(look) ?? '') + path);
  cells.forEach((cell, i) => {
    const [x, w] = [columnX(layout, i), layout.cell];
    const look = looks[i]!;
    if (look === 'same') add(cell.after?.ratio === null ? 'blank' : 'same', `M${x} ${cell.after?.ratio === null ? foot - 1 : y(cell.after?.ratio ?? null)}h${w}`);
    else add(look, arrow(look, x, w, y(cell.before?.ratio ?? null), y(cell.after?.ratio ?? null), foot));
    if (cell.before?.ratio !== undefined && cell.before.ratio !== null && look !== 'same') add('was', `M${x} ${y(cell.before.ratio)}h${w}`);
  }); // prettier-ignore
  const end = columnX(layout, cells.length - 1) + layout.cell + 1;
  const one = y(1);
  const over = looks.filter((look) => look === 'over').length;
  const moved = looks.filter((look) => look !== 'same').length;
  return (
    <svg className="strip-row change-row" viewBox={`0 0 ${layout.width} ${layout.rowPitch}`} width="100%" data-from={from} aria-hidden="true">
      <rect className="change-band" x={layout.left} y={foot - layout.height} width={end - layout.left} height={layout.height} />
      <text className="strip-number" x={layout.left - 6} y={foot} textAnchor="end">
        {from + 1}
      </text>
      <path className="change-one" d={`M${layout.left} ${one}H${end}`} />
      {[...paths].map(([look, d]) => (
        <path key={look} className={`change-${look}`} d={d} />
      ))}
      {moved > 0 && (
        <text className={over > 0 ? 'strip-tally strip-tally-over' : 'strip-tally'} x={layout.width} y={foot} textAnchor="end">
          {over > 0 ? `${over} over, ${moved}` : moved}
        </text>
      )}
      {read >= 0 && read < cells.length && (
        <rect className="cell-read" x={columnX(layout, read) - 2.5} y={foot - layout.height - 2} width={layout.cell + 5} height={layout.height + 4} />
      )}
    </svg>
  ); // prettier-ignore
}

/** From the ratio it had to the one it has. What became not checked has none: a broken box up to 1.00. */
function arrow(look: Look, x: number, w: number, was: number, is: number, foot: number): string {
  const middle = x + w / 2;
  if (look === 'added') return `M${middle} ${foot - 9}v8M${middle - 3.5} ${foot - 5}h7`;
  if (look === 'gone') return `M${middle - 3} ${foot - 8}l6 6M${middle + 3} ${foot - 8}l-6 6`;
  if (look === 'unchecked') return `M${x + 0.5} ${foot - 0.5}V${Math.min(was, foot - 8)}h${w - 1}V${foot - 0.5}`;
  // at least as tall as it takes to be seen
  const base = Math.abs(was - is) < 5 ? is + (was >= is ? 5 : -5) : was;
  if (look === 'over') {
    // notched at its head, like a cell that is over
    const depth = Math.min(Math.abs(base - is), 4);
    return `M${x} ${base}V${is}L${middle} ${is + depth} ${x + w} ${is}V${base}z`;
  }
  return `M${x} ${base}H${x + w}L${middle} ${is}z`;
}
