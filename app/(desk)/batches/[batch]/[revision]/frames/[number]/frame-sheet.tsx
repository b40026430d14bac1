'use client';
import { keepPreviousData, useQuery } from '@tanstack/react-query';
import { useState } from 'react';
import { Certificate } from '@/components/certificate/certificate';
import type { Diagram } from '@/lib/drawing/captions';
import type { DrawingBuckled } from '@/lib/drawing/drawing-data';
import { FrameDrawing } from '@/components/drawing/frame-drawing';
import { CheckWorking } from '@/components/working/check-working';
import { Fact } from '@/components/ui/fact';
import { Empty, Notice } from '@/components/ui/notice';
import { QuantityText } from '@/components/ui/quantity-text';
import { Columns, Zone } from '@/components/ui/sheet';
import type { FrameDetail } from '@/app/_server/frame-detail';
import { api, pages } from '@/lib/api/addresses';
import { request } from '@/lib/api/fetch';
import { ChecksTable } from './checks-table';
import { FrameHandChecks, FrameMarks } from './frame-marks';
import { MembersTable, MovementsTable, ReactionsTable } from './figures';

interface FrameSheetProps {
  readonly batch: number;
  readonly letter: string;
  readonly first: FrameDetail;
  /** The list that the frame was opened from, as its address has it. */
  readonly list: string;
  /** The person may make the next revision from this one. */
  readonly mayChange: boolean;
  /** It was sent to check: its marks are shown. */
  readonly sent: boolean;
}

/** Drawing left, checks and one open working right, the chosen result's figures below. */
export function FrameSheet({ batch, letter, first, list, mayChange, sent }: FrameSheetProps) {
  const [result, setResult] = useState(first.drawing?.chosen?.name ?? null);
  const [open, setOpen] = useState<string | null>(first.checks[0]?.id ?? null);
  const address = api.frame(batch, letter, first.number) + (result === null ? '' : `?result=${encodeURIComponent(result)}`);
  const [lookedAt, setLookedAt] = useState<Diagram>('M');
  const asked = useQuery({
    queryKey: ['frame', address],
    queryFn: ({ signal }) => request<{ frame: FrameDetail }>(address, { signal }),
    initialData: result === (first.drawing?.chosen?.name ?? null) ? { frame: first } : undefined,
    placeholderData: keepPreviousData,
    staleTime: Infinity,
  });
  const frame = asked.data?.frame ?? first;
  const { drawing, units, nearLimit } = frame;
  // a colleague who is sent the address sees the same result
  const choose = (name: string) => {
    setResult(name);
    const params = new URLSearchParams(window.location.search);
    params.set('show', name);
    window.history.replaceState(null, '', `?${params.toString()}`);
  };
  const change = mayChange ? (member: string) => pages.change(batch, letter, { frame: frame.id, member }) : null;
  const numbers = (of: string) =>
    pages.numbers(batch, letter, frame.number, { of, ...(result === null ? {} : { show: result }) }, list);
  const chosen = drawing?.chosen ?? null;
  const buckles = chosen !== null && chosen.method.criticalLoadFactor !== null;
  const shape = useQuery({
    queryKey: ['buckled', batch, letter, frame.number, chosen?.name],
    queryFn: ({ signal }) =>
      request<{ shape: DrawingBuckled }>(api.buckled(batch, letter, frame.number, chosen?.name ?? ''), { signal }),
    enabled: lookedAt === 'B' && buckles,
    staleTime: Infinity,
  });
  const check = frame.checks.find((one) => one.id === open);
  const main = (
    <>
      {asked.error && <Notice kind="error">{asked.error.message}</Notice>}
      {shape.error && <Notice kind="error">The buckled shape was not brought: {shape.error.message}</Notice>}
      {drawing === null ? (
        <Zone title="No drawing">
          <Empty>
            <p>
              Errors in its sheets stop this frame, so there is nothing to draw. Mend them at their cells and bring the sheets in
              again.
            </p>
          </Empty>
        </Zone>
      ) : (
        <Zone flush>
          <FrameDrawing
            data={drawing}
            onChoose={choose}
            loading={asked.isPlaceholderData}
            buckled={shape.data?.shape ?? null}
            onDiagram={setLookedAt}
          />
        </Zone>
      )}
      {drawing?.chosen && (
        <>
          <Zone
            title="Members"
            note={`${drawing.chosen.name}: forces and their places; ratio over all checks; a member’s name leads to the numbers behind it`}
            flush
          >
            <MembersTable drawing={drawing} result={drawing.chosen} numbers={numbers} change={change} />
          </Zone>
          <div className="border-hair grid border-t md:grid-cols-2">
            <Zone title="Movements of nodes" note={drawing.chosen.name} flush>
              <MovementsTable drawing={drawing} result={drawing.chosen} />
            </Zone>
            <Zone title="Reactions" note={`${drawing.chosen.name}: what each support does to the frame`} flush>
              <ReactionsTable drawing={drawing} result={drawing.chosen} />
            </Zone>
          </div>
        </>
      )}
      {drawing !== null && <FrameHandChecks batch={batch} letter={letter} number={first.number} />}
      <Zone title="Certificate" className="zone-late" note={certificateWords(frame)}>
        <Certificate {...frame.vouched} />
      </Zone>
    </>
  );
  const side = (
    <>
      {sent && <FrameMarks batch={batch} letter={letter} number={first.number} />}
      <Zone title="Checks" note={checkWords(frame)}>
        {frame.failure && <Notice kind="error">{frame.failure}</Notice>}
        {frame.status === 'waiting' && <Notice>This frame has not been run yet.</Notice>}
        {frame.notChecked.map((reason) => (
          <Notice key={reason} kind="near">
            Not checked: {reason}
          </Notice>
        ))}
        {frame.checks.length > 0 && (
          <ChecksTable checks={frame.checks} units={units} nearLimit={nearLimit} open={open} onOpen={setOpen} />
        )}
      </Zone>
      {check && (
        <Zone>
          <CheckWorking check={check} nearLimit={nearLimit} />
        </Zone>
      )}
      <Zone title="Mass and assumptions">
        <dl className="facts">
          <Fact name="mass of one frame">
            {frame.mass === null ? 'not known' : <QuantityText value={frame.mass} quantity="mass" units={units} />}
            {frame.count !== 1 && `, ${frame.count} off`}
          </Fact>
        </dl>
        {frame.assumptions.length > 0 && (
          <ul className="list-disc pl-5">
            {frame.assumptions.map((one) => (
              <li key={one}>{one}</li>
            ))}
          </ul>
        )}
        {frame.note && <p>Note of the sheet: {frame.note}</p>}
      </Zone>
    </>
  );
  return <Columns main={main} side={side} />;
}

function checkWords({ checks }: FrameDetail): string {
  if (checks.length === 0) return 'none';
  return `${checks.length}, each with its governing combination; a row opens its working`;
}

/** "all passed", "second analysis not made" … */
function certificateWords({ vouched: { lines } }: FrameDetail): string {
  if (lines.length === 0) return 'no solution, so there is nothing to vouch for';
  if (lines.some((line) => line.outcome === 'outside')) return 'outside its tolerances';
  return lines.every((line) => line.outcome === 'passed')
    ? 'what vouches for these figures: all passed'
    : 'what vouches for these figures: all that was made passed';
}
