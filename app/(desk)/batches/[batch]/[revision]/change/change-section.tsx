'use client';
import { keepPreviousData, useMutation, useQuery } from '@tanstack/react-query';
import { useRouter } from 'next/navigation';
import { useState } from 'react';
import { SectionEffect } from '@/components/sections/section-effect';
import { SectionOffers, type SectionOffered } from '@/components/sections/section-offers';
import { Button } from '@/components/ui/button';
import { Field } from '@/components/ui/field';
import { Notice } from '@/components/ui/notice';
import { Zone } from '@/components/ui/sheet';
import { api, pages } from '@/lib/api/addresses';
import { request, RequestError } from '@/lib/api/fetch';
import type { SectionChange } from '@/lib/changes/change';
import type { SectionPreview } from '@/lib/changes/section-preview';
import type { System } from '@/lib/units/quantity';

interface ChangeSectionProps {
  readonly batch: number;
  readonly letter: string;
  /** The letter that the next revision will have. */
  readonly next: string;
  readonly units: System;
  readonly what: SectionChange['what'];
  /** The members asked for, in words. */
  readonly words: string;
  /** The replacement that the address names: it came from a try or a sizing. */
  readonly first?: string | null;
}

interface Library {
  /** The office's own that fit. */
  readonly own: readonly SectionOffered[];
  readonly sections: readonly SectionOffered[];
  readonly suggestion: string | null;
}

export type PreviewAnswer = Omit<SectionPreview, 'carriedOver'> & {
  readonly carriedOver: number;
  /** Frames and members touched; the lists may be cut. */
  readonly frames: number;
  readonly count: number;
};

/** Chooses the replacement, shows what it touches before anything runs, and makes the next revision with a reason. */
export function ChangeSection({ batch, letter, next, units, what, words, first = null }: ChangeSectionProps) {
  const router = useRouter();
  const [typed, setTyped] = useState(first ?? '');
  const [to, setTo] = useState<string | null>(first);
  const [reason, setReason] = useState('');
  const search = typed.trim();
  const library = useQuery({
    queryKey: ['sections', search],
    queryFn: ({ signal }) => request<Library>(`${api.sections}?q=${encodeURIComponent(search)}`, { signal }),
    enabled: search.length > 1,
    placeholderData: keepPreviousData,
  });
  const change = { kind: 'section' as const, what, to: to ?? '' };
  const preview = useQuery({
    queryKey: ['change preview', batch, letter, JSON.stringify(change)],
    queryFn: ({ signal }) => request<PreviewAnswer>(api.preview(batch, letter), { method: 'POST', json: { change }, signal }),
    enabled: to !== null,
    retry: false,
    staleTime: Infinity,
  });
  const make = useMutation({
    mutationFn: (run: boolean) =>
      request<{ readonly revision: string }>(api.part(batch, letter, 'changes'), {
        method: 'POST',
        json: { changes: [change], reason, run },
      }),
    onSuccess: ({ revision }) => router.push(pages.sheet(batch, revision, 'read')),
  });
  const reasonError = make.error instanceof RequestError ? (make.error.body.fields?.['reason']?.[0] ?? null) : null;
  const busy = make.isPending || make.isSuccess;
  const ready = preview.data !== undefined && !preview.isFetching && !busy;
  const frames = preview.data?.frames ?? 0;
  return (
    <div className="columns">
      <div className="columns-main">
        <Zone title="Replacement" note={words}>
          <Field
            label="Section"
            type="search"
            hint="A designation however typed, one of the office’s own, or a section of the Sections sheet."
            value={typed}
            disabled={busy}
            onChange={(event) => setTyped(event.target.value)}
          />
          {search.length > 1 && library.data && (
            <SectionOffers
              offered={library.data.own.concat(library.data.sections)}
              suggestion={library.data.own.length > 0 ? null : library.data.suggestion}
              typed={search}
              chosen={to}
              units={units}
              onChoose={(section) => {
                make.reset();
                setTo(section);
              }}
            />
          )}
        </Zone>
      </div>
      <div className="columns-side">
        <Zone title="What it touches">
          {to === null && <p>Choose a section: what it touches is shown before anything runs.</p>}
          {to !== null && preview.isFetching && <p role="status">Reading the rows with {to} …</p>}
          {preview.error && <Notice kind="error">{preview.error.message}</Notice>}
          {preview.data && <SectionEffect preview={preview.data} letter={letter} units={units} />}
          {preview.data && (
            <form className="make-change" onSubmit={(event) => event.preventDefault()}>
              <Field
                label="Why it is changed"
                hint="It stands at the head of the new revision and in the activity of the project."
                maxLength={500}
                value={reason}
                error={reasonError}
                disabled={busy}
                onChange={(event) => setReason(event.target.value)}
              />
              {make.error && reasonError === null && <Notice kind="error">{make.error.message}</Notice>}
              <div className="make-change-acts">
                <Button look="filled" disabled={!ready} onClick={() => make.mutate(true)}>
                  Make revision {next} and run {frames === 1 ? 'its frame' : `${frames.toLocaleString('en-GB')} frames`}
                </Button>
                <Button disabled={!ready} onClick={() => make.mutate(false)}>
                  Make revision {next}
                </Button>
              </div>
            </form>
          )}
        </Zone>
      </div>
    </div>
  );
}
