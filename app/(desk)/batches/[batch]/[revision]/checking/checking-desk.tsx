'use client';
import { keepPreviousData, useQuery, useQueryClient } from '@tanstack/react-query';
import { useRouter } from 'next/navigation';
import { useCallback, useEffect, useMemo, useState } from 'react';
import { CheckList } from '@/components/checking/check-list';
import { CheckMark } from '@/components/checking/check-mark';
import { HandChecksShown } from '@/components/checking/hand-checks-shown';
import { Strip } from '@/components/strip/strip';
import { Notice } from '@/components/ui/notice';
import { Zone } from '@/components/ui/sheet';
import { useKeys } from '@/components/ui/use-keys';
import type { CheckingDetail } from '@/app/_server/checking-detail';
import type { FrameDetail } from '@/app/_server/frame-detail';
import { api, pages } from '@/lib/api/addresses';
import { request } from '@/lib/api/fetch';
import type { StripFrame } from '@/lib/drawing/strip-data';
import { FrameFacts } from './frame-facts';
import { FramePanel } from './frame-panel';
import { PassOrReturn } from './pass-or-return';
import { useFrameChecking, withSeen } from './use-frame-checking';

interface CheckingDeskProps {
  readonly batch: number;
  readonly letter: string;
  readonly nearLimit: number;
  readonly first: CheckingDetail;
  readonly strip: readonly StripFrame[];
  /** Number of the frame that the address names. */
  readonly asked: number | null;
}

/** A checker's desk: what has to be seen and why at the left; the strip, the frame and its marks at the right; pass or return below. */
export function CheckingDesk({ batch, letter, nearLimit, first, strip, asked }: CheckingDeskProps) {
  const client = useQueryClient();
  const router = useRouter();
  const key = useMemo(() => ['checking', batch, letter], [batch, letter]);
  const { data: detail } = useQuery({
    queryKey: key,
    queryFn: async ({ signal }) =>
      (await request<{ checking: CheckingDetail }>(api.checking(batch, letter), { signal })).checking,
    initialData: first,
    staleTime: 10_000,
  });
  const rows = detail.list;
  const [chosen, setChosen] = useState<number | null>(asked ?? rows.find((row) => !row.seen)?.number ?? rows[0]?.number ?? null);
  const at = rows.findIndex((row) => row.number === chosen);
  const number = chosen ?? 0;
  const frameQuery = useCallback(
    (of: number) => ({
      queryKey: ['frame', api.frame(batch, letter, of)],
      queryFn: ({ signal }: { signal: AbortSignal }) => request<{ frame: FrameDetail }>(api.frame(batch, letter, of), { signal }),
      staleTime: Infinity,
    }),
    [batch, letter],
  );
  const asking = useQuery({ ...frameQuery(number), enabled: chosen !== null, placeholderData: keepPreviousData });
  const acts = useFrameChecking(batch, letter, number, chosen !== null);
  const next = rows[at + 1]?.number ?? null;
  // the next frame is there before it is asked for: a list is read faster than a frame is fetched
  useEffect(() => {
    if (next !== null) void client.prefetchQuery(frameQuery(next));
  }, [client, frameQuery, next]);
  const go = useCallback((to: number | null | undefined) => {
    if (to === null || to === undefined) return;
    setChosen(to);
    window.history.replaceState(null, '', `?frame=${to}`);
  }, []);
  const seenAndNext = () => {
    const row = rows[at];
    if (row && detail.mayMark && !row.seen) {
      client.setQueryData<CheckingDetail>(key, (known) => known && withSeen(known, row.number, true));
      acts.seen(true);
    }
    if (row) go(next);
  };
  useKeys({
    j: () => go(next),
    k: () => go(rows[at - 1]?.number),
    o: () => router.push(pages.frame(batch, letter, number)),
    ...(detail.mayMark ? { s: seenAndNext, q: () => focusOn('q'), a: () => focusOn('a') } : {}),
  });
  useSpace(detail.mayMark ? seenAndNext : null);
  const marked = useMemo(() => withMarks(strip, rows), [strip, rows]);
  const frame = asking.data?.frame ?? null;
  const counts = countMarks(rows);
  return (
    <>
      <div className="ck-desk">
        <div className="ck-side">
          <Zone
            title="To see, and why"
            level={1}
            note={`${detail.progress.seen.toLocaleString('en-GB')} of ${detail.progress.listed.toLocaleString('en-GB')} seen`}
          >
            <details className="ck-details">
              <summary>The rule of this list</summary>
              <p className="ck-note">{detail.rule}</p>
            </details>
          </Zone>
          <CheckList rows={rows} nearLimit={nearLimit} at={chosen} onGo={go} />
        </div>
        <div className="min-w-0">
          <Zone>
            <Strip
              frames={marked}
              nearLimit={nearLimit}
              initial={chosen === null ? undefined : chosen - 1}
              onOpen={(index) => go(index + 1)}
              title="Marks on the strip"
              note={
                <>
                  <CheckMark kind="seen" /> {counts.seen} seen <CheckMark kind="queried" /> {counts.queried} queried{' '}
                  <CheckMark kind="accepted" /> {counts.accepted} accepted, with a reason
                </>
              }
              filters={false}
            />
          </Zone>
          <div className="ck-frame">
            <div className="min-w-0" aria-busy={asking.isPlaceholderData}>
              {asking.error && <Notice kind="error">{asking.error.message}</Notice>}
              {frame && (
                <FrameFacts
                  key={frame.number}
                  frame={frame}
                  href={pages.frame(batch, letter, frame.number)}
                  why={rows.find((row) => row.number === frame.number)?.why ?? []}
                />
              )}
              {acts.marks?.handChecks && (
                <Zone>
                  <details className="ck-details">
                    <summary>Checks by hand</summary>
                    <HandChecksShown checks={acts.marks.handChecks} units={acts.marks.units} />
                  </details>
                </Zone>
              )}
            </div>
            <div className="ck-marks-side">
              <FramePanel acts={acts} onSeen={detail.mayMark && at >= 0 ? seenAndNext : undefined} />
            </div>
          </div>
        </div>
      </div>
      {detail.queries.length > 0 && (
        <Zone title="Every query of this revision" note={`${detail.progress.openQueries} open`} className="ck-queries">
          <ul>
            {detail.queries.map((query) => (
              <li key={query.id}>
                <CheckMark kind="queried" />{' '}
                <button type="button" className="link choice-plain" onClick={() => go(query.number)}>
                  {query.frameId}
                </button>{' '}
                <b>{query.raisedBy}</b>: {query.messages[0]?.text}{' '}
                <span className="ck-none">
                  {query.closed ? `closed, ${query.closed.when}` : `open, ${answers(query.messages.length - 1)}`}
                </span>
              </li>
            ))}
          </ul>
        </Zone>
      )}
      <PassOrReturn batch={batch} letter={letter} detail={detail} />
    </>
  );
}

const answers = (n: number): string => (n === 0 ? 'no answer yet' : n === 1 ? '1 answer' : `${n} answers`);

function focusOn(key: 'q' | 'a'): void {
  const field = document.querySelector<HTMLTextAreaElement>(`textarea[data-key="${key}"]`);
  field?.focus();
  field?.scrollIntoView({ block: 'nearest' });
}

/** Space marks a frame where nothing else takes it: on the page itself, or on the list. */
function useSpace(act: (() => void) | null): void {
  useEffect(() => {
    if (act === null) return;
    const onKey = (event: KeyboardEvent) => {
      if (event.key !== ' ' || event.ctrlKey || event.metaKey || event.altKey) return;
      const target = event.target;
      const free = target === document.body || (target instanceof HTMLElement && target.closest('[data-check-list]') !== null);
      if (!free) return;
      event.preventDefault();
      act();
    };
    document.addEventListener('keydown', onKey);
    return () => document.removeEventListener('keydown', onKey);
  }, [act]);
}

const markOf = (row: CheckingDetail['list'][number]): StripFrame['mark'] =>
  row.openQueries > 0 ? 'queried' : row.accepted > 0 && row.accepted === row.toAccept ? 'accepted' : row.seen ? 'seen' : null;

function withMarks(strip: readonly StripFrame[], rows: CheckingDetail['list']): StripFrame[] {
  const marks = new Map(rows.map((row) => [row.number - 1, markOf(row)]));
  return strip.map((frame, i) => ({ ...frame, mark: marks.get(i) ?? frame.mark ?? null }));
}

function countMarks(rows: CheckingDetail['list']) {
  return {
    seen: rows.filter((row) => row.seen).length,
    queried: rows.filter((row) => row.openQueries > 0).length,
    accepted: rows.reduce((sum, row) => sum + row.accepted, 0),
  };
}
