'use client';
import { useVirtualizer } from '@tanstack/react-virtual';
import { useId, useMemo, useRef, useState, type KeyboardEvent, type PointerEvent, type ReactNode } from 'react';
import type { Verdict } from '@/lib/results/result';
import { useWidth } from '../ui/use-width';
import { countVerdicts, type StripFrame } from '@/lib/drawing/strip-data';
import { columnAt, layOutStrip } from '@/lib/drawing/strip-layout';
import { StripLegend } from './strip-legend';
import { StripReadout } from './strip-readout';
import { StripRow } from './strip-row';
import { StripRuler } from './strip-ruler';

interface StripProps {
  /** In sheet order. */
  readonly frames: readonly StripFrame[];
  readonly nearLimit: number;
  /** Address of a frame: `{n}` its number in sheet order from 1, `{frame}` its id. */
  readonly hrefPattern?: string | null;
  readonly title?: ReactNode;
  readonly note?: ReactNode;
  /** Index of the frame that is read first, and again where another is given; default the worst. */
  readonly initial?: number;
  /** A press or Enter on a cell, in place of following its address. */
  readonly onOpen?: (index: number) => void;
  readonly onRead?: (index: number) => void;
  /** Legend counts filter; off in print-like uses. */
  readonly filters?: boolean;
}

/** Above this many frames rows are virtualised in a box of their own. */
const virtualAbove = 1000;

/**
 * The batch at a glance: one cell a frame in sheet order, filled to its governing ratio against a line at 1.00 and
 * shaped by its verdict, tallied at each row's end. One tab stop; arrows, Home, End read; Enter or a press opens.
 */
export function Strip({ frames, nearLimit, hrefPattern, title, note, initial, onRead, onOpen, filters = true }: StripProps) {
  const id = useId();
  const [box, width] = useWidth<HTMLDivElement>(884);
  const [read, setRead] = useState(() => initial ?? worst(frames));
  const [begun, setBegun] = useState(initial);
  if (initial !== begun) {
    setBegun(initial);
    if (initial !== undefined) setRead(initial);
  }
  const [only, setOnly] = useState<Verdict | null>(null);
  const link = useRef<HTMLAnchorElement>(null);
  const scroller = useRef<HTMLDivElement>(null);
  const layout = useMemo(() => layOutStrip(frames.length, width), [frames.length, width]);
  const { columns: inRow } = layout;
  // the same arrays from render to render, so that reading a cell draws two rows again and not all of them
  const slices = useMemo(
    () => Array.from({ length: Math.ceil(frames.length / inRow) }, (_, i) => frames.slice(i * inRow, (i + 1) * inRow)),
    [frames, inRow],
  );
  const rows = slices.length;
  const virtual = frames.length > virtualAbove;
  // eslint-disable-next-line react-hooks/incompatible-library -- the virtualizer's own object changes as it scrolls; nothing here is memoised on it
  const virtualizer = useVirtualizer({
    count: virtual ? rows : 0,
    getScrollElement: () => scroller.current,
    estimateSize: () => layout.rowPitch,
    overscan: 6,
    initialRect: { width, height: 480 },
  });
  const counts = useMemo(() => countVerdicts(frames), [frames]);

  const go = (index: number) => {
    setRead(index);
    onRead?.(index);
    if (virtual) virtualizer.scrollToIndex(Math.floor(index / layout.columns), { align: 'auto' });
  };
  const fits = (index: number) => only === null || frames[index]?.verdict === only;
  const seek = (from: number, step: number) => {
    for (let i = from; i >= 0 && i < frames.length; i += step) if (fits(i)) return i;
    return read;
  };
  const open = () => (onOpen ? onOpen(read) : link.current?.click());
  const onKeyDown = (event: KeyboardEvent) => {
    const { columns } = layout;
    const rowStart = read - (read % columns);
    const last = frames.length - 1;
    const whole = event.ctrlKey || event.metaKey;
    const to: Record<string, () => number> = {
      ArrowRight: () => seek(read + 1, 1),
      ArrowLeft: () => seek(read - 1, -1),
      ArrowDown: () => (read + columns <= last ? seek(read + columns, 1) : read),
      ArrowUp: () => (read - columns >= 0 ? seek(read - columns, -1) : read),
      Home: () => seek(whole ? 0 : rowStart, 1),
      End: () => seek(whole ? last : Math.min(rowStart + columns - 1, last), -1),
      PageDown: () => Math.min(read + 5 * columns, last),
      PageUp: () => Math.max(read - 5 * columns, 0),
    };
    const move = to[event.key];
    if (move) go(move());
    else if (event.key === 'Enter') open();
    else return;
    event.preventDefault();
  };
  const under = (event: PointerEvent): number | null => {
    const row = event.target instanceof Element ? event.target.closest('.strip-row') : null;
    if (!row) return null;
    const bounds = row.getBoundingClientRect();
    const x = ((event.clientX - bounds.left) * layout.width) / (bounds.width || layout.width);
    const index = Number(row.getAttribute('data-from')) + columnAt(layout, x);
    return index < frames.length && x > layout.left - 3 && x < layout.width - layout.right + 3 ? index : null;
  };
  const pressed = useRef<number | null>(null);

  const row = (number: number) => {
    const from = number * layout.columns;
    const slice = slices[number] ?? [];
    return (
      <StripRow
        key={number}
        frames={slice}
        from={from}
        read={read >= from && read < from + slice.length ? read : -1}
        groupBefore={frames[from - 1]?.group ?? null}
        layout={layout}
        only={only}
        idOf={id}
        hatch={`${id}-hatch`}
        nearLimit={nearLimit}
        count={frames.length}
      />
    );
  };
  const frame = frames[read];
  return (
    <div className="strip">
      <div className="zone-head">
        <h2>{title ?? `${frames.length.toLocaleString('en-GB')} frames in sheet order`}</h2>
        <span className="zone-note">{note ?? 'height is the governing ratio, the dotted line is 1.00'}</span>
        <span className="zone-aside">
          <StripLegend counts={counts} only={only} onOnly={filters ? setOnly : null} />
        </span>
      </div>
      <div ref={box}>
        <Hatch id={`${id}-hatch`} />
        <div
          ref={scroller}
          className={`strip-cells ${virtual ? 'strip-scroll' : ''}`}
          role="listbox"
          tabIndex={0}
          aria-label={`${frames.length.toLocaleString('en-GB')} frames in sheet order`}
          aria-activedescendant={frame ? `${id}-${read}` : undefined}
          onKeyDown={onKeyDown}
          onPointerMove={(event) => {
            const index = event.pointerType === 'touch' ? null : under(event);
            if (index !== null && index !== read) {
              setRead(index);
              onRead?.(index);
            }
          }}
          onPointerDown={(event) => {
            const index = under(event);
            pressed.current = index !== null && (event.pointerType !== 'touch' || index === read) ? index : null;
            if (index !== null) go(index);
          }}
          onClick={() => {
            if (pressed.current === read) open();
            pressed.current = null;
          }}
        >
          <StripRuler layout={layout} />
          {virtual ? (
            <div role="presentation" style={{ height: virtualizer.getTotalSize(), position: 'relative' }}>
              {virtualizer.getVirtualItems().map((item) => (
                <div key={item.key} role="presentation" style={{ position: 'absolute', top: item.start, left: 0, right: 0 }}>
                  {row(item.index)}
                </div>
              ))}
            </div>
          ) : (
            Array.from({ length: rows }, (_, number) => row(number))
          )}
        </div>
      </div>
      <StripReadout
        frame={frame}
        number={read + 1}
        count={frames.length}
        href={
          frame && hrefPattern
            ? hrefPattern.replace('{n}', String(read + 1)).replace('{frame}', encodeURIComponent(frame.id))
            : null
        }
        nearLimit={nearLimit}
        linkRef={link}
      />
    </div>
  );
}

/** Near: hatched at 45°, pitch 4, on its wash. */
function Hatch({ id }: { readonly id: string }) {
  return (
    <svg width="0" height="0" className="strip-defs" aria-hidden="true">
      <defs>
        <pattern id={id} width="4" height="4" patternUnits="userSpaceOnUse" patternTransform="rotate(-45)">
          <path className="hatch-ground" d="M0 0h4v4H0z" />
          <path className="hatch-line" d="M0 2h4" />
        </pattern>
      </defs>
    </svg>
  );
}

/** Index of the frame with the largest ratio; the first where there is none. */
function worst(frames: readonly StripFrame[]): number {
  let at = 0;
  frames.forEach((frame, i) => {
    if ((frame.ratio ?? -1) > (frames[at]?.ratio ?? -1)) at = i;
  });
  return at;
}
