'use client';
import { useVirtualizer } from '@tanstack/react-virtual';
import { useEffect, useMemo, useRef } from 'react';
import type { Verdict } from '@/lib/results/result';
import { RatioText } from '../ui/ratio-text';
import { VerdictMark } from '../ui/verdict-mark';
import { CheckMark, type CheckMarkKind } from './check-mark';

export interface CheckListRow {
  /** Place in sheet order, from 1. */
  readonly number: number;
  readonly id: string;
  readonly part: 'over' | 'not checked' | 'near' | 'sample';
  /** Every reason it is on the list for. */
  readonly why: readonly string[];
  readonly verdict: Verdict;
  readonly ratio: number | null;
  readonly check: string | null;
  readonly subject: string | null;
  readonly seen: boolean;
  readonly openQueries: number;
  readonly toAccept: number;
  readonly accepted: number;
}

interface CheckListProps {
  readonly rows: readonly CheckListRow[];
  readonly nearLimit: number;
  /** Number of the frame that is looked at. */
  readonly at: number | null;
  readonly onGo: (number: number) => void;
}

type Line = { readonly part: string; readonly count: number; readonly done: number } | CheckListRow;

const partWords: Readonly<Record<CheckListRow['part'], string>> = {
  over: 'Over, all',
  'not checked': 'Not checked, all',
  near: 'Near, all',
  sample: 'Sample of within,',
};

/** Above this many lines only those in sight are drawn. */
const virtualAbove = 300;
const rowHeight = 40;
const partHeight = 30;

/** What a checker goes through, in parts: each frame with its ratio, why it is here, and its marks. */
export function CheckList({ rows, nearLimit, at, onGo }: CheckListProps) {
  const box = useRef<HTMLDivElement>(null);
  const lines = useMemo(() => inParts(rows), [rows]);
  const virtual = lines.length > virtualAbove;
  // eslint-disable-next-line react-hooks/incompatible-library -- the virtualizer's own object changes as it scrolls; nothing here is memoised on it
  const virtualizer = useVirtualizer({
    count: virtual ? lines.length : 0,
    getScrollElement: () => box.current,
    estimateSize: (i) => (isPart(lines[i]!) ? partHeight : rowHeight),
    overscan: 12,
    initialRect: { width: 430, height: 640 },
  });
  const line = lines.findIndex((one) => !isPart(one) && one.number === at);
  useEffect(() => {
    if (line < 0) return;
    if (virtual) virtualizer.scrollToIndex(line, { align: 'auto' });
    else showWithin(box.current, line);
    // eslint-disable-next-line react-hooks/exhaustive-deps -- scrolled to when another frame is looked at, not when the list is drawn again
  }, [at]);
  const draw = (one: Line) =>
    isPart(one) ? <Part {...one} /> : <Row row={one} nearLimit={nearLimit} current={one.number === at} onGo={onGo} />;
  return (
    <div className="ck-list" ref={box} role="region" tabIndex={0} aria-label="Frames to see" data-check-list>
      {virtual ? (
        <div className="ck-list-inner" style={{ height: virtualizer.getTotalSize() }}>
          {virtualizer.getVirtualItems().map((item) => (
            <div key={item.key} className="ck-line" style={{ top: item.start, height: item.size }}>
              {draw(lines[item.index]!)}
            </div>
          ))}
        </div>
      ) : (
        lines.map((one, i) => (
          <div key={i} style={{ height: isPart(one) ? partHeight : rowHeight }}>
            {draw(one)}
          </div>
        ))
      )}
    </div>
  );
}

/** Scrolls the box alone, and only as far as needed: the page stays where it is. */
function showWithin(box: HTMLElement | null, line: number): void {
  const child = box?.children[line];
  if (!box || !(child instanceof HTMLElement)) return;
  const top = child.getBoundingClientRect().top - box.getBoundingClientRect().top + box.scrollTop;
  if (top < box.scrollTop) box.scrollTop = top;
  else if (top + child.offsetHeight > box.scrollTop + box.clientHeight)
    box.scrollTop = top + child.offsetHeight - box.clientHeight;
}

const isPart = (line: Line): line is Extract<Line, { done: number }> => 'done' in line;

function inParts(rows: readonly CheckListRow[]): Line[] {
  const lines: Line[] = [];
  for (const part of ['over', 'not checked', 'near', 'sample'] as const) {
    const of = rows.filter((row) => row.part === part);
    if (of.length === 0) continue;
    lines.push({ part: partWords[part], count: of.length, done: of.filter((row) => row.seen).length }, ...of);
  }
  return lines;
}

function Part({ part, count, done }: { readonly part: string; readonly count: number; readonly done: number }) {
  return (
    <div className="ck-part">
      <h3>
        {part} {count.toLocaleString('en-GB')}
      </h3>
      <span>{done.toLocaleString('en-GB')} seen</span>
    </div>
  );
}

interface RowProps {
  readonly row: CheckListRow;
  readonly nearLimit: number;
  readonly current: boolean;
  readonly onGo: (number: number) => void;
}

function Row({ row, nearLimit, current, onGo }: RowProps) {
  const { number, id, verdict, ratio, check, subject, why } = row;
  return (
    <button
      type="button"
      className={`ck-row ${current ? 'ck-row-current' : ''}`}
      aria-current={current ? 'true' : undefined}
      onClick={() => onGo(number)}
    >
      <b className="ck-id">{id}</b>
      <span className="ck-ratio">
        <RatioText ratio={ratio} verdict={verdict} nearLimit={nearLimit} /> <VerdictMark verdict={verdict} />
        <span className="sr-only">{verdict}</span>
      </span>
      <span className="ck-governs">{[check, subject].filter(Boolean).join(' ')}</span>
      <Marks row={row} />
      <span className="ck-why">{why.join(' · ')}</span>
    </button>
  );
}

/** The weightiest mark in words: an open query, all accepted, seen; with how much of it is left to accept. */
function Marks({ row: { seen, openQueries, toAccept, accepted } }: { readonly row: CheckListRow }) {
  const kind: CheckMarkKind | null =
    openQueries > 0 ? 'queried' : toAccept > 0 && accepted === toAccept ? 'accepted' : seen ? 'seen' : null;
  return (
    <span className="ck-marks">
      {kind === null ? (
        <span className="ck-none">to see</span>
      ) : (
        <span className="ck-green">
          <CheckMark kind={kind} /> {kind}
          {kind !== 'seen' && !seen && <span className="ck-none">, to see</span>}
        </span>
      )}
      {accepted < toAccept && <span className="ck-left">{(toAccept - accepted).toLocaleString('en-GB')} to accept</span>}
    </span>
  );
}
