'use client';
import { keepPreviousData, useQuery } from '@tanstack/react-query';
import { useCallback, useEffect, useRef, useState } from 'react';
import { FrameDrawing } from '@/components/drawing/frame-drawing';
import { SectionOffers, type SectionOffered } from '@/components/sections/section-offers';
import { CheckWorking } from '@/components/working/check-working';
import { Button } from '@/components/ui/button';
import { Field } from '@/components/ui/field';
import { Finder } from '@/components/ui/finder';
import { Notice } from '@/components/ui/notice';
import { Columns, Zone } from '@/components/ui/sheet';
import { api } from '@/lib/api/addresses';
import { request } from '@/lib/api/fetch';
import type { Frame } from '@/lib/model/frame';
import type { Settings } from '@/lib/model/settings';
import type { SectionTaken } from '@/lib/sizing/section-taken';
import type { TriedSection, TryOf } from '@/lib/sizing/taken-by';
import type { TryTold } from '@/lib/sizing/try-sections';
import type { System } from '@/lib/units/quantity';
import { ChecksTable } from '../checks-table';
import { KeptTries, type Kept } from './kept-tries';
import { tryOptions, wordsOf } from './try-options';
import { TurnIntoChange } from './turn-into-change';
import { useEngine } from './use-engine';

interface TrySheetProps {
  readonly batch: number;
  readonly letter: string;
  readonly number: number;
  readonly next: string;
  readonly units: System;
  readonly nearLimit: number;
  readonly mayChange: boolean;
  /** "member AB": what the address asks to begin with. */
  readonly first: string | null;
  /** The section that it asks to begin with. */
  readonly to: string | null;
}

interface Model {
  readonly frame: Frame;
  readonly settings: Settings;
}

/** The frame's model is brought, then every try is worked out here. */
export function TrySheet(props: TrySheetProps) {
  const { batch, letter, number } = props;
  const model = useQuery({
    queryKey: ['model', batch, letter, number],
    queryFn: ({ signal }) => request<Model>(api.model(batch, letter, number), { signal }),
    staleTime: Infinity,
  });
  return (
    <>
      <Zone title="Try sections" level={1} note="a try: nothing is stored">
        {model.isPending && <p role="status">Bringing the frame …</p>}
        {model.error && <Notice kind="error">{model.error.message}</Notice>}
      </Zone>
      {model.data && <Trying {...props} {...model.data} />}
    </>
  );
}

const nothing: readonly TriedSection[] = [];

function Trying({ batch, letter, next, units, nearLimit, mayChange, first, to, frame, settings }: TrySheetProps & Model) {
  const { options, of } = tryOptions(frame);
  const [chosen, setChosen] = useState(() => (first !== null && of.has(first) ? first : (options[0]?.value ?? '')));
  const [typed, setTyped] = useState(to ?? '');
  const [tried, setTried] = useState(nothing);
  const [show, setShow] = useState<string | null>(null);
  const [kept, setKept] = useState<readonly Kept[]>([]);
  const [shown, setShown] = useState<{ readonly tried: readonly TriedSection[]; readonly told: TryTold } | null>(null);
  const [refused, setRefused] = useState<string | null>(null);
  const [open, setOpen] = useState<string | null>('0');
  const { busy, ask } = useEngine();
  const takes = useRef(0);
  const search = typed.trim();
  const library = useQuery({
    queryKey: ['sections', search],
    queryFn: ({ signal }) => request<{ sections: readonly SectionOffered[]; suggestion: string | null }>(`${api.sections}?q=${encodeURIComponent(search)}`, { signal }),
    enabled: search.length > 1,
    placeholderData: keepPreviousData,
  }); // prettier-ignore

  useEffect(() => {
    ask({ frame, settings, tried, show }, (outcome) => {
      if ('refused' in outcome) {
        setRefused(outcome.refused);
        return;
      }
      setRefused(null);
      setShown({ tried, told: outcome.told });
      setKept((before) => (before.some((one) => one.tried === tried) ? before : [...before, { tried, told: outcome.told }]));
    });
  }, [ask, frame, settings, tried, show]);

  const take = useCallback(
    async (name: string, target: TryOf | undefined) => {
      if (!target) return;
      const turn = (takes.current += 1);
      try {
        const materials = [...new Set(frame.materials.map((material) => material.name))];
        const { taken } = await request<{ taken: SectionTaken }>(api.section(batch, letter, name, materials));
        // of two that were pressed the later one holds, whichever is brought first
        if (turn !== takes.current) return;
        setTried((before) => [...before.filter((one) => wordsOf(one.of) !== wordsOf(target)), { of: target, taken }]);
      } catch (error) {
        if (turn === takes.current)
          setRefused(error instanceof Error ? error.message : 'The section was not brought. Try again.');
      }
    },
    [batch, letter, frame],
  );
  const asked = useRef(to);
  useEffect(() => {
    const name = asked.current;
    asked.current = null;
    if (name !== null && name.trim() !== '') void take(name, tryOptions(frame).of.get(chosen));
  }, [take, frame, chosen]);
  const told = shown?.told ?? null;
  const check = told?.checks.find((one) => one.id === open);
  const offered = search.length > 1 && !library.isPlaceholderData ? library.data?.sections : undefined;
  const only = offered?.length === 1 ? offered[0]?.designation : undefined;
  const taken = tried.find((one) => wordsOf(one.of) === chosen)?.taken.section.name ?? null;
  return (
    <>
      <Zone title="Which members, which section">
        <div className="try-line">
          <Finder label="Members" options={options} value={chosen} onChange={setChosen} />
          <Field label="Section" type="search" placeholder="a designation however typed" value={typed} onChange={(event) => setTyped(event.target.value)} onKeyDown={(event) => { if (event.key === 'Enter' && only) void take(only, of.get(chosen)); }} />
          <p role="status" className="try-state">
            {busy ? 'Working it out …' : tried.length === 0 ? 'As stored.' : tried.map((one) => `${wordsOf(one.of)} → ${one.taken.section.name}`).join('; ')}
          </p>
          {tried.length > 0 && <Button onClick={() => setTried(nothing)}>Back to what is stored</Button>}
        </div>
        <div className="try-offers">
        {search.length > 1 && library.data && (
          <SectionOffers offered={library.data.sections} suggestion={library.data.suggestion} typed={search} chosen={taken} units={units} onChoose={(name) => void take(name, of.get(chosen))} />
        )}
        </div>
        {refused && <Notice kind="error">{refused}</Notice>}
      </Zone>
      {told && (
        <Columns
          main={
            <>
              <Zone flush>
                <FrameDrawing data={told.drawing} onChoose={setShow} loading={busy} />
              </Zone>
              {kept.length > 0 && (
                <Zone title="Tries side by side" note="a row brings its try back; none is stored" flush>
                  <KeptTries kept={kept} shown={tried} units={units} nearLimit={nearLimit} onTake={setTried} />
                </Zone>
              )}
            </>
          }
          side={
            <>
              <Zone title="Checks" note={tried.length === 0 ? 'as stored' : 'of the try'}>
                {told.failure && <Notice kind="error">{told.failure}</Notice>}
                {told.notChecked.map((reason) => (
                  <Notice key={reason} kind="near">
                    Not checked: {reason}
                  </Notice>
                ))}
                {told.checks.length > 0 && <ChecksTable checks={told.checks} units={units} nearLimit={nearLimit} open={open} onOpen={setOpen} />}
              </Zone>
              {check && (
                <Zone>
                  <CheckWorking check={check} nearLimit={nearLimit} />
                </Zone>
              )}
              {mayChange && tried.length > 0 && !busy && refused === null && (
                <TurnIntoChange batch={batch} letter={letter} next={next} frame={frame} tried={tried} />
              )}
            </>
          }
        />
      )}
    </>
  ); // prettier-ignore
}
